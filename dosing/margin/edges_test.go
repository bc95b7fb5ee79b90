package margin_test

import (
	"errors"
	"math"
	"reflect"
	"slices"
	"testing"

	"beckline/carbonate"
	"beckline/dosing"
	"beckline/dosing/margin"
)

// TestTableCoversReadings: every reading of a case may be given a tolerance.
func TestTableCoversReadings(t *testing.T) {
	fields := reflect.TypeFor[dosing.Readings]().NumField()
	if n := len(margin.Names()); n != fields+1 { // and the strength
		t.Errorf("%d readings have tolerances, a case has %d and a strength", n, fields)
	}
}

func TestSetRefuses(t *testing.T) {
	for _, c := range []struct {
		name string
		tol  margin.Tolerance
		code string
	}{
		{"turbidity", margin.Tolerance{Absolute: 1}, "unknown_reading"},
		{"ph", margin.Tolerance{Relative: 0.02}, "bad_tolerance"},
		{"temperature", margin.Tolerance{Relative: 0.02}, "bad_tolerance"},
		{"ph", margin.Tolerance{Absolute: 3}, "bad_tolerance"},
		{"ph", margin.Tolerance{}, "bad_tolerance"},
		{"alkalinity", margin.Tolerance{Relative: 0.6}, "bad_tolerance"},
		{"alkalinity", margin.Tolerance{Absolute: -1}, "bad_tolerance"},
		{"alkalinity", margin.Tolerance{Absolute: math.NaN()}, "bad_tolerance"},
		{"alkalinity", margin.Tolerance{Absolute: math.Inf(1)}, "bad_tolerance"},
	} {
		tol := margin.Defaults()
		err := tol.Set(c.name, c.tol)
		var p *dosing.Problem
		if !errors.As(err, &p) || p.Code != c.code || p.Field != "tolerance" || p.Accepted == "" || p.Kind != dosing.BadInput {
			t.Errorf("%s %+v: %v", c.name, c.tol, err)
		}
		if !reflect.DeepEqual(tol, margin.Defaults()) {
			t.Errorf("%s: a refused tolerance changed the others", c.name)
		}
	}
}

func TestSetKeepsCopiesApart(t *testing.T) {
	a := margin.Defaults()
	b := a
	if err := b.Set("ph", margin.Tolerance{Absolute: 0.02}); err != nil {
		t.Fatal(err)
	}
	if err := b.Set("calcium", margin.Tolerance{Relative: 0.1}); err != nil {
		t.Fatal(err)
	}
	if got, _ := a.Of("ph"); got.Absolute != 0.10 {
		t.Errorf("the original's pH became %+v", got)
	}
	if got, _ := b.Of("ph"); got.Absolute != 0.02 {
		t.Errorf("the copy's pH is %+v", got)
	}
	if _, ok := a.Of("calcium"); ok || !slices.Contains(b.Names(), "calcium") {
		t.Error("calcium was set in the wrong one")
	}
}

func TestRefusesWhatIsNotThere(t *testing.T) {
	c := well(t)
	c.Readings.Flow = dosing.None
	for name, code := range map[string]string{"flow": "tolerance_without_reading", "silica": "tolerance_without_reading", "dic": "tolerance_without_reading"} {
		_, err := margin.Of(solve(t, c), only(t, name, margin.Tolerance{Relative: 0.03}), margin.Options{})
		var p *dosing.Problem
		if !errors.As(err, &p) || p.Code != code || p.Given != name {
			t.Errorf("%s: %v", name, err)
		}
	}
	var p *dosing.Problem
	if _, err := margin.Of(solve(t, c), margin.Tolerances{}, margin.Options{}); !errors.As(err, &p) || p.Code != "no_tolerance" {
		t.Errorf("no tolerance at all: %v", err)
	}
	if _, err := margin.Of(solve(t, c), margin.Defaults(), margin.Options{Draws: 10}); !errors.As(err, &p) || p.Code != "bad_draws" {
		t.Errorf("10 draws: %v", err)
	}
	// The defaults and a plant's own tolerances pass over what is not there.
	usual := margin.Defaults()
	if err := usual.SetUsual("silica", margin.Tolerance{Relative: 0.1}); err != nil {
		t.Fatal(err)
	}
	if _, err := margin.Of(solve(t, c), usual, margin.Options{Method: margin.FirstOrder}); err != nil {
		t.Errorf("a plant's tolerance without its reading: %v", err)
	}
	m := of(t, c, margin.Defaults(), margin.Options{Method: margin.FirstOrder})
	if m.HasFlow || len(m.Shares) != 4 {
		t.Errorf("without a flow: %+v", m.Shares)
	}
}

// TestNearTarget: where some of the true waters need no dose, the range begins
// at nothing and the count says how many.
func TestNearTarget(t *testing.T) {
	c := well(t)
	c.Target.Value = 7.18
	m := of(t, c, only(t, "ph", margin.Tolerance{Absolute: 0.1}), margin.Options{})
	if m.Dose.Low != 0 || !(m.Dose.High > 0) || m.Method != margin.Draws || m.Reason != margin.NearLimit {
		t.Errorf("%+v %s %q", m.Dose, m.Method, m.Reason)
	}
	// The true pH is above 7.18 where the error is over 0.03 of 0.051: 27.8 % by the
	// table of the normal distribution.
	if share := float64(m.NoDose) / float64(m.Drawn); math.Abs(share-0.278) > 0.01 {
		t.Errorf("%.3f of the draws need no dose, want 0.278", share)
	}
}

