package dosing

import (
	"fmt"
	"slices"
	"strconv"

	"beckline/dosing/feed"
)

// Stating says in what terms the trade states a product's strength.
type Stating int

// The terms.
const (
	ByWeight            Stating = iota // kg of the formula per kg of product
	AsAvailableChlorine                // kg of Cl2 per kg of product
	AsTradePercent                     // kg of Cl2 per 10 L of product, 1 being 1000 g/L
)

// AtStrength returns the product at another strength. Stated is a fraction, 0
// to 1 with 0 left out, in the terms in which this product's strength is stated
// (p.Stated): 0.25 for 25 % by weight, 0.125 for hypochlorite of 125 g/L Cl2.
// A product whose purity was assumed no longer says so. The error is a *Problem
// of field "strength": a strength that is not above 0 and at most 1, or one
// that the product's density table does not reach.
func (p Product) AtStrength(stated float64) (Product, error) {
	if !(stated > 0 && stated <= 1) {
		return Product{}, strengthProblem(stated, "above 0 and at most 100 %")
	}
	p = p.copy()
	p.StatedStrength = stated
	p.Warns = slices.DeleteFunc(p.Warns, func(code string) bool { return code == purityAssumed })
	percent := strconv.FormatFloat(stated*100, 'g', 4, 64)
	switch p.Stated {
	case AsAvailableChlorine:
		p.Strength = stated * gramsCaOCl2 / (2 * gramsCl2)
		p.StrengthText = percent + " % available chlorine by weight"
		if p.Strength > 1 {
			return Product{}, strengthProblem(stated, "at most 99.1 % available chlorine, the pure salt")
		}
	case AsTradePercent:
		chlorine := stated * 1000 // kg of Cl2 per m3 of product
		fraction, err := p.Density.Fraction(chlorine * gramsNaOCl / gramsCl2)
		if err != nil {
			return Product{}, strengthProblem(stated, fmt.Sprintf("up to %.3g %% trade (g of chlorine per 100 mL), where the density is known",
				p.Density.GreatestMass()*gramsCl2/gramsNaOCl/10))
		}
		p.Strength = fraction
		p.Chemical = sodiumHypochlorite((p.ExcessCaustic / gramsNaOH) / (chlorine / gramsCl2))
		p.StrengthText = fmt.Sprintf("%s %% trade, %.4g g/L as chlorine, %.3g g/L excess caustic", percent, chlorine, p.ExcessCaustic)
	default:
		p.Strength = stated
		p.StrengthText = percent + " % by weight"
		if p.Form == feed.Liquid {
			if greatest := p.Density.Greatest(); stated > greatest {
				return Product{}, strengthProblem(stated, fmt.Sprintf("up to %.4g %% by weight, where the density is known", greatest*100))
			}
		}
	}
	return p, nil
}

func strengthProblem(stated float64, accepted string) *Problem {
	return &Problem{
		Kind: BadInput, Code: "bad_strength", Field: "strength",
		Given:    strconv.FormatFloat(stated*100, 'g', 6, 64) + " %",
		Accepted: accepted,
	}
}

// The makers of the rows of the product table. They run once, at start, on
// constants; a row that cannot be made is a slip in the table, and the tests of
// the table find it, so they leave a product without strength behind.

func liquid(name, title, formula string, strength float64, density feed.Density, purpose Purpose, caution string, text ...string) Product {
	c, _ := ChemicalByFormula(formula)
	p := Product{Name: name, Title: title, Chemical: c, Strength: strength, StatedStrength: strength,
		StrengthText: strconv.FormatFloat(strength*100, 'g', 4, 64) + " % by weight",
		Form:         feed.Liquid, Density: density, Purpose: purpose, Caution: caution}
	if len(text) > 0 {
		p.StrengthText = text[0]
	}
	return p
}

func solid(name, title, formula string, purpose Purpose, caution string) Product {
	c, _ := ChemicalByFormula(formula)
	return Product{Name: name, Title: title, Chemical: c, Strength: 1, StatedStrength: 1,
		StrengthText: "taken as 100 % pure", Form: feed.Solid, Purpose: purpose, Caution: caution,
		Warns: []string{purityAssumed}}
}

func gas(name, title, formula string, purpose Purpose, caution string) Product {
	c, _ := ChemicalByFormula(formula)
	return Product{Name: name, Title: title, Chemical: c, Strength: 1, StatedStrength: 1,
		StrengthText: "pure gas", Form: feed.Gas, Purpose: purpose, Caution: caution}
}

// hypochlorite takes the trade strength (0.125 for 125 g/L Cl2) and the free
// caustic left in it, kg/m3.
func hypochlorite(name, title string, trade, excessCaustic float64, caution string) Product {
	p := Product{Name: name, Title: title, Chemical: sodiumHypochlorite(0), Stated: AsTradePercent,
		ExcessCaustic: excessCaustic, Form: feed.Liquid, Density: feed.SodiumHypochlorite,
		Purpose: Disinfection, Caution: caution}
	p, _ = p.AtStrength(trade)
	return p
}

func availableChlorine(name, title string, chlorine float64, caution string) Product {
	c, _ := ChemicalByFormula("Ca(OCl)2")
	p := Product{Name: name, Title: title, Chemical: c, Stated: AsAvailableChlorine,
		Form: feed.Solid, Purpose: Disinfection, Caution: caution}
	p, _ = p.AtStrength(chlorine)
	return p
}
