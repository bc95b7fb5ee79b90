package curve

import (
	"math"
	"strconv"

	"gonum.org/v1/plot"
)

// plainTicks labels an axis at 5 to 10 round numbers, 1, 2 or 5 times a power of
// ten apart, all with the same decimals.
type plainTicks struct{}

// Ticks gives the marks between two ends.
func (plainTicks) Ticks(low, high float64) []plot.Tick {
	span := high - low
	if !(span > 0) || math.IsInf(span, 0) {
		return nil
	}
	decade := math.Pow(10, math.Floor(math.Log10(span)))
	step := decade
	for _, f := range []float64{0.1, 0.2, 0.5, 1, 2} {
		if step = f * decade; span/step <= 10 {
			break
		}
	}
	decimals := max(0, -int(math.Floor(math.Log10(step)+1e-9)))
	var ticks []plot.Tick
	for i := math.Ceil(low/step - 1e-9); i*step <= high+1e-9*step; i++ {
		text := strconv.FormatFloat(i*step, 'f', decimals, 64)
		if i == 0 { // never -0
			text = strconv.FormatFloat(0, 'f', decimals, 64)
		}
		ticks = append(ticks, plot.Tick{Value: i * step, Label: text})
	}
	return ticks
}
