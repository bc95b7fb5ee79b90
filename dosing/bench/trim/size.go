package trim

import (
	"math"
	"slices"

	"beckline/carbonate"
	"beckline/dosing"
)

// with is the plant's case as it would be if a cause had a size: for Feed and
// Strength +0.05 is 5 % more than set, for Flow 5 % more water than read, for
// Alkalinity 5 % more than read, for RawMeter 0.1 is a true pH 0.1 above the
// reading, for RawCO2 mol/L that the true water has more than the sample.
func (p *plant) with(c Cause, size float64) dosing.Case {
	k := p.c
	k.Additions = slices.Clone(p.c.Additions)
	r := &k.Readings
	switch c {
	case Feed, Strength:
		k.Additions[p.addition].Dose.Value *= 1 + size
	case Flow:
		for i := range k.Additions {
			if k.Additions[i].Dose.Given {
				k.Additions[i].Dose.Value /= 1 + size
			}
		}
	case RawMeter:
		r.PH.Value += size
	case Alkalinity:
		r.Alkalinity.Value *= 1 + size
	case RawCO2:
		r.DIC = dosing.Some(p.in.Result.Raw().Figures.DIC + size)
		r.PH = dosing.None
	}
	return k
}

// finished is what the finished meter would read if a cause had a size.
func (p *plant) finished(c Cause, size float64) (float64, bool) {
	r, err := dosing.Solve(p.with(c, size))
	if err != nil {
		return 0, false
	}
	w := r.Finished().Figures.Water
	if c == FinishedCO2 {
		w.Totals[carbonate.Carbon] -= size // lost before it was read
		if w.Totals[carbonate.Carbon] < 0 {
			return 0, false
		}
	}
	s, err := p.reading.Solve(w)
	if err != nil {
		return 0, false
	}
	if c == FinishedMeter {
		return s.PH + size, true
	}
	return s.PH, true
}

// usual is the standard deviation of a cause when nothing is wrong.
func (p *plant) usual(c Cause) float64 {
	t := &p.tol
	switch c {
	case Feed:
		return t.Dose / normal95
	case Strength:
		return t.Strength / normal95
	case Flow:
		return t.Flow / normal95
	case FinishedMeter:
		return t.FinishedPH / normal95
	case RawMeter:
		return t.RawPH / normal95
	case Alkalinity:
		return t.Alkalinity / normal95
	}
	return t.FreeCO2 / normal95
}

// span bounds the sizes that are looked at.
func (p *plant) span(c Cause) (low, high float64) {
	switch c {
	case Feed, Strength:
		return -1, 2
	case Flow:
		return -0.75, 9
	case FinishedMeter:
		return -14, 14
	case RawMeter:
		return -2, 2
	case Alkalinity:
		return -0.95, 2
	case RawCO2:
		// A sample loses CO2 where it holds more than the air would leave it.
		raw := &p.in.Result.Raw().Figures
		if raw.FreeCO2 > p.air {
			return 0, mostReasonableCO
		}
		return -raw.DIC, mostReasonableCO
	case FinishedCO2:
		fin := &p.in.Result.Finished().Figures
		if fin.FreeCO2 > p.air {
			return 0, fin.DIC
		}
		return -mostReasonableCO, 0
	}
	return 0, 0
}

const (
	doublings = 60
	halvings  = 60
	closeness = 1e-7 // pH
)

// size finds the least size, on either side of none, at which a cause alone
// explains the reading; ok is false where it cannot. The pH follows every cause
// without turning back near no size, so widening steps bracket it.
func (p *plant) size(c Cause) (size float64, ok bool) {
	want := p.in.Measured
	now, ok := p.finished(c, 0)
	if !ok {
		return 0, false
	}
	if c == FinishedMeter {
		return want - now, true
	}
	if !p.applies(c) {
		return 0, false
	}
	low, high := p.span(c)
	step := 0.25 * p.usual(c)
	for _, direction := range []float64{1, -1} {
		last := 0.0
		for i := range doublings {
			next := direction * step * math.Pow(1.5, float64(i))
			end := next >= high || next <= low
			next = min(max(next, low), high)
			v, ok := p.finished(c, next)
			if !ok {
				break
			}
			if (want-v)*(want-now) <= 0 {
				return p.close(c, last, next, want-now), true
			}
			// Going away from the reading: the other direction it is.
			if math.Abs(want-v) > math.Abs(want-now)+closeness {
				break
			}
			if end || next == last {
				break
			}
			last = next
		}
	}
	return 0, false
}

// applies tells whether the case has the reading that a cause is about: the
// carbon may have been measured, and a blend has no raw readings of its own.
func (p *plant) applies(c Cause) bool {
	r := &p.c.Readings
	switch c {
	case RawMeter:
		return r.PH.Given && !r.DIC.Given
	case Alkalinity:
		return r.Alkalinity.Given
	case RawCO2:
		return r.PH.Given && !r.DIC.Given
	}
	return true
}

func (p *plant) close(c Cause, before, past, side float64) float64 {
	for range halvings {
		mid := 0.5 * (before + past)
		v, ok := p.finished(c, mid)
		if !ok {
			break
		}
		if math.Abs(v-p.in.Measured) < closeness {
			return mid
		}
		if (p.in.Measured-v)*side > 0 {
			before = mid
		} else {
			past = mid
		}
	}
	return past
}
