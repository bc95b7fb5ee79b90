// Package painter brings a canvas to the terminal, sending only the cells that
// changed, in as few bytes as plain terminals understand.
//
// It uses cursor addressing, relative moves, erase to end of line and
// character attributes: what a VT100 has, so nothing is asked of the terminal.
package painter

import (
	"strconv"
	"unicode/utf8"

	"beckline/tui/canvas"
)

// Attributes holds, for each role, the parameters of its attribute sequence,
// e.g. "1;33"; "" is the terminal's own look.
type Attributes [canvas.Styles]string

// Differ turns canvases into the bytes that make the terminal show them. It
// remembers what the terminal shows; the zero memory is "unknown", which
// clears and paints everything.
type Differ struct {
	attributes Attributes
	feed       bool // a line feed moves down and keeps the column

	shown   *canvas.Canvas
	x, y    int // where the terminal's cursor is; x < 0: not known
	style   canvas.Style
	visible bool // the cursor
	out     []byte
	scratch [3][]byte
}

// NewDiffer makes a Differ. feed says that a line feed moves straight down, as it does on a
// terminal in raw mode but not on every console.
func NewDiffer(a Attributes, feed bool) *Differ {
	return &Differ{attributes: a, feed: feed}
}

// Forget makes the next frame a full one.
func (d *Differ) Forget() { d.shown = nil }

// Frame returns the bytes that turn what is shown into next. The slice is
// valid until the next call. The differ keeps next; the caller must not draw on
// it afterwards.
func (d *Differ) Frame(next *canvas.Canvas) []byte {
	d.out = d.out[:0]
	d.normalise(next)
	if d.shown == nil || d.shown.Width != next.Width || d.shown.Height != next.Height {
		d.out = append(d.out, "\x1b[m\x1b[H\x1b[2J"...)
		d.shown, d.x, d.y, d.style, d.visible = canvas.New(next.Width, next.Height), 0, 0, canvas.Plain, true
	}
	for y := range next.Height {
		d.row(y, d.shown.Row(y), next.Row(y))
	}
	d.cursor(next)
	d.shown = next
	return d.out
}

// normalise makes cells that look the same equal: a blank has no role unless
// the role colours its background, and the last cell of all stays blank,
// because writing there scrolls some terminals.
func (d *Differ) normalise(c *canvas.Canvas) {
	for i := range c.Cells {
		cell := &c.Cells[i]
		if d.attributes[cell.Style] == "" || cell.Rune == ' ' && !d.reversed(cell.Style) {
			cell.Style = canvas.Plain
		}
	}
	c.Cells[len(c.Cells)-1] = canvas.Blank
}

// reversed reports whether a role shows on blanks.
func (d *Differ) reversed(s canvas.Style) bool {
	a := d.attributes[s]
	for i := 0; i < len(a); i++ {
		if a[i] == '7' && (i == 0 || a[i-1] == ';') && (i+1 == len(a) || a[i+1] == ';') {
			return true
		}
		if a[i] == '4' && (i == 0 || a[i-1] == ';') { // 4 underline, 40 to 47 background
			return true
		}
	}
	return false
}

// row sends the changed cells of one row.
func (d *Differ) row(y int, old, next []canvas.Cell) {
	end := len(next) // cells from end on are blank in the new row
	for end > 0 && next[end-1] == canvas.Blank {
		end--
	}
	leftover := 0
	for x := end; x < len(old); x++ {
		if old[x] != canvas.Blank {
			leftover++
		}
	}
	stop := len(next)
	if leftover > 3 {
		stop = end
	}
	for x := 0; x < stop; x++ {
		if old[x] == next[x] {
			continue
		}
		d.move(x, y, next)
		d.put(next[x])
		d.x = x + 1
		if d.x == len(next) {
			d.x = -1 // the cursor waits at the margin: where it is differs by terminal
		}
	}
	if stop == end && stop < len(next) {
		d.move(end, y, next)
		d.wear(canvas.Plain)
		d.out = append(d.out, "\x1b[K"...)
	}
}

