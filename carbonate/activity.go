package carbonate

import "math"

// activity holds the activity coefficients by absolute charge and the
// reciprocals that the mass-action terms need.
type activity struct {
	g0, g1, g2, g3 float64
	inv0, inv1     float64
}

// saltingOut is the slope of log gamma of a neutral species against ionic
// strength: CO2 near 25 C, after Harned & Davis 1943, J. Am. Chem. Soc. 65, 2030.
const saltingOut = 0.1

// at sets the coefficients for an ionic strength in mol/L, 0 to 0.5.
// Ions follow Davies 1962: log gamma = -A z^2 (sqrt I/(1+sqrt I) - 0.3 I). Since
// that is z^2 times one number, one exponential serves all charges: gamma2 is
// gamma1 to the 4th power, gamma3 to the 9th.
func (a *activity) at(k *Constants, ionic float64) {
	root := math.Sqrt(ionic)
	x := k.daviesA * (root/(1+root) - 0.3*ionic)
	a.g1 = math.Exp(-x)
	sq := a.g1 * a.g1
	a.g2 = sq * sq
	a.g3 = a.g2 * a.g2 * a.g1
	a.inv1 = 1 / a.g1
	a.g0 = smallExp(saltingOut * math.Ln10 * ionic)
	a.inv0 = 1 / a.g0
}

// smallExp is exp for 0 <= x < 0.2 by its series, to 1e-16: cheaper than a
// second call of math.Exp in the innermost loop.
func smallExp(x float64) float64 {
	return 1 + x*(1+x*(1./2+x*(1./6+x*(1./24+x*(1./120+x*(1./720+x*(1./5040+x*(1./40320+x/362880))))))))
}
