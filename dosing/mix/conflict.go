package mix

import (
	"cmp"
	"math"
	"slices"

	"beckline/dosing"
)

// conflict finds why there is no mix. Each bound in turn is let go at a price
// while the others hold; where that leaves a mix, how far the bound gave way is
// the least move that would do. If a mix within all limits turns up after all, it
// is returned instead.
func (s *solver) conflict() (*Infeasible, *place) {
	e := &Infeasible{Task: *s.t}
	for _, b := range s.bounds() {
		r, found := s.relax(b)
		if found != nil {
			return nil, found
		}
		if r != nil {
			e.Alone = append(e.Alone, *r)
		}
	}
	slices.SortStableFunc(e.Alone, func(x, y Relaxation) int {
		return cmp.Compare(math.Abs(x.By()/s.stepOf(x.Bound)), math.Abs(y.By()/s.stepOf(y.Bound)))
	})
	if len(e.Alone) == 0 {
		e.Together = s.together()
	}
	return e, nil
}

// bounds lists every bound that a person could move.
func (s *solver) bounds() []Bound {
	var out []Bound
	for i := range s.t.Limits {
		l := &s.t.Limits[i]
		if l.Low.Given {
			out = append(out, Bound{Quantity: l.Quantity, Side: Low, Value: l.Low.Value})
		}
		if l.High.Given {
			out = append(out, Bound{Quantity: l.Quantity, Side: High, Value: l.High.Value})
		}
	}
	for j := range s.reach {
		if s.reach[j].mostFrom != FromHardStop {
			out = append(out, s.boundOf(j, High))
		}
		if s.reach[j].least > 0 {
			out = append(out, s.boundOf(j, Low))
		}
	}
	return out
}

// relax finds the least move of one bound that leaves a mix; nil for none.
func (s *solver) relax(b Bound) (*Relaxation, *place) {
	p, least := s.moved(b, nil)
	if b.Source != FromLimit {
		return s.relaxDose(p, &least, b)
	}
	// Without the bound, is there a mix at all?
	free, ok := p.leastCost(&least, 0)
	if !ok {
		return nil, nil
	}
	needed, ok := s.reading(&free, b.Quantity)
	if !ok {
		return nil, nil
	}
	// Then as near to the bound as can be. What the row measures of a pH or a ratio
	// is not proportional to the figure itself, so there the nearest row need not be
	// the nearest figure: the bound is moved by halves until both agree.
	at, aim, refused := free, b.Value, b.Value
	for range halvings {
		give := s.giving(b, aim)
		end, ok := give.leastCost(&least, 0, at.x)
		if !ok {
			break
		}
		if v, ok := s.reading(&end, b.Quantity); ok && nearer(v, needed, b) {
			needed, at = v, end
		}
		if nearer(aim, needed, b) {
			refused = aim // and no mix there
		}
		if (b.Quantity != PH && b.Quantity != ChlorideSulfate) || math.Abs(needed-refused) <= enough*math.Abs(needed-b.Value) {
			break
		}
		aim = 0.5 * (refused + needed)
	}
	r := Relaxation{b, needed}
	if outward := math.Copysign(1, s.stepOf(b)) * r.By(); outward > closure*s.unitOf(&Limit{Quantity: b.Quantity, Low: dosing.Some(b.Value)}) {
		return &r, nil
	}
	// It gave way by nothing: a mix within all limits.
	if full, ok := s.p.place(at.x); ok && full.missed <= met && s.p.floors(&s.least, &full) < 0 {
		return nil, &full
	}
	return nil, nil
}

// How closely a relaxation is found: to a thousandth of itself.
const (
	halvings = 14
	enough   = 1e-3
)

// nearer says whether v is nearer to the bound than what was needed so far.
func nearer(v, needed float64, b Bound) bool {
	if b.Side == Low {
		return v > needed
	}
	return v < needed
}

// giving is the program in which one end of a limit, put at a value, gives way at
// a price and nothing else costs anything.
func (s *solver) giving(b Bound, aim float64) *program {
	limits, ceiling, _ := s.movedBounds(b, nil)
	limits = slices.DeleteFunc(limits, func(l Limit) bool { return !l.Low.Given && !l.High.Given })
	alone := Limit{Quantity: b.Quantity}
	if b.Side == Low {
		alone.Low = dosing.Some(aim)
	} else {
		alone.High = dosing.Some(aim)
	}
	limits = append(limits, alone)
	p := s.set.build(limits, ceiling)
	for i := range p.rows {
		if p.rows[i].limit == len(limits)-1 {
			p.rows[i].give = 1
		}
	}
	for j := range p.n {
		p.cost[j] = thrift
	}
	return p
}

// relaxDose finds how far a bound of a dose has to move. p has it dropped.
func (s *solver) relaxDose(p *program, least *vector, b Bound) (*Relaxation, *place) {
	j := b.Candidate
	for i := range p.n {
		p.cost[i] = thrift
	}
	p.cost[j] = 1
	if b.Side == Low {
		// As much of it as may be below its least dose.
		p.cost[j] = -1
		p.high[j] = min(p.high[j], s.least[j])
	}
	at, ok := p.leastCost(least, 0)
	if !ok {
		return nil, nil
	}
	needed := at.x[j] * s.p.unit[j] * s.reach[j].perMol
	if math.Abs(needed-b.Value) > closure*b.Value && (needed < b.Value) == (b.Side == Low) {
		return &Relaxation{b, needed}, nil
	}
	if full, ok := s.p.place(at.x); ok && full.missed <= met && s.p.floors(&s.least, &full) < 0 {
		return nil, &full
	}
	return nil, nil
}

// together lets every limit give way at once, each at a price of one for its own
// step, and lists those that had to.
func (s *solver) together() []Relaxation {
	p := s.set.build(s.t.Limits, s.ceiling)
	for i := range p.rows {
		p.rows[i].give = 1
	}
	for j := range p.n {
		p.cost[j] = thrift
	}
	at, ok := p.leastCost(&s.least, 0)
	if !ok {
		return nil
	}
	var out []Relaxation
	for i := range s.t.Limits {
		l := &s.t.Limits[i]
		v, ok := s.reading(&at, l.Quantity)
		if !ok || l.miss(v) <= closure*s.unitOf(l) {
			continue
		}
		b := Bound{Quantity: l.Quantity, Side: High, Value: l.High.Value}
		if l.Low.Given && v < l.Low.Value {
			b.Side, b.Value = Low, l.Low.Value
		}
		out = append(out, Relaxation{b, v})
	}
	return out
}

// reading is a quantity of the water at a place.
func (s *solver) reading(at *place, q Quantity) (float64, bool) {
	w := s.p.at(&at.x)
	state, err := s.set.k.Solve(w)
	if err != nil {
		return 0, false
	}
	return quantityOf(&state, q, s.set.titrated)
}
