package site_test

import (
	"errors"
	"os"
	"path/filepath"
	"strings"
	"testing"
	"unicode"

	"beckline/dosing"
	"beckline/dosing/entry"
	"beckline/dosing/site"
)

// FuzzParse: whatever the file holds, the loader ends with a plant or with
// errors that a person can read, and a plant that it accepts can be used.
func FuzzParse(f *testing.F) {
	f.Add([]byte(site.Template()))
	f.Add([]byte(works))
	paths, err := filepath.Glob("testdata/bad/*.toml")
	if err != nil || len(paths) == 0 {
		f.Fatal(err)
	}
	for _, path := range paths {
		data, err := os.ReadFile(path)
		if err != nil {
			f.Fatal(err)
		}
		f.Add(data)
	}
	f.Fuzz(func(t *testing.T, data []byte) {
		s, err := site.Parse("p.toml", data)
		if err != nil {
			var errs site.Errors
			if s != nil || !errors.As(err, &errs) || len(errs) == 0 {
				t.Fatalf("%v", err)
			}
			lines := strings.Count(string(data), "\n") + 1
			for _, e := range errs {
				if e.Code == "" || e.Given == "" || e.Line < 0 || e.Line > lines {
					t.Errorf("%+v", e)
				}
				if strings.ContainsFunc(e.Error(), unicode.IsControl) {
					t.Errorf("%q", e.Error())
				}
			}
			return
		}
		for _, r := range s.Show() {
			if strings.ContainsFunc(r.Key+r.Value+r.From, unicode.IsControl) {
				t.Errorf("%+v", r)
			}
		}
		for _, l := range s.Lines {
			c, err := l.Case(l.Form(), entry.NeedDose)
			if err != nil {
				var p *dosing.Problem
				if !errors.As(err, &p) || p.Code == "" {
					t.Fatalf("%v", err)
				}
				continue
			}
			if r, err := dosing.Solve(c); err == nil {
				l.CheckFinished(r)
			}
		}
	})
}
