package carbonate

import (
	"math"
	"testing"
)

// The slow way must not inherit a spoiled ionic strength from the fast one that
// it is called to replace.
func TestBracketStartsAfresh(t *testing.T) {
	k, err := ConstantsAt(288.15)
	if err != nil {
		t.Fatal(err)
	}
	w := Water{Alkalinity: 1e-3}
	w.Totals[Carbon], w.Totals[Calcium] = 1.2e-3, 5e-4
	want, err := k.Solve(w)
	if err != nil {
		t.Fatal(err)
	}
	for _, ionic := range []float64{math.NaN(), -1, 1.9, 50} {
		var p point
		p.start(k, &w.Totals, 0)
		p.ionic = ionic
		if err := p.bracket(carbonGiven, 0, 2*w.Totals[Carbon]-w.Alkalinity); err != nil {
			t.Errorf("ionic strength %g left behind: %v", ionic, err)
		} else if pH := -math.Log10(p.h); !(math.Abs(pH-want.PH) < 1e-9) {
			t.Errorf("ionic strength %g left behind: pH %g, want %g", ionic, pH, want.PH)
		}
	}
}
