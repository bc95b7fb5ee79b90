package reading

import (
	"strings"
	"unicode"
	"unicode/utf8"
)

// EchoLimit is the longest echo of what was given, in characters.
const EchoLimit = 60

// Clean returns what may be shown of a typed text: control and formatting
// characters are removed (they could move a cursor or reverse the line), odd
// spaces become plain ones, bytes that are no text become '?', and the rest is
// cut at EchoLimit characters, the last three of them dots where something was
// cut off.
func Clean(s string) string {
	var b strings.Builder
	kept := 0
	cutAt := 0 // bytes of b that leave room for the dots
	for _, r := range strings.TrimSpace(s) {
		switch {
		case r == utf8.RuneError:
			r = '?'
		case isSpace(r):
			r = ' '
		case !unicode.IsPrint(r):
			continue
		}
		if kept == EchoLimit {
			return b.String()[:cutAt] + "..."
		}
		if kept == EchoLimit-3 {
			cutAt = b.Len()
		}
		b.WriteRune(r)
		kept++
	}
	return strings.TrimRight(b.String(), " ")
}

// isSpace reports the space characters that people and spreadsheets put into
// numbers: plain, no-break, thin, narrow no-break, figure and their kin. Tabs
// and line ends are control characters, not spaces.
func isSpace(r rune) bool { return unicode.Is(unicode.Zs, r) }

// trim removes spaces at both ends.
func trim(s string) string { return strings.TrimFunc(s, isSpace) }

// unprintable reports a control or formatting character, or bytes that are not
// text.
func unprintable(s string) bool {
	if !utf8.ValidString(s) {
		return true
	}
	return strings.ContainsFunc(s, func(r rune) bool {
		return !unicode.IsPrint(r) && !isSpace(r)
	})
}
