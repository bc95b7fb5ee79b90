package main

import (
	"go/build"
	"io/fs"
	"os/exec"
	"path"
	"path/filepath"
	"slices"
	"strings"
	"testing"
)

// layers says what each room may import of ours. A room nested in one that is
// listed follows its rule and may import its siblings. Imports go down only.
var layers = map[string][]string{
	"carbonate":        {},
	"dosing/feed":      {},
	"dosing/reading":   {},
	"dosing":           {"carbonate", "dosing/feed"},
	"dosing/entry":     {"carbonate", "dosing", "dosing/feed", "dosing/margin", "dosing/reading"},
	"dosing/caution":   {"dosing", "dosing/feed"},
	"dosing/margin":    {"carbonate", "dosing", "dosing/feed"},
	"dosing/hand":      {"carbonate", "dosing"},
	"dosing/working":   {"carbonate", "dosing"},
	"dosing/bench":     {"carbonate", "dosing"},
	"dosing/slips":     {"dosing", "dosing/reading"},
	"dosing/curve":     {"carbonate", "dosing"},
	"dosing/titration": {"carbonate"},
	"dosing/batch":     {"dosing"},
	"dosing/mix":       {"carbonate", "dosing", "dosing/feed"},
	"dosing/site":      {"dosing", "dosing/entry", "dosing/feed", "dosing/reading"},
	"dosing/report": {"carbonate", "dosing", "dosing/feed", "dosing/reading", "dosing/caution", "dosing/batch", "dosing/bench",
		"dosing/curve", "dosing/hand", "dosing/margin", "dosing/mix", "dosing/slips"},
	"dosing/check": {"carbonate", "dosing", "dosing/feed", "dosing/report"},
	"dosing/table": {"dosing", "dosing/entry", "dosing/margin", "dosing/reading", "dosing/report"},
	"tui": {"carbonate", "dosing", "dosing/entry", "dosing/feed", "dosing/reading", "dosing/report", "dosing/caution",
		"dosing/check", "dosing/table", "dosing/batch", "dosing/bench", "dosing/curve", "dosing/hand", "dosing/margin",
		"dosing/mix", "dosing/site", "dosing/slips", "dosing/titration", "dosing/working"},
	"cmd/beckline": {"carbonate", "dosing", "dosing/entry", "dosing/feed", "dosing/reading", "dosing/report",
		"dosing/caution", "dosing/check", "dosing/table", "dosing/batch", "dosing/bench", "dosing/curve", "dosing/hand",
		"dosing/margin", "dosing/mix", "dosing/site", "dosing/slips", "dosing/titration", "dosing/working", "tui"},
}

// pure rooms touch nothing but numbers and text: no files, network, processes,
// terminals or clocks.
var pure = []string{"carbonate", "dosing", "dosing/feed", "dosing/reading", "dosing/entry", "dosing/caution",
	"dosing/margin", "dosing/hand", "dosing/working", "dosing/bench", "dosing/titration", "dosing/batch", "dosing/mix"}

var impure = []string{"os", "os/exec", "net", "net/http", "flag", "syscall", "io/fs", "time", "log"}

// noNetwork holds for every room: the program answers with no network.
var network = []string{"net", "net/http", "net/url", "net/rpc", "crypto/tls"}

const module = "beckline"

// roomOf finds the listed room that a folder belongs to.
func roomOf(folder string) (string, bool) {
	for at := folder; at != "."; at = path.Dir(at) {
		if _, ok := layers[at]; ok {
			return at, true
		}
	}
	return "", false
}

func TestImportsGoDownOnly(t *testing.T) {
	root := filepath.Join("..", "..")
	checked := 0
	err := filepath.WalkDir(root, func(name string, entry fs.DirEntry, err error) error {
		if err != nil || !entry.IsDir() {
			return err
		}
		if base := entry.Name(); base == "testdata" || strings.HasPrefix(base, ".") && base != ".." && base != "." {
			return filepath.SkipDir
		}
		pkg, err := build.ImportDir(name, 0)
		if _, none := err.(*build.NoGoError); none {
			return nil
		}
		if err != nil {
			return err
		}
		relative, err := filepath.Rel(root, name)
		if err != nil {
			return err
		}
		checkImports(t, filepath.ToSlash(relative), pkg.Imports)
		checked++
		return nil
	})
	if err != nil {
		t.Fatal(err)
	}
	if checked < len(layers) {
		t.Errorf("%d packages were checked, %d rooms are listed", checked, len(layers))
	}
}

func checkImports(t *testing.T, folder string, imports []string) {
	t.Helper()
	room, listed := roomOf(folder)
	if !listed {
		t.Errorf("%s belongs to no room of the table: add it with what it may import", folder)
		return
	}
	for _, imported := range imports {
		if slices.Contains(pure, room) && slices.Contains(impure, imported) {
			t.Errorf("%s imports %s: it is to be pure", folder, imported)
		}
		if slices.Contains(network, imported) {
			t.Errorf("%s imports %s: no network at run time", folder, imported)
		}
		if room == "carbonate" && strings.Contains(imported, ".") && !strings.HasPrefix(imported, "gonum.org/") {
			t.Errorf("carbonate imports %s: gonum only", imported)
		}
		ours, ok := strings.CutPrefix(imported, module+"/")
		if !ok {
			continue
		}
		to, _ := roomOf(ours)
		if to != room && !slices.Contains(layers[room], to) {
			t.Errorf("%s imports %s, which is not below it", folder, ours)
		}
	}
}

// The top level holds the rooms and the papers, nothing else.
func TestTopLevel(t *testing.T) {
	allowed := []string{"cmd", "tui", "carbonate", "dosing", "testdata", "go.mod", "go.sum", "README.md", "DEVELOPERS.md",
		"SAFETY.md", "LICENSE", ".ci", ".git", ".gitignore"}
	// What git holds, not what lies about: a built program or a saved slip is
	// nobody's fault.
	list := exec.Command("git", "ls-files")
	list.Dir = filepath.Join("..", "..")
	files, err := list.Output()
	if err != nil {
		t.Skip("not in a git checkout: ", err)
	}
	for _, file := range strings.Fields(string(files)) {
		if top, _, _ := strings.Cut(file, "/"); !slices.Contains(allowed, top) {
			t.Errorf("%s stands at the top level", top)
		}
	}
}
