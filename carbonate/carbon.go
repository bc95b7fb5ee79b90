package carbonate

import "math"

// FromCarbon solves a water whose inorganic carbon and alkalinity are known for
// its pH, with the ionic strength by the same routes as FromPH. w.Background is
// a result. Errors as FromPH.
func (k *Constants) FromCarbon(w Water, in IonicInput) (s State, ionsWin bool, err error) {
	w.Background = 0
	if err := check(&w); err != nil {
		return State{}, false, err
	}
	if in.Measured > MaxIonicStrength {
		return State{}, false, &RangeError{"ionic strength", in.Measured, 0, MaxIonicStrength}
	}
	if in.Measured == 0 {
		w.Background = math.Abs(w.ChargeBalance()) / 2
		s, err = k.Solve(w)
		return s, false, err
	}
	// The pH hangs on the ionic strength: hold it at the measured value, and see
	// what the species leave unexplained.
	p := &s.p
	p.start(k, &w.Totals, 0)
	p.imposed, p.ionic = true, in.Measured
	protons := 2*w.Totals[Carbon] - w.Alkalinity
	if err := p.solve(carbonGiven, 0, protons, k.idealGuess(w.Totals[Carbon], protons)); err != nil {
		return State{}, false, err
	}
	w.Background = in.Measured - p.explainedIonic()
	if w.Background < 0 {
		w.Background, ionsWin = 0, true
	}
	s, err = k.Solve(w)
	return s, ionsWin, err
}

// AlkalinityAt is the alkalinity, eq/L, that a water with these totals and
// background has at a pH, whatever its own: Alkalinity of w is not used. It
// serves the end point of a titration.
func (k *Constants) AlkalinityAt(pH float64, w Water) (float64, error) {
	if err := check(&w); err != nil {
		return 0, err
	}
	var p point
	p.start(k, &w.Totals, w.Background)
	p.setH(math.Exp(-pH * math.Ln10))
	if !p.converge(carbonGiven, 0) {
		return 0, ErrNoConvergence
	}
	if err := p.checkIonic(); err != nil {
		return 0, err
	}
	return p.alkalinity(), nil
}

// CarbonAt is the inorganic carbon, mol/L, with which a water of this
// alkalinity and background has a pH: what is left after carbon dioxide was
// stripped or taken up to that pH. ErrAlkalinityBelowPH where there is none.
func (k *Constants) CarbonAt(pH float64, w Water) (float64, error) {
	w.Totals[Carbon] = 0
	if err := check(&w); err != nil {
		return 0, err
	}
	var p point
	p.start(k, &w.Totals, w.Background)
	p.setH(math.Exp(-pH * math.Ln10))
	converged := p.converge(alkalinityGiven, w.Alkalinity)
	if err := p.checkIonic(); err != nil {
		return 0, err
	}
	if p.forCarbon < 0 {
		return 0, ErrAlkalinityBelowPH
	}
	if !converged {
		return 0, ErrNoConvergence
	}
	return p.carbon(), nil
}

// LeastAlkalinity is the alkalinity, eq/L, that a water of this pH has with no
// inorganic carbon at all; a measured alkalinity below it contradicts the pH.
func (k *Constants) LeastAlkalinity(pH float64, w Water) (float64, error) {
	w.Totals[Carbon] = 0
	return k.AlkalinityAt(pH, w)
}
