package tui

import (
	"beckline/tui/canvas"
)

// page is a text that covers the screen down to the safety panel.
type page struct {
	title string
	text  string
	plain bool // lines are shown as they are, to be selected with the mouse
	top   int
	back  state // where it was opened
}

func (m *Model) openPage(p page) {
	if ofWork(m.state) {
		p.back = m.state
	}
	m.page, m.state = p, paging
}

func (m *Model) closePage() { m.state = m.page.back }

// pageLines are the lines of the page at the present width.
func (m *Model) pageLines() []string {
	if m.page.plain {
		return canvas.Wrap(m.page.text, 1<<20)
	}
	return canvas.Wrap(m.page.text, m.width-2)
}

func (m *Model) scroll(by int) {
	m.page.top = min(max(m.page.top+by, 0), max(len(m.pageLines())-m.pageRows(), 0))
}
