package tui

import (
	"math"
	"testing"
)

func TestUnitsSwitchLosesNothing(t *testing.T) {
	d := demo(t).own().keys("Right", "Down", "Down", "12.3", "Enter", "25.7", "Enter")
	before, values := d.solved(), d.m.sheet.clone().Values
	for range 6 {
		d.keys("m")
		if d.solved() != before {
			t.Errorf("%s: dose %v, before %v", d.m.sheet.Units, d.solved(), before)
		}
		for name, text := range values {
			if d.m.sheet.Values[name] != text {
				t.Errorf("%s: %s became %q", d.m.sheet.Units, name, d.m.sheet.Values[name])
			}
		}
	}
	d.keys("Left", "m").shows("50.0     °F", "1.5216   MGD", "US gal/h")
	d.keys("m").shows("10       °C", "1.5216   MGD", "US gal/h")
	d.keys("m").shows("10       °C", "240      m³/h", "%")
}

func TestBareNumbersAreInTheUnitsShown(t *testing.T) {
	d := demo(t).keys("m", "7.0", "Enter", "30", "Enter", "50", "Enter", "1.5", "Enter")
	r := d.m.good.result.Case.Readings
	if math.Abs(r.Kelvin.Value-283.15) > 1e-9 {
		t.Errorf("50 in °F is %v K", r.Kelvin.Value)
	}
	// 1 US MGD is 3785.411784 m3 a day: the US liquid gallon is 231 cubic inches.
	if want := 1.5 * 3785.411784 / 86400; math.Abs(r.Flow.Value-want) > 1e-12 {
		t.Errorf("1.5 in MGD is %v m3/s, want %v", r.Flow.Value, want)
	}
	d.keys("m", "m").shows("10.0     °C", "236.6    m³/h")
	d.keys("Up", "Enter").shows("1.5 MGD (US)") // opened, it is what was typed
}

func TestUnitOfOnesOwnIsEchoed(t *testing.T) {
	d := demo(t).own().keys("Home", "Down", "0.6 meq/L", "Enter")
	d.shows("alkalinity: 0.6 meq/L = 30.0 mg/L CaCO3")
	if d.m.sheet.Values["alkalinity"] != "0.6 meq/L" {
		t.Errorf("kept as %q", d.m.sheet.Values["alkalinity"])
	}
}

func TestNumberPart(t *testing.T) {
	for text, want := range map[string]string{
		"7.0": "7.0", "2 meq/L": "2", "1e3": "1e3", "1.5E-2 mg/L": "1.5E-2", "50 °F": "50", "12%": "12", "-0.3": "-0.3", "3 °e": "3", "3 e": "3", "5e": "5",
	} {
		if got := numberPart(text); got != want {
			t.Errorf("numberPart(%q) = %q, want %q", text, got, want)
		}
	}
}
