package tui

import (
	"os"
	"strings"

	"github.com/aymanbagabas/go-osc52/v2"

	"beckline/dosing/report"
)

// copySlip sends the slip to the clipboard of the terminal, wherever that is.
// The terminal does not say whether it took it.
func (m *Model) copySlip() {
	text, ok := m.slip()
	if !ok {
		return
	}
	if m.hooks.send != nil {
		m.hooks.send(clipboardSequence(text, os.Getenv))
	}
	m.note = "slip sent to your terminal's clipboard; if it did not arrive, v shows it to select"
}

// showSlip shows the slip on a page with nothing beside it.
func (m *Model) showSlip() {
	if text, ok := m.slip(); ok {
		m.openPage(page{title: "slip", text: text, plain: true})
	}
}

// slip is the text to copy. There is none while the figures are older than the
// fields: a wrong slip is worse than none.
func (m *Model) slip() (string, bool) {
	switch {
	case m.old:
		m.note = "no slip: the figures are older than what stands in the fields"
		return "", false
	case m.good.result == nil || !m.good.solved:
		m.note = "no slip: there is no answer yet"
		return "", false
	}
	text := report.New(m.good.result).Slip()
	if m.sheet.Demo {
		text = demoHeading + text
	}
	return text, true
}

// demoHeading stands over a text of the demo plant.
const demoHeading = "DEMO PLANT, INVENTED READINGS\n"

// clipboardSequence wraps a text so that it reaches the outer terminal through
// the multiplexers.
func clipboardSequence(text string, env func(string) string) string {
	s := osc52.New(text)
	switch {
	case env("TMUX") != "":
		s = s.Tmux()
	case env("STY") != "" || strings.HasPrefix(env("TERM"), "screen"):
		s = s.Screen()
	}
	return s.String()
}
