package tui

import (
	"math"

	"beckline/dosing/report"
	"beckline/tui/canvas"
)

// profileFigures are the figures of the second view.
var profileFigures = []struct{ key, label string }{
	{"alkalinity_mg_l_caco3", "alk"}, {"saturation_index", "SI"}, {"ccpp_mg_l_caco3", "CCPP"},
}

// drawProfile shows alkalinity, SI and CCPP along the line as bars from a zero
// line: a bar to the left is below zero. What cannot be had is left out.
func (m *Model) drawProfile(c *canvas.Canvas, x, top, width, height int) {
	c.Text(x, top, "along the line", canvas.Plain)
	stations := m.profileStations((height - 1) / len(profileFigures))
	y := top + 1
	for _, f := range profileFigures {
		var values []report.Figure
		low, high := 0.0, 0.0
		for _, st := range stations {
			v := figure(report.Water(&m.water(st).Figures), f.key)
			values = append(values, v)
			if v.Value.Given {
				low, high = math.Min(low, v.Value.Value), math.Max(high, v.Value.Value)
			}
		}
		if low == high {
			continue
		}
		c.Text(x, y, f.label, canvas.Strong)
		barX, barWidth := x+16, width-16-9
		zero := barX + int(math.Round(-low/(high-low)*float64(barWidth)))
		for i, st := range stations {
			c.Text(x+5, y, canvas.Cut(st.title, 10), canvas.Faint)
			c.Set(zero, y, '│', canvas.Faint)
			if v := values[i]; v.Value.Given {
				end := barX + int(math.Round((v.Value.Value-low)/(high-low)*float64(barWidth)))
				for b := min(zero+1, end); b <= max(zero-1, end); b++ {
					if b != zero {
						c.Set(b, y, '■', canvas.Curve)
					}
				}
				c.Text(x+width-7, y, v.Show(), canvas.Plain)
			} else {
				c.Text(x+width-7, y, "-", canvas.Plain)
			}
			y++
		}
	}
}

// profileStations are the stations with figures, at most so many: the raw water,
// then those up to the finished water. The finished water is the last chemical's
// and is not shown twice.
func (m *Model) profileStations(most int) []station {
	var all []station
	for _, st := range m.line {
		if st.kind != finishedStation && m.water(st) != nil {
			all = append(all, st)
		}
	}
	if over := len(all) - max(most, 2); over > 0 {
		all = append(all[:1:1], all[1+over:]...)
	}
	return all
}
