package tui

import (
	"strings"
	"testing"

	"beckline/dosing"
)

// TestLimitsPassedAreAlarmsInWords enters each limit so that the answer passes
// it, and then so that it does not.
func TestLimitsPassedAreAlarmsInWords(t *testing.T) {
	toUse := []string{"Right", "End"}
	toPH := []string{"Right", "Right", "Home", "Down", "Down"}
	toSodium := append(append([]string{}, toPH...), "Down")
	for _, c := range []struct {
		name      string
		walk      []string
		over, not string
		words     []string
	}{
		{"certified maximum use level", toUse, "20", "30", []string{"ALARM", "caustic-25: 26.9 mg/L is over 20", "maximum use level"}},
		{"use level with its unit", toUse, "100 lb/MG", "400 lb/MG", []string{"ALARM", "maximum use level"}},
		{"pH ceiling", toPH, "8.2", "8.6", []string{"ALARM", "pH 8.40 of the finished water is over your limit of 8.20"}},
		{"sodium unknown", toSodium, "9", "", []string{"ALARM", "sodium of the finished water is not known"}},
	} {
		d := demo(t).own()
		d.keys(c.walk...).keys(c.over, "Enter").shows(c.words...)
		d.keys("w").shows("ALARM: ").keys("Esc", "Home").keys(c.walk[:0]...)
		if d.m.good.result == nil || !d.m.good.solved {
			t.Errorf("%s: an alarm took the answer away", c.name)
		}
		if c.not == "" {
			continue
		}
		d = demo(t).own()
		d.keys(c.walk...).keys(c.not, "Enter").hides("ALARM")
	}
	// Sodium: 4 mg/L in the raw water, and what 6.73 mg/L of NaOH brings: 3.87.
	d := demo(t).own()
	for d.m.place().name != "sodium" {
		d.keys("Down")
	}
	d.keys("4", "Enter").keys(toSodium...)
	d.keys("7.8", "Enter").shows("ALARM", "sodium 7.87 mg/L Na of the finished water is over your limit")
	d.keys("8", "Enter").hides("ALARM")
}

func TestBadLimitsSayWhatIsAccepted(t *testing.T) {
	for _, text := range []string{"x", "-4", "0", "20 mg/L NaOH", "1e9"} {
		d := demo(t).own().keys("Right", "End", "Enter", text, "Enter")
		d.shows("max. use level", "accepted", "!▸max. use level", "OLD FIGURES")
	}
	demo(t).own().keys("Right", "Right", "End", "Up", "99", "Enter").shows("pH at most", "accepted: 0 to 14")
}

// TestLimitsChangeNoAnswer checks that limits are held against the answer only.
func TestLimitsChangeNoAnswer(t *testing.T) {
	d := demo(t).own()
	before := d.solved()
	d.keys("Right", "End", "5", "Enter", "Right", "End", "3", "Enter", "Up", "7", "Enter")
	if d.solved() != before {
		t.Errorf("dose %v with limits, %v without", d.solved(), before)
	}
	if n := len(d.m.good.alarms); n != 3 {
		t.Errorf("%d alarms, want three: %+v", n, d.m.good.alarms)
	}
	d.keys("w")
	if n := strings.Count(d.screen(), "ALARM"); n != 3 {
		t.Errorf("%d alarms on their page:\n%s", n, d.screen())
	}
	d.keys("Esc", "u", "u", "u").hides("ALARM")
}

// TestWarningsThatAreAlarms checks that every alarm code is one the solver has a
// sentence for, and that an alarm stands before any warning.
func TestWarningsThatAreAlarms(t *testing.T) {
	for code := range alarms {
		d := demo(t).own()
		r := *d.m.good.result
		r.Warnings = []dosing.Warning{{Code: "low_buffer"}, {Code: code, Field: "caustic-25"}}
		d.m.good.result, d.m.good.alarms = &r, limitsPassed(d.m.sheet, &r)
		d.shows("ALARM 1 of 2")
		if text := d.m.good.alarms[0].text; strings.Contains(text, strings.ReplaceAll(code, "_", " ")) && code != "product_may_freeze" {
			t.Errorf("%s is said as its code: %s", code, text)
		}
	}
}
