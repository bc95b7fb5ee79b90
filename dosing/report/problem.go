package report

import (
	"sort"
	"strings"

	"beckline/dosing"
	"beckline/dosing/reading"
)

// reasons holds a few plain words a problem code; they follow the field and
// what was given. Codes of single typed values are in reading.Reason. A code
// that is in neither is shown as its own words; a test keeps the table whole.
var reasons = map[string]string{
	// readings
	"missing":                  "is missing",
	"unknown_field":            "is not a reading, target or setting that is known here",
	"two_targets":              "is one target too many",
	"unknown_product":          "is not a product of the catalogue",
	"bad_strength":             "is not a strength of this product",
	"strength_terms":           "is in other terms than this product's strength",
	"unknown_basis":            "is on a basis that this product does not have",
	"outside_range":            "is outside what is accepted",
	"readings_disagree":        "differs by over 2 % from the other reading of the same thing: swapped, or as Ca?",
	"calcium_above_hardness":   "is less than the calcium in it: swapped, or as Ca?",
	"magnesium_above_hardness": "is less than the magnesium in it: swapped, or as Mg?",
	"alkalinity_below_ph":      "is below what the pH alone implies: check the pH, the alkalinity and its unit",
	"chlorine_with_ammonia":    "and ammonia stand on one water: they form chloramine at once, which is not computed here",
	"calcium_needed":           "is needed for this target",
	"dose_outside_range":       "is a dose outside what is accepted",
	"density_unknown":          "is a strength at which the product's density is not known",
	"two_sources_needed":       "two waters are needed for a blend to a target",
	"no_flow":                  "a source has no flow",
	"not_chlorine":             "is no form of chlorine, so it has no demand or residual",
	"breakpoint_chlorination":  "brings more than 5 of chlorine to 1 of ammonia nitrogen by mass: breakpoint chemistry is not computed here",
	"pair_out_of_reach":        "cannot be met together with the first target by these two products",
	"same_target":              "is the same figure twice: two targets need two figures",
	"two_and_two":              "needs as many targets as products that are solved for",
	"three_solved":             "is a third product to solve for; at most two are",
	"bad_step":                 "is not a step that can be read",
	"bad_source":               "is not a source that can be read",
	"unknown_step":             "names no addition of this line",
	"target_before_dose":       "is asked for before the dose that is to reach it",
	// no answer
	"out_of_reach":     "cannot be reached with this product",
	"wrong_side":       "is on the other side: every dose of this product leads away from it",
	"target_met":       "is met already, no dose is needed",
	"no_such_figure":   "has no value in this water: it needs calcium and carbonate above 0",
	"ionic_strength":   "is above 0.5 mol/L, where the activity equation ends",
	"ph_outside_scale": "leaves the scale of 0 to 14",
	"pump_too_small":   "is too small for this feed",
	// the program
	"solver_failed":             "the solver failed",
	"checks_disagree":           "the answer did not pass its own checks and is not given",
	"published_values_disagree": "does not agree with its published value: do not trust this copy",
	"failed":                    "the program failed",
	"not_written":               "could not be written",
	// the command line and files
	"given_twice":     "is given twice",
	"no_value":        "has no value after it",
	"bad_value":       "has a value that is not taken",
	"bad_flag":        "is not understood",
	"unknown_flag":    "is not a flag of this command",
	"unknown_command": "is not a command",
	"not_with_water":  "is for a dose, and --water asks for none",
	"stray_word":      "stands where nothing is expected",
	"no_input":        "is missing",
	"no_such_file":    "is not there",
	"not_permitted":   "may not be read",
	"is_a_folder":     "is a folder",
	"empty_file":      "is empty",
	"no_header":       "has no header",
	"nul_bytes":       "is not text",
	"line_ends":       "has line ends that are not known here",
	"column_missing":  "is a column that is missing",
	"column_twice":    "is a column that stands twice",
	"column_taken":    "is a column that the answer needs",
	"cell_too_long":   "has a cell that is too long",
	"unclosed_quote":  "has a quote that is never closed",
	"ragged_row":      "is not the header's number of cells",
}

// reasonCodes lists the problem codes that have words of their own, sorted.
func reasonCodes() []string {
	var codes []string
	for code := range reasons {
		codes = append(codes, code)
	}
	sort.Strings(codes)
	return codes
}

const unknownReason = "cannot be used" // what reading.Reason says of a code it does not know

func reason(p *dosing.Problem) string {
	// A product that leaves the alkalinity alone leads nowhere.
	if p.Code == "wrong_side" && p.Target.Kind == dosing.TargetAlkalinity {
		return "is on the other side: no dose of this product leads towards it"
	}
	if r, ok := reasons[p.Code]; ok {
		return r
	}
	if r := reading.Reason(p.Code); r != unknownReason {
		return r
	}
	return strings.ReplaceAll(p.Code, "_", " ")
}

