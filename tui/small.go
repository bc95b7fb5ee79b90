package tui

import (
	"fmt"
	"slices"

	"beckline/dosing/caution"
	"beckline/tui/canvas"
)

// drawSmall is the screen of a terminal below the least size: what it needs,
// and what must be seen all the same. Keys work as ever.
func (m *Model) drawSmall(c *canvas.Canvas) {
	y := 0
	put := func(text string, s canvas.Style) {
		for _, line := range canvas.Wrap(text, c.Width) {
			if y < c.Height {
				c.Text(0, y, line, s)
				y++
			}
		}
	}
	if m.good.result != nil && m.good.solved {
		a := answer(m.good.result.Dose(), m.sheet.Units)
		text := a.heading + " " + a.number + " " + a.unit
		if m.old {
			text = "OLD: " + text
		}
		put(text, canvas.Answer)
		put("dose "+pureDose(m.good.result.Dose())+", "+m.sheet.Product, canvas.Plain)
	} else {
		put("no dose yet", canvas.Plain)
	}
	if m.sheet.Demo {
		put("DEMO PLANT, not your water", canvas.Good)
	}
	for _, s := range m.messages() {
		put(s.text, s.style)
	}
	p := m.place()
	text := m.sheet.text(p)
	if m.state == typing {
		text = m.edit.String()
	}
	where := stateNames[m.state] + " " + p.label + ": " + text
	if m.openForm() != nil {
		where = m.smallWork()
	}
	put(where, canvas.Strong)
	put(fmt.Sprintf("The screen needs %d x %d, this is %d x %d. Ctrl-C leaves.", leastWidth, leastHeight, c.Width, c.Height), canvas.Plain)
	for _, line := range append(slices.Clone(m.shortCautions()), caution.Deferral) {
		put(line, canvas.Plain)
	}
}
