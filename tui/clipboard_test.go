package tui

import (
	"encoding/base64"
	"strings"
	"testing"
)

func TestCopySlip(t *testing.T) {
	d := demo(t).own()
	var sent string
	d.m.hooks.send = func(s string) { sent = s }
	t.Setenv("TMUX", "")
	t.Setenv("STY", "")
	t.Setenv("TERM", "xterm")
	d.keys("y").shows("slip sent")
	const start, end = "\x1b]52;c;", "\x07"
	if !strings.HasPrefix(sent, start) || !strings.HasSuffix(sent, end) {
		t.Fatalf("sent %q", sent)
	}
	text, err := base64.StdEncoding.DecodeString(strings.TrimSuffix(strings.TrimPrefix(sent, start), end))
	if err != nil {
		t.Fatal(err)
	}
	for _, line := range strings.Split(string(text), "\n") {
		if len(line) > 72 {
			t.Errorf("a line of %d columns: %q", len(line), line)
		}
	}
	if !strings.Contains(string(text), "L/h") || strings.Contains(string(text), "DEMO") {
		t.Errorf("the slip: %s", text)
	}
	sent = ""
	demoSlip := demo(t)
	demoSlip.m.hooks.send = func(s string) { sent = s }
	demoSlip.keys("v").shows("DEMO PLANT, INVENTED READINGS")
}

func TestClipboardThroughMultiplexers(t *testing.T) {
	for name, c := range map[string]struct {
		env        map[string]string
		start, end string
	}{
		"plain":           {map[string]string{"TERM": "xterm"}, "\x1b]52;c;", "\x07"},
		"tmux":            {map[string]string{"TMUX": "/tmp/tmux-0/default,1,0", "TERM": "screen-256color"}, "\x1bPtmux;\x1b\x1b]52;c;", "\x1b\\"},
		"screen":          {map[string]string{"STY": "1.tty", "TERM": "screen"}, "\x1bP\x1b]52;c;", "\x1b\\"},
		"screen over ssh": {map[string]string{"TERM": "screen.xterm"}, "\x1bP\x1b]52;c;", "\x1b\\"},
	} {
		got := clipboardSequence("slip", func(k string) string { return c.env[k] })
		if !strings.HasPrefix(got, c.start) || !strings.HasSuffix(got, c.end) {
			t.Errorf("%s: %q", name, got)
		}
	}
}

func TestPasteOfARow(t *testing.T) {
	for text, want := range map[string]map[string]string{
		"7.05 31 9.5 240":              {"ph": "7.05", "alkalinity": "31", "temperature": "9.5", "flow": "240"},
		"7.05\t31\t9.5\t240":           {"ph": "7.05", "alkalinity": "31", "temperature": "9.5", "flow": "240"},
		"7,05;31;9,5;240":              {"ph": "7,05", "alkalinity": "31", "temperature": "9,5", "flow": "240"},
		"7.05, 31 mg/L, 9.5 °C":        {"ph": "7.05", "alkalinity": "31 mg/L", "temperature": "9.5 °C"},
		"7.05\n31\n9.5\n240\n":         {"ph": "7.05", "alkalinity": "31", "temperature": "9.5", "flow": "240"},
		"7.05\t31\t9.5\t\t\t12\t\t\t ": {"ph": "7.05", "alkalinity": "31", "temperature": "9.5", "calcium": "12"},
	} {
		d := demo(t).paste(text)
		d.shows("DEMO PLANT", "Pasted: pH 7", "6.28") // shown before it counts
		d.keys("Enter").hides("DEMO PLANT", "Pasted", "6.28")
		for name, value := range d.m.sheet.Values {
			if isReading(name) && want[name] != value {
				t.Errorf("%q: %s is %q, want %q", text, name, value, want[name])
			}
		}
		if d.m.sheet.readings() != len(want) {
			t.Errorf("%q: %d readings, want %d", text, d.m.sheet.readings(), len(want))
		}
		d.keys("u").shows("DEMO PLANT", "6.28")
		d.paste(text).keys("Esc").shows("DEMO PLANT", "6.28").hides("Pasted")
	}
}

func TestPasteShowsWhatIsWrongOrUnusual(t *testing.T) {
	d := demo(t).paste("7.05\t31\t41\tabc1\t1,200").shows("temperature 41 (unusual)", "flow abc1 (cannot be", "pH read at 1,200 (cannot")
	d.keys("Enter")
	if d.m.now.unsure["temperature"] != "" {
		t.Error("asked again about a value that was shown as unusual and entered")
	}
	d.shows("is not a number").keys("Home", "Down", "Down", "Down", "240", "Enter").shows("can be read in two ways")
}

func TestPasteOfOneValueGoesToTheField(t *testing.T) {
	d := demo(t).own().keys("Home", "Down").paste("41 mg/L\n")
	if d.m.state != typing || d.m.edit.String() != "41 mg/L" {
		t.Errorf("state %d, text %q", d.m.state, d.m.edit.String())
	}
	if d.m.sheet.Values["alkalinity"] != "30" {
		t.Error("it counted before it was finished")
	}
	d.keys("Esc").paste("only words").shows("no number")
}
