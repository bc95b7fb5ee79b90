package mix

import "math"

// leastCost finds the cheapest mix where some products are fed either not at all
// or at no less than least (units of dose; 0 for any). It solves with those
// floors left out, and where a dose comes out between nothing and its floor, both
// ways from there: without the product, and with at least its floor. off leaves
// products out from the start. ok is false where no such mix meets all rows; then
// the place that misses them least is returned.
func (p *program) leastCost(least *vector, off uint, hints ...vector) (best place, ok bool) {
	w := *p
	for j := range w.n {
		if off&(1<<j) != 0 {
			w.high[j] = w.low[j]
		}
	}
	best = place{cost: math.Inf(1), missed: math.Inf(1)}
	w.branch(least, &best, hints)
	return best, best.missed <= met
}

func (p *program) branch(least *vector, best *place, hints []vector) {
	if best.missed <= met {
		if cost, possible := p.floor(); !possible || cost >= best.cost-1e-12 {
			return
		}
	}
	found, ok := p.minimum(hints...)
	if !ok {
		return
	}
	if found.missed > met {
		if best.missed > met && p.floors(least, &found) < 0 && found.missed < best.missed {
			*best = found
		}
		return
	}
	if best.missed <= met && found.cost >= best.cost-1e-12 {
		return // leaving the floors out only makes it cheaper: no better mix this way
	}
	j := p.floors(least, &found)
	if j < 0 {
		*best = p.tidy(found)
		return
	}
	start := []vector{found.x}
	with, without := *p, *p
	without.high[j] = p.low[j]
	with.low[j] = least[j]
	// The likelier way first, since it cuts the other short.
	if found.x[j] < 0.5*least[j] {
		without.branch(least, best, start)
		with.branch(least, best, start)
	} else {
		with.branch(least, best, start)
		without.branch(least, best, start)
	}
}

// floors returns the product whose dose lies between nothing and its floor, -1
// for none.
func (p *program) floors(least *vector, at *place) int {
	for j := range p.n {
		if x := at.x[j]; x > 0 && x < least[j]*(1-1e-9) && p.high[j] > 0 {
			return j
		}
	}
	return -1
}

// tidy takes away doses too small to mean anything.
func (p *program) tidy(at place) place {
	held, dust := *p, false
	for j := range p.n {
		if x := at.x[j]; x > 0 && x < tiny && p.low[j] == 0 {
			held.high[j], dust = 0, true
		}
	}
	if !dust {
		return at
	}
	clean, ok := held.descend(at.x, descentSteps)
	if ok && clean.missed <= met && clean.cost <= at.cost+tiny {
		return clean
	}
	return at
}

// tiny is a dose in the program's units that a plant could not tell from none.
const tiny = 1e-6
