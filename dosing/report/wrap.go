package report

import (
	"strings"
	"unicode/utf8"
)

// Wrap breaks each line of text at spaces so that none is over width
// columns; a continuation is indented two columns more than its line.
func Wrap(text string, width int) string {
	lines := strings.Split(text, "\n")
	for i, line := range lines {
		lines[i] = wrapLine(line, width)
	}
	return strings.Join(lines, "\n")
}

func wrapLine(line string, width int) string {
	if utf8.RuneCountInString(line) <= width {
		return line
	}
	words := strings.Fields(line)
	indent := line[:len(line)-len(strings.TrimLeft(line, " "))]
	var b strings.Builder
	column := 0
	for i, word := range words {
		n := utf8.RuneCountInString(word)
		switch {
		case i == 0:
			b.WriteString(indent)
			column = len(indent)
			indent += "  "
		case column+1+n > width:
			b.WriteString("\n" + indent)
			column = len(indent)
		default:
			b.WriteByte(' ')
			column++
		}
		b.WriteString(word)
		column += n
	}
	return b.String()
}

var plainForms = strings.NewReplacer(
	"°C", "C", "°F", "F", "°", "deg ", "·", ".", "³", "3", "²", "2", "µ", "u", "μ", "u",
	"–", "-", "—", "-", "−", "-", "≤", "<=", "≥", ">=", "±", "+/-", "×", "x", "→", "->",
	"“", "\"", "”", "\"", "‘", "'", "’", "'", "…", "...", "\u00a0", " ", "\u202f", " ", "\u2009", " ",
	"₂", "2", "₃", "3", "₄", "4",
)

// ASCII writes text with plain characters only, since a slip may pass through
// a pager, a serial line or a log that keeps nothing else.
func ASCII(s string) string {
	s = plainForms.Replace(s)
	return strings.Map(func(r rune) rune {
		if r == '\n' || r >= ' ' && r < 0x7f {
			return r
		}
		return '?'
	}, s)
}
