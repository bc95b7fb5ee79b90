package tui

import (
	"strings"

	tea "github.com/charmbracelet/bubbletea"
)

// binding is one thing that keys do. The handlers, the bottom line and the
// help page all come from it.
type binding struct {
	keys  []string // as the key reader names them
	shown string   // as people read them
	short string   // on the bottom line, "" where not
	help  string
	do    func(*Model) tea.Cmd
}

// bindings lists the keys of each state; init fills it, since the help page
// that a key opens is made from it.
var bindings [states][]binding

var everywhere = []binding{
	{[]string{"ctrl+c"}, "Ctrl-C", "", "leave; what you entered is kept as a draft", func(m *Model) tea.Cmd { return m.leave() }},
	{[]string{"ctrl+z"}, "Ctrl-Z", "", "put the program aside; fg brings it back", func(m *Model) tea.Cmd {
		if m.hooks.stop == nil {
			return nil
		}
		return m.hooks.stop()
	}},
	{[]string{"ctrl+l"}, "Ctrl-L", "", "paint the whole screen again", plain(func(m *Model) {
		if m.hooks.repaint != nil {
			m.hooks.repaint()
		}
	})},
}

func init() {
	// What a state has in common with walking comes first on the bottom line
	// and in the same place, so that little of it changes.
	field, leave := binding{nil, "↑↓", "field", "", nil}, binding{nil, "^C", "leave", "", nil}
	bindings[walking] = []binding{
		field, leave,
		{[]string{"left"}, "←", "", "station before", plain(func(m *Model) { m.toStation(-1) })},
		{[]string{"right"}, "→", "", "station after", plain(func(m *Model) { m.toStation(+1) })},
		{[]string{"up"}, "↑", "", "field above", plain(func(m *Model) { m.toPlace(-1) })},
		{[]string{"down"}, "↓", "", "field below", plain(func(m *Model) { m.toPlace(+1) })},
		{[]string{"tab"}, "Tab", "", "next field, and on to the next station", plain(func(m *Model) { m.onward(+1) })},
		{[]string{"shift+tab"}, "Shift-Tab", "", "field before, and back to the station before", plain(func(m *Model) { m.onward(-1) })},
		{[]string{"home"}, "Home", "", "first field of the station", plain(func(m *Model) { m.toPlace(-1000) })},
		{[]string{"end"}, "End", "", "last field of the station", plain(func(m *Model) { m.toPlace(+1000) })},
		{[]string{"pgup"}, "PgUp", "", "five fields up", plain(func(m *Model) { m.toPlace(-5) })},
		{[]string{"pgdown"}, "PgDn", "", "five fields down", plain(func(m *Model) { m.toPlace(+5) })},
		{nil, "0-9 . ,", "", "type a number into the field, with its unit if you like", nil},
		{[]string{"enter", "ctrl+j"}, "Enter", "type", "change what is there, or open the field's list; a minus sign then starts a negative number", plain((*Model).open)},
		{nil, "←→", "station", "", nil},
		{[]string{"+", "="}, "+", "", "one step up", plain(func(m *Model) { m.nudge(+1) })},
		{[]string{"-", "−"}, "-", "", "one step down", plain(func(m *Model) { m.nudge(-1) })},
		{[]string{"backspace", "delete"}, "Backspace", "", "empty the field: not measured", plain((*Model).erase)},
		{[]string{"a"}, "a", "", "add a chemical at a given dose, aeration or a contactor, after this station", plain(func(m *Model) { m.addStation(false) })},
		{[]string{"A"}, "A", "", "the same, before this station", plain(func(m *Model) { m.addStation(true) })},
		{[]string{"x"}, "x", "", "take what is done at this station off the line", plain((*Model).removeStation)},
		{[]string{"["}, "[", "", "move this station up the line", plain(func(m *Model) { m.moveStation(-1) })},
		{[]string{"]"}, "]", "", "move this station down the line", plain(func(m *Model) { m.moveStation(+1) })},
		{[]string{"p"}, "p", "", "choose the product from the list", plain((*Model).chooseProduct)},
		{[]string{"t"}, "t", "", "choose the figure of the finished water that is asked for", plain((*Model).chooseTarget)},
		{[]string{"c"}, "c", "cautions", "full safety sheets of the chemicals on the line", plain((*Model).showCautions)},
		{[]string{"y"}, "y", "copy", "copy the slip to the clipboard of your terminal", plain((*Model).copySlip)},
		{[]string{"Y"}, "Y", "", "copy in another form (log line, worked sheet, JSON, CSV), or write a file", plain((*Model).chooseExport)},
		{[]string{"v"}, "v", "", "show the slip on a clean page, to select with the mouse", plain((*Model).showSlip)},
		{[]string{"s"}, "s", "", "show the worked sheet: every step with its formula and numbers", plain((*Model).showWorking)},
		{[]string{"w"}, "w", "", "all alarms and warnings about these figures, and how far to trust them", plain((*Model).showWarnings)},
		{[]string{"f"}, "f", "", "all figures of this station, each with its meaning, formula and source", plain((*Model).showFigures)},
		{[]string{"o"}, "o", "", "other work: blends, burettes, jars, mixes, curves, pumps, tanks, files and the rest", plain((*Model).chooseWork)},
		{[]string{"g"}, "g", "", "look: pH against dose, or alkalinity, SI and CCPP along the line", plain(func(m *Model) { m.profile = !m.profile })},
		{[]string{"m"}, "m", "", "measures: SI, US, or mixed (US flows and feeds with °C)", plain((*Model).switchUnits)},
		{[]string{"u"}, "u", "", "undo the last change", plain((*Model).undo)},
		{[]string{"r"}, "r", "", "do again what was undone", plain((*Model).redo)},
		{[]string{"n"}, "n", "", "empty all readings, to start a new water", plain((*Model).startAfresh)},
		{[]string{"d"}, "d", "", "take up the draft that an earlier session left", plain((*Model).takeDraft)},
		{[]string{"?"}, "?", "help", "this page", plain((*Model).showHelp)},
	}
	bindings[typing] = []binding{
		field, leave,
		{[]string{"enter", "ctrl+j"}, "Enter", "keep", "keep the entry and go to the field below; after a question: yes", plain((*Model).keepTyped)},
		{[]string{"tab"}, "Tab", "", "keep it and go to the next field", plain(func(m *Model) { m.finish(func() { m.onward(+1) }) })},
		{[]string{"shift+tab"}, "Shift-Tab", "", "keep it and go to the field before", plain(func(m *Model) { m.finish(func() { m.onward(-1) }) })},
		{[]string{"up"}, "↑", "", "keep it and go up", plain(func(m *Model) { m.finish(func() { m.toPlace(-1) }) })},
		{[]string{"down"}, "↓", "", "keep it and go down", plain(func(m *Model) { m.finish(func() { m.toPlace(+1) }) })},
		{[]string{"esc"}, "Esc", "as it was", "put back what was there", plain((*Model).cancel)},
		{[]string{"left"}, "←", "", "one character left", plain(func(m *Model) { m.edit.move(-1); m.touch() })},
		{[]string{"right"}, "→", "", "one character right", plain(func(m *Model) { m.edit.move(+1); m.touch() })},
		{[]string{"home", "ctrl+a"}, "Home", "", "to the start", plain(func(m *Model) { m.edit.move(-longest); m.touch() })},
		{[]string{"end", "ctrl+e"}, "End", "", "to the end", plain(func(m *Model) { m.edit.move(+longest); m.touch() })},
		{[]string{"backspace", "ctrl+h"}, "Backspace", "", "remove the character before", plain(func(m *Model) { m.edit.erase(); m.touch() })},
		{[]string{"delete"}, "Delete", "", "remove the character here", plain(func(m *Model) { m.edit.eraseHere(); m.touch() })},
		{[]string{"ctrl+u"}, "Ctrl-U", "", "empty the entry", plain(func(m *Model) { m.edit.clear(); m.touch() })},
	}
	bindings[choosing] = []binding{
		{nil, "a-z", "search", "letters narrow the list", nil},
		{[]string{"up"}, "↑", "", "up", plain(func(m *Model) { m.list.move(-1) })},
		{[]string{"down"}, "↓", "", "down", plain(func(m *Model) { m.list.move(+1) })},
		{nil, "↑↓", "move", "", nil},
		{[]string{"pgup"}, "PgUp", "", "half a page up", plain(func(m *Model) { m.list.move(-5) })},
		{[]string{"pgdown"}, "PgDn", "", "half a page down", plain(func(m *Model) { m.list.move(+5) })},
		{[]string{"enter", "ctrl+j", "tab"}, "Enter", "take", "take the one that is marked", plain((*Model).accept)},
		{[]string{"backspace", "ctrl+h"}, "Backspace", "", "take a letter back", plain(func(m *Model) { m.list.widen() })},
		{[]string{"esc"}, "Esc", "back", "back without a change", plain((*Model).closeList)},
	}
	bindings[paging] = []binding{
		{[]string{"up"}, "↑", "", "up", plain(func(m *Model) { m.scroll(-1) })},
		{[]string{"down"}, "↓", "", "down", plain(func(m *Model) { m.scroll(+1) })},
		{nil, "↑↓ PgUp PgDn", "scroll", "", nil},
		{[]string{"pgup"}, "PgUp", "", "a page up", plain(func(m *Model) { m.scroll(1 - m.pageRows()) })},
		{[]string{"pgdown", " "}, "PgDn", "", "a page down", plain(func(m *Model) { m.scroll(m.pageRows() - 1) })},
		{[]string{"home"}, "Home", "", "to the top", plain(func(m *Model) { m.scroll(-1 << 20) })},
		{[]string{"end"}, "End", "", "to the end", plain(func(m *Model) { m.scroll(1 << 20) })},
		{[]string{"y"}, "y", "copy the slip", "copy the slip to the clipboard of your terminal", plain((*Model).copySlip)},
		{[]string{"esc", "enter", "?", "ctrl+j"}, "Esc", "back", "back to the line", plain((*Model).closePage)},
	}
	bindings[pasting] = []binding{
		{[]string{"enter", "ctrl+j"}, "Enter", "take them", "enter the values shown", plain((*Model).takePaste)},
		{[]string{"esc"}, "Esc", "drop them", "leave everything as it was", plain((*Model).dropPaste)},
	}
	for s := range bindings {
		bindings[s] = append(bindings[s], everywhere...)
	}
}

// plain makes a handler of something that starts no command.
func plain(f func(*Model)) func(*Model) tea.Cmd {
	return func(m *Model) tea.Cmd {
		f(m)
		return nil
	}
}

// bindingFor finds what a key does in a state.
func bindingFor(s state, key string) (binding, bool) {
	for _, b := range bindings[s] {
		for _, k := range b.keys {
			if k == key {
				return b, true
			}
		}
	}
	return binding{}, false
}

// helpText is the part of the help page about the keys of one state.
func helpText(s state) string {
	var b strings.Builder
	for _, k := range bindings[s] {
		if k.help != "" {
			b.WriteString(pad(k.shown, 10) + k.help + "\n")
		}
	}
	return b.String()
}
