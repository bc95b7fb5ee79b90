package entry

import (
	"strings"
	"unicode"

	"beckline/carbonate"
	"beckline/dosing"
	"beckline/dosing/reading"
)

// doseLimits are the hard stop and the top of the usual band of a typed dose,
// kg/m3 (g/L). Common practice, no source.
type doseLimits struct{ most, usual float64 }

var (
	anyDose       = doseLimits{most: 10, usual: 10} // use levels are dosing's to judge
	coagulantDose = doseLimits{most: 0.5, usual: 0.1}
	chlorineDose  = doseLimits{most: 0.05, usual: 0.005} // as Cl2
)

// near is the share by which a dose may pass a limit through rounding alone.
const near = 1e-12

// additions reads the doses that are given, in their order.
func (w *filling) additions(texts []string) {
	for _, text := range texts {
		if w.process(text) || w.chlorine(text) {
			continue
		}
		d, err := reading.ParseDose(text)
		if err != nil {
			w.problems = append(w.problems, problemOf(err))
			continue
		}
		product, problem := productNamed(d.Product)
		if problem != nil {
			problem.Field, problem.Given = reading.DoseField, d.Given
			w.problems = append(w.problems, problem)
			continue
		}
		w.addition(d, product)
	}
}

func (w *filling) addition(d reading.Dose, product dosing.Product) {
	moles, ok := molesPerLitre(d, product)
	if !ok {
		w.problem("unknown_basis", reading.DoseField, d.Given, "mg/L of "+orList(basisNames(product)))
		return
	}
	limits, grams, of := judged(product.Chemical)
	if moles*grams > limits.most*(1+near) {
		w.problem(reading.CodeTooHigh, reading.DoseField, d.Given,
			"0 to "+trimmed(limits.most*1000)+" mg/L as "+of+" for "+product.Name)
		return
	}
	if moles*grams > limits.usual*(1+near) {
		pure := product.Chemical.MolarMass
		w.note(dosing.Warning{Code: "unusual_dose", Field: product.Name, Given: d.Given,
			Value: moles * pure, Limit: limits.usual / grams * pure})
	}
	if d.Basis == "" && habit(product.Chemical) != "" {
		_, amount, _ := strings.Cut(d.Given, "=")
		w.note(dosing.Warning{Code: "basis_assumed", Field: product.Name, Given: strings.TrimSpace(amount)})
	}
	w.result.Additions = append(w.result.Additions, dosing.Addition{Product: product, Dose: dosing.Some(moles)})
}

// judged returns the limits of a chemical's dose, and of what: grams of it per
// mole of the chemical, and its formula.
func judged(c dosing.Chemical) (limits doseLimits, grams float64, of string) {
	switch chlorine := c.Adds[carbonate.Chlorine]; {
	case chlorine > 0:
		return chlorineDose, chlorine * carbonate.Chlorine.MolarMass(), carbonate.Chlorine.Formula()
	case c.Coagulant != dosing.NotCoagulant:
		return coagulantDose, c.MolarMass, c.Formula
	}
	return anyDose, c.MolarMass, c.Formula
}

// molesPerLitre turns a dose on any basis of the product into mol of the
// chemical's formula per litre; ok is false where the basis is not one of them.
func molesPerLitre(d reading.Dose, product dosing.Product) (moles float64, ok bool) {
	c := product.Chemical
	grams := d.MgPerLitre / 1000
	switch wanted := squashed(d.Basis); {
	case wanted == "" || wanted == squashed(c.Formula):
		return grams / c.MolarMass, true
	case wanted == "product":
		return grams * product.Strength / c.MolarMass, true
	default:
		for _, b := range c.Bases {
			if squashed(b.Name) == wanted {
				return grams / b.Mass, true
			}
		}
	}
	return 0, false
}

// basisNames lists the bases of a product: its formula, the trade's, the
// product as delivered.
func basisNames(product dosing.Product) []string {
	names := []string{product.Chemical.Formula}
	for _, b := range product.Chemical.Bases {
		names = append(names, b.Name)
	}
	return append(names, "product")
}

// habit is the basis in which the trade states the doses of a chemical, ""
// where that is the formula itself.
func habit(c dosing.Chemical) string {
	for _, b := range c.Bases {
		if b.Habitual {
			return b.Name
		}
	}
	return ""
}

// squashed keeps the letters and digits of a formula, in small letters.
func squashed(formula string) string {
	return strings.Map(func(r rune) rune {
		if unicode.IsLetter(r) || unicode.IsDigit(r) {
			return unicode.ToLower(r)
		}
		return -1
	}, formula)
}
