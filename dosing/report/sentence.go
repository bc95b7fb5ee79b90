package report

import (
	"fmt"
	"slices"
	"sort"
	"strings"
	"unicode"

	"beckline/dosing"
	"beckline/dosing/reading"
)

// sentences holds one plain sentence a warning code. A code that is not here
// is shown as its own words, so nothing is ever lost; a test keeps the table
// whole.
var sentences = map[string]func(w dosing.Warning) string{
	"calcium_needed": says("not given, so there is no saturation index and no CCPP; " +
		"enter calcium or calcium hardness"),
	"basis_assumed": basisAssumed,
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
		if w.Value <= 0 {
			return "no alkalinity is left after the coagulant, only free acid; add alkalinity before it"
		}
		return fmt.Sprintf("only %s mg/L of alkalinity (as CaCO3) is left after the coagulant, under 5; add alkalinity before it",
			asMass.write(w.Value*caco3PerEquivalent))
	},
	"coagulant_ph_outside": func(w dosing.Warning) string {
		return fmt.Sprintf("pH %s is outside the range in which the metal leaves as hydroxide "+
			"(about 5.5 to 8.5 for aluminium, above 5 for iron), so its effect is not as computed", Fixed(w.Value, 2))
	},
	"over_use_level": func(w dosing.Warning) string {
		return fmt.Sprintf("%s mg/L is over %s mg/L; look up the product's certified maximum use level",
			asDose.write(w.Value*milli), asDose.write(w.Limit*milli))
	},
	"low_buffer": func(w dosing.Warning) string {
		return fmt.Sprintf("the finished water has little buffer (%s meq/L per pH): a small change of dose moves its pH far",
			asFine.write(w.Value*milli))
	},
	"pump_near_limit": says("the pump would run above 90 % of its output: little is left to trim with, and a wrong reading may need more than it has"),
	"pump_below_turndown": says("the pump would run under 10 % of its output, below a steady feed; " +
		"dilute the product or use a smaller pump"),
	"chlorine_constant_extrapolated": says("the constant of hypochlorous acid was measured from 5 to 35 C only; " +
		"the water is outside that"),
	"co2_above_saturation": says("this pH and alkalinity mean more carbon dioxide than water holds under the pure gas; " +
		"one of the two readings is wrong"),
	"ions_disagree": says("the titrated alkalinity and the balance of the ions part by more than the readings allow"),
	"chloramine_formed": func(w dosing.Warning) string {
		return about(w) + "the free chlorine combines with the ammonia in the water; what is left of it is monochloramine, not free chlorine"
	},
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
	if w.Code == "unusual_dose" {
		return unusualDose(w)
	}
	if field, ok := strings.CutPrefix(w.Code, "unusual_"); ok {
		return unusual(strings.ReplaceAll(field, "_", "-"), w)
	}
	return about(w) + strings.ReplaceAll(w.Code, "_", " ")
}

// unusual says what is usual and what else may have been meant, as the field
// does; where the text that was typed is not at hand, which end of the usual
// band was passed.
func unusual(name string, w dosing.Warning) string {
	s := strings.TrimSpace(name+" "+w.Given) + " is unusual"
	f, ok := reading.Lookup(name)
	if !ok {
		return s + "; check the value and its unit"
	}
	switch v, err := f.Parse(w.Given); {
	case err == nil && v.Unusual:
		s += ": " + ASCII(v.UnusualWhy)
	case w.Value < w.Limit:
		s += ": under " + fieldText(f, w.Limit)
	case w.Value > w.Limit:
		s += ": over " + fieldText(f, w.Limit)
	}
	return s + "; check the value and its unit"
}

// unusualDose is about a dose, typed or found, in kg/m3 of the chemical. What to
// check is the dose where it was typed, and the readings where it was found.
func unusualDose(w dosing.Warning) string {
	of, check := "", "check the readings, the target and their units"
	if p, ok := dosing.ProductByName(w.Field); ok {
		of = " as " + p.Chemical.Formula
	}
	if w.Given != "" {
		check = "check the dose and its basis"
	}
	return fmt.Sprintf("%s: a dose of %s mg/L%s is unusual: over %s mg/L; %s", w.Field,
		asDose.write(w.Value*milli), of, asDose.write(w.Limit*milli), check)
}

// basisAssumed says what a bare dose was taken as and how to write either.
func basisAssumed(w dosing.Warning) string {
	p, _ := dosing.ProductByName(w.Field)
	trade, ok := TradeBasis(p.Chemical)
	if !ok {
		return "the bare dose was taken as the mass of the chemical's own formula; write its basis out"
	}
	given := w.Given
	if !strings.ContainsFunc(given, unicode.IsLetter) {
		given += " mg/L"
	}
	return fmt.Sprintf("the bare dose was taken as %s; the trade states it as %s, so write out which: %s %s or %s %s",
		p.Chemical.Formula, trade.Name, given, trade.Name, given, p.Chemical.Formula)
}

// fieldText is an SI value in the unit that a bare number of the field has.
func fieldText(f reading.Field, si float64) string {
	return strings.TrimSpace(f.Show(si) + " " + ASCII(f.Bare))
}

func says(text string) func(dosing.Warning) string {
	return func(dosing.Warning) string { return text }
}

// stationCodes are the warnings about a water: their field is the product that
// made it so.
var stationCodes = []string{"may_scale", "ph_outside_tested_range", "chlorine_constant_extrapolated"}

// about names what a warning is about, where it is about one thing.
func about(w dosing.Warning) string {
	switch {
	case w.Field != "" && w.Given != "":
		return w.Field + " " + w.Given + ": "
	case w.Field == "raw":
		return "raw water: "
	case w.Field != "" && slices.Contains(stationCodes, w.Code):
		return "after " + w.Field + ": "
	case w.Field != "":
		return w.Field + ": "
	}
	return ""
}
