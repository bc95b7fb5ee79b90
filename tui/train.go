package tui

import (
	"slices"
	"strconv"
	"strings"

	"beckline/dosing/reading"
)

// addStation asks what is done after the station walked to, or before it, and
// puts that on the line.
func (m *Model) addStation(before bool) {
	at, behind, where := 0, false, "after "+m.station().title
	st := m.station()
	if before {
		where = "before " + st.title
	}
	switch st.kind {
	case rawStation:
		where = "after raw water" // nothing comes before it
	case fixedStation:
		behind = m.sheet.Adds[st.add].Behind
		if at = st.add; !before {
			at++
		}
	case solvedStation:
		at, behind = m.sheet.ahead(), !before
	case finishedStation:
		at, behind, where = len(m.sheet.Adds), true, "before the finished water"
	}
	m.openList(list{title: "feed " + where, all: append(m.catalogue(), processes...), pick: func(m *Model, name string) {
		s := m.sheet.clone()
		s.Adds = slices.Insert(s.Adds, at, feedEntry{Product: name, Behind: behind})
		m.change(s)
		place := at + 1 // the raw water stands before them
		if behind {
			place++ // and the solved one
		}
		m.row = slices.Insert(m.row, place, 1)
		m.top = slices.Insert(m.top, place, 0)
		m.relay()
		m.at = place
		if name == contactor {
			m.note = "a contactor takes no dose; x takes it off, [ and ] move it"
		}
	}}, "")
}

// removeStation takes the station walked to off the line.
func (m *Model) removeStation() {
	st := m.station()
	if st.kind != fixedStation {
		m.note = "only a step that is given can be taken off; p changes the product"
		return
	}
	s := m.sheet.clone()
	s.Adds = slices.Delete(s.Adds, st.add, st.add+1)
	m.change(s)
	m.note = st.title + " taken off the line; u brings it back"
}

// moveStation moves the station walked to along the line; the others keep their
// order.
func (m *Model) moveStation(by int) {
	st := m.station()
	ahead := m.sheet.ahead()
	s := m.sheet.clone()
	switch {
	case st.kind == solvedStation && by < 0 && ahead > 0:
		s.Adds[ahead-1].Behind = true
	case st.kind == solvedStation && by > 0 && ahead < len(s.Adds):
		s.Adds[ahead].Behind = false
	case st.kind == fixedStation && by > 0 && st.add == ahead-1:
		s.Adds[st.add].Behind = true
	case st.kind == fixedStation && by < 0 && st.add == ahead:
		s.Adds[st.add].Behind = false
	case st.kind == fixedStation && st.add+by >= 0 && st.add+by < len(s.Adds):
		s.Adds[st.add], s.Adds[st.add+by] = s.Adds[st.add+by], s.Adds[st.add]
	default:
		m.note = "it cannot go there"
		return
	}
	m.change(s)
	m.at += by
}

// nudgeDose moves a given dose by a step that suits its size.
func (m *Model) nudgeDose(p place, steps int) {
	d, err := reading.ParseDose("x=" + strings.TrimSuffix(m.sheet.text(p), "%"))
	if err != nil {
		m.note = "type a number first"
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
