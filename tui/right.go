package tui

import (
	"beckline/tui/canvas"
)

// curveWidth is how wide the curve is where the screen is narrow.
const curveWidth = 29

// drawRight shows the dose curve right of the fields.
func (m *Model) drawRight(c *canvas.Canvas, top, end int) {
	x := fieldsWidth + 2
	if m.profile && m.good.result != nil {
		m.drawProfile(c, x, top, min(c.Width-x-1, 60), end-top)
		return
	}
	if len(m.good.curve.ph) == 0 {
		return
	}
	c.Text(x, top, canvas.Cut(m.good.curve.steepness(), c.Width-x-1), canvas.Plain)
	width := min(c.Width-x-1, curveWidth+(c.Width-leastWidth)/2)
	m.good.curve.draw(c, x, top+1, width, min(end-top-3, 6+(c.Height-leastHeight)/2), m.look.glyphs == fullGlyphs)
	m.drawTrust(c, x, end-2)
}
