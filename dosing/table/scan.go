package table

import (
	"bufio"
	"bytes"
	"errors"
	"io"
)

// MaxCell is the largest cell that is read, in bytes. A longer one is cut and
// its row has a problem.
const MaxCell = 64 << 10

// What is held of one row is bounded too: its bytes, and its cells. Cells beyond
// are not counted; no file has as many columns.
const (
	maxRow   = 4 << 20
	maxCells = 1 << 14
)

// fault says why a row cannot be used whatever its cells hold.
type fault int

const (
	noFault fault = iota
	overLong
	unclosedQuote
)

// row is one record as it stands in the file.
type row struct {
	raw    []byte   // its text without the line ending, over-long cells cut
	ends   []int    // offset in raw of the end of each cell
	cells  []string // the cells without their quotes
	ending string   // "\n", "\r\n", or at the end of a file "" or "\r"
	fault  fault
	at     int  // cell of the fault
	messy  bool // raw would not be read back the same way: write the cells afresh
}

func (r *row) blank() bool { return len(r.raw) == 0 }

// errNUL stops the reading of a file that is not text.
var errNUL = errors.New("the file holds NUL bytes: it is not plain CSV text")

// scanner reads rows. The library's CSV reader is not used since it neither
// bounds a cell nor gives a row back as it was written.
type scanner struct {
	in    *bufio.Reader
	again []byte // bytes to read once more, before in
	at    int    // how far in again
	comma byte
}

func newScanner(in io.Reader) *scanner {
	return &scanner{in: bufio.NewReaderSize(in, 2*MaxCell), comma: ','}
}

func (s *scanner) read() (byte, error) {
	if s.at < len(s.again) {
		s.at++
		return s.again[s.at-1], nil
	}
	s.again, s.at = nil, 0
	c, err := s.in.ReadByte()
	if err == nil && c == 0 {
		_ = s.in.UnreadByte() // so that who looks ahead does not step over it
		return 0, errNUL
	}
	return c, err
}

// back puts the byte that was read last before the rest again.
func (s *scanner) back() {
	if s.at > 0 {
		s.at--
		return
	}
	_ = s.in.UnreadByte() // it follows a read, so it cannot fail
}

// unread puts text before the rest again.
func (s *scanner) unread(text []byte) {
	s.again, s.at = append(bytes.Clone(text), s.again[s.at:]...), 0
}

// next returns the next row; io.EOF after the last.
func (s *scanner) next() (*row, error) {
	r := &row{}
	if _, err := s.read(); err != nil {
		return nil, err
	}
	s.back()
	for {
		last, err := s.cell(r)
		if err != nil {
			return nil, err
		}
		if last {
			return r, nil
		}
	}
}

// cell reads one cell with the separator or line ending after it, and tells
// whether it was the row's last.
func (s *scanner) cell(r *row) (last bool, err error) {
	var text []byte
	start := len(r.raw)
	newline := -1 // offset in raw just after the first line break inside quotes
	quoted, inside := false, false
	full := func() bool { return len(text) >= MaxCell || len(r.raw) >= maxRow }
	cut := false
	keep := func(c byte, isText bool) {
		if isText && full() {
			cut = true
			if r.fault == noFault {
				r.fault, r.at = overLong, len(r.cells)
			}
			return
		}
		r.raw = append(r.raw, c)
		if isText {
			text = append(text, c)
		}
	}
	end := func() {
		if len(r.raw) < maxRow && len(r.cells) < maxCells {
			r.cells = append(r.cells, string(text))
			r.ends = append(r.ends, len(r.raw))
		}
	}
	for {
		c, err := s.read()
		switch {
		case err == io.EOF && inside && !cut, err == nil && inside && newline >= 0 && full():
			if err == nil {
				s.back()
			}
			s.reopen(r, start, newline)
			return true, nil
		case err == io.EOF:
			r.messy = r.messy || inside
			end()
			return true, nil
		case err != nil:
			return false, err
		}
		switch {
		case inside && c == '"':
			if s.follows('"') {
				if !full() {
					keep(c, false)
				}
				keep(c, true)
			} else {
				keep(c, false)
				inside = false
			}
		case inside:
			keep(c, true)
			if c == '\n' && newline < 0 && !cut {
				newline = len(r.raw)
			}
		case c == '"' && len(r.raw) == start && !quoted:
			keep(c, false)
			quoted, inside = true, true
		case c == s.comma:
			end()
			if len(r.raw) < maxRow {
				r.raw = append(r.raw, c)
			}
			return false, nil
		case c == '\n':
			r.ending = "\n"
			end()
			return true, nil
		case c == '\r' && s.follows('\n'):
			r.ending = "\r\n"
			end()
			return true, nil
		case c == '\r' && s.ended(): // a file cut off within its last line ending
			r.ending = "\r"
			end()
			return true, nil
		default:
			keep(c, true)
			r.messy = r.messy || quoted
		}
	}
}

// follows takes the next byte if it is c.
func (s *scanner) follows(c byte) bool {
	next, err := s.read()
	if err != nil {
		return false // read again, and reported, by the caller's next read
	}
	if next == c {
		return true
	}
	s.back()
	return false
}

// ended reports whether nothing more follows.
func (s *scanner) ended() bool {
	_, err := s.read()
	if err == nil {
		s.back()
	}
	return err == io.EOF
}

// reopen ends a row whose quote in its last cell is never closed (or not within
// MaxCell bytes and over a line break): the row ends at its first line break,
// and what stands after it is read as rows again.
func (s *scanner) reopen(r *row, start, newline int) {
	r.fault, r.at, r.messy = unclosedQuote, len(r.cells), true
	line := r.raw
	if newline >= 0 {
		s.unread(r.raw[newline:])
		line = r.raw[:newline-1]
		r.ending = "\n"
		if n := len(line); n > 0 && line[n-1] == '\r' {
			line, r.ending = line[:n-1], "\r\n"
		}
	}
	// The rest of the line is read without regard to quotes, so that the cells
	// after the stray one keep their places.
	rest := line[min(start, len(line)):]
	r.raw = line
	offset := start
	for _, cell := range bytes.Split(rest, []byte{s.comma}) {
		offset += len(cell)
		r.cells = append(r.cells, string(cell))
		r.ends = append(r.ends, offset)
		offset++
	}
}
