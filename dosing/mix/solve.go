package mix

import (
	"errors"

	"beckline/carbonate"
	"beckline/dosing"
)

// Solve finds the mix of least cost that keeps the finished water within every
// limit, and confirms it by solving the finished water afresh from the readings.
//
// The error is a *dosing.Problem for a task that cannot be read or a water that
// cannot be described, or an *Infeasible (which unwraps to a *dosing.Problem)
// where no mix of the candidates does it. A water that needs nothing is an
// answer, not an error.
func Solve(t Task) (*Answer, error) {
	s, p := newSolver(t)
	if p != nil {
		return nil, p
	}
	a := &Answer{Task: t}
	if s.keepsAll(&s.raw.Finished().Figures) {
		a.NothingNeeded = true
		a.Best = Mix{Result: s.raw, Binding: s.binding(nil, &s.raw.Finished().Figures)}
		return a, nil
	}
	best, ok := s.p.leastCost(&s.least, 0)
	if !ok {
		// The search for what conflicts may yet come upon a mix.
		conflict, found := s.conflict()
		if found == nil {
			return nil, conflict
		}
		best = *found
	}
	others := s.nextBest(&best)
	if len(others) > 0 && others[0].cost < best.cost {
		best, others[0] = others[0], best // the wider search knows better
	}
	if p := s.confirm(best.x, &a.Best); p != nil {
		return nil, p
	}
	for i := range others {
		var m Mix
		if p := s.confirm(others[i].x, &m); p != nil {
			return nil, p
		}
		a.Alternatives = append(a.Alternatives, m)
	}
	if t.Explain {
		if p := s.explain(a, &best); p != nil {
			return nil, p
		}
	}
	return a, nil
}

// solver is the work on one task.
type solver struct {
	t       *Task
	raw     *dosing.Result // the water without the mix
	set     setting
	p       *program
	reach   []reach
	ceiling []float64 // mol/L
	least   vector    // units of dose
}

func newSolver(t Task) (*solver, *dosing.Problem) {
	if p := t.check(); p != nil {
		return nil, p
	}
	raw, err := dosing.Solve(t.Base)
	if err != nil {
		return nil, problem(err)
	}
	f := &raw.Finished().Figures
	if p := t.known(f); p != nil {
		return nil, p
	}
	k, err := carbonate.ConstantsAt(f.Water.Kelvin)
	if err != nil {
		return nil, problem(err)
	}
	s := &solver{t: &t, raw: raw}
	s.set = setting{k: k, base: f.Water, size: scale(&f.Water, t.Limits),
		// With organic acids measured the two alkalinities differ.
		titrated: f.Alkalinity != f.Water.Alkalinity}
	for i := range t.Candidates {
		c := &t.Candidates[i]
		r, p := reachOf(c, t.Base.Readings.Flow)
		if p != nil {
			return nil, p
		}
		s.reach = append(s.reach, r)
		s.ceiling = append(s.ceiling, r.most)
		s.set.products = append(s.set.products, c.Product)
		s.set.perMol = append(s.set.perMol, c.perMolPrice(&r))
		s.set.hardStops = append(s.set.hardStops, dosing.GreatestDose(c.Product))
	}
	s.p = s.set.build(t.Limits, s.ceiling)
	for i := range s.reach {
		s.least[i] = s.reach[i].least / s.p.unit[i]
	}
	return s, nil
}

// problem makes any error a *dosing.Problem.
func problem(err error) *dosing.Problem {
	var p *dosing.Problem
	if errors.As(err, &p) {
		return p
	}
	return &dosing.Problem{Kind: dosing.Failed, Code: "solver_failed", Given: err.Error()}
}
