package feed

import "math"

// Codes of tanks and stores.
const (
	CodeDayTankLarge    = "day_tank_over_30_hours"     // holds more than 30 h of feed (Recommended Standards for Water Works, from memory)
	CodeTankBelowHeel   = "tank_below_heel"            // nothing left that the pump can take
	CodeLoadDoesNotFit  = "load_does_not_fit"          // more than the free space
	CodeStorageUnder30  = "storage_under_30_days"      // Wis. Admin. Code NR 811, as excerpted
	CodeStorageUnder1p5 = "storage_under_1_5_loads"    // same
	CodeDensityOff      = "density_off_delivery_note"  // not the product on the note, or not its strength
	CodeStoreOverFull   = "more_than_the_store_holds"  // the volume given is above the fill mark
	CodeAskStrengths    = "two_strengths_same_density" // the density has a maximum: a titration must tell
)

const (
	hour           = 3600.0
	secondsOfDay   = 86400.0
	dayTankSeconds = 30 * hour
	storageSeconds = 30 * secondsOfDay
	storageLoads   = 1.5
	longestSupply  = 100 * 365 * secondsOfDay // what clocks can hold and anyone would believe
)

// Tank is a tank that a pump draws from, all m3.
type Tank struct {
	Volume float64 // in it now
	Heel   float64 // that the pump cannot take
	Full   float64 // to the fill mark; 0 where not known
}

// Supply is how long a tank lasts.
type Supply struct {
	Usable  float64 // m3 above the heel
	Seconds float64 // until the pump draws air, at most 100 years
	Refill  float64 // s until filling is to begin: the margin before that, 0 at the least
	Codes   []string
}

// Lasts tells how long the tank feeds a rate (m3/s, above 0) from now on. margin
// is in seconds, 0 or more. The clock is the caller's. The error is *BadInput of
// field "tank", "feed" or "margin".
func (t Tank) Lasts(rate, margin float64) (Supply, error) {
	if err := t.check(); err != nil {
		return Supply{}, err
	}
	if !(rate > 0) || math.IsInf(rate, 0) {
		return Supply{}, &BadInput{Field: "feed", Value: rate, Low: 0, High: math.MaxFloat64}
	}
	if !(margin >= 0) || math.IsInf(margin, 0) {
		return Supply{}, &BadInput{Field: "margin", Value: margin, Low: 0, High: math.MaxFloat64}
	}
	s := Supply{Usable: max(t.Volume-t.Heel, 0)}
	s.Seconds = min(s.Usable/rate, longestSupply)
	s.Refill = max(s.Seconds-margin, 0)
	if s.Usable == 0 {
		s.Codes = append(s.Codes, CodeTankBelowHeel)
	}
	if t.Full > 0 && (t.Full-t.Heel)/rate > dayTankSeconds {
		s.Codes = append(s.Codes, CodeDayTankLarge)
	}
	if t.Full > 0 && t.Volume > t.Full*(1+rounding) {
		s.Codes = append(s.Codes, CodeStoreOverFull)
	}
	return s, nil
}

func (t Tank) check() error {
	for _, v := range []float64{t.Volume, t.Heel, t.Full} {
		if !(v >= 0) || math.IsInf(v, 0) {
			return &BadInput{Field: "tank", Value: v, Low: 0, High: math.MaxFloat64}
		}
	}
	return nil
}

// UprightCylinder is the volume of a standing tank of a diameter filled to a
// depth, m and m3.
func UprightCylinder(diameter, depth float64) float64 {
	return math.Pi / 4 * diameter * diameter * depth
}

// LyingCylinder is the volume of a lying tank with flat ends, of a diameter and
// length, dipped to a depth from 0 to the diameter, m and m3 (area of a circular
// segment, r^2 acos((r-h)/r) - (r-h) sqrt(2rh - h^2)).
func LyingCylinder(diameter, length, depth float64) float64 {
	r := diameter / 2
	h := min(max(depth, 0), diameter)
	if r <= 0 {
		return 0
	}
	return length * (r*r*math.Acos((r-h)/r) - (r-h)*math.Sqrt(max(2*r*h-h*h, 0)))
}
