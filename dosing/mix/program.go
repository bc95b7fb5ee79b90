package mix

import (
	"math"

	"beckline/carbonate"
)

// vector holds one number a product, in the program's units of dose.
type vector [maxProducts]float64

// program is the mix as mathematics: doses x in units of about the water's own
// alkalinity, each between bounds, at least cost under rows.
type program struct {
	k         *carbonate.Constants
	base      carbonate.Water
	n         int
	reagents  [maxProducts]carbonate.Reagent // per unit of dose
	unit      vector                         // mol/L of each product in one unit of dose
	size      float64                        // mol/L (or eq/L) of one unit: the water's own scale
	cost      vector                         // of one unit of dose, the dearest product near 1
	money     float64                        // money per m3 of water that a cost of 1 stands for
	low, high vector                         // bounds, in units of dose
	rows      []row
	pHLow     float64 // where the search for a pH looks
	pHHigh    float64
	curved    bool // a row bends enough for more than one valley
}

// row is one condition, low <= value <= high, scaled so that 1 is a large
// change and 1e-9 none.
type row struct {
	limit int // index of the limit that it stands for, -1 for none
	kind  rowKind
	pH    float64 // of the kind reserve
	scale float64 // of the kind saturation: the value that counts as 1
	coef  vector  // of the kind straight: value = constant + coef . x
	fixed float64
	low   float64
	high  float64
	give  float64 // cost of one unit of violation; 0 for a row that holds
}

// rowKind says how a row's value follows from the doses.
type rowKind int

const (
	// straight is linear in the doses.
	straight rowKind = iota
	// reserve is the alkalinity less the alkalinity that a water of these totals
	// has at a given pH: above 0 the pH is higher, below 0 lower. It is nearly
	// linear in the doses, as the pH itself is not.
	reserve
	// saturation is the square root of a(Ca) a(CO3) / K. At one pH that is nearly
	// linear along a ray and concave across, as the index itself is not.
	saturation
	// potential is the CCPP.
	potential
	// titratable is the alkalinity by titration, where organic acids were measured.
	titratable
)

// values are the rows' values at one point.
type values [maxRows]float64

// at is the water after the doses x.
func (p *program) at(x *vector) carbonate.Water {
	w := p.base
	for j := range p.n {
		if x[j] != 0 {
			w = w.Add(p.reagents[j], x[j])
		}
	}
	return w
}

// bent says whether a row of this kind needs the solver.
func (k rowKind) bent() bool { return k != straight }

// evaluate works out all rows. ok is false where the water is outside the model.
func (p *program) evaluate(x *vector) (v values, ok bool) {
	for i := range p.rows {
		if r := &p.rows[i]; r.kind == straight {
			v[i] = r.fixed
			for j := range p.n {
				v[i] += r.coef[j] * x[j]
			}
		}
	}
	return v, p.evaluateBent(x, &v)
}

// evaluateBent works out the rows that are not straight.
func (p *program) evaluateBent(x *vector, v *values) bool {
	w := p.at(x)
	var state carbonate.State
	solved := false
	for i := range p.rows {
		r := &p.rows[i]
		if !r.kind.bent() {
			continue
		}
		if r.kind != reserve && !solved {
			var err error
			if state, err = p.k.Solve(w); err != nil {
				return false
			}
			solved = true
		}
		switch r.kind {
		case reserve:
			there, err := p.k.AlkalinityAt(r.pH, w)
			if err != nil {
				return false
			}
			v[i] = (w.Alkalinity - there) / p.size
		case saturation:
			v[i] = 0
			if si, _, ok := state.SaturationIndex(); ok {
				v[i] = rootSaturation(si) / r.scale
			}
		case potential:
			c, err := state.CCPP()
			if err != nil {
				return false
			}
			v[i] = c / p.size
		case titratable:
			a, ok := quantityOf(&state, Alkalinity, true)
			if !ok {
				return false
			}
			v[i] = a / p.size
		}
		if math.IsNaN(v[i]) || math.IsInf(v[i], 0) {
			return false
		}
	}
	return true
}

// rootSaturation is the square root of the saturation ratio of an index.
func rootSaturation(index float64) float64 {
	return math.Exp(0.5 * math.Ln10 * min(index, 6))
}

// difference is the step of the one-sided differences, in units of dose: their
// error is a hundred thousandth of the curvature, and the solver's own noise
// (1e-12) a hundredth of that.
const difference = 1e-5

// slopes are the rows' slopes, one a product.
type slopes [maxRows]vector

// differentiate works out all slopes at x, where the values are v. Products that
// are held at one dose are left out.
func (p *program) differentiate(x *vector, v *values, s *slopes) bool {
	bent := false
	for i := range p.rows {
		if p.rows[i].kind.bent() {
			bent = true
		} else {
			s[i] = p.rows[i].coef
		}
	}
	if !bent {
		return true
	}
	for j := range p.n {
		if p.high[j] <= p.low[j] {
			for i := range p.rows {
				if p.rows[i].kind.bent() {
					s[i][j] = 0
				}
			}
			continue
		}
		moved := *x
		moved[j] += difference
		var after values
		if !p.evaluateBent(&moved, &after) {
			return false
		}
		for i := range p.rows {
			if p.rows[i].kind.bent() {
				s[i][j] = (after[i] - v[i]) / difference
			}
		}
	}
	return true
}

// miss is by how much a row's value is outside its bounds.
func (r *row) miss(v float64) float64 { return max(r.low-v, v-r.high, 0) }

// judge sums up a point: what it costs, with what gives way counted, and by how
// much the rows that hold are missed.
func (p *program) judge(x *vector, v *values) (cost, missed float64) {
	for j := range p.n {
		cost += p.cost[j] * x[j]
	}
	for i := range p.rows {
		r := &p.rows[i]
		if m := r.miss(v[i]); r.give > 0 {
			cost += r.give * m
		} else {
			missed += m
		}
	}
	return cost, missed
}
