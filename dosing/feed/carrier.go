package feed

import "math"

// ScaleRisk says how likely carrier water makes scale in the line of a base.
type ScaleRisk int

// The risks. The bounds are common practice, no source: soften above 35 to 50
// mg/L of hardness as CaCO3.
const (
	NoScaleRisk ScaleRisk = iota + 1 // under 35 mg/L as CaCO3
	SomeScale                        // 35 to 50 mg/L: clean and look often, better soften
	HeavyScale                       // over 50 mg/L: soften
)

const (
	someHardness  = 0.035 / 0.100087 / 1000 // mol/L of Ca + Mg: 35 mg/L as CaCO3
	heavyHardness = 0.050 / 0.100087 / 1000
	kgCaCO3       = 0.100087 // kg/mol
	kgMgOH2       = 0.058320 // kg/mol
)

// Carrier is the water that takes a base to its feed point, or thins it.
type Carrier struct {
	Hardness   float64 // mol/L of Ca + Mg, 0 or more
	Calcium    float64 // mol/L of it; below 0 where not known: then all counts as calcium
	Alkalinity float64 // eq/L, 0 or more; carbonate for the scale comes from it
	Flow       float64 // m3/s; 0 where not known
}

// Scale is what carrier water may leave behind.
type Scale struct {
	Risk ScaleRisk
	// The most that can come out once the base has turned all bicarbonate into
	// carbonate and the pH is above 11: a bound by mass, not a forecast. kg/m3 of
	// carrier water, and kg/s where its flow is known.
	CalciumCarbonate, MagnesiumHydroxide float64
	PerSecond                            float64
}

// Scale weighs a carrier water for a base. The error is *BadInput of field
// "hardness", "calcium", "alkalinity" or "flow".
func (c Carrier) Scale() (Scale, error) {
	for _, f := range []struct {
		field string
		value float64
		high  float64
	}{
		{"hardness", c.Hardness, 1}, {"calcium", max(c.Calcium, 0), c.Hardness * (1 + rounding)},
		{"alkalinity", c.Alkalinity, 1}, {"flow", c.Flow, math.MaxFloat64},
	} {
		if !(f.value >= 0 && f.value <= f.high) {
			return Scale{}, &BadInput{Field: f.field, Value: f.value, Low: 0, High: f.high}
		}
	}
	calcium := c.Calcium
	if calcium < 0 {
		calcium = c.Hardness
	}
	s := Scale{Risk: NoScaleRisk}
	switch {
	case c.Hardness > heavyHardness:
		s.Risk = HeavyScale
	case c.Hardness >= someHardness:
		s.Risk = SomeScale
	}
	s.CalciumCarbonate = min(calcium, c.Alkalinity) * 1000 * kgCaCO3
	s.MagnesiumHydroxide = max(c.Hardness-calcium, 0) * 1000 * kgMgOH2
	s.PerSecond = (s.CalciumCarbonate + s.MagnesiumHydroxide) * c.Flow
	return s, nil
}
