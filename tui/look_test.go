package tui

import (
	"strings"
	"testing"

	"beckline/tui/canvas"
)

func TestLookOfTerminals(t *testing.T) {
	for _, c := range []struct {
		env  string
		want look
	}{
		{"TERM=xterm-256color LANG=en_GB.UTF-8", look{fullGlyphs, true, true, false}},
		{"TERM=xterm LANG=C", look{asciiGlyphs, true, true, false}},
		{"TERM=xterm LANG=en_GB.UTF-8 LC_ALL=C", look{asciiGlyphs, true, true, false}},
		{"TERM=xterm LC_CTYPE=C.utf8 LANG=C", look{fullGlyphs, true, true, false}},
		{"TERM=xterm", look{asciiGlyphs, true, true, false}},
		{"TERM=linux LANG=C.UTF-8", look{consoleGlyphs, true, true, false}},
		{"TERM=screen LANG=C.UTF-8", look{fullGlyphs, true, true, false}},
		{"TERM=vt100 LANG=C.UTF-8", look{asciiGlyphs, false, true, false}},
		{"TERM=xterm LANG=C.UTF-8 NO_COLOR=1", look{fullGlyphs, false, true, false}},
		{"TERM=dumb LANG=C.UTF-8", look{asciiGlyphs, false, false, true}},
		{"LANG=C.UTF-8", look{asciiGlyphs, false, false, true}},
	} {
		env := map[string]string{}
		for _, pair := range strings.Fields(c.env) {
			name, value, _ := strings.Cut(pair, "=")
			env[name] = value
		}
		if got := lookOf(func(k string) string { return env[k] }); got != c.want {
			t.Errorf("%s: %+v, want %+v", c.env, got, c.want)
		}
	}
}

// TestColours checks that no colour is sent where none is wanted, and no
// background ever: the terminal's own theme stays.
func TestColours(t *testing.T) {
	for s := range canvas.Styles {
		without := look{attributes: true}.attributesOf()[s]
		if strings.Contains(without, "3") || strings.Contains(without, "4") {
			t.Errorf("role %d has attributes %q without colour", s, without)
		}
		with := look{attributes: true, colour: true}.attributesOf()[s]
		for _, p := range strings.Split(with, ";") {
			if p != "" && p != "1" && p != "7" && !(len(p) == 2 && p[0] == '3' && p[1] < '8') {
				t.Errorf("role %d has attribute %q", s, p)
			}
		}
		if none := (look{}).attributesOf()[s]; none != "" {
			t.Errorf("role %d has attributes %q on a terminal without", s, none)
		}
	}
}
