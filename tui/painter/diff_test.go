package painter

import (
	"slices"
	"strings"
	"testing"
	"unicode/utf8"

	"pgregory.net/rapid"

	"beckline/tui/canvas"
	"beckline/tui/vt"
)

var testAttributes = func() Attributes {
	var a Attributes
	a[canvas.Strong], a[canvas.Notice], a[canvas.Alarm], a[canvas.Good] = "1", "33", "7;31", "36"
	return a
}()

// same fails unless the terminal shows exactly the canvas.
func same(t interface{ Fatalf(string, ...any) }, screen *vt.Screen, c *canvas.Canvas) {
	if len(screen.Unknown) > 0 {
		t.Fatalf("sequences that a VT100 lacks: %q", screen.Unknown)
	}
	if screen.Scrolled > 0 {
		t.Fatalf("the screen was scrolled")
	}
	for i, cell := range c.Cells {
		got := screen.Cells[i]
		want := vt.Cell{Rune: cell.Rune, Attributes: testAttributes[cell.Style]}
		for _, x := range []*vt.Cell{&got, &want} {
			if x.Rune == ' ' && !strings.Contains(x.Attributes, "7") {
				x.Attributes = "" // bold or coloured, a blank looks the same
			}
		}
		if got != want {
			t.Fatalf("column %d of row %d shows %q, want %q\n%s", i%c.Width, i/c.Width, got, want, screen)
		}
	}
	if c.CursorShown != screen.Visible {
		t.Fatalf("cursor shown: %v, want %v", screen.Visible, c.CursorShown)
	}
	if c.CursorShown && (screen.X != c.CursorX || screen.Y != c.CursorY) {
		t.Fatalf("cursor at %d,%d, want %d,%d", screen.X, screen.Y, c.CursorX, c.CursorY)
	}
}

// TestDiffsEqualFullFrames changes a canvas at random, often little, and checks
// that the differences leave the same screen as the whole frame would.
func TestDiffsEqualFullFrames(t *testing.T) {
	runes := []rune("ab 0189.  ═▶█▀⣀é°")
	rapid.Check(t, func(t *rapid.T) {
		width, height := rapid.IntRange(1, 40).Draw(t, "width"), rapid.IntRange(1, 8).Draw(t, "height")
		feed := rapid.Bool().Draw(t, "feed")
		d := NewDiffer(testAttributes, feed)
		screen := vt.New(width, height)
		frame := canvas.New(width, height)
		for range rapid.IntRange(1, 12).Draw(t, "frames") {
			next := canvas.New(width, height)
			copy(next.Cells, frame.Cells)
			for range rapid.IntRange(0, 30).Draw(t, "changes") {
				x, y := rapid.IntRange(0, width-1).Draw(t, "x"), rapid.IntRange(0, height-1).Draw(t, "y")
				n := rapid.IntRange(1, 12).Draw(t, "length")
				s := canvas.Style(rapid.IntRange(0, int(canvas.Styles)-1).Draw(t, "style"))
				for i := range n {
					next.Set(x+i, y, rapid.SampledFrom(runes).Draw(t, "rune"), s)
				}
			}
			if rapid.Bool().Draw(t, "cursor") {
				next.Cursor(rapid.IntRange(0, width-1).Draw(t, "cx"), rapid.IntRange(0, height-1).Draw(t, "cy"))
			}
			if rapid.IntRange(0, 9).Draw(t, "forget") == 0 {
				d.Forget()
				// Somebody else wrote on the screen meanwhile.
				screen.Write([]byte("\x1b[1;31mgarbage\x1b[?25h"))
				screen.Scrolled = 0
			}
			want := *next // the differ tidies what it is given
			want.Cells = slices.Clone(next.Cells)
			want.Cells[len(want.Cells)-1] = canvas.Blank // never written: see normalise
			screen.Write(d.Frame(next))
			same(t, screen, &want)
			frame = next
		}
	})
}

// TestBytes holds the painter to what single changes may cost.
func TestBytes(t *testing.T) {
	base := func() *canvas.Canvas {
		c := canvas.New(80, 24)
		for y := range 24 {
			c.Text(2, y, "label 12.34 mg/L", canvas.Plain)
			c.Text(40, y, "figure 8.40", canvas.Plain)
		}
		c.Cursor(8, 10)
		return c
	}
	for _, x := range []struct {
		name   string
		change func(*canvas.Canvas)
		most   int
	}{
		{"nothing", func(*canvas.Canvas) {}, 0},
		{"the digit at the cursor", func(c *canvas.Canvas) { c.Set(8, 10, '9', 0); c.Cursor(9, 10) }, 1},
		{"a digit near the cursor", func(c *canvas.Canvas) { c.Set(11, 10, '9', 0); c.Cursor(12, 10) }, 4},
		{"two figures of one row", func(c *canvas.Canvas) { c.Text(9, 10, "5", 0); c.Text(47, 10, "7.9", 0) }, 15},
		{"the cursor one row down", func(c *canvas.Canvas) { c.Cursor(8, 11) }, 1},
		{"a row emptied", func(c *canvas.Canvas) { c.Text(40, 10, "           ", 0) }, 18},
	} {
		d := NewDiffer(testAttributes, true)
		d.Frame(base())
		next := base()
		x.change(next)
		if out := d.Frame(next); len(out) > x.most {
			t.Errorf("%s: %d bytes, at most %d wanted: %q", x.name, len(out), x.most, out)
		}
	}
}

// TestPlainTerminal checks that without attributes none are sent.
func TestPlainTerminal(t *testing.T) {
	d := NewDiffer(Attributes{}, true)
	c := canvas.New(20, 2)
	c.Text(0, 0, "warning", canvas.Alarm)
	out := d.Frame(c)
	if !utf8.Valid(out) {
		t.Fatal("not text")
	}
	screen := vt.New(20, 2)
	screen.Write(out)
	if got := screen.Cells[0]; got != (vt.Cell{Rune: 'w'}) {
		t.Errorf("first cell %q", got)
	}
}

func TestSentencesBreakBetweenWords(t *testing.T) {
	l := Lines{Statements: []string{"one two three", "four"}, Prompt: "p"}.Wrapped(8)
	if len(l.Statements) != 2 || l.Statements[0] != "one two\r\nthree" || l.Statements[1] != "four" || l.Prompt != "p" {
		t.Errorf("wrapped to %q", l)
	}
}
