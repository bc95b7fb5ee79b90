package dosing

import (
	"beckline/carbonate"
	"beckline/dosing/feed"
)

// Solve answers a case: the raw water, the dose that was asked for, the water
// after every addition, its feeds, and how far to trust it. Without a solved
// addition it describes the waters along the way. It is a pure function of the
// case. The error is always a *Problem.
func Solve(c Case) (*Result, error) {
	r := &run{c: &c}
	if p := r.solve(); p != nil {
		return nil, p
	}
	r.res.Warnings = sortWarnings(append(r.warnings, c.Notes...))
	return &r.res, nil
}

// run is the work on one case.
type run struct {
	c        *Case
	k        *carbonate.Constants
	known    known
	base     carbonate.State // the raw water
	solved   int             // index into Additions, -1 for none
	second   int             // index of the other solved addition, -1 for none
	targetAt int             // how many additions the target's water has passed
	doses    []float64
	held     bool              // the doses are what they are: none is found anew for a residual
	states   []carbonate.State // after each addition
	warnings []Warning
	res      Result
}

func (r *run) solve() *Problem {
	if err := r.start(); err != nil {
		return problem(err)
	}
	base := r.base
	r.k = base.Constants()
	if p := r.plan(); p != nil {
		return p
	}
	if p := r.dose(); p != nil {
		return p
	}
	if p := r.walk(); p != nil {
		return p
	}
	r.res.Case = *r.c
	r.res.Solved = r.solved + 1
	if p := r.stations(); p != nil {
		return p
	}
	r.warn()
	return r.check()
}

// plan checks the additions and finds the one to solve for.
func (r *run) plan() *Problem {
	r.solved, r.second = -1, -1
	n := len(r.c.Additions)
	r.doses = make([]float64, n)
	for i := range r.c.Additions {
		if p := r.planOne(i, &r.c.Additions[i]); p != nil {
			return p
		}
	}
	if r.solved >= 0 && r.c.Target.Kind == NoTarget {
		return &Problem{Kind: BadInput, Code: "missing", Field: "target-ph"}
	}
	if r.second >= 0 && r.c.Second.Kind == NoTarget || r.second < 0 && r.c.Second.Kind != NoTarget {
		return &Problem{Kind: BadInput, Code: "two_and_two", Field: "product"}
	}
	if r.solved < 0 && r.c.Target.Kind != NoTarget {
		return &Problem{Kind: BadInput, Code: "missing", Field: "product"}
	}
	r.targetAt = r.c.TargetAt
	if r.targetAt == 0 {
		r.targetAt = n
	}
	if r.targetAt < 0 || r.targetAt > n || max(r.solved, r.second) >= r.targetAt {
		return &Problem{Kind: BadInput, Code: "target_before_dose", Field: r.c.Target.Kind.Field()}
	}
	return nil
}

func (r *run) planOne(i int, a *Addition) *Problem {
	if a.Process != ChemicalFeed {
		if a.Share.Given && !(a.Share.Value >= 0 && a.Share.Value <= 1) {
			return outside("aerate", a.Share.Value, 0, 1)
		}
		return nil
	}
	chem := &a.Product.Chemical
	if (a.Demand.Given || a.Residual.Given) && chem.Adds[carbonate.Chlorine] == 0 {
		return &Problem{Kind: BadInput, Code: "not_chlorine", Field: "add", Given: a.Product.Name}
	}
	switch {
	case a.Solve && r.second >= 0:
		return &Problem{Kind: BadInput, Code: "three_solved", Field: "product", Given: a.Product.Name}
	case a.Solve && r.solved >= 0:
		r.second = i
		return nil
	case a.Solve:
		r.solved = i
		return nil
	case a.Residual.Given:
		r.doses[i] = (a.Residual.Value + a.Demand.Or(0)) / chem.Adds[carbonate.Chlorine]
	case a.Dose.Given:
		r.doses[i] = a.Dose.Value
	default:
		return &Problem{Kind: BadInput, Code: "missing", Field: "dose", Given: a.Product.Name}
	}
	if most := GreatestDose(a.Product); !(r.doses[i] >= 0 && r.doses[i] <= most) {
		return &Problem{Kind: BadInput, Code: "dose_outside_range", Field: "dose", Given: a.Product.Name,
			Value: Some(r.doses[i] * chem.MolarMass), Low: Some(0), High: Some(most * chem.MolarMass)}
	}
	return nil
}

