package tui

import (
	"strings"
	"testing"
)

// TestSpokenScreen walks through the linear form.
func TestSpokenScreen(t *testing.T) {
	d := demo(t)
	d.m.look = look{glyphs: asciiGlyphs, linear: true}
	all := func() string {
		l := d.m.speak()
		return strings.Join(append(l.Statements, l.Prompt), "\n")
	}
	has := func(texts ...string) {
		t.Helper()
		for _, text := range texts {
			if !strings.Contains(all(), text) {
				t.Errorf("not said: %q in\n%s", text, all())
			}
		}
	}
	has("Demo plant", "Set the pump to 12.0 L/h", "raw water: pH 6.28", "Caustic soda burns", "raw water, pH: 6.28")
	d.keys("7.0")
	has("typing pH: 7.0", "Still needed: pH, alkalinity, temperature")
	d.keys("Enter", "30", "Enter", "10", "Enter", "240", "Enter")
	has("Set the pump to 5.07 L/h", "that is 84.6 mL/min", "raw water, pH read at: not entered")
	d.keys("Home", "1,200", "Enter")
	has("Old figures, do not set", "can be read in two ways")
	d.keys("u", "Home", "Down", "Down", "Down", "BS")
	has("Dose, as product 26.9 mg/L", "that is 6.73 mg/L as NaOH, no flow given", "caustic-25: dose 6.73 mg/L as NaOH")
	d.keys("u", "p", "soda")
	has("products, search: soda", "1 of 4: soda-ash")
	d.keys("Esc", "?")
	has("help; Esc goes back", "Walking")
	for _, r := range all() {
		if r > 0x7e {
			t.Errorf("%q is not ASCII", r)
		}
	}
}
