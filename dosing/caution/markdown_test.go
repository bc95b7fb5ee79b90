package caution

import (
	"flag"
	"os"
	"path/filepath"
	"strings"
	"testing"

	"github.com/google/go-cmp/cmp"

	"beckline/dosing"
)

var update = flag.Bool("update", false, "write SAFETY.md anew")

// SAFETY.md is what the program says, to the letter.
func TestSafetyPage(t *testing.T) {
	path := filepath.Join("..", "..", "SAFETY.md")
	if *update {
		if err := os.WriteFile(path, []byte(Markdown()), 0o644); err != nil {
			t.Fatal(err)
		}
	}
	held, err := os.ReadFile(path)
	if err != nil {
		t.Fatal(err)
	}
	if d := cmp.Diff(string(held), Markdown()); d != "" {
		t.Errorf("SAFETY.md is not what the program says; run go test ./dosing/caution -update\n%s", d)
	}
}

func TestSafetyPageNamesEveryProduct(t *testing.T) {
	page := Markdown()
	for _, p := range dosing.Products() {
		if !strings.Contains(page, "`"+p.Name+"`") {
			t.Errorf("%s is missing", p.Name)
		}
	}
	for _, words := range []string{Deferral, "What beckline cannot know", "Never together", "maximum use level"} {
		if !strings.Contains(page, words) {
			t.Errorf("%q is missing", words)
		}
	}
	if strings.Contains(page, "\t") || !plain(strings.ReplaceAll(page, "\n", " ")) {
		t.Error("the page is not plain ASCII")
	}
}
