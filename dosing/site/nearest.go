package site

import (
	"strings"

	"beckline/dosing/entry"
)

// offer names what may have been meant, of the names that there are.
func offer(wanted string, names []string) string {
	return orList(entry.Nearest(wanted, names, 3))
}

// orList joins names as a sentence does: a, b or c.
func orList(names []string) string {
	if len(names) < 2 {
		return strings.Join(names, "")
	}
	last := len(names) - 1
	return strings.Join(names[:last], ", ") + " or " + names[last]
}
