package report

import (
	"fmt"
	"sort"
	"strings"

	"beckline/dosing"
	"beckline/dosing/reading"
)

// sentences holds one plain sentence a warning code. A code that is not here
// is shown as its own words, so nothing is ever lost; a test keeps the table
// whole.
var sentences = map[string]func(w dosing.Warning) string{
	"calcium_needed": says("not given, so there is no saturation index and no CCPP; " +
		"enter calcium or calcium hardness"),
	"basis_assumed": says("the bare number was taken as the mass of the chemical's own formula; " +
		"the trade states this dose on another basis, so write it out (1.2 mg/L Cl2, 0.7 mg/L F)"),
	"purity_assumed": says("the product was taken as 100 % pure; " +
		"enter its strength from the certificate"),
	"density_at_20c": says("no published density at the product's temperature; " +
		"the one at 20 C was used"),
	"density_beyond_table": says("the strength is above the last published density, which was carried on; " +
		"check the density on the delivery note"),
	"product_may_freeze": func(w dosing.Warning) string {
		if w.Limit > 0 {
			return "the product may freeze or crystallise: it starts at about " + Fixed(celsius(w.Limit), 0) +
				" C; see the supplier's curve"
		}
		return "the product may freeze or crystallise at this temperature; see the supplier's curve"
	},
	"ionic_strength_disagrees": says("this is lower than the ions entered need, so the ions were used; " +
		"check the readings and their units"),
	"charge_imbalance": func(w dosing.Warning) string {
		return fmt.Sprintf("the positive and negative ions entered differ by %s %%; check the major ions",
			Fixed(w.Value*100, 0))
	},
	"dic_uncertain": says("the inorganic carbon hangs on the last digits of this pH; " +
		"enter the measured carbon (--dic), or go by a P-alkalinity or a bench titration"),
	"ph_disagrees_with_dic": func(w dosing.Warning) string {
		return fmt.Sprintf("read as %s, but alkalinity and carbon give %s, which was used; check the three readings",
			Fixed(w.Value, 2), Fixed(w.Limit, 2))
	},
	"ph_outside_tested_range": func(w dosing.Warning) string {
		return fmt.Sprintf("pH %s is outside 4.3 to 11, where the model was tested", Fixed(w.Value, 2))
	},
	"may_scale": says("calcium carbonate may precipitate, pH then lower than shown"),
	"low_alkalinity_for_coagulation": func(w dosing.Warning) string {
		return fmt.Sprintf("only %s mg/L of alkalinity (as CaCO3) is left after the coagulant, under 5; add alkalinity before it",
			asMass.write(w.Value*caco3PerEquivalent))
	},
	"coagulant_ph_outside": func(w dosing.Warning) string {
		return fmt.Sprintf("pH %s is outside the range in which the metal leaves as hydroxide "+
			"(about 5.5 to 8.5 for aluminium, above 5 for iron), so its effect is not as computed", Fixed(w.Value, 2))
	},
	"over_use_level": func(w dosing.Warning) string {
		return fmt.Sprintf("%s mg/L is over the maximum use level of %s mg/L; see the product's certificate",
			asDose.write(w.Value*milli), asDose.write(w.Limit*milli))
	},
	"low_buffer": func(w dosing.Warning) string {
		return fmt.Sprintf("the finished water has little buffer (%s meq/L per pH): a small change of dose moves its pH far",
			asFine.write(w.Value*milli))
	},
	"pump_below_turndown": says("the pump would run under 10 % of its output, below a steady feed; " +
		"dilute the product or use a smaller pump"),
	"chlorine_constant_extrapolated": says("the constant of hypochlorous acid was measured from 5 to 35 C only; " +
		"the water is outside that"),
	"taken_as_dissolved":      says("taken as fully dissolved; what stays as grit or is still dissolving does not count yet"),
	"organic_acid_alkalinity": says("the acid titrates only in part: a measured alkalinity will read above the one shown"),
}

// sentenceCodes lists the warning codes that have a sentence of their own, sorted.
func sentenceCodes() []string {
	var codes []string
	for code := range sentences {
		codes = append(codes, code)
	}
	sort.Strings(codes)
	return codes
}

// Sentence says a warning to an operator in one plain sentence.
func Sentence(w dosing.Warning) string {
	if say, ok := sentences[w.Code]; ok {
		return about(w) + say(w)
	}
	if field, ok := strings.CutPrefix(w.Code, "unusual_"); ok {
		return unusual(strings.ReplaceAll(field, "_", "-"), w)
	}
	return about(w) + strings.ReplaceAll(w.Code, "_", " ")
}

// unusual says which end of the usual band was passed, in the field's own unit.
func unusual(name string, w dosing.Warning) string {
	s := strings.TrimSpace(name+" "+w.Given) + " is unusual"
	f, ok := reading.Lookup(name)
	switch {
	case ok && w.Value < w.Limit:
		s += ": under " + fieldText(f, w.Limit)
	case ok && w.Value > w.Limit:
		s += ": over " + fieldText(f, w.Limit)
	case !ok && w.Value > w.Limit && w.Limit > 0: // a dose, kg/m3
		s += ": over " + asDose.write(w.Limit*milli) + " mg/L"
	}
	return s + "; check the value and its unit"
}

// fieldText is an SI value in the unit that a bare number of the field has.
func fieldText(f reading.Field, si float64) string {
	return strings.TrimSpace(f.Show(si) + " " + reading.ASCII(f.Bare))
}

func says(text string) func(dosing.Warning) string {
	return func(dosing.Warning) string { return text }
}

// about names what a warning is about, where it is about one thing.
func about(w dosing.Warning) string {
	switch {
	case w.Field != "" && w.Given != "":
		return w.Field + " " + w.Given + ": "
	case w.Field == "raw":
		return "raw water: "
	case w.Field != "":
		return w.Field + ": "
	}
	return ""
}
