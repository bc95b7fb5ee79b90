package caution

import "strings"

// width of plain text, columns.
const width = 76

// part is one headed group of lines.
type part struct {
	heading string
	lines   []Line
}

// parts gives the sheet in the order in which it is shown, empty groups left out.
func (s Sheet) parts() []part {
	var limits []Line
	for _, l := range s.Limits {
		limits = append(limits, l.Line())
	}
	hazards := s.Hazards
	if s.GHS.Source != "" {
		hazards = append([]Line{s.GHS.Line()}, hazards...)
	}
	var out []part
	for _, p := range []part{
		{"Hazards", hazards}, {"Wear", s.Protection}, {"First aid", s.FirstAid}, {"Handling", s.Handling},
		{"Diluting", s.Dilution}, {"Storage", s.Storage}, {"Freezing", s.Freezing}, {"Limits in the air at work", limits},
	} {
		if len(p.lines) > 0 {
			out = append(out, p)
		}
	}
	return out
}

// Text gives the whole sheet as plain ASCII text of at most 76 columns, each
// line with its source, ending with the deferral.
func (s Sheet) Text() string {
	var b strings.Builder
	b.WriteString(s.Title + "\n")
	for _, short := range s.Short {
		b.WriteString(short + "\n")
	}
	for _, p := range s.parts() {
		b.WriteString("\n" + p.heading + "\n")
		for _, l := range p.lines {
			wrap(&b, "  - ", "    ", l.Text+" ["+l.Source+"]")
		}
	}
	b.WriteString("\n" + Deferral + "\n")
	return b.String()
}

// wrap writes words in lines of at most width columns.
func wrap(b *strings.Builder, first, rest, text string) {
	line := first
	for i, word := range strings.Fields(text) {
		switch {
		case i == 0:
			line += word
		case len(line)+1+len(word) > width:
			b.WriteString(line + "\n")
			line = rest + word
		default:
			line += " " + word
		}
	}
	b.WriteString(line + "\n")
}
