package entry

import (
	"errors"
	"slices"
	"strings"

	"beckline/dosing"
	"beckline/dosing/reading"
)

// Form is what was typed. An absent or blank value is one that was not
// measured, never zero.
type Form struct {
	Values  map[string]string // by reading.Field.Name, with or without a unit
	Product string            // catalogue name of the product whose dose is asked for
	Second  string            // another one, right behind it, where two targets are asked for; the settings are the first's
	Adds    []string          // PRODUCT=DOSE or a process, ahead of the product, in the order in which the water meets them
	Thens   []string          // the same, behind it

	TargetAfter string   // name of the addition whose water must meet the target; "" for the finished water
	Sources     []string // waters of a blend instead of one sample: "NAME; flow=...; ph=...; ..."
}

// fields are the readings, targets and settings; the copy is made once, since
// every row of a table walks them.
var fields = reading.Fields()

// Need says what the form is for, and so what it has to hold.
type Need int

// The needs. Both take pH or DIC, alkalinity and temperature.
const (
	NeedWater Need = iota // the water itself, and after the Adds; target and product are not looked at
	NeedDose              // also a product and a target, or two of each
)

// Case reads the whole form. The error is a *dosing.Problem, the first of
// Problems.
func (f Form) Case(need Need) (dosing.Case, error) {
	c, problems := f.read(need)
	if len(problems) > 0 {
		return dosing.Case{}, problems[0]
	}
	return c, nil
}

// Problems lists everything that keeps the form from being a Case, in the order
// of reading.Fields with the product before its settings and the Adds last.
func (f Form) Problems(need Need) []*dosing.Problem {
	_, problems := f.read(need)
	return problems
}

// filling is a form on its way to a case.
type filling struct {
	form     Form
	need     Need
	result   dosing.Case
	problems []*dosing.Problem
}

func (f Form) read(need Need) (dosing.Case, []*dosing.Problem) {
	w := &filling{form: f, need: need}
	if len(f.Sources) > 0 {
		w.sources()
	} else {
		w.readings()
	}
	var solved *dosing.Addition
	if need == NeedDose {
		w.target()
		solved = w.solved()
	}
	w.additions(f.Adds)
	if solved != nil {
		w.result.Additions = append(w.result.Additions, *solved)
	}
	if need == NeedDose {
		w.second()
	}
	w.additions(f.Thens)
	w.targetAfter()
	w.unknownFields()
	return w.result, w.problems
}

// blank reports whether a field was left empty.
func (f Form) blank(name string) bool {
	return strings.TrimSpace(f.Values[name]) == ""
}

// parse reads one field. ok is false where it is blank or cannot be used; the
// latter is noted as a problem.
func (w *filling) parse(field reading.Field) (v reading.Value, ok bool) {
	if w.form.blank(field.Name) {
		return v, false
	}
	v, err := field.Parse(w.form.Values[field.Name])
	if err != nil {
		w.problems = append(w.problems, problemOf(err))
		return v, false
	}
	if v.Unusual {
		w.note(dosing.Warning{Code: unusual(field.Name), Field: field.Name, Given: v.Given, Value: v.SI, Limit: v.Limit})
	}
	return v, true
}

// unusual is the warning code of a field whose value is unusual.
func unusual(field string) string { return "unusual_" + strings.ReplaceAll(field, "-", "_") }

func (w *filling) note(n dosing.Warning) { w.result.Notes = append(w.result.Notes, n) }

func (w *filling) problem(code, field, given, accepted string) {
	w.problems = append(w.problems, badInput(code, field, given, accepted))
}

func badInput(code, field, given, accepted string) *dosing.Problem {
	return &dosing.Problem{
		Kind: dosing.BadInput, Code: code, Field: field,
		Given: reading.Clean(given), Accepted: accepted,
	}
}

// problemOf carries over a refusal of reading.
func problemOf(err error) *dosing.Problem {
	var e *reading.Error
	if errors.As(err, &e) {
		return &dosing.Problem{Kind: dosing.BadInput, Code: e.Code, Field: e.Field, Given: e.Given, Accepted: e.Accepted}
	}
	return &dosing.Problem{Kind: dosing.Failed, Code: "failed", Given: reading.Clean(err.Error())}
}

// unknownFields refuses names that no field has, so that a misspelt reading is
// not taken as one that was not measured.
func (w *filling) unknownFields() {
	var unknown []string
	for name := range w.form.Values {
		if _, ok := reading.Lookup(name); !ok {
			unknown = append(unknown, name)
		}
	}
	slices.Sort(unknown)
	for _, name := range unknown {
		var names []string
		for _, f := range fields {
			names = append(names, f.Name)
		}
		w.problem("unknown_field", reading.Clean(name), name, orList(Nearest(name, names, 3)))
	}
}

// orList joins names as a sentence does: a, b or c.
func orList(names []string) string {
	if len(names) < 2 {
		return strings.Join(names, "")
	}
	last := len(names) - 1
	return strings.Join(names[:last], ", ") + " or " + names[last]
}
