package entry

import (
	"slices"
	"strings"

	"beckline/dosing"
	"beckline/dosing/reading"
)

var targetKinds = map[string]dosing.TargetKind{
	"target-ph":         dosing.TargetPH,
	"target-alkalinity": dosing.TargetAlkalinity,
	"target-si":         dosing.TargetSaturationIndex,
	"target-ccpp":       dosing.TargetCCPP,
	"target-dic":        dosing.TargetDIC,
}

// target reads the target, or the two that two products are to reach. One too
// many is refused even where it cannot be read: which of them was meant is for
// the person to say.
func (w *filling) target() {
	wanted := 1
	if w.form.two() {
		wanted = 2
	}
	var names, given []string
	for _, field := range fields {
		if field.Group != reading.Target {
			continue
		}
		names = append(names, field.Name)
		if w.form.blank(field.Name) {
			continue
		}
		given = append(given, field.Name)
		if v, ok := w.parse(field); ok {
			t := dosing.Target{Kind: targetKinds[field.Name], Value: v.SI}
			if len(given) == 1 {
				w.result.Target = t
			} else {
				w.result.Second = t
			}
		}
	}
	switch {
	case len(given) == 0:
		w.problem("missing", names[0], "", countWord(wanted)+" of "+orList(names))
	case len(given) < wanted:
		w.problem("two_and_two", "product", w.form.Second, "a second target for the second product, or one product")
	case len(given) > wanted && wanted == 1:
		w.problem("two_targets", given[1], andList(given), "one target a product: "+orList(given)+", or a second product")
	case len(given) > wanted:
		w.problem("two_targets", given[wanted], andList(given), "two targets at a time")
	}
}

// Target reads the one target of a form without a dose to reach it, such as
// that of a blend. Its kind is NoTarget where none is given. The error is a
// *dosing.Problem.
func (f Form) Target() (dosing.Target, error) {
	if !slices.ContainsFunc(fields, func(field reading.Field) bool { return field.Group == reading.Target && !f.blank(field.Name) }) {
		return dosing.Target{}, nil
	}
	w := &filling{form: Form{Values: f.Values}}
	w.target()
	if len(w.problems) > 0 {
		return dosing.Target{}, w.problems[0]
	}
	return w.result.Target, nil
}

// two reports whether a second product is to be solved for.
func (f Form) two() bool { return strings.TrimSpace(f.Second) != "" }

func countWord(n int) string {
	if n == 2 {
		return "two"
	}
	return "one"
}

// second reads the second product that is solved for. It is the catalogue's own:
// strength, temperature and pump are the first one's.
func (w *filling) second() {
	if !w.form.two() {
		return
	}
	product, problem := productNamed(w.form.Second)
	if problem != nil {
		w.problems = append(w.problems, problem)
		return
	}
	if first, p := productNamed(w.form.Product); p == nil && first.Name == product.Name {
		w.problem("same_product", "product", w.form.Second, "two different products")
		return
	}
	w.result.Additions = append(w.result.Additions, dosing.Addition{Product: product, Solve: true})
}

func andList(names []string) string {
	text := names[0]
	for _, n := range names[1:] {
		text += " and " + n
	}
	return text
}
