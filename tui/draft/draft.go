// Package draft keeps what a person has typed on disk, so that a dropped
// connection or a killed program loses no more than the key being handled.
//
// Every session writes a file of its own. A session that is alive holds a lock
// on a second file; a draft without a living session is on offer.
package draft

import (
	"encoding/json"
	"errors"
	"fmt"
	"os"
	"path/filepath"
	"sort"
	"strings"
	"sync"
	"time"
)

const (
	suffix = ".draft.json"
	// keepNewest drafts of ended sessions are kept however old they are.
	keepNewest = 10
	// keepAge is how long every draft is kept.
	keepAge = 7 * 24 * time.Hour
)

// Store keeps the draft of one session. All methods may be called on a nil
// Store, which keeps nothing: a disk that cannot be written does no harm.
type Store struct {
	dir, path string
	release   func()

	mu     sync.Mutex
	next   []byte
	last   string
	idle   chan struct{} // closed when the writer has nothing left to do
	slow   bool          // the disk has kept us waiting
	failed bool
}

// patience is how long a key may wait for the draft of the key before it. A
// disk that takes longer is not waited for again until it has caught up.
const patience = 250 * time.Millisecond

// Saved is a draft of a session that has ended.
type Saved struct {
	When time.Time
	Path string
}

// record is the form on disk.
type record struct {
	Version int             `json:"version"`
	When    time.Time       `json:"when"`
	Content json.RawMessage `json:"content"`
}

// Dir returns the folder for drafts: under the state folder of the person
// ($XDG_STATE_HOME, else ~/.local/state), or "" where there is none.
func Dir(env func(string) string) string {
	if base := env("XDG_STATE_HOME"); filepath.IsAbs(base) {
		return filepath.Join(base, "beckline", "drafts")
	}
	if base := env("LOCALAPPDATA"); base != "" {
		return filepath.Join(base, "beckline", "drafts")
	}
	if home := env("HOME"); home != "" {
		return filepath.Join(home, ".local", "state", "beckline", "drafts")
	}
	return ""
}

// Open starts a session's store in dir. The error says why nothing will be
// kept; the Store is then nil.
func Open(dir string, now time.Time) (*Store, error) {
	if dir == "" {
		return nil, errors.New("no folder for drafts: neither XDG_STATE_HOME nor HOME is set")
	}
	if err := os.MkdirAll(dir, 0o700); err != nil {
		return nil, err
	}
	s := &Store{dir: dir}
	for n := 0; ; n++ {
		id := fmt.Sprintf("%s-%d-%d", now.UTC().Format("20060102T150405.000"), os.Getpid(), n)
		s.path = filepath.Join(dir, id+suffix)
		if _, err := os.Lstat(s.path); err == nil {
			continue // somebody's draft
		}
		release, err := lock(filepath.Join(dir, id+".lock"))
		if err == nil {
			s.release = release
			break
		}
		if n == 9 {
			return nil, err
		}
	}
	s.idle = make(chan struct{})
	close(s.idle)
	return s, nil
}

// Keep writes content without making the caller wait for the disk, but not
// before what was kept last is down: so what is on the screen is at most one key
// ahead of what is on the disk. On a disk that is too slow for that, the newest
// is written when it can be.
func (s *Store) Keep(content any) {
	if s == nil {
		return
	}
	data, err := json.Marshal(content)
	if err != nil {
		return
	}
	s.mu.Lock()
	defer s.mu.Unlock()
	if string(data) == s.last {
		return
	}
	if s.writing() && !s.slow {
		idle := s.idle
		s.mu.Unlock()
		select {
		case <-idle:
		case <-time.After(patience):
		}
		s.mu.Lock()
		s.slow = s.writing()
	}
	s.last, s.next = string(data), data
	if !s.writing() {
		s.idle = make(chan struct{})
		go s.write()
	}
}

// writing reports whether the writer is at work. The caller holds the lock.
func (s *Store) writing() bool {
	select {
	case <-s.idle:
		return false
	default:
		return true
	}
}

// write puts down what is newest until there is nothing newer.
func (s *Store) write() {
	for {
		s.mu.Lock()
		data := s.next
		s.next = nil
		if data == nil {
			s.slow = false
			close(s.idle)
			s.mu.Unlock()
			return
		}
		s.mu.Unlock()
		err := replace(s.path, data)
		s.mu.Lock()
		s.failed = err != nil
		s.mu.Unlock()
	}
}

// replace writes the file beside and renames it, so that a reader sees the old
// draft or the new one and nothing between.
func replace(path string, content []byte) (err error) {
	defer func() { // a fault here must not end the program that the draft is for
		if r := recover(); r != nil {
			err = fmt.Errorf("draft: %v", r)
		}
	}()
	data, err := json.Marshal(record{Version: 1, When: time.Now().UTC(), Content: content})
	if err != nil {
		return err
	}
	beside := path + ".new"
	if err := os.WriteFile(beside, append(data, '\n'), 0o600); err != nil {
		return err
	}
	return os.Rename(beside, path)
}

// Failing reports whether the last write failed.
func (s *Store) Failing() bool {
	if s == nil {
		return true
	}
	s.mu.Lock()
	defer s.mu.Unlock()
	return s.failed
}

// Close waits for the last write and ends the session; its draft stays.
func (s *Store) Close() {
	if s == nil {
		return
	}
	s.mu.Lock()
	idle := s.idle
	s.mu.Unlock()
	select {
	case <-idle:
	case <-time.After(4 * patience):
	}
	s.release()
}

// Offers lists the drafts of ended sessions, newest first, and removes those
// that are too many and too old.
func (s *Store) Offers() []Saved {
	if s == nil {
		return nil
	}
	names, err := filepath.Glob(filepath.Join(s.dir, "*"+suffix))
	if err != nil {
		return nil
	}
	var out []Saved
	for _, path := range names {
		lockPath := strings.TrimSuffix(path, suffix) + ".lock"
		if path == s.path || alive(lockPath) {
			continue
		}
		r, err := read(path)
		if err != nil {
			continue
		}
		out = append(out, Saved{When: r.When, Path: path})
	}
	sort.Slice(out, func(i, j int) bool { return out[i].When.After(out[j].When) })
	for len(out) > keepNewest && time.Since(out[len(out)-1].When) > keepAge {
		out[len(out)-1].Remove()
		out = out[:len(out)-1]
	}
	return out
}

func read(path string) (record, error) {
	data, err := os.ReadFile(path)
	if err != nil {
		return record{}, err
	}
	var r record
	if err := json.Unmarshal(data, &r); err != nil {
		return record{}, err
	}
	if r.Version != 1 {
		return record{}, fmt.Errorf("draft of another version of the program (%d)", r.Version)
	}
	return r, nil
}

// Load reads the draft's content into v.
func (d Saved) Load(v any) error {
	r, err := read(d.Path)
	if err != nil {
		return err
	}
	return json.Unmarshal(r.Content, v)
}

// Remove deletes the draft.
func (d Saved) Remove() {
	_ = os.Remove(d.Path)
	_ = os.Remove(strings.TrimSuffix(d.Path, suffix) + ".lock")
}
