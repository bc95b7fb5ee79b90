package carbonate_test

import (
	"errors"
	"flag"
	"math"
	"math/rand/v2"
	"testing"

	"beckline/carbonate"
)

var many = flag.Int("waters", 1000, "how many random waters the closure tests draw")

// drawWater draws a water wider than any plant sees: pH 4.3-11, alkalinity
// 0.5-2000 mg/L as CaCO3, sulfate to 2500 mg/L, every minor acid now and then.
func drawWater(r *rand.Rand) (pH, kelvin float64, w carbonate.Water, in carbonate.IonicInput) {
	logUniform := func(lo, hi float64) float64 { return lo * math.Pow(hi/lo, r.Float64()) }
	mg := func(c carbonate.Component, hi float64) {
		if r.Float64() < 0.7 {
			w.Totals[c] = logUniform(hi*1e-4, hi) * 1e-3 / c.MolarMass()
		}
	}
	pH = 4.3 + 6.7*r.Float64()
	kelvin = 273.15 + 50*r.Float64()
	w.Alkalinity = 2 * logUniform(0.5, 2000) * 1e-3 / carbonate.MolarMassCaCO3
	mg(carbonate.Calcium, 1000)
	mg(carbonate.Magnesium, 500)
	mg(carbonate.Sulfate, 2500)
	mg(carbonate.Sodium, 2000)
	mg(carbonate.Chloride, 3000)
	if r.Float64() < 0.4 {
		mg(carbonate.Phosphate, 20)
		mg(carbonate.Silica, 80)
		mg(carbonate.Boron, 5)
		mg(carbonate.Fluoride, 5)
		mg(carbonate.Acetate, 50)
		mg(carbonate.Formate, 50)
		mg(carbonate.Citrate, 50)
		if r.Float64() < 0.5 {
			mg(carbonate.Chlorine, 10)
		} else {
			mg(carbonate.Ammonia, 30)
		}
	}
	if r.Float64() < 0.3 {
		in.Measured = logUniform(1e-4, 0.4)
	}
	return pH, kelvin, w, in
}

// refused says whether an error is one of the plain refusals that a random
// water may meet.
func refused(err error) bool {
	var out *carbonate.RangeError
	return errors.As(err, &out) || errors.Is(err, carbonate.ErrAlkalinityBelowPH)
}

// TestRandomWatersClose: the pH found afresh from the totals is the pH from
// which the totals were found, on waters wider than any plant's.
func TestRandomWatersClose(t *testing.T) {
	r := rand.New(rand.NewPCG(1, 2))
	solved, worst := 0, 0.0
	for range *many {
		pH, kelvin, w, in := drawWater(r)
		k, err := carbonate.ConstantsAt(kelvin)
		if err != nil {
			t.Fatal(err)
		}
		raw, _, err := k.FromPH(pH, w, in)
		if refused(err) {
			continue
		}
		if err != nil {
			t.Fatalf("pH %g, %+v: %v", pH, w, err)
		}
		again, err := k.Solve(raw.Water)
		if err != nil {
			t.Fatalf("pH %g, %+v: %v", pH, raw.Water, err)
		}
		solved++
		if d := math.Abs(again.PH - pH); d > 1e-6 || math.IsNaN(d) {
			t.Fatalf("pH %g comes back as %g: %+v", pH, again.PH, raw.Water)
		} else {
			worst = max(worst, d)
		}
	}
	if solved < *many/2 {
		t.Fatalf("only %d of %d waters were solved", solved, *many)
	}
	t.Logf("%d of %d waters solved, worst closure %.2g pH", solved, *many, worst)
}

