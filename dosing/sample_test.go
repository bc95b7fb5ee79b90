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
		v, ok := dosing.Target{Kind: dosing.TargetAlkalinity}.Figure(&got, s.Organics())
		if want := want.Raw().Figures.Alkalinity; !ok || v != want {
			t.Errorf("%s: alkalinity as titrated %v %v, want %v", name, v, ok, want)
		}
	}
	if _, err := dosing.NewSample(dosing.Readings{PH: dosing.Some(7)}); err == nil {
		t.Error("a sample without alkalinity was taken")
	}
}

// TestWalkIsSolve: walking a train with the doses of an answer ends at its
// waters, with a tower, a contactor, chlorine and its demand on the way.
func TestWalkIsSolve(t *testing.T) {
	r := dosing.Readings{PH: dosing.Some(6.9), Alkalinity: dosing.Some(8e-4), Kelvin: dosing.Some(285),
		Calcium: dosing.Some(2e-4), Ammonia: dosing.Some(2e-5)}
	chlorine, _ := dosing.ProductByName("chlorine-gas")
	caustic, _ := dosing.ProductByName("caustic-25")
	c := dosing.Case{Readings: r, Target: dosing.Target{Kind: dosing.TargetPH, Value: 8.4}, Additions: []dosing.Addition{
		{Process: dosing.Aeration, Share: dosing.Some(0.5)},
		{Process: dosing.LimestoneContactor},
		{Product: chlorine, Dose: dosing.Some(2e-5), Demand: dosing.Some(5e-6)},
		{Product: caustic, Solve: true},
	}}
	want, err := dosing.Solve(c)
	if err != nil {
		t.Fatal(err)
	}
	raw := want.Raw().Figures.Water
	k, err := carbonate.ConstantsAt(raw.Kelvin)
	if err != nil {
		t.Fatal(err)
	}
	doses := make([]float64, len(c.Additions))
	for i := range doses {
		doses[i] = want.Stations[i+1].Dose
	}
	for to := range want.Stations {
		got, ok := c.Walk(k, raw, doses, to)
		if !ok || got != want.Stations[to].Figures.Water {
			t.Errorf("station %d: %+v, want %+v", to, got, want.Stations[to].Figures.Water)
		}
	}
	if c.Plain(raw, 4) || !c.Plain(raw, 0) {
		t.Error("a tower commutes")
	}
}

// TestMixIsSolve: sources mixed by hand are the raw water of the blend.
func TestMixIsSolve(t *testing.T) {
	a := dosing.Readings{PH: dosing.Some(7.1), Alkalinity: dosing.Some(4e-3), Kelvin: dosing.Some(283)}
	b := dosing.Readings{PH: dosing.Some(9.2), Alkalinity: dosing.Some(1e-3), Kelvin: dosing.Some(293)}
	c := dosing.Case{Sources: []dosing.Source{{Name: "a", Readings: a, Flow: dosing.Some(2)}, {Name: "b", Readings: b, Flow: dosing.Some(3)}}}
	want, err := dosing.Solve(c)
	if err != nil {
		t.Fatal(err)
	}
	got, ok := c.Mix(carbonate.Stream{Water: want.Sources[0].Water, Flow: 2}, carbonate.Stream{Water: want.Sources[1].Water, Flow: 3})
	if !ok || got != want.Raw().Figures.Water {
		t.Errorf("%+v, want %+v", got, want.Raw().Figures.Water)
	}
}
