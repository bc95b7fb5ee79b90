package margin

import "beckline/dosing"

// kind says how a reading enters the model.
type kind int

const (
	ofPH         kind = iota // pH
	ofPHKelvin               // temperature of the pH reading, K
	ofAlkalinity             // eq/L
	ofKelvin                 // process temperature, K
	ofDIC                    // mol/L
	ofWater                  // any other reading of the water
	ofFlow                   // m3/s: moves the feed, not the water
	ofStrength               // fraction: moves the feed, not the water
	ofPart                   // a source's flow: moves the blend
)

// greatestShare is the largest relative tolerance that a normal error makes
// sense for.
const greatestShare = 0.5

// reading is one quantity that may be given a tolerance.
type reading struct {
	name     string // as on the command line without dashes before
	kind     kind
	get      func(*dosing.Readings) *dosing.Optional // nil for the strength
	relative bool                                    // a share of the value makes sense
	greatest float64                                 // largest absolute half-width, SI; 0 for any
}

// table lists every reading of the model in the order in which shares are
// given. A test compares it with dosing.Readings.
var table = []reading{
	{"ph", ofPH, func(r *dosing.Readings) *dosing.Optional { return &r.PH }, false, 2},
	{"ph-temperature", ofPHKelvin, func(r *dosing.Readings) *dosing.Optional { return &r.PHKelvin }, false, 20},
	{"alkalinity", ofAlkalinity, func(r *dosing.Readings) *dosing.Optional { return &r.Alkalinity }, true, 0},
	{"temperature", ofKelvin, func(r *dosing.Readings) *dosing.Optional { return &r.Kelvin }, false, 20},
	{"flow", ofFlow, func(r *dosing.Readings) *dosing.Optional { return &r.Flow }, true, 0},
	{"strength", ofStrength, nil, true, 0.5},
	{"dic", ofDIC, func(r *dosing.Readings) *dosing.Optional { return &r.DIC }, true, 0},
	water("calcium", func(r *dosing.Readings) *dosing.Optional { return &r.Calcium }),
	water("magnesium", func(r *dosing.Readings) *dosing.Optional { return &r.Magnesium }),
	water("calcium-hardness", func(r *dosing.Readings) *dosing.Optional { return &r.CalciumHardness }),
	water("hardness", func(r *dosing.Readings) *dosing.Optional { return &r.Hardness }),
	water("sulfate", func(r *dosing.Readings) *dosing.Optional { return &r.Sulfate }),
	water("chloride", func(r *dosing.Readings) *dosing.Optional { return &r.Chloride }),
	water("sodium", func(r *dosing.Readings) *dosing.Optional { return &r.Sodium }),
	water("potassium", func(r *dosing.Readings) *dosing.Optional { return &r.Potassium }),
	water("nitrate", func(r *dosing.Readings) *dosing.Optional { return &r.Nitrate }),
	water("ammonia", func(r *dosing.Readings) *dosing.Optional { return &r.Ammonia }),
	water("phosphate", func(r *dosing.Readings) *dosing.Optional { return &r.Phosphate }),
	water("silica", func(r *dosing.Readings) *dosing.Optional { return &r.Silica }),
	water("boron", func(r *dosing.Readings) *dosing.Optional { return &r.Boron }),
	water("fluoride", func(r *dosing.Readings) *dosing.Optional { return &r.Fluoride }),
	water("free-chlorine", func(r *dosing.Readings) *dosing.Optional { return &r.FreeChlorine }),
	water("acetate", func(r *dosing.Readings) *dosing.Optional { return &r.Acetate }),
	water("formate", func(r *dosing.Readings) *dosing.Optional { return &r.Formate }),
	water("citrate", func(r *dosing.Readings) *dosing.Optional { return &r.Citrate }),
	water("conductivity", func(r *dosing.Readings) *dosing.Optional { return &r.Conductivity }),
	water("tds", func(r *dosing.Readings) *dosing.Optional { return &r.TDS }),
}

func water(name string, get func(*dosing.Readings) *dosing.Optional) reading {
	return reading{name, ofWater, get, true, 0}
}

func find(name string) (int, bool) {
	for i := range table {
		if table[i].name == name {
			return i, true
		}
	}
	return 0, false
}

// Names returns the names of the readings that may be given a tolerance, in
// the order in which shares are given.
func Names() []string {
	names := make([]string, len(table))
	for i := range table {
		names[i] = table[i].name
	}
	return names
}

// rereadable: a strength comes with the delivery; everything else can be read
// again.
func (r *reading) rereadable() bool { return r.kind != ofStrength }

// used drops the readings that the model does not look at, so that an error in
// them moves nothing and cannot make two forms of one reading contradict each
// other: the pH where DIC was measured, a form of hardness that two others give,
// solids where conductivity was measured.
func used(r dosing.Readings) dosing.Readings {
	if r.DIC.Given {
		r.PH, r.PHKelvin = dosing.None, dosing.None
	}
	if r.PHKelvin == r.Kelvin {
		r.PHKelvin = dosing.None // one thermometer, one reading
	}
	if r.Calcium.Given {
		r.CalciumHardness = dosing.None
	}
	if r.Magnesium.Given && (r.Calcium.Given || r.CalciumHardness.Given) {
		r.Hardness = dosing.None
	}
	if r.Conductivity.Given {
		r.TDS = dosing.None
	}
	return r
}
