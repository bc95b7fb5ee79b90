package tui

import (
	"beckline/dosing"
	"beckline/dosing/report"
	"beckline/tui/canvas"
)

// lineFigures are the rows of the line: the figure of each water by its key in
// the report, and how the row is labelled.
var lineFigures = []struct{ key, label string }{
	{"ph", "pH"},
	{"alkalinity_mg_l_caco3", "alk. as CaCO3"},
	{"free_co2_mg_l", "free CO2"},
	{"saturation_index", "SI of calcite"},
	{"ccpp_mg_l_caco3", "CCPP as CaCO3"},
}

const (
	lineLabels  = 16 // columns of the labels
	leastColumn = 11 // columns of a station at least
	mostColumn  = 18
	answerWidth = 23
)

// drawLine shows the path of the water: the stations as one pipe, and under
// each the water there.
func (m *Model) drawLine(c *canvas.Canvas, top int) {
	room := c.Width - answerWidth - 1 - lineLabels
	column := min(max(room/len(m.line), leastColumn), mostColumn)
	shown := min(room/column, len(m.line))
	first := min(max(m.at-shown/2, 0), len(m.line)-shown)
	c.Text(1, top+1, "dose mg/L pure", canvas.Faint)
	for i, f := range lineFigures {
		c.Text(1, top+2+i, f.label, canvas.Faint)
	}
	if first > 0 {
		c.Right(lineLabels-2, top, "◂ "+more(first), canvas.Faint)
	}
	for i := range shown {
		n := first + i
		x := lineLabels + i*column
		m.drawStation(c, x, top, column, n, first+shown == len(m.line))
		if n == len(m.line)-1 {
			break
		}
		if i == shown-1 {
			c.Text(x+column-2, top, "▸", canvas.Faint)
		}
	}
}

func more(n int) string { return string(rune('0'+min(n, 9))) + " more" }

// drawStation shows one station: its name on the pipe, what is fed there and
// the water after it. last says that the finished water is in view.
func (m *Model) drawStation(c *canvas.Canvas, x, top, width, n int, last bool) {
	st := m.line[n]
	name := canvas.Cut(st.title, width-3)
	style := canvas.Plain
	if n == m.at {
		style = canvas.Strong
		c.Set(x-1, top, '[', style)
	}
	end := c.Text(x, top, name, style)
	if n == m.at {
		end = c.Text(end, top, "]", style)
	}
	if n < len(m.line)-1 {
		for i := end + 1; i < x+width-2; i++ {
			c.Set(i, top, '═', canvas.Faint)
		}
		c.Set(x+width-2, top, '▶', canvas.Faint)
	}
	s := m.water(st)
	if s == nil {
		return
	}
	switch {
	case s.Addition == nil || st.kind == finishedStation:
	case s.Addition.Process == dosing.ChemicalFeed:
		c.Text(x, top+1, figure(report.Dose(s), "dose_mg_l").Show(), canvas.Plain)
	case s.Addition.Process == dosing.Aeration:
		c.Text(x, top+1, canvas.Cut(m.sheet.Adds[st.add].Dose, width-1), canvas.Plain)
	}
	if last && m.isFinishedWater(n) {
		return
	}
	figures := report.Water(&s.Figures)
	for i, f := range lineFigures {
		c.Text(x, top+2+i, figure(figures, f.key).Show(), canvas.Plain)
	}
}

// isFinishedWater tells whether what leaves a station is the finished water: it
// stands in the last column, and not twice.
func (m *Model) isFinishedWater(n int) bool { return n > 0 && n == len(m.line)-2 }

// water is the station of the result that a station of the line shows, nil
// where there is none.
func (m *Model) water(st station) *dosing.Station {
	r := m.good.result
	if r == nil {
		return nil
	}
	index := st.index
	switch {
	case m.old && st.kind == finishedStation:
		index = len(m.good.line) - 1
	case m.old:
		index = oldIndex(m.good.line, m.sheet.steps(), st.index)
	}
	if index < 0 || index >= len(r.Stations) {
		return nil
	}
	return &r.Stations[index]
}

// figure finds a figure by its key.
func figure(figures []report.Figure, key string) report.Figure {
	for _, f := range figures {
		if f.Key == key {
			return f
		}
	}
	return report.Figure{}
}
