package carbonate

import "math"

// BufferIntensity is d(Alk)/d(pH) at constant totals and ionic strength, eq/L
// per pH unit (Van Slyke 1922, with the ion pairs re-equilibrating).
func (s *State) BufferIntensity() float64 {
	return math.Ln10 * (s.p.slopes(carbonGiven).protons + s.p.minorSlope)
}

// WaterBufferIntensity is the part of BufferIntensity that water itself (H and
// OH) brings, eq/L per pH unit.
func (s *State) WaterBufferIntensity() float64 {
	return math.Ln10 * (s.p.hyd + s.p.oh)
}
