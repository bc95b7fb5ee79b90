package entry

import (
	"beckline/dosing"
	"beckline/dosing/reading"
)

// ProductAt finds a product of the catalogue at a strength as typed; a blank
// strength is the catalogue's own. The error is a *dosing.Problem of field
// "product" or "strength".
func ProductAt(name, strength string) (dosing.Product, error) {
	w := &filling{form: Form{Product: name, Values: map[string]string{"strength": strength}}, need: NeedDose}
	solved := w.solved()
	if len(w.problems) > 0 {
		return dosing.Product{}, w.problems[0]
	}
	return solved.Product, nil
}

// DoseOf reads an amount of a product in a litre of water, as after the equals
// sign of an addition, into mol/L of the chemical's formula. The error is a
// *dosing.Problem of the field named.
func DoseOf(p dosing.Product, field, amount string) (float64, error) {
	d, err := reading.ParseDose(p.Name + "=" + amount)
	if err != nil {
		problem := problemOf(err)
		problem.Field, problem.Given = field, reading.Clean(amount)
		problem.Accepted = "mg/L of " + orList(basisNames(p))
		return 0, problem
	}
	moles, ok := molesPerLitre(d, p)
	if !ok {
		return 0, badInput("unknown_basis", field, amount, "mg/L of "+orList(basisNames(p)))
	}
	return moles, nil
}
