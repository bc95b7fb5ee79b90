package site_test

import (
	"errors"
	"os"
	"path/filepath"
	"strings"
	"testing"

	"beckline/dosing/site"
)

func firstError(t *testing.T, err error) *site.Error {
	t.Helper()
	var errs site.Errors
	if !errors.As(err, &errs) || len(errs) == 0 {
		t.Fatalf("no plant-file error but %v", err)
	}
	return errs[0]
}

// TestCreateAndOpen: a new file is the template at the place where Open looks; it
// is never written over.
func TestCreateAndOpen(t *testing.T) {
	dir := t.TempDir()
	t.Setenv("XDG_CONFIG_HOME", dir)
	want := filepath.Join(dir, "beckline", "site.toml")
	if site.DefaultPath() != want {
		t.Fatalf("%s", site.DefaultPath())
	}
	if s, err := site.Open(""); s != nil || err != nil {
		t.Fatalf("without a file: %v %v", s, err)
	}
	path, err := site.Create("")
	if err != nil || path != want {
		t.Fatal(path, err)
	}
	if data, err := os.ReadFile(path); err != nil || string(data) != site.Template() {
		t.Fatal(err)
	}
	if s, err := site.Open(""); err != nil || s.Start.Name != "upland" {
		t.Fatal(s, err)
	}
	if err := os.WriteFile(path, []byte("mine"), 0o600); err != nil {
		t.Fatal(err)
	}
	_, err = site.Create("")
	if e := firstError(t, err); !strings.Contains(e.Given, "already") {
		t.Error(e)
	}
	if data, _ := os.ReadFile(path); string(data) != "mine" {
		t.Error("the file was written over")
	}
	if _, err := site.Open(""); firstError(t, err).Code != site.CodeSyntax {
		t.Error(err)
	}
	other := filepath.Join(dir, "a", "b", "other.toml")
	if path, err := site.Create(other); err != nil || path != other {
		t.Error(path, err)
	}
	if s, err := site.Open(other); err != nil || s.Path != other {
		t.Error(s, err)
	}
	_, err = site.Create(filepath.Join(path, "x", "site.toml")) // a file is in the way
	if e := firstError(t, err); !strings.Contains(e.Given, "folder") {
		t.Error(e)
	}
}

func TestDefaultPathElsewhere(t *testing.T) {
	t.Setenv("XDG_CONFIG_HOME", "relative") // to be ignored, says the specification
	t.Setenv("HOME", t.TempDir())
	if p := site.DefaultPath(); strings.HasPrefix(p, "relative") {
		t.Error(p)
	}
}

func TestLoadRefusals(t *testing.T) {
	dir := t.TempDir()
	_, err := site.Load(filepath.Join(dir, "none.toml"))
	if e := firstError(t, err); e.Code != site.CodeUnreadable || e.Given != "there is no such file" || e.Accepted == "" || e.Line != 0 {
		t.Error(e)
	}
	if _, err := site.Open(filepath.Join(dir, "none.toml")); firstError(t, err).Code != site.CodeUnreadable {
		t.Error("a file that was asked for may not be missing")
	}
	if _, err := site.Load(dir); firstError(t, err).Code != site.CodeUnreadable {
		t.Error("a folder is no file")
	}
}
