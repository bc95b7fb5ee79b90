package trim

import (
	"math"
	"slices"

	"beckline/dosing"
)

// Move is a change of one feed from one setting to another.
type Move struct {
	Case     dosing.Case // the plant, every addition with a dose; that of the moved one is not looked at
	Addition int         // index of the moved one
	From, To float64     // mol/L as set, 0 or more

	Delivered float64 // share of a set dose that arrives, from a Reason; 0 means all of it
	Offset    float64 // pH that the finished meter reads too high, from a Reason

	Volume float64 // m3 of water between the feed point and the meter; 0 where not known
	Limits Limits
	Reason string // why a limit of the plant's own may be passed; needed where one is
}

// Step is one setting on the way.
type Step struct {
	Dose     float64         // mol/L to set
	PH       float64         // that the meter should show once the water is through
	WaitLow  dosing.Optional // s before that reading counts: three volumes
	WaitHigh dosing.Optional // s after which it must have come: five volumes
	// Outside these the plan is off: go back to the setting before and look for
	// the cause.
	StopLow, StopHigh float64 // pH on the meter
}

// Plan is the way from one setting to another.
type Plan struct {
	Before   float64 // pH that the meter should show now
	Steps    []Step  // the last is the new setting
	WaitLow  dosing.Optional
	WaitHigh dosing.Optional // s for the whole way
	Beyond   []Passed        // limits of the plant's own that it passes, for the stated reason
	Reason   string
}

const (
	leastVolumes = 3.0 // volumes over flow until a step has come through: 95 % of a stirred tank (1 - e^-3)
	mostVolumes  = 5.0 // 99 %
	stopMargin   = 0.2 // pH beyond what a step should give (common practice, no source)
	mostSteps    = 100
)

// Steps plans a change: no step over Limits.StepPH or Limits.StepDose, a wait of
// three to five volumes over the flow after each, the pH that should then show,
// and where to stop. A setting beyond the plant's own limits is refused (code
// plant_limit) unless Move.Reason says why.
func Steps(m Move) (*Plan, error) {
	limits := m.Limits.fill()
	if m.Addition < 0 || m.Addition >= len(m.Case.Additions) {
		return nil, &dosing.Problem{Kind: dosing.BadInput, Code: "missing", Field: "product"}
	}
	for _, v := range []float64{m.From, m.To} {
		if !(v >= 0) || math.IsInf(v, 0) {
			return nil, outside("dose", v, 0, math.Inf(1))
		}
	}
	if !(m.Volume >= 0) || math.IsInf(m.Volume, 0) {
		return nil, outside("volume", m.Volume, 0, math.Inf(1))
	}
	feed, err := m.feed()
	if err != nil {
		return nil, err
	}
	plan := &Plan{}
	if plan.Before, err = feed.pH(m.From); err != nil {
		return nil, err
	}
	end, err := feed.pH(m.To)
	if err != nil {
		return nil, err
	}
	plan.Beyond = limits.passed(m.To, end-m.Offset)
	if err := permit(plan.Beyond, m.Reason); err != nil {
		return nil, err
	}
	if len(plan.Beyond) > 0 {
		plan.Reason = m.Reason
	}
	dose, pH := m.From, plan.Before
	for dose != m.To {
		if len(plan.Steps) == mostSteps {
			return nil, &dosing.Problem{Kind: dosing.NoAnswer, Code: "too_many_steps", Field: "step-ph", Value: dosing.Some(limits.StepPH)}
		}
		next, nextPH, err := feed.next(dose, pH, m, limits)
		if err != nil {
			return nil, err
		}
		plan.Steps = append(plan.Steps, step(next, pH, nextPH, limits, len(plan.Beyond) == 0, m))
		dose, pH = next, nextPH
	}
	plan.wait(m)
	return plan, nil
}

// feed is the plant with the moved addition's dose to be filled in.
type feed struct {
	c        dosing.Case
	addition int
	share    float64
	offset   float64
}

func (m Move) feed() (*feed, error) {
	f := &feed{c: m.Case, addition: m.Addition, share: m.Delivered, offset: m.Offset}
	if f.share <= 0 {
		f.share = 1
	}
	f.c.Target, f.c.TargetAt, f.c.Notes = dosing.Target{}, 0, nil
	f.c.Additions = slices.Clone(f.c.Additions)
	for i := range f.c.Additions {
		f.c.Additions[i].Feed.PumpCapacity = dosing.None
	}
	a := &f.c.Additions[m.Addition]
	if a.Process != dosing.ChemicalFeed {
		return nil, &dosing.Problem{Kind: dosing.BadInput, Code: "missing", Field: "product"}
	}
	a.Solve, a.Residual = false, dosing.None
	return f, nil
}

// pH that the meter shows at a set dose.
func (f *feed) pH(set float64) (float64, error) {
	f.c.Additions[f.addition].Dose = dosing.Some(set * f.share)
	r, err := dosing.Solve(f.c)
	if err != nil {
		return 0, err
	}
	return r.Finished().Figures.PH + f.offset, nil
}

// next is the furthest setting towards the end that keeps within a step.
func (f *feed) next(dose, pH float64, m Move, l Limits) (float64, float64, error) {
	most := l.StepDose * max(m.From, m.To)
	to := m.To
	if math.Abs(to-dose) > most*(1+1e-9) {
		to = dose + math.Copysign(most, to-dose)
	}
	v, err := f.pH(to)
	if err != nil {
		return 0, 0, err
	}
	if math.Abs(v-pH) <= l.StepPH {
		return to, v, nil
	}
	near, far := dose, to
	for range 30 { // to a billionth of the step
		mid := 0.5 * (near + far)
		v, err := f.pH(mid)
		if err != nil {
			return 0, 0, err
		}
		if math.Abs(v-pH) <= l.StepPH {
			near = mid
		} else {
			far = mid
		}
	}
	v, err = f.pH(near)
	return near, v, err
}

// step sets the wait and where to stop, inside the plant's own window where the
// plan keeps to it.
func step(dose, before, pH float64, l Limits, within bool, m Move) Step {
	s := Step{Dose: dose, PH: pH}
	s.StopLow, s.StopHigh = min(before, pH)-stopMargin, max(before, pH)+stopMargin
	if within {
		// A limit that the plant breaks already is what the move mends.
		if v := l.LowPH.Value + m.Offset; l.LowPH.Given && min(before, pH) >= v {
			s.StopLow = max(s.StopLow, v)
		}
		if v := l.HighPH.Value + m.Offset; l.HighPH.Given && max(before, pH) <= v {
			s.StopHigh = min(s.StopHigh, v)
		}
	}
	if flow := m.Case.Readings.Flow; m.Volume > 0 && flow.Given && flow.Value > 0 {
		s.WaitLow = dosing.Some(leastVolumes * m.Volume / flow.Value)
		s.WaitHigh = dosing.Some(mostVolumes * m.Volume / flow.Value)
	}
	return s
}

func (p *Plan) wait(m Move) {
	for _, s := range p.Steps {
		if !s.WaitLow.Given {
			return
		}
		p.WaitLow = dosing.Some(p.WaitLow.Value + s.WaitLow.Value)
		p.WaitHigh = dosing.Some(p.WaitHigh.Value + s.WaitHigh.Value)
	}
}
