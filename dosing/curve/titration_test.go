package curve_test

import (
	"math"
	"slices"
	"testing"

	"beckline/dosing"
	"beckline/dosing/curve"
)

// TestTitration: the curve starts at the water as the other additions leave it,
// rises all the way, runs through the solved dose, and has no gap that an eye
// would see as a corner.
func TestTitration(t *testing.T) {
	c := upland()
	answer, err := dosing.Solve(c)
	if err != nil {
		t.Fatal(err)
	}
	s, err := curve.Titration(c, 0)
	if err != nil {
		t.Fatal(err)
	}
	first, last := s.Points[0], s.Points[len(s.Points)-1]
	if settled := answer.Stations[1].Figures.PH; first.X != 0 || math.Abs(first.Y.Value-settled) > 1e-9 {
		t.Errorf("starts at %g, settled %g", first.Y.Value, settled)
	}
	if dose := answer.Dose().Dose; math.Abs(last.X/dose-1.5) > 1e-9 || s.Working == nil || math.Abs(s.Working.X/dose-1) > 1e-12 {
		t.Errorf("ends at %g, dose %g, working %+v", last.X, dose, s.Working)
	}
	if !s.AtY.Given || s.AtY.Value != 8.4 || math.Abs(s.Working.Y.Value-8.4) > 1e-6 {
		t.Errorf("target %+v, working %+v", s.AtY, s.Working.Y)
	}
	height := last.Y.Value - first.Y.Value
	for i := 1; i < len(s.Points); i++ {
		d := s.Points[i].Y.Value - s.Points[i-1].Y.Value
		if s.Points[i].X <= s.Points[i-1].X || d <= 0 || d > 0.021*height {
			t.Errorf("point %d: %g to %g", i, s.Points[i-1].Y.Value, s.Points[i].Y.Value)
		}
	}
	if len(c.Additions) != 2 || !c.Additions[1].Solve || !c.Additions[1].Feed.PumpCapacity.Given {
		t.Error("the caller's case was changed")
	}
}

// TestTitrationBeyondPump: the curve is of the water, so a pump too small for it
// does not cut it off.
func TestTitrationBeyondPump(t *testing.T) {
	c := upland()
	c.Additions[1].Feed.PumpCapacity = dosing.Some(1 / 3.6e6)
	s, err := curve.Titration(c, 0)
	if err != nil {
		t.Fatal(err)
	}
	if s.Answered() != len(s.Points) {
		t.Errorf("%d of %d answered", s.Answered(), len(s.Points))
	}
}

// TestTitrationFalls: acid into a wash water falls through the target.
func TestTitrationFalls(t *testing.T) {
	s, err := curve.Titration(wash(), 0)
	if err != nil {
		t.Fatal(err)
	}
	if s.Points[0].Y.Value < 11 || s.Points[len(s.Points)-1].Y.Value > 4 || len(s.Points) > 400 {
		t.Errorf("%d points from %g to %g", len(s.Points), s.Points[0].Y.Value, s.Points[len(s.Points)-1].Y.Value)
	}
}

// TestTitrationOutOfReach: bicarbonate stalls near pH 8.2; the curve is drawn all
// the same, without a working point, past the dose that comes nearest.
func TestTitrationOutOfReach(t *testing.T) {
	c := upland()
	c.Additions[1].Product = product("bicarbonate")
	c.Target.Value = 9
	s, err := curve.Titration(c, 0)
	if err != nil {
		t.Fatal(err)
	}
	if s.Working != nil || s.Answered() < 50 || !s.AtY.Given {
		t.Errorf("%d answered, working %+v", s.Answered(), s.Working)
	}
}

// TestTitrationOfOtherFigures: with another target the curve shows that figure.
func TestTitrationOfOtherFigures(t *testing.T) {
	for _, target := range []dosing.Target{
		{Kind: dosing.TargetAlkalinity, Value: 30 / 50043.5},
		{Kind: dosing.TargetSaturationIndex, Value: -0.5},
		{Kind: dosing.TargetCCPP, Value: -3e-5},
	} {
		c := upland()
		c.Target = target
		s, err := curve.Titration(c, 0)
		if err != nil {
			t.Fatal(err)
		}
		i, _ := slices.BinarySearchFunc(s.Points, s.Working.X, func(p curve.Point, x float64) int {
			if p.X < x {
				return -1
			}
			return 1
		})
		if low, high := s.Points[i-1].Y.Value, s.Points[i].Y.Value; target.Value < low || target.Value > high {
			t.Errorf("%+v lies not between %g and %g", target, low, high)
		}
	}
	free := upland()
	free.Target = dosing.Target{}
	if _, err := curve.Titration(free, 0); codeOf(t, err) != "missing" {
		t.Error(err)
	}
	s, err := curve.Titration(free, 1e-3)
	if err != nil || s.AtY.Given || s.Working != nil || s.Points[len(s.Points)-1].X != 1e-3 {
		t.Errorf("%v %+v", err, s.AtY)
	}
}

// TestTitrationAtStation: acid ahead of the coagulant to a coagulation pH; the
// curve is that of the water after the coagulant, not of the one after caustic.
func TestTitrationAtStation(t *testing.T) {
	c := upland()
	c.Readings.PH, c.Readings.Alkalinity = dosing.Some(7.6), dosing.Some(90/50043.5)
	caustic := c.Additions[1]
	caustic.Solve, caustic.Dose = false, dosing.Some(1e-4)
	acid := dosing.Addition{Product: product("sulfuric-93"), Solve: true}
	c.Additions = []dosing.Addition{acid, c.Additions[0], caustic}
	c.Target.Value, c.TargetAt = 6.3, 2
	s, err := curve.Titration(c, 0)
	if err != nil {
		t.Fatal(err)
	}
	if s.Working == nil || math.Abs(s.Working.Y.Value-6.3) > 1e-6 {
		t.Fatalf("%+v", s.Working)
	}
	for _, p := range s.Points {
		if p.Y.Value != p.Result.Stations[2].Figures.PH {
			t.Errorf("pH %g, after the coagulant %g", p.Y.Value, p.Result.Stations[2].Figures.PH)
		}
	}
}
