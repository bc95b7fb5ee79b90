package tui

import "beckline/tui/canvas"

// stateColumn is where the keys start on the bottom line, after the state; a
// longer name of a state moves them.
const stateColumn = 9

// drawKeys names the state and its keys on the last row, as many as fit.
func (m *Model) drawKeys(c *canvas.Canvas) {
	y := c.Height - 1
	x := max(c.Text(1, y, stateNames[m.state], canvas.Strong)+1, stateColumn)
	for _, b := range bindings[m.state] {
		if b.short == "" {
			continue
		}
		if x+len([]rune(b.shown))+1+len([]rune(b.short)) > c.Width-1 {
			break
		}
		x = c.Text(x, y, b.shown, canvas.Key) + 1
		x = c.Text(x, y, b.short, canvas.Plain) + 2
	}
}
