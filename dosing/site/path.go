package site

import (
	"cmp"
	"errors"
	"io/fs"
	"os"
	"path/filepath"

	"beckline/dosing/reading"
)

// DefaultPath is where the plant file is looked for unless told: beckline/site.toml
// in $XDG_CONFIG_HOME where that is an absolute path (XDG base directory
// specification), else in the system's own place for settings. It is "" where
// there is no such place.
func DefaultPath() string {
	if dir := os.Getenv("XDG_CONFIG_HOME"); filepath.IsAbs(dir) {
		return filepath.Join(dir, "beckline", "site.toml")
	}
	dir, err := os.UserConfigDir()
	if err != nil {
		return ""
	}
	return filepath.Join(dir, "beckline", "site.toml")
}

// Open loads the file that a flag names, or the one at DefaultPath. Without a
// flag a missing file is no mistake: the site is nil. The error is Errors.
func Open(flag string) (*Site, error) {
	if flag != "" {
		return Load(flag)
	}
	path := DefaultPath()
	if path == "" {
		return nil, nil
	}
	if _, err := os.Stat(path); errors.Is(err, fs.ErrNotExist) {
		return nil, nil
	}
	return Load(path)
}

// Create writes the template to a new file, at DefaultPath where path is "", with
// the folders above it, and returns the path. It never replaces a file. The error
// is Errors.
func Create(path string) (string, error) {
	path = cmp.Or(path, DefaultPath())
	refuse := func(given, accepted string) (string, error) {
		return "", Errors{{Code: CodeUnreadable, Path: reading.Clean(path), Given: given, Accepted: accepted}}
	}
	if path == "" {
		return refuse("there is no place for settings here", "a path for the file")
	}
	if err := os.MkdirAll(filepath.Dir(path), 0o755); err != nil {
		return refuse("its folder cannot be made", "a path in a folder that you may write to")
	}
	f, err := os.OpenFile(path, os.O_WRONLY|os.O_CREATE|os.O_EXCL, 0o644)
	if errors.Is(err, fs.ErrExist) {
		return refuse("there is such a file already", "another path, or move that file away first")
	}
	if err != nil {
		return refuse("cannot be written", "a path in a folder that you may write to")
	}
	_, err = f.WriteString(Template())
	if closed := f.Close(); err == nil {
		err = closed
	}
	if err != nil {
		os.Remove(path) // half a file would be read as a plant
		return refuse("could not be written whole", "a disk with room")
	}
	return path, nil
}
