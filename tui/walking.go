package tui

import (
	tea "github.com/charmbracelet/bubbletea"
)

// toStation walks along the line.
func (m *Model) toStation(by int) {
	m.at = min(max(m.at+by, 0), len(m.line)-1)
}

// toPlace walks within the station.
func (m *Model) toPlace(by int) {
	m.row[m.at] = min(max(m.row[m.at]+by, 0), len(m.station().places)-1)
}

// onward walks to the next place, and on to the next station's first.
func (m *Model) onward(by int) {
	next := m.row[m.at] + by
	switch {
	case next >= 0 && next < len(m.station().places):
		m.row[m.at] = next
	case next < 0 && m.at > 0:
		m.at--
		m.row[m.at] = len(m.station().places) - 1
	case next > 0 && m.at < len(m.line)-1:
		m.at++
		m.row[m.at] = 0
	}
}

// open starts typing into the place, or opens its list.
func (m *Model) open() {
	switch p := m.place(); p.kind {
	case productPlace:
		m.chooseProduct()
	case targetPlace:
		m.chooseTarget()
	default:
		text := m.sheet.text(p)
		if m.sheet.Demo && isReading(p.name) {
			text = "" // a demo number is nothing to build a real one on
		}
		m.startTyping(text)
	}
}

// startWith starts typing with the character that was pressed, where it can
// start a number. Where a name or a kind stands, the number goes to the value
// that belongs to it. Any other character is answered: silence would leave a
// person guessing.
func (m *Model) startWith(r rune) {
	if !(r >= '0' && r <= '9' || r == '.' || r == ',') {
		if r > ' ' && r < 0x7f {
			m.note = string(r) + " does nothing here; ? lists the keys, Ctrl-C leaves"
		}
		return
	}
	if p := m.place(); p.kind == targetPlace || p.kind == productPlace && p.add >= 0 && len(m.station().places) > 1 {
		m.row[m.at] = 1
	}
	if m.place().kind != numberPlace {
		m.note = "no number goes here: p lists the products, the arrows walk to a field"
		return
	}
	m.startTyping("")
	m.typeRune(r)
}

// nudge moves the value by the reading's own step. A value that becomes
// unusual is asked about like one that was typed.
func (m *Model) nudge(steps int) {
	p := m.place()
	if p.kind == targetPlace {
		m.nextTarget(steps)
		return
	}
	if p.kind != numberPlace {
		return
	}
	if p.plainText() {
		m.nudgeDose(p, steps)
		return
	}
	text := m.sheet.text(p)
	if text == "" {
		m.note = p.label + " is not entered: type it first"
		return
	}
	v, err := p.field.Parse(text)
	if err != nil {
		m.note = err.Error()
		return
	}
	moved := p.field.Nudge(v.SI, steps)
	next, ok := p.field.ShowIn(v.Unit, moved)
	if !ok {
		return
	}
	if v.Unit != p.field.Units()[0] {
		next += " " + v.Unit
	}
	s := m.sheet.clone()
	s.set(p, next)
	if p.name == s.Target {
		s.Untouched = false
	}
	m.offerChange(p, s, next)
}

// erase empties the place: not measured.
func (m *Model) erase() {
	p := m.place()
	if p.kind != numberPlace || m.sheet.text(p) == "" {
		return
	}
	s := m.sheet.clone()
	if s.Demo && isReading(p.name) {
		m.note = "the demo plant keeps its readings: type one of yours to start your own"
		return
	}
	s.set(p, "")
	m.change(s)
}

// startAfresh empties everything but product and target.
func (m *Model) startAfresh() {
	m.change(m.sheet.own())
	m.good, m.old = evaluation{}, false
	m.take(evaluate(m.sheet, m.solve))
	m.at, m.row[0] = 0, 0
	m.note = "emptied; u brings it back"
}

func (m *Model) undo() {
	if s, ok := m.history.back(m.sheet); ok {
		m.use(s)
		m.note = "undone; r does it again"
	} else {
		m.note = "nothing to undo"
	}
}

func (m *Model) redo() {
	if s, ok := m.history.forward(m.sheet); ok {
		m.use(s)
		m.note = "done again"
	} else {
		m.note = "nothing to do again"
	}
}

// leave quits. What was entered is in the draft.
func (m *Model) leave() tea.Cmd { return tea.Quit }
