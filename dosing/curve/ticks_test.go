package curve

import (
	"math"
	"strconv"
	"testing"
)

// TestPlainTicks: 5 to 10 round numbers inside the ends, all labels as they read.
func TestPlainTicks(t *testing.T) {
	for _, c := range []struct{ low, high float64 }{{0, 25}, {14.3, 17.5}, {-0.9, 0.6}, {6.2, 10}, {0, 1e-5}, {-3, 4e4}, {99.99, 100.01}, {0, 10}, {0, 9.99}} {
		ticks := plainTicks{}.Ticks(c.low, c.high)
		if len(ticks) < 5 || len(ticks) > 11 {
			t.Errorf("%+v: %d ticks", c, len(ticks))
		}
		for _, tick := range ticks {
			v, err := strconv.ParseFloat(tick.Label, 64)
			if err != nil || math.Abs(v-tick.Value) > 1e-9*(c.high-c.low) || tick.Label == "-0" {
				t.Errorf("%+v: %q at %g", c, tick.Label, tick.Value)
			}
			if tick.Value < c.low-1e-9 || tick.Value > c.high+1e-9*(c.high-c.low) {
				t.Errorf("%+v: %g", c, tick.Value)
			}
		}
	}
	if got := (plainTicks{}).Ticks(3, 3); got != nil {
		t.Error(got)
	}
}
