package feed

import (
	"errors"
	"math"
	"slices"
	"testing"

	"github.com/google/go-cmp/cmp"
	"pgregory.net/rapid"
)

// caustic is 10 mg/L of sodium hydroxide as 50 % into 100 m3/h.
func caustic() Input {
	return Input{PureMass: 0.010, Strength: 0.5, Form: Liquid, Density: SodiumHydroxide, Flow: 100.0 / 3600}
}

// By hand: 10 g/m3 x 100 m3/h = 1 kg/h pure, 2 kg/h of product, over 1.5253 kg/L
// (CRC Handbook, from memory) 1.3112 L/h.
func TestComputeByHand(t *testing.T) {
	in := caustic()
	in.PumpCapacity = 5e-3 / 3600
	r, err := Compute(in)
	if err != nil {
		t.Fatal(err)
	}
	for _, c := range []struct {
		name      string
		got, want float64
	}{
		{"product, kg/m3", r.ProductMass, 0.020},
		{"pure, kg/h", r.PurePerSecond * 3600, 1},
		{"product, kg/h", r.MassPerSecond * 3600, 2},
		{"product, L/h", r.VolumePerSecond * 3.6e6, 2 / 1.5253},
		{"pump", r.PumpFraction, 2 / 1.5253 / 5},
	} {
		if apart(c.got, c.want, 1e-9) {
			t.Errorf("%s: %g, want %g", c.name, c.got, c.want)
		}
	}
	if !r.HasFlow || !r.HasVolume || !r.HasPump || len(r.Codes) != 0 {
		t.Errorf("%+v", r)
	}
}

func TestCodes(t *testing.T) {
	for name, c := range map[string]struct {
		change func(*Input)
		want   []string
	}{
		"plain":          {func(*Input) {}, nil},
		"warm tank":      {func(in *Input) { in.ProductKelvin = 303.15 }, []string{CodeDensityAt20C}},
		"cold tank":      {func(in *Input) { in.ProductKelvin = 283.15 }, []string{CodeProductMayFreeze, CodeDensityAt20C}},
		"cold, weak":     {func(in *Input) { in.ProductKelvin = 283.15; in.Strength = 0.15 }, nil},
		"measured":       {func(in *Input) { in.ProductKelvin = 303.15; in.KgPerM3 = 1519 }, nil},
		"cold, no flow":  {func(in *Input) { in.ProductKelvin = 283.15; in.Flow = 0 }, []string{CodeProductMayFreeze}},
		"51 %":           {func(in *Input) { in.Strength = 0.51 }, []string{CodeDensityBeyond}},
		"large pump":     {func(in *Input) { in.PumpCapacity = 1.4e-2 / 3600 }, []string{CodePumpBelowTurndown}},
		"pump at 10.1 %": {func(in *Input) { in.PumpCapacity = 1.3e-2 / 3600 }, nil},
		"nothing to do":  {func(in *Input) { in.PureMass = 0; in.PumpCapacity = 1 }, nil},
	} {
		in := caustic()
		c.change(&in)
		r, err := Compute(in)
		if err != nil {
			t.Errorf("%s: %v", name, err)
		}
		if !slices.Equal(r.Codes, c.want) {
			t.Errorf("%s: codes %v, want %v", name, r.Codes, c.want)
		}
	}
}

func TestPumpTooSmall(t *testing.T) {
	in := caustic()
	in.PumpCapacity = 1e-3 / 3600
	r, err := Compute(in)
	var small *TooSmall
	if !errors.As(err, &small) {
		t.Fatalf("%v", err)
	}
	if apart(small.Fraction, 2/1.5253, 1e-9) || apart(small.Needed, 2/1.5253/3.6e6, 1e-9) || small.Capacity != in.PumpCapacity {
		t.Errorf("%+v", small)
	}
	if r.PumpFraction != small.Fraction || !r.HasVolume {
		t.Errorf("rates are not complete: %+v", r)
	}
	in.PumpCapacity = small.Needed
	if _, err := Compute(in); err != nil {
		t.Errorf("a pump of exactly the size needed: %v", err)
	}
}

// Without flow nothing that depends on it may appear; solids and gases have no
// volume and so no pump.
func TestAbsentFigures(t *testing.T) {
	in := caustic()
	in.Flow, in.PumpCapacity = 0, 1
	r, err := Compute(in)
	if err != nil || r.HasFlow || r.HasVolume || r.HasPump || r.PurePerSecond != 0 || r.VolumePerSecond != 0 {
		t.Errorf("no flow: %+v, %v", r, err)
	}
	for _, form := range []Form{Solid, Gas} {
		r, err := Compute(Input{PureMass: 0.02, Strength: 0.9, Form: form, Flow: 1, PumpCapacity: 1, ProductKelvin: 250})
		want := Rates{PureMass: 0.02, ProductMass: 0.02 / 0.9, HasFlow: true, PurePerSecond: 0.02, MassPerSecond: 0.02 / 0.9}
		if d := cmp.Diff(want, r); err != nil || d != "" {
			t.Errorf("form %d: %v\n%s", form, err, d)
		}
	}
}

func TestBadInput(t *testing.T) {
	for field, change := range map[string]func(*Input){
		"dose":                func(in *Input) { in.PureMass = -1 },
		"strength":            func(in *Input) { in.Strength = 0 },
		"product-temperature": func(in *Input) { in.ProductKelvin = 20 },
		"density":             func(in *Input) { in.KgPerM3 = 1.28 },
		"flow":                func(in *Input) { in.Flow = math.Inf(1) },
		"pump":                func(in *Input) { in.PumpCapacity = math.NaN() },
		"form":                func(in *Input) { in.Form = 0 },
	} {
		in := caustic()
		change(&in)
		var bad *BadInput
		if _, err := Compute(in); !errors.As(err, &bad) || bad.Field != field {
			t.Errorf("%s: %v", field, err)
		}
	}
	in := caustic()
	in.Strength = 1.2
	var bad *BadInput
	if _, err := Compute(in); !errors.As(err, &bad) || bad.High != 1 {
		t.Errorf("strength above 1: %v", err)
	}
}

// Mass is kept: what leaves the tank, times its strength, is what the water
// gains, and litres times density are kilograms.
func TestMassIsKept(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		table := rapid.SampledFrom(Tables()).Draw(t, "table")
		in := Input{
			PureMass: rapid.Float64Range(0, 10).Draw(t, "dose"),
			Strength: rapid.Float64Range(0.01, table.Greatest()).Draw(t, "strength"),
			Form:     Liquid, Density: table,
			Flow:          rapid.Float64Range(1e-6, 100).Draw(t, "flow"),
			ProductKelvin: rapid.Float64Range(leastKelvin, greatestKelvin).Draw(t, "kelvin"),
		}
		r, err := Compute(in)
		if err != nil {
			t.Fatal(err)
		}
		if apart(r.MassPerSecond*in.Strength, in.PureMass*in.Flow, 1e-12) || apart(r.VolumePerSecond*r.Density, r.MassPerSecond, 1e-12) {
			t.Fatalf("%+v", r)
		}
	})
}
