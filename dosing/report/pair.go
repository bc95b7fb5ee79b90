package report

import (
	"strings"

	"beckline/dosing"
)

// pairLine says why two products cannot meet two targets: which of them would
// have to be taken out of the water, how much, and what the other reaches alone.
func pairLine(p *dosing.Problem) string {
	parts := []string{p.Field + " " + quoted(fieldValue(p.Field, p.Target.Value)) + " " + reason(p)}
	if p.NearestAt.Given {
		parts[0] += ": " + p.Given + " binds, its dose would have to be " + amount(p.Given, p.NearestAt.Value)
	} else {
		parts[0] += ": " + p.Given
	}
	if n := Nearest(p); n.Given {
		parts = append(parts, "the other product alone, at the first target: "+targetFigure(p.Target.Kind, n.Value))
	}
	parts = append(parts, "accepted: other targets, or another pair of products")
	return ASCII(strings.Join(parts, "; "))
}

// pairGiven is the product that binds with the dose that it would need, or both
// products where no doses at all meet the targets.
func pairGiven(p *dosing.Problem) string {
	if !p.NearestAt.Given {
		return p.Given
	}
	return p.Given + " at " + amount(p.Given, p.NearestAt.Value)
}

// amount is a dose of a product, mol/L, in mg/L of its formula; a name that the
// catalogue does not have leaves it in mmol/L.
func amount(product string, moles float64) string {
	p, ok := dosing.ProductByName(product)
	if !ok {
		return asDose.write(moles*milli) + " mmol/L"
	}
	return asDose.write(moles*p.Chemical.MolarMass*milli) + " mg/L as " + p.Chemical.Formula
}
