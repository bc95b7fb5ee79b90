package tui

import (
	"testing"

	"beckline/dosing"
)

// solved is the dose shown, mol/L, or -1.
func (d *driver) solved() float64 {
	if d.m.good.result == nil || !d.m.good.solved {
		return -1
	}
	return d.m.good.result.Dose().Dose
}

func TestFourReadingsGiveTheDose(t *testing.T) {
	d := demo(t).own()
	want, err := dosing.Solve(d.m.good.result.Case)
	if err != nil {
		t.Fatal(err)
	}
	r := d.m.good.result.Case.Readings
	if r.PH.Value != 7.0 || r.Kelvin.Value != 283.15 || r.Calcium.Given {
		t.Errorf("the case is not what was typed: %+v", r)
	}
	if d.solved() != want.Dose().Dose {
		t.Errorf("dose %v, the solver says %v", d.solved(), want.Dose().Dose)
	}
	d.shows("SET THE PUMP TO", "L/h", "check them")
}

func TestDemoNumbersNeverMixWithRealOnes(t *testing.T) {
	d := demo(t)
	d.keys("Down", "Down", "1") // one digit into the temperature
	d.hides("DEMO", "6.28", "13.0", "240", "SET THE PUMP TO").shows("STILL NEEDED")
	if n := d.m.sheet.readings(); n != 0 {
		t.Errorf("%d readings of the demo plant are left", n)
	}
	if d.m.good.result != nil {
		t.Error("figures of the demo plant are still there")
	}
	d.keys("Esc").shows("DEMO PLANT", "6.28", "13.0", "SET THE PUMP TO")
	d.keys("Enter").shows("DEMO PLANT", "6.28") // opening a field changes nothing
	d.keys("Esc").shows("DEMO PLANT", "8.0")
	d.keys("Enter", "9", "Enter").hides("DEMO").keys("u").shows("DEMO PLANT", "6.28")
}

func TestDemoStaysADemoWithAnotherTarget(t *testing.T) {
	d := demo(t)
	d.keys("Right", "Right", "Down", "8.6", "Enter").shows("DEMO PLANT", "for pH 8.60")
	d.keys("Left", "Left", "+").shows("DEMO PLANT", "6.35")
}

func TestFiguresFollowAPause(t *testing.T) {
	d := demo(t).own()
	before := d.solved()
	d.keys("Home", "Down", "6") // alkalinity 6 on the way to 60
	if d.solved() != before || d.m.old {
		t.Error("the figures followed a digit before the pause")
	}
	d.keys("0")
	d.m.Update(pausedMsg{d.m.seq - 1})
	if d.solved() != before {
		t.Error("the pause of an earlier key counted")
	}
	d.keys("wait")
	if d.solved() == before {
		t.Error("the figures did not follow the pause")
	}
	d.keys("Esc")
	if d.solved() != before {
		t.Error("Escape did not bring the figures back")
	}
}

func TestEndsOfTyping(t *testing.T) {
	for key, row := range map[string]int{"Enter": 2, "Tab": 2, "Down": 2, "S-Tab": 0, "Up": 0} {
		d := demo(t).own()
		d.keys("Home", "Down", "41", key)
		if d.m.state != walking || d.m.row[0] != row || d.m.sheet.Values["alkalinity"] != "41" {
			t.Errorf("%s: state %d, row %d, alkalinity %q", key, d.m.state, d.m.row[0], d.m.sheet.Values["alkalinity"])
		}
	}
	d := demo(t).own().keys("Home", "Down", "41", "Esc")
	if d.m.state != walking || d.m.row[0] != 1 || d.m.sheet.Values["alkalinity"] != "30" {
		t.Errorf("Esc: state %d, row %d, alkalinity %q", d.m.state, d.m.row[0], d.m.sheet.Values["alkalinity"])
	}
}

func TestStartsOfTyping(t *testing.T) {
	for _, c := range []struct{ key, text string }{{"7", "7"}, {".", "."}, {",", ","}, {"Enter", "30"}} {
		d := demo(t).own().keys("Home", "Down", c.key)
		if d.m.state != typing || d.m.edit.String() != c.text {
			t.Errorf("%s: state %d, text %q, want typing and %q", c.key, d.m.state, d.m.edit.String(), c.text)
		}
	}
	for _, key := range []string{"b", "q", "z", "Space", "Esc", "\x00"} {
		d := demo(t).own().keys("Home", "Down", key)
		if d.m.state != walking {
			t.Errorf("%q started state %d", key, d.m.state)
		}
	}
}

func TestEditingWithinAField(t *testing.T) {
	d := demo(t).own().keys("Home", "Down", "Enter") // 30
	d.keys("Left", "4", "End", "5", "Home", "1", "Del", "BS", "BS")
	if got := d.m.edit.String(); got != "405" {
		t.Errorf("text %q, want 405", got)
	}
	d.keys("C-u", "4", "1", " mg/L", "Enter")
	if got := d.m.sheet.Values["alkalinity"]; got != "41 mg/L" {
		t.Errorf("alkalinity %q", got)
	}
}

