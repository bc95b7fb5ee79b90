package tui

import (
	"bytes"
	"encoding/csv"
	"fmt"
	"os"
	"time"

	"beckline/dosing/report"
)

// forms are the forms in which the answer can be taken elsewhere.
var forms = []struct {
	name, detail string
	write        func(report.Document) (string, error)
}{
	{"slip", "plain text of at most 72 columns, the same order every time", func(d report.Document) (string, error) { return d.Slip(), nil }},
	{"log line", "one line for the shift log", func(d report.Document) (string, error) { return d.LogLine(time.Now()) + "\n", nil }},
	{"whole answer", "everything, as the dose command prints it", func(d report.Document) (string, error) { return d.Text(), nil }},
	{"JSON", "for programs, full precision", func(d report.Document) (string, error) {
		b, err := d.JSON()
		return string(b), err
	}},
	{"CSV", "a heading and a row for a spreadsheet, full precision", csvText},
}

// saved is the choice that writes the slip to a file.
const saved = "slip to a file"

// chooseExport opens the list of the forms.
func (m *Model) chooseExport() {
	if _, ok := m.slip(); !ok {
		return
	}
	l := list{title: "copy", pick: (*Model).export}
	for _, f := range forms {
		l.all = append(l.all, choice{name: f.name, detail: f.detail})
	}
	l.all = append(l.all, choice{name: saved, detail: "in the folder where the program was started"})
	m.openList(l, "")
}

// export copies the answer in the form of that name, or writes the slip.
func (m *Model) export(name string) {
	if name == saved {
		m.saveSlip()
		return
	}
	for _, f := range forms {
		if f.name != name {
			continue
		}
		text, err := f.write(report.New(m.good.result))
		if err != nil {
			m.note = "not copied: " + err.Error()
			return
		}
		if m.hooks.send != nil {
			m.hooks.send(clipboardSequence(text, os.Getenv))
		}
		m.note = name + " sent to your terminal's clipboard"
	}
}

// saveSlip writes the slip to a new file; one that is there already is never
// touched.
func (m *Model) saveSlip() {
	text, ok := m.slip()
	if !ok {
		return
	}
	stamp := time.Now().Format("20060102-1504")
	for n := range 100 {
		path := fmt.Sprintf("beckline-slip-%s.txt", stamp)
		if n > 0 {
			path = fmt.Sprintf("beckline-slip-%s-%d.txt", stamp, n)
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
	m.note = "not written: too many slips of this minute"
}

func csvText(d report.Document) (string, error) {
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
