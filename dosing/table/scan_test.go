package table

import (
	"io"
	"runtime"
	"strings"
	"testing"

	"github.com/google/go-cmp/cmp"
)

// read scans a whole text.
func read(t *testing.T, text string) []*row {
	t.Helper()
	s := newScanner(strings.NewReader(text))
	var rows []*row
	for {
		r, err := s.next()
		if err == io.EOF {
			return rows
		}
		if err != nil {
			t.Fatal(err)
		}
		rows = append(rows, r)
		if len(rows) > 1000 {
			t.Fatal("no end")
		}
	}
}

func TestCells(t *testing.T) {
	for name, c := range map[string]struct {
		text string
		want [][]string
	}{
		"plain":                  {"a,b\n1,2\n", [][]string{{"a", "b"}, {"1", "2"}}},
		"no final newline":       {"a,b\n1,2", [][]string{{"a", "b"}, {"1", "2"}}},
		"carriage returns":       {"a,b\r\n1,2\r\n", [][]string{{"a", "b"}, {"1", "2"}}},
		"empty cells":            {",\n,,\n", [][]string{{"", ""}, {"", "", ""}}},
		"empty line":             {"a\n\nb\n", [][]string{{"a"}, {""}, {"b"}}},
		"quoted":                 {"\"a,b\",\"c\"\"d\"\n", [][]string{{"a,b", `c"d`}}},
		"line break in quotes":   {"\"a\nb\",c\nd\n", [][]string{{"a\nb", "c"}, {"d"}}},
		"empty quotes":           {"\"\",x\n", [][]string{{"", "x"}}},
		"quote inside":           {"5\" pipe,x\n", [][]string{{`5" pipe`, "x"}}},
		"text after quotes":      {"\"a\"b,x\n", [][]string{{"ab", "x"}}},
		"return at the end":      {"a,b\r", [][]string{{"a", "b"}}},
		"return alone":           {"a\rb,c\n", [][]string{{"a\rb", "c"}}},
		"quote never closed":     {"a,\"b,c\nd,e\n", [][]string{{"a", `"b`, "c"}, {"d", "e"}}},
		"never closed, last row": {"a,\"b", [][]string{{"a", `"b`}}},
	} {
		t.Run(name, func(t *testing.T) {
			var got [][]string
			for _, r := range read(t, c.text) {
				got = append(got, r.cells)
			}
			if diff := cmp.Diff(c.want, got); diff != "" {
				t.Error(diff)
			}
		})
	}
}

// Rows are given back as they were written, whatever they hold.
func TestRowsAreKeptAsWritten(t *testing.T) {
	for _, text := range []string{
		"a,b\n1,2\n", "a,b\r\n1,2", "\"x\ny\",\"q\"\"q\"\r\n\n,,\n", "a,\"b,c\nd,e\n", "5\" pipe,x",
	} {
		var b strings.Builder
		for _, r := range read(t, text) {
			b.Write(r.raw)
			b.WriteString(r.ending)
			for i, end := range r.ends {
				if end > len(r.raw) || i > 0 && end <= r.ends[i-1] {
					t.Errorf("%q: cell ends %v do not fit %q", text, r.ends, r.raw)
				}
			}
		}
		if b.String() != text {
			t.Errorf("%q came back as %q", text, b.String())
		}
	}
}

func TestUnclosedQuoteKeepsTheRowsAfterIt(t *testing.T) {
	rows := read(t, "a,b\n1,\"2\n3,4\n5,6\n")
	if len(rows) != 4 {
		t.Fatalf("%d rows, want 4", len(rows))
	}
	if rows[1].fault != unclosedQuote || rows[1].at != 1 {
		t.Errorf("fault %v at %d, want an unclosed quote at 1", rows[1].fault, rows[1].at)
	}
	for _, i := range []int{0, 2, 3} {
		if rows[i].fault != noFault {
			t.Errorf("row %d has fault %v", i, rows[i].fault)
		}
	}
}

