package table

import (
	"bufio"
	"bytes"
	"encoding/csv"
	"errors"
	"fmt"
	"io"
	"slices"
	"strings"

	"beckline/dosing"
	"beckline/dosing/entry"
	"beckline/dosing/margin"
	"beckline/dosing/report"
)

// Options say how a file is answered.
type Options struct {
	Form   entry.Form // what the flags supply for every row
	Need   entry.Need // a dose, or the water's figures alone
	Strict bool       // stop at the first row with a problem

	Defaults entry.Form     // what a plant supplies where neither the file nor a flag does: values and product
	Plant    Plant          // whose limits and products hold; nil for none
	Progress func(rows int) // told of rows answered now and then; nil for nobody

	Tolerances *margin.Tolerances // how far off each reading may be; nil for no margin, which costs
	Margin     margin.Options
}

// Plant is what rows need of a plant's line.
type Plant interface {
	Problems(f entry.Form, need entry.Need) []*dosing.Problem
	Case(f entry.Form, need entry.Need) (dosing.Case, error)
	CheckFinished(r *dosing.Result) []*dosing.Problem
}

// columns are those of an answer, with its margin where one is asked for, and
// the second dose where there are two.
func (o Options) columns() []report.Column {
	columns := report.Columns()
	if o.margins() {
		columns = report.MarginColumns()
	}
	if o.two() {
		columns = beforeNotes(columns, report.SecondColumns())
	}
	return columns
}

// beforeNotes puts more in front of the last two: warnings and problem.
func beforeNotes[T any](all, more []T) []T {
	return slices.Insert(all, len(all)-2, more...)
}

// two tells whether rows get two doses.
func (o Options) two() bool { return o.Form.Second != "" && o.Need == entry.NeedDose }

// margins tells whether rows get a margin.
func (o Options) margins() bool { return o.Tolerances != nil && o.Need == entry.NeedDose }

// Summary counts what was done.
type Summary struct {
	Rows     int // rows read, the header not counted
	Problems int // of them, rows with a problem
	Unusual  int // answered rows with an unusual reading
}

// RowError is the problem at which a strict run stopped.
type RowError struct {
	Row     int // 1 is the first row after the header
	Problem *dosing.Problem
}

func (e *RowError) Error() string { return fmt.Sprintf("row %d: %s", e.Row, e.Problem.Error()) }

// Run answers the rows of in onto out. A row that has no answer keeps its place
// with a problem. The error is a *dosing.Problem for flags that cannot be used
// or a file that cannot be answered at all (nothing is written then), a *RowError for a strict run that
// stopped, or an error of in or out.
//
// NUL bytes are looked for in the whole of a file that can be rewound before
// anything is written; of any other, before the first megabyte of answers is.
func Run(in io.Reader, out io.Writer, o Options) (Summary, error) {
	var sum Summary
	if p := o.unusable(); p != nil {
		return sum, p
	}
	if err := scanForNUL(in); err != nil {
		return sum, err
	}
	s := newScanner(in)
	h, err := readHeader(s, &o)
	if err != nil {
		return sum, fileError(err)
	}
	sent := &counter{out: out}
	w := bufio.NewWriterSize(sent, 1<<20)
	h.writeHeader(w)
	pending := 0 // blank lines, which are rows only if a row follows
	for {
		r, err := s.next()
		if err == io.EOF {
			break
		}
		if err != nil {
			if sent.bytes == 0 && errors.Is(err, errNUL) {
				return sum, fileError(err)
			}
			return sum, flushed(w, fileError(err))
		}
		if r.blank() {
			pending++
			continue
		}
		for ; pending > 0; pending-- {
			if err := h.one(w, &row{cells: []string{""}, ends: []int{0}, ending: r.ending}, o, &sum); err != nil {
				return sum, flushed(w, err)
			}
		}
		if err := h.one(w, r, o, &sum); err != nil {
			return sum, flushed(w, err)
		}
	}
	return sum, w.Flush()
}

