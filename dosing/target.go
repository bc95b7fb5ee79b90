package dosing

import (
	"errors"
	"math"

	"beckline/carbonate"
)

// metWithin is how near the target the water may already be, in the unit in
// which the target is stated (pH, SI; mg/L as CaCO3), to need no dose.
const metWithin = 0.005

// met says whether a figure already is at the target.
func (t Target) met(figure float64) bool {
	scale := 1.0
	switch t.Kind {
	case TargetAlkalinity:
		scale = 0.5e3 * carbonate.MolarMassCaCO3
	case TargetCCPP:
		scale = 1e3 * carbonate.MolarMassCaCO3
	case TargetDIC:
		scale = 1e3 * carbonate.Carbon.MolarMass()
	}
	return math.Abs(figure-t.Value)*scale <= metWithin
}

// search is the look for one dose: the water that the reagent meets (with every
// fixed addition already in it, since additions commute), and the target.
type search struct {
	k          *carbonate.Constants
	base       carbonate.State
	reagent    carbonate.Reagent
	target     Target
	most       float64 // mol/L, the largest dose that may be looked at
	known      known
	after      func(dose float64) (carbonate.Water, bool) // the water at the target where the train does more than add; else nil
	onlyDirect bool                                       // offers only: what the short way does not find is not offered
	refused    error                                      // why the model had no figure at the last dose that had none
}

// figure is the target's figure of a state; ok is false where it does not exist.
func (s *search) figure(st *carbonate.State) (v float64, ok bool) {
	switch s.target.Kind {
	case TargetPH:
		return st.PH, true
	case TargetAlkalinity:
		if !s.known.organics {
			return st.Water.Alkalinity, true
		}
		v, err := titratable(st)
		return v, err == nil
	case TargetSaturationIndex:
		v, _, ok := st.SaturationIndex()
		return v, ok && s.known.calcium
	case TargetCCPP:
		if !s.known.calcium {
			return 0, false
		}
		v, err := st.CCPP()
		return v, err == nil
	case TargetDIC:
		return st.Water.Totals[carbonate.Carbon], true
	}
	return 0, false
}

// find returns the smallest dose, mol/L, that reaches the target, or the
// *Problem that says why there is none.
func (s *search) find() (float64, *Problem) {
	if (s.target.Kind == TargetSaturationIndex || s.target.Kind == TargetCCPP) && !s.known.calcium {
		return 0, &Problem{Kind: BadInput, Code: "calcium_needed", Field: "calcium", Target: s.target}
	}
	now, ok := s.figure(&s.base)
	if !ok && s.target.Kind == TargetSaturationIndex {
		// No calcium or no carbonate yet: the index is below every number, and a
		// dose may bring what is lacking.
		now, ok = math.Inf(-1), true
	}
	if !ok {
		return 0, &Problem{Kind: NoAnswer, Code: "no_such_figure", Field: s.target.Kind.Field(), Target: s.target}
	}
	if s.target.met(now) {
		return 0, &Problem{Kind: NoAnswer, Code: "target_met", Field: s.target.Kind.Field(), Target: s.target, Nearest: Some(now)}
	}
	if dose, ok := s.direct(); ok {
		return dose, nil
	}
	if s.onlyDirect && s.after == nil && (s.target.Kind == TargetPH || s.target.Kind == TargetAlkalinity) {
		return 0, &Problem{Kind: NoAnswer, Code: "out_of_reach", Target: s.target}
	}
	return s.explore(now)
}

// direct is the short way: pH by the balance at the target, alkalinity by
// division. Anything odd about its answer is left to explore.
func (s *search) direct() (float64, bool) {
	if s.after != nil {
		return 0, false
	}
	switch s.target.Kind {
	case TargetPH:
		dose, st, err := s.k.DoseToPH(s.base.Water, s.reagent, s.target.Value)
		if err != nil || !(dose > 0) || dose > s.most || st.PH == 0 {
			return 0, false
		}
		return dose, true
	case TargetAlkalinity:
		if s.known.organics || s.reagent.Equivalents == 0 {
			return 0, false
		}
		dose := (s.target.Value - s.base.Water.Alkalinity) / s.reagent.Equivalents
		if !(dose > 0) || dose > s.most {
			return 0, false
		}
		return dose, true
	}
	return 0, false
}

