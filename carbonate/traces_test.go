package carbonate_test

import (
	"math"
	"testing"

	"beckline/carbonate"
)

// A trace of a component, down to the smallest float, is as good as none: it
// must not turn a slope into a division by nothing. 1e-300 can be typed.
func TestTracesAreAsNothing(t *testing.T) {
	k := constantsAt(t, 0)
	var plain carbonate.Water
	plain.Alkalinity = 2e-3 / carbonate.MolarMassCaCO3
	plain.Totals[carbonate.Carbon] = 1e-3
	plain.Totals[carbonate.Calcium] = 2e-5
	want, err := k.Solve(plain)
	if err != nil {
		t.Fatal(err)
	}
	wantCCPP, err := want.CCPP()
	if err != nil {
		t.Fatal(err)
	}
	for c := carbonate.Component(0); c < carbonate.Components; c++ {
		if c == carbonate.Carbon || c == carbonate.Calcium {
			continue
		}
		for _, trace := range []float64{1e-290, 1e-300, 1e-304, 1e-308, 1e-310, 5e-324} {
			w := plain
			w.Totals[c] = trace
			s, err := k.Solve(w)
			if err != nil {
				t.Fatalf("%s %g: %v", c.Name(), trace, err)
			}
			ccpp, err := s.CCPP()
			if err != nil {
				t.Fatalf("%s %g: CCPP: %v", c.Name(), trace, err)
			}
			buffer := s.BufferIntensity()
			if !(math.Abs(s.PH-want.PH) < 1e-11) || !(math.Abs(ccpp-wantCCPP) < 1e-14) ||
				!(math.Abs(buffer-want.BufferIntensity()) < 1e-12*want.BufferIntensity()) {
				t.Errorf("%s %g: pH %g, CCPP %g, buffer %g; without it %g, %g, %g", c.Name(), trace,
					s.PH, ccpp, buffer, want.PH, wantCCPP, want.BufferIntensity())
			}
			dose, _, err := k.DoseToPH(s.Water, caustic, 9)
			if err != nil || !(dose > 0) {
				t.Errorf("%s %g: dose %g, %v", c.Name(), trace, dose, err)
			}
		}
	}
	// Traces of what the index is made of: no index of infinity, no failure.
	for _, c := range []carbonate.Component{carbonate.Carbon, carbonate.Calcium} {
		for _, trace := range []float64{1e-290, 1e-304, 1e-310, 5e-324} {
			w := plain
			w.Totals[c] = trace
			w.Alkalinity = 1e-6
			s, err := k.Solve(w)
			if err != nil {
				t.Fatalf("%s %g: %v", c.Name(), trace, err)
			}
			if b := s.BufferIntensity(); !(b > 0) || math.IsInf(b, 0) {
				t.Errorf("%s %g: buffer %g", c.Name(), trace, b)
			}
			if x, err := s.CCPP(); err != nil || math.IsNaN(x) {
				t.Errorf("%s %g: CCPP %g, %v", c.Name(), trace, x, err)
			}
		}
	}
}
