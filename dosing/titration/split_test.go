package titration_test

import (
	"errors"
	"math"
	"testing"

	"beckline/dosing/titration"
)

// TestSplitRows: the five rows of the table "alkalinity relationships" of
// Standard Methods 2320 (from memory), all in mg/L as CaCO3.
func TestSplitRows(t *testing.T) {
	rows := []struct{ p, total, hydroxide, carbonate, bicarbonate float64 }{
		{0, 120, 0, 0, 120},     // P = 0: bicarbonate T
		{20, 120, 0, 40, 80},    // P < T/2: carbonate 2P, bicarbonate T - 2P
		{60, 120, 0, 120, 0},    // P = T/2: carbonate 2P
		{80, 120, 40, 80, 0},    // P > T/2: hydroxide 2P - T, carbonate 2(T - P)
		{120, 120, 120, 0, 0},   // P = T: hydroxide T
		{466, 620, 312, 308, 0}, // an alkaline wash water, row 4
		{0, 0, 0, 0, 0},
	}
	for _, r := range rows {
		parts, _, err := titration.Split(r.p/50043.5, r.total/50043.5, 0)
		if err != nil {
			t.Fatal(err)
		}
		for name, c := range map[string][2]float64{
			"hydroxide": {parts.Hydroxide, r.hydroxide}, "carbonate": {parts.Carbonate, r.carbonate}, "bicarbonate": {parts.Bicarbonate, r.bicarbonate},
		} {
			if math.Abs(titration.AsCaCO3(c[0])-c[1]) > 1e-9 {
				t.Errorf("P %g, T %g: %s %g, want %g", r.p, r.total, name, titration.AsCaCO3(c[0]), c[1])
			}
		}
	}
}

func TestSplitRefusals(t *testing.T) {
	const one = 1 / 50043.5
	for _, c := range []struct {
		name         string
		p, total, ph float64
		code, field  string
	}{
		{"swapped", 120 * one, 20 * one, 0, titration.CodePAboveTotal, "p-alkalinity"},
		{"colour in a colourless water", 5 * one, 100 * one, 7.9, titration.CodePBelowPH, "p-alkalinity"},
		{"negative", -1 * one, 100 * one, 0, titration.CodeOutsideRange, "p-alkalinity"},
		{"negative total", 0, -1 * one, 0, titration.CodeOutsideRange, "total alkalinity"},
		{"not a number", math.NaN(), 100 * one, 0, titration.CodeOutsideRange, "p-alkalinity"},
		{"pH off the scale", 0, 100 * one, 15, titration.CodeOutsideRange, "ph"},
	} {
		_, _, err := titration.Split(c.p, c.total, c.ph)
		var e *titration.Error
		if !errors.As(err, &e) || e.Code != c.code || e.Field != c.field || e.Accepted == "" {
			t.Errorf("%s: %+v", c.name, err)
		}
	}
	if _, notes, err := titration.Split(0, 100*one, 9.2); err != nil || codes(notes) != titration.CodeNoColour {
		t.Errorf("no colour at pH 9.2: %v %v", notes, err)
	}
	if _, notes, err := titration.Split(0, 100*one, 8.3); err != nil || len(notes) != 0 {
		t.Errorf("no colour at pH 8.3: %v %v", notes, err)
	}
}

// TestSplitOnModelWater: where carbonate and bicarbonate share a water the rows
// come within 5 % of the total of what the model says at its pH.
func TestSplitOnModelWater(t *testing.T) {
	b := newBench(t, 250, 10.0, 25, 100, 0.1)
	p := 0.1 * b.to(8.3) / 100
	total := b.w.Alkalinity
	parts, _, err := titration.Split(p, total, 10.0)
	if err != nil {
		t.Fatal(err)
	}
	s, err := b.k.Solve(b.w)
	if err != nil {
		t.Fatal(err)
	}
	sp := s.Species()
	carbonate := 2 * (sp.CO3 + sp.CaCO3)
	if parts.Hydroxide != 0 || math.Abs(parts.Carbonate-carbonate) > 0.05*total {
		t.Errorf("split %+v of %g, model's carbonate %g", parts, total, carbonate)
	}
}
