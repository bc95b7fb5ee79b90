// Package console takes the terminal's input into raw mode and gives it back,
// tells its size, and reads keys so that a slow line does not tear them.
package console

import (
	"errors"
	"io"
	"os"
	"sync"

	"golang.org/x/term"
)

// Console is the terminal that the screen runs on.
type Console struct {
	in, out *os.File
	mu      sync.Mutex
	input   *term.State // as found, nil while not raw
	output  func()      // undoes what was set on the output, nil where nothing was
}

// Open looks at the two ends. Either may be something other than a terminal;
// see IsTerminal.
func Open(in, out *os.File) *Console { return &Console{in: in, out: out} }

// IsTerminal reports whether both ends are terminals.
func (c *Console) IsTerminal() bool {
	return term.IsTerminal(int(c.in.Fd())) && term.IsTerminal(int(c.out.Fd()))
}

// Raw takes the terminal: keys arrive one by one and are not echoed.
func (c *Console) Raw() error {
	c.mu.Lock()
	defer c.mu.Unlock()
	if c.input != nil {
		return nil
	}
	state, err := term.MakeRaw(int(c.in.Fd()))
	if err != nil {
		return err
	}
	c.input = state
	c.output = prepareOutput(c.out)
	return nil
}

// Again sets raw mode once more after somebody else changed it, keeping the
// state that Restore goes back to.
func (c *Console) Again() error {
	c.mu.Lock()
	defer c.mu.Unlock()
	if c.input == nil {
		return nil
	}
	_, err := term.MakeRaw(int(c.in.Fd()))
	return err
}

// Restore gives the terminal back as it was found. It may be called often.
func (c *Console) Restore() error {
	c.mu.Lock()
	defer c.mu.Unlock()
	if c.input == nil {
		return nil
	}
	err := term.Restore(int(c.in.Fd()), c.input)
	c.input = nil
	if c.output != nil {
		c.output()
		c.output = nil
	}
	return err
}

// Size returns columns and rows. A terminal that does not know its size (a
// serial line says 0 × 0) counts as 80 × 24.
func (c *Console) Size() (columns, rows int) {
	columns, rows, err := term.GetSize(int(c.out.Fd()))
	if err != nil || columns < 1 || rows < 1 {
		return 80, 24
	}
	return columns, rows
}

// Keys is the input for the key reader. It is still a file to it, so that a
// wait for a key can be cancelled, but a read never ends inside of an escape
// sequence unless the rest fails to come: on a slow line an arrow key arrives
// in pieces, and its first piece alone means Escape.
type Keys struct{ *os.File }

// Keys returns the input of the console.
func (c *Console) Keys() *Keys { return &Keys{c.in} }

// Read reads what there is, and on for as long as the end of it is an
// unfinished sequence.
func (k *Keys) Read(b []byte) (int, error) {
	n, err := k.File.Read(b)
	for err == nil && n > 0 && n < len(b) && unfinished(b[:n]) {
		if !waitInput(k.File, pieceGap) {
			break
		}
		var more int
		more, err = k.File.Read(b[n:])
		n += more
	}
	if n > 0 && errors.Is(err, io.EOF) {
		err = nil
	}
	return n, err
}

// unfinished reports whether b ends in the beginning of an escape sequence or
// of a character.
func unfinished(b []byte) bool {
	for i := len(b) - 1; i >= 0 && i >= len(b)-16; i-- {
		if b[i] == 0x1b {
			return !complete(b[i:])
		}
	}
	return midRune(b)
}

// complete reports whether a sequence that starts with the escape character
// has all of its bytes.
func complete(s []byte) bool {
	if len(s) == 1 {
		return false
	}
	switch s[1] {
	case '[':
		for _, c := range s[2:] {
			if c >= 0x40 && c <= 0x7e && !(c == '[' && len(s) == 3) {
				return true
			}
		}
		return false
	case 'O':
		return len(s) > 2
	}
	return true
}

// midRune reports whether b ends inside of a UTF-8 character.
func midRune(b []byte) bool {
	for i := 1; i <= 3 && i <= len(b); i++ {
		c := b[len(b)-i]
		switch {
		case c >= 0xf0:
			return i < 4
		case c >= 0xe0:
			return i < 3
		case c >= 0xc0:
			return i < 2
		case c < 0x80:
			return false
		}
	}
	return false
}
