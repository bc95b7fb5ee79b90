package main

import (
	"encoding/csv"
	"errors"
	"fmt"
	"io"
	"strings"
)

// mostTable bounds a table that is read whole, bytes.
const mostTable = 4 << 20

// readTable reads a small CSV file into rows by column name, commas or
// semicolons between; in the latter a decimal comma becomes a point. Blank rows
// are passed over. like shows the columns that it may have.
func readTable(in io.Reader, like string) ([]map[string]string, error) {
	data, err := io.ReadAll(io.LimitReader(in, mostTable+1))
	if err != nil {
		return nil, err
	}
	text := strings.TrimPrefix(string(data), "\ufeff")
	bad := func(code, given, accepted string) error { return badLine(code, "file", given, accepted) }
	switch {
	case len(data) > mostTable:
		return nil, bad("file_too_large", "", "at most 4 MiB; rows takes more")
	case strings.TrimSpace(text) == "":
		return nil, bad("empty_file", "", "a CSV file whose first row names the columns, such as "+like)
	case strings.ContainsRune(text, 0):
		return nil, bad("nul_bytes", "", "plain CSV text in UTF-8")
	}
	first, _, _ := strings.Cut(text, "\n")
	r := csv.NewReader(strings.NewReader(text))
	semicolons := strings.Count(first, ";") > strings.Count(first, ",")
	if semicolons {
		r.Comma = ';'
	}
	r.TrimLeadingSpace = true
	lines, err := r.ReadAll()
	if err != nil {
		var e *csv.ParseError
		if errors.As(err, &e) {
			return nil, bad("ragged_row", fmt.Sprintf("line %d: %v", e.Line, e.Err), "as many cells in each row as in the first")
		}
		return nil, err
	}
	var rows []map[string]string
	for _, line := range lines[1:] {
		if strings.TrimSpace(strings.Join(line, "")) == "" {
			continue
		}
		row := map[string]string{}
		for i, name := range lines[0] {
			cell := strings.TrimSpace(line[i])
			if semicolons && strings.Count(cell, ",") == 1 && !strings.Contains(cell, ".") {
				cell = strings.Replace(cell, ",", ".", 1)
			}
			row[strings.ToLower(strings.TrimSpace(name))] = cell
		}
		rows = append(rows, row)
	}
	if len(rows) == 0 {
		return nil, bad("empty_file", "", "rows below the first, which names the columns, such as "+like)
	}
	return rows, nil
}
