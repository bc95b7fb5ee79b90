package tui

import (
	"runtime"
	"strings"

	"beckline/tui/canvas"
	"beckline/tui/painter"
)

// glyphs is how much of Unicode the terminal can be trusted with.
type glyphs int

const (
	asciiGlyphs   glyphs = iota // nothing but ASCII
	consoleGlyphs               // the characters of a text console's font: lines and blocks
	fullGlyphs                  // arrows, rounded things and braille too
)

// look is what the terminal can show.
type look struct {
	glyphs     glyphs
	colour     bool
	attributes bool // bold and reverse
	linear     bool // no cursor addressing, or a reader who wants none: lines in order
}

// lookOf reads the terminal's abilities from the environment. Nothing is asked
// of the terminal: it may not answer.
func lookOf(env func(string) string) look {
	t := env("TERM")
	l := look{glyphs: fullGlyphs, colour: true, attributes: true}
	locale := env("LC_ALL")
	if locale == "" {
		locale = env("LC_CTYPE")
	}
	if locale == "" {
		locale = env("LANG")
	}
	locale = strings.ToLower(locale)
	switch {
	case runtime.GOOS == "windows":
		l.glyphs = consoleGlyphs
	case !strings.Contains(locale, "utf-8") && !strings.Contains(locale, "utf8"):
		l.glyphs = asciiGlyphs
	case t == "linux":
		l.glyphs = consoleGlyphs
	}
	switch {
	case strings.HasPrefix(t, "vt1") || strings.HasPrefix(t, "vt2"):
		l.glyphs, l.colour = asciiGlyphs, false
	case t == "dumb" || t == "" && runtime.GOOS != "windows":
		l.glyphs, l.colour, l.attributes, l.linear = asciiGlyphs, false, false, true
	}
	if env("NO_COLOR") != "" {
		l.colour = false
	}
	return l
}

// limit replaces what the terminal's characters lack.
func (l look) limit(c *canvas.Canvas) {
	switch l.glyphs {
	case asciiGlyphs:
		c.Close('°') // a degree sign that becomes a blank leaves two of them
		c.Map(canvas.ASCII)
	case consoleGlyphs:
		c.Map(canvas.Console)
	}
}

// attributesOf lists the attribute sequences of the roles: the terminal's own
// sixteen colours, so that its dark or light theme decides how they look, and
// never a background of ours.
func (l look) attributesOf() painter.Attributes {
	var a painter.Attributes
	if !l.attributes {
		return a
	}
	a[canvas.Strong], a[canvas.Answer] = "1", "1"
	a[canvas.Notice], a[canvas.Alarm] = "1", "7"
	if l.colour {
		a[canvas.Notice] = "33"
		a[canvas.Alarm] = "7;31"
		a[canvas.Good] = "36"
	}
	return a
}
