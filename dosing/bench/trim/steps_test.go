package trim

import (
	"errors"
	"math"
	"testing"

	"beckline/dosing"
)

func move(t *testing.T) Move {
	r := soft(t)
	c := fixed(r.Case, r, 1)
	set := r.Stations[2].Dose
	return Move{Case: c, Addition: 1, From: 0.6 * set, To: set, Volume: 900}
}

func TestSteps(t *testing.T) {
	m := move(t)
	for _, m := range []Move{m, {Case: m.Case, Addition: 1, From: m.To, To: 0.7 * m.To, Volume: 900}, {Case: m.Case, Addition: 1, From: 0, To: m.To}} {
		plan, err := Steps(m)
		if err != nil {
			t.Fatal(err)
		}
		dose, pH := m.From, plan.Before
		biggest := 0.1 * max(m.From, m.To)
		for i, s := range plan.Steps {
			if math.Abs(s.Dose-dose) > biggest*(1+1e-6) || math.Abs(s.PH-pH) > 0.3+1e-6 {
				t.Errorf("step %d: dose %.3g, pH %.3f", i, s.Dose-dose, s.PH-pH)
			}
			if (s.Dose-dose)*(m.To-m.From) <= 0 {
				t.Errorf("step %d does not go towards the end", i)
			}
			if s.StopLow > min(pH, s.PH) || s.StopHigh < max(pH, s.PH) || s.StopHigh-s.StopLow > 0.3+2*stopMargin+1e-6 {
				t.Errorf("step %d: stop at %.2f and %.2f for %.2f to %.2f", i, s.StopLow, s.StopHigh, pH, s.PH)
			}
			// The pH by the whole program at that dose.
			c := m.Case
			c.Additions = append([]dosing.Addition(nil), c.Additions...)
			c.Additions[1].Dose = dosing.Some(s.Dose)
			r, err := dosing.Solve(c)
			if err != nil || math.Abs(r.Finished().Figures.PH-s.PH) > 1e-9 {
				t.Errorf("step %d: pH %.4f, %v", i, s.PH, err)
			}
			if m.Volume == 0 {
				if s.WaitLow.Given {
					t.Error("a wait without a volume")
				}
			} else if want := 3 * 900 / (240.0 / 3600); math.Abs(s.WaitLow.Value-want) > 1e-6 || math.Abs(s.WaitHigh.Value-want*5/3) > 1e-6 {
				t.Errorf("wait %g to %g s, want %g", s.WaitLow.Value, s.WaitHigh.Value, want)
			}
			dose, pH = s.Dose, s.PH
		}
		if n := len(plan.Steps); dose != m.To || n < 3 {
			t.Errorf("%d steps end at %g of %g", n, dose, m.To)
		}
		if m.Volume > 0 && math.Abs(plan.WaitLow.Value-float64(len(plan.Steps))*plan.Steps[0].WaitLow.Value) > 1e-6 {
			t.Errorf("waits %g s in all", plan.WaitLow.Value)
		}
	}
	if plan, err := Steps(Move{Case: m.Case, Addition: 1, From: m.To, To: m.To}); err != nil || len(plan.Steps) != 0 {
		t.Errorf("nothing to change: %+v, %v", plan, err)
	}
}

// The plant's own step is kept, and a step without a limit on the pH is one of
// the dose alone.
func TestOwnSteps(t *testing.T) {
	m := move(t)
	m.Limits.StepPH = 0.1
	plan, err := Steps(m)
	if err != nil {
		t.Fatal(err)
	}
	pH := plan.Before
	for _, s := range plan.Steps {
		if math.Abs(s.PH-pH) > 0.1+1e-6 {
			t.Errorf("a step of %.3f pH", s.PH-pH)
		}
		pH = s.PH
	}
	m.Limits = Limits{StepPH: 14, StepDose: 1}
	if plan, err = Steps(m); err != nil || len(plan.Steps) != 1 {
		t.Errorf("%d steps, %v", len(plan.Steps), err)
	}
}

// What arrives and what the meter shows change the expected pH, not the setting.
func TestStepsWithAReason(t *testing.T) {
	m := move(t)
	m.Delivered, m.Offset = 0.9, 0.2
	plan, err := Steps(m)
	if err != nil {
		t.Fatal(err)
	}
	c := m.Case
	c.Additions = append([]dosing.Addition(nil), c.Additions...)
	c.Additions[1].Dose = dosing.Some(0.9 * m.To)
	r, err := dosing.Solve(c)
	if err != nil {
		t.Fatal(err)
	}
	last := plan.Steps[len(plan.Steps)-1]
	if want := r.Finished().Figures.PH + 0.2; math.Abs(last.PH-want) > 1e-9 {
		t.Errorf("pH %.4f on the meter, want %.4f", last.PH, want)
	}
}

func TestPlantLimits(t *testing.T) {
	for name, c := range map[string]struct {
		limits Limits
		passed string
	}{
		"pH too high":   {Limits{HighPH: dosing.Some(8.5)}, "high-ph"},
		"too much":      {Limits{MostDose: dosing.Some(1e-4)}, "most-dose"},
		"pH too low":    {Limits{LowPH: dosing.Some(9.0)}, "low-ph"},
		"within limits": {Limits{LowPH: dosing.Some(7.0), HighPH: dosing.Some(9.0), MostDose: dosing.Some(1e-3)}, ""},
	} {
		m := move(t)
		m.Limits = c.limits
		plan, err := Steps(m)
		if c.passed == "" {
			if err != nil || len(plan.Beyond) != 0 || plan.Reason != "" {
				t.Errorf("%s: %v", name, err)
				continue
			}
			for _, s := range plan.Steps {
				if s.StopHigh > 9+1e-9 {
					t.Errorf("%s: stops only at %.2f", name, s.StopHigh)
				}
			}
			continue
		}
		var p *dosing.Problem
		if !errors.As(err, &p) || p.Code != "plant_limit" || p.Field != c.passed || p.Kind != dosing.NoAnswer {
			t.Errorf("%s without a reason: %v", name, err)
		}
		m.Reason = "  "
		if _, err := Steps(m); err == nil {
			t.Errorf("%s: spaces are no reason", name)
		}
		m.Reason = "duty manager, lead sampling week"
		plan, err = Steps(m)
		if err != nil || len(plan.Beyond) != 1 || plan.Beyond[0].Limit != c.passed || plan.Reason != m.Reason {
			t.Errorf("%s with a reason: %+v, %v", name, plan, err)
		}
	}
}

func TestStepsRefuse(t *testing.T) {
	m := move(t)
	for name, c := range map[string]struct {
		change func(m *Move)
		field  string
	}{
		"no such addition": {func(m *Move) { m.Addition = 5 }, "product"},
		"negative dose":    {func(m *Move) { m.From = -1 }, "dose"},
		"no dose":          {func(m *Move) { m.To = math.NaN() }, "dose"},
		"negative volume":  {func(m *Move) { m.Volume = -3 }, "volume"},
		"tiny steps":       {func(m *Move) { m.Limits.StepPH = 1e-4 }, "step-ph"},
	} {
		q := m
		c.change(&q)
		var p *dosing.Problem
		if _, err := Steps(q); !errors.As(err, &p) || p.Field != c.field {
			t.Errorf("%s: %v", name, err)
		}
	}
}