// TestRandomDosesClose: a dose found at the target pH, added and solved afresh,
// lands on the target.
func TestRandomDosesClose(t *testing.T) {
	r := rand.New(rand.NewPCG(3, 4))
	reagents := []carbonate.Reagent{
		{Equivalents: 1, Adds: carbonate.Totals{carbonate.Sodium: 1}},                        // NaOH
		{Equivalents: 2, Adds: carbonate.Totals{carbonate.Calcium: 1}},                       // Ca(OH)2
		{Equivalents: 2, Adds: carbonate.Totals{carbonate.Sodium: 2, carbonate.Carbon: 1}},   // Na2CO3
		{Equivalents: 0, Adds: carbonate.Totals{carbonate.Carbon: 1}},                        // CO2
		{Equivalents: -2, Adds: carbonate.Totals{carbonate.Sulfate: 1}},                      // H2SO4
		{Equivalents: -1, Adds: carbonate.Totals{carbonate.Phosphate: 1}},                    // H3PO4
		{Equivalents: 0, Adds: carbonate.Totals{carbonate.Citrate: 1}},                       // citric acid
		{Equivalents: 2, Adds: carbonate.Totals{carbonate.Sodium: 2, carbonate.Silica: 3.3}}, // sodium silicate
	}
	solved, worst := 0, 0.0
	for range *many {
		pH, kelvin, w, in := drawWater(r)
		target := 4.3 + 6.7*r.Float64()
		reagent := reagents[r.IntN(len(reagents))]
		k, _ := carbonate.ConstantsAt(kelvin)
		raw, _, err := k.FromPH(pH, w, in)
		if refused(err) {
			continue
		}
		if err != nil {
			t.Fatal(err)
		}
		dose, at, err := k.DoseToPH(raw.Water, reagent, target)
		if errors.Is(err, carbonate.ErrOutOfReach) || refused(err) || dose < 0 {
			continue
		}
		if err != nil {
			t.Fatalf("pH %g to %g with %+v: %v\n%+v", pH, target, reagent, err, raw.Water)
		}
		again, err := k.Solve(raw.Water.Add(reagent, dose))
		if refused(err) {
			continue
		}
		if err != nil {
			t.Fatalf("closing pH %g to %g: %v", pH, target, err)
		}
		solved++
		if d := math.Abs(again.PH - target); d > 1e-6 || math.IsNaN(d) {
			t.Fatalf("pH %g to %g with %+v, dose %g: lands on %g (at %+v)\n%+v", pH, target, reagent, dose, again.PH, at.PH, raw.Water)
		} else {
			worst = max(worst, d)
		}
	}
	if solved < *many/6 {
		t.Fatalf("only %d of %d doses were solved", solved, *many)
	}
	t.Logf("%d of %d doses solved, worst closure %.2g pH", solved, *many, worst)
}

// TestRandomCCPP: taking the CCPP out of the water leaves it at SI 0.
func TestRandomCCPP(t *testing.T) {
	r := rand.New(rand.NewPCG(5, 6))
	solved, worst := 0, 0.0
	for range *many {
		pH, kelvin, w, in := drawWater(r)
		k, _ := carbonate.ConstantsAt(kelvin)
		raw, _, err := k.FromPH(pH, w, in)
		if err != nil {
			continue
		}
		x, err := raw.CCPP()
		if refused(err) {
			continue
		}
		if err != nil {
			t.Fatalf("%v: pH %g %+v", err, pH, raw.Water)
		}
		e := raw.Water
		e.Totals[carbonate.Calcium] -= x
		e.Totals[carbonate.Carbon] -= x
		e.Alkalinity -= 2 * x
		if e.Totals[carbonate.Calcium] < 0 || e.Totals[carbonate.Carbon] < 0 {
			t.Fatalf("CCPP %g takes out more than there is: pH %g %+v", x, pH, raw.Water)
		}
		s, err := k.Solve(e)
		if err != nil {
			t.Fatalf("%v: pH %g %+v", err, pH, e)
		}
		si, _, ok := s.SaturationIndex()
		solved++
		if d := math.Abs(si); !ok || d > 1e-6 {
			t.Fatalf("after CCPP %g SI is %g (%v): pH %g, %+v", x, si, ok, pH, raw.Water)
		} else {
			worst = max(worst, d)
		}
	}
	if solved < *many/2 {
		t.Fatalf("only %d of %d", solved, *many)
	}
	t.Logf("%d of %d waters, worst SI after CCPP %.2g", solved, *many, worst)
}
