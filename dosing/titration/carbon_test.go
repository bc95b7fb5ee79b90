package titration_test

import (
	"errors"
	"math"
	"testing"

	"beckline/carbonate"
	"beckline/dosing/titration"
)

// TestCarbonFromP: a water titrated in the model to pH 8.3 gives its carbon and
// its pH back, from clean bicarbonate-carbonate to hydroxide.
func TestCarbonFromP(t *testing.T) {
	for _, c := range []struct{ alkalinity, pH, celsius float64 }{
		{62, 9.95, 11.5}, {620, 11.5, 32}, {250, 10.6, 5}, {2000, 12.3, 25}, {80, 9.0, 20},
	} {
		b := newBench(t, c.alkalinity, c.pH, c.celsius, 1e6, 1) // so large a sample that nothing is diluted
		// The titre by the model at pH 8.3, in eq/L.
		low, high := 0.0, b.w.Alkalinity
		for range 60 {
			p := (low + high) / 2
			w := b.w
			w.Alkalinity -= p
			w.Totals[carbonate.Chloride] += p
			s, err := b.k.SolveByBracket(w)
			if err != nil {
				t.Fatal(err)
			}
			if s.PH > 8.3 {
				low = p
			} else {
				high = p
			}
		}
		want := b.w.Totals[carbonate.Carbon]
		w := b.w
		w.Totals[carbonate.Carbon] = 0
		got, err := titration.CarbonFromP(w, high, c.pH)
		if err != nil {
			t.Fatal(c, err)
		}
		if math.Abs(got.DIC/want-1) > 1e-9 || math.Abs(got.PH-c.pH) > 1e-8 || len(got.Notes) != 0 {
			t.Errorf("%+v: DIC %g, want %g, pH %g, notes %v", c, got.DIC, want, got.PH, got.Notes)
		}
	}
}

// TestCarbonFromPSteadier: at pH 11.5 an error of 0.1 pH moves the carbon from
// the pH by over 15 %; one of 1 % in P moves that from the titrations by under 8 %.
func TestCarbonFromPSteadier(t *testing.T) {
	b := newBench(t, 620, 11.5, 32, 100, 0.1)
	w := b.w
	base := w.Totals[carbonate.Carbon]
	other, _, err := b.k.FromPH(11.4, w, carbonate.IonicInput{})
	if err != nil {
		t.Fatal(err)
	}
	if d := math.Abs(other.Water.Totals[carbonate.Carbon]/base - 1); d < 0.15 {
		t.Errorf("carbon from pH moves by %.2g only", d)
	}
	p := 0.1 * b.to(8.3) / 100
	exact, err := titration.CarbonFromP(w, p, 0)
	if err != nil {
		t.Fatal(err)
	}
	off, err := titration.CarbonFromP(w, p*1.01, 0)
	if err != nil {
		t.Fatal(err)
	}
	if d := math.Abs(off.DIC/exact.DIC - 1); d > 0.08 || d == 0 {
		t.Errorf("carbon from P moves by %.2g", d)
	}
}

func TestCarbonFromPRefusals(t *testing.T) {
	b := newBench(t, 62, 9.95, 11.5, 100, 0.1)
	boron := b.w
	boron.Totals[carbonate.Boron] = 0.05
	warm := b.w
	warm.Kelvin = 340
	both := b.w
	both.Totals[carbonate.Chlorine], both.Totals[carbonate.Ammonia] = 1e-5, 1e-5
	brine := b.w
	brine.Background = 0.7
	for _, c := range []struct {
		name  string
		w     carbonate.Water
		p     float64
		field string
	}{
		{"no P", b.w, 0, "p-alkalinity"},
		{"P above the total", b.w, 2 * b.w.Alkalinity, "p-alkalinity"},
		{"borate alone is more", boron, 0.9 * b.w.Alkalinity, "p-alkalinity"},
		{"too warm", warm, 0.2e-3, "temperature"},
		{"chlorine with ammonia", both, 0.2e-3, "free-chlorine"},
		{"brine", brine, 0.2e-3, "ionic strength"},
	} {
		_, err := titration.CarbonFromP(c.w, c.p, 0)
		var e *titration.Error
		if !errors.As(err, &e) || e.Field != c.field || e.Accepted == "" {
			t.Errorf("%s: %v", c.name, err)
		}
	}
	p := 0.1 * b.to(8.3) / 100
	got, err := titration.CarbonFromP(b.w, p, 9.5)
	if err != nil || codes(got.Notes) != titration.CodePHDisagrees {
		t.Errorf("meter 0.45 low: %+v %v", got, err)
	}
}
