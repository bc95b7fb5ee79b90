package tui

import (
	"slices"
	"strconv"

	"beckline/dosing/reading"
)

// addStation asks for a product and puts it on the line after the station
// walked to, ahead of the chemical that is solved for.
func (m *Model) addStation() {
	at := len(m.sheet.Adds)
	switch st := m.station(); st.kind {
	case rawStation:
		at = 0
	case fixedStation:
		at = st.add + 1
	}
	m.openList(list{title: "feed ahead", all: catalogue(), pick: func(m *Model, name string) {
		s := m.sheet.clone()
		s.Adds = slices.Insert(s.Adds, at, feedEntry{Product: name})
		m.change(s)
		m.row = slices.Insert(m.row, at+1, 1)
		m.top = slices.Insert(m.top, at+1, 0)
		m.relay()
		m.at = at + 1 // the raw water stands before them
	}}, "")
}

// removeStation takes the station walked to off the line.
func (m *Model) removeStation() {
	st := m.station()
	if st.kind != fixedStation {
		m.note = "only a chemical fed at a given dose can be taken off; p changes the product"
		return
	}
	s := m.sheet.clone()
	s.Adds = slices.Delete(s.Adds, st.add, st.add+1)
	m.change(s)
	m.note = st.title + " taken off the line; u brings it back"
}

// moveStation moves the station walked to along the line.
func (m *Model) moveStation(by int) {
	st := m.station()
	to := st.add + by
	if st.kind != fixedStation || to < 0 || to >= len(m.sheet.Adds) {
		m.note = "it cannot go there"
		return
	}
	s := m.sheet.clone()
	s.Adds[st.add], s.Adds[to] = s.Adds[to], s.Adds[st.add]
	m.change(s)
	m.at += by
}

// nudgeDose moves a given dose by a step that suits its size.
func (m *Model) nudgeDose(p place, steps int) {
	d, err := reading.ParseDose(m.sheet.Adds[p.add].Product + "=" + m.sheet.text(p))
	if err != nil {
		m.note = "type a dose first"
		return
	}
	step := 1.0
	switch {
	case d.MgPerLitre < 5:
		step = 0.1
	case d.MgPerLitre >= 100:
		step = 10
	}
	text := strconv.FormatFloat(max(d.MgPerLitre+step*float64(steps), 0), 'g', 4, 64)
	if d.Basis != "" {
		text += " mg/L " + d.Basis
	}
	s := m.sheet.clone()
	s.set(p, text)
	m.offerChange(p, s, text)
}

// offerChange makes an edited sheet the sheet, or asks first where a value has
// become unusual.
func (m *Model) offerChange(p place, s sheet, text string) {
	unsure := inspect(s).unsure[p.name] != ""
	if unsure && m.sheet.Accepted[p.name] != "" && m.sheet.Accepted[p.name] == m.sheet.text(p) {
		s.Accepted[p.name], unsure = text, false // the band was left with a yes before
	}
	if !unsure {
		m.change(s)
		return
	}
	m.startTyping(m.sheet.text(p))
	m.edit = newEdit(text)
	m.finish(func() {})
}
