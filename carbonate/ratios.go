package carbonate

// ChlorideSulfateRatio is chloride over sulfate by mass (the CSMR of corrosion
// work). ok is false without sulfate.
func (w *Water) ChlorideSulfateRatio() (ratio float64, ok bool) {
	sulfate := w.Totals[Sulfate] * components[Sulfate].molarMass
	if !(sulfate > 0) {
		return 0, false
	}
	return w.Totals[Chloride] * components[Chloride].molarMass / sulfate, true
}

// LarsonRatio is (Cl + SO4)/alkalinity in equivalents, Larson & Skold 1958,
// Corrosion 14, 285t. The alkalinity is given apart, eq/L, since with organic
// acids the measured one is meant. ok is false without alkalinity.
func (w *Water) LarsonRatio(alkalinity float64) (ratio float64, ok bool) {
	if !(alkalinity > 0) {
		return 0, false
	}
	return (w.Totals[Chloride] + 2*w.Totals[Sulfate]) / alkalinity, true
}
