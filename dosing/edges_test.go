package dosing_test

import (
	"errors"
	"math"
	"testing"

	"beckline/carbonate"
	"beckline/dosing"
)

// Cases at the edges of what can be answered: each was once a wrong answer or a
// wrong reason.

// solveFor solves the readings for one product and a target.
func solveFor(t *testing.T, r dosing.Readings, name string, target dosing.Target, before ...dosing.Addition) (*dosing.Result, *dosing.Problem) {
	t.Helper()
	additions := append(before, dosing.Addition{Product: product(t, name), Solve: true})
	res, err := dosing.Solve(dosing.Case{Readings: r, Additions: additions, Target: target})
	var p *dosing.Problem
	if err != nil && !errors.As(err, &p) {
		t.Fatal(err)
	}
	return res, p
}

// TestIndexWithoutCalciumYet: a measured calcium of zero has no index, yet lime
// brings calcium and reaches one; caustic brings none and does not.
func TestIndexWithoutCalciumYet(t *testing.T) {
	r := soft()
	r.Calcium = dosing.Some(0)
	target := dosing.Target{Kind: dosing.TargetSaturationIndex, Value: -0.2}
	res, p := solveFor(t, r, "lime", target)
	if p != nil {
		t.Fatal(p)
	}
	near(t, "SI", res.Finished().Figures.SaturationIndex.Value, -0.2, 1e-9)
	_, p = solveFor(t, r, "caustic-25", target)
	if p == nil || p.Code != "no_such_figure" || p.Nearest.Given {
		t.Fatalf("caustic: %+v", p)
	}
	if len(p.CouldReach) == 0 || p.CouldReach[0] != "lime" {
		t.Errorf("caustic: could reach %v, want lime first", p.CouldReach)
	}
}

// TestReachEndsWithTheModel: where the ionic strength passes 0.5 on the way to
// the target, that is the reason, not the product.
func TestReachEndsWithTheModel(t *testing.T) {
	r := dosing.Readings{PH: dosing.Some(7), Alkalinity: dosing.Some(caco3(100)), Kelvin: dosing.Some(288.15),
		Calcium: mgL(carbonate.Calcium, 30), Conductivity: dosing.Some(3.124)}
	_, p := solveFor(t, r, "caustic-25", dosing.Target{Kind: dosing.TargetPH, Value: 8})
	if p == nil || p.Kind != dosing.NoAnswer || p.Code != "ionic_strength" {
		t.Fatalf("caustic to pH 8: %+v", p)
	}
	if !(p.Value.Value > 0.5) || p.High.Value != 0.5 || !(p.Nearest.Value > 7.2 && p.Nearest.Value < 8) {
		t.Errorf("ionic strength %+v of at most %+v, nearest %+v", p.Value, p.High, p.Nearest)
	}
	// The wrong product stays the reason where it is the reason.
	_, p = solveFor(t, r, "caustic-25", dosing.Target{Kind: dosing.TargetPH, Value: 6})
	if p == nil || p.Code != "wrong_side" {
		t.Errorf("caustic to pH 6: %+v", p)
	}
}

// TestOrganicsNearTheEndPoint: a sample at the end point has nothing left to
// titrate and is refused; just above it the titration is still worked out.
func TestOrganicsNearTheEndPoint(t *testing.T) {
	r := dosing.Readings{Alkalinity: dosing.Some(caco3(5)), Kelvin: dosing.Some(288.15), Acetate: mgL(carbonate.Acetate, 10)}
	for _, pH := range []float64{3.5, 4.4, 4.5} {
		r.PH = dosing.Some(pH)
		_, err := dosing.Solve(dosing.Case{Readings: r})
		var p *dosing.Problem
		if !errors.As(err, &p) || p.Kind != dosing.BadInput || p.Field != "ph" || p.Low.Value != 4.5 {
			t.Errorf("pH %g: %+v", pH, err)
		}
	}
	for _, pH := range []float64{4.53, 4.55, 4.6, 4.7, 5} {
		r.PH = dosing.Some(pH)
		res, err := dosing.Solve(dosing.Case{Readings: r})
		if err != nil {
			t.Errorf("pH %g: %v", pH, err)
			continue
		}
		near(t, "alkalinity as titrated", res.Raw().Figures.Alkalinity, r.Alkalinity.Value, 1e-12)
	}
}

