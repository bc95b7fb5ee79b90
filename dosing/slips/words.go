package slips

import (
	"math"
	"strconv"

	"beckline/dosing"
	"beckline/dosing/reading"
)

// fields are the readings, once: the table is large.
var fields = func() []reading.Field {
	var out []reading.Field
	for _, f := range reading.Fields() {
		if f.Group == reading.Reading {
			out = append(out, f)
		}
	}
	return out
}()

// value finds a reading by its command-line name.
func value(r *dosing.Readings, field string) dosing.Optional {
	if p := r.Named(field); p != nil {
		return *p
	}
	return dosing.None
}

// unit is a field's bare unit after a number.
func unit(f reading.Field) string {
	if f.Bare == "" || f.Bare == "pH" {
		return ""
	}
	return " " + f.Bare
}

func percent(share float64) string { return whole(share*100) + " %" }

func whole(v float64) string { return strconv.FormatFloat(math.Round(v), 'f', 0, 64) }

func figures(v float64, n int) string {
	if v == 0 || math.IsNaN(v) || math.IsInf(v, 0) {
		return strconv.FormatFloat(v, 'g', n, 64)
	}
	decimals := max(n-1-int(math.Floor(math.Log10(math.Abs(v)))), 0)
	return strconv.FormatFloat(v, 'f', decimals, 64)
}

func pH(v float64) string { return strconv.FormatFloat(v, 'f', 2, 64) }