// put sends one cell.
func (d *Differ) put(c canvas.Cell) {
	if c != canvas.Blank || d.reversed(d.style) {
		d.wear(c.Style)
	}
	d.out = utf8.AppendRune(d.out, c.Rune)
}

// wear changes the current attributes.
func (d *Differ) wear(s canvas.Style) {
	if s == d.style {
		return
	}
	d.out = append(d.out, "\x1b["...)
	if d.style != canvas.Plain && s != canvas.Plain {
		d.out = append(d.out, ';')
	}
	d.out = append(append(d.out, d.attributes[s]...), 'm')
	d.style = s
}

// move brings the cursor to x, y by the shortest way. row holds the cells that
// row y shows left of x.
func (d *Differ) move(x, y int, row []canvas.Cell) {
	if d.x == x && d.y == y {
		return
	}
	best := appendPosition(d.scratch[0][:0], x, y)
	d.scratch[0] = best
	if d.x >= 0 {
		if way, ok := d.vertical(d.scratch[1][:0], y); ok {
			way = d.horizontal(way, d.x, x, row)
			d.scratch[1] = way
			if len(way) < len(best) {
				best = way
			}
		}
		way := append(d.scratch[2][:0], '\r')
		if way, ok := d.vertical(way, y); ok {
			way = d.horizontal(way, 0, x, row)
			d.scratch[2] = way
			if len(way) < len(best) {
				best = way
			}
		}
	}
	d.out = append(d.out, best...)
	d.x, d.y = x, y
}

// vertical appends the way from the current row to row y.
func (d *Differ) vertical(b []byte, y int) ([]byte, bool) {
	n := y - d.y
	switch {
	case n == 0:
		return b, true
	case n < 0:
		return appendCount(b, -n, 'A'), true
	case d.feed && n <= 3:
		for range n {
			b = append(b, '\n')
		}
		return b, true
	}
	return appendCount(b, n, 'B'), true
}

// horizontal appends the way from column from to column to, writing the cells
// between again where that is shorter than a jump.
func (d *Differ) horizontal(b []byte, from, to int, row []canvas.Cell) []byte {
	n := to - from
	switch {
	case n == 0:
		return b
	case n < 0:
		if -n <= 3 {
			for range -n {
				b = append(b, '\b')
			}
			return b
		}
		return appendCount(b, -n, 'D')
	}
	jump := appendCount(nil, n, 'C')
	if n > len(jump) {
		return append(b, jump...)
	}
	start := len(b)
	for _, c := range row[from:to] {
		if c.Style != d.style && (c != canvas.Blank || d.reversed(d.style)) {
			return append(b[:start], jump...)
		}
		b = utf8.AppendRune(b, c.Rune)
	}
	if len(b)-start > len(jump) {
		return append(b[:start], jump...)
	}
	return b
}

// cursor shows, hides and places the terminal's cursor for the person.
func (d *Differ) cursor(next *canvas.Canvas) {
	if next.CursorShown {
		d.move(next.CursorX, next.CursorY, next.Row(next.CursorY))
	}
	if next.CursorShown != d.visible {
		d.visible = next.CursorShown
		if d.visible {
			d.out = append(d.out, "\x1b[?25h"...)
		} else {
			d.out = append(d.out, "\x1b[?25l"...)
		}
	}
}

// appendPosition appends the sequence for an absolute position.
func appendPosition(b []byte, x, y int) []byte {
	b = append(b, "\x1b["...)
	if y > 0 {
		b = strconv.AppendInt(b, int64(y+1), 10)
	}
	if x > 0 {
		b = append(b, ';')
		b = strconv.AppendInt(b, int64(x+1), 10)
	}
	return append(b, 'H')
}

// appendCount appends a relative move.
func appendCount(b []byte, n int, direction byte) []byte {
	b = append(b, "\x1b["...)
	if n > 1 {
		b = strconv.AppendInt(b, int64(n), 10)
	}
	return append(b, direction)
}
