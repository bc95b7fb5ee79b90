package report

import (
	"sort"
	"strings"

	"beckline/dosing"
)

// Column is one column that an answered row gains.
type Column struct {
	Name   string
	Number bool   // its cells are numbers, written with the file's decimal sign
	Repeat string // the input column that holds the same thing, "" where none does
}

// Columns lists the columns of an answer in their fixed order: the raw and the
// finished water, the dose, warnings, problem.
func Columns() []Column {
	var columns []Column
	for _, prefix := range []string{"raw_", "finished_"} {
		for _, s := range waterSpecs {
			c := Column{Name: prefix + s.key, Number: s.text == nil}
			if prefix == "raw_" {
				c.Repeat = s.key
			}
			columns = append(columns, c)
		}
	}
	for _, s := range doseSpecs {
		c := Column{Name: s.key, Number: s.text == nil}
		if s.key == "product" {
			c.Repeat = s.key
		}
		columns = append(columns, c)
	}
	return append(columns, Column{Name: "warnings"}, Column{Name: "problem"})
}

// Cells returns the document's cells in the order of Columns.
func (d Document) Cells() []string {
	var cells []string
	for _, figures := range [][]Figure{d.Raw, d.Finished} {
		for _, f := range figures {
			cells = append(cells, f.Full())
		}
	}
	if d.Dose == nil {
		cells = append(cells, make([]string, len(doseSpecs))...)
	}
	for _, f := range d.Dose {
		cells = append(cells, f.Full())
	}
	return append(cells, d.WarningCodes(), "")
}

// WarningCodes joins the codes, sorted, each once, with ";" between.
func (d Document) WarningCodes() string {
	seen := map[string]bool{}
	var codes []string
	for _, w := range d.Warnings {
		if !seen[w.Code] {
			seen[w.Code] = true
			codes = append(codes, w.Code)
		}
	}
	sort.Strings(codes)
	return strings.Join(codes, ";")
}

// ProblemCells returns the cells of a row that has no answer: all empty but
// the last, which holds the code and the sentence.
func ProblemCells(p *dosing.Problem) []string {
	cells := make([]string, len(Columns()))
	cells[len(cells)-1] = p.Code + ": " + ProblemLine(p)
	return cells
}
