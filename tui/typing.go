package tui

import "strings"

// startTyping opens the place for typing with a text in it.
func (m *Model) startTyping(text string) {
	m.before = m.sheet.clone()
	m.edit = newEdit(text)
	m.state, m.asked, m.paused = typing, false, false
}

// typeRune types one character. The first character of a reading of one's own
// ends the demo plant.
func (m *Model) typeRune(r rune) {
	if p := m.place(); m.sheet.Demo && isReading(p.name) {
		m.use(m.sheet.own())
	}
	if m.asked && strings.ContainsRune("0123456789.,-−", r) {
		m.edit.clear() // the answer to the question is another value
	}
	m.edit.insert(r)
	m.asked, m.paused = false, false
}

// touch notes that the text was changed by another key.
func (m *Model) touch() { m.asked, m.paused = false, false }

// typed is the sheet with what is being typed in its place.
func (m *Model) typed() sheet {
	s, p := m.sheet.clone(), m.place()
	s.set(p, s.Units.complete(p, strings.TrimSpace(m.edit.String())))
	if p.name == s.Target {
		s.Untouched = false
	}
	return s
}

// follow computes what is being typed, if no key came since key number seq.
func (m *Model) follow(seq int) {
	if m.state != typing || seq != m.seq || m.asked {
		return
	}
	m.paused = true
	if s := m.typed(); !s.equal(m.sheet) || m.now.bad[m.place().name] != "" {
		m.take(evaluate(s, m.solve))
	}
}

// finish ends typing and walks on. An entry that cannot be used stays in its
// field with what is wrong; an unusual one is asked about first, once.
func (m *Model) finish(walk func()) {
	p, s := m.place(), m.typed()
	text := s.text(p)
	if m.sheet.Demo && isReading(p.name) && text == "" {
		m.cancel() // opened and left: the demo plant is as it was
		walk()
		return
	}
	if inspect(s).unsure[p.name] != "" {
		m.asked, m.paused = true, true
		m.take(evaluate(s, m.solve))
		return
	}
	m.settle(s)
	walk()
}

// keepTyped is Enter: the yes to the question about an unusual value, or else
// the end of the entry.
func (m *Model) keepTyped() {
	if m.asked {
		p, s := m.place(), m.typed()
		s.Accepted[p.name] = s.text(p)
		m.settle(s)
		m.toPlace(+1)
		return
	}
	m.finish(func() { m.toPlace(+1) })
}

// settle makes the typed sheet the sheet, as one step to undo.
func (m *Model) settle(s sheet) {
	m.state, m.asked = walking, false
	if !s.equal(m.before) {
		m.history.keep(m.before)
	}
	m.use(s)
	m.note = s.understood(m.place())
}

// cancel is Escape: everything is as it was before.
func (m *Model) cancel() {
	m.state, m.asked = walking, false
	m.use(m.before)
}