// ProblemLine says a refusal in one line: the field, what was given, what is
// wrong with it, what would be accepted, the nearest reachable value and what
// could reach the target. It has no line break; all but the echo of what was
// given is plain ASCII.
func ProblemLine(p *dosing.Problem) string {
	first := p.Field + " " + quoted(Given(p)) + " " + reason(p)
	if plantFileCode(p.Code) { // what was given says it all
		first = p.Field + " in " + Given(p)
	}
	switch p.Code {
	case "pump_too_small":
		first = "pump is too small: it would have to run at " + Given(p) + " of its output"
	case "ionic_strength": // no reading of its own
		first = "ionic strength " + quoted(Given(p)) + " " + reason(p)
	case "ph_outside_scale":
		first = "pH " + quoted(Given(p)) + " " + reason(p)
	case "pair_out_of_reach":
		return pairLine(p)
	case "failed", "solver_failed", "not_written": // what was given is the machine's word
		first = p.Field + " " + reason(p)
		if given := Given(p); given != "" {
			first += ": " + given
		}
	}
	parts := []string{strings.Join(strings.Fields(first), " ")}
	if accepted := Accepted(p); accepted != "" {
		parts = append(parts, "accepted: "+ASCII(accepted))
	}
	if n := Nearest(p); n.Given {
		parts = append(parts, "nearest reachable: "+targetFigure(p.Target.Kind, n.Value))
	}
	if len(p.CouldReach) > 0 {
		parts = append(parts, "could reach it: "+strings.Join(p.CouldReach, ", "))
	}
	return strings.ReplaceAll(strings.Join(parts, "; "), "\n", " ")
}

// Given is what was given: as typed where there is such a thing, else the value
// in the field's own unit.
func Given(p *dosing.Problem) string {
	switch {
	case p.Code == "pair_out_of_reach":
		return pairGiven(p)
	case p.Given != "":
		return p.Given
	case p.Code == "pump_too_small":
		return Significant(p.Value.Value*100, 3) + " %"
	case p.Code == "ionic_strength" && p.Value.Given:
		return asStrength.write(p.Value.Value) + " mol/L"
	case p.Value.Given:
		return valueText(p.Field, p.Value.Value)
	case p.Target.Kind != dosing.NoTarget && p.Field == p.Target.Kind.Field():
		return strings.TrimSpace(fieldValue(p.Field, p.Target.Value))
	}
	return ""
}

// Accepted is what would be accepted: as the refusal says it, else the range in
// the field's own unit.
func Accepted(p *dosing.Problem) string {
	switch {
	case p.Accepted != "":
		return p.Accepted
	case p.Code == "pump_too_small":
		return "a larger pump, a stronger product or a nearer target"
	case p.Code == "ionic_strength" && p.Nearest.Given: // the dose brings it
		return "a nearer target"
	case p.Code == "ionic_strength":
		return "up to 0.5 mol/L; check conductivity, TDS, the ions and their units"
	case p.Code == "chlorine_with_ammonia":
		return "one of free-chlorine and ammonia"
	case p.Low.Given && p.High.Given && p.Low.Value == p.High.Value:
		return "about " + valueText(p.Field, p.Low.Value)
	case p.Low.Given && p.High.Given && p.Value == p.Low: // the end itself is refused too
		return "above " + valueText(p.Field, p.Low.Value) + " to " + valueText(p.Field, p.High.Value)
	case p.Low.Given && p.High.Given:
		return valueText(p.Field, p.Low.Value) + " to " + valueText(p.Field, p.High.Value)
	case p.Low.Given:
		return "at least " + valueText(p.Field, p.Low.Value)
	case p.High.Given:
		return "at most " + valueText(p.Field, p.High.Value)
	case p.Code == "missing" || p.Code == "calcium_needed":
		if f, ok := reading.Lookup(p.Field); ok {
			return reading.ASCII(f.Accepted())
		}
	}
	return ""
}

// valueText is an SI value of a field with its unit; a dose is in kg/m3.
func valueText(field string, si float64) string {
	if field == "dose" {
		return asDose.write(si*milli) + " mg/L"
	}
	if s := fieldValue(field, si); s != "" {
		return s
	}
	return Significant(si, 3)
}

func fieldValue(field string, si float64) string {
	if f, ok := reading.Lookup(field); ok {
		return fieldText(f, si)
	}
	return ""
}

// Nearest is the nearest reachable value of the target's figure, in the unit of
// its key.
func Nearest(p *dosing.Problem) Number {
	switch p.Target.Kind {
	case dosing.TargetAlkalinity:
		return scaled(p.Nearest, caco3PerEquivalent)
	case dosing.TargetCCPP:
		return scaled(p.Nearest, caco3PerMole)
	case dosing.TargetDIC:
		return scaled(p.Nearest, milli)
	}
	return scaled(p.Nearest, 1)
}

// ProblemJSON is the refusal as one JSON object on one line, ending in a
// newline: {"problem":{"code","field","given","accepted","nearest",
// "could_reach"}}. Nearest is in the unit of the target's key, or null.
func ProblemJSON(p *dosing.Problem) []byte {
	var in, out object
	in.add("code", p.Code)
	in.addText("field", p.Field)
	in.addText("given", Given(p))
	in.addText("accepted", Accepted(p))
	in.add("nearest", Nearest(p))
	could := p.CouldReach
	if could == nil {
		could = []string{}
	}
	in.add("could_reach", could)
	out.add("problem", in)
	return append(plainJSON(out), '\n')
}

// quoted sets off what was given. It has no control characters left.
func quoted(s string) string {
	if s == "" {
		return ""
	}
	return `"` + s + `"`
}
