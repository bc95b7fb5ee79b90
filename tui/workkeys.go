package tui

import tea "github.com/charmbracelet/bubbletea"

// The keys of the forms stand in the same table as all others, so that the
// bottom line and the help page have them.
func init() {
	leave := binding{nil, "^C", "leave", "", nil}
	own := [states][]binding{}
	own[filling] = []binding{
		{nil, "↑↓", "field", "", nil}, leave,
		{[]string{"up", "shift+tab"}, "↑", "", "field above", plain(func(m *Model) { m.workMove(-1) })},
		{[]string{"down", "tab"}, "↓", "", "field below", plain(func(m *Model) { m.workMove(+1) })},
		{[]string{"home"}, "Home", "", "first field", plain(func(m *Model) { m.workMove(-1 << 20) })},
		{[]string{"end"}, "End", "", "to the line that runs it", plain(func(m *Model) { m.workMove(1 << 20) })},
		{[]string{"pgup"}, "PgUp", "", "ten fields up", plain(func(m *Model) { m.workMove(-10) })},
		{[]string{"pgdown"}, "PgDn", "", "ten fields down", plain(func(m *Model) { m.workMove(+10) })},
		{nil, "0-9 . ,", "", "type a number into the field, with its unit if you like", nil},
		{[]string{"enter", "ctrl+j"}, "Enter", "type", "change what is there, open its list, turn a yes or no, or run it on the last line", func(m *Model) tea.Cmd { return m.openEntry() }},
		{[]string{"g"}, "g", "run", "go: run it and show the answer", func(m *Model) tea.Cmd { return m.runWork() }},
		{[]string{"esc"}, "Esc", "line", "back to the line; the form is kept", plain((*Model).leaveWork)},
		{[]string{"+", "="}, "+", "", "one step up", plain(func(m *Model) { m.nudgeEntry(+1) })},
		{[]string{"-", "−"}, "-", "", "one step down", plain(func(m *Model) { m.nudgeEntry(-1) })},
		{[]string{"backspace", "delete"}, "Backspace", "", "empty the field: not given", plain((*Model).eraseEntry)},
		{[]string{"l"}, "l", "", "what the line has, again, in this field", plain((*Model).followLine)},
		{[]string{"n"}, "n", "", "empty the form; what the line has is filled in", plain((*Model).emptyForm)},
		{[]string{"o"}, "o", "", "other work from the list", plain((*Model).chooseWork)},
		{[]string{"c"}, "c", "cautions", "full safety sheets of the chemicals in the form and on the line", plain((*Model).showCautions)},
		{[]string{"?"}, "?", "help", "this page", plain((*Model).showHelp)},
	}
	own[entering] = []binding{
		{nil, "↑↓", "field", "", nil}, leave,
		{[]string{"enter", "ctrl+j", "tab", "down"}, "Enter", "keep", "keep the entry and go to the field below", plain(func(m *Model) { m.keepEntry(+1) })},
		{[]string{"up", "shift+tab"}, "↑", "", "keep it and go up", plain(func(m *Model) { m.keepEntry(-1) })},
		{[]string{"esc"}, "Esc", "as it was", "put back what was there", plain(func(m *Model) { m.state = filling })},
		{[]string{"left"}, "←", "", "one character left", plain(func(m *Model) { m.edit.move(-1) })},
		{[]string{"right"}, "→", "", "one character right", plain(func(m *Model) { m.edit.move(+1) })},
		{[]string{"home", "ctrl+a"}, "Home", "", "to the start", plain(func(m *Model) { m.edit.move(-longestEntry) })},
		{[]string{"end", "ctrl+e"}, "End", "", "to the end", plain(func(m *Model) { m.edit.move(+longestEntry) })},
		{[]string{"backspace", "ctrl+h"}, "Backspace", "", "remove the character before", plain(func(m *Model) { m.edit.erase() })},
		{[]string{"delete"}, "Delete", "", "remove the character here", plain(func(m *Model) { m.edit.eraseHere() })},
		{[]string{"ctrl+u"}, "Ctrl-U", "", "empty the entry", plain(func(m *Model) { m.edit.clear() })},
	}
	own[answering] = []binding{
		{[]string{"up"}, "↑", "", "up", plain(func(m *Model) { m.scrollWork(-1) })},
		{[]string{"down"}, "↓", "", "down", plain(func(m *Model) { m.scrollWork(+1) })},
		{nil, "↑↓ PgUp PgDn", "scroll", "", nil},
		{[]string{"pgup"}, "PgUp", "", "a page up", plain(func(m *Model) { m.scrollWork(1 - m.workRows()) })},
		{[]string{"pgdown", " "}, "PgDn", "", "a page down", plain(func(m *Model) { m.scrollWork(m.workRows() - 1) })},
		{[]string{"home"}, "Home", "", "to the top", plain(func(m *Model) { m.scrollWork(-1 << 20) })},
		{[]string{"end"}, "End", "", "to the end", plain(func(m *Model) { m.scrollWork(1 << 20) })},
		{[]string{"y"}, "y", "copy", "copy the answer to the clipboard of your terminal", plain((*Model).copyWork)},
		{[]string{"w"}, "w", "to a file", "write the answer to a new file where the program was started", plain((*Model).fileWork)},
		{[]string{"t"}, "t", "", "take the readings that the answer found over to the line", plain((*Model).takeOver)},
		{[]string{"c"}, "c", "", "full safety sheets of the chemicals in the form and on the line", plain((*Model).showCautions)},
		{[]string{"esc", "enter", "ctrl+j"}, "Esc", "back", "back to the form, as it was filled in", plain((*Model).leaveWork)},
	}
	for s := range own { // those that hold everywhere are there already, and come last
		bindings[s] = append(own[s], bindings[s]...)
	}
}

// helpHere is the part of the help page about the field of the form.
func (m *Model) helpHere(f *workForm) string {
	name := "run it"
	if e := f.here(); e != nil {
		name = f.field(*e).Name
	}
	return "The form of " + f.command.Name + ": " + f.command.Purpose + ".\nHere: " + name + ". " + m.usage(f) + "\n"
}

// workHelp is the part of the help page about the forms.
func workHelp() string {
	return "\nOther work (o): everything else that the commands do, each with a form\n" + helpText(filling) +
		"\nTyping into a form\n" + helpText(entering) +
		"\nAnswers of a form\n" + helpText(answering)
}
