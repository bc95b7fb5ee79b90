package tui

import (
	"encoding/json"
	"testing"
)

func TestDraftHoldsEveryKey(t *testing.T) {
	d := demo(t)
	var kept *sheet
	d.m.hooks.keep = func(s sheet) { kept = &s }
	d.keys("Down", "+", "Right", "Left")
	if kept != nil {
		t.Error("a draft of the demo plant was kept")
	}
	d.keys("Home")
	text := ""
	for _, key := range "7.05" {
		d.keys(string(key))
		text += string(key)
		if kept == nil || kept.Values["ph"] != text {
			t.Errorf("after %q the draft holds %+v", text, kept)
		}
	}
	d.keys("BS")
	if kept.Values["ph"] != "7.0" {
		t.Errorf("after Backspace the draft holds %q", kept.Values["ph"])
	}
	d.keys("Enter", "30", "Enter", "p", "lime", "Enter", "m")
	data, err := json.Marshal(kept)
	if err != nil {
		t.Fatal(err)
	}
	var back sheet
	if err := json.Unmarshal(data, &back); err != nil {
		t.Fatal(err)
	}
	if !back.whole().equal(d.m.sheet) {
		t.Errorf("came back as %+v, was %+v", back, d.m.sheet)
	}
}

func TestTakingUpADraft(t *testing.T) {
	d := demo(t)
	taken := false
	saved := demo(t).own().m.sheet
	d.m.hooks.drafts = func() []offer {
		return []offer{{said: "08:40 today, 4 readings", sheet: saved, done: func() { taken = true }}}
	}
	d.shows("DEMO PLANT", "d takes up the draft of 08:40 today, 4 readings")
	d.keys("d").hides("DEMO PLANT", "d takes up").shows("7.0", "taken up")
	if taken || d.m.sheet.Values["flow"] != "240" || !d.m.good.solved {
		t.Errorf("taken %v, sheet %+v", taken, d.m.sheet)
	}
	d.keys("u").shows("DEMO PLANT")
}

func TestOddDraftDoesNoHarm(t *testing.T) {
	for _, text := range []string{`{}`, `{"values":null,"target":"x","units":"furlongs","demo":true}`, `{"values":{"ph":"\u001b[31m7"},"product":"nothing"}`,
		`{"adds":[{"product":"nope","dose":""}]}`} {
		var s sheet
		if err := json.Unmarshal([]byte(text), &s); err != nil {
			t.Fatal(err)
		}
		d := demo(t)
		d.m.use(s.whole())
		d.keys("Down", "7", "Enter", "m", "Right", "Down", "+", "p", "Enter", "?", "Esc", "f", "Esc")
		d.fits(d.screen())
		d.hides("DEMO", "\x1b")
	}
}

func TestAnotherProductForgetsTheStrength(t *testing.T) {
	d := demo(t).own().keys("Right", "Down", "24", "Enter", "15", "Enter", "30", "Enter")
	d.keys("p", "caustic-50", "Enter")
	v := d.m.sheet.Values
	if v["strength"] != "" || v["product-temperature"] != "" || v["pump"] != "30" {
		t.Errorf("strength %q, temperature %q, pump %q after another product was chosen", v["strength"], v["product-temperature"], v["pump"])
	}
	d.hides("check them")
}
