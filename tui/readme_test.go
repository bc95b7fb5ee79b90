package tui

import (
	"os"
	"path/filepath"
	"strings"
	"testing"
)

// TestReadmeShowsTheScreenAsItIs compares the screen in README.md with the one
// that a test draws.
func TestReadmeShowsTheScreenAsItIs(t *testing.T) {
	readme, err := os.ReadFile(filepath.Join("..", "README.md"))
	if err != nil {
		t.Fatal(err)
	}
	want, err := os.ReadFile(filepath.Join("testdata", "demo-80x24.txt"))
	if err != nil {
		t.Fatal(err)
	}
	_, rest, found := strings.Cut(string(readme), "```text screen demo-80x24\n")
	got, _, closed := strings.Cut(rest, "```\n")
	if !found || !closed || got != string(want) {
		t.Errorf("README.md must hold this block:\n```text screen demo-80x24\n%s```", want)
	}
}
