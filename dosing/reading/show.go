package reading

import (
	"math"
	"strconv"
	"strings"
)

// significant is the most figures that a reading supports unless its field says
// otherwise.
const significant = 4

func (f Field) mostFigures() int {
	if f.figures > 0 {
		return f.figures
	}
	return significant
}

// ToBare converts from SI to the bare unit.
func (f Field) ToBare(si float64) float64 { return f.units[0].fromSI(si) }

// FromBare converts from the bare unit to SI.
func (f Field) FromBare(x float64) float64 { return f.units[0].toSI(x) }

// Units returns the names of the units that the field accepts, the bare one
// first. Each of them can be typed after a number and given to In and ShowIn.
func (f Field) Units() []string {
	names := make([]string, len(f.units))
	for i, u := range f.units {
		names[i] = u.name
	}
	return names
}

// In converts from SI to a unit that the field accepts, in full precision; ok is
// false where it does not.
func (f Field) In(unit string, si float64) (x float64, ok bool) {
	i, ok := f.find.find(unit)
	if !ok {
		return 0, false
	}
	return f.units[i].fromSI(si), true
}

// From converts from a unit that the field accepts to SI, without applying
// limits; ok is false where it does not accept the unit.
func (f Field) From(unit string, x float64) (si float64, ok bool) {
	i, ok := f.find.find(unit)
	if !ok {
		return 0, false
	}
	return f.units[i].toSI(x), true
}

// Show gives the value in the bare unit, without the unit, rounded to what such
// a reading supports: a fixed number of decimals at most, and no more figures than it has.
func (f Field) Show(si float64) string {
	x := f.units[0].fromSI(si)
	return f.format(x, f.decimalsFor(x, f.decimals, f.mostFigures()))
}

// ShowIn gives the value in another unit that the field accepts, without the
// unit. It keeps enough figures that typing it back in that unit gives the same
// Show. ok is false where the unit is not accepted.
func (f Field) ShowIn(unit string, si float64) (text string, ok bool) {
	i, ok := f.find.find(unit)
	if !ok {
		return "", false
	}
	if i == 0 {
		return f.Show(si), true
	}
	x := f.units[i].fromSI(si)
	decimals := f.decimals
	if !f.relative {
		// One step of the last shown decimal of the bare unit, in this one.
		step := math.Pow10(-f.decimals) * f.units[0].factor / f.units[i].factor
		decimals = max(0, int(math.Ceil(-math.Log10(step)-1e-9)))
	}
	if f.units[i].offset == 0 && f.units[0].offset == 0 {
		decimals = f.decimalsFor(x, decimals, f.mostFigures()+1)
	}
	// A zero point that is not a whole step apart (K and °C) or a value on the
	// edge of rounding needs a decimal more; one that rounds past a limit is
	// rounded to the inside.
	shown := f.Show(si)
	for more := 0; more <= 3; more++ {
		last := math.Pow10(-(decimals + more))
		for _, candidate := range []float64{x, x - last/2, x + last/2} {
			if text := f.format(candidate, decimals+more); f.keeps(text, i, shown) {
				return text, true
			}
		}
	}
	return f.format(x, decimals), true
}

// keeps reports whether a number typed in units[i] is accepted and shows as
// wanted in the bare unit.
func (f Field) keeps(text string, i int, shown string) bool {
	x, err := strconv.ParseFloat(text, 64)
	if err != nil {
		return false
	}
	v, err := f.check(f.units[i].toSI(x), i, text)
	return err == nil && f.Show(v.SI) == shown
}

// decimalsFor lowers a number of decimals until x, once rounded, has at most so
// many figures. Values of any size, such as a flow, get so many figures however
// small.
func (f Field) decimalsFor(x float64, decimals, figures int) int {
	for range 2 { // again with the rounded value: 9.996 becomes 10.00
		if x == 0 || math.IsInf(x, 0) || math.IsNaN(x) {
			return decimals
		}
		room := figures - 1 - int(math.Floor(math.Log10(math.Abs(x))))
		if f.relative {
			decimals = mostDecimals
		}
		decimals = max(0, min(decimals, room))
		if rounded, err := strconv.ParseFloat(strconv.FormatFloat(x, 'f', decimals, 64), 64); err == nil && rounded != 0 {
			x = rounded
		}
	}
	return decimals
}

// mostDecimals bounds what is written of a value far below any real one.
const mostDecimals = 12

func (f Field) format(x float64, decimals int) string {
	text := strconv.FormatFloat(x, 'f', decimals, 64)
	if f.trim && strings.Contains(text, ".") {
		text = strings.TrimRight(strings.TrimRight(text, "0"), ".")
	}
	if strings.Trim(text, "-0.") == "" {
		text = strings.TrimPrefix(text, "-")
	}
	return text
}

// Nudge moves a value by so many steps, up or down, to the nearest whole step
// and never past what is accepted. Settings of any size (a flow, a pump) take a
// tenth of the step, or a tenth of that, where a step would be over a fifth.
func (f Field) Nudge(si float64, steps int) float64 {
	x, step := f.ToBare(si), f.Step
	for f.relative && math.Abs(x) < 5*step && step > f.Step*1e-6 {
		step /= 10
	}
	moved := math.Round(x/step+float64(steps)) * step
	if exact, err := strconv.ParseFloat(strconv.FormatFloat(moved, 'g', 12, 64), 64); err == nil {
		moved = exact
	}
	moved = min(max(moved, f.limits.low), f.limits.high)
	if f.limits.lowOpen && moved <= f.limits.low {
		return si
	}
	return f.FromBare(moved)
}

// brief writes a limit as a person would: at most five figures, no zeros at the
// end, no exponent.
func brief(x float64) string {
	if x == 0 || math.IsInf(x, 0) || math.IsNaN(x) {
		return strconv.FormatFloat(x, 'f', -1, 64)
	}
	before := int(math.Floor(math.Log10(math.Abs(x)))) + 1
	text := strconv.FormatFloat(x, 'f', max(0, significant+1-before), 64)
	if strings.Contains(text, ".") {
		text = strings.TrimRight(strings.TrimRight(text, "0"), ".")
	}
	return text
}

// ASCII replaces the few characters beyond ASCII that units and labels here
// have by spellings that Parse accepts too: °C is deg C, m³/h is m3/h, µS/cm is
// uS/cm.
func ASCII(text string) string { return ascii.Replace(text) }

var ascii = strings.NewReplacer("°", "deg ", "µ", "u", "³", "3")
