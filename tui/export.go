package tui

import (
	"bytes"
	"encoding/csv"
	"errors"
	"fmt"
	"os"
	"strings"
	"time"

	"beckline/dosing"
	"beckline/dosing/margin"
	"beckline/dosing/report"
	"beckline/dosing/working"
)

// forms are the forms in which the answer can be taken elsewhere.
var forms = []struct {
	name, detail string
	suffix       string // of a file
	write        func(report.Document, *dosing.Result) (string, error)
}{
	{"slip", "plain text of at most 72 columns, the same order every time", "txt", func(d report.Document, _ *dosing.Result) (string, error) { return d.Slip(), nil }},
	{"log line", "one line for the shift log", "txt", func(d report.Document, _ *dosing.Result) (string, error) { return d.LogLine(time.Now()) + "\n", nil }},
	{"whole answer", "everything, as the dose command prints it", "txt", func(d report.Document, _ *dosing.Result) (string, error) { return d.Text(), nil }},
	{"worked sheet", "every step with its formula, its numbers and its source", "txt", func(_ report.Document, r *dosing.Result) (string, error) {
		w, err := working.Of(r)
		return w.Text(), err
	}},
	{"JSON", "for programs, full precision", "json", func(d report.Document, _ *dosing.Result) (string, error) {
		b, err := d.JSON()
		return string(b), err
	}},
	{"CSV", "a heading and a row for a spreadsheet, full precision", "csv", csvText},
}

// toFile makes of a form's name the choice that writes it to a file.
const toFile = " to a file"

// chooseExport opens the list of the forms.
func (m *Model) chooseExport() {
	if _, ok := m.slip(); !ok {
		return
	}
	l := list{title: "copy", pick: (*Model).export}
	for _, f := range forms {
		l.all = append(l.all, choice{name: f.name, detail: f.detail})
	}
	for _, f := range forms {
		if f.name != "log line" {
			l.all = append(l.all, choice{name: f.name + toFile, detail: "beckline-" + strings.ReplaceAll(f.name, " ", "-") + "-DATE." + f.suffix + " where the program was started"})
		}
	}
	m.openList(l, "")
}

// export copies the answer in the form of that name, or writes it to a file.
func (m *Model) export(name string) {
	form, file := strings.CutSuffix(name, toFile)
	for _, f := range forms {
		if f.name != form {
			continue
		}
		text, err := f.write(m.document(), m.good.result)
		if err != nil {
			m.note = form + " not made: " + problemText(err)
			return
		}
		if m.sheet.Demo && f.suffix == "txt" {
			text = demoHeading + text
		}
		if file {
			m.save(form, f.suffix, text)
			return
		}
		if m.hooks.send != nil {
			m.hooks.send(clipboardSequence(text, os.Getenv))
		}
		m.note = name + " sent to your terminal's clipboard"
	}
}

// document is the answer in report's form, with its margin made in full.
func (m *Model) document() report.Document {
	d := report.New(m.good.result)
	if full, err := margin.Of(m.good.result, m.sheet.tolerances(), margin.Options{}); err == nil {
		d = d.WithMargin(full, m.sheet.plant == nil || len(m.sheet.plant.Tolerances) == 0)
	}
	return d
}

func problemText(err error) string {
	var p *dosing.Problem
	if errors.As(err, &p) {
		return report.ProblemLine(p)
	}
	return err.Error()
}

// showWorking shows the worked sheet on a page.
func (m *Model) showWorking() {
	if _, ok := m.slip(); !ok {
		return
	}
	w, err := working.Of(m.good.result)
	if err != nil {
		m.note = "no worked sheet: " + problemText(err)
		return
	}
	text := w.Text()
	if m.sheet.Demo {
		text = demoHeading + text
	}
	m.openPage(page{title: "worked sheet; Y copies it or writes a file", text: text, plain: true})
}

// save writes a text to a new file; one that is there already is never touched.
func (m *Model) save(form, suffix, text string) {
	stem := "beckline-" + strings.ReplaceAll(form, " ", "-") + "-" + time.Now().Format("20060102-1504")
	for n := range 100 {
		path := stem + "." + suffix
		if n > 0 {
			path = fmt.Sprintf("%s-%d.%s", stem, n, suffix)
		}
		f, err := os.OpenFile(path, os.O_CREATE|os.O_EXCL|os.O_WRONLY, 0o644)
		if os.IsExist(err) {
			continue
		}
		if err == nil {
			_, err = f.WriteString(text)
			if e := f.Close(); err == nil {
				err = e
			}
		}
		if err != nil {
			m.note = "not written: " + err.Error()
		} else {
			m.note = "written to " + path
		}
		return
	}
	m.note = "not written: too many files of this minute"
}

func csvText(d report.Document, _ *dosing.Result) (string, error) {
	var b bytes.Buffer
	w := csv.NewWriter(&b)
	var heading []string
	for _, c := range report.Columns() {
		heading = append(heading, c.Name)
	}
	for _, row := range [][]string{heading, d.Cells()} {
		if err := w.Write(row); err != nil {
			return "", err
		}
	}
	w.Flush()
	return b.String(), w.Error()
}
