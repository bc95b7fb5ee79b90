package dosing_test

import (
	"testing"

	"beckline/carbonate"
	"beckline/dosing"
)

// TestSampleIsSolve: a sample solved again is the raw water of the answer, with
// one thermometer and with two, from pH and from DIC, with organic acids; and a
// reading replaced is as good as one entered.
func TestSampleIsSolve(t *testing.T) {
	base := dosing.Readings{PH: dosing.Some(7.1), Alkalinity: dosing.Some(1e-3), Kelvin: dosing.Some(285),
		Calcium: dosing.Some(4e-4), Hardness: dosing.Some(6e-4), Conductivity: dosing.Some(0.02)}
	bench, organic, carbon := base, base, base
	bench.PHKelvin = dosing.Some(295)
	organic.Acetate = dosing.Some(3e-4)
	carbon.PH, carbon.DIC = dosing.None, dosing.Some(1.2e-3)
	at := func(kelvin float64) *carbonate.Constants {
		k, err := carbonate.ConstantsAt(kelvin)
		if err != nil {
			t.Fatal(err)
		}
		return k
	}
	for name, r := range map[string]dosing.Readings{"plain": base, "bench": bench, "organic": organic, "carbon": carbon} {
		want, err := dosing.Solve(dosing.Case{Readings: r})
		if err != nil {
			t.Fatal(err)
		}
		moved := r
		moved.PH.Value += 0.2
		moved.Alkalinity.Value *= 1.1
		moved.DIC.Value *= 1.1
		s, err := dosing.NewSample(moved)
		if err != nil {
			t.Fatal(err)
		}
		s.SetPH(r.PH.Value)
		s.SetAlkalinity(r.Alkalinity.Value)
		if r.DIC.Given {
			s.SetDIC(r.DIC.Value)
		}
		process := at(285)
		atPH := process
		if r.PHKelvin.Given {
			atPH = at(r.PHKelvin.Value)
		}
		got, err := s.Solve(process, atPH)
		if err != nil {
			t.Fatal(err)
		}
		if w := want.Raw().Figures.Water; got.Water != w || got.PH != want.Raw().Figures.PH {
			t.Errorf("%s: %+v pH %v, want %+v pH %v", name, got.Water, got.PH, w, want.Raw().Figures.PH)
		}
		v, ok := s.Figure(dosing.Target{Kind: dosing.TargetAlkalinity}, &got)
		if want := want.Raw().Figures.Alkalinity; !ok || v != want {
			t.Errorf("%s: alkalinity as titrated %v %v, want %v", name, v, ok, want)
		}
	}
	if _, err := dosing.NewSample(dosing.Readings{PH: dosing.Some(7)}); err == nil {
		t.Error("a sample without alkalinity was taken")
	}
}
