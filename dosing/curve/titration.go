package curve

import (
	"math"
	"slices"

	"beckline/dosing"
)

const (
	titrationPoints = 61   // before steep stretches are looked at more closely
	titrationMost   = 400  // after
	steepestStep    = 0.02 // of the curve's height, between two points
	beyondTarget    = 1.5  // times the dose, how far a curve runs unless told
)

// Titration draws the figure that the target is about (pH where there is none)
// against the dose of the chemical that the case solves for, from 0 to most,
// mol/L; most 0 means half as much again as the dose to the target, or as the
// dose that comes nearest to it. The target and the working point are marked.
// Where the target is that of a station along the line, so is the curve. The
// pump is left out: the curve is of the water. The error is a *dosing.Problem.
func Titration(c dosing.Case, most float64) (Series, error) {
	solved, problem := solvedAddition(&c)
	if problem != nil {
		return Series{}, problem
	}
	kind, station := c.Target.Kind, c.TargetAt
	s := Series{Name: c.Additions[solved].Product.Title, Kind: ByDose, X: doseAxis(&c.Additions[solved].Product), Y: figureAxis(kind), Target: c.Target}
	if kind != dosing.NoTarget {
		s.AtY = dosing.Some(c.Target.Value)
	}
	c.Additions = slices.Clone(c.Additions)
	c.Additions[solved].Feed.PumpCapacity = dosing.None
	if kind != dosing.NoTarget {
		answer, err := dosing.Solve(c)
		if err == nil {
			dose := answer.Dose().Dose
			s.Working = &Point{X: dose, Y: figure(kind, figuresAt(answer, station)), Result: answer, dose: solved + 1}
			most = orElse(most, beyondTarget*dose)
		} else if p := asProblem(err); p.NearestAt.Value > 0 {
			most = orElse(most, beyondTarget*p.NearestAt.Value)
		} else if p.Kind != dosing.NoAnswer {
			return s, p
		}
	}
	if !(most > 0) || math.IsInf(most, 0) {
		return s, &dosing.Problem{Kind: dosing.BadInput, Code: "missing", Field: "most",
			Accepted: "the largest dose to draw, since no dose reaches a target here"}
	}
	c.Additions[solved].Solve = false
	c.Target, c.TargetAt = dosing.Target{}, 0
	at := func(dose float64) Point { return titrate(c, solved, kind, station, dose) }
	for _, d := range Span(0, most, titrationPoints) {
		s.Points = append(s.Points, at(d))
	}
	s.Points = refine(s.Points, at)
	return s.finish()
}

func orElse(v, fallback float64) float64 {
	if v > 0 {
		return v
	}
	return fallback
}

// figuresAt are the figures of the water that must meet the target: that of a
// station, or the finished one where the station is 0.
func figuresAt(r *dosing.Result, station int) *dosing.Figures {
	if station > 0 && station < len(r.Stations) {
		return &r.Stations[station].Figures
	}
	return &r.Finished().Figures
}

// titrate is the water at one dose.
func titrate(c dosing.Case, solved int, kind dosing.TargetKind, station int, dose float64) Point {
	c.Additions = slices.Clone(c.Additions)
	c.Additions[solved].Dose = dosing.Some(dose)
	p := Point{X: dose, dose: solved + 1}
	r, err := dosing.Solve(c)
	if err != nil {
		p.Problem = asProblem(err)
		return p
	}
	p.Result = r
	p.Y = figure(kind, figuresAt(r, station))
	return p
}

// refine halves the steps in which the curve rises most, until it is smooth to
// the eye or has enough points.
func refine(points []Point, at func(float64) Point) []Point {
	low, high := math.Inf(1), math.Inf(-1)
	for _, p := range points {
		if p.Y.Given {
			low, high = min(low, p.Y.Value), max(high, p.Y.Value)
		}
	}
	for len(points) < titrationMost {
		var out []Point
		added := 0
		for i, p := range points {
			if i > 0 {
				q := points[i-1]
				if p.Y.Given && q.Y.Given && math.Abs(p.Y.Value-q.Y.Value) > steepestStep*(high-low) && len(points)+added < titrationMost {
					out = append(out, at(0.5*(p.X+q.X)))
					added++
				}
			}
			out = append(out, p)
		}
		points = out
		if added == 0 {
			break
		}
	}
	return points
}
