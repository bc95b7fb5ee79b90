package tui

import (
	"strconv"
	"strings"

	"beckline/dosing/report"
	"beckline/tui/canvas"
)

// said is one thing to say and how.
type said struct {
	text  string
	style canvas.Style
}

// drawMessages shows what there is to say, most urgent first.
func (m *Model) drawMessages(c *canvas.Canvas, top int) {
	y := top
	for _, s := range m.messages() {
		lines := canvas.Wrap(s.text, c.Width-2)
		for i, line := range lines {
			if y == top+messageRows {
				return
			}
			if y == top+messageRows-1 && i < len(lines)-1 {
				line = canvas.Cut(line+" "+lines[i+1], c.Width-2)
			}
			c.Text(1, y, line, s.style)
			y++
		}
	}
}

// messages are the note of the last key, then questions and trouble, then the
// warnings about the figures.
func (m *Model) messages() []said {
	var out []said
	say := func(style canvas.Style, text string) { out = append(out, said{text, style}) }
	if m.note != "" {
		say(canvas.Good, m.note)
	}
	p := m.place()
	switch {
	case m.state == pasting:
		say(canvas.Notice, m.pasteQuestion())
	case m.asked:
		say(canvas.Notice, p.label+" "+m.edit.String()+" is unusual: "+m.now.unsure[p.name]+
			". Enter keeps it, Esc puts back what was there.")
	case m.state == typing && m.paused && m.now.unsure[p.name] != "":
		say(canvas.Notice, "unusual: "+m.now.unsure[p.name])
	case m.state == typing && !m.paused:
	case m.now.bad[p.name] != "":
		say(canvas.Alarm, m.now.bad[p.name])
	case m.now.unsure[p.name] != "":
		say(canvas.Notice, "unusual: "+m.now.unsure[p.name]+". Enter twice keeps it.")
	default:
		m.sayTrouble(say)
	}
	if _, ok := m.waitingDraft(); ok && m.sheet.Demo {
		return out // what the demo plant warns of is less than a draft on offer
	}
	if m.good.result != nil && len(out) < messageRows {
		m.sayWarnings(say)
	}
	return out
}

// sayTrouble tells of trouble away from the place walked to.
func (m *Model) sayTrouble(say func(canvas.Style, string)) {
	for _, st := range m.line {
		for _, p := range st.places {
			if why := m.now.bad[p.name]; why != "" {
				say(canvas.Alarm, why)
				return
			}
			if why := m.now.unsure[p.name]; why != "" {
				say(canvas.Notice, p.label+" is unusual: "+why+". Go there; Enter twice keeps it.")
				return
			}
		}
	}
	for field, why := range m.now.bad { // of a field that is on no station
		say(canvas.Alarm, field+": "+why)
		return
	}
	switch {
	case m.now.failure != nil:
		say(canvas.Alarm, report.ProblemLine(m.now.failure))
	case m.now.refusal != nil:
		say(canvas.Alarm, report.ProblemLine(m.now.refusal))
	}
	if m.old && len(m.now.missing) > 0 {
		var names []string
		for _, name := range m.now.missing {
			names = append(names, m.label(name))
		}
		say(canvas.Notice, "STILL NEEDED: "+strings.Join(names, ", "))
	}
	if o, ok := m.waitingDraft(); ok {
		text := "d takes up the draft of " + o.said
		if n := len(m.offered()); n > 1 {
			text += "; d again the next of " + strconv.Itoa(n)
		}
		say(canvas.Plain, text)
	}
}

// sayWarnings tells the first alarm, or else the first warning, and how many
// more there are.
func (m *Model) sayWarnings(say func(canvas.Style, string)) {
	alarmed, warned := m.good.alarms, m.good.warnings()
	if len(alarmed)+len(warned) == 0 {
		return
	}
	word, first, style := "Warning", "", canvas.Notice
	if len(alarmed) > 0 {
		word, first, style = "ALARM", alarmed[0].text, canvas.Alarm
	} else {
		first = warned[0]
	}
	if m.sheet.Demo && len(alarmed) == 0 { // of no water of theirs: a slow line is spared
		say(style, plural(len(warned), "warning")+": w")
		return
	}
	if n := len(alarmed) + len(warned); n > 1 {
		word += " 1 of " + strconv.Itoa(n) + " (w)"
	}
	text := word + ": " + first
	if short := canvas.Cut(text, m.width-6); short != text && !m.look.linear && len(alarmed) == 0 {
		text = short + " (w)" // one row; the key shows the rest
	}
	say(style, text)
}

// warnings are the sentences of the warnings that are no alarms.
func (e *evaluation) warnings() []string {
	if e.result == nil {
		return nil
	}
	var out []string
	for _, w := range e.result.Warnings {
		if !alarms[w.Code] {
			out = append(out, report.Sentence(w))
		}
	}
	return out
}

// pasteQuestion shows what would be entered.
func (m *Model) pasteQuestion() string {
	var parts []string
	for _, p := range m.paste {
		text := p.place.label + " " + p.text
		switch {
		case p.wrong != "":
			text += " (cannot be used)"
		case p.odd != "":
			text += " (unusual)"
		}
		parts = append(parts, text)
	}
	pasted := "Pasted: "
	if m.pasteMore {
		pasted = "Pasted, the first row only: "
	}
	return pasted + strings.Join(parts, ", ") + ". Enter enters them, Esc drops them."
}

// showWarnings opens a page with all alarms and warnings, and the trust.
func (m *Model) showWarnings() {
	if m.good.result == nil {
		m.note = "no figures yet"
		return
	}
	var b strings.Builder
	for _, a := range m.good.alarms {
		b.WriteString("ALARM: " + a.text + ".\n\n")
	}
	for _, text := range m.good.warnings() {
		b.WriteString(sentence(text) + "\n\n")
	}
	if b.Len() == 0 {
		b.WriteString("No alarms and no warnings.\n\n")
	}
	if text := m.good.trust.whole(); text != "" {
		b.WriteString("How far to trust it: " + text + ". " + trustMeans + "\n")
	}
	m.openPage(page{title: "warnings", text: b.String()})
}

// plural counts things.
func plural(n int, of string) string {
	if n != 1 {
		of += "s"
	}
	return strconv.Itoa(n) + " " + of
}