// TestOutOfReach: where over one in forty of the true waters cannot be brought
// to the target by this product, the range has no upper end.
func TestOutOfReach(t *testing.T) {
	c := upland(t)
	c.Readings.PH.Value = 6.5
	c.Additions = []dosing.Addition{{Product: product(t, "bicarbonate"), Solve: true}}
	c.Target.Value = 8.20
	m := of(t, c, margin.Defaults(), margin.Options{})
	if m.Dose.Reached() || m.Unreached == 0 || m.Method != margin.Draws {
		t.Errorf("%+v, %d of %d not reached, %s", m.Dose, m.Unreached, m.Drawn, m.Method)
	}
	if !(m.Dose.Low > 0) {
		t.Errorf("low end %g", m.Dose.Low)
	}
}

// TestContradictingDraws: near the edge where the pH alone accounts for the
// alkalinity, draws beyond it are no waters, and are counted.
func TestContradictingDraws(t *testing.T) {
	c := well(t)
	c.Readings = dosing.Readings{PH: dosing.Some(10.6), Alkalinity: dosing.Some(alkalinity(27)), Kelvin: dosing.Some(298.15)}
	c.Additions = []dosing.Addition{{Product: product(t, "sulfuric-93"), Solve: true}}
	c.Target.Value = 8
	m := of(t, c, margin.Defaults(), margin.Options{})
	if m.Refused == 0 || m.Refused > m.Drawn/2 {
		t.Errorf("%d of %d draws refused", m.Refused, m.Drawn)
	}
	if !(m.Dose.Low > 0 && m.Dose.High > m.Dose.Low && m.Dose.Reached()) || m.Method != margin.Draws {
		t.Errorf("%+v %s", m.Dose, m.Method)
	}
}

// TestMeasuredCarbon: with DIC measured the pH read plays no part.
func TestMeasuredCarbon(t *testing.T) {
	c := upland(t)
	raw := solve(t, c).Raw().Figures
	c.Readings.DIC = dosing.Some(raw.DIC)
	m := of(t, c, margin.Defaults(), margin.Options{Method: margin.FirstOrder})
	for _, s := range m.Shares {
		if s.Reading == "ph" {
			t.Errorf("the pH has a share: %+v", m.Shares)
		}
	}
	if last := m.Shares[len(m.Shares)-1]; last.Reading != "dic" || last.Fraction < 0.3 {
		t.Errorf("the carbon measured has the share %+v", last)
	}
}

// TestTwoThermometers: a pH read on the bench has a temperature of its own.
func TestTwoThermometers(t *testing.T) {
	c := upland(t)
	c.Readings.PHKelvin = dosing.Some(293.15)
	for method, within := range map[margin.Method]float64{margin.FirstOrder: 0.04, margin.Draws: 0.01} {
		m := of(t, c, only(t, "ph-temperature", margin.Tolerance{Absolute: 2}), margin.Options{Method: method})
		at := func(by float64) float64 {
			k := c
			k.Readings.PHKelvin.Value += by
			return solve(t, k).Dose().Dose
		}
		a, b := at(-2), at(2)
		width := math.Abs(a - b)
		if math.Abs(m.Dose.Low-min(a, b)) > within*width || math.Abs(m.Dose.High-max(a, b)) > within*width {
			t.Errorf("%s: %+v, want %g and %g", method, m.Dose, a, b)
		}
	}
}

// TestWithoutDose: fixed doses alone still leave the finished pH uncertain.
func TestWithoutDose(t *testing.T) {
	c := upland(t)
	c.Additions = c.Additions[:1]
	c.Target = dosing.Target{}
	m := of(t, c, margin.Defaults(), margin.Options{})
	if m.Solved || len(m.DoseShares) != 0 || len(m.Shares) == 0 || m.Repeat != "ph" {
		t.Errorf("%+v", m)
	}
	pH := solve(t, c).Finished().Figures.PH
	if !(m.FinishedPH.Low < pH-0.05 && m.FinishedPH.High > pH+0.05) {
		t.Errorf("finished pH %g has %+v", pH, m.FinishedPH)
	}
}

// TestOrganicAcids: where the titration does not give the alkalinity outright,
// the draws go the same way as the answer.
func TestOrganicAcids(t *testing.T) {
	c := well(t)
	c.Readings.Acetate = mg(20, carbonate.Acetate)
	m := of(t, c, only(t, "alkalinity", margin.Tolerance{Relative: 0.03}), margin.Options{Method: margin.Draws, Draws: 2000})
	at := func(by float64) float64 {
		k := c
		k.Readings.Alkalinity.Value *= by
		return solve(t, k).Dose().Dose
	}
	width := at(1.03) - at(0.97)
	if math.Abs(m.Dose.Low-at(0.97)) > 0.03*width || math.Abs(m.Dose.High-at(1.03)) > 0.03*width {
		t.Errorf("%+v, want %g to %g", m.Dose, at(0.97), at(1.03))
	}
}

// TestColdestWater: at the freezing point a colder draw is taken as that point.
func TestColdestWater(t *testing.T) {
	c := upland(t)
	c.Readings.Kelvin = dosing.Some(carbonate.MinKelvin)
	for _, method := range []margin.Method{margin.FirstOrder, margin.Draws} {
		m := of(t, c, only(t, "temperature", margin.Tolerance{Absolute: 0.5}), margin.Options{Method: method})
		if math.IsNaN(m.Dose.Low) || !(m.Dose.High > m.Dose.Low) || m.Refused != 0 {
			t.Errorf("%s: %+v, %d refused", method, m.Dose, m.Refused)
		}
	}
}
