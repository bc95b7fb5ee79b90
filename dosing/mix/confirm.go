package mix

import (
	"math"

	"beckline/carbonate"
	"beckline/dosing"
)

// closure is how far a confirmed figure may be outside its limit: pH, index and
// ratio as they are, amounts relative to the water's own scale.
const closure = 1e-6

// confirm doses the mix into the base, solves the finished water afresh, and
// holds its figures to the limits. A mix that does not close is not given.
func (s *solver) confirm(x vector, m *Mix) *dosing.Problem {
	c := s.t.Base
	c.Additions = append(c.Additions[:len(c.Additions):len(c.Additions)], make([]dosing.Addition, 0, len(s.t.Candidates))...)
	for j := range s.t.Candidates {
		amount := x[j] * s.p.unit[j]
		if !(amount > 0) {
			continue
		}
		cand := &s.t.Candidates[j]
		c.Additions = append(c.Additions, dosing.Addition{Product: cand.Product, Dose: dosing.Some(amount), Feed: cand.Feed})
		mass := amount * s.reach[j].perMol
		d := Dose{Candidate: j, Amount: amount, ProductMass: mass, CostM3: mass * cand.Price}
		m.Doses = append(m.Doses, d)
		m.CostM3 += d.CostM3
	}
	r, err := dosing.Solve(c)
	if err != nil {
		return problem(err)
	}
	m.Result = r
	f := &r.Finished().Figures
	for i := range s.t.Limits {
		l := &s.t.Limits[i]
		v, ok := l.Quantity.figure(f)
		if miss := l.miss(v); !ok || miss > closure*s.unitOf(l) {
			return &dosing.Problem{Kind: dosing.Failed, Code: "checks_disagree", Field: l.Quantity.Field(), Value: dosing.Some(v)}
		}
	}
	m.Binding = s.binding(&x, f)
	return nil
}

// figure reads a quantity off a water's figures.
func (q Quantity) figure(f *dosing.Figures) (v float64, ok bool) {
	o := dosing.None
	switch q {
	case PH:
		o = dosing.Some(f.PH)
	case Alkalinity:
		o = dosing.Some(f.Alkalinity)
	case SaturationIndex:
		o = f.SaturationIndex
		if !o.Given && f.Calcium.Given {
			o = dosing.Some(math.Inf(-1)) // no calcium or no carbonate at all
		}
	case CCPP:
		o = f.CCPP
	case Sodium:
		o = f.Sodium
	case Calcium:
		o = f.Calcium
	case ChlorideSulfate:
		o = f.ChlorideSulfate
		if !o.Given && f.Sulfate.Given {
			o = dosing.Some(math.Inf(1)) // no sulfate at all
			if f.Chloride.Value == 0 {
				o = dosing.Some(0)
			}
		}
	case Magnesium:
		o = f.Magnesium
	case Chloride:
		o = f.Chloride
	case Sulfate:
		o = f.Sulfate
	case DIC:
		o = dosing.Some(f.DIC)
	}
	return o.Value, o.Given
}

// miss is by how much a figure is outside a limit.
func (l *Limit) miss(v float64) float64 {
	return max(l.Low.Or(math.Inf(-1))-v, v-l.High.Or(math.Inf(1)), 0)
}

// unitOf is what counts as 1 of a limit's quantity in a comparison.
func (s *solver) unitOf(l *Limit) float64 {
	switch l.Quantity {
	case PH, SaturationIndex:
		return 1
	case ChlorideSulfate:
		return 1 + math.Abs(l.Low.Or(l.High.Value))
	}
	return s.set.size
}

// keepsAll says whether a water is within every limit.
func (s *solver) keepsAll(f *dosing.Figures) bool {
	for i := range s.t.Limits {
		l := &s.t.Limits[i]
		if v, ok := l.Quantity.figure(f); !ok || l.miss(v) > closure*s.unitOf(l) {
			return false
		}
	}
	return true
}

// bindingWithin is how near its bound a figure sits to count as on it.
const bindingWithin = 1e-5

// binding lists the bounds that a water sits on: the limits in the order of the
// task, then the doses' own. x is nil for the water as it stands.
func (s *solver) binding(x *vector, f *dosing.Figures) []Bound {
	var out []Bound
	for i := range s.t.Limits {
		l := &s.t.Limits[i]
		v, _ := l.Quantity.figure(f)
		near := bindingWithin * s.unitOf(l)
		if l.Low.Given && math.Abs(v-l.Low.Value) <= near {
			out = append(out, Bound{Quantity: l.Quantity, Side: Low, Value: l.Low.Value})
		}
		if l.High.Given && math.Abs(v-l.High.Value) <= near {
			out = append(out, Bound{Quantity: l.Quantity, Side: High, Value: l.High.Value})
		}
	}
	if x == nil {
		return out
	}
	for j := range s.reach {
		r, amount := &s.reach[j], x[j]*s.p.unit[j]
		if amount > 0 && amount >= r.most*(1-bindingWithin) {
			out = append(out, s.boundOf(j, High))
		}
		if amount > 0 && r.least > 0 && amount <= r.least*(1+bindingWithin) {
			out = append(out, s.boundOf(j, Low))
		}
	}
	return out
}

// boundOf is a bound of candidate j's dose.
func (s *solver) boundOf(j int, side Side) Bound {
	r := &s.reach[j]
	if side == Low {
		return Bound{Candidate: j, Source: r.leastFrom, Side: Low, Value: r.least * r.perMol}
	}
	return Bound{Candidate: j, Source: r.mostFrom, Side: High, Value: r.most * r.perMol}
}

// typical is a step of the quantity that a person would try.
func (q Quantity) typical() float64 {
	switch q {
	case PH, SaturationIndex:
		return 0.1
	case ChlorideSulfate:
		return 0.05
	case Alkalinity:
		return 2e-3 / carbonate.MolarMassCaCO3
	case CCPP:
		return 1e-3 / carbonate.MolarMassCaCO3
	}
	c, _ := q.component()
	return 1e-3 / c.MolarMass()
}
