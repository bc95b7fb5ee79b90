package tui

import (
	"flag"
	"os"
	"path/filepath"
	"strings"
	"testing"
	"unicode/utf8"

	tea "github.com/charmbracelet/bubbletea"
	"github.com/google/go-cmp/cmp"

	"beckline/dosing"
	"beckline/dosing/entry"
)

var update = flag.Bool("update", false, "write the golden screens anew; look at what changed before keeping it")

// keyTypes are the names that tests use for keys that are no characters.
var keyTypes = map[string]tea.KeyType{
	"Enter": tea.KeyEnter, "Tab": tea.KeyTab, "S-Tab": tea.KeyShiftTab, "Esc": tea.KeyEsc,
	"Up": tea.KeyUp, "Down": tea.KeyDown, "Left": tea.KeyLeft, "Right": tea.KeyRight,
	"Home": tea.KeyHome, "End": tea.KeyEnd, "PgUp": tea.KeyPgUp, "PgDn": tea.KeyPgDown,
	"BS": tea.KeyBackspace, "Del": tea.KeyDelete, "C-c": tea.KeyCtrlC, "C-u": tea.KeyCtrlU, "C-l": tea.KeyCtrlL,
	"Space": tea.KeySpace,
}

// driver presses keys on a model.
type driver struct {
	t *testing.T
	m *Model
}

// demo opens the screen as it starts without readings.
func demo(t *testing.T) *driver {
	return &driver{t, newModel(newSheet(entry.Demo(), true), dosing.Solve, fullLook)}
}

var (
	fullLook  = look{glyphs: fullGlyphs}
	plainLook = look{glyphs: asciiGlyphs}
)

// keys presses keys: names from keyTypes, or characters one by one. "wait" is
// the pause after which figures follow.
func (d *driver) keys(words ...string) *driver {
	for _, w := range words {
		switch k, special := keyTypes[w]; {
		case w == "wait":
			d.m.Update(pausedMsg{d.m.seq})
		case special:
			d.m.Update(tea.KeyMsg{Type: k})
		default:
			for _, r := range w {
				d.m.Update(tea.KeyMsg{Type: tea.KeyRunes, Runes: []rune{r}})
			}
		}
	}
	return d
}

func (d *driver) paste(text string) *driver {
	d.m.Update(tea.KeyMsg{Type: tea.KeyRunes, Runes: []rune(text), Paste: true})
	return d
}

func (d *driver) size(width, height int) *driver {
	d.m.Update(tea.WindowSizeMsg{Width: width, Height: height})
	return d
}

func (d *driver) screen() string { return d.m.draw().String() }

// shows fails unless every text is on the screen.
func (d *driver) shows(texts ...string) *driver {
	d.t.Helper()
	s := d.screen()
	for _, text := range texts {
		if !strings.Contains(s, text) {
			d.t.Errorf("the screen lacks %q:\n%s", text, s)
		}
	}
	return d
}

// hides fails if any of the texts is on the screen.
func (d *driver) hides(texts ...string) *driver {
	d.t.Helper()
	s := d.screen()
	for _, text := range texts {
		if strings.Contains(s, text) {
			d.t.Errorf("the screen shows %q:\n%s", text, s)
		}
	}
	return d
}

// golden compares the screen with the file of that name.
func (d *driver) golden(name string) {
	d.t.Helper()
	got := d.screen() + "\n"
	d.fits(got)
	path := filepath.Join("testdata", name+".txt")
	if *update {
		if err := os.MkdirAll("testdata", 0o777); err != nil {
			d.t.Fatal(err)
		}
		if err := os.WriteFile(path, []byte(got), 0o666); err != nil {
			d.t.Fatal(err)
		}
		return
	}
	want, err := os.ReadFile(path)
	if err != nil {
		d.t.Fatal(err)
	}
	if diff := cmp.Diff(string(want), got); diff != "" {
		d.t.Errorf("%s differs (-file +screen):\n%s", path, diff)
	}
}

// fits fails if a line is wider than the terminal, or there are too many.
func (d *driver) fits(screen string) {
	d.t.Helper()
	lines := strings.Split(strings.TrimSuffix(screen, "\n"), "\n")
	if len(lines) > d.m.height {
		d.t.Errorf("%d lines on a terminal of %d", len(lines), d.m.height)
	}
	for i, line := range lines {
		if n := utf8.RuneCountInString(line); n > d.m.width {
			d.t.Errorf("line %d is %d wide on a terminal of %d: %q", i+1, n, d.m.width, line)
		}
	}
}
