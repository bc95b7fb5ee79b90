package main

import (
	"errors"
	"fmt"
	"strings"

	"beckline/dosing"
	"beckline/dosing/reading"
)

// smallTable is a CSV file of a few readings, held whole. Numbers in it follow
// the rules of every number here; the column's name gives the unit.
type smallTable struct {
	rows []map[string]string
}

// tableColumn is a column to read into SI.
type tableColumn struct {
	key      string
	must     bool
	parse    func(text string) (float64, error)
	accepted string
}

// column is a column that holds a quantity in its bare unit.
func column(f reading.Field, must bool) tableColumn {
	return tableColumn{f.Key, must, func(text string) (float64, error) { return bareNumber(f, text) }, f.AcceptedBare()}
}

// openTable reads a file, or standard input where none or - is named. like shows
// the columns that it may have.
func (c *console) openTable(args []string, like string) (*smallTable, error) {
	in := c.in
	if len(args) == 1 && args[0] != "-" {
		f, err := openFile(args[0])
		if err != nil {
			return nil, err
		}
		defer f.Close()
		in = f
	}
	rows, err := readTable(in, like)
	if err == nil && len(rows) == 0 {
		err = badLine("empty_file", "file", "", "at least one row below the column names, such as "+like)
	}
	return &smallTable{rows}, err
}

// has tells whether there is a column.
func (t *smallTable) has(key string) bool {
	_, there := t.rows[0][key]
	return there
}

// numbers reads columns, SI.
func (t *smallTable) numbers(columns []tableColumn) ([][]dosing.Optional, error) {
	var out [][]dosing.Optional
	for r, row := range t.rows {
		values := make([]dosing.Optional, len(columns))
		for i, c := range columns {
			text, there := row[c.key]
			text = strings.TrimSpace(text)
			where := fmt.Sprintf("row %d %s", r+1, c.key)
			switch {
			case !there && c.must:
				return nil, badLine("column_missing", c.key, "", "a column "+c.key)
			case text == "" && c.must:
				return nil, badLine("column_not_filled", where, "", c.accepted)
			case text == "":
				continue
			}
			v, err := c.parse(text)
			if err != nil {
				code := reading.CodeNotANumber
				var e *reading.Error
				if errors.As(err, &e) {
					code = e.Code
				}
				return nil, badLine(code, where, text, c.accepted)
			}
			values[i] = dosing.Some(v)
		}
		out = append(out, values)
	}
	return out, nil
}

// bareNumber reads a cell whose column gives the unit.
func bareNumber(f reading.Field, text string) (float64, error) {
	if _, err := reading.Number(text); err != nil {
		return 0, err
	}
	v, err := f.Parse(text)
	return v.SI, err
}
