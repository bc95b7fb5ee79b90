package dosing

import (
	"math"

	"beckline/carbonate"
)

// Tolerances of the internal checks: well above rounding, far below anything
// that a person could see.
const (
	closurePH       = 1e-6  // pH
	balanceRelative = 1e-9  // of the amounts that are balanced
	balanceAbsolute = 1e-12 // eq/L or mol/L, for waters with next to nothing in them
	targetAmount    = 1e-9  // eq/L or mol/L by which a target that is an amount may be missed
	targetIndex     = 1e-6  // the same of a pH or an index
)

// check compares the finished water with other routes to it: the pH (the target,
// where a pH was asked for) enclosed from both sides; the alkalinity summed over
// the species; the carbon that pH and alkalinity give back; and every target at
// its own station. A result that does not close is not given.
func (r *run) check() *Problem {
	fin := r.base
	if n := len(r.states); n > 0 {
		fin = r.states[n-1]
	}
	w := fin.Water

	closing := fin.PH
	if r.solved >= 0 && r.c.Target.Kind == TargetPH && r.targetAt == len(r.states) {
		closing = r.c.Target.Value
	}
	closure, enclosed := r.k.Encloses(closing, closurePH, w)
	if !enclosed {
		again, err := r.k.SolveByBracket(w)
		if err != nil {
			return &Problem{Kind: Failed, Code: "checks_disagree", Field: "closure_ph", Given: err.Error()}
		}
		closure = again.PH - closing
	}
	r.record("closure_ph", closure, closurePH)

	sp := fin.Species()
	alkalinity := -sp.H + sp.OH + sp.HCO3 + 2*sp.CO3 + sp.CaHCO3 + 2*sp.CaCO3 + sp.MgHCO3 + 2*sp.MgCO3 +
		sp.CaOH + sp.MgOH - sp.HSO4 + sp.MinorAlkalinity
	want, carbon := r.expected()
	scale := math.Abs(want) + w.Totals[carbonate.Carbon] + sp.H + sp.OH
	r.record("alkalinity_balance", alkalinity-want, balanceRelative*scale+balanceAbsolute)

	found := sp.CO2 + sp.HCO3 + sp.CO3 + sp.CaHCO3 + sp.CaCO3 + sp.MgHCO3 + sp.MgCO3
	r.record("carbon_balance", found-carbon, balanceRelative*(carbon+w.Totals[carbonate.Carbon])+balanceAbsolute)

	for _, c := range r.res.Checks {
		if !c.Agrees {
			return &Problem{Kind: Failed, Code: "checks_disagree", Field: c.Name, Value: Some(c.Value)}
		}
	}
	if r.solved < 0 {
		return nil
	}
	for _, t := range []Target{r.c.Target, r.c.Second} {
		if p := r.missed(t); p != nil {
			return p
		}
	}
	return nil
}

// missed says whether the water that was to meet a target, solved afresh at its
// station, does not.
func (r *run) missed(t Target) *Problem {
	if t.Kind == NoTarget {
		return nil
	}
	look := search{target: t, known: r.known}
	v, ok := look.figure(&r.states[r.targetAt-1])
	tolerance := targetAmount
	if t.Kind == TargetPH || t.Kind == TargetSaturationIndex {
		tolerance = targetIndex
	}
	if ok && math.Abs(v-t.Value) <= tolerance {
		return nil
	}
	return &Problem{Kind: Failed, Code: "checks_disagree", Field: t.Kind.Field(), Value: Some(v)}
}

// expected adds up alkalinity and carbon over the train by the equivalents and
// atoms of what was fed, with what reactions and processes took or gave taken
// from the waters on either side of them.
func (r *run) expected() (alkalinity, carbon float64) {
	alkalinity = r.base.Water.Alkalinity
	carbon = r.base.Water.Totals[carbonate.Carbon]
	before := &r.base
	for i := range r.c.Additions {
		a := &r.c.Additions[i]
		after := &r.states[i]
		t, u := &before.Water.Totals, &after.Water.Totals
		switch a.Process {
		case Aeration:
			carbon += u[carbonate.Carbon] - t[carbonate.Carbon]
		case LimestoneContactor:
			stone := u[carbonate.Calcium] - t[carbonate.Calcium]
			alkalinity += 2 * stone
			carbon += stone
		default:
			c := &a.Product.Chemical
			alkalinity += c.Equivalents * r.doses[i]
			carbon += c.Adds[carbonate.Carbon] * r.doses[i]
			// Free chlorine that went, to chloride or to chloramine.
			alkalinity -= t[carbonate.Chlorine] + c.Adds[carbonate.Chlorine]*r.doses[i] - u[carbonate.Chlorine]
		}
		before = after
	}
	return alkalinity, carbon
}

func (r *run) record(name string, difference, tolerance float64) {
	r.res.Checks = append(r.res.Checks, Check{Name: name, Value: difference, Agrees: math.Abs(difference) <= tolerance})
}
