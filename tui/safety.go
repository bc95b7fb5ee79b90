package tui

import (
	"slices"
	"strings"

	"beckline/dosing"
	"beckline/dosing/caution"
	"beckline/tui/canvas"
)

// products are the chemicals on the line, in its order, each kind once.
func (s sheet) products() []dosing.Product {
	var names []string
	for _, a := range s.Adds {
		names = append(names, a.Product)
	}
	var out []dosing.Product
	for _, name := range append(names, s.Product) {
		p, ok := s.productNamed(name)
		if name == contactor {
			p, ok = dosing.Product{Name: contactor, Title: "limestone contactor", Caution: "limestone"}, true
		}
		if ok && !slices.ContainsFunc(out, func(o dosing.Product) bool { return o.Caution == p.Caution }) {
			out = append(out, p)
		}
	}
	return out
}

// combined are the lines about what must not meet: the chemicals on the line and,
// where free chlorine was read in the raw water, the hypochlorite that must be
// fed ahead of it. Ammonia in a raw water is mostly its own, far too little to
// be of that kind, so it brings no line; what chlorine does with it is in the
// figures.
func (s sheet) combined(products []dosing.Product) []string {
	keys := make([]string, len(products))
	for i, p := range products {
		keys[i] = p.Caution
	}
	if v, err := lookupPlace("free-chlorine").field.Parse(s.Values["free-chlorine"]); err == nil && v.SI > 0 {
		keys = append(keys, "hypochlorite")
	}
	return caution.Combined(keys)
}

// panel is the safety panel's text for the chemicals it was made for; looking
// all sheets up again for each frame would cost more than the frame.
type panel struct {
	made  bool
	of    string
	lines []string
}

// shortCautions are the lines of the safety panel: what must not meet first,
// then the first line of each chemical before the second of any.
func (m *Model) shortCautions() []string {
	products := m.chemicals()
	var of strings.Builder
	for _, p := range products {
		of.WriteString(p.Caution + " ")
	}
	of.WriteString(m.sheet.Values["free-chlorine"])
	if m.panel.made && m.panel.of == of.String() {
		return m.panel.lines
	}
	m.panel = panel{made: true, of: of.String(), lines: panelLines(products, m.sheet.combined(products))}
	return m.panel.lines
}

func panelLines(products []dosing.Product, combined []string) []string {
	var never, apart, lines []string
	for _, line := range combined {
		if strings.HasPrefix(line, "NEVER") {
			never = append(never, line)
		} else {
			apart = append(apart, line)
		}
	}
	for i, more := 0, true; more; i++ {
		more = false
		for _, p := range products {
			if short := caution.Of(p).Short; i < len(short) {
				lines, more = append(lines, short[i]), true
			}
		}
		if i == 0 { // what must be kept apart stands behind what each does to people
			lines = append(lines, apart...)
		}
	}
	return append(never, lines...)
}

// showCautions opens the full sheets of the chemicals on the line.
func (m *Model) showCautions() {
	var b strings.Builder
	products := m.chemicals()
	if len(products) == 0 {
		b.WriteString("No chemical is chosen yet.\n\n" + caution.Deferral + "\n")
	}
	for _, line := range m.sheet.combined(products) {
		b.WriteString(line + "\n")
	}
	for _, p := range products {
		b.WriteString("\n" + caution.Of(p).Text())
	}
	m.openPage(page{title: "cautions", text: b.String(), plain: true})
}

const moreNever = " (more: c)"

// drawSafety shows the safety panel: what the chemicals on the line do, and who
// decides.
func (m *Model) drawSafety(c *canvas.Canvas) {
	r := m.layout()
	lines := m.shortCautions()
	room := r.keys - r.safety - 1
	for i := range min(room, len(lines)) {
		text := canvas.Cut(lines[i], c.Width-2)
		if i == room-1 && room < len(lines) && strings.HasPrefix(lines[room], "NEVER") {
			text = canvas.Cut(lines[i], c.Width-2-len(moreNever)) + moreNever // one that kills has no room
		}
		c.Text(1, r.safety+i, text, canvas.Plain)
	}
	c.Text(1, r.keys-1, canvas.Cut(caution.Deferral, c.Width-2), canvas.Plain)
}
