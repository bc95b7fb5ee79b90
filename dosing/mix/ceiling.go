package mix

import (
	"errors"

	"beckline/dosing"
	"beckline/dosing/feed"
)

// reach is what a product can be fed at, other than not at all.
type reach struct {
	least, most         float64 // mol/L of the formula
	leastFrom, mostFrom Source
	perMol              float64 // kg of product per mol/L of the formula in a m3 of water
}

// inside keeps a ceiling a hair within itself, so that rounding does not put a
// pump over 100 %.
const inside = 1 - 1e-10

// reachOf works out the tightest of the bounds of a candidate's dose.
func reachOf(c *Candidate, flow dosing.Optional) (reach, *dosing.Problem) {
	chem := &c.Product.Chemical
	r := reach{perMol: chem.MolarMass / c.Product.Strength}
	r.most, r.mostFrom = dosing.GreatestDose(c.Product), FromHardStop
	least := func(kg float64, from Source) {
		if v := kg / r.perMol; v > r.least {
			r.least, r.leastFrom = v, from
		}
	}
	most := func(kg float64, from Source) {
		if v := kg / r.perMol; v < r.most {
			r.most, r.mostFrom = v*inside, from
		}
	}
	if c.Least.Given {
		least(c.Least.Value, FromLeast)
	}
	if c.Most.Given {
		most(c.Most.Value, FromCeiling)
	}
	if c.Feed.MaximumUse.Given {
		most(c.Feed.MaximumUse.Value, FromUseLevel)
	}
	if c.Feed.PumpCapacity.Given && c.Product.Form == feed.Liquid {
		if !(flow.Value > 0) {
			return r, &dosing.Problem{Kind: dosing.BadInput, Code: "missing", Field: "flow", Given: c.Product.Name}
		}
		density, p := densityOf(c)
		if p != nil {
			return r, p
		}
		full := c.Feed.PumpCapacity.Value * density / flow.Value
		most(full, FromPump)
		if c.Turndown > 0 {
			least(c.Turndown*full, FromTurndown)
		}
	}
	if r.least > r.most {
		return r, &dosing.Problem{Kind: dosing.BadInput, Code: "dose_range_crossed", Field: "product", Given: c.Product.Name,
			Value: dosing.Some(r.least * r.perMol), High: dosing.Some(r.most * r.perMol)}
	}
	return r, nil
}

// densityOf is the density of the product in its tank, kg/m3.
func densityOf(c *Candidate) (float64, *dosing.Problem) {
	rates, err := feed.Compute(feed.Input{
		Strength: c.Product.Strength, Form: c.Product.Form, Density: c.Product.Density,
		KgPerM3: c.Feed.Density.Or(0), ProductKelvin: c.Feed.ProductKelvin.Or(0),
	})
	if err == nil {
		return rates.Density, nil
	}
	var beyond *feed.OutOfTable
	if errors.As(err, &beyond) {
		return 0, &dosing.Problem{Kind: dosing.BadInput, Code: "density_unknown", Field: "strength", Given: c.Product.Name,
			Value: dosing.Some(beyond.Strength), Low: dosing.Some(0), High: dosing.Some(beyond.High)}
	}
	var bad *feed.BadInput
	if errors.As(err, &bad) {
		return 0, outside(bad.Field, c.Product.Name, bad.Value, bad.Low, bad.High)
	}
	return 0, &dosing.Problem{Kind: dosing.Failed, Code: "solver_failed", Given: err.Error()}
}

// perMolPrice is the money for a mol/L of the formula in a m3 of water.
func (c *Candidate) perMolPrice(r *reach) float64 {
	return c.Price * r.perMol
}
