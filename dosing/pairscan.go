package dosing

import "math"

// The certain way to a pair, for where Newton leaves the model or settles below
// zero although there is an answer (an index or CCPP bends too much from far
// away): along the doses of one product the other is solved for one target, and
// the miss of the other target is watched for a change of sign.
const (
	scanLeast    = 1e-6 // of the greatest dose
	scanADecade  = 8
	scanHalvings = 60
)

// scan finds a start near a pair of doses that meets both targets; false where
// no change of sign is seen. Both products are tried as the one that is solved.
func (w *pairWork) scan() (d [2]float64, ok bool) {
	// The target that is cheap to solve for goes inside.
	inside := 0
	for n, t := range w.targets {
		if t.Kind == TargetPH || t.Kind == TargetAlkalinity {
			inside = n
			break
		}
	}
	for _, outer := range []int{0, 1} {
		if d, ok := w.along(outer, inside); ok {
			return d, true
		}
	}
	return d, false
}

// pairPoint is a dose of the outer product, the other's dose for the inside
// target, and the miss of the outside target there.
type pairPoint struct {
	outer, other, miss float64
	ok                 bool
}

// along walks up the doses of one product, none first.
func (w *pairWork) along(outer, inside int) (d [2]float64, ok bool) {
	most := GreatestDose(w.r.c.Additions[w.at[outer]].Product)
	last := w.point(outer, inside, 0)
	for i := 0; ; i++ {
		dose := most * scanLeast * math.Pow(10, float64(i)/scanADecade)
		if dose > most*(1+1e-12) {
			return d, false
		}
		now := w.point(outer, inside, dose)
		lo, hi := last, now
		// Where the other product gives out between two doses, the crossing may lie
		// before that edge: go up to it.
		if lo.ok != hi.ok {
			lo, hi = w.edge(outer, inside, lo, hi)
		}
		if lo.ok && hi.ok && lo.miss*hi.miss <= 0 {
			for range scanHalvings {
				mid := w.point(outer, inside, 0.5*(lo.outer+hi.outer))
				if !mid.ok {
					break
				}
				if lo.miss*mid.miss <= 0 {
					hi = mid
				} else {
					lo = mid
				}
			}
			d[outer], d[1-outer] = hi.outer, hi.other
			return d, true
		}
		last = now
	}
}

// edge narrows an interval of which one end has no answer to the part that has.
func (w *pairWork) edge(outer, inside int, a, b pairPoint) (pairPoint, pairPoint) {
	good, bad := a, b
	if b.ok {
		good, bad = b, a
	}
	end := good
	for range scanHalvings {
		mid := w.point(outer, inside, 0.5*(end.outer+bad.outer))
		if mid.ok {
			end = mid
		} else {
			bad = mid
		}
	}
	if good.outer <= end.outer {
		return good, end
	}
	return end, good
}

// point solves the other product for the inside target behind a dose of the
// outer one.
func (w *pairWork) point(outer, inside int, dose float64) pairPoint {
	r := w.r
	solved, second := r.solved, r.second
	defer func() { r.solved, r.second = solved, second }()
	r.doses[w.at[outer]] = dose
	r.solved, r.second = w.at[1-outer], -1
	p := pairPoint{outer: dose}
	s, problem := r.search(r.c.Additions[r.solved].Product)
	if problem != nil {
		return p
	}
	s.target = w.targets[inside]
	other, ok := s.exact()
	if !ok {
		return p
	}
	s.target = w.targets[1-inside]
	v, ok := s.at(other)
	return pairPoint{outer: dose, other: other, miss: v - s.target.Value, ok: ok && !math.IsNaN(v)}
}

// exact is find for a water that may be near its target already: a dose as
// small as it takes, none where the target is met to the last digits. Where the
// direct way applies, its no is taken: a scan asks often.
func (s *search) exact() (dose float64, ok bool) {
	now, ok := s.figure(&s.base)
	if !ok {
		return 0, false
	}
	if math.Abs(now-s.target.Value) <= 1e-13 {
		return 0, true
	}
	if dose, ok := s.direct(); ok {
		return dose, true
	}
	if s.after == nil && (s.target.Kind == TargetPH || s.target.Kind == TargetAlkalinity && !s.known.organics) {
		return 0, false
	}
	dose, problem := s.explore(now)
	return dose, problem == nil
}
