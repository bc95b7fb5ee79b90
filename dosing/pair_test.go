package dosing_test

import (
	"errors"
	"math"
	"testing"

	"pgregory.net/rapid"

	"beckline/carbonate"
	"beckline/dosing"
)

func pairCase(t testing.TB, r dosing.Readings, first, second string, a, b dosing.Target) dosing.Case {
	return dosing.Case{Readings: r, Target: a, Second: b, Additions: []dosing.Addition{
		{Product: product(t, first), Solve: true}, {Product: product(t, second), Solve: true}}}
}

func reached(t testing.TB, f *dosing.Figures, target dosing.Target) (miss float64) {
	t.Helper()
	switch target.Kind {
	case dosing.TargetPH:
		return f.PH - target.Value
	case dosing.TargetAlkalinity:
		return (f.Water.Alkalinity - target.Value) / caco3(1)
	case dosing.TargetSaturationIndex:
		return f.SaturationIndex.Value - target.Value
	case dosing.TargetCCPP:
		return (f.CCPP.Value - target.Value) * 1e3 * carbonate.MolarMassCaCO3
	}
	return (f.DIC - target.Value) * 1e3
}

// TestPairs: two targets with two chemicals, the usual ones of the trade.
func TestPairs(t *testing.T) {
	pH := func(v float64) dosing.Target { return dosing.Target{Kind: dosing.TargetPH, Value: v} }
	alk := func(v float64) dosing.Target { return dosing.Target{Kind: dosing.TargetAlkalinity, Value: caco3(v)} }
	ccpp := func(v float64) dosing.Target {
		return dosing.Target{Kind: dosing.TargetCCPP, Value: v * 1e-3 / carbonate.MolarMassCaCO3}
	}
	dic := func(v float64) dosing.Target { return dosing.Target{Kind: dosing.TargetDIC, Value: v * 1e-3} }
	for _, c := range []struct {
		first, second string
		a, b          dosing.Target
	}{
		{"soda-ash", "carbon-dioxide", pH(8.2), alk(80)},
		{"caustic-25", "bicarbonate", pH(8.6), alk(60)},
		{"lime", "carbon-dioxide", pH(8.3), ccpp(1)},
		{"lime", "carbon-dioxide", ccpp(3), alk(70)},
		{"caustic-50", "carbon-dioxide", dic(1.2), pH(8.0)},
		{"bicarbonate", "lime", alk(90), pH(8.4)},
	} {
		r, err := dosing.Solve(pairCase(t, soft(), c.first, c.second, c.a, c.b))
		if err != nil {
			t.Errorf("%s + %s: %v", c.first, c.second, err)
			continue
		}
		for _, target := range []dosing.Target{c.a, c.b} {
			if miss := reached(t, &r.Finished().Figures, target); math.Abs(miss) > 1e-6 {
				t.Errorf("%s + %s: target %v missed by %g", c.first, c.second, target, miss)
			}
		}
		if n := len(r.Doses()); n != 2 {
			t.Errorf("%d doses", n)
		}
	}
}

// TestPairSaysWhatBinds: caustic and bicarbonate cannot lower alkalinity, and
// two forms of one chemical are no pair.
func TestPairSaysWhatBinds(t *testing.T) {
	for _, c := range []struct {
		name, first, second string
		a, b                dosing.Target
		code                string
	}{
		{"too little alkalinity", "caustic-25", "bicarbonate", dosing.Target{Kind: dosing.TargetPH, Value: 8.6},
			dosing.Target{Kind: dosing.TargetAlkalinity, Value: caco3(34)}, "pair_out_of_reach"},
		{"the same twice", "caustic-25", "caustic-50", dosing.Target{Kind: dosing.TargetPH, Value: 8.6},
			dosing.Target{Kind: dosing.TargetAlkalinity, Value: caco3(34)}, "pair_out_of_reach"},
		{"one target twice", "caustic-25", "bicarbonate", dosing.Target{Kind: dosing.TargetPH, Value: 8.6},
			dosing.Target{Kind: dosing.TargetPH, Value: 8.7}, "same_target"},
		{"one target", "caustic-25", "bicarbonate", dosing.Target{Kind: dosing.TargetPH, Value: 8.6}, dosing.Target{}, "two_and_two"},
	} {
		_, err := dosing.Solve(pairCase(t, soft(), c.first, c.second, c.a, c.b))
		var p *dosing.Problem
		if !errors.As(err, &p) || p.Code != c.code {
			t.Errorf("%s: %v", c.name, err)
			continue
		}
		if c.name == "too little alkalinity" {
			// Caustic alone to pH 8.6 leaves about 39: that is the nearest, and
			// bicarbonate is what would have to be negative.
			near(t, "nearest alkalinity", p.Nearest.Value/caco3(1), 38.8, 0.3)
			if p.Given != "bicarbonate" || p.NearestAt.Value >= 0 {
				t.Errorf("binds: %+v", p)
			}
		}
	}
}

// TestAnyPair: an answer meets both targets on any water; a no is a Problem.
func TestAnyPair(t *testing.T) {
	names := []string{"caustic-25", "lime", "soda-ash", "bicarbonate", "carbon-dioxide", "sulfuric-93"}
	solved := 0
	rapid.Check(t, func(rt *rapid.T) {
		r := dosing.Readings{
			PH:         dosing.Some(rapid.Float64Range(6, 9).Draw(rt, "pH")),
			Alkalinity: dosing.Some(caco3(rapid.Float64Range(5, 300).Draw(rt, "alkalinity"))),
			Kelvin:     dosing.Some(rapid.Float64Range(273.15, 303.15).Draw(rt, "kelvin")),
			Calcium:    mgL(carbonate.Calcium, rapid.Float64Range(1, 120).Draw(rt, "calcium")),
		}
		i := rapid.IntRange(0, len(names)-1).Draw(rt, "first")
		j := rapid.IntRange(0, len(names)-2).Draw(rt, "second")
		if j >= i {
			j++
		}
		a := dosing.Target{Kind: dosing.TargetPH, Value: rapid.Float64Range(6.5, 9.5).Draw(rt, "target pH")}
		b := dosing.Target{Kind: dosing.TargetAlkalinity, Value: caco3(rapid.Float64Range(5, 400).Draw(rt, "target alkalinity"))}
		if rapid.Bool().Draw(rt, "CCPP") {
			b = dosing.Target{Kind: dosing.TargetCCPP, Value: rapid.Float64Range(-10, 15).Draw(rt, "target CCPP") * 1e-3 / carbonate.MolarMassCaCO3}
		}
		res, err := dosing.Solve(pairCase(t, r, names[i], names[j], a, b))
		if err != nil {
			var p *dosing.Problem
			if !errors.As(err, &p) || p.Kind == dosing.Failed {
				rt.Fatalf("%v", err)
			}
			return
		}
		solved++
		for _, target := range []dosing.Target{a, b} {
			if miss := reached(t, &res.Finished().Figures, target); math.Abs(miss) > 1e-6 {
				rt.Fatalf("target %v missed by %g", target, miss)
			}
		}
		for _, st := range res.Doses() {
			if st.Dose < 0 {
				rt.Fatalf("dose %g", st.Dose)
			}
		}
	})
	if solved == 0 {
		t.Error("no pair was solved")
	}
}
