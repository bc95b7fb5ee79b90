package tui

import (
	"encoding/base64"
	"encoding/csv"
	"encoding/json"
	"os"
	"path/filepath"
	"strings"
	"testing"
)

// copied takes the text out of a clipboard sequence.
func copied(t *testing.T, sequence string) string {
	t.Helper()
	text, err := base64.StdEncoding.DecodeString(strings.TrimSuffix(strings.TrimPrefix(sequence, "\x1b]52;c;"), "\x07"))
	if err != nil {
		t.Fatalf("%q: %v", sequence, err)
	}
	return string(text)
}

func TestForms(t *testing.T) {
	for _, name := range []string{"TMUX", "STY"} {
		t.Setenv(name, "")
	}
	t.Setenv("TERM", "xterm")
	for form, check := range map[string]func(string) bool{
		"slip": func(s string) bool { return strings.Contains(s, "pump ") },
		"log line": func(s string) bool {
			return strings.Count(s, "\n") == 1 && len(s) <= 79 && strings.Contains(s, "caustic-25")
		},
		"JSON": func(s string) bool {
			var v struct {
				Dose struct {
					Dose float64 `json:"dose_mg_l"`
				} `json:"dose"`
			}
			return json.Unmarshal([]byte(s), &v) == nil && v.Dose.Dose > 6
		},
		"CSV": func(s string) bool {
			rows, err := csv.NewReader(strings.NewReader(s)).ReadAll()
			return err == nil && len(rows) == 2 && rows[0][0] == "raw_ph" && rows[1][0] == "7"
		},
		"whole answer": func(s string) bool { return strings.Contains(s, "Caustic soda") },
	} {
		d := demo(t).own()
		var sent string
		d.m.hooks.send = func(s string) { sent = s }
		d.keys("Y", form, "Enter").shows("sent to your terminal's clipboard")
		if text := copied(t, sent); !check(text) {
			t.Errorf("%s: %q", form, text)
		}
	}
}

func TestSlipToAFile(t *testing.T) {
	t.Chdir(t.TempDir())
	d := demo(t).own().keys("Y", "file", "Enter").shows("written to beckline-slip-")
	d.keys("Y", "file", "Enter").shows("written to beckline-slip-")
	files, err := filepath.Glob("beckline-slip-*.txt")
	if err != nil || len(files) != 2 {
		t.Fatalf("files %q, %v; want two", files, err)
	}
	text, err := os.ReadFile(files[0])
	if err != nil || !strings.Contains(string(text), "5.07 L/h") {
		t.Errorf("the file holds %q, %v", text, err)
	}
	d.keys("Home", "1,200", "Enter", "Y").shows("no slip: the figures are older")
}
