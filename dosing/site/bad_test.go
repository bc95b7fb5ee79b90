package site_test

import (
	"errors"
	"os"
	"path/filepath"
	"strconv"
	"strings"
	"testing"

	"beckline/dosing"
	"beckline/dosing/site"
)

// TestBadFiles: one file for each rule of the loader. Its first line says what
// the first error must be: line | code | key | words of its message.
func TestBadFiles(t *testing.T) {
	paths, err := filepath.Glob("testdata/bad/*.toml")
	if err != nil || len(paths) < 90 {
		t.Fatalf("%d files, %v", len(paths), err)
	}
	seen := map[string]bool{}
	for _, path := range paths {
		data, err := os.ReadFile(path)
		if err != nil {
			t.Fatal(err)
		}
		first, _, _ := strings.Cut(string(data), "\n")
		wants := strings.Split(strings.TrimPrefix(first, "# wants: "), " | ")
		if len(wants) != 4 {
			t.Fatalf("%s: first line %q", path, first)
		}
		line, _ := strconv.Atoi(wants[0])
		_, err = site.Load(path)
		var errs site.Errors
		if !errors.As(err, &errs) || len(errs) != 1 {
			t.Errorf("%s: %v", path, err)
			continue
		}
		e := errs[0]
		seen[e.Code] = true
		if e.Line != line || e.Code != wants[1] || e.Key != wants[2] || !strings.Contains(e.Error(), wants[3]) {
			t.Errorf("%s: line %d, code %s, key %q: %s", filepath.Base(path), e.Line, e.Code, e.Key, e)
		}
		if text := e.Error(); strings.ContainsAny(text, "\n\r\x1b") || !strings.HasPrefix(text, path) || len(text) > 600 {
			t.Errorf("%s: message %q", filepath.Base(path), text)
		}
		if e.Accepted == "" && e.Code != site.CodeSyntax && e.Code != site.CodeKind {
			t.Errorf("%s does not say what is accepted: %s", filepath.Base(path), e)
		}
		if p := e.Problem(); p.Kind != dosing.BadInput || p.Code != e.Code || p.Field == "" || p.Accepted != e.Accepted {
			t.Errorf("%s: %+v", filepath.Base(path), p)
		}
	}
	for _, code := range []string{site.CodeSyntax, site.CodeUnknownKey, site.CodeKind, site.CodeValue, site.CodeReference, site.CodeMissing,
		site.CodeBand, site.CodeWider, site.CodeName, site.CodeNewer, site.CodeContradict} {
		if !seen[code] {
			t.Errorf("no file for %s", code)
		}
	}
}

// TestAllMistakes: a file with several has all of them told, by line, and the
// short form says how many.
func TestAllMistakes(t *testing.T) {
	_, err := site.Parse("p.toml", []byte("[lines.a]\ntile = 1\ncapacity = 0\n\n[pumps.P]\n"))
	var errs site.Errors
	if !errors.As(err, &errs) || len(errs) != 3 {
		t.Fatal(err)
	}
	if errs[0].Line != 2 || errs[1].Line != 3 || errs[2].Line != 5 {
		t.Errorf("lines %d %d %d", errs[0].Line, errs[1].Line, errs[2].Line)
	}
	if want := errs[0].Error() + " (and 2 more mistakes)"; err.Error() != want {
		t.Errorf("%q", err)
	}
	if got := errs[:2].Error(); !strings.HasSuffix(got, "(and 1 more mistake)") || errs[:1].Error() != errs[0].Error() || (site.Errors{}).Error() != "" {
		t.Errorf("%q", got)
	}
}

func TestTooLarge(t *testing.T) {
	for name, text := range map[string]string{
		"bytes": strings.Repeat("# a remark\n", 30000),
		"keys":  strings.Repeat("[lines.a]\n", 1) + manyKeys(5001),
	} {
		_, err := site.Parse("p.toml", []byte(text))
		var errs site.Errors
		if !errors.As(err, &errs) || errs[0].Code != site.CodeTooLarge || errs[0].Accepted == "" {
			t.Errorf("%s: %v", name, err)
		}
	}
}

func manyKeys(n int) string {
	var b strings.Builder
	for i := range n {
		b.WriteString("k" + strconv.Itoa(i) + " = 1\n")
	}
	return b.String()
}
