package report

import (
	"math"
	"strconv"
	"strings"

	"beckline/dosing"
)

// Number is a figure in the unit of its key; without Given there is none, which
// is null in JSON and an empty cell in CSV, never zero.
type Number struct {
	Value float64
	Given bool
}

// Some wraps a value; one that is not finite counts as not given, since
// neither JSON nor a person can use it.
func Some(v float64) Number {
	if math.IsNaN(v) || math.IsInf(v, 0) {
		return Number{}
	}
	return Number{Value: v, Given: true}
}

// scaled converts an optional SI value by a factor.
func scaled(o dosing.Optional, factor float64) Number {
	if !o.Given {
		return Number{}
	}
	return Some(o.Value * factor)
}

// Full writes a number for programs: 15 significant digits, so that 30 mg/L
// that went through mol/L and back is written 30 and not 29.999999999999996.
// All forms of output share it, so they agree to the last digit.
func Full(v float64) string {
	rounded, err := strconv.ParseFloat(strconv.FormatFloat(v, 'e', 14, 64), 64)
	if err != nil { // the largest floats round up past the end
		rounded = v
	}
	if rounded == 0 {
		return "0"
	}
	if size := math.Abs(rounded); size >= 1e-6 && size < 1e15 {
		return strconv.FormatFloat(rounded, 'f', -1, 64)
	}
	return strconv.FormatFloat(rounded, 'e', -1, 64)
}

// Significant writes a number for people with so many significant digits and
// never an exponent; digits before the decimal point are never dropped below
// the unit, so 12345 with 3 digits is 12345, not 12300: a person copies what
// stands there.
func Significant(v float64, digits int) string {
	if v == 0 || math.IsNaN(v) || math.IsInf(v, 0) {
		return "0"
	}
	// The exponent after rounding: 9.999 is 10.0 with three digits, not 10.00.
	rounded := strconv.FormatFloat(v, 'e', digits-1, 64)
	exponent, err := strconv.Atoi(rounded[strings.IndexByte(rounded, 'e')+1:])
	if err != nil {
		return rounded
	}
	return Fixed(v, max(0, min(digits-1-exponent, 12)))
}

// Fixed writes a number with so many decimals and no negative zero.
func Fixed(v float64, decimals int) string {
	s := strconv.FormatFloat(v, 'f', decimals, 64)
	if strings.Trim(s, "-0.") == "" {
		s = strings.TrimPrefix(s, "-")
	}
	return s
}
