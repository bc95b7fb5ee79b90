package tui

import (
	"slices"
	"strings"

	"beckline/dosing"
)

// list is something to choose from, narrowed by what is typed.
type list struct {
	title string
	all   []choice
	words []rune
	at    int
	pick  func(*Model, string)
	back  state // where it was opened
}

// choice is one line of a list.
type choice struct {
	name, detail string
	explain      string // shown below the list while the choice is marked
}

// search narrows the list by one more character.
func (l *list) search(r rune) {
	if r >= ' ' && len(l.words) < longest {
		l.words = append(l.words, r)
		l.at = 0
	}
}

// widen takes the last character back.
func (l *list) widen() {
	if n := len(l.words); n > 0 {
		l.words = l.words[:n-1]
		l.at = 0
	}
}

// shown are the choices in which every typed word occurs, those first whose
// name starts with what was typed.
func (l *list) shown() []choice {
	words := strings.Fields(strings.ToLower(string(l.words)))
	var out []choice
	for _, c := range l.all {
		text := strings.ToLower(c.name + " " + c.detail)
		if !slices.ContainsFunc(words, func(w string) bool { return !strings.Contains(text, w) }) {
			out = append(out, c)
		}
	}
	if typed := strings.Join(words, " "); typed != "" {
		starts := func(c choice) int {
			if strings.HasPrefix(strings.ToLower(c.name), typed) {
				return 0
			}
			return 1
		}
		slices.SortStableFunc(out, func(a, b choice) int { return starts(a) - starts(b) })
	}
	return out
}

func (l *list) move(by int) {
	l.at = min(max(l.at+by, 0), max(len(l.shown())-1, 0))
}

// accept takes the choice that stands under the mark.
func (m *Model) accept() {
	shown := m.list.shown()
	if len(shown) == 0 {
		m.note = "nothing of that name: Backspace widens the search"
		return
	}
	m.state = m.list.back
	m.list.pick(m, shown[m.list.at].name)
}

// closeList leaves the list without a choice.
func (m *Model) closeList() { m.state = m.list.back }

// openList shows a list with the mark on the present choice.
func (m *Model) openList(l list, present string) {
	for i, c := range l.all {
		if c.name == present {
			l.at = i
		}
	}
	if ofWork(m.state) {
		l.back = m.state
	}
	m.list, m.state = l, choosing
}

// chooseProduct opens the catalogue for the station walked to; elsewhere than
// at a chemical, for the one that is solved for.
func (m *Model) chooseProduct() {
	st := m.station()
	if st.kind != fixedStation {
		for i, s := range m.line {
			if s.kind == solvedStation {
				m.at, m.row[i], st = i, 0, s
			}
		}
	}
	p := st.places[0]
	all := m.catalogue()
	if p.add >= 0 {
		all = append(all, processes...)
	}
	m.openList(list{title: "products", all: all, pick: func(m *Model, name string) {
		s := m.sheet.clone()
		if s.text(p) != name {
			s.choose(p, name)
		}
		if p.add < 0 {
			s.UntouchedProduct = false
		}
		m.change(s)
	}}, m.sheet.text(p))
}

// choose puts another product in a place. What belonged to the one before goes.
func (s *sheet) choose(p place, name string) {
	s.set(p, name)
	if p.add >= 0 {
		a := &s.Adds[p.add]
		if isProcess(name) || !a.chlorinates() {
			a.Residual, a.Demand = "", ""
		}
		if isProcess(name) {
			a.Dose = ""
		}
		return
	}
	delete(s.Values, "strength")
	delete(s.Values, "product-temperature")
	delete(s.Limits, mostUse)
	if s.plant != nil { // which knows the pump of each product; else the pump stays
		delete(s.Values, "pump")
		f := s.form()
		s.plant.Choose(&f, name)
		for _, setting := range []string{"strength", "product-temperature", "pump"} {
			if text := f.Values[setting]; text != "" {
				s.Values[setting] = text
			}
		}
	}
}

// catalogue lists every product with its title and what it is, the plant's own
// first.
func (m *Model) catalogue() []choice {
	var out []choice
	if plant := m.sheet.plant; plant != nil {
		for _, own := range plant.Site().Products {
			out = append(out, choice{name: own.Name, detail: own.Title + ", this plant's own"})
		}
	}
	for _, p := range dosing.Products() {
		if m.sheet.plant == nil || m.sheet.plant.Site().ProductNamed(p.Name) == nil {
			out = append(out, choice{name: p.Name, detail: p.Title + ", " + p.Chemical.Formula})
		}
	}
	return out
}

// chooseTarget opens the list of the figures that can be asked for.
func (m *Model) chooseTarget() {
	m.at, m.row[len(m.line)-1] = len(m.line)-1, 0
	l := list{title: "target of the finished water", pick: func(m *Model, name string) {
		for _, target := range targets {
			if targetNames[target] == name {
				m.setTarget(target)
			}
		}
	}}
	for _, target := range targets {
		p := lookupPlace(target)
		l.all = append(l.all, choice{name: targetNames[target], detail: p.help})
	}
	m.openList(l, targetNames[m.sheet.Target])
}

// setTarget asks for another figure; its value is still to be entered, unless
// it was entered before.
func (m *Model) setTarget(name string) {
	s := m.sheet.clone()
	s.Target, s.Untouched = name, false
	m.change(s)
	last := len(m.line) - 1
	m.at, m.row[last] = last, 1
}

// nextTarget steps through the kinds of target.
func (m *Model) nextTarget(by int) {
	i := slices.Index(targets, m.sheet.Target)
	n := len(targets)
	m.setTarget(targets[((i+by)%n+n)%n])
	m.row[m.at] = 0
}
