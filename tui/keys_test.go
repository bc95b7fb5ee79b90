package tui

import (
	"strings"
	"testing"
	"unicode/utf8"
)

func TestKeysAreBoundOnceAndExplained(t *testing.T) {
	for s := range states {
		seen := map[string]string{}
		for _, b := range bindings[s] {
			for _, k := range b.keys {
				if other, twice := seen[k]; twice {
					t.Errorf("%s: %q is bound to %q and %q", stateNames[s], k, other, b.help)
				}
				seen[k] = b.help
			}
			if len(b.keys) > 0 && (b.do == nil || b.help == "") {
				t.Errorf("%s: %s does nothing or is not explained", stateNames[s], b.shown)
			}
			if len(b.keys) == 0 && b.do != nil {
				t.Errorf("%s: nothing reaches %s", stateNames[s], b.shown)
			}
		}
	}
}

// TestBottomLinesFit checks that the state and all keys meant for the bottom
// line are there at the least width.
func TestBottomLinesFit(t *testing.T) {
	for s := range states {
		d := demo(t)
		d.m.state = s
		lines := strings.Split(d.screen(), "\n")
		last := lines[len(lines)-1]
		if !strings.Contains(last, stateNames[s]) || utf8.RuneCountInString(last) > leastWidth {
			t.Errorf("%s: %q", stateNames[s], last)
		}
		for _, b := range bindings[s] {
			if b.short != "" && !strings.Contains(last, b.shown+" "+b.short) {
				t.Errorf("%s: the bottom line lacks %q: %q", stateNames[s], b.shown+" "+b.short, last)
			}
		}
	}
}

// TestEveryWalkingKeyShowsOnTheScreen presses each key of the help page while
// walking and checks that the screen shows it.
func TestEveryWalkingKeyShowsOnTheScreen(t *testing.T) {
	prepared := func() *driver {
		d := demo(t).own().keys("a", "alum-dry", "Enter", "2", "Enter", "a", "lime", "Enter", "1", "Enter")
		d.m.hooks.repaint = func() {}
		d.keys("Left", "Left", "Left", "Home", "Down", "+", "u") // on the alkalinity, with something to do again
		return d
	}
	for _, b := range bindings[walking] {
		for _, k := range b.keys {
			switch k {
			case "ctrl+c", "ctrl+z", "ctrl+l": // see the tests on a real terminal
				continue
			}
			d := prepared()
			switch k {
			case "left", "x", "[":
				d.keys("Right", "Right")
			case "]":
				d.keys("Right")
			}
			before := d.screen()
			d.m.press(k)
			if d.screen() == before && k != "u" {
				t.Errorf("%s (%s) changes nothing on the screen:\n%s", b.shown, b.help, before)
			}
		}
	}
}

func TestMissingCalciumForAnIndex(t *testing.T) {
	d := demo(t).own().keys("t", "saturation", "Enter", "Enter", "-0.2", "Enter")
	d.shows("STILL NEEDED", "calcium").hides("OLD FIGURES")
	d.keys("Left", "Left", "Down", "12", "Enter").shows("SET THE PUMP TO", "for SI -0.20")
}

func TestPumpTooSmall(t *testing.T) {
	demo(t).keys("Right", "Down", "Down", "Down", "5", "Enter").shows("PUMP TOO SMALL", "nearest is pH")
}

func TestTargetMet(t *testing.T) {
	demo(t).keys("Right", "Right", "Down", "6.28", "Enter", "Enter").shows("TARGET ALREADY MET")
}
