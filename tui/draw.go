package tui

import (
	"beckline/tui/canvas"
)

// The least size at which the whole screen is shown.
const (
	leastWidth  = 80
	leastHeight = 24
)

// rows is where the parts of the screen lie, by row.
type rows struct {
	line    int // the line of stations, lineRows high
	main    int // heading of the fields and of the curve
	message int // entry trouble, questions, warnings
	safety  int
	keys    int
}

const (
	lineRows    = 7
	messageRows = 2
)

// layout shares out the rows. What a tall terminal has more goes to the
// fields, and a few rows to the safety panel.
func (m *Model) layout() rows {
	r := rows{line: 1, main: 1 + lineRows, keys: m.height - 1}
	r.safety = r.keys - 3 - min((m.height-leastHeight)/6, 5)
	r.message = r.safety - messageRows
	return r
}

// pageRows is how many lines of a page are shown.
func (m *Model) pageRows() int { return max(m.layout().safety-1, 1) }

// draw makes the frame.
func (m *Model) draw() *canvas.Canvas {
	c := canvas.New(m.width, m.height)
	switch {
	case m.width < leastWidth || m.height < leastHeight:
		m.drawSmall(c)
	case m.state == paging:
		m.drawPage(c)
		m.drawSafety(c)
		m.drawKeys(c)
	case ofWork(m.state):
		m.drawWork(c)
		m.drawSafety(c)
		m.drawKeys(c)
	default:
		r := m.layout()
		m.drawTitle(c)
		m.drawLine(c, r.line)
		m.drawAnswer(c, r.line)
		if m.state == choosing {
			m.drawList(c, r.main, r.message)
		} else {
			m.drawFields(c, r.main, r.message)
			m.drawRight(c, r.main, r.message)
		}
		m.drawMessages(c, r.message)
		m.drawSafety(c)
		m.drawKeys(c)
	}
	m.look.limit(c)
	return c
}

// drawTitle says whose water this is.
func (m *Model) drawTitle(c *canvas.Canvas) {
	if m.sheet.Demo {
		c.Text(1, 0, "DEMO PLANT: type a reading to start yours", canvas.Good)
		return
	}
	name := "beckline"
	if m.sheet.plant != nil {
		name = m.sheet.plantName()
	}
	c.Text(1, 0, canvas.Cut(name, c.Width-2), canvas.Plain)
	if text := m.sheet.unchecked(); text != "" {
		c.Right(c.Width-1, 0, text, canvas.Notice)
	}
}

// drawPage shows the page.
func (m *Model) drawPage(c *canvas.Canvas) {
	lines := m.pageLines()
	rows := m.pageRows()
	c.Text(1, 0, m.page.title, canvas.Strong)
	if len(lines) > rows {
		c.Right(c.Width-1, 0, fraction(m.page.top+1, min(m.page.top+rows, len(lines)), len(lines)), canvas.Faint)
	}
	x := 1
	if m.page.plain {
		x = 0
	}
	for i := range rows {
		if n := m.page.top + i; n < len(lines) {
			c.Text(x, 1+i, lines[n], canvas.Plain)
		}
	}
}

// drawExplanation shows what the marked choice means, above row end, and returns
// how many rows that took.
func (m *Model) drawExplanation(c *canvas.Canvas, end int, shown []choice) int {
	if m.list.at >= len(shown) || shown[m.list.at].explain == "" {
		return 0
	}
	lines := canvas.Wrap(shown[m.list.at].explain, c.Width-4)
	for i, line := range lines {
		c.Text(2, end-len(lines)+i, line, canvas.Plain)
	}
	return len(lines)
}

// drawList shows the list that is being searched.
func (m *Model) drawList(c *canvas.Canvas, top, end int) {
	x := c.Text(1, top, m.list.title+": ", canvas.Strong)
	x = c.Text(x, top, string(m.list.words), canvas.Plain)
	c.Cursor(x, top)
	shown := m.list.shown()
	end -= m.drawExplanation(c, end, shown)
	rows := end - top - 1
	first := min(max(m.list.at-rows/2, 0), max(len(shown)-rows, 0))
	if len(shown) > rows {
		c.Right(c.Width-1, top, fraction(first+1, min(first+rows, len(shown)), len(shown)), canvas.Faint)
	}
	if len(shown) == 0 {
		c.Text(3, top+1, "nothing of that name", canvas.Notice)
	}
	for i := range rows {
		n := first + i
		if n >= len(shown) {
			break
		}
		y, s := top+1+i, canvas.Plain
		if n == m.list.at {
			c.Set(1, y, '▸', canvas.Strong)
			s = canvas.Strong
		}
		c.Text(3, y, shown[n].name, s)
		c.Text(28, y, canvas.Cut(shown[n].detail, c.Width-29), canvas.Faint)
	}
}
