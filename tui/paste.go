package tui

import (
	"strings"
	"unicode"

	"beckline/dosing/reading"
)

// pasted is one value of a paste and the place that it would go to.
type pasted struct {
	place place
	text  string
	wrong string // why it cannot be used
	odd   string // why it is unusual
}

// pasteText takes a paste. One value goes to the field, as if typed; several
// go to the readings in their order, after they have been shown.
func (m *Model) pasteText(text string) {
	if m.state == choosing {
		for _, r := range text {
			m.list.search(r)
		}
		return
	}
	if ofWork(m.state) {
		m.pasteEntry(text)
		return
	}
	if m.state != walking && m.state != typing {
		return
	}
	if named, again, ok := namedPaste(text); ok {
		m.ask(named, again)
		return
	}
	text, more := firstRow(text)
	values := splitPaste(text)
	switch {
	case len(values) == 0:
		m.note = "the paste holds no number"
	case len(values) == 1:
		m.pasteOne(values[0])
	default:
		m.pasteRow(values, more)
	}
}

func (m *Model) pasteOne(text string) {
	if m.state == walking {
		if m.place().kind != numberPlace {
			m.note = "a number cannot go here"
			return
		}
		m.startTyping("")
	}
	for _, r := range reading.Clean(text) {
		m.typeRune(r)
	}
}

// pasteRow offers values in the order of the readings. One whose unit its place
// does not take goes where its unit belongs.
func (m *Model) pasteRow(values []string, more bool) {
	if len(values) > len(rawPlaces) {
		m.note = "the paste holds more values than there are readings"
		return
	}
	var row []namedValue
	seen := map[string]bool{}
	for i, text := range values {
		if text == "" {
			continue
		}
		p := rawPlaces[i]
		if _, err := p.field.Parse(text); err != nil {
			if other, sure := placeByUnit(text); sure {
				p = other
			}
		}
		if !seen[p.name] {
			row, seen[p.name] = append(row, namedValue{place: p, text: text}), true
		}
	}
	m.ask(row, more)
}

// ask shows what would be entered and waits for a yes.
func (m *Model) ask(values []namedValue, more bool) {
	if m.state == typing {
		m.cancel()
	}
	m.paste, m.pasteMore = nil, more
	for _, value := range values {
		text := m.sheet.Units.complete(value.place, value.text)
		p := pasted{place: value.place, text: reading.Clean(text)}
		if v, err := p.place.field.Parse(text); err != nil {
			p.wrong = err.Error()
		} else if v.Unusual {
			p.odd = v.UnusualWhy
		}
		m.paste = append(m.paste, p)
	}
	m.state = pasting
}

// takePaste is the yes to the values shown.
func (m *Model) takePaste() {
	s := m.sheet.clone()
	if s.Demo {
		s = s.own()
	}
	for _, p := range m.paste {
		s.set(p.place, p.text)
		if p.odd != "" {
			s.Accepted[p.place.name] = p.text
		}
	}
	m.state, m.paste, m.at = walking, nil, 0
	m.change(s)
}

func (m *Model) dropPaste() { m.state, m.paste = walking, nil }

// splitPaste takes a paste apart: at tabs, line ends and semicolons, else at
// commas that a blank follows, else at blanks between numbers.
func splitPaste(text string) []string {
	text = strings.TrimFunc(text, unicode.IsSpace)
	cut := func(r rune) bool { return r == '\t' || r == '\n' || r == '\r' || r == ';' || r == '|' }
	if strings.ContainsFunc(text, cut) {
		parts := strings.FieldsFunc(strings.ReplaceAll(text, "\r\n", "\n"), func(r rune) bool { return r == '\n' || r == '\r' })
		if len(parts) == 1 { // one row of a table: an empty cell is one that was not measured
			return cells(strings.FieldsFunc(keepEmpty.Replace(text), cut))
		}
		return numbers(strings.FieldsFunc(text, cut))
	}
	if parts := strings.Split(text, ", "); len(parts) > 1 {
		return numbers(parts)
	}
	words := strings.Fields(text)
	for _, w := range words {
		if !startsNumber(w) {
			return numbers([]string{text}) // one value with its unit
		}
	}
	return numbers(words)
}

// keepEmpty puts a blank between separators, so that nothing between two of
// them still counts as a cell.
var keepEmpty = strings.NewReplacer("\t", " \t ", ";", " ; ", "|", " | ")

// cells trims the cells of a row. What is no number is kept, so that it is seen
// to be refused; a row without any number holds nothing.
func cells(parts []string) []string {
	if len(numbers(parts)) == 0 {
		return nil
	}
	out := make([]string, len(parts))
	for i, p := range parts {
		out[i] = strings.TrimSpace(p)
	}
	for len(out) > 0 && out[len(out)-1] == "" {
		out = out[:len(out)-1]
	}
	return out
}

// numbers keeps the parts that start like a number.
func numbers(parts []string) []string {
	var out []string
	for _, p := range parts {
		if p = strings.TrimSpace(p); startsNumber(p) {
			out = append(out, p)
		}
	}
	return out
}

func startsNumber(s string) bool {
	for i, r := range s {
		if r >= '0' && r <= '9' {
			return true
		}
		if i > 3 || !strings.ContainsRune("+-−.,", r) {
			return false
		}
	}
	return false
}
