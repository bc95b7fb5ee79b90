package margin

import "math"

// Bounds beyond which first order is not good enough.
const (
	widePH = 0.0999 // pH half-width, 0.1 with room for rounding
	// mostBend is how unevenly the ends of a range may stand about the answer, as
	// a part of its half-width: a tenth of a margin is not seen.
	mostBend   = 0.1
	noticeable = 0.01 // share of the variance below which a reading does not matter
	noWidth    = 1e-9 // of the dose: rounding
)

// reason is why draws should be used, NoReason where first order will do. bend
// is the sum of slope^2 x curvature of each dose, pHBend the bend of the pH.
func (m *model) reason(e *Estimate, bend doses, pHBend float64, limit bool) Reason {
	if limit {
		return NearLimit
	}
	skewed := false
	for n := range m.feeds {
		f, dose := e.feed(n), m.feeds[n].dose
		width := f.DoseDeviation * sigmas
		if width <= noWidth*dose {
			continue
		}
		for i, s := range f.DoseShares {
			if v := &m.varied[i]; v.kind == ofPH && v.half >= widePH && s.Fraction > noticeable {
				return PHTolerance
			}
		}
		if width > 0.999*dose {
			return NearLimit
		}
		skewed = skewed || math.Abs(bend[n]) > mostBend*width*width*width
	}
	switch {
	case m.lowBuffer || pHBend > mostBend:
		return LowBuffer
	case skewed:
		return Skewed
	}
	return NoReason
}
