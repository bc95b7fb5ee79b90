package carbonate

import "math"

// Encloses proves a pH without solving for it. The proton excess of a water
// rises strictly with the hydrogen-ion activity, so if it lies on either side of
// the balance at pH - within and at pH + within, with the ions fully converged at
// both, then the water's pH is between the two. offset is where, by a straight
// line, relative to the pH given; it uses nothing of Solve but the definition.
func (k *Constants) Encloses(pH, within float64, w Water) (offset float64, ok bool) {
	if check(&w) != nil {
		return 0, false
	}
	protons := 2*w.Totals[Carbon] - w.Alkalinity
	excess := func(pH float64) (float64, bool) {
		var p point
		p.start(k, &w.Totals, w.Background)
		p.setH(math.Exp(-pH * math.Ln10))
		ok := p.converge(carbonGiven, 0) && p.ionic <= MaxIonicStrength
		return p.protons() - p.minorAlk - protons, ok
	}
	low, okLow := excess(pH - within)
	high, okHigh := excess(pH + within)
	if !okLow || !okHigh || !(low > 0 && high < 0) {
		return 0, false
	}
	return within * (low + high) / (low - high), true
}
