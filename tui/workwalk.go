package tui

import (
	"strings"

	tea "github.com/charmbracelet/bubbletea"

	"beckline/dosing/reading"
)

// longestEntry is how much a line of a form takes: a water of a blend is long.
const longestEntry = 500

// workMove walks over the form.
func (m *Model) workMove(by int) {
	if f := m.work.form; f != nil {
		f.at = min(max(f.at+by, 0), len(f.entries))
	}
}

// openEntry types into the line walked to, opens its list, turns its switch, or
// runs the form.
func (m *Model) openEntry() tea.Cmd {
	f := m.work.form
	if f == nil {
		return nil
	}
	e := f.here()
	if e == nil {
		return m.runWork()
	}
	c := f.field(*e)
	switch all := m.entryChoices(c); {
	case c.Switch && e.text == yes:
		f.put("")
	case c.Switch:
		f.put(yes)
	case len(all) > 0 && !strings.Contains(e.text, "="):
		l := list{title: c.Name, pick: (*Model).takeEntry}
		for _, a := range all {
			l.all = append(l.all, choice{name: a.Name, detail: a.Detail})
		}
		m.openList(l, e.text)
	default:
		m.typeEntry(e.text)
	}
	return nil
}

// entryChoices are what may stand in a field, the plant's own first.
func (m *Model) entryChoices(c *CommandField) []Choice {
	var out []Choice
	if plant := m.sheet.plant; plant != nil && m.work.form.has("site") {
		switch c.Name {
		case "line":
			for _, l := range plant.Site().Lines {
				out = append(out, Choice{l.Name, l.Title})
			}
		case "product":
			for _, own := range plant.Site().Products {
				out = append(out, Choice{own.Name, own.Title + ", this plant's own"})
			}
		}
	}
	if c.Choices != nil {
		out = append(out, c.Choices()...)
	}
	return out
}

// takeEntry takes a choice of the list into the line walked to.
func (m *Model) takeEntry(name string) {
	m.state = filling
	if strings.HasSuffix(name, "=") {
		m.typeEntry(name)
		return
	}
	m.work.form.put(name)
}

func (m *Model) typeEntry(text string) {
	m.edit = newEdit(text)
	m.edit.most = longestEntry
	m.state = entering
}

// startEntry starts typing with the character that was pressed, where it can
// start a number.
func (m *Model) startEntry(r rune) {
	f := m.work.form
	if f == nil || f.here() == nil || f.field(*f.here()).Switch {
		return
	}
	if r >= '0' && r <= '9' || r == '.' || r == ',' {
		m.typeEntry("")
		m.edit.insert(r)
	}
}

// keepEntry ends typing and walks on.
func (m *Model) keepEntry(by int) {
	f := m.work.form
	m.state = filling
	if f == nil || f.here() == nil {
		return
	}
	f.put(m.completed(f.field(*f.here()), strings.TrimSpace(m.edit.String())))
	m.workMove(by)
}

// completed writes the unit behind a bare number where the screen's habit of
// units has another one than the command.
func (m *Model) completed(c *CommandField, text string) string {
	if p, ok := c.place(); ok {
		return m.sheet.Units.complete(p, text)
	}
	return text
}

// place is the line's place of the same quantity.
func (c *CommandField) place() (place, bool) {
	if _, other := reading.Command(c.Name); other {
		return place{}, false
	}
	if _, ok := c.quantity(); !ok {
		return place{}, false
	}
	return lookupPlace(c.Name), true
}

// eraseEntry empties the line walked to.
func (m *Model) eraseEntry() {
	if f := m.work.form; f != nil && f.here() != nil {
		f.put("")
	}
}

// nudgeEntry moves the number by the quantity's own step.
func (m *Model) nudgeEntry(steps int) {
	f := m.work.form
	if f == nil || f.here() == nil {
		return
	}
	e := f.here()
	q, ok := f.field(*e).quantity()
	if !ok || q.Step == 0 {
		return
	}
	v, err := q.Parse(e.text)
	if err != nil {
		m.note = "type a number first"
		return
	}
	next, ok := q.ShowIn(v.Unit, q.Nudge(v.SI, steps))
	if !ok {
		return
	}
	if v.Unit != q.Units()[0] {
		next += " " + v.Unit
	}
	f.put(next)
}

// followLine puts into the field walked to what the line has again.
func (m *Model) followLine() {
	f := m.work.form
	if f == nil || f.here() == nil {
		return
	}
	field := f.here().field
	c := &f.command.Fields[field]
	switch {
	case !c.Lent:
		m.note = "the line has nothing for this field"
		return
	case m.sheet.Demo:
		m.note = "the demo plant lends nothing: type your own"
		return
	}
	for i := range f.entries {
		if f.entries[i].field == field {
			f.entries[i].own = false
		}
	}
	f.lend(m.sheet)
	if e := f.here(); e == nil || e.text == "" {
		m.note = "the line has nothing for this field"
	}
}

// emptyForm starts the form anew.
func (m *Model) emptyForm() {
	f := m.work.form
	if f == nil {
		return
	}
	*f = *newWorkForm(f.command)
	f.lend(m.sheet)
	m.note = "emptied; what the line has is filled in"
}

// pasteEntry takes a paste into the line walked to, as if typed.
func (m *Model) pasteEntry(text string) {
	f := m.work.form
	if f == nil || f.here() == nil || m.state == answering {
		return
	}
	if m.state == filling {
		if f.field(*f.here()).Switch {
			return
		}
		m.typeEntry("")
	}
	for _, r := range strings.Join(strings.Fields(text), " ") {
		m.edit.insert(r)
	}
}

// scrollWork moves over the answer.
func (m *Model) scrollWork(by int) {
	last := max(len(m.workLines())-m.workRows(), 0)
	m.work.page.top = min(max(m.work.page.top+by, 0), last)
}
