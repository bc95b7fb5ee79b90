package bench

import (
	"math"

	"beckline/carbonate"
)

// Unknown is a figure that a fit can find.
type Unknown int

// The unknowns.
const (
	Alkalinity   Unknown = iota // eq/L, the sample's effective alkalinity, all bases counted
	Carbon                      // mol/L, dissolved inorganic carbon
	Strength                    // the product's real strength over its label's
	AcidAmount                  // mol/L of a weak acid that the readings do not name
	AcidPK                      // its pK, 0 to 14, at infinite dilution
	MeterOffset                 // pH that the meter reads too high throughout
	CarbonLost                  // mol/L of CO2 gone to the air by the last reading, evenly over the readings; below 0 taken up
	Precipitated                // share, 0 to 1, of the calcium carbonate above saturation that has come out at each reading
	unknowns
)

// Name is a plain name of the unknown.
func (u Unknown) Name() string {
	switch u {
	case Alkalinity:
		return "effective alkalinity"
	case Carbon:
		return "dissolved inorganic carbon"
	case Strength:
		return "strength over the label's"
	case AcidAmount:
		return "unknown weak acid"
	case AcidPK:
		return "pK of the unknown weak acid"
	case MeterOffset:
		return "meter offset"
	case CarbonLost:
		return "CO2 lost"
	case Precipitated:
		return "share of the calcium carbonate precipitated"
	}
	return "unknown"
}

// figures is one value of each unknown.
type figures [unknowns]float64

// asRead is where a fit starts: the sample as its readings make it, and the
// product as its label says.
func asRead(w *carbonate.Water) figures {
	var f figures
	f[Alkalinity] = w.Alkalinity
	f[Carbon] = w.Totals[carbonate.Carbon]
	f[Strength] = 1
	f[AcidPK] = 7
	return f
}

// span bounds what an unknown may be.
func (u Unknown) span() (low, high float64) {
	switch u {
	case Alkalinity:
		return -1, 1
	case Carbon, AcidAmount:
		return 0, 1
	case Strength:
		return 0.01, 100
	case AcidPK:
		return 0, 14
	case MeterOffset:
		return -3, 3
	case CarbonLost:
		return -1, 1
	}
	return 0, 1
}

// scale is a typical size of an unknown, for steps and differences. Amounts of
// the sample go by what it holds.
func (u Unknown) scale(start *figures) float64 {
	switch u {
	case Alkalinity, Carbon, AcidAmount, CarbonLost:
		return max(math.Abs(start[Alkalinity]), start[Carbon], 1e-5)
	}
	return 1
}
