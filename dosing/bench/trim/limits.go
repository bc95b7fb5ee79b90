package trim

import (
	"strings"

	"beckline/dosing"
)

// Limits are what one change of the feed may do. The first two have defaults
// (common practice, no source); the rest are the plant's own and bind only where
// given.
type Limits struct {
	StepPH   float64         // pH, largest change in one step; 0 means 0.3
	StepDose float64         // share of the larger of the old and the new dose, largest change in one step; 0 means 0.1
	LowPH    dosing.Optional // finished pH must stay at or above
	HighPH   dosing.Optional // and at or below
	MostDose dosing.Optional // mol/L of the chemical
}

const (
	defaultStepPH   = 0.3
	defaultStepDose = 0.1
)

func (l Limits) fill() Limits {
	if l.StepPH <= 0 {
		l.StepPH = defaultStepPH
	}
	if l.StepDose <= 0 {
		l.StepDose = defaultStepDose
	}
	return l
}

// Passed names a limit that a plan goes beyond.
type Passed struct {
	Limit string // low-ph, high-ph, most-dose
	Value float64
	Bound float64
}

// passed lists the plant's own limits that a setting would break.
func (l Limits) passed(dose, pH float64) []Passed {
	var out []Passed
	if l.LowPH.Given && pH < l.LowPH.Value {
		out = append(out, Passed{"low-ph", pH, l.LowPH.Value})
	}
	if l.HighPH.Given && pH > l.HighPH.Value {
		out = append(out, Passed{"high-ph", pH, l.HighPH.Value})
	}
	if l.MostDose.Given && dose > l.MostDose.Value {
		out = append(out, Passed{"most-dose", dose, l.MostDose.Value})
	}
	return out
}

// permit refuses what goes beyond the plant's own limits unless a reason is
// stated, in words that go into the record.
func permit(beyond []Passed, reason string) error {
	if len(beyond) == 0 || strings.TrimSpace(reason) != "" {
		return nil
	}
	b := beyond[0]
	p := &dosing.Problem{Kind: dosing.NoAnswer, Code: "plant_limit", Field: b.Limit, Value: dosing.Some(b.Value),
		Accepted: "a setting within the plant's own limit, or a stated reason for going beyond it"}
	if b.Limit == "low-ph" {
		p.Low = dosing.Some(b.Bound)
	} else {
		p.High = dosing.Some(b.Bound)
	}
	return p
}
