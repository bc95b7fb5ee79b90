package table

import (
	"bytes"
	"encoding/csv"
	"errors"
	"fmt"
	"io"
	"slices"
	"strings"
	"testing"

	"beckline/dosing"
	"beckline/dosing/entry"
	"beckline/dosing/report"
)

// caustic answers with caustic soda to pH 8.4, as flags would say.
func caustic() Options {
	return Options{Need: entry.NeedDose,
		Form: entry.Form{Product: "caustic-25", Values: map[string]string{"target-ph": "8.4"}}}
}

func answer(t *testing.T, text string, o Options) (string, Summary, error) {
	t.Helper()
	var out bytes.Buffer
	sum, err := Run(strings.NewReader(text), &out, o)
	return out.String(), sum, err
}

func cellsOf(t *testing.T, text string) (header []string, rows []map[string]string) {
	t.Helper()
	lines, err := csv.NewReader(strings.NewReader(text)).ReadAll()
	if err != nil {
		t.Fatal(err)
	}
	for _, line := range lines[1:] {
		row := map[string]string{}
		for i, name := range lines[0] {
			row[name] = line[i]
		}
		rows = append(rows, row)
	}
	return lines[0], rows
}

func TestColumnsOfTheAnswer(t *testing.T) {
	out, _, err := answer(t, "ph,alkalinity_mg_l_caco3,temperature_c\n7,30,10\n", caustic())
	if err != nil {
		t.Fatal(err)
	}
	header, _ := cellsOf(t, out)
	var want []string
	for _, c := range report.Columns() {
		switch c.Name {
		case "raw_ph", "raw_alkalinity_mg_l_caco3", "raw_temperature_c":
		default:
			want = append(want, c.Name)
		}
	}
	if got := header[3:]; !slices.Equal(got, want) {
		t.Errorf("columns are\n%v\nwant\n%v", got, want)
	}
}

func TestOverLongCellHasItsProblem(t *testing.T) {
	long := strings.Repeat("9", MaxCell+1)
	out, sum, err := answer(t, "id,ph,alkalinity_mg_l_caco3,temperature_c\n1,7,"+long+",10\n2,7,30,10\n", caustic())
	if err != nil {
		t.Fatal(err)
	}
	_, rows := cellsOf(t, out)
	if sum.Rows != 2 || sum.Problems != 1 || len(rows) != 2 {
		t.Fatalf("%+v, %d rows", sum, len(rows))
	}
	if want := "cell_too_long: alkalinity_mg_l_caco3 has a cell that is too long; accepted: at most 65536 bytes in a cell"; rows[0]["problem"] != want {
		t.Errorf("problem is %q, want %q", rows[0]["problem"], want)
	}
	if rows[0]["id"] != "1" || rows[1]["id"] != "2" || rows[1]["problem"] != "" {
		t.Error("the rows are not in their places")
	}
}

// A stray quote costs its own row only, and what is written reads back.
func TestUnclosedQuoteHasItsProblem(t *testing.T) {
	out, sum, err := answer(t, "id,ph,alkalinity_mg_l_caco3,temperature_c,note\n1,7,30,10,\"x\n2,7,30,10,y\n", caustic())
	if err != nil {
		t.Fatal(err)
	}
	_, rows := cellsOf(t, out)
	if sum.Rows != 2 || sum.Problems != 1 || len(rows) != 2 {
		t.Fatalf("%+v, %d rows", sum, len(rows))
	}
	if want := "unclosed_quote: note has a quote that is never closed; accepted: a quote at the end of a quoted cell"; rows[0]["problem"] != want {
		t.Errorf("problem is %q, want %q", rows[0]["problem"], want)
	}
	if rows[0]["note"] != `"x` || rows[1]["note"] != "y" || rows[1]["finished_ph"] == "" {
		t.Errorf("the rows read back as %v and %v", rows[0]["note"], rows[1]["note"])
	}
}

// Empty lines at the end of a file are no rows; between rows they are.
func TestEmptyLines(t *testing.T) {
	out, sum, err := answer(t, "ph,alkalinity_mg_l_caco3,temperature_c\n7,30,10\n\n7,30,10\n\n\n", caustic())
	if err != nil {
		t.Fatal(err)
	}
	if sum.Rows != 3 || sum.Problems != 1 || strings.Count(out, "\n") != 4 {
		t.Errorf("%+v, %d lines", sum, strings.Count(out, "\n"))
	}
}

