// Package vt is a small terminal for tests: it understands what a VT100
// understands of what the painter sends, and keeps a note of anything else.
package vt

import (
	"strconv"
	"strings"
	"unicode/utf8"
)

// Cell is one position: its character and the parameters of the attributes in
// force when it was written, "" for none.
type Cell struct {
	Rune       rune
	Attributes string
}

// Screen is the terminal.
type Screen struct {
	Width, Height int
	Cells         []Cell
	X, Y          int // of the cursor; X == Width: it waits behind the margin
	Visible       bool
	Modes         map[string]bool // private modes that were set, e.g. "1049"
	Unknown       []string        // sequences that it does not understand
	Clipboard     []string        // texts of clipboard sequences, still encoded
	Scrolled      int             // how often text moved up: never by the painter

	attributes string
	rest       []byte
}

// New makes a blank terminal.
func New(width, height int) *Screen {
	s := &Screen{Width: width, Height: height, Visible: true, Modes: map[string]bool{}}
	s.Cells = make([]Cell, width*height)
	s.erase(0, len(s.Cells))
	return s
}

func (s *Screen) erase(from, to int) {
	for i := from; i < to; i++ {
		s.Cells[i] = Cell{Rune: ' '}
	}
}

// Write takes output; it never fails.
func (s *Screen) Write(b []byte) (int, error) {
	n := len(b)
	b = append(s.rest, b...)
	for len(b) > 0 {
		used := s.step(b)
		if used == 0 {
			break
		}
		b = b[used:]
	}
	s.rest = append([]byte(nil), b...)
	return n, nil
}

// step takes one character or sequence and returns its length, 0 where its end
// is still to come.
func (s *Screen) step(b []byte) int {
	switch c := b[0]; {
	case c == 0x1b:
		return s.escape(b)
	case c == '\r':
		s.X = 0
	case c == '\n':
		if s.Y == s.Height-1 {
			s.Scrolled++
			copy(s.Cells, s.Cells[s.Width:])
			s.erase(len(s.Cells)-s.Width, len(s.Cells))
		} else {
			s.Y++
		}
	case c == '\b':
		s.X = max(min(s.X, s.Width-1)-1, 0)
	case c < ' ' || c == 0x7f:
		s.Unknown = append(s.Unknown, strconv.Quote(string(b[:1])))
	default:
		if !utf8.FullRune(b) {
			return 0
		}
		r, n := utf8.DecodeRune(b)
		s.put(r)
		return n
	}
	return 1
}

func (s *Screen) put(r rune) {
	if s.X >= s.Width { // wrap, as terminals do
		s.X = 0
		s.step([]byte{'\n'})
	}
	s.Cells[s.Y*s.Width+s.X] = Cell{r, s.attributes}
	s.X++
}

func (s *Screen) escape(b []byte) int {
	if len(b) < 2 {
		return 0
	}
	switch b[1] {
	case '[':
		for i := 2; i < len(b); i++ {
			if b[i] >= 0x40 && b[i] <= 0x7e {
				s.control(string(b[2:i]), b[i])
				return i + 1
			}
		}
		return 0
	case ']', 'P':
		end := strings.IndexAny(string(b), "\a")
		if st := strings.Index(string(b), "\x1b\\"); st >= 0 && (end < 0 || st < end) {
			s.Clipboard = append(s.Clipboard, string(b[:st]))
			return st + 2
		}
		if end < 0 {
			return 0
		}
		s.Clipboard = append(s.Clipboard, string(b[:end]))
		return end + 1
	}
	s.Unknown = append(s.Unknown, strconv.Quote(string(b[:2])))
	return 2
}

func (s *Screen) control(parameters string, final byte) {
	if rest, ok := strings.CutPrefix(parameters, "?"); ok && (final == 'h' || final == 'l') {
		if rest == "25" {
			s.Visible = final == 'h'
		} else {
			s.Modes[rest] = final == 'h'
		}
		return
	}
	fields := strings.Split(parameters, ";")
	number := func(i, fallback int) int {
		if i < len(fields) {
			if n, err := strconv.Atoi(fields[i]); err == nil && n > 0 {
				return n
			}
		}
		return fallback
	}
	x := min(s.X, s.Width-1)
	switch final {
	case 'H':
		s.Y, s.X = min(number(0, 1), s.Height)-1, min(number(1, 1), s.Width)-1
	case 'A':
		s.X, s.Y = x, max(s.Y-number(0, 1), 0)
	case 'B':
		s.X, s.Y = x, min(s.Y+number(0, 1), s.Height-1)
	case 'C':
		s.X = min(x+number(0, 1), s.Width-1)
	case 'D':
		s.X = max(x-number(0, 1), 0)
	case 'K':
		if parameters != "" {
			s.Unknown = append(s.Unknown, parameters+"K")
		}
		s.erase(s.Y*s.Width+x, (s.Y+1)*s.Width)
	case 'J':
		if parameters != "2" {
			s.Unknown = append(s.Unknown, parameters+"J")
		}
		s.erase(0, len(s.Cells))
	case 'm':
		if parameters == "" || fields[0] == "" || fields[0] == "0" {
			s.attributes = strings.TrimPrefix(strings.TrimPrefix(parameters, "0"), ";")
		} else if s.attributes == "" {
			s.attributes = parameters
		} else {
			s.attributes += ";" + parameters
		}
	default:
		s.Unknown = append(s.Unknown, parameters+string(final))
	}
}

// Lines returns the rows as text, trailing blanks cut.
func (s *Screen) Lines() []string {
	lines := make([]string, s.Height)
	for y := range lines {
		var b strings.Builder
		for _, c := range s.Cells[y*s.Width : (y+1)*s.Width] {
			b.WriteRune(c.Rune)
		}
		lines[y] = strings.TrimRight(b.String(), " ")
	}
	return lines
}

// String returns the rows joined by line feeds.
func (s *Screen) String() string { return strings.Join(s.Lines(), "\n") }
