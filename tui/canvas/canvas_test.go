package canvas

import (
	"slices"
	"strings"
	"testing"
)

func TestDrawingStaysInside(t *testing.T) {
	c := New(5, 3)
	c.Text(3, 1, "abcdef", Plain)
	c.Text(-2, 0, "xyz", Plain)
	c.Text(0, 3, "below", Plain)
	c.Text(0, -1, "above", Plain)
	c.Right(5, 2, "right", Strong)
	if got := c.Lines(); !slices.Equal(got, []string{"z", "   ab", "right"}) {
		t.Errorf("%q", got)
	}
	c.Cursor(9, 9)
	if c.CursorX != 4 || c.CursorY != 2 || !c.CursorShown {
		t.Errorf("cursor at %d,%d", c.CursorX, c.CursorY)
	}
}

func TestOneCellARune(t *testing.T) {
	c := New(12, 1)
	c.Text(0, 0, "a漢\u0301\x1b\u200b\u202eé°⣀", Plain)
	if got := c.String(); got != "a?????é°⣀" {
		t.Errorf("%q", got)
	}
}

func TestCut(t *testing.T) {
	for _, x := range []struct {
		text  string
		width int
		want  string
	}{{"abcdef", 6, "abcdef"}, {"abcdef", 5, "abcd…"}, {"ab cdef", 4, "ab…"}, {"°°°°", 4, "°°°°"}, {"abc", 0, ""}, {"abc", 1, "…"}} {
		if got := Cut(x.text, x.width); got != x.want {
			t.Errorf("Cut(%q, %d) = %q, want %q", x.text, x.width, got, x.want)
		}
	}
}

func TestWrap(t *testing.T) {
	for _, x := range []struct {
		text  string
		width int
		want  []string
	}{
		{"one two three", 8, []string{"one two", "three"}},
		{"  - indented text that runs on", 16, []string{"  - indented", "    text that", "    runs on"}},
		{"key       does something long", 20, []string{"key       does", "          something", "          long"}},
		{"abcdefghij", 4, []string{"abcd", "efgh", "ij"}},
		{"a   b", 9, []string{"a   b"}},
		{"x\n\ny", 9, []string{"x", "", "y"}},
	} {
		if got := Wrap(x.text, x.width); !slices.Equal(got, x.want) {
			t.Errorf("Wrap(%q, %d) = %q, want %q", x.text, x.width, got, x.want)
		}
	}
	for width := range 30 {
		for _, line := range Wrap(strings.Repeat("some words of various lengthiness ", 5), width) {
			if len(line) > max(width, 1) {
				t.Errorf("%q is wider than %d", line, width)
			}
		}
	}
}

func TestPlainCharacters(t *testing.T) {
	const ours = "─│═▶▸◂→←↑↓·…×−°µ³²■●█▀▄⣀é"
	for _, r := range ours {
		if a := ASCII(r); a > 0x7e || a < ' ' {
			t.Errorf("ASCII(%q) = %q", r, a)
		}
	}
	if Console('█') != '█' || Console('▸') != '>' || Console('⣀') != '?' || Console('°') != '°' {
		t.Error("a text console's characters")
	}
}