// TestUncertainWhereItWasRead: a pH of 10.7 read in the cold is 10.3 in warm
// water, and the carbon found from it hangs on its last digits all the same.
func TestUncertainWhereItWasRead(t *testing.T) {
	r := dosing.Readings{PH: dosing.Some(10.7), PHKelvin: dosing.Some(278.15), Alkalinity: dosing.Some(caco3(200)), Kelvin: dosing.Some(303.15)}
	res, err := dosing.Solve(dosing.Case{Readings: r})
	if err != nil {
		t.Fatal(err)
	}
	if res.Raw().Figures.PH > 10.5 || !warned(res, "dic_uncertain") {
		t.Errorf("pH %g in the process, warnings %v", res.Raw().Figures.PH, res.Warnings)
	}
}

// TestImbalanceWithoutCalcium: softened water with a measured calcium of zero is
// checked like any other.
func TestImbalanceWithoutCalcium(t *testing.T) {
	r := soft()
	r.Calcium, r.Magnesium = dosing.Some(0), dosing.Some(0)
	r.Sodium, r.Chloride = mgL(carbonate.Sodium, 300), mgL(carbonate.Chloride, 10)
	res, err := dosing.Solve(dosing.Case{Readings: r})
	if err != nil {
		t.Fatal(err)
	}
	if !warned(res, "charge_imbalance") {
		t.Errorf("warnings %v", res.Warnings)
	}
}

// TestResidualCountsWhatIsThere: chlorine that the water brings is part of the
// residual.
func TestResidualCountsWhatIsThere(t *testing.T) {
	r := soft()
	r.FreeChlorine = mgL(carbonate.Chlorine, 0.5)
	booster := dosing.Addition{Product: product(t, "chlorine-gas"), Residual: mgL(carbonate.Chlorine, 1.2), Demand: mgL(carbonate.Chlorine, 0.3)}
	res, err := dosing.Solve(dosing.Case{Readings: r, Additions: []dosing.Addition{booster}})
	if err != nil {
		t.Fatal(err)
	}
	near(t, "dose", doseMgL(&res.Stations[1]), 1.0, 1e-9)
	near(t, "residual", res.Finished().Figures.Water.Totals[carbonate.Chlorine]*70.906e3, 1.2, 1e-9)
	// The same behind a fixed dose, ahead of a solved one.
	caustic := dosing.Addition{Product: product(t, "caustic-25"), Solve: true}
	pre := fixed(t, "chlorine-gas", 0.2)
	res, err = dosing.Solve(dosing.Case{Readings: r, Additions: []dosing.Addition{pre, booster, caustic},
		Target: dosing.Target{Kind: dosing.TargetPH, Value: 8}})
	if err != nil {
		t.Fatal(err)
	}
	near(t, "dose behind another", doseMgL(&res.Stations[2]), 0.8, 1e-9)
	near(t, "residual behind another", res.Finished().Figures.Water.Totals[carbonate.Chlorine]*70.906e3, 1.2, 1e-9)
	near(t, "finished pH", res.Finished().Figures.PH, 8, 1e-6)
}

// TestAerationPastItsAlkalinity: a pH after the tower that the alkalinity cannot
// give is refused with the least alkalinity at that pH, not at the raw one.
func TestAerationPastItsAlkalinity(t *testing.T) {
	r := soft()
	tower := dosing.Addition{Process: dosing.Aeration, PH: dosing.Some(11.5)}
	_, err := dosing.Solve(dosing.Case{Readings: r, Additions: []dosing.Addition{tower}})
	var p *dosing.Problem
	if !errors.As(err, &p) || p.Code != "alkalinity_below_ph" || !(p.Low.Value > r.Alkalinity.Value) {
		t.Errorf("aeration to pH 11.5: %+v", err)
	}
	tower = dosing.Addition{Process: dosing.Aeration, AirCO2: dosing.Some(2)}
	_, err = dosing.Solve(dosing.Case{Readings: r, Additions: []dosing.Addition{tower}})
	if !errors.As(err, &p) || p.Value.Value != 2 {
		t.Errorf("air of 2 atm of CO2: %+v", err)
	}
}

// TestFluorideForPH: an acid that is a fluoride warns long before the use level
// of an acid (WHO guideline value for fluoride 1.5 mg/L, from memory).
func TestFluorideForPH(t *testing.T) {
	res, p := solveFor(t, soft(), "hydrofluorosilicic-23", dosing.Target{Kind: dosing.TargetPH, Value: 6.5})
	if p != nil {
		t.Fatal(p)
	}
	if fluoride := res.Finished().Figures.Water.Totals[carbonate.Fluoride] * 18.998e3; fluoride < 1.5 || !warned(res, "unusual_dose") {
		t.Errorf("%.3g mg/L of fluoride, warnings %v", fluoride, res.Warnings)
	}
	ordinary := fixed(t, "hydrofluorosilicic-23", 0.7*144.09/(6*18.998))
	res, err := dosing.Solve(dosing.Case{Readings: soft(), Additions: []dosing.Addition{ordinary}})
	if err != nil || warned(res, "unusual_dose") {
		t.Errorf("0.7 mg/L of fluoride: %v, %v", err, res.Warnings)
	}
}

