package carbonate

import "math"

// SaturationIndex is log10 of a(Ca) a(CO3) / K for calcite and for aragonite,
// from activities (Langelier's index by its exact definition). ok is false
// where the water has no calcium or no carbonate: the index is not defined.
func (s *State) SaturationIndex() (calcite, aragonite float64, ok bool) {
	p := &s.p
	product := p.act.g2 * p.act.g2 * p.ca * p.co3
	if !(product > 0) {
		return 0, 0, false
	}
	return math.Log10(product / p.k.Calcite), math.Log10(product / p.k.Aragonite), true
}

// CCPP is the calcium carbonate precipitation potential, mol/L: how much CaCO3
// must leave (positive) or dissolve (negative) until SI is 0, with the ionic
// strength moving along. Definition: Standard Methods 2330.
//
// It solves one equation in ln h: C - Ca and 2C - Alk are conserved, and SI = 0
// makes free calcium the root of a quadratic.
func (s *State) CCPP() (float64, error) {
	p := s.p // a copy: the state itself stays
	w := &s.Water
	t := &w.Totals
	protons := 2*t[Carbon] - w.Alkalinity
	given := t[Carbon] - t[Calcium]
	if err := p.solve(calciteEquilibrium, given, protons, p.calciteGuess(given, protons)); err != nil {
		return 0, err
	}
	if err := p.checkIonic(); err != nil {
		return 0, err
	}
	return t[Calcium] - p.calcium(), nil
}

// calciteGuess finds the calcite equilibrium with the activities and pairs of
// the present state held, by halving: a start for Newton.
func (p *point) calciteGuess(given, protons float64) float64 {
	k := p.k
	g2 := p.act.g2
	ratio := g2 * p.act.inv1
	q := k.Calcite / (g2 * g2)
	rest := protons - p.hso4 + p.minorAlk
	lo, hi := lowestLnH, highestLnH
	if s := q - p.ca*p.co3; s > 0 { // undersaturated: dissolving raises the pH
		hi = math.Log(p.h)
		lo = max(lo, hi-12)
	} else {
		lo = math.Log(p.h)
		hi = min(hi, lo+12)
	}
	a, b := math.Exp(lo), math.Exp(hi)
	for range 6 {
		h := math.Sqrt(a * b)
		bicarb := h / k.Carbonic2 * ratio
		acid := bicarb * h / k.Carbonic1 * p.act.g1 * p.act.inv0
		co3 := q / positiveRoot(1, given, q*(1+bicarb+acid))
		if h*p.act.inv1-k.Water/h*p.act.inv1+co3*(bicarb+2*acid)+k.CaHCO3*g2*bicarb*q < rest {
			a = h
		} else {
			b = h
		}
	}
	return math.Sqrt(a * b)
}

// calciteSlopes are the slopes of the proton excess along SI = 0 with
// C - Ca constant: the system of slopes() with ln Ca = -ln CO3 put in, three
// symmetric equations in (CO3, SO4, Mg).
func (p *point) calciteSlopes() slopes {
	jCA, jCM := p.caHCO3+p.caCO3, p.mgHCO3+p.mgCO3
	jSA, jSM := p.caSO4, p.mgSO4
	cc := p.carbon() - 2*jCA + p.calcium()
	ss := guard(p.so4 + p.hso4 + p.caSO4 + p.mgSO4)
	mm := guard(p.mg + p.mgHCO3 + p.mgCO3 + p.mgSO4 + p.mgOH)
	rC := p.hco3 + 2*p.co2 + p.mgHCO3 + p.caOH
	rS, rM := p.hso4, p.mgHCO3-p.mgOH
	// Eliminate SO4.
	is := 1 / ss
	a := cc - jSA*jSA*is
	b := jCM + jSA*jSM*is
	m := mm - jSM*jSM*is
	bC := rC + jSA*rS*is
	bM := rM - jSM*rS*is
	det := 1 / (a*m - b*b)
	zC := (bC*m - b*bM) * det
	zM := (a*bM - b*bC) * det
	zS := (rS + jSA*zC - jSM*zM) * is
	square := p.hyd + p.oh + p.hco3 + 4*p.co2 + p.caHCO3 + p.mgHCO3 + p.hso4 + p.caOH + p.mgOH
	return slopes{zC, zS, -zC, zM, square - (rC*zC + rS*zS + rM*zM)}
}
