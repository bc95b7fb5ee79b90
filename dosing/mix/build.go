package mix

import (
	"math"

	"beckline/carbonate"
	"beckline/dosing"
)

const (
	searchLowPH, searchHighPH = 5.0, 10.5 // where searches start from, where no limit bounds the pH
	leastScale                = 2e-4      // mol/L, the scale of a water with next to nothing in it
)

// setting is what a program is built from, apart from its limits.
type setting struct {
	k         *carbonate.Constants
	base      carbonate.Water
	size      float64 // see scale
	titrated  bool    // alkalinity means the titrated one
	products  []dosing.Product
	perMol    []float64 // money per mol of each
	hardStops []float64 // mol/L of each
}

// build writes the mathematics of a mix under limits, with a ceiling, mol/L, for
// each product.
func (s *setting) build(limits []Limit, ceiling []float64) *program {
	p := &program{k: s.k, base: s.base, size: s.size, n: len(s.products), pHLow: searchLowPH, pHHigh: searchHighPH}
	products := s.products
	for j := range products {
		c := &products[j].Chemical
		weight := max(math.Abs(c.Equivalents), c.Adds[carbonate.Carbon], c.Adds[carbonate.Calcium], 1)
		p.unit[j] = p.size / weight
		r := carbonate.Reagent{Adds: c.Adds, Equivalents: c.Equivalents * p.unit[j]}
		for i := range r.Adds {
			r.Adds[i] *= p.unit[j]
		}
		p.reagents[j] = r
		p.high[j] = ceiling[j] / p.unit[j]
	}
	for i := range limits {
		p.limit(i, &limits[i], s.titrated)
	}
	p.price(s.perMol)
	return p
}

// scale is the natural size of the water's changes, mol/L.
func scale(w *carbonate.Water, limits []Limit) float64 {
	size := max(math.Abs(w.Alkalinity), w.Totals[carbonate.Carbon], leastScale)
	for i := range limits {
		if l := &limits[i]; l.Quantity == Alkalinity {
			size = max(size, l.Low.Or(0), l.High.Or(0))
		}
	}
	return size
}

// limit adds the rows of one limit.
func (p *program) limit(index int, l *Limit, organics bool) {
	low, high := l.Low.Or(math.Inf(-1)), l.High.Or(math.Inf(1))
	r := row{limit: index, low: low / p.size, high: high / p.size}
	switch l.Quantity {
	case PH:
		p.limitPH(r, l)
		return
	case Alkalinity:
		if organics {
			r.kind, p.curved = titratable, true
			break
		}
		r.fixed = p.base.Alkalinity / p.size
		for j := range p.n {
			r.coef[j] = p.reagents[j].Equivalents / p.size
		}
	case SaturationIndex:
		r.kind, p.curved = saturation, true
		r.scale = rootSaturation(l.Low.Or(l.High.Value))
		r.low, r.high = math.Inf(-1), math.Inf(1)
		if l.Low.Given {
			r.low = rootSaturation(l.Low.Value) / r.scale
		}
		if l.High.Given {
			r.high = rootSaturation(l.High.Value) / r.scale
		}
	case CCPP:
		r.kind, p.curved = potential, true
	case ChlorideSulfate:
		p.limitRatio(r, l)
		return
	default:
		c, _ := l.Quantity.component()
		r.fixed = p.base.Totals[c] / p.size
		for j := range p.n {
			r.coef[j] = p.reagents[j].Adds[c] / p.size
		}
	}
	p.rows = append(p.rows, r)
}

// limitPH turns each end of a pH range into a reserve of alkalinity at that pH.
func (p *program) limitPH(r row, l *Limit) {
	r.kind = reserve
	if l.Low.Given && l.High.Given && l.Low.Value == l.High.Value {
		r.pH, r.low, r.high = l.Low.Value, 0, 0
		p.rows = append(p.rows, r)
	} else {
		if l.Low.Given {
			r.pH, r.low, r.high = l.Low.Value, 0, math.Inf(1)
			p.rows = append(p.rows, r)
		}
		if l.High.Given {
			r.pH, r.low, r.high = l.High.Value, math.Inf(-1), 0
			p.rows = append(p.rows, r)
		}
	}
	low, high := l.Low.Or(p.pHLow), l.High.Or(p.pHHigh)
	if !l.Low.Given {
		low = min(low, high-1)
	}
	if !l.High.Given {
		high = max(high, low+1)
	}
	p.pHLow, p.pHHigh = low, high
}

// limitRatio multiplies the ratio of chloride to sulfate by mass out:
// Cl - ratio SO4 on either side of 0, in moles of chloride.
func (p *program) limitRatio(r row, l *Limit) {
	perSulfate := carbonate.Sulfate.MolarMass() / carbonate.Chloride.MolarMass()
	add := func(ratio, low, high float64) {
		r.low, r.high = low, high
		r.fixed = (p.base.Totals[carbonate.Chloride] - ratio*perSulfate*p.base.Totals[carbonate.Sulfate]) / p.size
		for j := range p.n {
			a := &p.reagents[j].Adds
			r.coef[j] = (a[carbonate.Chloride] - ratio*perSulfate*a[carbonate.Sulfate]) / p.size
		}
		p.rows = append(p.rows, r)
	}
	if l.Low.Given {
		add(l.Low.Value, 0, math.Inf(1))
	}
	if l.High.Given {
		add(l.High.Value, math.Inf(-1), 0)
	}
}

// price sets the costs, money per mol of each product, and their scale.
func (p *program) price(perMol []float64) {
	p.money = 0
	for j := range p.n {
		p.money = max(p.money, perMol[j]*p.unit[j])
	}
	if p.money == 0 {
		p.money = 1
	}
	for j := range p.n {
		// Of mixes that cost the same, the one with least in it.
		p.cost[j] = perMol[j]*p.unit[j]/p.money + thrift
	}
}

// thrift is the cost of a unit of dose as such: far below any price, it keeps a
// free product from being dosed for nothing.
const thrift = 1e-7
