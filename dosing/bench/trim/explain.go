package trim

import (
	"cmp"
	"math"
	"slices"

	"beckline/dosing"
)

// Reason is one cause with the size at which it alone explains the reading.
type Reason struct {
	Cause Cause
	Size  float64 // of what really is over what was set or read, less one; pH; mol/L of CO2: see Cause.Unit
	// Deviations is that size over the cause's own standard deviation when
	// nothing is wrong: 1 is every day, 5 is a fault.
	Deviations float64
	Weight     float64         // likelihood against the other causes, 0 to 1, together 1
	Dose       dosing.Optional // mol/L to set to reach the target if this is the cause; none where the target is then out of reach
	Change     float64         // that dose over the one in force, less one; 0 where Dose is none
	Delivered  float64         // share of a set dose that then arrives
	Offset     float64         // pH that the finished meter then reads too high
	Case       dosing.Case     // the plant as it then is: every dose as it arrives, no target
}

// Report is what a reading of the finished water says.
type Report struct {
	Expected   float64 // pH that the meter should have read
	Measured   float64
	Difference float64 // measured less expected
	Allowed    float64 // half-width of the 95 % interval that the tolerances give the difference
	Within     bool    // the difference is no more than the readings allow: nothing to trim

	Implied   dosing.Optional // mol/L of dose that would give the reading, all else as read
	Corrected dosing.Optional // mol/L to set if the dose is what is off, so that the target is met
	Change    float64         // of it over the dose in force, less one
	Low, High dosing.Optional // mol/L, the least and greatest dose that the likely reasons ask for

	Reasons []Reason // likeliest first
}

// likely is the weight from which a reason counts in Low and High.
const likely = 0.05

// Explain compares a reading of the finished water with what the setting in
// force should give. The ranking takes each cause alone and asks how far out of
// its ordinary it would have to be: weight = 1/(1 + deviations^2), the tail of
// Cauchy's distribution, since faults are not normal errors (a rule of thumb,
// common practice, no source). It does not tell causes of one effect apart:
// their tests do.
func Explain(in Input) (*Report, error) {
	p, err := in.plant()
	if err != nil {
		return nil, err
	}
	r := &Report{Measured: in.Measured}
	expected, ok := p.finished(FinishedMeter, 0)
	if !ok {
		return nil, &dosing.Problem{Kind: dosing.Failed, Code: "solver_failed", Field: "case"}
	}
	r.Expected, r.Difference = expected, in.Measured-expected
	r.Allowed = p.allowed()
	r.Within = math.Abs(r.Difference) <= r.Allowed
	total := 0.0
	for _, c := range causes {
		size, ok := p.size(c)
		if !ok {
			continue
		}
		reason := p.reason(c, size)
		total += reason.Weight
		r.Reasons = append(r.Reasons, reason)
		if c == Feed {
			r.Implied = dosing.Some(p.set * (1 + size))
			r.Corrected, r.Change = reason.Dose, reason.Change
		}
	}
	for i := range r.Reasons {
		r.Reasons[i].Weight /= total
	}
	slices.SortStableFunc(r.Reasons, func(a, b Reason) int { return cmp.Compare(b.Weight, a.Weight) })
	for _, q := range r.Reasons {
		if q.Weight < likely || !q.Dose.Given {
			continue
		}
		if !r.Low.Given || q.Dose.Value < r.Low.Value {
			r.Low = q.Dose
		}
		if !r.High.Given || q.Dose.Value > r.High.Value {
			r.High = q.Dose
		}
	}
	return r, nil
}

// allowed adds the ordinary errors' effects on the finished reading in squares.
func (p *plant) allowed() float64 {
	sum := 0.0
	for _, c := range causes {
		if !p.applies(c) {
			continue
		}
		low, high := p.span(c)
		s := p.usual(c)
		a, ok1 := p.finished(c, min(s, high))
		b, ok2 := p.finished(c, max(-s, low))
		if !ok1 || !ok2 {
			continue
		}
		// A cause that goes one way only counts its way.
		d := (a - b) / 2
		if low == 0 || high == 0 {
			d = a - b
		}
		sum += d * d
	}
	return normal95 * math.Sqrt(sum)
}

func (p *plant) reason(c Cause, size float64) Reason {
	r := Reason{Cause: c, Size: size, Delivered: 1}
	r.Deviations = math.Abs(size) / p.usual(c)
	r.Weight = 1 / (1 + r.Deviations*r.Deviations)
	switch c {
	case Feed, Strength:
		r.Delivered = 1 + size
	case Flow:
		r.Delivered = 1 / (1 + size)
	case FinishedMeter:
		r.Offset = size
	}
	r.Case = p.with(c, size)
	switch {
	case !c.changesDose():
		r.Dose = dosing.Some(p.set)
	case r.Delivered > 0 && p.target.Kind != dosing.NoTarget:
		ask := r.Case
		ask.Additions = slices.Clone(ask.Additions)
		ask.Additions[p.addition].Dose, ask.Additions[p.addition].Solve = dosing.None, true
		ask.Target, ask.TargetAt = p.target, p.targetAt
		if again, err := dosing.Solve(ask); err == nil {
			r.Dose = dosing.Some(again.Dose().Dose / r.Delivered)
			r.Change = r.Dose.Value/p.set - 1
		}
	}
	return r
}
