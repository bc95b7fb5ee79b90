package table

import (
	"fmt"
	"maps"
	"regexp"
	"strings"

	"beckline/dosing"
	"beckline/dosing/entry"
	"beckline/dosing/margin"
	"beckline/dosing/reading"
	"beckline/dosing/report"
)

// answer works one row out. The cells are those of Options.columns.
func (h *header) answer(r *row, o Options) (cells []string, unusual bool, p *dosing.Problem) {
	if p := h.unusable(r); p != nil {
		return nil, false, p
	}
	form, p := h.form(r, o)
	if p != nil {
		return nil, false, p
	}
	read := form.Case
	if o.Plant != nil {
		read = func(need entry.Need) (dosing.Case, error) { return o.Plant.Case(form, need) }
	}
	c, err := read(o.Need)
	if err != nil {
		return nil, false, inColumn(asProblem(err))
	}
	result, err := dosing.Solve(c)
	if err != nil {
		return nil, false, asProblem(err)
	}
	if o.Plant != nil && o.Need == entry.NeedDose {
		if broken := o.Plant.CheckFinished(result); len(broken) > 0 {
			return nil, false, broken[0]
		}
	}
	document := report.New(result)
	if !document.Agrees() {
		return nil, false, &dosing.Problem{Kind: dosing.Failed, Code: "checks_disagree",
			Accepted: "nothing: the answer did not pass its own checks"}
	}
	for _, w := range document.Warnings {
		unusual = unusual || strings.HasPrefix(w.Code, "unusual_")
	}
	if o.margins() {
		m, err := margin.Of(result, *o.Tolerances, o.Margin)
		if err != nil {
			return nil, false, asProblem(err)
		}
		cells = document.WithMargin(m, false).MarginCells()
	} else {
		cells = document.Cells()
	}
	if o.two() {
		cells = beforeNotes(cells, document.SecondCells())
	}
	return cells, unusual, nil
}

// unusable says why a row cannot be read at all.
func (h *header) unusable(r *row) *dosing.Problem {
	switch {
	case r.fault == overLong:
		return rowProblem("cell_too_long", h.column(r.at), "", fmt.Sprintf("at most %d bytes in a cell", MaxCell))
	case r.fault == unclosedQuote:
		return rowProblem("unclosed_quote", h.column(r.at), "", "a quote at the end of a quoted cell")
	case r.blank() && len(h.names) > 1:
		return rowProblem(reading.CodeEmpty, "row", "", cellCount(len(h.names))+", as in the first row")
	case len(r.cells) < len(h.names):
		return rowProblem("ragged_row", "row", cellCount(len(r.cells)),
			cellCount(len(h.names))+", as in the first row")
	case len(r.cells) > len(h.names):
		surplus := strings.Join(r.cells[len(h.names):], string(h.comma))
		return rowProblem("ragged_row", "row", cellCount(len(r.cells)),
			cellCount(len(h.names))+", as in the first row; left out at the end: "+reading.Clean(surplus))
	}
	return nil
}

func cellCount(n int) string {
	if n == 1 {
		return "1 cell"
	}
	return fmt.Sprintf("%d cells", n)
}

// form puts the row's cells and the flags together. An empty cell is not
// measured.
func (h *header) form(r *row, o Options) (entry.Form, *dosing.Problem) {
	form := o.Form
	form.Values = maps.Clone(o.Form.Values)
	if form.Values == nil {
		form.Values = map[string]string{}
	}
	for i, cell := range r.cells {
		f := h.fields[i]
		text := strings.TrimSpace(cell)
		switch {
		case i == h.product:
			form.Product = text
		case f.Name == "" || text == "":
		default:
			number := h.plain(text)
			if h.ambiguousPoint(text) {
				return form, rowProblem(reading.CodeAmbiguousNumber, f.Name, text, "with decimal commas in this file: "+strings.ReplaceAll(text, ".", "")+" or "+strings.Replace(text, ".", ",", 1))
			}
			// The column's name gives the unit, so a unit in the cell could
			// only contradict it.
			if _, err := reading.Number(number); err != nil {
				return form, unreadable(f, text, err)
			}
			form.Values[f.Name] = number
		}
	}
	return form, nil
}

// plain turns the decimal comma of a semicolon-separated file into a point,
// where that file leaves no doubt what the comma is.
func (h *header) plain(text string) string {
	if h.decimal == ',' && strings.Count(text, ",") == 1 && !strings.Contains(text, ".") {
		return strings.Replace(text, ",", ".", 1)
	}
	return text
}

// aPointAndThree is one point with three digits behind it and one to three, not
// starting with 0, before: in a file of decimal commas either of the two.
var aPointAndThree = regexp.MustCompile(`^[1-9][0-9]{0,2}\.[0-9]{3}$`)

func (h *header) ambiguousPoint(text string) bool {
	return h.decimal == ',' && aPointAndThree.MatchString(text)
}

func unreadable(f reading.Field, text string, err error) *dosing.Problem {
	p := rowProblem(reading.CodeNotANumber, f.Name, text, f.AcceptedBare())
	if e, ok := err.(*reading.Error); ok {
		p.Code = e.Code
	}
	_, withUnit := f.Parse(text)
	if withUnit == nil {
		p.Accepted = "a number alone: the column " + f.Key + " gives the unit"
	} else if e, ok := withUnit.(*reading.Error); ok && e.Code == p.Code && e.Accepted != f.Accepted() {
		p.Accepted = e.Accepted // it knows better, as how to write an ambiguous number
	}
	return p
}

// inColumn takes the units out of what a missing cell would accept: the column
// has its own.
func inColumn(p *dosing.Problem) *dosing.Problem {
	if f, ok := reading.Lookup(p.Field); ok && p.Code == "missing" {
		p.Accepted = strings.Replace(p.Accepted, f.Accepted(), f.AcceptedBare(), 1)
	}
	return p
}

// column names the column at a place, or its number beyond the header.
func (h *header) column(at int) string {
	if at < len(h.names) && h.names[at] != "" {
		return reading.Clean(h.names[at])
	}
	return fmt.Sprintf("column %d", at+1)
}

func rowProblem(code, field, given, accepted string) *dosing.Problem {
	return &dosing.Problem{Kind: dosing.BadInput, Code: code, Field: field, Given: reading.Clean(given), Accepted: accepted}
}

// asProblem takes the *Problem that the rooms below promise.
func asProblem(err error) *dosing.Problem {
	if p, ok := err.(*dosing.Problem); ok {
		return p
	}
	return &dosing.Problem{Kind: dosing.Failed, Code: "failed", Given: err.Error()}
}

func faultText(f fault) string {
	if f == overLong {
		return fmt.Sprintf("a cell of over %d bytes", MaxCell)
	}
	return "a quote that is never closed"
}
