package titration_test

import (
	"errors"
	"math"
	"testing"

	"beckline/dosing/titration"
)

// TestTwoEndPointsOnModelWaters: on waters titrated in the model the method
// finds the alkalinity within 0.5 mg/L, and one end point does worse.
func TestTwoEndPointsOnModelWaters(t *testing.T) {
	for _, alkalinity := range []float64{2, 5, 12.3, 19} {
		b := newBench(t, alkalinity, 6.9, 20, 200, 0.02)
		first, second := b.to(4.5), b.to(4.2)
		eq, _, err := titration.LowAlkalinity{SampleML: 200, Normality: 0.02,
			First: titration.Used(first), Second: titration.Used(second), FirstPH: 4.5, SecondPH: 4.2}.Solve()
		if err != nil {
			t.Fatal(err)
		}
		one, _, err := titration.Burette{SampleML: 200, Normality: 0.02, Titre: titration.Used(first)}.Alkalinity()
		if err != nil {
			t.Fatal(err)
		}
		off := math.Abs(titration.AsCaCO3(eq) - alkalinity)
		if off > 0.5 || off >= math.Abs(titration.AsCaCO3(one)-alkalinity) {
			t.Errorf("alkalinity %g: two end points %.2f, one %.2f", alkalinity, titration.AsCaCO3(eq), titration.AsCaCO3(one))
		}
	}
}

func TestLowAlkalinityRefusals(t *testing.T) {
	good := titration.LowAlkalinity{SampleML: 100, Normality: 0.02, First: titration.Used(1.30), Second: titration.Used(1.37),
		FirstPH: 4.50, SecondPH: 4.20}
	cases := []struct {
		name        string
		change      func(l *titration.LowAlkalinity)
		code, field string
	}{
		{"second not larger", func(l *titration.LowAlkalinity) { l.Second = titration.Used(1.30) }, titration.CodeOrder, "second end point"},
		{"step too small", func(l *titration.LowAlkalinity) { l.SecondPH = 4.23 }, titration.CodeStep, "second end point"},
		{"step too large", func(l *titration.LowAlkalinity) { l.SecondPH = 4.17 }, titration.CodeStep, "second end point"},
		{"first too high", func(l *titration.LowAlkalinity) { l.FirstPH, l.SecondPH = 4.8, 4.5 }, titration.CodeEndPoint, "first end point"},
		{"second not read", func(l *titration.LowAlkalinity) { l.SecondPH = 0 }, titration.CodeStep, "second end point"},
		{"mineral acid", func(l *titration.LowAlkalinity) { l.First, l.Second = titration.Used(0.5), titration.Used(1.2) }, titration.CodeAcid, "second end point"},
		{"no sample", func(l *titration.LowAlkalinity) { l.SampleML = 0 }, titration.CodeOutsideRange, "sample"},
		{"second burette read wrong", func(l *titration.LowAlkalinity) { l.Second = titration.Titre{StartML: 3, EndML: 1} }, titration.CodeOrder, "end"},
	}
	if _, notes, err := good.Solve(); err != nil || len(notes) != 0 {
		t.Fatal(notes, err)
	}
	if want := "(2 x 1.3 - 1.37) mL x 0.02 eq/L x 50043.5 / 100 mL = 12.3 mg/L as CaCO3"; good.Working() != want {
		t.Errorf("working %q", good.Working())
	}
	for _, c := range cases {
		l := good
		c.change(&l)
		_, _, err := l.Solve()
		var e *titration.Error
		if !errors.As(err, &e) || e.Code != c.code || e.Field != c.field || e.Given == "" || e.Accepted == "" {
			t.Errorf("%s: %+v", c.name, err)
		}
	}
	edge := good
	edge.SecondPH = 4.18 // 0.32 below
	if _, _, err := edge.Solve(); err != nil {
		t.Errorf("0.32 apart: %v", err)
	}
	edge.FirstPH, edge.SecondPH = 0, 0
	if _, _, err := edge.Solve(); err != nil {
		t.Errorf("end points not written down: %v", err)
	}
	edge.First, edge.Second = titration.Used(5), titration.Used(5.1)
	if _, notes, err := edge.Solve(); err != nil || codes(notes) != titration.CodeNotLow {
		t.Errorf("49 mg/L: %v %v", notes, err)
	}
}
