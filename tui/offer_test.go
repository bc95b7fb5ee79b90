package tui

import (
	"os"
	"path/filepath"
	"testing"
	"time"

	"beckline/tui/draft"
)

// leftDrafts are sessions that ended, the oldest first.
func leftDrafts(t *testing.T, dir string, sheets ...sheet) {
	t.Helper()
	for _, s := range sheets {
		store, err := draft.Open(dir, time.Now())
		if err != nil {
			t.Fatal(err)
		}
		store.Keep(s)
		store.Close()
	}
}

// TestStrayDigitHidesNoDraft: a later draft of one reading comes after the one
// that is enough for a dose; each can be had, and none is deleted meanwhile.
func TestStrayDigitHidesNoDraft(t *testing.T) {
	dir := t.TempDir()
	full := demo(t).own().m.sheet
	stray := demo(t).keys("7", "Enter").m.sheet
	leftDrafts(t, dir, full, stray)
	d := demo(t)
	s := &session{options: Options{Drafts: dir}}
	s.openDrafts(d.m)
	defer s.store.Close()
	d.shows("4 readings", "d again the next of 2")
	d.keys("d").shows("draft 1 of 2", "4 readings")
	d.keys("d").shows("draft 2 of 2", "1 reading,")
	d.keys("d").shows("draft 1 of 2")
	if !d.m.sheet.equal(full) {
		t.Errorf("took up %+v", d.m.sheet)
	}
	files := func() int {
		found, err := filepath.Glob(filepath.Join(dir, "*.draft.json"))
		if err != nil {
			t.Fatal(err)
		}
		return len(found)
	}
	s.store.Keep(d.m.sheet)
	s.store.Close()
	if n := files(); n != 3 {
		t.Errorf("%d drafts before leaving, want two and one's own", n)
	}
	s.dropTaken(d.m)
	if n := files(); n != 2 {
		t.Errorf("%d drafts after leaving, want the stray one and one's own", n)
	}
	d.keys("Home", "7.5", "Enter", "d").shows("n empties the line")
	if d.m.sheet.Values["ph"] != "7.5" {
		t.Error("d replaced what was entered")
	}
	if entries, err := os.ReadDir(dir); err != nil || len(entries) == 0 {
		t.Fatal(entries, err)
	}
}
