package curve

import (
	"slices"

	"gonum.org/v1/gonum/floats"

	"beckline/dosing"
)

// Hold says what stays when the temperature varies.
type Hold int

const (
	// HoldWater keeps the water: its alkalinity, carbon and ions are those of the
	// case at its own temperature, and its pH follows the temperature. One water,
	// summer and winter.
	HoldWater Hold = iota
	// HoldReadings keeps the readings: the same pH is read at every temperature,
	// so the carbon differs.
	HoldReadings
)

// Span gives n values from low to high, both included, evenly apart; n from 2.
func Span(low, high float64, n int) []float64 {
	if n < 2 {
		return []float64{low}
	}
	return floats.Span(make([]float64, n), low, high)
}

// OverTemperature answers the case at each temperature, K, in the order given;
// of a blend every source takes it. The error is a *dosing.Problem: the case
// cannot be solved for a dose at all, or at none of the temperatures; single
// failures stay in their points.
func OverTemperature(c dosing.Case, kelvins []float64, hold Hold) (Series, error) {
	s, solved, err := begin(c, len(kelvins), ByTemperature, temperatureAxis())
	if err != nil {
		return s, err
	}
	c.Sources = slices.Clone(c.Sources)
	samples := []*dosing.Readings{&c.Readings}
	if len(c.Sources) > 0 {
		samples = nil
		for i := range c.Sources {
			samples = append(samples, &c.Sources[i].Readings)
		}
	}
	if s.Working = working(c, dosing.Some(0), solved); s.Working != nil {
		s.Working.X = s.Working.Result.Raw().Figures.Water.Kelvin
	}
	if hold == HoldWater {
		for _, r := range samples {
			if err := closed(r); err != nil {
				return s, err
			}
		}
	}
	for _, k := range kelvins {
		for _, r := range samples {
			r.Kelvin = dosing.Some(k)
		}
		at := c
		at.Sources = slices.Clone(c.Sources)
		s.Points = append(s.Points, solve(at, k, "", solved))
	}
	return s.finish()
}

// closed replaces a pH by the carbon that it means, so that the sample can
// change its temperature.
func closed(r *dosing.Readings) error {
	if r.DIC.Given {
		return nil
	}
	raw, err := dosing.Solve(dosing.Case{Readings: *r})
	if err != nil {
		return asProblem(err)
	}
	r.DIC = dosing.Some(raw.Raw().Figures.DIC)
	r.PH, r.PHKelvin = dosing.None, dosing.None
	return nil
}

// OverAlkalinity answers the case at each raw alkalinity, eq/L, in the order
// given, with the other readings, the pH among them, as they stand. The error is
// as that of OverTemperature; a blend has no one raw alkalinity and is refused.
func OverAlkalinity(c dosing.Case, alkalinities []float64) (Series, error) {
	s, solved, err := begin(c, len(alkalinities), ByAlkalinity, alkalinityAxis("raw water"))
	if err != nil {
		return s, err
	}
	if len(c.Sources) > 0 {
		return s, &dosing.Problem{Kind: dosing.BadInput, Code: "curve_of_blend", Field: "alkalinity", Accepted: "one raw water, not a blend"}
	}
	s.Working = working(c, c.Readings.Alkalinity, solved)
	for _, a := range alkalinities {
		c.Readings.Alkalinity = dosing.Some(a)
		s.Points = append(s.Points, solve(c, a, "", solved))
	}
	return s.finish()
}

// Water is one row of a table of waters: the months of a year, say.
type Water struct {
	Name     string
	Readings dosing.Readings
}

// OverWaters answers the case's additions and target for each water, in the
// order given. The case's own readings are not used. The error is as that of
// OverTemperature.
func OverWaters(c dosing.Case, waters []Water) (Series, error) {
	s, solved, err := begin(c, len(waters), ByWater, waterAxis())
	if err != nil {
		return s, err
	}
	c.Sources = nil
	for i, w := range waters {
		c.Readings = w.Readings
		s.Points = append(s.Points, solve(c, float64(i), w.Name, solved))
	}
	return s.finish()
}

// begin checks what every dose curve needs.
func begin(c dosing.Case, points int, kind Kind, x Axis) (Series, int, error) {
	solved, problem := solvedAddition(&c)
	if problem != nil {
		return Series{}, 0, problem
	}
	if problem := wanted(points); problem != nil {
		return Series{}, 0, problem
	}
	s := Series{Name: name(&c, solved), Kind: kind, X: x, Y: doseAxis(&c.Additions[solved].Product), Target: c.Target}
	return s, solved, nil
}

// working is the case as it stands.
func working(c dosing.Case, x dosing.Optional, solved int) *Point {
	if !x.Given {
		return nil
	}
	p := solve(c, x.Value, "", solved)
	if p.Result == nil {
		return nil
	}
	return &p
}
