package tui

import (
	"fmt"

	"beckline/dosing"
	"beckline/tui/canvas"
)

// Columns of the list of fields.
const (
	markColumn  = 1
	labelColumn = 2
	valueColumn = 17
	unitColumn  = 26
	fieldsWidth = 38
)

// drawFields shows the places of the station walked to.
func (m *Model) drawFields(c *canvas.Canvas, top, end int) {
	st := m.station()
	count := end - top - 1
	first := m.window(count)
	heading := stationHeading[st.kind]
	if st.kind == fixedStation {
		if p, ok := dosing.ProductByName(st.title); ok {
			heading += ", mg/L as " + p.Chemical.Formula
		}
	}
	x := c.Text(labelColumn, top, canvas.Cut(heading, fieldsWidth-labelColumn), canvas.Plain)
	if len(st.places) > count {
		c.Text(x+1, top, fraction(first+1, first+count, len(st.places)), canvas.Faint)
	}
	for i := range count {
		if n := first + i; n < len(st.places) {
			m.drawField(c, top+1+i, st.places[n], n == m.row[m.at])
		}
	}
}

var stationHeading = map[stationKind]string{
	rawStation: "Readings", fixedStation: "Given dose", solvedStation: "Product", finishedStation: "Target",
}

// window keeps the mark among the count places that are shown, and returns the
// first of them.
func (m *Model) window(count int) int {
	at, top := m.row[m.at], m.top[m.at]
	if at < top {
		top = at
	}
	if at >= top+count {
		top = at - count + 1
	}
	m.top[m.at] = min(top, max(len(m.station().places)-count, 0))
	return m.top[m.at]
}

// drawField shows one place: a mark for trouble, the mark of the walk, label,
// what stands there, unit.
func (m *Model) drawField(c *canvas.Canvas, y int, p place, here bool) {
	switch {
	case m.now.bad[p.name] != "":
		c.Set(0, y, '!', canvas.Alarm)
	case m.now.unsure[p.name] != "":
		c.Set(0, y, '?', canvas.Notice)
	}
	if here {
		c.Set(markColumn, y, '▸', canvas.Plain)
	}
	c.Text(labelColumn, y, canvas.Cut(p.label, valueColumn-labelColumn-1), canvas.Faint)
	text, unit := m.sheet.shown(p)
	caret := 0
	if here && m.state == typing {
		text, caret = m.edit.String(), m.edit.caret
		unit = !hasUnit(text)
	}
	room := fieldsWidth - valueColumn - 1
	shift := max(caret-room+1, 0)
	shown := []rune(text)
	if shift > 0 || len(shown) > room && here && m.state == typing {
		shown = shown[shift:min(len(shown), shift+room)]
	}
	if text == "" && p.blank != "" && !(here && m.state == typing) {
		c.Text(valueColumn, y, canvas.Cut("("+p.blank+")", room), canvas.Faint)
		if here && m.state != choosing {
			c.Cursor(valueColumn, y)
		}
		return
	}
	end := c.Text(valueColumn, y, canvas.Cut(string(shown), room), canvas.Plain)
	if (unit || text == "") && end <= unitColumn {
		c.Text(unitColumn, y, canvas.Cut(m.sheet.Units.label(p), fieldsWidth-unitColumn), canvas.Faint)
	}
	if here && m.state != choosing {
		c.Cursor(valueColumn+caret-shift, y)
	}
}

// fraction says which part of a list is shown.
func fraction(first, last, of int) string { return fmt.Sprintf("%d-%d of %d", first, last, of) }
