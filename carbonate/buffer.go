package carbonate

import "math"

// BufferIntensity is d(Alk)/d(pH) at constant totals and ionic strength, eq/L
// per pH unit (Van Slyke 1922, with the ion pairs re-equilibrating).
func (s *State) BufferIntensity() float64 {
	return math.Ln10 * (s.p.slopes(carbonGiven).protons + s.p.minorSlope)
}

// CarbonateBufferShare is the share of BufferIntensity that inorganic carbon
// brings, 0 to 1: what is lost when the carbon is taken out at the same pH,
// with the other ions as they are.
func (s *State) CarbonateBufferShare() float64 {
	whole := s.BufferIntensity()
	p := s.p
	p.co3, p.hco3, p.co2 = 0, 0, 0
	p.caHCO3, p.caCO3, p.mgHCO3, p.mgCO3 = 0, 0, 0, 0
	p.t[Carbon] = 0
	rest := math.Ln10 * (p.slopes(carbonGiven).protons + p.minorSlope)
	return max(0, 1-rest/whole)
}