func TestStrictStopsAtTheFirst(t *testing.T) {
	o := caustic()
	o.Strict = true
	out, sum, err := answer(t, "ph,alkalinity_mg_l_caco3,temperature_c\n7,30,10\n7,x,10\n7,30,10\n", o)
	var stopped *RowError
	if !errors.As(err, &stopped) || stopped.Row != 2 || stopped.Problem.Field != "alkalinity" {
		t.Fatalf("error %v, want the alkalinity of row 2", err)
	}
	if strings.Count(out, "\n") != 2 || sum.Rows != 2 {
		t.Errorf("%d lines written, want the header and one row", strings.Count(out, "\n"))
	}
}

// In a stream that cannot be rewound, NUL bytes are found before anything is
// written as long as the answers held back have not left.
func TestNULInAStream(t *testing.T) {
	// Beyond what is looked at for the header, within what is held back.
	row := "7,30,10," + strings.Repeat("x", 2000) + "\n"
	text := "ph,alkalinity_mg_l_caco3,temperature_c,note\n" + strings.Repeat(row, 100) + "7,\x00,10,\n"
	var out bytes.Buffer
	_, err := Run(struct{ io.Reader }{strings.NewReader(text)}, &out, caustic())
	var p *dosing.Problem
	if !errors.As(err, &p) || p.Code != "nul_bytes" {
		t.Errorf("error %v, want nul_bytes", err)
	}
	if out.Len() != 0 {
		t.Errorf("%d bytes were written", out.Len())
	}
}

// Nor does one hide behind a byte that makes the scanner look ahead.
func TestNULAfterAReturnOrAQuote(t *testing.T) {
	rows := strings.Repeat("7,30,10,"+strings.Repeat("x", 2000)+"\n", 100)
	for _, last := range []string{"7,30,10\r\x00", "7,30,10,\"x\"\x00\n"} {
		var out bytes.Buffer
		_, err := Run(struct{ io.Reader }{strings.NewReader("ph,alkalinity_mg_l_caco3,temperature_c,note\n" + rows + last)}, &out, caustic())
		var p *dosing.Problem
		if !errors.As(err, &p) || p.Code != "nul_bytes" {
			t.Errorf("%q: error %v, want nul_bytes", last, err)
		}
	}
}

// What is wrong with the flags is wrong with every row, so the file is not
// begun; what the flags leave out is the file's to give.
func TestFlagsThatCannotBeUsed(t *testing.T) {
	const file = "ph,alkalinity_mg_l_caco3,temperature_c\n7,30,10\n"
	for field, o := range map[string]Options{
		"product":   {Form: entry.Form{Product: "nosuch", Values: map[string]string{"target-ph": "8.4"}}, Need: entry.NeedDose},
		"target-ph": {Form: entry.Form{Product: "lime", Values: map[string]string{"target-ph": "15"}}, Need: entry.NeedDose},
		"target-si": {Form: entry.Form{Product: "lime", Values: map[string]string{"target-ph": "8", "target-si": "0"}}, Need: entry.NeedDose},
		"flow":      {Form: entry.Form{Product: "lime", Values: map[string]string{"target-ph": "8", "flow": "1,200"}}, Need: entry.NeedDose},
		"strength":  {Form: entry.Form{Product: "caustic-25", Values: map[string]string{"target-ph": "8", "strength": "99"}}, Need: entry.NeedDose},
		"add":       {Form: entry.Form{Adds: []string{"lime=x"}}, Need: entry.NeedWater},
	} {
		out, _, err := answer(t, file, o)
		var p *dosing.Problem
		if !errors.As(err, &p) || p.Field != field || out != "" {
			t.Errorf("%s: error %v, %d bytes written", field, err, len(out))
		}
	}
}

