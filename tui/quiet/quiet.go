// Package quiet keeps the binary from asking the terminal questions.
//
// The terminal library asks for the background colour when it is initialised
// and waits up to five seconds for an answer, in every command. A serial
// console never answers, and what is typed meanwhile is lost. Giving the
// answers first makes the question unnecessary.
//
// It works only if this package is initialised before that library. Packages
// whose imports are ready are initialised in the order of their import paths,
// so this one must import nothing but what the library itself needs, and its
// path must sort first. A test of the first frame on a mute terminal guards it.
package quiet

import (
	"github.com/charmbracelet/lipgloss"
	"github.com/muesli/termenv"
)

func init() {
	lipgloss.SetHasDarkBackground(true)
	lipgloss.SetColorProfile(termenv.ANSI)
}
