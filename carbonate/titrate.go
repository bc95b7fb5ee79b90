package carbonate

import "math"

// Reagent is what one mole of a chemical brings to a water: totals and
// equivalents of alkalinity.
type Reagent struct {
	Adds        Totals
	Equivalents float64
}

// Add returns the water after dose mol/L of the reagent. Alkalinity and totals
// are conserved, so this is plain addition.
func (w Water) Add(r Reagent, dose float64) Water {
	for i, v := range r.Adds {
		if v != 0 {
			w.Totals[i] += v * dose
		}
	}
	w.Alkalinity += r.Equivalents * dose
	return w
}

// DoseToPH finds the dose of a reagent, mol/L, that brings the water to a pH,
// with the state there. The pH being known, alkalinity is a smooth and nearly
// linear function of the dose; no root in pH is needed. A negative dose, of no
// meaning but its sign, says that the pH lies on the other side of the water's own.
//
// ErrOutOfReach means that the reagent no longer moves the balance toward the
// target (its slope vanishes or changes sign on the way).
func (k *Constants) DoseToPH(w Water, r Reagent, pH float64) (dose float64, s State, err error) {
	if err := check(&w); err != nil {
		return 0, State{}, err
	}
	if !(pH >= 0 && pH <= 14) {
		return 0, State{}, &RangeError{"pH", pH, 0, 14}
	}
	s.Water = w
	s.Water.Kelvin = k.Kelvin
	p := &s.p
	p.start(k, &w.Totals, w.Background)
	t := &p.t
	for _, m := range minors {
		if r.Adds[m.total] != 0 {
			p.hasMinors = true
		}
	}
	p.setH(math.Exp(-pH * math.Ln10))

	// Balance: protons - minor alkalinity = 2C - Alk, both sides moving with dose.
	protons0 := 2*w.Totals[Carbon] - w.Alkalinity
	perDose := 2*r.Adds[Carbon] - r.Equivalents
	previous, firstSign, negative := 1.0, 0.0, 0
	var ionic secant
	for i := range stepLimit {
		before := p.ionic
		change := p.sweep(carbonGiven, 0)
		if !(p.ionic >= 0 && p.ionic < 2) {
			return 0, State{}, ErrOutOfReach
		}
		residual := p.protons() - p.minorAlk - protons0 - perDose*dose
		slope := p.dosePull(&r) - perDose
		// The slope at the first pass tells which way this reagent moves the
		// balance at the target; a change of sign means that it has run out.
		if i == 0 {
			firstSign = slope
		}
		if slope*firstSign <= 0 {
			return 0, State{}, ErrOutOfReach
		}
		step := -residual / slope
		next := dose + step
		if math.IsNaN(next) || math.Abs(next) > 100 {
			return 0, State{}, ErrOutOfReach
		}
		dose = next
		if dose >= 0 {
			negative = 0
		} else if negative++; negative == 4 {
			return dose, State{}, nil
		}
		for j, v := range r.Adds {
			if v != 0 {
				t[j] = max(w.Totals[j]+v*dose, 0)
			}
		}
		inert := p.inertI2
		p.refreshInert()
		change = max(change, math.Abs(step)/max(math.Abs(dose), 1e-12))
		if i > 0 && dose >= 0 && settled(change, previous, stepTolerance) {
			p.sweep(carbonGiven, 0)
			if err := p.checkIonic(); err != nil {
				return 0, State{}, err
			}
			s.Water.Totals = p.t
			s.Water.Alkalinity = w.Alkalinity + r.Equivalents*dose
			s.PH = pH
			return dose, s, nil
		}
		previous = change
		p.ionic = ionic.next(before, p.ionic+0.5*(p.inertI2-inert), change)
	}
	return k.doseByBracket(w, r, pH)
}

// doseByBracket is the slow and certain way to DoseToPH: the balance at the
// target with the ions fully converged at each dose, doubled until it changes
// sign, then halved. Very strong pairing (lime in a brine of bicarbonate) needs it.
func (k *Constants) doseByBracket(w Water, r Reagent, pH float64) (dose float64, s State, err error) {
	s.Water = w
	s.Water.Kelvin = k.Kelvin
	p := &s.p
	balanceAt := func(dose float64) (float64, bool) {
		after := w.Add(r, dose)
		p.start(k, &after.Totals, w.Background)
		p.setH(math.Exp(-pH * math.Ln10))
		ok := p.converge(carbonGiven, 0) && p.ionic <= MaxIonicStrength
		return p.protons() - p.minorAlk - (2*after.Totals[Carbon] - after.Alkalinity), ok
	}
	first, ok := balanceAt(0)
	if !ok {
		return 0, State{}, ErrOutOfReach
	}
	lo, hi := 0.0, 1e-6
	for {
		v, ok := balanceAt(hi)
		if !ok || hi > 10 {
			return 0, State{}, ErrOutOfReach
		}
		if v*first <= 0 {
			break
		}
		lo, hi = hi, 2*hi
	}
	for range 100 {
		dose = 0.5 * (lo + hi)
		v, ok := balanceAt(dose)
		if !ok {
			return 0, State{}, ErrNoConvergence
		}
		if v*first > 0 {
			lo = dose
		} else {
			hi = dose
		}
		if hi-lo <= 1e-15*hi {
			break
		}
	}
	s.Water = w.Add(r, dose)
	s.Water.Kelvin = k.Kelvin
	s.PH = pH
	return dose, s, nil
}

// dosePull is d(protons - minor alkalinity)/d(dose) at constant h and
// activities.
func (p *point) dosePull(r *Reagent) float64 {
	a := &r.Adds
	pull := 0.0
	if a[Carbon] != 0 || a[Calcium] != 0 || a[Magnesium] != 0 || a[Sulfate] != 0 {
		z := p.slopes(carbonGiven)
		pull = a[Carbon]*z.carbon + a[Calcium]*z.calcium + a[Magnesium]*z.magnesium + a[Sulfate]*z.sulfate
	}
	if p.hasMinors {
		for i := range minors {
			if v := a[minors[i].total]; v != 0 {
				pull -= v * p.minorUnit[i]
			}
		}
	}
	return pull
}
