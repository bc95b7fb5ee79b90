package feed

import (
	"math"

	"gonum.org/v1/gonum/stat/distuv"
)

// Output is what the pump gives at a stroke and speed (shares, above 0 to 1) by
// its line, m3/s, never below 0; half is the half-width of the 95 % interval of
// the line there, 0 where the draws cannot tell it. The error is *BadInput.
func (c *Calibration) Output(stroke, speed float64) (rate, half float64, err error) {
	if err := knobs(stroke, speed); err != nil {
		return 0, 0, err
	}
	x := stroke * speed
	if c.freedom > 0 && c.spread > 0 {
		student := distuv.StudentsT{Sigma: 1, Nu: float64(c.freedom)}.Quantile(confidence95)
		d := x - c.mean
		half = student * c.Scatter * math.Sqrt(1/float64(len(c.Draws))+d*d/c.spread)
	}
	return max(c.Zero+c.Slope*x, 0), half, nil
}

// Setting is where to set a pump for a wanted feed.
type Setting struct {
	Stroke, Speed float64 // shares; the speed that gives the feed exactly
	Rounded       float64 // speed on the nearest step of the pump
	Output        float64 // m3/s at Rounded
	Off           float64 // Output over the wanted feed, less one
	Codes         []string
}

// SettingFor finds the speed at a stroke that gives a feed in m3/s. step is one
// step of the speed (0.01 for whole per cent), 0 for a pump without steps. Errors:
// *BadInput; *TooSmall where full speed is not enough.
func (c *Calibration) SettingFor(rate, stroke, step float64) (Setting, error) {
	if !(rate > 0) || math.IsInf(rate, 0) {
		return Setting{}, &BadInput{Field: "feed", Value: rate, Low: 0, High: math.MaxFloat64}
	}
	if !(step >= 0 && step < 1) {
		return Setting{}, &BadInput{Field: "step", Value: step, Low: 0, High: 1}
	}
	if err := knobs(stroke, 1); err != nil {
		return Setting{}, err
	}
	most := c.Zero + c.Slope*stroke
	if rate > most*(1+rounding) {
		return Setting{}, &TooSmall{Fraction: rate / most, Needed: rate, Capacity: most}
	}
	s := Setting{Stroke: stroke, Speed: max((rate-c.Zero)/(c.Slope*stroke), 0)}
	s.Rounded = s.Speed
	if step > 0 {
		s.Rounded = min(math.Round(s.Speed/step)*step, 1)
	}
	s.Output = max(c.Zero+c.Slope*stroke*s.Rounded, 0)
	s.Off = s.Output/rate - 1
	x := stroke * s.Rounded
	if x < c.Least*(1-rounding) || x > c.Most*(1+rounding) {
		s.Codes = append(s.Codes, CodeBeyondDrawn)
	}
	if s.Output < turndown*(c.Zero+c.Slope) {
		s.Codes = append(s.Codes, CodePumpBelowTurndown)
	}
	if s.Rounded < leastOfAKnob || stroke < leastOfAKnob {
		s.Codes = append(s.Codes, CodeStrokeOrSpeedAt)
	}
	return s, nil
}

// Range is the steady range of the pump at a stroke, m3/s: from a tenth of its
// full output (or of its speed, where that gives more) to full speed, and the
// ratio of the two. Below a tenth feed pulses (common practice, no source).
func (c *Calibration) Range(stroke float64) (least, most, ratio float64, err error) {
	if err := knobs(stroke, 1); err != nil {
		return 0, 0, 0, err
	}
	most = c.Zero + c.Slope*stroke
	least = max(turndown*(c.Zero+c.Slope), c.Zero+c.Slope*stroke*leastOfAKnob)
	if least > most {
		return most, most, 1, nil
	}
	return least, most, most / least, nil
}

// Resolution is what one step of the pump does.
type Resolution struct {
	Rate  float64 // m3/s
	Share float64 // of the feed
	Dose  float64 // in the unit of the dose given
	PH    float64 // by the slope given
}

// Resolution tells what one step of the speed does at a setting where the pump
// gives a dose (in any one unit); pHPerDose is the slope of the finished pH with
// the dose in that unit, from whoever knows the water. The error is *BadInput.
func (c *Calibration) Resolution(stroke, speed, step, dose, pHPerDose float64) (Resolution, error) {
	rate, _, err := c.Output(stroke, speed)
	if err != nil {
		return Resolution{}, err
	}
	if !(step > 0 && step <= 1) {
		return Resolution{}, &BadInput{Field: "step", Value: step, Low: 0, High: 1}
	}
	if !(dose >= 0) || math.IsInf(dose, 0) {
		return Resolution{}, &BadInput{Field: "dose", Value: dose, Low: 0, High: math.MaxFloat64}
	}
	if rate == 0 {
		return Resolution{}, &BadInput{Field: "speed", Value: speed, Low: 0, High: 1}
	}
	r := Resolution{Rate: c.Slope * stroke * step}
	r.Share = r.Rate / rate
	r.Dose = r.Share * dose
	r.PH = r.Dose * pHPerDose
	return r, nil
}

// Against compares the full output with that of an earlier calibration: the
// change as a share, and whether it has dropped by more than a tenth.
func (c *Calibration) Against(last *Calibration) (change float64, code string) {
	change = (c.Zero+c.Slope)/(last.Zero+last.Slope) - 1
	if change < -droppedBy {
		return change, CodeOutputDropped
	}
	return change, ""
}