// dose solves for the addition that was asked for.
func (r *run) dose() *Problem {
	if r.solved < 0 {
		return nil
	}
	if r.second >= 0 {
		return r.pair()
	}
	s, p := r.search(r.c.Additions[r.solved].Product)
	if p != nil {
		return p
	}
	d, p := s.find()
	if p != nil {
		if p.Kind == NoAnswer && p.Code != "target_met" {
			p.CouldReach = r.couldReach()
		}
		return p
	}
	r.doses[r.solved] = d
	return nil
}

// search prepares the look for the dose of a product in the place of the solved
// addition. Where the additions only add they commute, so all the others, also
// those that follow, go into the water first and the dose comes last.
func (r *run) search(product Product) (*search, *Problem) {
	s := &search{k: r.k, reagent: product.reagent(), target: r.c.Target, most: GreatestDose(product), known: r.known}
	r.doses[r.solved] = 0
	w, p := r.through(r.base.Water, 0, r.targetAt)
	if p != nil {
		return nil, p
	}
	var err error
	if s.base, err = r.k.Solve(w); err != nil {
		return nil, refusal(err, &r.c.Readings, r.k, w)
	}
	if !r.plain(r.targetAt) {
		s.after = func(dose float64) (carbonate.Water, bool) {
			w, p := r.through(r.base.Water, 0, r.solved)
			if p == nil {
				w = w.Add(s.reagent, dose)
				w, p = react(w, &r.c.Additions[r.solved])
			}
			if p == nil {
				w, p = r.through(w, r.solved+1, r.targetAt)
			}
			return w, p == nil
		}
	}
	return s, nil
}

// walk solves the water after each addition, afresh from its totals.
func (r *run) walk() *Problem {
	w := r.base.Water
	r.states = make([]carbonate.State, len(r.c.Additions))
	for i := range r.c.Additions {
		var p *Problem
		if w, p = r.step(i, w, r.doses[i]); p != nil {
			return p
		}
		s, err := r.k.Solve(w)
		if err != nil {
			return refusal(err, &r.c.Readings, r.k, w)
		}
		r.states[i] = s
	}
	return nil
}

// stations fills in what is shown of each water and each feed.
func (r *run) stations() *Problem {
	r.res.Stations = make([]Station, 1+len(r.states))
	f, err := figures(&r.base, r.known)
	if err != nil {
		return refusal(err, &r.c.Readings, r.k, r.base.Water)
	}
	r.res.Stations[0].Figures = f
	for i := range r.states {
		a := &r.res.Case.Additions[i]
		st := &r.res.Stations[i+1]
		st.Addition, st.Dose, st.Solved = a, r.doses[i], i == r.solved || i == r.second
		if st.Figures, err = figures(&r.states[i], r.known); err != nil {
			return refusal(err, &r.c.Readings, r.k, r.states[i].Water)
		}
		if a.Process != ChemicalFeed {
			continue
		}
		if st.Feed, err = r.feed(a, r.doses[i]); err != nil {
			return r.feedProblem(err, i)
		}
	}
	return nil
}

func (r *run) feed(a *Addition, dose float64) (feed.Rates, error) {
	p := &a.Product
	return feed.Compute(feed.Input{
		PureMass:      dose * p.Chemical.MolarMass, // mol/L x g/mol = kg/m3
		Strength:      p.Strength,
		Form:          p.Form,
		Density:       p.Density,
		KgPerM3:       a.Feed.Density.Or(0),
		ProductKelvin: a.Feed.ProductKelvin.Or(0),
		Flow:          r.c.Readings.Flow.Or(0),
		PumpCapacity:  a.Feed.PumpCapacity.Or(0),
	})
}

// reagent is what one mole of the product's chemical does to a water.
func (p *Product) reagent() carbonate.Reagent {
	return carbonate.Reagent{Adds: p.Chemical.Adds, Equivalents: p.Chemical.Equivalents}
}
