package mix

import (
	"cmp"
	"slices"

	"beckline/dosing"
)

// explain finds what each bound costs: the mix is sought again with the bound
// dropped, and with the bound moved a step.
func (s *solver) explain(a *Answer, best *place) *dosing.Problem {
	for _, b := range a.Best.Binding {
		if b.Source == FromHardStop {
			continue // no one may move it
		}
		c := LimitCost{Bound: b, Step: s.stepOf(b)}
		p, least := s.moved(b, nil)
		if free, ok := p.leastCost(&least, 0, best.x); ok {
			var m Mix
			if problem := s.confirmUnder(b, nil, free.x, &m); problem != nil {
				return problem
			}
			c.Without, c.SavingM3 = &m, saving(a.Best.CostM3, m.CostM3)
		}
		to := b.Value + c.Step
		p, least = s.moved(b, &to)
		if free, ok := p.leastCost(&least, 0, best.x); ok {
			c.StepSavingM3 = saving(best.cost*s.p.money, free.cost*s.p.money)
		}
		a.Costs = append(a.Costs, c)
	}
	slices.SortStableFunc(a.Costs, func(x, y LimitCost) int { return cmp.Compare(y.SavingM3, x.SavingM3) })
	return nil
}

// saving is what is saved, without the rounding of two costs that are the same.
func saving(before, after float64) float64 {
	if d := before - after; d > 1e-7*before {
		return d
	}
	return 0
}

// stepOf is the practical step of a bound, outward.
func (s *solver) stepOf(b Bound) float64 {
	step := b.Quantity.typical()
	if b.Source != FromLimit {
		step = 0.1 * b.Value
	}
	if b.Side == Low {
		return -step
	}
	return step
}

// moved is the program with one bound moved, or dropped where to is nil.
func (s *solver) moved(b Bound, to *float64) (*program, vector) {
	limits, ceiling, least := s.movedBounds(b, to)
	p := s.set.build(limits, ceiling)
	return p, least
}

func (s *solver) movedBounds(b Bound, to *float64) (limits []Limit, ceiling []float64, least vector) {
	limits, ceiling, least = slices.Clone(s.t.Limits), slices.Clone(s.ceiling), s.least
	if b.Source != FromLimit {
		j := b.Candidate
		switch {
		case b.Side == Low && to == nil:
			least[j] = 0
		case b.Side == Low:
			least[j] = *to / s.reach[j].perMol / s.p.unit[j]
		case to == nil:
			ceiling[j] = s.set.hardStops[j]
		default:
			ceiling[j] = min(*to/s.reach[j].perMol, s.set.hardStops[j])
		}
		return limits, ceiling, least
	}
	end := dosing.None
	if to != nil {
		end = dosing.Some(*to)
	}
	for i := range limits {
		if limits[i].Quantity != b.Quantity {
			continue
		}
		if b.Side == Low {
			limits[i].Low = end
		} else {
			limits[i].High = end
		}
	}
	return limits, ceiling, least
}

// confirmUnder confirms a mix under the limits with one bound moved or dropped.
func (s *solver) confirmUnder(b Bound, to *float64, x vector, m *Mix) *dosing.Problem {
	t, w := *s.t, *s
	t.Limits, _, _ = s.movedBounds(b, to)
	t.Candidates = slices.Clone(t.Candidates)
	w.t = &t
	if b.Source == FromPump {
		t.Candidates[b.Candidate].Feed.PumpCapacity = dosing.None // more than this pump can feed
	}
	return w.confirm(x, m)
}

// nextBest looks for other mixes: the cheapest without each of the products of
// those found so far, until there are enough of different products, cheapest
// first.
func (s *solver) nextBest(best *place) []place {
	type node struct {
		off uint
		at  place
	}
	var found []place
	tried := map[uint]bool{0: true}
	queue := []node{{0, *best}}
	seen := map[uint]bool{used(best): true}
	for len(queue) > 0 && len(found) < s.t.Alternatives {
		from := queue[0]
		queue = queue[1:]
		set := used(&from.at)
		if !seen[set] {
			seen[set] = true
			found = append(found, from.at)
		}
		for j := range s.p.n {
			off := from.off | 1<<j
			if set&(1<<j) == 0 || tried[off] {
				continue
			}
			tried[off] = true
			if at, ok := s.p.leastCost(&s.least, off); ok {
				queue = append(queue, node{off, at})
			}
		}
		// What is left out only makes it dearer, so the cheapest in the queue is next.
		slices.SortStableFunc(queue, func(x, y node) int { return cmp.Compare(x.at.cost, y.at.cost) })
	}
	return found
}

// used is the set of products of a mix.
func used(at *place) uint {
	set := uint(0)
	for j, x := range at.x {
		if x > 0 {
			set |= 1 << j
		}
	}
	return set
}
