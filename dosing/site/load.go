package site

import (
	"errors"
	"io"
	"io/fs"
	"os"

	"beckline/dosing/reading"
)

// Load reads a plant file. The error is Errors: all that is wrong with it.
func Load(path string) (*Site, error) {
	f, err := os.Open(path)
	if err != nil {
		return nil, unreadable(path, err)
	}
	defer f.Close()
	data, err := io.ReadAll(io.LimitReader(f, mostBytes+1))
	if err != nil {
		return nil, unreadable(path, err)
	}
	return Parse(path, data)
}

func unreadable(path string, err error) Errors {
	e := &Error{Code: CodeUnreadable, Path: reading.Clean(path), Given: "cannot be read", Accepted: "a plant file; beckline site new writes one"}
	switch {
	case errors.Is(err, fs.ErrNotExist):
		e.Given = "there is no such file"
	case errors.Is(err, fs.ErrPermission):
		e.Given, e.Accepted = "may not be read", "a file that you have permission to read"
	}
	return Errors{e}
}

// Parse reads a plant file from memory; path is the name by which errors call
// it. The error is Errors, sorted by line.
func Parse(path string, data []byte) (*Site, error) {
	path = reading.Clean(path)
	root, err := decode(path, data)
	if err != nil {
		var e *Error
		if !errors.As(err, &e) {
			e = &Error{Code: CodeSyntax, Path: path, Given: reading.Clean(err.Error())}
		}
		return nil, Errors{e}
	}
	l := &loader{path: path, site: &Site{Path: path, Units: Units{System: SI}}}
	l.root(root)
	if len(l.errs) > 0 {
		l.errs.sort()
		return nil, l.errs
	}
	return l.site, nil
}
