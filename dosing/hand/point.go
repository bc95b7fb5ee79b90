package hand

import "math"

// Point is a water at one pH and ionic strength as the hand method sees it:
// carbonic acid, bicarbonate, carbonate, hydroxide and hydrogen ion, and nothing
// paired. Amounts in mol/L.
type Point struct {
	PH, Ionic, Gamma1 float64
	H, OH             float64 // concentrations
	// Shares of the inorganic carbon; they sum to 1.
	Alpha0, Alpha1, Alpha2 float64 // CO2, HCO3, CO3
}

// At is the water at a pH.
func (c Constants) Point(pH, ionic float64) Point {
	g := c.Gamma1(ionic)
	a := math.Pow(10, -pH) // activity of H
	k1 := c.K1 / g         // [HCO3] a / [CO2]
	k2 := c.K2 / (g * g * g)
	p := Point{PH: pH, Ionic: ionic, Gamma1: g, H: a / g, OH: c.Kwater / a / g}
	p.Alpha1 = 1 / (1 + a/k1 + k2/a)
	p.Alpha0 = p.Alpha1 * a / k1
	p.Alpha2 = p.Alpha1 * k2 / a
	return p
}

// PerCarbon is the alkalinity that a mole of inorganic carbon carries here, eq.
func (p Point) PerCarbon() float64 { return p.Alpha1 + 2*p.Alpha2 }

// Carbon is the inorganic carbon of a water of this pH and alkalinity, eq/L.
func (p Point) Carbon(alkalinity float64) float64 {
	return (alkalinity - p.OH + p.H) / p.PerCarbon()
}

// Alkalinity is that of a water of this pH and carbon, mol/L.
func (p Point) Alkalinity(carbon float64) float64 {
	return carbon*p.PerCarbon() + p.OH - p.H
}
