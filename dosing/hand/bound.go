package hand

import "math"

// How far the two sets of constants may stand apart from 0 to 50 C: what a
// person who looks them up elsewhere would find (the water product's range is
// that between the printed tables in testdata), and the rounding of the slope.
const (
	spreadPK1   = 0.004
	spreadPK2   = 0.005
	spreadPKw   = 0.020
	spreadSlope = 0.0035
)

// Agreement within which two ways are called one: the repeatability of a bench
// titration (common practice, no source).
const (
	repeatable       = 0.03  // of a dose
	repeatableCarbon = 0.005 // of the water's carbon, for a dose that is the small difference of two large numbers
	repeatablePH     = 0.05
)

// spread is how far the spread of the constants can move a figure of the method:
// the sum over the constants of the larger move, either way. At two temperatures
// the two sets may be off in opposite ways, so they are moved apart.
func (m method) spread(figure func(method) float64) float64 {
	at := figure(m)
	sum := 0.0
	most := func(move func(m *method, sign float64)) {
		larger := 0.0
		for _, sign := range []float64{-1, 1} {
			moved := m
			move(&moved, sign)
			larger = max(larger, math.Abs(figure(moved)-at))
		}
		sum += larger
	}
	for _, shift := range []func(c *Constants, sign float64){
		func(c *Constants, sign float64) { c.K1 *= math.Pow(10, sign*spreadPK1) },
		func(c *Constants, sign float64) { c.K2 *= math.Pow(10, sign*spreadPK2) },
		func(c *Constants, sign float64) { c.Kwater *= math.Pow(10, sign*spreadPKw) },
		func(c *Constants, sign float64) { c.DaviesA += sign * spreadSlope },
	} {
		if m.reading.Kelvin == m.process.Kelvin {
			most(func(m *method, sign float64) { shift(&m.reading, sign); shift(&m.process, sign) })
			continue
		}
		most(func(m *method, sign float64) { shift(&m.reading, sign) })
		most(func(m *method, sign float64) { shift(&m.process, sign) })
	}
	return sum
}
