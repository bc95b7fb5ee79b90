package tui

import (
	"fmt"
	"strings"

	"beckline/dosing"
	"beckline/dosing/caution"
	"beckline/dosing/report"
	"beckline/tui/canvas"
	"beckline/tui/painter"
)

// leastLinear is how many columns lines of text have at least: on fewer the
// terminal breaks them.
const leastLinear = 20

// speak is the screen as sentences in order: for a screen reader, and for a
// terminal whose cursor cannot be moved. It says what draw shows.
func (m *Model) speak() painter.Lines {
	var l painter.Lines
	switch m.state {
	case paging:
		l = painter.Lines{Section: "page " + m.page.title, Prompt: m.page.title + "; Esc goes back "}
		l.Statements = canvas.Wrap(m.page.title+"\n"+m.page.text, 78)
	case choosing:
		l = painter.Lines{Section: "list", Prompt: m.list.title + ", search: " + string(m.list.words)}
		if shown := m.list.shown(); len(shown) > 0 {
			c := shown[m.list.at]
			l.Statements = []string{
				"Enter takes it, arrows move, letters search, Esc goes back.",
				fmt.Sprintf("%d of %d: %s, %s.", m.list.at+1, len(shown), c.name, c.detail),
			}
			if c.explain != "" {
				l.Statements = append(l.Statements, strings.Split(c.explain, "\n")...)
			}
		} else {
			l.Statements = []string{"Nothing of that name."}
		}
	case filling, entering, answering:
		l = m.speakWork()
	default:
		l = painter.Lines{Section: "line", Statements: m.sayLine(), Prompt: m.sayPlace()}
	}
	l.Prompt = m.plain(l.Prompt)
	for i := range l.Statements {
		l.Statements[i] = m.plain(l.Statements[i])
	}
	return l
}

// plain limits a text to the terminal's characters.
func (m *Model) plain(text string) string {
	if m.look.glyphs == fullGlyphs {
		return text
	}
	return strings.Map(canvas.ASCII, strings.ReplaceAll(text, " °", " "))
}

// sayPlace is the prompt: where the keys go.
func (m *Model) sayPlace() string {
	p := m.place()
	text, ok := m.sheet.shown(p)
	if m.state == typing {
		return "typing " + p.label + ": " + m.edit.String()
	}
	unit := ""
	switch {
	case text == "" && p.blank != "":
		text = p.blank
	case text == "":
		text = "not entered"
	case ok:
		unit = " " + m.sheet.Units.label(p)
	}
	return m.station().title + ", " + p.label + ": " + text + unit + " "
}

// sayLine says the answer, whose water it is, the water at each station, what
// there is to say, and the cautions.
func (m *Model) sayLine() []string {
	var out []string
	if m.sheet.Demo {
		out = append(out, "Demo plant: "+m.sayAnswer(), "That is not your water: type a reading to start yours. Question mark is help, Ctrl-C leaves.")
	} else {
		out = append(out, m.sayAnswer())
	}
	if text := m.sheet.unchecked(); text != "" && !m.sheet.Demo {
		out = append(out, sentence(text))
	}
	for n, st := range m.line {
		if s := m.water(st); s != nil {
			var parts []string
			if s.Addition != nil && s.Addition.Process == dosing.ChemicalFeed && st.kind != finishedStation {
				parts = append(parts, "dose "+pureDose(s))
			}
			figures := report.Water(&s.Figures)
			for _, f := range lineFigures {
				if x := figure(figures, f.key); x.Value.Given && !m.isFinishedWater(n) {
					parts = append(parts, x.Label+" "+x.ShowUnit())
				}
			}
			if len(parts) == 0 {
				continue
			}
			out = append(out, st.title+": "+strings.Join(parts, ", ")+".")
		}
	}
	if text := m.good.trust.whole(); text != "" && !m.old {
		out = append(out, "Trust: "+text+".")
	}
	for _, s := range m.messages() {
		out = append(out, s.text)
	}
	for i, line := range m.shortCautions() {
		if i < 2 {
			out = append(out, line)
		}
	}
	return append(out, caution.Deferral+" c reads the sheets.")
}

// sayAnswer says the setting, or why there is none.
func (m *Model) sayAnswer() string {
	switch {
	case m.good.result == nil || !m.good.solved && m.good.refusal == nil:
		var names []string
		for _, name := range m.now.missing {
			names = append(names, m.label(name))
		}
		if len(names) == 0 {
			return "No answer."
		}
		return "Still needed: " + strings.Join(names, ", ") + "."
	case m.good.refusal != nil && m.old:
		return "Of the entries before there was no dose: " + strings.ToLower(refusalHeading(m.good.refusal)) + "."
	case m.good.refusal != nil:
		return "No dose: " + strings.ToLower(refusalHeading(m.good.refusal)) + "."
	}
	a := answer(m.good.result.Dose(), m.sheet.Units)
	text := strings.ToLower(a.heading) + " " + a.number + " " + a.unit + " for " + report.TargetText(m.good.result.Case.Target)
	if len(a.others) > 0 {
		text += ", that is " + strings.Join(a.others, ", ")
	}
	if m.old {
		return "Old figures, do not set: " + text + "."
	}
	return sentence(text)
}
