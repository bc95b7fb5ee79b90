//go:build linux

package tui

// The walk over every key goes on into the forms. It starts with an empty water
// that has a product.
func init() {
	walkAll = append(walkAll, []step{
		{walking, "o", "other work"}, {choosing, "esc", "walking"}, {walking, "o", "other work"}, {choosing, "t i t r enter", "▸sample"},
		{filling, "down", "▸normality"}, {filling, "up", "▸sample"}, {filling, "tab", "▸normality"}, {filling, "shift+tab", "▸sample"},
		{filling, "end", "▸run it"}, {filling, "home", "▸sample"}, {filling, "pgdown", "▸run it"}, {filling, "pgup", "▸sample"},

		{filling, "enter", "entering"}, {entering, "5 0 . 2 5", "50.25"}, {entering, "left", ""}, {entering, "right", ""}, {entering, "home", ""},
		{entering, "end", ""}, {entering, "ctrl+a", ""}, {entering, "ctrl+e", ""}, {entering, "backspace", "50.2 "}, {entering, "ctrl+h", "50. "},
		{entering, "home delete", "  0. "}, {entering, "ctrl+u", ""}, {entering, "ctrl+l", ">\x1b[2J"}, {entering, "esc", "form "},
		{filling, "1", "entering"}, {entering, "0 0 enter", "▸normality"}, {filling, "3", "entering"}, {entering, "tab", "▸json"},
		{filling, "enter", "yes"}, {filling, "ctrl+j", " no"}, {filling, "up enter", "entering"}, {entering, "down", "▸json"},
		{filling, "up enter", "entering"}, {entering, "ctrl+j", "▸json"}, {filling, "up enter", "entering"}, {entering, "up", "▸sample"},
		{filling, "down enter", "entering"}, {entering, "shift+tab", "▸sample"}, {filling, "backspace", ""}, {filling, "2", "entering"},
		{entering, "enter", "▸normality"}, {filling, "up delete", ""},

		{filling, "o", "other work"}, {choosing, "m i x enter", "▸file"}, {filling, "down down down down 7", "entering"}, {entering, "enter", "▸alkalinity"},
		{filling, "up +", "7.05"}, {filling, "-", "7.00"}, {filling, "=", "7.05"}, {filling, "−", "7.00"}, {filling, "l", "line has nothing"},
		{filling, "c", "First aid"}, {paging, "esc", "form "}, {filling, "?", "The form of mix"}, {paging, "esc", "form "},
		{filling, "ctrl+l", ">\x1b[2J"}, {filling, "g", "sample is missing"}, {filling, "n", "emptied"}, {filling, "esc", "walking"},

		{walking, "o", "other work"}, {choosing, "t i t r enter", "▸"}, {filling, "home 5", "entering"}, {entering, "enter", "▸normality"},
		{filling, "g", "ran titrate"}, {answering, "down", ""}, {answering, "up", ""}, {answering, "pgdown", ""}, {answering, "pgup", ""},
		{answering, " ", ""}, {answering, "end", ""}, {answering, "home", "ran titrate"}, {answering, "y", ">\x1b]52;c;"},
		{answering, "w", "written to"}, {answering, "c", "First aid"}, {paging, "esc", "answer"}, {answering, "ctrl+l", ">\x1b[2J"},
		{answering, "esc", "form "}, {filling, "g", "ran titrate"}, {answering, "enter", "form "}, {filling, "g", "ran titrate"},
		{answering, "ctrl+j", "form "}, {filling, "g", "ran titrate"}, {answering, "t", "taken over"},
	}...)
}
