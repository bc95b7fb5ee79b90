package dosing

import (
	"errors"

	"beckline/dosing/feed"
)

// feedProblem turns a feed error into the operator's. For a pump that is too
// small it says how far the pump would get.
func (r *run) feedProblem(err error, addition int) *Problem {
	var small *feed.TooSmall
	if errors.As(err, &small) {
		p := &Problem{Kind: NoAnswer, Code: "pump_too_small", Field: "pump", Target: r.c.Target,
			Value: Some(small.Fraction), High: Some(1)}
		if addition == r.solved {
			dose := r.doses[addition]
			s, problem := r.search(r.c.Additions[addition].Product)
			if problem != nil {
				return problem
			}
			most := dose / small.Fraction
			if v, ok := s.at(most); ok {
				p.Nearest, p.NearestAt = Some(v), Some(most)
			}
		}
		return p
	}
	var beyond *feed.OutOfTable
	if errors.As(err, &beyond) {
		return &Problem{Kind: BadInput, Code: "density_unknown", Field: "strength",
			Value: Some(beyond.Strength), Low: Some(0), High: Some(beyond.High)}
	}
	var bad *feed.BadInput
	if errors.As(err, &bad) {
		return outside(bad.Field, bad.Value, bad.Low, bad.High)
	}
	return &Problem{Kind: Failed, Code: "solver_failed", Given: err.Error()}
}

// problem makes any error of this package a *Problem.
func problem(err error) *Problem {
	var p *Problem
	if errors.As(err, &p) {
		return p
	}
	return &Problem{Kind: Failed, Code: "solver_failed", Given: err.Error()}
}
