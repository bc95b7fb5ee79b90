package table

import (
	"bytes"
	"fmt"
	"maps"
	"slices"
	"strings"

	"beckline/dosing"
	"beckline/dosing/entry"
	"beckline/dosing/reading"
	"beckline/dosing/report"
)

var byteOrderMark = []byte("\xef\xbb\xbf")

// productColumn is the one input column that is not a reading.
const productColumn = "product"

// header is what the first row says.
type header struct {
	row     *row
	mark    bool // a byte-order mark stands before it
	comma   byte
	decimal byte            // of the numbers written
	names   []string        // of the file's columns
	fields  []reading.Field // by column; Name is "" where the column is no reading
	product int             // column of the product, -1 where there is none
	answers []report.Column // the columns that are added
	chosen  []int           // their places in report.Columns
}

// readHeader takes the first row and settles the separator by it.
func readHeader(s *scanner, o *Options) (*header, error) {
	h := &header{product: -1}
	start, _ := s.in.Peek(MaxCell)
	if i := bytes.IndexByte(start, 0); i >= 0 {
		return nil, errNUL
	}
	if bytes.HasPrefix(start, byteOrderMark) {
		h.mark = true
		_, _ = s.in.Discard(len(byteOrderMark)) // just peeked, so it is there
		start = start[len(byteOrderMark):]
	}
	if len(bytes.TrimSpace(start)) == 0 {
		return nil, fileProblem("empty_file", "", "a CSV file whose first row names the columns")
	}
	h.comma, h.decimal = separator(start)
	s.comma = h.comma
	first, err := s.next()
	if err != nil {
		return nil, err
	}
	h.row = first
	if first.fault != noFault {
		return nil, fileProblem("no_header", "", "a first row that names the columns; this one has "+faultText(first.fault))
	}
	for _, cell := range first.cells {
		h.names = append(h.names, strings.ToLower(strings.TrimSpace(cell)))
	}
	err = h.readings()
	if err == nil {
		err = h.supplied(*o)
	}
	if err == nil {
		h.defaults(o)
		err = h.demands(*o)
	}
	if err != nil && loneReturn(first.raw) {
		return nil, fileProblem("line_ends", "", "lines that end in LF or CR LF; this file has CR alone")
	}
	if err != nil {
		return nil, err
	}
	return h, h.choose(*o)
}

// loneReturn reports a carriage return that no line feed follows: the whole
// file is then one line here.
func loneReturn(line []byte) bool {
	return bytes.IndexByte(bytes.ReplaceAll(line, []byte("\r\n"), nil), '\r') >= 0
}

// separator tells a comma-separated file from a semicolon-separated one, whose
// numbers have a decimal comma.
func separator(start []byte) (comma, decimal byte) {
	line, _, _ := bytes.Cut(start, []byte("\n"))
	if bytes.Count(line, []byte(";")) > bytes.Count(line, []byte(",")) {
		return ';', ','
	}
	return ',', '.'
}

// readings finds the known columns.
func (h *header) readings() error {
	known := 0
	h.fields = make([]reading.Field, len(h.names))
	for i, name := range h.names {
		f, ok := reading.LookupKey(name)
		if ok {
			h.fields[i] = f
		}
		if name == productColumn {
			h.product = i
		}
		if !ok && name != productColumn {
			continue
		}
		known++
		if slices.Index(h.names, name) != i {
			return fileProblem("column_twice", name, "each reading in one column")
		}
	}
	if known == 0 {
		return fileProblem("no_header", reading.Clean(strings.Join(h.row.cells, string(h.comma))),
			"a first row that names the columns, with commas or semicolons between, such as ph,alkalinity_mg_l_caco3,temperature_c")
	}
	return nil
}

// supplied refuses a flag for what the file has a column of.
func (h *header) supplied(o Options) error {
	for i, f := range h.fields {
		if _, twice := o.Form.Values[f.Name]; f.Name != "" && twice {
			return &dosing.Problem{Kind: dosing.BadInput, Code: "given_twice", Field: f.Name,
				Given: h.names[i], Accepted: "either the flag or the file's column"}
		}
	}
	if h.product >= 0 && o.Form.Product != "" {
		return &dosing.Problem{Kind: dosing.BadInput, Code: "given_twice", Field: productColumn,
			Given: productColumn, Accepted: "either the flag or the file's column"}
	}
	return nil
}

