package curve_test

import (
	"errors"
	"math"
	"testing"

	"beckline/dosing"
	"beckline/dosing/curve"
)

func codeOf(t *testing.T, err error) string {
	t.Helper()
	var p *dosing.Problem
	if !errors.As(err, &p) {
		t.Fatalf("no problem but %v", err)
	}
	return p.Code
}

// TestOverTemperature: each point is the case solved at that temperature; at the
// case's own it is the case itself, and the two ways of holding meet there.
func TestOverTemperature(t *testing.T) {
	c := upland()
	own, err := dosing.Solve(c)
	if err != nil {
		t.Fatal(err)
	}
	kelvins := curve.Span(273.15, 297.15, 13)
	water, err := curve.OverTemperature(c, kelvins, curve.HoldWater)
	if err != nil {
		t.Fatal(err)
	}
	readings, err := curve.OverTemperature(c, kelvins, curve.HoldReadings)
	if err != nil {
		t.Fatal(err)
	}
	if water.Answered() != 13 || readings.Answered() != 13 {
		t.Fatalf("%d and %d answers", water.Answered(), readings.Answered())
	}
	for i, p := range water.Points {
		raw := p.Result.Raw().Figures
		if math.Abs(raw.DIC/own.Raw().Figures.DIC-1) > 1e-9 {
			t.Errorf("%g K: carbon %g, the water's own %g", p.X, raw.DIC, own.Raw().Figures.DIC)
		}
		for _, w := range p.Result.Warnings {
			if w.Field == "ph" {
				t.Errorf("%g K: the pH of another temperature was kept: %+v", p.X, w)
			}
		}
		if q := readings.Points[i]; math.Abs(q.Result.Raw().Figures.PH-6.9) > 1e-9 {
			t.Errorf("%g K: the reading moved to %g", q.X, q.Result.Raw().Figures.PH)
		}
		if fin := p.Result.Finished().Figures; math.Abs(fin.PH-8.4) > 1e-6 || fin.Water.Kelvin != kelvins[i] {
			t.Errorf("%g K: finished pH %g at %g K", p.X, fin.PH, fin.Water.Kelvin)
		}
	}
	at8 := own.Dose().Dose
	for _, s := range []curve.Series{water, readings} {
		if s.Working == nil || math.Abs(s.Working.Y.Value/at8-1) > 1e-9 || s.Working.X != 281.15 {
			t.Errorf("working point %+v, the case %g", s.Working, at8)
		}
		if math.Abs(s.Points[4].Y.Value/at8-1) > 1e-9 {
			t.Errorf("at the case's own temperature %g, the case %g", s.Points[4].Y.Value, at8)
		}
	}
	// The same pH read in colder water means more carbon dioxide.
	if !(readings.Points[0].Y.Value > readings.Points[12].Y.Value) {
		t.Error("the same pH read needs no more caustic in the cold")
	}
	if water.Name != "caustic soda 25 % to pH 8.40" || water.Y.Title() != "dose of sodium hydroxide (mg/L as NaOH)" {
		t.Errorf("%q %q", water.Name, water.Y.Title())
	}
}

func TestOverAlkalinity(t *testing.T) {
	c := upland()
	s, err := curve.OverAlkalinity(c, curve.Span(15/50043.5, 60/50043.5, 10))
	if err != nil {
		t.Fatal(err)
	}
	for i, p := range s.Points {
		want := (15 + 5*float64(i)) / 50043.5
		if raw := p.Result.Raw().Figures; math.Abs(raw.Alkalinity-want) > 1e-12 || math.Abs(raw.PH-6.9) > 1e-9 {
			t.Errorf("point %d: alkalinity %g, pH %g", i, raw.Alkalinity, raw.PH)
		}
	}
	if s.Working == nil || math.Abs(s.Working.X-24/50043.5) > 1e-15 {
		t.Errorf("working point %+v", s.Working)
	}
	// At one pH carbon dioxide goes with alkalinity, and caustic with both.
	for i := 1; i < len(s.Points); i++ {
		if s.Points[i].Y.Value <= s.Points[i-1].Y.Value {
			t.Errorf("dose falls between points %d and %d", i-1, i)
		}
	}
}

