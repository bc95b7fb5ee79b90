package report

import (
	"fmt"
	"slices"
	"strings"

	"beckline/dosing/caution"
)

// Sheet is the answer of a command that is about something else than a water: a
// jar, a pump, a tank, a change of the feed. Everything in it is in the units of
// its keys.
type Sheet struct {
	Name     string   // JSON key of the whole
	Head     []string // sentences for people, the most important first
	Figures  []Figure
	Tables   []SheetTable
	Lines    []string // for people alone, as they stand: a plot
	Warnings []Notice
	Cautions []string
}

// SheetTable is a list of like things. Every row has the figures of the first.
type SheetTable struct {
	Key   string
	Title string
	Rows  [][]Figure
	Notes []string // for people, one a row; "" or short where there are none
}

// Warn adds a warning by its code; about names the thing it is about, "" for
// the whole.
func (s *Sheet) Warn(about string, codes ...string) {
	for _, code := range codes {
		s.Warnings = append(s.Warnings, Notice{code, about, equipmentSentence(code)})
	}
}

// Handle adds the cautions of what is handled, by the keys of its sheets.
func (s *Sheet) Handle(keys ...string) {
	seen := map[string]bool{}
	add := func(lines ...string) {
		for _, line := range lines {
			if !seen[line] {
				seen[line] = true
				s.Cautions = append(s.Cautions, line)
			}
		}
	}
	var named []string
	for _, key := range keys {
		if key != "" {
			named = append(named, key)
			add(caution.For(key).Short...)
		}
	}
	if len(named) > 0 {
		add(caution.Combined(named)...)
		add(caution.Deferral)
	}
}

// Text is the sheet for people, in plain ASCII at most 78 columns wide.
func (s Sheet) Text() string {
	var b strings.Builder
	for _, line := range s.Head {
		b.WriteString(Wrap(line, textWidth) + "\n")
	}
	if len(s.Figures) > 0 {
		b.WriteByte('\n')
	}
	for _, f := range s.Figures {
		if f.Label != "" && f.Show() != "-" {
			fmt.Fprintf(&b, "  %-42s%s\n", f.Label, f.ShowUnit())
		}
	}
	for _, t := range s.Tables {
		t.write(&b)
	}
	if len(s.Lines) > 0 {
		b.WriteString("\n" + strings.Join(s.Lines, "\n") + "\n")
	}
	list := func(title, bullet string, lines []string) {
		if len(lines) > 0 {
			b.WriteString("\n" + title + "\n")
		}
		for _, line := range lines {
			b.WriteString(Wrap(bullet+line, textWidth) + "\n")
		}
	}
	var warnings []string
	for _, w := range s.Warnings {
		warnings = append(warnings, w.Message)
	}
	list("Warnings", "  - ", warnings)
	list("Cautions", "  ", s.Cautions)
	return ASCII(b.String())
}

// write sets the rows in columns as wide as their widest cell.
func (t SheetTable) write(b *strings.Builder) {
	if len(t.Rows) == 0 {
		return
	}
	fmt.Fprintf(b, "\n%s\n", Wrap(t.Title, textWidth))
	var columns []int // those with a label and something in them
	for i, f := range t.Rows[0] {
		if f.Label != "" && slices.ContainsFunc(t.Rows, func(row []Figure) bool { return row[i].Show() != "-" }) {
			columns = append(columns, i)
		}
	}
	widths := make([]int, len(columns))
	for c, i := range columns {
		widths[c] = max(len(ASCII(t.Rows[0][i].Label)), len(ASCII(t.Rows[0][i].Unit)))
		for _, row := range t.Rows {
			widths[c] = max(widths[c], len(ASCII(row[i].Show())))
		}
	}
	line := func(cell func(i int) string) {
		var out strings.Builder
		for c, i := range columns {
			format := "  %*s"
			width := widths[c]
			if t.Rows[0][i].IsText {
				width = -width
			}
			fmt.Fprintf(&out, format, width, ASCII(cell(i)))
		}
		b.WriteString(strings.TrimRight(out.String(), " ") + "\n")
	}
	line(func(i int) string { return t.Rows[0][i].Label })
	if slices.ContainsFunc(columns, func(i int) bool { return t.Rows[0][i].Unit != "" }) {
		line(func(i int) string { return t.Rows[0][i].Unit })
	}
	for r, row := range t.Rows {
		line(func(i int) string { return row[i].Show() })
		if r < len(t.Notes) && t.Notes[r] != "" {
			b.WriteString(Wrap("      "+t.Notes[r], textWidth) + "\n")
		}
	}
}

// JSON is the sheet as one indented object ending in a newline: its name, then
// warnings and cautions as those of every answer.
func (s Sheet) JSON() ([]byte, error) {
	var o object
	inner := fields(s.Figures)
	for _, t := range s.Tables {
		rows := make([]object, len(t.Rows))
		for i, row := range t.Rows {
			rows[i] = keyed(row)
		}
		inner.add(t.Key, rows)
	}
	o.add(s.Name, inner)
	warnings := make([]object, len(s.Warnings))
	for i, w := range s.Warnings {
		warnings[i].add("code", w.Code)
		warnings[i].addText("field", w.Field)
		warnings[i].add("message", w.Message)
	}
	o.add("warnings", warnings)
	cautions := s.Cautions
	if cautions == nil {
		cautions = []string{}
	}
	o.add("cautions", cautions)
	return indented(o)
}

// keyed are the figures of a row that programs get; a plot has no key.
func keyed(row []Figure) object {
	var o object
	for _, f := range row {
		if f.Key != "" {
			o.addFigure(f)
		}
	}
	return o
}

// Makers of figures, in the unit of the key.
func number(key, label, unit string, v Number, shown rounding) Figure {
	return Figure{Key: key, Label: label, Unit: unit, Value: v, shown: shown}
}

func worded(key, label, text string) Figure {
	return Figure{Key: key, Label: label, Text: text, IsText: true}
}

// truth is a yes or no.
func truth(key, label string, v bool) Figure {
	f := worded(key, label, "no")
	if v {
		f.Text = "yes"
	}
	f.truth = &v
	return f
}
