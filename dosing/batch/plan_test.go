package batch_test

import (
	"math"
	"testing"

	"beckline/carbonate"
	"beckline/dosing"
	"beckline/dosing/batch"
)

// rinse is spent alkaline wash water; the figures below are an independent
// working of the model's equations for it, with acid of 96 %.
func rinse(t *testing.T, strength float64, dose dosing.Optional) *dosing.Result {
	t.Helper()
	acid, ok := dosing.ProductByName("sulfuric-98")
	if !ok {
		t.Fatal("no sulfuric-98")
	}
	acid, err := acid.AtStrength(strength)
	if err != nil {
		t.Fatal(err)
	}
	c := dosing.Case{
		Readings: dosing.Readings{
			PH: dosing.Some(11.5), Alkalinity: dosing.Some(2 * 620e-3 / carbonate.MolarMassCaCO3), Kelvin: dosing.Some(305.15),
			Calcium: dosing.Some(18e-3 / carbonate.Calcium.MolarMass()), TDS: dosing.Some(1.9),
		},
		Additions: []dosing.Addition{{Product: acid, Solve: !dose.Given, Dose: dose}},
	}
	if !dose.Given {
		c.Target = dosing.Target{Kind: dosing.TargetPH, Value: 7.5}
	}
	r, err := dosing.Solve(c)
	if err != nil {
		t.Fatal(err)
	}
	return r
}

func near(t *testing.T, what string, got, want, tolerance float64) {
	t.Helper()
	if !(math.Abs(got-want) <= tolerance) {
		t.Errorf("%s: %.5g, want %.5g +- %.2g", what, got, want, tolerance)
	}
}

func TestPlan(t *testing.T) {
	r := rinse(t, 0.96, dosing.None)
	p, err := batch.Of(r, 60)
	if err != nil {
		t.Fatal(err)
	}
	near(t, "acid, kg as 100 %", p.PureMass, 28.0, 0.28)
	near(t, "acid, L of 96 %", p.ProductVolume*1e3, 15.9, 0.16)
	if len(p.Stages) != 4 {
		t.Fatalf("%d stages", len(p.Stages))
	}
	near(t, "first stage, L", p.Stages[0].ProductVolume*1e3, 14.3, 0.15)
	near(t, "pH after it", p.Stages[0].ExpectedPH, 9.48, 0.05)
	near(t, "pH at the end", p.Stages[3].ExpectedPH, 7.5, 1e-6)
	sum, last := 0.0, 12.0
	for _, s := range p.Stages {
		sum += s.ProductMass
		if s.ExpectedPH >= last {
			t.Errorf("acid raised the pH from %g to %g", last, s.ExpectedPH)
		}
		last = s.ExpectedPH
	}
	near(t, "the stages add up", sum, p.ProductMass, 1e-9*p.ProductMass)
}

// TestOvershoot: what a share of the dose, or too much of it, leaves.
func TestOvershoot(t *testing.T) {
	whole := rinse(t, 0.96, dosing.None).Dose().Dose
	for _, c := range []struct{ share, pH float64 }{{0.95, 9.03}, {0.97, 8.66}, {1.05, 6.82}, {1.10, 6.47}, {1.30, 4.6}} {
		near(t, "pH", rinse(t, 0.96, dosing.Some(c.share*whole)).Finished().Figures.PH, c.pH, 0.05)
	}
}

func TestRefusals(t *testing.T) {
	r := rinse(t, 0.96, dosing.None)
	for _, v := range []float64{0, -1, math.NaN()} {
		if _, err := batch.Of(r, v); err == nil {
			t.Errorf("a tank of %g m3 was planned", v)
		}
	}
	if _, err := batch.Of(rinse(t, 0.96, dosing.Some(1e-3)), 60); err == nil {
		t.Error("a result without a solved dose was planned")
	}
}
