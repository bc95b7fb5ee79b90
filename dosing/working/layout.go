package working

import "strings"

const (
	width  = 78
	indent = "      "
)

// Text is the sheet as plain ASCII text, no line longer than 78 columns. A step
// reads
//
//	what it is [source]
//	    name = formula
//	         = numbers put in
//	         = outcome unit
//
// and a line that would be too long goes on below, further in.
func (s Sheet) Text() string {
	var b strings.Builder
	for i, section := range s.Sections {
		if i > 0 {
			b.WriteByte('\n')
		}
		b.WriteString(section.Heading + "\n")
		for _, line := range wrap(section.Note, width-2) {
			b.WriteString("  " + line + "\n")
		}
		for _, step := range section.Steps {
			step.text(&b)
		}
	}
	return b.String()
}

func (s *Step) text(b *strings.Builder) {
	what := s.What
	if s.Source != "" {
		what += " [" + s.Source + "]"
	}
	for i, line := range wrap(what, width-4) {
		if i > 0 {
			b.WriteString("  ")
		}
		b.WriteString("  " + line + "\n")
	}
	name := indent + s.Name + " "
	first := name
	part := func(text string) {
		for i, line := range wrap(text, width-len(name)-4) {
			switch {
			case i == 0:
				b.WriteString(first + "= ")
			default:
				b.WriteString(strings.Repeat(" ", len(name)+4))
			}
			b.WriteString(line + "\n")
		}
		first = strings.Repeat(" ", len(name))
	}
	if s.Formula != "" {
		part(s.Formula)
	}
	if s.Numbers != "" {
		part(s.Numbers)
	}
	outcome := s.Outcome
	if s.Unit != "" {
		outcome += " " + s.Unit
	}
	part(outcome)
}

// wrap breaks text at spaces; a word longer than the line stays whole.
func wrap(text string, columns int) []string {
	var lines []string
	line := ""
	for _, word := range strings.Fields(text) {
		if line != "" && len(line)+1+len(word) > columns {
			lines = append(lines, line)
			line = ""
		}
		if line != "" {
			line += " "
		}
		line += word
	}
	if line != "" {
		lines = append(lines, line)
	}
	return lines
}