// defaults takes what the plant supplies for what neither file nor flags have. A
// column of the file stands for its empty cells too: they were not measured. A
// target column, or one flag, takes the place of every target of the plant.
func (h *header) defaults(o *Options) {
	if o.Form.Product == "" && h.product < 0 {
		o.Form.Product = o.Defaults.Product
	}
	target := slices.ContainsFunc(h.fields, func(f reading.Field) bool { return f.Group == reading.Target })
	values := maps.Clone(o.Defaults.Values)
	maps.DeleteFunc(values, func(name, _ string) bool {
		f, _ := reading.Lookup(name)
		return h.has(*o, name) || target && f.Group == reading.Target || h.product >= 0 && f.Group == reading.Setting
	})
	if len(values) == 0 {
		return
	}
	maps.Copy(values, o.Form.Values)
	o.Form.Values = values
}

// has tells whether a reading comes from the file or from a flag.
func (h *header) has(o Options, name string) bool {
	if _, ok := o.Form.Values[name]; ok {
		return true
	}
	return slices.ContainsFunc(h.fields, func(f reading.Field) bool { return f.Name == name })
}

// demands refuses a file that lacks a column without which no row can be
// answered.
func (h *header) demands(o Options) error {
	need := [][]string{{"ph", "dic"}, {"alkalinity"}, {"temperature"}}
	if o.Need == entry.NeedDose {
		var targets []string
		for _, f := range reading.Fields() {
			if f.Group == reading.Target {
				targets = append(targets, f.Name)
			}
		}
		need = append(need, targets)
	}
	for _, any := range need {
		if slices.ContainsFunc(any, func(name string) bool { return h.has(o, name) }) {
			continue
		}
		keys := make([]string, len(any))
		for i, name := range any {
			f, _ := reading.Lookup(name)
			keys[i] = f.Key
		}
		return h.missing(keys, any[0])
	}
	if o.Need == entry.NeedDose && h.product < 0 && o.Form.Product == "" {
		return h.missing([]string{productColumn}, productColumn)
	}
	return nil
}

func (h *header) missing(keys []string, flag string) error {
	return &dosing.Problem{Kind: dosing.BadInput, Code: "column_missing", Field: keys[0],
		Accepted: fmt.Sprintf("a column %s, or the flag --%s; the file has %s",
			strings.Join(keys, " or "), flag, reading.Clean(strings.Join(h.names, " ")))}
}

// choose settles which columns are added. A raw figure that is one of the
// file's own readings is not repeated, unless another reading can change it.
func (h *header) choose(o Options) error {
	for i, c := range o.columns() {
		switch {
		case o.Need != entry.NeedDose && !inWater(c):
			continue
		case c.Repeat != "" && slices.Contains(h.names, c.Repeat) && !h.changeable(o, c.Repeat):
			continue
		case slices.Contains(h.names, c.Name):
			return fileProblem("column_taken", c.Name, "a file without columns of that name: the answer is written there")
		}
		h.answers = append(h.answers, c)
		h.chosen = append(h.chosen, i)
	}
	return nil
}

// changeable tells whether the raw figure of a reading's column may differ from
// the reading or be known where the cell is empty.
func (h *header) changeable(o Options, key string) bool {
	others := map[string][]string{
		"ph":           {"ph-temperature", "dic"},
		"dic_mmol_l":   nil,
		"calcium_mg_l": {"calcium-hardness"}, "magnesium_mg_l": {"hardness"},
	}[key]
	return slices.ContainsFunc(others, func(name string) bool { return h.has(o, name) })
}

func inWater(c report.Column) bool {
	return strings.HasPrefix(c.Name, "raw_") || c.Name == "warnings" || c.Name == "problem"
}

func fileProblem(code, given, accepted string) *dosing.Problem {
	return &dosing.Problem{Kind: dosing.BadInput, Code: code, Field: "file", Given: reading.Clean(given), Accepted: accepted}
}
