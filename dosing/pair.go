package dosing

import (
	"math"

	"beckline/carbonate"
)

// pairWork finds two doses for two targets: two equations, each nearly linear
// in the doses when a pH is taken at its target (the alkalinity that the water
// still lacks there) instead of as a root.
type pairWork struct {
	r       *run
	at      [2]int // the additions
	targets [2]Target
	figures search // for the figure of a state
}

// Newton's limits. The step for the slopes is far below any dose and far above
// rounding.
const (
	pairPasses = 80
	pairStep   = 1e-7  // mol/L
	pairSettle = 1e-13 // mol/L
)

// pair solves for both doses, or says which product could only help with less
// than nothing and how near the other alone comes.
func (r *run) pair() *Problem {
	if r.c.Target.Kind == r.c.Second.Kind {
		return &Problem{Kind: BadInput, Code: "same_target", Field: r.c.Second.Kind.Field(), Target: r.c.Second}
	}
	w := &pairWork{r: r, at: [2]int{r.solved, r.second}, targets: [2]Target{r.c.Target, r.c.Second},
		figures: search{k: r.k, known: r.known}}
	for _, t := range w.targets {
		if (t.Kind == TargetSaturationIndex || t.Kind == TargetCCPP) && !r.known.calcium {
			return &Problem{Kind: BadInput, Code: "calcium_needed", Field: "calcium", Target: t}
		}
	}
	d, ok := w.newton([2]float64{})
	if ok && w.take(d) {
		return nil
	}
	// A no from there is not yet a no.
	if start, found := w.scan(); found {
		if near, ok := w.newton(start); ok && w.take(near) || w.take(start) {
			return nil
		}
	}
	return w.infeasible(d, ok)
}

// take sets the doses where both can be fed.
func (w *pairWork) take(d [2]float64) bool {
	for n, i := range w.at {
		if !(d[n] >= 0 && d[n] <= GreatestDose(w.r.c.Additions[i].Product)) {
			return false
		}
	}
	for n, i := range w.at {
		w.r.doses[i] = d[n]
	}
	return true
}

// newton works on the equations continued in a straight line below zero doses,
// so that a pair that needs a negative dose is found as such.
func (w *pairWork) newton(d [2]float64) (_ [2]float64, ok bool) {
	for range pairPasses {
		base := [2]float64{max(d[0], 0), max(d[1], 0)}
		f, ok := w.miss(base)
		if !ok {
			// Too far: the water there is outside the model. Come back half way.
			d[0], d[1] = d[0]/2, d[1]/2
			continue
		}
		var j [2][2]float64
		for n := range 2 {
			moved := base
			moved[n] += pairStep
			g, ok := w.miss(moved)
			if !ok {
				return d, false
			}
			j[0][n], j[1][n] = (g[0]-f[0])/pairStep, (g[1]-f[1])/pairStep
		}
		for n := range 2 {
			f[0] += j[0][n] * (d[n] - base[n])
			f[1] += j[1][n] * (d[n] - base[n])
		}
		det := j[0][0]*j[1][1] - j[0][1]*j[1][0]
		size := math.Abs(j[0][0]*j[1][1]) + math.Abs(j[0][1]*j[1][0])
		if math.Abs(det) <= 1e-9*size || math.IsNaN(det) {
			return d, false // the two products do the same to both figures
		}
		s0 := (f[0]*j[1][1] - f[1]*j[0][1]) / det
		s1 := (f[1]*j[0][0] - f[0]*j[1][0]) / det
		// A step never leaves the model by more than it must.
		longest := max(math.Abs(s0), math.Abs(s1))
		limit := max(10*max(math.Abs(d[0]), math.Abs(d[1])), 2e-3)
		if longest > limit {
			s0, s1 = s0*limit/longest, s1*limit/longest
		}
		d[0] -= s0
		d[1] -= s1
		if longest <= pairSettle+1e-12*max(math.Abs(d[0]), math.Abs(d[1])) {
			return d, true
		}
		if math.IsNaN(d[0]) || math.IsNaN(d[1]) {
			return d, false
		}
	}
	return d, false
}

// water is the water at the target with both doses.
func (w *pairWork) water(d [2]float64) (carbonate.Water, bool) {
	for n, i := range w.at {
		w.r.doses[i] = d[n]
	}
	v, p := w.r.through(w.r.base.Water, 0, w.r.targetAt)
	return v, p == nil
}

// miss is how far both figures are from their targets: eq/L for a pH (what the
// water lacks at the target pH), else the figure's own unit.
func (w *pairWork) miss(d [2]float64) (f [2]float64, ok bool) {
	v, ok := w.water(d)
	if !ok {
		return f, false
	}
	var st *carbonate.State
	for n, t := range w.targets {
		switch {
		case t.Kind == TargetPH:
			alkalinity, err := w.r.k.AlkalinityAt(t.Value, v)
			if err != nil {
				return f, false
			}
			f[n] = v.Alkalinity - alkalinity
		case t.Kind == TargetDIC:
			f[n] = v.Totals[carbonate.Carbon] - t.Value
		case t.Kind == TargetAlkalinity && !w.r.known.organics:
			f[n] = v.Alkalinity - t.Value
		default:
			if st == nil {
				s, err := w.r.k.Solve(v)
				if err != nil {
					return f, false
				}
				st = &s
			}
			w.figures.target = t
			figure, ok := w.figures.figure(st)
			if !ok {
				return f, false
			}
			f[n] = figure - t.Value
		}
	}
	return f, true
}

// infeasible says which product binds: the one whose dose would have to be
// negative, and what the other reaches of the second target while it meets the
// first alone.
func (w *pairWork) infeasible(d [2]float64, settled bool) *Problem {
	r := w.r
	p := &Problem{Kind: NoAnswer, Code: "pair_out_of_reach", Field: w.targets[1].Kind.Field(), Target: w.targets[1]}
	if !settled {
		p.Given = r.c.Additions[w.at[0]].Product.Name + " and " + r.c.Additions[w.at[1]].Product.Name
		return p
	}
	bind := 0
	if d[1] < d[0] {
		bind = 1
	}
	p.Given = r.c.Additions[w.at[bind]].Product.Name
	p.NearestAt = Some(d[bind])
	// Alone: the other product to the first target, or where it cannot, to none.
	for n, i := range w.at {
		r.doses[i] = 0
		if n != bind {
			r.solved = i
		}
	}
	second := r.second
	r.second = -1
	s, problem := r.search(r.c.Additions[r.solved].Product)
	if problem == nil {
		if dose, problem := s.find(); problem == nil {
			s.target = w.targets[1]
			if v, ok := s.at(dose); ok {
				p.Nearest = Some(v)
			}
		}
	}
	r.solved, r.second = w.at[0], second
	return p
}
