package tui

import "unicode/utf8"

// lineEdit is the text that is being typed and the place in it.
type lineEdit struct {
	text  []rune
	caret int
	fresh bool // nothing has been typed since the edit was opened
	most  int  // how many characters it takes; 0 is as many as a field
}

// longest is how much a field takes; more is not a value.
const longest = 60

func newEdit(text string) lineEdit {
	r := []rune(text)
	return lineEdit{text: r, caret: len(r), fresh: true}
}

func (e *lineEdit) String() string { return string(e.text) }

// insert puts one printable character at the caret. A minus sign typed first
// starts a new number: no number has a sign behind it.
func (e *lineEdit) insert(r rune) {
	if e.fresh && (r == '-' || r == '−') && e.caret == len(e.text) {
		e.text, e.caret = nil, 0
	}
	e.fresh = false
	if r < ' ' || r == 0x7f || r == utf8.RuneError || len(e.text) >= e.room() {
		return
	}
	e.text = append(e.text, 0)
	copy(e.text[e.caret+1:], e.text[e.caret:])
	e.text[e.caret] = r
	e.caret++
}

// erase removes the character before the caret.
func (e *lineEdit) erase() {
	e.fresh = false
	if e.caret > 0 {
		e.text = append(e.text[:e.caret-1], e.text[e.caret:]...)
		e.caret--
	}
}

// eraseHere removes the character at the caret.
func (e *lineEdit) eraseHere() {
	e.fresh = false
	if e.caret < len(e.text) {
		e.text = append(e.text[:e.caret], e.text[e.caret+1:]...)
	}
}

// clear removes everything.
func (e *lineEdit) clear() { *e = lineEdit{most: e.most} }

func (e *lineEdit) room() int {
	if e.most > 0 {
		return e.most
	}
	return longest
}

// move shifts the caret.
func (e *lineEdit) move(by int) {
	e.fresh = false
	e.caret = min(max(e.caret+by, 0), len(e.text))
}
