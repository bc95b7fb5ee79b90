package curve

import (
	"testing"

	"beckline/dosing"
)

// TestFreeSide: a note stands where the curve is not, and toward the middle.
func TestFreeSide(t *testing.T) {
	line := func(slope float64) *Series {
		s := &Series{X: Axis{Factor: 1}, Y: Axis{Factor: 1}}
		for x := 0.0; x <= 10; x++ {
			s.Points = append(s.Points, Point{X: x, Y: dosing.Some(slope * x)})
		}
		return s
	}
	for _, c := range []struct {
		slope, x     float64
		right, above bool
	}{{1, 2.5, true, false}, {1, 7.5, false, true}, {-1, 2.5, true, true}, {-1, 7.5, false, false}} {
		if right, above := freeSide(line(c.slope), c.x); right != c.right || above != c.above {
			t.Errorf("slope %g at %g: right %v, above %v", c.slope, c.x, right, above)
		}
	}
}
