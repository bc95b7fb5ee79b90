package carbonate_test

import (
	"math"
	"math/rand/v2"
	"testing"
)

// TestEncloses: the right pH is enclosed, one that is off by more than the
// width is not, and the offset says by how much.
func TestEncloses(t *testing.T) {
	r := rand.New(rand.NewPCG(7, 8))
	tried := 0
	for range 2000 {
		pH, kelvin, w, in := drawWater(r)
		k := constantsAt(t, kelvin-273.15)
		s, _, err := k.FromPH(pH, w, in)
		if err != nil {
			continue
		}
		tried++
		offset, ok := k.Encloses(pH, 1e-6, s.Water)
		if !ok || math.Abs(offset) > 1e-8 {
			t.Fatalf("pH %g: enclosed %v, offset %g: %+v", pH, ok, offset, s.Water)
		}
		if offset, ok = k.Encloses(pH+5e-7, 1e-6, s.Water); !ok || math.Abs(offset+5e-7) > 1e-8 {
			t.Fatalf("pH %g off by 5e-7: enclosed %v, offset %g", pH, ok, offset)
		}
		for _, off := range []float64{2e-6, -2e-6, 0.1} {
			if _, ok := k.Encloses(pH+off, 1e-6, s.Water); ok {
				t.Fatalf("pH %g is said to enclose %g", pH+off, pH)
			}
		}
	}
	if tried < 1000 {
		t.Errorf("only %d waters", tried)
	}
}