// TestOverWaters: one water cannot be answered; it keeps its place and says why.
func TestOverWaters(t *testing.T) {
	c := upland()
	hard := c.Readings
	hard.PH, hard.Alkalinity = dosing.Some(9.5), dosing.Some(200/50043.5)
	s, err := curve.OverWaters(c, []curve.Water{{"winter", c.Readings}, {"well", hard}, {"summer", c.Readings}})
	if err != nil {
		t.Fatal(err)
	}
	if s.Answered() != 2 || s.Points[1].Y.Given || s.Points[1].Problem == nil || s.Points[1].Dose() != nil {
		t.Errorf("%+v", s.Points[1])
	}
	if s.Points[0].Name != "winter" || s.Points[2].X != 2 || s.Points[0].Y != s.Points[2].Y {
		t.Errorf("%+v", s.Points)
	}
}

// TestOverTemperatureOfBlend: every source takes the temperature, the caller's
// case keeps its own, and a blend has no alkalinity to vary.
func TestOverTemperatureOfBlend(t *testing.T) {
	c := upland()
	well := c.Readings
	well.PH, well.Alkalinity, well.Kelvin = dosing.Some(7.4), dosing.Some(150/50043.5), dosing.Some(285.15)
	c.Sources = []dosing.Source{{Name: "river", Readings: c.Readings, Flow: dosing.Some(3)}, {Name: "well", Readings: well, Flow: dosing.Some(1)}}
	s, err := curve.OverTemperature(c, curve.Span(275, 290, 4), curve.HoldWater)
	if err != nil {
		t.Fatal(err)
	}
	for _, p := range s.Points {
		if k := p.Result.Raw().Figures.Water.Kelvin; math.Abs(k-p.X) > 1e-9 {
			t.Errorf("%g K at %g K", k, p.X)
		}
		if p.Result.Sources[1].Water.Kelvin != p.X {
			t.Errorf("the well is at %g K", p.Result.Sources[1].Water.Kelvin)
		}
	}
	if s.Working == nil || math.Abs(s.Working.X-(0.75*281.15+0.25*285.15)) > 1e-9 {
		t.Errorf("working %+v", s.Working)
	}
	if c.Sources[1].Readings.Kelvin.Value != 285.15 || !c.Sources[1].Readings.PH.Given {
		t.Error("the caller's case was changed")
	}
	if _, err := curve.OverAlkalinity(c, curve.Span(1e-4, 1e-3, 3)); codeOf(t, err) != "curve_of_blend" {
		t.Error(err)
	}
	one, err := curve.OverWaters(c, []curve.Water{{Name: "a", Readings: upland().Readings}, {Name: "b", Readings: upland().Readings}})
	if err != nil || len(one.Points[0].Result.Sources) != 0 {
		t.Errorf("a table of waters was blended: %v", err)
	}
}

func TestRefusals(t *testing.T) {
	c := upland()
	none := c
	none.Additions = c.Additions[:1]
	if _, err := curve.OverTemperature(none, curve.Span(274, 290, 3), curve.HoldWater); codeOf(t, err) != "missing" {
		t.Error(err)
	}
	if _, err := curve.Titration(none, 1e-3); codeOf(t, err) != "missing" {
		t.Error(err)
	}
	if _, err := curve.OverAlkalinity(c, []float64{1e-3}); codeOf(t, err) != "curve_points" {
		t.Error(err)
	}
	if _, err := curve.OverAlkalinity(c, make([]float64, 20001)); codeOf(t, err) != "curve_points" {
		t.Error(err)
	}
	acid := c
	acid.Additions = []dosing.Addition{{Product: product("sulfuric-93"), Solve: true}}
	if _, err := curve.OverTemperature(acid, curve.Span(274, 290, 3), curve.HoldReadings); codeOf(t, err) != "wrong_side" {
		t.Error(err)
	}
	unread := c
	unread.Readings.Alkalinity = dosing.None
	if _, err := curve.OverTemperature(unread, curve.Span(274, 290, 3), curve.HoldWater); codeOf(t, err) != "missing" {
		t.Error(err)
	}
	if _, err := curve.Titration(unread, 0); codeOf(t, err) != "missing" {
		t.Error(err)
	}
}

func TestSpan(t *testing.T) {
	if got := curve.Span(1, 3, 5); len(got) != 5 || got[0] != 1 || got[4] != 3 || got[2] != 2 {
		t.Error(got)
	}
	if got := curve.Span(1, 3, 1); len(got) != 1 || got[0] != 1 {
		t.Error(got)
	}
}
