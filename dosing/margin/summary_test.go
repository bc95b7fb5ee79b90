package margin

import (
	"math"
	"math/rand/v2"
	"slices"
	"testing"

	"gonum.org/v1/gonum/stat"
)

// TestPercentiles: the same as gonum's on the sorted values, with ties, in order
// and against it, with infinities, short and long.
func TestPercentiles(t *testing.T) {
	r := rand.New(rand.NewPCG(1, 2))
	for n := 1; n < 400; n++ {
		v := make([]float64, n)
		for i := range v {
			switch n % 4 {
			case 0:
				v[i] = r.NormFloat64()
			case 1:
				v[i] = float64(r.IntN(5))
			case 2:
				v[i] = float64(i)
			default:
				if v[i] = -float64(i); r.IntN(10) == 0 {
					v[i] = math.Inf(1)
				}
			}
		}
		sorted := slices.Clone(v)
		slices.Sort(sorted)
		want := Range{stat.Quantile(lowTail, stat.Empirical, sorted, nil), stat.Quantile(highTail, stat.Empirical, sorted, nil)}
		if got := percentiles(v); got != want {
			t.Fatalf("of %d values: %+v, want %+v", n, got, want)
		}
	}
	if got := percentiles(nil); !math.IsNaN(got.Low) || !math.IsNaN(got.High) {
		t.Errorf("of none: %+v", got)
	}
}
