package curve

import (
	"fmt"
	"slices"

	"beckline/dosing"
)

// Series is one line: answers to a plan of which one thing varies.
type Series struct {
	Name    string // what the line is, for a legend: "caustic soda 25 % to pH 8.40"
	X, Y    Axis
	Points  []Point
	Kind    Kind
	Target  dosing.Target   // what every point aims at; of a titration, where its Y is marked
	AtY     dosing.Optional // the target on the Y axis, where it lies there
	Working *Point          // the plan as it stands; nil where it is not on the line or has no answer
}

// Kind says what varies along a series.
type Kind int

// The kinds.
const (
	ByTemperature Kind = iota + 1
	ByAlkalinity       // of the raw water
	ByWater            // named waters; X counts them from 0
	ByDose             // a titration curve
)

// Point is one answer.
type Point struct {
	Name    string          // of the water, where the series has named ones
	X       float64         // SI
	Y       dosing.Optional // SI; none where there is no answer
	Result  *dosing.Result  // nil where there is no answer
	Problem *dosing.Problem // why there is none
	dose    int             // station of the dose that the plan is about
}

// Dose is the station of the chemical whose dose the plan is about, nil where
// there is no answer.
func (p *Point) Dose() *dosing.Station {
	if p.Result == nil {
		return nil
	}
	return &p.Result.Stations[p.dose]
}

// Answered counts the points that have an answer.
func (s *Series) Answered() int {
	n := 0
	for i := range s.Points {
		if s.Points[i].Y.Given {
			n++
		}
	}
	return n
}

const (
	fewestPoints = 2
	mostPoints   = 20000 // two years of hours
)

// wanted refuses a number of points that makes no line.
func wanted(n int) *dosing.Problem {
	if n >= fewestPoints && n <= mostPoints {
		return nil
	}
	return &dosing.Problem{Kind: dosing.BadInput, Code: "curve_points", Field: "points",
		Given: fmt.Sprint(n), Accepted: fmt.Sprintf("%d to %d points", fewestPoints, mostPoints)}
}

// solvedAddition is the index of the addition that is solved for.
func solvedAddition(c *dosing.Case) (int, *dosing.Problem) {
	i := slices.IndexFunc(c.Additions, func(a dosing.Addition) bool { return a.Solve })
	if i < 0 {
		return 0, &dosing.Problem{Kind: dosing.BadInput, Code: "missing", Field: "product",
			Accepted: "a product whose dose is drawn, such as caustic-25"}
	}
	return i, nil
}

// name says what the plan is.
func name(c *dosing.Case, solved int) string {
	title := c.Additions[solved].Product.Title
	y := figureAxis(c.Target.Kind)
	value := fmt.Sprintf("%.*f", y.Decimals, y.In(c.Target.Value))
	switch c.Target.Kind {
	case dosing.TargetPH:
		return title + " to pH " + value
	case dosing.TargetAlkalinity:
		return title + " to alkalinity " + value + " " + y.Unit
	case dosing.TargetSaturationIndex:
		return title + " to saturation index " + value
	case dosing.TargetDIC:
		return title + " to inorganic carbon " + value + " " + y.Unit
	case dosing.TargetCCPP:
		return title + " to CCPP " + value + " " + y.Unit
	}
	return title
}

// solve answers one point of a dose curve.
func solve(c dosing.Case, x float64, name string, solved int) Point {
	p := Point{Name: name, X: x, dose: solved + 1}
	r, err := dosing.Solve(c)
	if err != nil {
		p.Problem = asProblem(err)
		return p
	}
	p.Result = r
	p.Y = dosing.Some(p.Dose().Dose)
	return p
}

func asProblem(err error) *dosing.Problem {
	if p, ok := err.(*dosing.Problem); ok {
		return p
	}
	return &dosing.Problem{Kind: dosing.Failed, Code: "solver_failed", Given: err.Error()}
}

// finish returns the series, or the first problem where no point has an answer.
func (s Series) finish() (Series, error) {
	if s.Answered() > 0 {
		return s, nil
	}
	for i := range s.Points {
		if p := s.Points[i].Problem; p != nil {
			return s, p
		}
	}
	return s, &dosing.Problem{Kind: dosing.NoAnswer, Code: "curve_empty", Field: s.Target.Kind.Field(), Target: s.Target}
}
