package site

import (
	"cmp"
	"fmt"
	"slices"
	"strings"

	"beckline/dosing"
)

// The codes of an Error. They are stable: scripts may test for them.
const (
	CodeUnreadable = "plant_file_unreadable" // no such file, no permission
	CodeTooLarge   = "plant_file_too_large"
	CodeSyntax     = "plant_file_syntax"  // not TOML
	CodeUnknownKey = "unknown_key"        // no such key there
	CodeKind       = "wrong_kind"         // a table for a number and the like
	CodeValue      = "bad_value"          // a number, unit, date or word that cannot be used
	CodeReference  = "unknown_name"       // refers to nothing in the file or the catalogue
	CodeMissing    = "missing_key"        // a key that must be there
	CodeBand       = "bad_band"           // a band that is upside down or leaves nothing
	CodeWider      = "wider_than_allowed" // a limit outside the built-in one
	CodeName       = "bad_name"           // a name that cannot be typed on the command line
	CodeNewer      = "newer_format"
	CodeContradict = "contradicting_keys"
)

// Error is one mistake in a plant file.
type Error struct {
	Code     string
	Path     string // of the file
	Line     int    // from 1; 0 where it is about the file as a whole
	Key      string // dotted, as in lines.upland.limits.ph; "" where there is none
	Given    string
	Accepted string
}

// Error is one plain line: file, line, key, what is wrong, what is accepted.
func (e *Error) Error() string {
	var b strings.Builder
	b.WriteString(e.Path)
	if e.Line > 0 {
		fmt.Fprintf(&b, ", line %d", e.Line)
	}
	b.WriteString(": ")
	if e.Key != "" {
		b.WriteString(e.Key + ": ")
	}
	b.WriteString(e.Given)
	if e.Accepted != "" {
		b.WriteString("; accepted: " + e.Accepted)
	}
	return b.String()
}

// Problem is the error as commands report it.
func (e *Error) Problem() *dosing.Problem {
	where := e.Path
	if e.Line > 0 {
		where = fmt.Sprintf("%s, line %d", e.Path, e.Line)
	}
	return &dosing.Problem{Kind: dosing.BadInput, Code: e.Code, Field: cmp.Or(e.Key, "site"),
		Given: where + ": " + e.Given, Accepted: e.Accepted}
}

// Errors are all mistakes of a plant file, by line.
type Errors []*Error

// Error is the first mistake in full and how many more there are.
func (es Errors) Error() string {
	if len(es) == 0 {
		return ""
	}
	text := es[0].Error()
	switch more := len(es) - 1; {
	case more == 1:
		text += " (and 1 more mistake)"
	case more > 1:
		text += fmt.Sprintf(" (and %d more mistakes)", more)
	}
	return text
}

func (es Errors) sort() {
	slices.SortStableFunc(es, func(a, b *Error) int { return cmp.Or(cmp.Compare(a.Line, b.Line), cmp.Compare(a.Key, b.Key)) })
}
