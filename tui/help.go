package tui

import "strings"

// showHelp opens the page that teaches the place.
func (m *Model) showHelp() {
	var b strings.Builder
	b.WriteString("The line runs from the raw water through each chemical to the finished water. " +
		"Each column is the water there. The large figure is what to set the pump to.\n\n")
	p := m.place()
	if f := m.openForm(); f != nil {
		b.WriteString(m.helpHere(f))
	} else {
		b.WriteString("Here: " + p.label + ". " + sentence(p.help) + "\n")
		if p.kind == numberPlace && !p.plainText() {
			b.WriteString("It takes " + p.field.Accepted() + ".\n")
		}
	}
	b.WriteString("\nWalking\n" + helpText(walking))
	b.WriteString("\nTyping (starts with a digit, a point, a comma or Enter)\n" + helpText(typing))
	b.WriteString("\nLists\n" + helpText(choosing))
	b.WriteString("\nPages\n" + helpText(paging))
	b.WriteString(workHelp())
	b.WriteString("\nA paste goes to the field. Several numbers in one paste go to the readings in " +
		"their order, and are shown before they count.\n")
	b.WriteString("\nThe mouse is left to your terminal: select text as anywhere else.\n")
	m.openPage(page{title: "help", text: b.String()})
}

// sentence makes a sentence of a phrase.
func sentence(phrase string) string {
	if phrase == "" {
		return ""
	}
	if !strings.HasPrefix(phrase, "pH") {
		phrase = strings.ToUpper(phrase[:1]) + phrase[1:]
	}
	return phrase + "."
}

// pad fills text to width columns and leaves at least one blank.
func pad(text string, width int) string {
	n := width - len([]rune(text))
	return text + strings.Repeat(" ", max(n, 1))
}