// A cell's refusal says what the column takes, which has a unit of its own.
func TestRefusalOfACell(t *testing.T) {
	const header = "ph,alkalinity_mg_l_caco3,temperature_c\n"
	for line, want := range map[string]string{
		"7,\"1,200\",10": `ambiguous_number: alkalinity "1,200" can be read in two ways; accepted: write 1200 or 1.2`,
		"7,abc,10":       `not_a_number: alkalinity "abc" is not a number; accepted: a number, 0 to 5000 mg/L as CaCO3`,
		"7,30 meq/L,10":  `not_a_number: alkalinity "30 meq/L" is not a number; accepted: a number alone: the column alkalinity_mg_l_caco3 gives the unit`,
		"7,,10":          `missing: alkalinity is missing; accepted: a number, 0 to 5000 mg/L as CaCO3`,
		",30,10":         `missing: ph is missing; accepted: a number, 0 to 14; or a measured dic`,
		"7,<5,10":        `detection_limit: alkalinity "<5" is a limit, not a measured number; accepted: the figure to work with, or nothing where none was measured`,
		"":               `empty: row is empty; accepted: 3 cells, as in the first row`,
	} {
		out, _, err := answer(t, header+line+"\n7,30,10\n", caustic())
		if err != nil {
			t.Fatal(err)
		}
		if _, rows := cellsOf(t, out); len(rows) != 2 || rows[0]["problem"] != want {
			t.Errorf("%q: %q, want %q", line, rows[0]["problem"], want)
		}
	}
}

// Carriage returns alone make one line of a file; at the end of the last line
// one may be left of a file that was cut off.
func TestCarriageReturnsAlone(t *testing.T) {
	_, _, err := answer(t, "ph,alkalinity_mg_l_caco3,temperature_c\r7,30,10\r", caustic())
	var p *dosing.Problem
	if !errors.As(err, &p) || p.Code != "line_ends" {
		t.Errorf("error %v, want line_ends", err)
	}
	out, sum, err := answer(t, "ph,alkalinity_mg_l_caco3,temperature_c\r\n7,30,10\r", caustic())
	if err != nil || sum.Problems != 0 || strings.Count(out, "\r") != 2 || !strings.HasSuffix(out, ",\r") {
		t.Errorf("%q, %+v, %v", out, sum, err)
	}
}

func TestErrorsOfTheStreamsComeThrough(t *testing.T) {
	broken := errors.New("broken")
	in := io.MultiReader(strings.NewReader("ph,alkalinity_mg_l_caco3,temperature_c\n7,30,10\n"), failing{broken})
	if _, err := Run(in, io.Discard, caustic()); !errors.Is(err, broken) {
		t.Errorf("reading: error %v, want the stream's", err)
	}
	text := "ph,alkalinity_mg_l_caco3,temperature_c\n7,30,10\n"
	if _, err := Run(strings.NewReader(text), failing{broken}, caustic()); !errors.Is(err, broken) {
		t.Errorf("writing: error %v, want the stream's", err)
	}
}

type failing struct{ err error }

func (f failing) Read([]byte) (int, error)  { return 0, f.err }
func (f failing) Write([]byte) (int, error) { return 0, f.err }

func TestDecimalCommaOfASemicolonFile(t *testing.T) {
	h := &header{decimal: ','}
	for text, want := range map[string]string{
		"7,125": "7.125", "7,1": "7.1", "7.1": "7.1", "1.200,5": "1.200,5", "1,200,000": "1,200,000", "7": "7",
	} {
		if got := h.plain(text); got != want {
			t.Errorf("%q is taken as %q, want %q", text, got, want)
		}
	}
	h.decimal = '.'
	if got := h.plain("7,125"); got != "7,125" {
		t.Errorf("in a comma-separated file 7,125 is taken as %q", got)
	}
}

// A thousand rows of one kind of water, each solved afresh.
func BenchmarkThousandRows(b *testing.B) {
	var file strings.Builder
	file.WriteString("ph,alkalinity_mg_l_caco3,temperature_c,calcium_mg_l,flow_m3_h\n")
	for i := range 1000 {
		fmt.Fprintf(&file, "7.%02d,%d,10,12,100\n", i%90, 30+i%50)
	}
	b.SetBytes(int64(file.Len()))
	for b.Loop() {
		sum, err := Run(strings.NewReader(file.String()), io.Discard, caustic())
		if err != nil || sum.Problems > 0 {
			b.Fatal(sum, err)
		}
	}
}