// at is the figure after a dose.
func (s *search) at(dose float64) (v float64, ok bool) {
	s.refused = nil
	w := s.base.Water.Add(s.reagent, dose)
	if s.after != nil {
		var ok bool
		if w, ok = s.after(dose); !ok {
			return 0, false
		}
	}
	st, err := s.k.Solve(w)
	if err != nil {
		s.refused = err
		return 0, false
	}
	return s.figure(&st)
}

// leastDose is the smallest dose that explore looks at, as a share of the most.
const (
	leastDose     = 1e-8
	stepsADecade  = 12
	halvings      = 200
	goldenSection = 0.6180339887498949
)

// explore walks up the doses on a logarithmic scale until the figure crosses
// the target, and closes in on the crossing; where it never crosses, the
// nearest figure on the way is the answer of its own.
func (s *search) explore(now float64) (float64, *Problem) {
	want := s.target.Value
	side := math.Copysign(1, want-now)
	best, bestDose := now, 0.0
	last := 0.0
	var ended *carbonate.RangeError // the model ended before the doses did
	for i := 0; ; i++ {
		dose := s.most * leastDose * math.Pow(10, float64(i)/stepsADecade)
		if dose > s.most*(1+1e-12) {
			break
		}
		v, ok := s.at(dose)
		if !ok {
			errors.As(s.refused, &ended)
			break
		}
		if (want-v)*side <= 0 {
			return s.crossing(last, dose, side), nil
		}
		if math.Abs(want-v) < math.Abs(want-best) {
			best, bestDose = v, dose
		}
		last = dose
	}
	// Still nearing the target where the activity equation ends: that, not the
	// product, is why there is no answer.
	cut := ended != nil && ended.Quantity == "ionic strength" && bestDose == last
	// The best of the steps may have a better neighbour: a plateau with a top.
	if bestDose > 0 {
		step := math.Pow(10, 1.0/stepsADecade)
		if dose, v, ok := s.top(bestDose/step, min(bestDose*step, s.most)); ok && math.Abs(want-v) < math.Abs(want-best) {
			best, bestDose = v, dose
			if (want-v)*side <= 0 {
				return s.crossing(dose/step, dose, side), nil
			}
		}
	}
	p := &Problem{Kind: NoAnswer, Code: "out_of_reach", Field: s.target.Kind.Field(), Target: s.target,
		Nearest: Some(best), NearestAt: Some(bestDose)}
	switch {
	case math.IsInf(best, 0):
		p.Code, p.Nearest, p.NearestAt = "no_such_figure", None, None
	case cut:
		p.Code, p.Field = "ionic_strength", ""
		p.Value, p.High = Some(ended.Value), Some(ended.High)
	case bestDose == 0:
		p.Code = "wrong_side"
	}
	return 0, p
}

// crossing halves between a dose before the target and one at or past it.
func (s *search) crossing(before, past, side float64) float64 {
	for range halvings {
		mid := 0.5 * (before + past)
		if mid <= before || mid >= past {
			break
		}
		v, ok := s.at(mid)
		if ok && (s.target.Value-v)*side > 0 {
			before = mid
		} else {
			past = mid
		}
	}
	return past
}

// top looks for the dose nearest to the target between two doses, by golden
// section on the logarithm of the dose.
func (s *search) top(lo, hi float64) (dose, v float64, ok bool) {
	a, b := math.Log(lo), math.Log(hi)
	miss := func(x float64) float64 {
		v, ok := s.at(math.Exp(x))
		if !ok {
			return math.Inf(1)
		}
		return math.Abs(s.target.Value - v)
	}
	x, y := b-goldenSection*(b-a), a+goldenSection*(b-a)
	fx, fy := miss(x), miss(y)
	for range 60 {
		if fx < fy {
			b, y, fy = y, x, fx
			x = b - goldenSection*(b-a)
			fx = miss(x)
		} else {
			a, x, fx = x, y, fy
			y = a + goldenSection*(b-a)
			fy = miss(y)
		}
	}
	dose = math.Exp(0.5 * (a + b))
	v, ok = s.at(dose)
	return dose, v, ok
}

// Field is the command-line name of a target.
func (k TargetKind) Field() string {
	switch k {
	case TargetPH:
		return "target-ph"
	case TargetAlkalinity:
		return "target-alkalinity"
	case TargetSaturationIndex:
		return "target-si"
	case TargetCCPP:
		return "target-ccpp"
	case TargetDIC:
		return "target-dic"
	}
	return ""
}