// TestTargetIsMetAtItsStation: whatever the target and wherever it must hold,
// the water there, solved afresh, has it.
func TestTargetIsMetAtItsStation(t *testing.T) {
	behind := fixed(t, "hypochlorite-12", 3)
	for _, target := range []dosing.Target{
		{Kind: dosing.TargetPH, Value: 8.3},
		{Kind: dosing.TargetAlkalinity, Value: caco3(42)},
		{Kind: dosing.TargetSaturationIndex, Value: -0.4},
		{Kind: dosing.TargetCCPP, Value: -4e-3 / carbonate.MolarMassCaCO3},
	} {
		res, err := dosing.Solve(dosing.Case{Readings: soft(), Target: target, TargetAt: 1,
			Additions: []dosing.Addition{{Product: product(t, "lime"), Solve: true}, behind}})
		if err != nil {
			t.Fatal(err)
		}
		f := res.Stations[1].Figures
		got := map[dosing.TargetKind]float64{dosing.TargetPH: f.PH, dosing.TargetAlkalinity: f.Alkalinity,
			dosing.TargetSaturationIndex: f.SaturationIndex.Value, dosing.TargetCCPP: f.CCPP.Value}[target.Kind]
		if !(math.Abs(got-target.Value) < 1e-8) {
			t.Errorf("%s: %g, want %g", target.Kind.Field(), got, target.Value)
		}
	}
}

// TestWalkHoldsDoses: a walk with doses at hand feeds those, also where the case
// asks for a residual, and leaves the caller's doses alone.
func TestWalkHoldsDoses(t *testing.T) {
	booster := dosing.Addition{Product: product(t, "chlorine-gas"), Residual: mgL(carbonate.Chlorine, 1.2)}
	c := dosing.Case{Readings: soft(), Additions: []dosing.Addition{booster}}
	res, err := dosing.Solve(c)
	if err != nil {
		t.Fatal(err)
	}
	k, err := carbonate.ConstantsAt(soft().Kelvin.Value)
	if err != nil {
		t.Fatal(err)
	}
	doses := []float64{mgL(carbonate.Chlorine, 2).Value}
	w, ok := c.Walk(k, res.Raw().Figures.Water, doses, 1)
	if !ok || doses[0] != mgL(carbonate.Chlorine, 2).Value {
		t.Fatalf("doses %v, %v", doses, ok)
	}
	near(t, "free chlorine", w.Totals[carbonate.Chlorine]*70.906e3, 2, 1e-9)
}

// TestImpossibleCarbonDioxide: pH 3 with alkalinity is no open water.
func TestImpossibleCarbonDioxide(t *testing.T) {
	r := soft()
	r.PH = dosing.Some(3)
	res, err := dosing.Solve(dosing.Case{Readings: r})
	if err != nil {
		t.Fatal(err)
	}
	if !warned(res, "co2_above_saturation") || !warned(res, "dic_uncertain") {
		t.Errorf("CO2 of %g mol/L passes: %v", res.Raw().Figures.FreeCO2, res.Warnings)
	}
	if plain, err := dosing.Solve(dosing.Case{Readings: soft()}); err != nil || warned(plain, "co2_above_saturation") || warned(plain, "dic_uncertain") {
		t.Errorf("an ordinary water is questioned: %v", err)
	}
}

// TestUsualDoses: what a drinking-water plant would look at twice.
func TestUsualDoses(t *testing.T) {
	for _, c := range []struct {
		product string
		dose    float64
		warned  bool
	}{
		{"phosphoric-75", 1.5 * 97.995 / 94.970, false}, {"phosphoric-75", 20, true},
		{"ammonia-19", 1, false}, {"ammonia-19", 6, true},
		{"sodium-fluoride", 1, false}, {"sodium-fluoride", 10, true},
		{"chlorine-gas", 3, false}, {"chlorine-gas", 8, true},
		{"soda-ash", 60, false}, {"soda-ash", 160, true},
	} {
		res, err := dosing.Solve(dosing.Case{Readings: soft(), Additions: []dosing.Addition{fixed(t, c.product, c.dose)}})
		if err != nil {
			t.Fatal(err)
		}
		if warned(res, "unusual_dose") != c.warned {
			t.Errorf("%s at %g mg/L: %v", c.product, c.dose, res.Warnings)
		}
	}
}
