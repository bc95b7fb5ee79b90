package reading

import (
	"math"
	"strings"
)

// limits of a reading, in the bare unit. Outside low..high it is refused;
// outside usualLow..usualHigh it is used and called unusual.
type limits struct {
	low, high           float64
	lowOpen             bool // low itself is refused too
	usualLow, usualHigh float64
	lowNote             string // added to a refusal below low
	// The unit that a value outside the usual band may have been meant in,
	// "" for none.
	meantLow, meantHigh string
}

// near is the share by which a value may pass a limit through the rounding of
// unit conversion alone: 122 °F is 50 °C.
const near = 1e-12

// snap moves a value that passed a limit by rounding only back to the limit.
func snap(v, limit float64) float64 {
	if v != limit && math.Abs(v-limit) <= near*math.Abs(limit) {
		return limit
	}
	return v
}

// Range returns the lowest and the highest value that is accepted, SI. Where
// lowOpen is true the lowest itself is refused.
func (f Field) Range() (low, high float64, lowOpen bool) {
	return f.FromBare(f.limits.low), f.FromBare(f.limits.high), f.limits.lowOpen
}

// Usual returns the band, SI, outside of which a value is called unusual; the
// ends are usual. An end that no value can pass is infinite.
func (f Field) Usual() (low, high float64) {
	return f.FromBare(f.limits.usualLow), f.FromBare(f.limits.usualHigh)
}

// check applies the limits to a value typed in units[i].
func (f Field) check(v float64, i int, given string) (Value, error) {
	low, high, open := f.Range()
	v = snap(snap(v, low), high)
	value := Value{SI: v, Unit: f.units[i].name, Given: Clean(given)}
	switch {
	case math.IsNaN(v) || v < low || open && v <= low:
		accepted := f.rangeText(i)
		if f.limits.lowNote != "" {
			accepted += "; " + f.limits.lowNote
		}
		return Value{}, &Error{Code: CodeTooLow, Field: f.Name, Given: value.Given, Accepted: accepted}
	case v > high:
		accepted := f.rangeText(i) + f.meantText(v, i, f.limits.meantHigh)
		return Value{}, &Error{Code: CodeTooHigh, Field: f.Name, Given: value.Given, Accepted: accepted}
	}
	usualLow, usualHigh := f.Usual()
	switch {
	case snap(v, usualLow) < usualLow:
		value.Unusual, value.Limit, value.UnusualWhy = true, usualLow, f.unusualText(v, i, f.limits.meantLow)
	case snap(v, usualHigh) > usualHigh:
		value.Unusual, value.Limit, value.UnusualWhy = true, usualHigh, f.unusualText(v, i, f.limits.meantHigh)
	}
	return value, nil
}

// rangeText states the accepted range in the bare unit and, where the value was
// typed in another, in that too.
func (f Field) rangeText(i int) string {
	text := f.span(0, f.limits.low, f.limits.high, f.limits.lowOpen)
	if i != 0 {
		low, high, open := f.Range()
		u := f.units[i]
		text += " (" + f.span(i, u.fromSI(low), u.fromSI(high), open) + ")"
	}
	return text
}

func (f Field) span(i int, low, high float64, open bool) string {
	from := brief(low)
	if open {
		from = "above " + from
	}
	unit := f.units[i].name
	if f.Bare == "" { // pH and saturation index: the field's name says it
		unit = ""
	}
	return strings.TrimSpace(from + " to " + brief(high) + " " + unit)
}

// unusualText says what is usual and what else may have been meant.
func (f Field) unusualText(v float64, i int, meant string) string {
	l := f.limits
	unit := ""
	if f.Bare != "" {
		unit = " " + f.Bare
	}
	var text string
	switch {
	case math.IsInf(l.usualLow, -1):
		text = "usually at most " + brief(l.usualHigh) + unit
	case math.IsInf(l.usualHigh, 1):
		text = "usually at least " + brief(l.usualLow) + unit
	default:
		text = "usually " + brief(l.usualLow) + " to " + brief(l.usualHigh) + unit
	}
	return text + f.meantText(v, i, meant)
}

// meantText says what the number would be in the unit that it may have been
// meant in; "" where it was typed in another unit than the bare one or would not
// be usual in that one either.
func (f Field) meantText(v float64, i int, meant string) string {
	j, ok := f.find.find(meant)
	if !ok || i != 0 {
		return ""
	}
	number := f.units[0].fromSI(v)
	other := f.units[j].toSI(number)
	if low, high := f.Usual(); other < low || other > high {
		return ""
	}
	return "; " + brief(number) + " " + f.units[j].name + " would be " + f.Show(other) + " " + f.Bare
}
