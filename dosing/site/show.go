package site

import (
	"fmt"
	"slices"
	"strings"
	"unicode/utf8"

	"beckline/dosing/reading"
)

// Row is one value that holds.
type Row struct {
	Key   string `json:"key"`   // as in the file: lines.upland.limits.ph
	Value string `json:"value"` // with its unit
	From  string `json:"from"`  // "line 42", or "built in"
	Line  int    `json:"line"`  // 0 where built in
}

const builtIn = "built in"

// Show lists every value that holds, those of the file first and in its order,
// then the built-in ones that the file leaves alone.
func (s *Site) Show() []Row {
	rows := slices.Clone(s.rows)
	slices.SortStableFunc(rows, func(a, b Row) int { return a.Line - b.Line })
	have := map[string]bool{}
	for _, r := range rows {
		have[r.Key] = true
	}
	add := func(key, value string) {
		if !have[key] && value != "" {
			rows = append(rows, Row{Key: key, Value: value, From: builtIn})
		}
	}
	add("units.system", string(s.Units.System))
	for _, f := range reading.Fields() {
		add("units."+f.Name, s.Units.For(f))
	}
	for _, p := range s.Products {
		key := "products." + p.Name
		add(key+".catalogue", p.Catalogue)
		add(key+".title", p.product.Title)
		add(key+".strength", p.product.StrengthText)
	}
	for _, t := range s.Tanks {
		add("tanks."+t.Name+".kind", t.Kind)
	}
	if s.Start != nil {
		add("start", s.Start.Name)
	}
	for _, l := range s.Lines {
		key := "lines." + l.Name
		add(key+".change.ph", fmt.Sprintf("%.2g pH", l.Change.PH))
		add(key+".change.dose", fmt.Sprintf("%.3g %%", l.Change.Dose*100))
		for _, f := range reading.Fields() {
			if f.Group != reading.Reading {
				continue
			}
			add(key+".limits."+f.Name, l.limitOf(f).text(f))
			add(key+".usual."+f.Name, l.usualOf(f).text(f))
		}
	}
	return rows
}

// Table is Show as text: key, value, where from.
func (s *Site) Table() string {
	rows := s.Show()
	keys, values := 0, 0
	for _, r := range rows {
		keys = max(keys, utf8.RuneCountInString(r.Key))
		values = max(values, utf8.RuneCountInString(r.Value))
	}
	var b strings.Builder
	pad := func(text string, n int) string { return text + strings.Repeat(" ", n-utf8.RuneCountInString(text)) }
	for _, r := range rows {
		b.WriteString(pad(r.Key, keys) + "  " + pad(r.Value, values) + "  " + r.From + "\n")
	}
	for _, n := range s.Notes {
		fmt.Fprintf(&b, "\nline %d: %s: %s\n", n.Line, n.Key, n.Text)
	}
	return b.String()
}
