package feed

import "math"

// Form is the state in which a product is delivered.
type Form int

// The forms.
const (
	Liquid Form = iota + 1
	Solid
	Gas
)

// Warning codes in Rates.Codes.
const (
	CodeDensityAt20C      = "density_at_20c"       // the product is not at 20 C and no table has its temperature
	CodeProductMayFreeze  = "product_may_freeze"   // the product is below the point at which it freezes or crystallises
	CodeDensityBeyond     = "density_beyond_table" // the strength is up to 2 % above the last published density
	CodePumpNearLimit     = "pump_near_limit"      // the pump would run above nine tenths of its output
	CodePumpBelowTurndown = "pump_below_turndown"  // the pump would run under a tenth of its output
)

const (
	referenceKelvin  = 293.15 // 20 C, the temperature of the density tables
	sameTemperature  = 0.01   // K, what still counts as 20 C
	leastKelvin      = 223.15 // no product is stored colder than -50 C
	greatestKelvin   = 373.15 // nor hotter than boiling water
	leastDensity     = 500.0  // kg/m3; no liquid product is lighter
	greatestDensity  = 3000.0 // nor heavier
	greatestPureMass = 1000.0 // kg/m3; more of a substance than water is no dose
)

// Input is one feed. Zero flow, pump capacity or temperature mean not given.
type Input struct {
	PureMass      float64 // kg of the chemical's formula per m3 of water, 0 to 1000
	Strength      float64 // kg of the formula per kg of product, above 0, at most 1
	Form          Form
	Density       Density // table of the product's density; needed for a liquid
	KgPerM3       float64 // density as measured in the tank, 500 to 3000; 0 means take the table's
	ProductKelvin float64 // K of the product in its tank, 223.15 to 373.15; 0 is 293.15
	Flow          float64 // m3/s of water
	PumpCapacity  float64 // m3/s of product at 100 %
}

// Rates is one feed in SI. Flow-dependent figures are absent (HasFlow false)
// where the flow is not known; volumes exist only for liquids.
type Rates struct {
	PureMass        float64 // kg of the chemical's formula per m3 of water (= g/L)
	ProductMass     float64 // kg of product as delivered per m3 of water
	HasFlow         bool
	PurePerSecond   float64 // kg/s
	MassPerSecond   float64 // kg/s of product
	HasVolume       bool
	Density         float64 // kg/m3 of product; 0 for solids and gases
	VolumePerSecond float64 // m3/s of product
	HasPump         bool
	PumpFraction    float64  // of the pump's output at 100 %, 0 to 1 (above 1 is refused)
	Codes           []string // the warning codes above that apply

	DensitySource string   // where the density comes from; "" for solids and gases
	Freezing      Freezing // where the product starts to freeze; see its Known
}

// Compute works out one feed: product mass = pure mass / strength, mass rate =
// mass per volume of water x flow, volume rate = mass rate / density. Errors:
// *BadInput for a value that cannot be, *OutOfTable for a strength whose density
// is not known, *TooSmall for a pump that cannot deliver; with *TooSmall the
// rates are complete all the same, PumpFraction above 1.
func Compute(in Input) (Rates, error) {
	if in.ProductKelvin == 0 {
		in.ProductKelvin = referenceKelvin
	}
	if err := in.check(); err != nil {
		return Rates{}, err
	}
	r := Rates{PureMass: in.PureMass, ProductMass: in.PureMass / in.Strength}
	if in.Flow > 0 {
		r.HasFlow = true
		r.PurePerSecond = r.PureMass * in.Flow
		r.MassPerSecond = r.ProductMass * in.Flow
	}
	if in.Form != Liquid {
		return r, nil
	}
	found, err := in.density()
	if err != nil {
		return Rates{}, err
	}
	r.Density, r.DensitySource = found.KgPerM3, found.Source
	r.Freezing = in.Density.Freezing(in.Strength)
	if r.Freezing.Known && in.ProductKelvin < r.Freezing.Kelvin {
		r.Codes = append(r.Codes, CodeProductMayFreeze)
	}
	if !r.HasFlow {
		return r, nil
	}
	r.HasVolume = true
	r.VolumePerSecond = r.MassPerSecond / r.Density
	if !found.AtTemperature {
		r.Codes = append(r.Codes, CodeDensityAt20C)
	}
	if found.BeyondTable {
		r.Codes = append(r.Codes, CodeDensityBeyond)
	}
	return r.withPump(in.PumpCapacity)
}

// density is the measured one where there is one, and else the table's.
func (in Input) density() (Found, error) {
	if in.KgPerM3 > 0 {
		return Found{KgPerM3: in.KgPerM3, AtTemperature: true, Source: "measured"}, nil
	}
	return in.Density.At(in.Strength, in.ProductKelvin)
}

// check refuses what no feed can be.
func (in Input) check() error {
	for _, c := range []struct {
		field     string
		value     float64
		low, high float64
		openLow   bool
	}{
		{"dose", in.PureMass, 0, greatestPureMass, false},
		{"strength", in.Strength, 0, 1, true},
		{"product-temperature", in.ProductKelvin, leastKelvin, greatestKelvin, false},
		{"density", in.KgPerM3, leastDensity, greatestDensity, false},
		{"flow", in.Flow, 0, math.MaxFloat64, false},
		{"pump", in.PumpCapacity, 0, math.MaxFloat64, false},
	} {
		if c.field == "density" && c.value == 0 {
			continue // not measured
		}
		inside := c.value >= c.low && c.value <= c.high // false for NaN
		if !inside || c.openLow && c.value == c.low {
			return &BadInput{Field: c.field, Value: c.value, Low: c.low, High: c.high}
		}
	}
	if in.Form != Liquid && in.Form != Solid && in.Form != Gas {
		return &BadInput{Field: "form", Value: float64(in.Form), Low: float64(Liquid), High: float64(Gas)}
	}
	return nil
}
