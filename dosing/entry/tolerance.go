package entry

import (
	"regexp"
	"strings"

	"beckline/dosing/margin"
	"beckline/dosing/reading"
)

// toleranceForm is how tolerances are written, for a person.
const toleranceForm = "READING=HALF-WIDTH, such as ph=0.05,alkalinity=2%,temperature=0.3"

// nextTolerance finds where another reading begins, so that a decimal comma is
// not taken for the end of a number.
var nextTolerance = regexp.MustCompile(`[,;]\s*([A-Za-z][A-Za-z-]*\s*=)`)

var leadingNumber = regexp.MustCompile(`^[0-9.,+-]*([eE][+-]?[0-9]+)?`)

// Tolerances reads half-widths of 95 % intervals: READING=HALF-WIDTH with commas
// or semicolons between, each a number in the unit of the reading (bare, or
// written out), or a share of what was read in %. A reading that is not named is
// taken as exact. The error is a *dosing.Problem of field "tolerance" that names
// the reading.
func Tolerances(text string) (margin.Tolerances, error) {
	var t margin.Tolerances
	seen := map[string]bool{}
	for _, part := range strings.Split(nextTolerance.ReplaceAllString(text, "\x00$1"), "\x00") {
		name, amount, found := strings.Cut(part, "=")
		name, amount = strings.ToLower(strings.TrimSpace(name)), strings.TrimSpace(amount)
		if !found || name == "" || amount == "" {
			return t, badInput("tolerance_form", "tolerance", strings.TrimSpace(part), toleranceForm)
		}
		field, ok := reading.Lookup(name)
		if !ok || !contains(margin.Names(), name) {
			return t, badInput("unknown_reading", "tolerance", name, orList(Likely(name, margin.Names(), 3))+orAny(name))
		}
		if seen[name] {
			return t, badInput("given_twice", "tolerance", name, "one half-width a reading")
		}
		seen[name] = true
		one, err := tolerance(field, amount)
		if err == nil {
			err = t.Set(name, one)
		}
		if err != nil {
			return t, err
		}
	}
	return t, nil
}

// orAny offers every name where none comes near.
func orAny(name string) string {
	if len(Likely(name, margin.Names(), 3)) > 0 {
		return ""
	}
	return orList(margin.Names())
}

func contains(names []string, name string) bool {
	for _, n := range names {
		if n == name {
			return true
		}
	}
	return false
}

// tolerance reads one half-width of a field. A bare per cent is a share of what
// was read, also of a strength; a difference in a unit with a zero of its own
// (degrees Fahrenheit) leaves that zero out.
func tolerance(f reading.Field, text string) (margin.Tolerance, error) {
	refuse := func(accepted string) (margin.Tolerance, error) {
		return margin.Tolerance{}, badInput("bad_tolerance", "tolerance", f.Name+" "+text, accepted)
	}
	accepted := "above 0: a number"
	if f.Bare != "" {
		accepted += " in " + reading.ASCII(f.Bare)
	}
	if f.Name != "ph" && f.Name != "temperature" && f.Name != "ph-temperature" {
		accepted += ", or a share such as 2%"
	}
	number := leadingNumber.FindString(text)
	unit := strings.TrimSpace(text[len(number):])
	v, err := reading.Number(number)
	if err != nil || !(v > 0) {
		return refuse(accepted)
	}
	if unit == "%" {
		return margin.Tolerance{Relative: v / 100}, nil
	}
	if unit == "" {
		return margin.Tolerance{Absolute: f.FromBare(v) - f.FromBare(0)}, nil
	}
	at, known := f.From(unit, v)
	zero, _ := f.From(unit, 0)
	if !known {
		return refuse(accepted + "; the unit is not known here")
	}
	return margin.Tolerance{Absolute: at - zero}, nil
}