// A quote that is never closed, with more than a cell's worth after it.
func TestUnclosedQuoteInALongFile(t *testing.T) {
	line := strings.Repeat("x", 98) + ",y\n"
	text := "a,b\n1,\"2\n" + strings.Repeat(line, 900)
	rows := read(t, text)
	if len(rows) != 902 {
		t.Fatalf("%d rows, want 902", len(rows))
	}
	if rows[1].fault != unclosedQuote || rows[2].fault != noFault {
		t.Errorf("faults %v and %v", rows[1].fault, rows[2].fault)
	}
}

func TestOverLongCellIsCut(t *testing.T) {
	for name, long := range map[string]string{
		"plain":  strings.Repeat("x", 3*MaxCell),
		"quoted": `"` + strings.Repeat("x", 3*MaxCell) + `"`,
		"quotes": `"` + strings.Repeat(`""`, 2*MaxCell) + `"`,
	} {
		t.Run(name, func(t *testing.T) {
			rows := read(t, "a,b,c\n1,"+long+",3\n4,5,6\n")
			if len(rows) != 3 {
				t.Fatalf("%d rows, want 3", len(rows))
			}
			r := rows[1]
			if r.fault != overLong || r.at != 1 {
				t.Errorf("fault %v at %d, want an over-long cell at 1", r.fault, r.at)
			}
			if len(r.cells) != 3 || r.cells[0] != "1" || r.cells[2] != "3" || len(r.cells[1]) > MaxCell {
				t.Errorf("%d cells, the second of %d bytes", len(r.cells), len(r.cells[1]))
			}
			again := read(t, string(r.raw)+"\n")
			if len(again) != 1 || len(again[0].cells) != 3 || again[0].fault != noFault {
				t.Error("the cut row does not read back as one row of three cells")
			}
			if rows[2].fault != noFault || rows[2].cells[0] != "4" {
				t.Errorf("the row after it is %v", rows[2].cells)
			}
		})
	}
}

func TestCellOfTheLargestSizeIsTaken(t *testing.T) {
	rows := read(t, strings.Repeat("x", MaxCell)+",2\n"+strings.Repeat("x", MaxCell+1)+",2\n")
	if rows[0].fault != noFault || rows[1].fault != overLong {
		t.Errorf("faults %v and %v, want none and an over-long cell", rows[0].fault, rows[1].fault)
	}
}

// endless gives the same text again and again, up to a total, and watches what
// is held meanwhile.
type endless struct {
	text string
	left int
	most uint64
}

func (e *endless) Read(p []byte) (int, error) {
	if e.left <= 0 {
		return 0, io.EOF
	}
	n := 0
	for n+len(e.text) <= len(p) {
		n += copy(p[n:], e.text)
	}
	if before := e.left; before>>21 != (before-n)>>21 {
		var m runtime.MemStats
		runtime.ReadMemStats(&m)
		e.most = max(e.most, m.HeapAlloc)
	}
	e.left -= n
	return n, nil
}

// What is held does not grow with the file, nor with one cell or row of it.
func TestMemoryStaysBounded(t *testing.T) {
	for name, c := range map[string]struct {
		start, text string
		size, bound int
	}{
		"one cell":             {"", "x", 32 << 20, 10 << 20},
		"one quoted cell":      {`"`, "x", 32 << 20, 10 << 20},
		"one quoted, doubled":  {`"`, `""`, 32 << 20, 10 << 20},
		"one row":              {"", "1,", 32 << 20, 24 << 20}, // it may hold a row of 4 MiB, and its copy while growing
		"many rows":            {"", "1,2,3\n", 12 << 20, 10 << 20},
		"a quote in every row": {"", "1,\"2,3\n", 12 << 20, 10 << 20},
	} {
		t.Run(name, func(t *testing.T) {
			runtime.GC()
			source := &endless{text: c.text, left: c.size}
			s := newScanner(io.MultiReader(strings.NewReader(c.start), source))
			rows := 0
			for {
				_, err := s.next()
				if err == io.EOF {
					break
				}
				if err != nil {
					t.Fatal(err)
				}
				rows++
			}
			if rows == 0 || source.most == 0 {
				t.Fatalf("%d rows, %d bytes seen: nothing was measured", rows, source.most)
			}
			if source.most > uint64(c.bound) {
				t.Errorf("%d MiB are held of a file of %d MiB", source.most>>20, c.size>>20)
			}
		})
	}
}
