package mix

// The search for the best of several valleys. With the pH free, a saturation
// limit can be met by a water of low pH and much carbon or of high pH and
// little, and within one pH by much calcium or much carbonate, so a descent from
// one start may end in the wrong valley. The starts are the cheapest waters at a
// few pH of the range.
const (
	startSteps  = 6    // of a rough descent
	pairStarts  = 6    // pH values at which each pair of products is tried
	pairSteps   = 20   // of the descent from there
	forced      = 0.3  // units of dose
	bindsWithin = 1e-6 // of a scaled row
)

// minimum returns the place of least cost, or where the rows cannot all be met
// the place that misses them least; ok is false where no place could be
// evaluated at all. Hints are further starts.
func (p *program) minimum(hints ...vector) (best place, ok bool) {
	steps := descentSteps
	try := func(x vector) {
		var known *place
		if ok && best.missed <= met {
			known = &best
		}
		end, fine := p.descendFrom(x, steps, nil, known)
		if fine && (!ok || end.better(&best)) {
			best, ok = end, true
		}
	}
	for _, x := range hints {
		try(x)
	}
	if !ok || best.missed > met {
		try(p.little())
	}
	if ok && best.missed <= met && !p.onBend(&best) {
		// The rows that bend do not matter here, and without them there is but
		// one valley.
		return best, ok
	}
	if ok && best.missed > met {
		if _, possible := p.floor(); !possible {
			return best, ok
		}
	}
	if p.curved {
		for _, share := range [...]float64{0.02, 0.25, 0.5, 0.75, 0.98} {
			if from, fine := p.atPH(p.pHLow+share*(p.pHHigh-p.pHLow), p.little()); fine {
				try(from)
			}
		}
	}
	p.force(&best, ok, try)
	if !ok || best.missed > met {
		steps = pairSteps
		p.pairs(func(x vector) bool {
			try(x)
			return ok && best.missed <= met
		})
	}
	return best, ok
}

// floor is the least cost under the rows that hardly bend alone: no mix under all
// of them is cheaper. possible is false where even those cannot all be met. There
// being one valley to those rows, one descent decides.
func (p *program) floor() (cost float64, possible bool) {
	held := *p
	held.rows = make([]row, 0, len(p.rows))
	for _, r := range p.rows {
		if (r.kind == straight || r.kind == reserve) && r.give == 0 {
			held.rows = append(held.rows, r)
		}
	}
	end, ok := held.descend(p.little(), descentSteps)
	return end.cost, !ok || end.missed <= met
}

// onBend says whether a row that bends binds at a place.
func (p *program) onBend(at *place) bool {
	for i := range p.rows {
		r := &p.rows[i]
		if r.kind == straight || r.kind == reserve {
			continue
		}
		if r.give > 0 && r.miss(at.v[i]) > 0 {
			return true
		}
		if v := at.v[i]; v <= r.low+bindsWithin || v >= r.high-bindsWithin {
			return true
		}
	}
	return false
}

// force looks past the best place by taking each of its products away in turn,
// and by making the water take some of each product, and then letting go again.
func (p *program) force(best *place, ok bool, try func(vector)) {
	start := p.little()
	var around *slopes
	if ok {
		start = best.x
		if s := new(slopes); p.differentiate(&best.x, &best.v, s) {
			around = s
		}
	}
	for j := range p.n {
		if start[j] > p.low[j]+bindsWithin {
			held := *p
			held.high[j] = p.low[j]
			if end, fine := held.descendFrom(start, startSteps, around, nil); fine {
				try(end.x)
			}
		}
		amount := min(start[j]+forced, 0.5*(p.high[j]+start[j]))
		if amount <= start[j] || amount <= p.low[j] {
			continue
		}
		held := *p
		held.low[j] = amount
		if end, fine := held.descendFrom(start, startSteps, around, nil); fine {
			try(end.x)
		}
	}
}

// pairs starts from the waters that two products can make at each pH, until
// visit says that it is enough.
func (p *program) pairs(visit func(vector) bool) {
	for a := range p.n {
		for b := a; b < p.n; b++ {
			held := *p
			for j := range p.n {
				if j != a && j != b {
					held.high[j] = held.low[j]
				}
			}
			for i := range pairStarts {
				share := (float64(i) + 0.5) / pairStarts
				from, fine := held.atPH(p.pHLow+share*(p.pHHigh-p.pHLow), held.little())
				if fine && visit(from) {
					return
				}
			}
		}
	}
}

// better: met before missed, then cheaper.
func (a *place) better(b *place) bool {
	if a.missed <= met && b.missed <= met {
		return a.cost < b.cost
	}
	if a.missed <= met || b.missed <= met {
		return a.missed <= met
	}
	return a.missed < b.missed
}

// little is a start with a little of everything, so that no ratio is undefined.
func (p *program) little() vector {
	var x vector
	for j := range p.n {
		x[j] = min(max(0.01, p.low[j]), p.high[j])
	}
	return x
}

// atPH looks for the cheapest mix at one pH, roughly.
func (p *program) atPH(pH float64, x vector) (vector, bool) {
	if len(p.rows) == maxRows {
		return x, false
	}
	held := *p
	held.rows = append(p.rows[:len(p.rows):len(p.rows)], row{limit: -1, kind: reserve, pH: pH})
	end, ok := held.descend(x, startSteps)
	return end.x, ok
}
