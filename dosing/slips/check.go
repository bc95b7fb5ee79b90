package slips

import (
	"slices"

	"beckline/dosing"
)

// Check looks for slips in a case, with its result where there is one (nil where
// the case was refused), and with what else is known. It returns nothing where
// nothing points to a slip; findings are sorted by their code's place in Codes.
// It never fails and never changes a value.
func Check(c dosing.Case, r *dosing.Result, x Context) []Finding {
	k := &check{c: &c, r: r, x: &x}
	out := readings(c.Readings, &x)
	for _, look := range []func(*check) []Finding{
		(*check).doses, (*check).product, (*check).pump, (*check).meters, (*check).sample, (*check).age,
		(*check).burette, (*check).blend, (*check).delivery, (*check).batch, (*check).lime,
	} {
		out = append(out, look(k)...)
	}
	out = slices.DeleteFunc(out, func(f Finding) bool {
		return slices.ContainsFunc(x.Confirmed, func(c Confirmation) bool { return c.covers(&f) })
	})
	sortFindings(out)
	return out
}

// check is what the looks share.
type check struct {
	c *dosing.Case
	r *dosing.Result
	x *Context
}

// station is the addition that the context's product and pump are those of: the
// one solved for, or else the last liquid feed; 0 for none.
func (k *check) station() int {
	last := 0
	for i, a := range k.c.Additions {
		if a.Process != dosing.ChemicalFeed {
			continue
		}
		if a.Solve {
			return i + 1
		}
		if a.Product.Density != "" {
			last = i + 1
		}
	}
	return last
}

// with solves the case with every dose as found, one of them times a factor,
// and gives the water at a station; ok is false where that has no answer.
func (k *check) with(station int, factor float64, at int) (w dosing.Figures, ok bool) {
	return k.solve(func(c *dosing.Case) {
		if a := &c.Additions[station-1]; a.Dose.Given {
			a.Dose.Value *= factor
		}
	}, at)
}

// solve answers the case with its doses fixed and one thing changed.
func (k *check) solve(change func(c *dosing.Case), at int) (w dosing.Figures, ok bool) {
	if k.r == nil {
		return w, false
	}
	c := *k.c
	c.Additions = slices.Clone(k.c.Additions)
	c.Target, c.TargetAt, c.Notes = dosing.Target{}, 0, nil
	for i := range c.Additions {
		a := &c.Additions[i]
		a.Feed.PumpCapacity = dosing.None
		if a.Process == dosing.ChemicalFeed && (a.Solve || a.Residual.Given) {
			a.Dose, a.Solve, a.Residual = dosing.Some(k.r.Stations[i+1].Dose), false, dosing.None
		}
	}
	change(&c)
	r, err := dosing.Solve(c)
	if err != nil || at >= len(r.Stations) {
		return w, false
	}
	return r.Stations[at].Figures, true
}

// last is the index of the finished water.
func (k *check) last() int { return len(k.c.Additions) }