func TestNegativeNumberStartsWithEnter(t *testing.T) {
	d := demo(t).own().keys("t", "saturation", "Enter")
	if d.m.place().name != "target-si" {
		t.Fatalf("at %q", d.m.place().name)
	}
	d.keys("Enter", "-0.3", "Enter")
	if got := d.m.sheet.Values["target-si"]; got != "-0.3" {
		t.Errorf("target %q", got)
	}
	d.keys("Up", "Enter", "-0.4", "Enter") // over what is there
	if got := d.m.sheet.Values["target-si"]; got != "-0.4" {
		t.Errorf("target %q", got)
	}
}

func TestBadEntryKeepsTheLastFigures(t *testing.T) {
	for _, text := range []string{"abc", "1,200", "-5", "1e999", "7.5.5", "NaN", "15 furlongs", "6000", "\u0663"} {
		d := demo(t).own()
		before := d.solved()
		d.keys("Home", "Down", "Enter", "C-u", text, "wait")
		d.shows("OLD FIGURES", "accepted")
		if d.solved() != before {
			t.Errorf("%q: the last good figures are gone", text)
		}
		d.keys("Tab", "Tab").shows("OLD FIGURES", "! alkalinity", "accepted")
		d.keys("y").shows("no slip")
		d.keys("Home", "Down", "C-l", "30", "Enter").hides("OLD FIGURES", "accepted")
		if d.solved() != before {
			t.Errorf("%q: dose %v after it was put right, %v before", text, d.solved(), before)
		}
	}
}

func TestUnusualValueAsksOnce(t *testing.T) {
	d := demo(t).own().keys("Home", "Down", "Down", "35")
	d.hides("unusual").keys("Enter").shows("temperature 35 is unusual", "keeps it, Esc", "OLD FIGURES")
	if d.m.row[0] != 2 || d.m.state != typing {
		t.Error("the question is not in place")
	}
	d.keys("Enter").hides("keeps it, Esc", "OLD FIGURES")
	if d.m.row[0] != 3 || d.m.sheet.Values["temperature"] != "35" {
		t.Error("the yes did not keep the value")
	}
	d.keys("Up", "Enter", "Enter") // the same value once more: no question
	if d.m.state != walking {
		t.Error("asked twice about one value")
	}
	d.keys("Up", "36", "Enter")
	d.shows("36 is unusual")
	d.keys("Esc")
	if d.m.sheet.Values["temperature"] != "35" {
		t.Error("Escape did not put back what was there")
	}
}

func TestNudging(t *testing.T) {
	d := demo(t).own().keys("Home")
	d.keys("+")
	if got := d.m.sheet.Values["ph"]; got != "7.05" {
		t.Errorf("pH %q after one step up from 7.0", got)
	}
	d.keys("-", "-")
	if got := d.m.sheet.Values["ph"]; got != "6.95" {
		t.Errorf("pH %q after two steps down", got)
	}
	d.keys("Down", "2 meq/L", "Enter", "Up", "+")
	if got := d.m.sheet.Values["alkalinity"]; got == "2 meq/L" || got[len(got)-5:] != "meq/L" {
		t.Errorf("alkalinity %q after a step from 2 meq/L", got)
	}
	d.keys("Down", "29.5", "Enter", "Up", "+") // 30 is still usual
	if d.m.state != walking {
		t.Error("asked about a usual value")
	}
	d.keys("+").shows("30.5 is unusual")
	d.keys("Esc")
	if got := d.m.sheet.Values["temperature"]; got != "30.0" {
		t.Errorf("temperature %q after a refused step", got)
	}
}

func TestErasingIsNotMeasured(t *testing.T) {
	d := demo(t).own().keys("Home", "Down", "Down", "Down", "BS")
	if _, there := d.m.sheet.Values["flow"]; there {
		t.Error("the flow is still there")
	}
	d.shows("DOSE, AS PRODUCT", "no flow given", "mg/L as NaOH")
	d.keys("Up", "BS").shows("OLD FIGURES", "STILL NEEDED: temperature")
}

func TestNoLetterLeaves(t *testing.T) {
	for _, letters := range []string{"q", "Q", "x", "e", ":q", "ZZ"} {
		d := demo(t)
		for _, r := range letters {
			if cmd := d.m.press(string(r)); cmd != nil {
				t.Errorf("%q started a command", letters)
			}
		}
	}
	for _, s := range []state{walking, typing, choosing, paging, pasting} {
		d := demo(t)
		d.m.state = s
		if cmd := d.m.press("ctrl+c"); cmd == nil {
			t.Errorf("Ctrl-C does not leave while %s", stateNames[s])
		}
	}
}

func TestUndo(t *testing.T) {
	d := demo(t).own()
	d.keys("Home", "8", "Enter", "p", "lime", "Enter")
	if d.m.sheet.Product == "caustic-25" || d.m.sheet.Values["ph"] != "8" {
		t.Fatalf("sheet %+v", d.m.sheet)
	}
	d.keys("u", "u").shows("7.0")
	if d.m.sheet.Product != "caustic-25" || d.m.sheet.Values["ph"] != "7.0" {
		t.Errorf("two steps back: %+v", d.m.sheet)
	}
	d.keys("r", "r")
	if d.m.sheet.Product == "caustic-25" || d.m.sheet.Values["ph"] != "8" {
		t.Errorf("two steps on again: %+v", d.m.sheet)
	}
	d.keys("u", "u", "u", "u", "u", "u").shows("DEMO PLANT")
	d.keys("u").shows("nothing to undo")
}
