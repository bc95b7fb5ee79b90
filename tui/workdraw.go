package tui

import (
	"strings"

	"beckline/dosing/caution"
	"beckline/tui/canvas"
	"beckline/tui/painter"
)

// Columns of a form.
const (
	entryValue = 24
	entryUnit  = 58
	usageRows  = 3
)

// workRows is how many lines of an answer are shown; one row is left for what
// there is to say.
func (m *Model) workRows() int { return max(m.layout().safety-2, 1) }

func (m *Model) workLines() []string { return canvas.Wrap(m.work.page.text, m.width-1) }

// drawWork shows the form that is open, or its answer.
func (m *Model) drawWork(c *canvas.Canvas) {
	f := m.work.form
	if f == nil {
		return
	}
	if m.state == answering {
		m.drawOutcome(c)
		return
	}
	r := m.layout()
	end := r.message - usageRows
	rows := end - 1
	f.top = min(max(min(f.top, f.at), f.at-rows+1), max(len(f.entries)+1-rows, 0))
	x := c.Text(1, 0, f.command.Name+": ", canvas.Strong)
	part := ""
	if len(f.entries)+1 > rows {
		part = fraction(f.top+1, f.top+rows, len(f.entries)+1)
	}
	c.Right(c.Width-1, 0, part, canvas.Faint)
	c.Text(x, 0, canvas.Cut(f.command.Purpose, c.Width-2-x-len(part)), canvas.Faint)
	for i := range rows {
		n := f.top + i
		if n > len(f.entries) {
			break
		}
		m.drawEntry(c, 1+i, f, n)
	}
	lines := canvas.Wrap(m.usage(f), c.Width-3)
	for i, line := range lines[:min(len(lines), usageRows)] {
		if i == usageRows-1 && len(lines) > usageRows {
			line = canvas.Cut(line+" "+lines[usageRows], c.Width-3)
		}
		c.Text(2, end+i, line, canvas.Faint)
	}
	y := r.message
	for _, s := range m.workMessages(f) {
		lines := canvas.Wrap(s.text, c.Width-2)
		for i, line := range lines {
			if y == r.message+messageRows {
				return
			}
			if y == r.message+messageRows-1 && i < len(lines)-1 {
				line = canvas.Cut(line+" "+lines[i+1], c.Width-2)
			}
			c.Text(1, y, line, s.style)
			y++
		}
	}
}

// drawEntry shows one line of a form: a mark for trouble, the mark of the walk,
// name, what stands there, unit, and whether it is the line's.
func (m *Model) drawEntry(c *canvas.Canvas, y int, f *workForm, n int) {
	here := n == f.at
	if here {
		c.Set(markColumn, y, '▸', canvas.Plain)
	}
	if n == len(f.entries) {
		c.Text(labelColumn, y, "run it", canvas.Plain)
		c.Text(entryValue, y, "g", canvas.Key)
		if here {
			c.Cursor(labelColumn, y)
		}
		return
	}
	e := f.entries[n]
	field := f.field(e)
	wrong, odd := field.wrong(e.text)
	switch {
	case wrong != "" || field.Name == f.trouble:
		c.Set(0, y, '!', canvas.Alarm)
	case odd != "":
		c.Set(0, y, '?', canvas.Notice)
	}
	c.Text(labelColumn, y, canvas.Cut(field.Name, entryValue-labelColumn-1), canvas.Faint)
	lent := e.text != "" && !e.own
	end := c.Width - 1
	if lent {
		c.Right(end, y, "line", canvas.Faint)
		end -= 6
	}
	text, caret := e.text, 0
	typing := here && m.state == entering
	if typing {
		text, caret = m.edit.String(), m.edit.caret
	}
	if field.Switch && text == "" {
		text = "no"
	}
	unit := m.entryUnit(field)
	if _, isQuantity := field.quantity(); isQuantity && hasUnit(text) {
		unit = ""
	}
	room := entryUnit - entryValue - 1
	if len([]rune(text)) > room {
		unit = ""
	}
	if unit == "" {
		room = end - entryValue
	}
	shown, shift := []rune(text), 0
	if typing {
		shift = max(caret-room+1, 0)
		shown = shown[shift:min(len(shown), shift+room)]
	}
	c.Text(entryValue, y, canvas.Cut(string(shown), room), canvas.Plain)
	c.Text(entryUnit, y, canvas.Cut(unit, end-entryUnit), canvas.Faint)
	if here {
		c.Cursor(entryValue+caret-shift, y)
	}
}

// entryUnit is the unit of a bare number in a field, in the screen's habit.
func (m *Model) entryUnit(c *CommandField) string {
	if p, ok := c.place(); ok {
		return m.sheet.Units.label(p)
	}
	if c.Switch {
		return ""
	}
	return c.Unit
}

