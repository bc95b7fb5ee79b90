package dosing

import (
	"errors"
	"math"

	"beckline/carbonate"
)

// chlorineToNitrogen is the largest ratio of free chlorine to ammonia nitrogen
// by mass at which all of both forms monochloramine; above it breakpoint
// reactions begin (White, Handbook of Chlorination, from memory).
const chlorineToNitrogen = 5.0

// step is the water after one addition of a given dose (mol/L; not used by the
// processes).
func (r *run) step(i int, w carbonate.Water, dose float64) (carbonate.Water, *Problem) {
	a := &r.c.Additions[i]
	switch a.Process {
	case Aeration:
		return r.aerate(a, w)
	case LimestoneContactor:
		return r.contact(w)
	}
	if a.Residual.Given && !a.Solve && !r.held {
		dose = residualDose(a, &w)
		r.doses[i] = dose
	}
	w = w.Add(a.Product.reagent(), dose)
	return react(w, a)
}

// residualDose is what leaves the residual after the demand, mol/L: less where
// the water already has free chlorine, and never below none.
func residualDose(a *Addition, w *carbonate.Water) float64 {
	need := a.Residual.Value + a.Demand.Or(0) - w.Totals[carbonate.Chlorine]
	return max(need, 0) / a.Product.Chemical.Adds[carbonate.Chlorine]
}

// react lets the water's demand reduce free chlorine, and what is left form
// monochloramine with ammonia; both at once and whole. Reduction HOCl -> Cl- and
// NH4+ + HOCl -> NH2Cl + H+ + H2O each take one equivalent of alkalinity.
func react(w carbonate.Water, a *Addition) (carbonate.Water, *Problem) {
	t := &w.Totals
	if used := min(a.Demand.Or(0), t[carbonate.Chlorine]); used > 0 {
		t[carbonate.Chlorine] -= used
		t[carbonate.Chloride] += used
		w.Alkalinity -= used
	}
	chlorine, ammonia := t[carbonate.Chlorine], t[carbonate.Ammonia]
	if chlorine == 0 || ammonia == 0 {
		return w, nil
	}
	ratio := chlorine * carbonate.Chlorine.MolarMass() / (ammonia * carbonate.Ammonia.MolarMass())
	if ratio > chlorineToNitrogen {
		return w, &Problem{Kind: BadInput, Code: "breakpoint_chlorination", Field: "add", Given: a.Product.Name,
			Value: Some(ratio), High: Some(chlorineToNitrogen)}
	}
	t[carbonate.Chlorine] = 0
	t[carbonate.Ammonia] -= chlorine
	t[carbonate.Monochloramine] += chlorine
	w.Alkalinity -= chlorine
	return w, nil
}

func (r *run) aerate(a *Addition, w carbonate.Water) (carbonate.Water, *Problem) {
	if a.PH.Given {
		carbon, err := r.k.CarbonAt(a.PH.Value, w)
		if err != nil {
			// What contradicts each other here is this pH and the water's alkalinity.
			here := Readings{PH: a.PH, Alkalinity: Some(w.Alkalinity)}
			return w, refusal(err, &here, r.k, w)
		}
		w.Totals[carbonate.Carbon] = carbon
		return w, nil
	}
	s, err := r.k.Solve(w)
	if err != nil {
		return w, refusal(err, &r.c.Readings, r.k, w)
	}
	after, err := s.Aerate(a.Share.Or(1), a.AirCO2.Or(carbonate.AirCO2))
	var out *carbonate.RangeError
	if errors.As(err, &out) && out.Quantity != "ionic strength" {
		return w, outside("aerate", out.Value, out.Low, out.High)
	}
	if err != nil {
		return w, refusal(err, &r.c.Readings, r.k, w)
	}
	return after, nil
}

// contact dissolves calcite up to SI 0; a water that would scale takes up none.
func (r *run) contact(w carbonate.Water) (carbonate.Water, *Problem) {
	if !r.known.calcium {
		return w, &Problem{Kind: BadInput, Code: "calcium_needed", Field: "calcium"}
	}
	s, err := r.k.Solve(w)
	if err != nil {
		return w, refusal(err, &r.c.Readings, r.k, w)
	}
	x, err := s.CCPP()
	if err != nil {
		return w, refusal(err, &r.c.Readings, r.k, w)
	}
	stone, _ := ChemicalByFormula("CaCO3")
	return w.Add(carbonate.Reagent{Adds: stone.Adds, Equivalents: stone.Equivalents}, math.Max(-x, 0)), nil
}

// through carries a water through the additions [from, to) with the doses at hand.
func (r *run) through(w carbonate.Water, from, to int) (carbonate.Water, *Problem) {
	for i := from; i < to; i++ {
		var p *Problem
		if w, p = r.step(i, w, r.doses[i]); p != nil {
			return w, p
		}
	}
	return w, nil
}

// plain says whether every addition up to the target only adds: then they
// commute, and the dose can be found at the target without walking the train.
func (r *run) plain(to int) bool {
	var sum carbonate.Totals = r.base.Water.Totals
	for i := range to {
		a := &r.c.Additions[i]
		if a.Process != ChemicalFeed || a.Demand.Value > 0 || a.Residual.Given {
			return false
		}
		for j, v := range a.Product.Chemical.Adds {
			sum[j] += v
		}
	}
	return sum[carbonate.Chlorine] == 0 || sum[carbonate.Ammonia] == 0
}