// unusable is what is wrong with the flags whatever the rows hold; what they
// leave out, the file may have.
func (o Options) unusable() *dosing.Problem {
	problems := o.Form.Problems
	if o.Plant != nil {
		problems = func(need entry.Need) []*dosing.Problem { return o.Plant.Problems(o.Form, need) }
	}
	for _, p := range problems(o.Need) {
		if p.Code != "missing" {
			return p
		}
	}
	return nil
}

// flushed writes out what is held and returns the error that ended the run.
func flushed(w *bufio.Writer, err error) error {
	if failed := w.Flush(); failed != nil {
		return failed
	}
	return err
}

// counter counts the bytes that have left for good.
type counter struct {
	out   io.Writer
	bytes int
}

func (c *counter) Write(p []byte) (int, error) {
	n, err := c.out.Write(p)
	c.bytes += n
	return n, err
}

const progressEvery = 200

// one answers and writes one row.
func (h *header) one(w *bufio.Writer, r *row, o Options, sum *Summary) error {
	sum.Rows++
	if o.Progress != nil && sum.Rows%progressEvery == 0 {
		o.Progress(sum.Rows)
	}
	cells, unusual, p := h.answer(r, o)
	if unusual {
		sum.Unusual++
	}
	if p != nil {
		if o.Strict {
			return &RowError{sum.Rows, p}
		}
		sum.Problems++
		cells = report.ProblemCells(p)
		if o.margins() {
			cells = report.MarginProblemCells(p)
		}
		if o.two() {
			cells = beforeNotes(cells, make([]string, len(report.SecondColumns())))
		}
	}
	return h.writeRow(w, r, cells)
}

func (h *header) writeHeader(w *bufio.Writer) {
	if h.mark {
		_, _ = w.Write(byteOrderMark) // a bufio error is kept until Flush
	}
	names := make([]string, len(h.answers))
	for i, c := range h.answers {
		names[i] = c.Name
	}
	_, _ = w.Write(h.row.raw)
	_, _ = w.WriteString(string(h.comma) + h.join(names) + h.row.ending)
}

// writeRow writes the row as it stands in the file, then the answer's cells.
func (h *header) writeRow(w *bufio.Writer, r *row, cells []string) error {
	chosen := make([]string, len(h.chosen))
	for i, at := range h.chosen {
		chosen[i] = cells[at]
		if h.answers[i].Number && h.decimal == ',' {
			chosen[i] = strings.Replace(chosen[i], ".", ",", 1)
		}
	}
	_, err := w.WriteString(h.own(r) + string(h.comma) + h.join(chosen) + r.ending)
	return err
}

// own is the row's own text, filled up or cut to the header's cells so that the
// answer stands under its columns.
func (h *header) own(r *row) string {
	n := len(h.names)
	var text string
	switch {
	case r.messy:
		text = h.join(r.cells[:min(n, len(r.cells))])
	case len(r.cells) > n:
		text = string(r.raw[:r.ends[n-1]])
	default:
		text = string(r.raw)
	}
	if short := n - len(r.cells); short > 0 {
		text += strings.Repeat(string(h.comma), short)
	}
	return text
}

// join writes cells with the file's separator, quoted where they must be.
func (h *header) join(cells []string) string {
	var b bytes.Buffer
	w := csv.NewWriter(&b)
	w.Comma = rune(h.comma)
	_ = w.Write(cells) // a Buffer takes everything, and the separator is valid
	w.Flush()
	return strings.TrimSuffix(b.String(), "\n")
}

// scanForNUL reads a rewindable input through once.
func scanForNUL(in io.Reader) error {
	seeker, ok := in.(io.Seeker)
	if !ok {
		return nil
	}
	start, err := seeker.Seek(0, io.SeekCurrent)
	if err != nil {
		return nil // a pipe: checked as it is read
	}
	buffer := make([]byte, 1<<18)
	for {
		n, err := in.Read(buffer)
		if bytes.IndexByte(buffer[:n], 0) >= 0 {
			return fileError(errNUL)
		}
		if err == io.EOF {
			break
		}
		if err != nil {
			return err
		}
	}
	_, err = seeker.Seek(start, io.SeekStart)
	return err
}

func fileError(err error) error {
	if errors.Is(err, errNUL) {
		return fileProblem("nul_bytes", "", "plain CSV text in UTF-8; this file holds NUL bytes")
	}
	return err
}
