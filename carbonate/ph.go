package carbonate

import "math"

// Solve finds the pH of a water from its totals and alkalinity at the water's
// temperature. Errors: *RangeError, ErrChlorineWithAmmonia, ErrNoConvergence.
func Solve(w Water) (State, error) {
	k, err := ConstantsAt(w.Kelvin)
	if err != nil {
		return State{}, err
	}
	return k.Solve(w)
}

// Solve is the function Solve with the constants at hand; the water takes their
// temperature. It starts from the totals alone, so it is an independent check
// of a water that was reached by another route.
func (k *Constants) Solve(w Water) (s State, err error) {
	if err := check(&w); err != nil {
		return State{}, err
	}
	s.Water = w
	s.Water.Kelvin = k.Kelvin
	p := &s.p
	p.start(k, &w.Totals, w.Background)
	protons := 2*w.Totals[Carbon] - w.Alkalinity
	if err := p.solve(carbonGiven, 0, protons, k.idealGuess(w.Totals[Carbon], protons)); err != nil {
		return State{}, err
	}
	if err := p.checkIonic(); err != nil {
		return State{}, err
	}
	s.PH = -math.Log10(p.h)
	return s, nil
}

// SolveByBracket is Solve by plain halving of the pH with the ions fully
// converged at each step: some thirty times slower, and independent of Newton's
// slopes, of the guess and of the acceleration. It checks the others.
func (k *Constants) SolveByBracket(w Water) (s State, err error) {
	if err := check(&w); err != nil {
		return State{}, err
	}
	s.Water = w
	s.Water.Kelvin = k.Kelvin
	s.p.start(k, &w.Totals, w.Background)
	if err := s.p.bracket(carbonGiven, 0, 2*w.Totals[Carbon]-w.Alkalinity); err != nil {
		return State{}, err
	}
	if err := s.p.checkIonic(); err != nil {
		return State{}, err
	}
	s.PH = -math.Log10(s.p.h)
	return s, nil
}

// The search never leaves pH -1 to 15.
var (
	lowestLnH  = -15 * math.Ln10
	highestLnH = 1 * math.Ln10
)

// idealGuess solves protons = H - OH + HCO3 + 2 CO2 for h in the ideal solution
// of carbonic acid alone, by a few halvings and secant steps. It is a start for
// Newton, which from far away would be thrown across the flat parts of the curve.
func (k *Constants) idealGuess(carbon, protons float64) float64 {
	i2, i12 := 1/k.Carbonic2, 1/(k.Carbonic1*k.Carbonic2)
	lo, hi := math.Exp(lowestLnH), math.Exp(highestLnH)
	for range 7 { // 16 pH units down to an eighth
		h := math.Sqrt(lo * hi)
		b, a := h*i2, h*h*i12
		if h-k.Water/h+carbon*(b+2*a)/(1+b+a) < protons {
			lo = h
		} else {
			hi = h
		}
	}
	return math.Sqrt(lo * hi)
}

const (
	stepTolerance = 1e-11 // in ln h, on the predicted remaining error
	stepLimit     = 80
	longestStep   = 1.5 // in ln h
)

// solve moves h until the proton excess less the minor acids' alkalinity equals
// protons (= 2C - Alk, which dosing of no carbonate and precipitation of CaCO3
// both leave alone). That excess rises strictly with h, so there is one root.
//
// Each pass is one sweep of the free ions and one Newton step in ln h with the
// exact slope at constant activities. If the passes do not settle, the same
// equation is solved again by plain bracketing with the ions fully converged at
// each h.
func (p *point) solve(mode balance, given, protons, guess float64) error {
	p.setH(guess)
	previous := 1.0
	var ionic secant
	for range stepLimit {
		before := p.ionic
		change := p.sweep(mode, given)
		z := p.slopes(mode)
		step := (protons - p.protons() + p.minorAlk) / (z.protons + p.minorSlope)
		if !(step > -longestStep) {
			step = -longestStep
		} else if step > longestStep {
			step = longestStep
		}
		h := p.h * stepFactor(step)
		if !(h > 1e-16 && h < 100) || !(p.ionic >= 0 && p.ionic < 2) {
			break
		}
		p.setH(h)
		if step > -0.3 && step < 0.3 {
			p.follow(z, step)
		}
		if !p.imposed {
			p.ionic = ionic.next(before, p.ionic, change)
		}
		change = max(change, math.Abs(step))
		if settled(change, previous, stepTolerance) {
			p.sweep(mode, given)
			return nil
		}
		previous = change
	}
	return p.bracket(mode, given, protons)
}

// stepFactor is exp(step), by a (2,2) rational form for small steps.
func stepFactor(step float64) float64 {
	if step > -0.01 && step < 0.01 {
		s2 := step * step / 12
		return (1 + step/2 + s2) / (1 - step/2 + s2)
	}
	return math.Exp(step)
}

// bracket is the slow and certain way.
func (p *point) bracket(mode balance, given, protons float64) error {
	lo, hi := lowestLnH, highestLnH
	start := *p
	for range 200 {
		mid := 0.5 * (lo + hi)
		*p = start
		p.start(start.k, &start.t, start.background)
		// Where the fast way ended, its ionic strength may be anything.
		if start.imposed {
			p.imposed, p.ionic = true, start.ionic
		}
		p.setH(math.Exp(mid))
		if !p.converge(mode, given) {
			return ErrNoConvergence
		}
		// Above the range of the activity equation the curve means nothing; a
		// root there is refused by its ionic strength.
		if p.protons()-p.minorAlk < protons {
			lo = mid
		} else {
			hi = mid
		}
		if hi-lo < 1e-14 {
			break
		}
	}
	if lo == lowestLnH || hi == highestLnH {
		return &RangeError{"pH", -0.5 * (lo + hi) / math.Ln10, -1, 15}
	}
	return nil
}

// follow moves the free ions along with a small step of ln h, to first order,
// so that the next sweep starts from balances that are nearly met.
func (p *point) follow(z slopes, step float64) {
	yC, yS, yA, yM := -z.carbon, -z.sulfate, -z.calcium, -z.magnesium
	if !p.imposed {
		p.ionic += 0.5 * step * (p.hyd - p.oh + p.hco3*(1+yC) + p.hso4*(1+yS) +
			p.caHCO3*(1+yC+yA) + p.mgHCO3*(1+yC+yM) + p.caOH*(yA-1) + p.mgOH*(yM-1) +
			4*(p.co3*yC+p.so4*yS+p.ca*yA+p.mg*yM))
	}
	p.so4 *= 1 + yS*step
	p.ca *= 1 + yA*step
	p.mg *= 1 + yM*step
}

// secant speeds up the fixed-point iteration of the ionic strength: from two
// passes it knows how the outcome follows the assumption.
type secant struct {
	in, out float64
	ready   bool
}

func (s *secant) next(in, out, change float64) float64 {
	if change > 0.3 {
		s.ready = false // too far from the answer for a straight line
		return out
	}
	next := out
	if d := in - s.in; s.ready && d != 0 {
		if rate := (out - s.out) / d; rate > -0.9 && rate < 0.5 {
			next = in + (out-in)/(1-rate)
		}
	}
	s.in, s.out, s.ready = in, out, true
	return next
}