// usage says what the line walked to is for.
func (m *Model) usage(f *workForm) string {
	e := f.here()
	if e == nil {
		return "Runs " + f.command.Name + " with what stands above."
	}
	c := f.field(*e)
	text := sentence(strings.TrimSuffix(c.Usage, "."))
	if q, ok := c.quantity(); ok {
		text += " It takes " + q.Accepted() + "."
	}
	if e.text != "" && !e.own {
		text = "From the line. " + text
	}
	return text
}

// workMessages are what there is to say below a form.
func (m *Model) workMessages(f *workForm) []said {
	var out []said
	say := func(style canvas.Style, text string) { out = append(out, said{text, style}) }
	if m.note != "" {
		say(canvas.Good, m.note)
	}
	if m.work.running {
		say(canvas.Notice, "working; Esc goes back without waiting")
		return out
	}
	if f.refusal != "" {
		say(canvas.Alarm, f.refusal)
	}
	if e := f.here(); e != nil && m.state == filling {
		wrong, odd := f.field(*e).wrong(e.text)
		switch {
		case wrong != "":
			say(canvas.Alarm, wrong)
		case odd != "":
			say(canvas.Notice, "unusual: "+odd)
		}
	}
	if m.sheet.Demo {
		say(canvas.Good, "The line is the demo plant: none of its numbers are filled in here.")
	}
	if f.unlent != "" {
		say(canvas.Notice, f.unlent)
	}
	return out
}

// drawOutcome shows the answer.
func (m *Model) drawOutcome(c *canvas.Canvas) {
	lines, rows, top := m.workLines(), m.workRows(), m.work.page.top
	c.Text(1, 0, m.work.page.title, canvas.Strong)
	if len(lines) > rows {
		c.Right(c.Width-1, 0, fraction(top+1, min(top+rows, len(lines)), len(lines)), canvas.Faint)
	}
	for i := range rows {
		if n := top + i; n < len(lines) {
			c.Text(1, 1+i, lines[n], canvas.Plain)
		}
	}
	text, style := m.outcomeNote()
	c.Text(1, 1+rows, canvas.Cut(text, c.Width-2), style)
}

// outcomeNote is the note of the last key, or else what may be taken over.
func (m *Model) outcomeNote() (string, canvas.Style) {
	if m.note != "" {
		return m.note, canvas.Good
	}
	var names []string
	for _, g := range m.work.outcome.Gives {
		names = append(names, lookupPlace(g.Name).label+" "+g.Text)
	}
	if len(names) == 0 {
		return "", canvas.Plain
	}
	return "t takes over to the line: " + strings.Join(names, ", "), canvas.Notice
}

// smallWork is the form on a terminal that is too small for it.
func (m *Model) smallWork() string {
	f := m.work.form
	switch e := f.here(); {
	case m.state == answering:
		return stateNames[m.state] + " " + m.work.page.title
	case e == nil:
		return stateNames[m.state] + " " + f.command.Name + ": run it"
	case m.state == entering:
		return stateNames[m.state] + " " + f.field(*e).Name + ": " + m.edit.String()
	default:
		return stateNames[m.state] + " " + f.field(*e).Name + ": " + e.text
	}
}

// speakWork is the form or its answer as sentences in order.
func (m *Model) speakWork() painter.Lines {
	f := m.work.form
	var out []string
	if m.state == answering {
		out = m.workLines()
		if note, _ := m.outcomeNote(); note != "" {
			out = append(out, note)
		}
		return painter.Lines{Section: m.work.page.title, Prompt: m.work.page.title + "; y copies, w writes a file, Esc goes back ", Statements: out}
	}
	out = append(out, sentence(f.command.Name+": "+f.command.Purpose), "Arrows move, Enter types, g runs it, Esc goes back to the line.", m.usage(f))
	for _, s := range m.workMessages(f) {
		out = append(out, s.text)
	}
	for i, line := range m.shortCautions() {
		if i < 2 {
			out = append(out, line)
		}
	}
	l := painter.Lines{Section: "form " + f.command.Name, Statements: append(out, caution.Deferral+" c reads the sheets."), Prompt: "run it "}
	if e := f.here(); e != nil {
		c := f.field(*e)
		text := e.text
		switch {
		case m.state == entering:
			l.Prompt = "typing " + c.Name + ": " + m.edit.String()
			return l
		case c.Switch && text == "":
			text = "no"
		case text == "":
			text = "empty"
		case !e.own:
			text += ", from the line"
		}
		l.Prompt = c.Name + ": " + text + " "
	}
	return l
}
