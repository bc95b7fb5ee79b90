package dosing_test

import (
	"math"
	"testing"

	"beckline/carbonate"
	"beckline/dosing"
)

// TestPairsThatBend: ordinary pairs with an index or CCPP among their targets,
// for which Newton from no dose at all leaves the model or settles on a dose
// below zero, although both targets can be met.
func TestPairsThatBend(t *testing.T) {
	pH := func(v float64) dosing.Target { return dosing.Target{Kind: dosing.TargetPH, Value: v} }
	alk := func(v float64) dosing.Target { return dosing.Target{Kind: dosing.TargetAlkalinity, Value: caco3(v)} }
	si := func(v float64) dosing.Target { return dosing.Target{Kind: dosing.TargetSaturationIndex, Value: v} }
	ccpp := func(v float64) dosing.Target {
		return dosing.Target{Kind: dosing.TargetCCPP, Value: v * 1e-3 / carbonate.MolarMassCaCO3}
	}
	for _, c := range []struct {
		first, second string
		a, b          dosing.Target
	}{
		{"caustic-25", "bicarbonate", alk(60), si(-0.2)},
		{"caustic-25", "bicarbonate", alk(60), si(0.4)},
		{"bicarbonate", "caustic-25", si(0.1), alk(60)},
		{"caustic-25", "carbon-dioxide", alk(60), si(-0.2)},
		{"lime", "carbon-dioxide", alk(60), si(0.1)},
		{"lime", "carbon-dioxide", alk(90), si(-0.2)},
		{"lime", "carbon-dioxide", pH(7.6), ccpp(-2)},
		{"soda-ash", "bicarbonate", alk(60), si(-0.2)},
		{"lime", "sulfuric-93", pH(8.8), si(0.1)},
	} {
		r, err := dosing.Solve(pairCase(t, soft(), c.first, c.second, c.a, c.b))
		if err != nil {
			t.Errorf("%s + %s to %v and %v: %v", c.first, c.second, c.a, c.b, err)
			continue
		}
		for _, target := range []dosing.Target{c.a, c.b} {
			if miss := reached(t, &r.Finished().Figures, target); math.Abs(miss) > 1e-8 {
				t.Errorf("%s + %s: target %v missed by %g", c.first, c.second, target, miss)
			}
		}
		for _, st := range r.Doses() {
			if !(st.Dose > 0) {
				t.Errorf("%s + %s: dose %g", c.first, c.second, st.Dose)
			}
		}
	}
}
