package titration_test

import (
	"testing"

	"beckline/carbonate"
	"beckline/dosing/titration"
)

// bench titrates a water in the model, dilution by the titrant and all: an
// independent bench for the methods.
type bench struct {
	t         *testing.T
	k         *carbonate.Constants
	w         carbonate.Water
	sample    float64 // mL
	normality float64
}

// newBench makes a water of an alkalinity (mg/L as CaCO3), pH and temperature,
// with calcium, sulfate and chloride for the pairs.
func newBench(t *testing.T, alkalinity, pH, celsius, sample, normality float64) *bench {
	t.Helper()
	k, err := carbonate.ConstantsAt(celsius + 273.15)
	if err != nil {
		t.Fatal(err)
	}
	var w carbonate.Water
	w.Alkalinity = alkalinity / 50043.5
	w.Totals[carbonate.Calcium] = 0.35 * w.Alkalinity
	w.Totals[carbonate.Sodium] = 0.5e-3
	w.Totals[carbonate.Sulfate] = 0.1e-3
	w.Totals[carbonate.Chloride] = 0.2e-3
	s, _, err := k.FromPH(pH, w, carbonate.IonicInput{})
	if err != nil {
		t.Fatal(err)
	}
	return &bench{t, k, s.Water, sample, normality}
}

// after is the water with mL of hydrochloric acid in it.
func (b *bench) after(mL float64) carbonate.Water {
	w := b.w
	share := b.sample / (b.sample + mL)
	for i := range w.Totals {
		w.Totals[i] *= share
	}
	w.Alkalinity *= share
	w.Background *= share
	acid := b.normality * mL / (b.sample + mL)
	w.Alkalinity -= acid
	w.Totals[carbonate.Chloride] += acid
	return w
}

func (b *bench) ph(mL float64) float64 {
	b.t.Helper()
	s, err := b.k.Solve(b.after(mL))
	if err != nil {
		b.t.Fatal(err)
	}
	return s.PH
}

// to is the volume that brings the sample to a pH, mL.
func (b *bench) to(pH float64) float64 {
	low, high := 0.0, 50.0
	for range 60 {
		mid := (low + high) / 2
		if b.ph(mid) > pH {
			low = mid
		} else {
			high = mid
		}
	}
	return high
}

func (b *bench) curve(from, to, step float64) []titration.CurvePoint {
	var points []titration.CurvePoint
	for mL := from; mL <= to; mL += step {
		points = append(points, titration.CurvePoint{ML: mL, PH: b.ph(mL)})
	}
	return points
}
