package report

import (
	"strconv"
	"strings"

	"beckline/dosing/curve"
)

// curveText are the columns of a curve that hold words.
var curveText = map[string]bool{"series": true, "water": true, "product": true, "basis": true, "warnings": true, "problem": true}

// CurveJSON is the points of curves for programs, with the keys of their CSV:
// {"series":[{"name","x","y","points":[{...}]}]}. What can't be had is null.
func CurveJSON(all []curve.Series) ([]byte, error) {
	series := make([]object, len(all))
	for i := range all {
		s := &all[i]
		series[i].add("name", s.Name)
		series[i].add("x", ASCII(s.X.Title()))
		series[i].add("y", ASCII(s.Y.Title()))
		var points []object
		for j, row := range s.Rows() {
			var o object
			for k, key := range curve.Header() {
				switch {
				case key == "series":
				case key == "problem" && s.Points[j].Problem != nil:
					o.add(key, ProblemLine(s.Points[j].Problem))
				case curveText[key]:
					o.addText(key, row[k])
				default:
					o.add(key, numberOf(row[k]))
				}
			}
			points = append(points, o)
		}
		series[i].add("points", points)
	}
	var o object
	o.add("series", series)
	return indented(o)
}

func numberOf(cell string) Number {
	v, err := strconv.ParseFloat(strings.TrimSpace(cell), 64)
	if err != nil {
		return Number{}
	}
	return Some(v)
}
