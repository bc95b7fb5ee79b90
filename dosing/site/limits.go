package site

import (
	"fmt"
	"math"
	"strings"

	"beckline/dosing"
	"beckline/dosing/reading"
)

// limitOf is the hard stop of a reading on this line: the plant's, and where it
// has none the built-in one.
func (l *Line) limitOf(f reading.Field) Band {
	low, high, _ := f.Range()
	return narrowed(l.Limits[f.Name], low, high)
}

// usualOf is the band outside which a reading is called unusual on this line.
func (l *Line) usualOf(f reading.Field) Band {
	if b, ok := l.Usual[f.Name]; ok {
		return b
	}
	low, high := f.Usual()
	return narrowed(Band{}, low, high)
}

// narrowed fills in the ends that a band leaves open.
func narrowed(b Band, low, high float64) Band {
	if !b.Low.Given && !math.IsInf(low, 0) {
		b.Low = dosing.Some(low)
	}
	if !b.High.Given && !math.IsInf(high, 0) {
		b.High = dosing.Some(high)
	}
	return b
}

// CheckReading holds one reading, SI, against the line's own limits and usual
// band: a *dosing.Problem where it is outside the limits, a warning where it is
// unusual here. given is what was typed.
func (l *Line) CheckReading(f reading.Field, si float64, given string) (*dosing.Warning, *dosing.Problem) {
	if b, ok := l.Limits[f.Name]; ok && !b.Holds(si) {
		return nil, &dosing.Problem{Kind: dosing.BadInput, Code: "outside_plant_limit", Field: f.Name,
			Given: reading.Clean(given), Accepted: b.text(f) + l.where(b)}
	}
	if f.Name == "flow" && l.Capacity.Given && si > l.Capacity.Value*mostOverCapacity {
		return nil, &dosing.Problem{Kind: dosing.BadInput, Code: "outside_plant_limit", Field: f.Name,
			Given: reading.Clean(given), Accepted: "at most 120 % of the plant's capacity, " + withUnit(f, l.Capacity.Value) + "; is the unit right?"}
	}
	if b, ok := l.Usual[f.Name]; ok && !b.Holds(si) {
		limit := b.High.Value
		if b.Low.Given && si < b.Low.Value {
			limit = b.Low.Value
		}
		return &dosing.Warning{Code: "unusual_" + strings.ReplaceAll(f.Name, "-", "_"), Field: f.Name,
			Given: reading.Clean(given), Value: si, Limit: limit}, nil
	}
	return nil, nil
}

// mostOverCapacity refuses a flow over 120 % of what the plant can pass (common
// practice, no source).
const mostOverCapacity = 1.2

func (l *Line) where(b Band) string {
	if b.Line == 0 {
		return ""
	}
	return fmt.Sprintf(" (%s, line %d)", l.site.Path, b.Line)
}

// CheckFinished holds the finished water against the line's limits. Each one
// that it breaks is a *dosing.Problem of kind NoAnswer and code plant_limit, in
// the order of FinishedNames; a figure that the result does not have breaks none.
func (l *Line) CheckFinished(r *dosing.Result) []*dosing.Problem {
	var broken []*dosing.Problem
	for _, name := range FinishedNames() {
		b, ok := l.Finished[name]
		if !ok {
			continue
		}
		v := finishedFigure(name, &r.Finished().Figures)
		if !v.Given || b.Holds(v.Value) {
			continue
		}
		p := &dosing.Problem{Kind: dosing.NoAnswer, Code: "plant_limit", Field: name, Value: v, Low: b.Low, High: b.High}
		if f, ok := finishedField(name); ok {
			p.Given, p.Accepted = withUnit(f, v.Value), b.text(f)+l.where(b)
		} else {
			p.Given, p.Accepted = fmt.Sprintf("%.3g", v.Value), b.plain()+l.where(b)
		}
		broken = append(broken, p)
	}
	return broken
}

func finishedFigure(name string, f *dosing.Figures) dosing.Optional {
	switch name {
	case "ph":
		return dosing.Some(f.PH)
	case "alkalinity":
		return dosing.Some(f.Alkalinity)
	case "si":
		return f.SaturationIndex
	case "ccpp":
		return f.CCPP
	case "calcium":
		return f.Calcium
	case "sodium":
		return f.Sodium
	case "chloride":
		return f.Chloride
	case "sulfate":
		return f.Sulfate
	case "chloride-sulfate":
		return f.ChlorideSulfate
	case "larson":
		return f.LarsonRatio
	}
	return dosing.None
}

// Steps is in how many equal steps a change must be made for none to be over
// the line's most: from and to are pH, and doses in one unit. A dose that starts
// from 0 is bounded by the pH alone.
func (c Change) Steps(fromPH, toPH, fromDose, toDose float64) int {
	steps := 1.0
	if c.PH > 0 {
		steps = max(steps, math.Ceil(math.Abs(toPH-fromPH)/c.PH-1e-9))
	}
	if c.Dose > 0 && fromDose > 0 {
		steps = max(steps, math.Ceil(math.Abs(toDose-fromDose)/(c.Dose*fromDose)-1e-9))
	}
	return int(min(steps, 1000))
}
