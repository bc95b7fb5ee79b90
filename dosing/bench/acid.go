package bench

import (
	"math"

	"beckline/carbonate"
)

// Acid is a weak acid of one step, of the charge that its acid form has: 0 for
// HA, -1 for H2PO4-, +1 for NH4+. Its acid form counts as no alkalinity.
type Acid struct {
	Amount float64 // mol/L in all, 0 or more
	PK     float64 // at infinite dilution, 0 to 14
	Charge int
}

// share is the part of the acid that is in its base form at a state, and the
// derivative of it with pH, by the mass-action law with the state's activities.
func (a Acid) share(s *carbonate.State) (share, slope float64) {
	g0, g1, g2, g3 := s.ActivityCoefficients()
	gamma := [4]float64{g0, g1, g2, g3}
	of := func(z int) float64 { return gamma[min(max(z, -z), 3)] }
	ratio := math.Exp((s.PH-a.PK)*math.Ln10) * of(a.Charge) / of(a.Charge-1)
	share = ratio / (1 + ratio)
	return share, math.Ln10 * share / (1 + ratio)
}

// ionic is the acid's own part of the ionic strength with this share as base.
func (a Acid) ionic(share float64) float64 {
	z, y := float64(a.Charge), float64(a.Charge-1)
	return 0.5 * a.Amount * (z*z*(1-share) + y*y*share)
}

const acidSteps = 200

// solve finds the pH of a water that holds the acid besides what its totals
// say; w.Alkalinity counts the acid's base form. With the share x of base form
// assumed, the rest of the alkalinity gives a pH and that pH a share: the
// difference falls strictly with x, so there is one root between 0 and 1, found
// by Newton's method inside a bracket. near is where to begin and becomes the
// root: a fit asks for the same point again and again with little changed.
func (a Acid) solve(k *carbonate.Constants, w carbonate.Water, near *float64) (carbonate.State, error) {
	if a.Amount <= 0 {
		return k.Solve(w)
	}
	lo, hi := 0.0, 1.0
	x, before := min(max(*near, 1e-6), 1-1e-6), 1.0
	for range acidSteps {
		v := w
		v.Alkalinity = w.Alkalinity - a.Amount*x
		v.Background = w.Background + a.ionic(x)
		s, err := k.Solve(v)
		if err != nil {
			return s, err
		}
		share, slope := a.share(&s)
		miss := share - x
		if math.Abs(miss) <= 1e-12 || hi-lo <= 1e-14 {
			*near = x
			return s, nil
		}
		if miss > 0 {
			lo = x
		} else {
			hi = x
		}
		next := x + miss/(1+slope*a.Amount/s.BufferIntensity())
		if !(next > lo && next < hi) || math.Abs(next-x) > 0.5*before {
			next = 0.5 * (lo + hi)
		}
		before = math.Abs(next - x)
		x = next
	}
	return carbonate.State{}, carbonate.ErrNoConvergence
}
