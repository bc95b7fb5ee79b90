// Package canvas is a grid of character cells that the screen draws on.
//
// Drawing never leaves the grid: what does not fit is cut, so that no line can
// be wider than the terminal.
package canvas

import (
	"strings"
	"unicode/utf8"

	"github.com/mattn/go-runewidth"
)

// Style is the role in which a cell is shown; the painter turns it into what
// the terminal can do.
type Style uint8

// The roles. None of them carries a meaning that the words do not carry too.
const (
	Plain  Style = iota
	Faint        // labels and units
	Strong       // headings, the current station
	Answer       // the pump setting
	Key          // a key on the bottom line
	Good         // the demo banner, confirmations
	Notice       // a question, an old figure, a warning
	Alarm        // what must not be overlooked
	Curve        // the dose curve
	Styles       // how many there are
)

// Cell is one character position.
type Cell struct {
	Rune  rune
	Style Style
}

// Blank is an empty cell.
var Blank = Cell{Rune: ' '}

// Canvas is the grid, row by row, with the place of the cursor.
type Canvas struct {
	Width, Height int
	Cells         []Cell
	CursorX       int
	CursorY       int
	CursorShown   bool
}

// New returns a blank grid of width × height cells. Sizes under 1 count as 1.
func New(width, height int) *Canvas {
	c := &Canvas{Width: max(width, 1), Height: max(height, 1)}
	c.Cells = make([]Cell, c.Width*c.Height)
	for i := range c.Cells {
		c.Cells[i] = Blank
	}
	return c
}

// Row returns the cells of row y.
func (c *Canvas) Row(y int) []Cell { return c.Cells[y*c.Width : (y+1)*c.Width] }

// Set puts one rune at x, y; outside of the grid it does nothing. A rune that
// does not take exactly one cell is shown as a question mark.
func (c *Canvas) Set(x, y int, r rune, s Style) {
	if x < 0 || y < 0 || x >= c.Width || y >= c.Height {
		return
	}
	if r < ' ' || r == 0x7f || r >= 0x80 && runewidth.RuneWidth(r) != 1 {
		r = '?'
	}
	c.Cells[y*c.Width+x] = Cell{Rune: r, Style: s}
}

// Text writes text from x, y to the right and returns the column after it.
func (c *Canvas) Text(x, y int, text string, s Style) int {
	for _, r := range text {
		c.Set(x, y, r, s)
		x++
	}
	return x
}

// Fit writes text into exactly width columns: blanks fill it, and a text that
// is too long ends in a full stop in place of what was cut.
func (c *Canvas) Fit(x, y, width int, text string, s Style) {
	c.Text(x, y, Cut(text, width), s)
}

// Right writes text so that it ends before column x.
func (c *Canvas) Right(x, y int, text string, s Style) {
	c.Text(x-utf8.RuneCountInString(text), y, text, s)
}

// Cursor places the terminal's cursor and shows it.
func (c *Canvas) Cursor(x, y int) {
	c.CursorX, c.CursorY = min(max(x, 0), c.Width-1), min(max(y, 0), c.Height-1)
	c.CursorShown = true
}

// Lines returns the rows as text without roles, trailing blanks cut.
func (c *Canvas) Lines() []string {
	lines := make([]string, c.Height)
	var b strings.Builder
	for y := range lines {
		b.Reset()
		for _, cell := range c.Row(y) {
			b.WriteRune(cell.Rune)
		}
		lines[y] = strings.TrimRight(b.String(), " ")
	}
	return lines
}

// String returns the rows joined by line feeds.
func (c *Canvas) String() string { return strings.Join(c.Lines(), "\n") }

// Map replaces every rune by f of it.
func (c *Canvas) Map(f func(rune) rune) {
	for i := range c.Cells {
		c.Cells[i].Rune = f(c.Cells[i].Rune)
	}
}

// Cut shortens text to width runes; a shortened text ends in "…".
func Cut(text string, width int) string {
	if utf8.RuneCountInString(text) <= width {
		return text
	}
	if width < 1 {
		return ""
	}
	r := []rune(text)
	return strings.TrimRight(string(r[:width-1]), " ") + "…"
}

// Wrap breaks text into lines of at most width runes, at blanks where it can.
// A line that fits stays as it is; the rest of one that does not is indented
// like its start, or like its second column where it has one.
func Wrap(text string, width int) []string {
	width = max(width, 1)
	var lines []string
	for _, line := range strings.Split(text, "\n") {
		lines = append(lines, wrapLine([]rune(line), width)...)
	}
	return lines
}

func wrapLine(line []rune, width int) []string {
	indent := min(hang(line), width/2)
	var lines []string
	for len(line) > width {
		end := width
		for end > indent && line[end] != ' ' {
			end--
		}
		rest := end + 1
		if end <= indent { // a word longer than the line
			end, rest = width, width
		}
		lines = append(lines, strings.TrimRight(string(line[:end]), " "))
		line = append([]rune(strings.Repeat(" ", indent)), line[rest:]...)
	}
	return append(lines, strings.TrimRight(string(line), " "))
}

// hang is how far the lines after the first are indented: as far as the line
// itself, or to what follows the first gap of two blanks.
func hang(line []rune) int {
	start := 0
	for start < len(line) && line[start] == ' ' {
		start++
	}
	for i := start; i+2 < len(line) && i < 20; i++ {
		if line[i] == ' ' && line[i+1] == ' ' && line[i+2] != ' ' {
			return i + 2
		}
	}
	if start+1 < len(line) && line[start] == '-' && line[start+1] == ' ' {
		return start + 2
	}
	return start
}
