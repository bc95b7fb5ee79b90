package draft

import (
	"os"
	"path/filepath"
	"testing"
	"time"
)

type content struct{ Text string }

func open(t *testing.T, dir string) *Store {
	t.Helper()
	s, err := Open(dir, time.Now())
	if err != nil {
		t.Fatal(err)
	}
	return s
}

func TestDraftOfAnEndedSessionIsOnOffer(t *testing.T) {
	dir := t.TempDir()
	first := open(t, dir)
	first.Keep(content{"one"})
	first.Keep(content{"two"})

	second, err := Open(dir, time.Now().Add(time.Second)) // another session, at the same time
	if err != nil {
		t.Fatal(err)
	}
	if offers := second.Offers(); len(offers) != 0 {
		t.Errorf("the draft of a living session is on offer: %v", offers)
	}
	first.Close()
	offers := second.Offers()
	if len(offers) != 1 {
		t.Fatalf("%d offers, want 1", len(offers))
	}
	var c content
	if err := offers[0].Load(&c); err != nil || c.Text != "two" {
		t.Errorf("loaded %q, %v; want the newest", c.Text, err)
	}
	if age := time.Since(offers[0].When); age < 0 || age > time.Minute {
		t.Errorf("from %v", offers[0].When)
	}
	offers[0].Remove()
	if len(second.Offers()) != 0 {
		t.Error("a removed draft is still on offer")
	}
	second.Close()
}

func TestTwoSessionsHaveFilesOfTheirOwn(t *testing.T) {
	dir := t.TempDir()
	now := time.Now()
	a := open(t, dir)
	b, err := Open(dir, now.Add(3*time.Second))
	if err != nil {
		t.Fatal(err)
	}
	a.Keep(content{"a"})
	b.Keep(content{"b"})
	a.Close()
	b.Close()
	c := open(t, dir)
	defer c.Close()
	if offers := c.Offers(); len(offers) != 2 {
		t.Errorf("%d drafts, want 2", len(offers))
	}
}

func TestUnwritableFolderDoesNoHarm(t *testing.T) {
	file := filepath.Join(t.TempDir(), "file")
	if err := os.WriteFile(file, nil, 0o600); err != nil {
		t.Fatal(err)
	}
	s, err := Open(filepath.Join(file, "drafts"), time.Now())
	if err == nil || s != nil {
		t.Fatal("opened a store under a file")
	}
	s.Keep(content{"x"}) // a nil store keeps nothing
	if s.Offers() != nil || !s.Failing() {
		t.Error("a store that keeps nothing offers something")
	}
	s.Close()

	dir := t.TempDir()
	gone := open(t, dir)
	if err := os.RemoveAll(dir); err != nil {
		t.Fatal(err)
	}
	gone.Keep(content{"x"})
	gone.Close()
	if !gone.Failing() {
		t.Error("a write into a folder that has gone did not fail")
	}
}

func TestBrokenDraftsAreNotOffered(t *testing.T) {
	dir := t.TempDir()
	for name, text := range map[string]string{"a": "", "b": "{", "c": `{"version":2,"content":{}}`, "d": "null"} {
		if err := os.WriteFile(filepath.Join(dir, name+suffix), []byte(text), 0o600); err != nil {
			t.Fatal(err)
		}
	}
	s := open(t, dir)
	defer s.Close()
	if offers := s.Offers(); len(offers) != 0 {
		t.Errorf("%d offers of broken drafts", len(offers))
	}
}

func TestDir(t *testing.T) {
	for want, env := range map[string]map[string]string{
		"/x/beckline/drafts":              {"XDG_STATE_HOME": "/x", "HOME": "/h"},
		"/h/.local/state/beckline/drafts": {"XDG_STATE_HOME": "relative", "HOME": "/h"},
		"":                                {},
	} {
		if got := Dir(func(k string) string { return env[k] }); got != filepath.FromSlash(want) {
			t.Errorf("Dir(%v) = %q, want %q", env, got, want)
		}
	}
}

// TestYoungDraftsAreNotCrowdedOut: many short sessions push no draft of this
// week out; of older ones the newest ten stay.
func TestYoungDraftsAreNotCrowdedOut(t *testing.T) {
	dir := t.TempDir()
	s := open(t, dir)
	defer s.Close()
	for age, count := range map[time.Duration]int{time.Hour: 12, 8 * 24 * time.Hour: 3} {
		for n := range count {
			when := time.Now().Add(-age).UTC().Format(time.RFC3339)
			path := filepath.Join(dir, time.Now().Add(-age).Format("20060102")+string(rune('a'+n))+suffix)
			if err := os.WriteFile(path, []byte(`{"version":1,"when":"`+when+`","content":{}}`), 0o600); err != nil {
				t.Fatal(err)
			}
		}
	}
	if n := len(s.Offers()); n != 12 {
		t.Errorf("%d drafts kept, want the 12 of today", n)
	}
}
