package report

import "strings"

// Figure is one named figure of an answer.
type Figure struct {
	Key    string // JSON key; CSV column after raw_ or finished_ for a water
	Label  string // a few words for people
	Unit   string // unit text, "" where the figure has none
	Value  Number // in Unit; unused where IsText
	Text   string // for figures that are words
	IsText bool
	truth  *bool // for yes and no: Text says it to people, programs get a boolean
	shown  rounding
}

// rounding says how a figure is written for people.
type rounding struct {
	decimals    int // at most so many decimals
	significant int // and so many significant digits; 0: decimals alone
	signed      bool
	never0      bool // a value that would be rounded to zero keeps one digit
}

// Full is the figure for programs: 15 significant digits, "" where there is none.
func (f Figure) Full() string {
	switch {
	case f.IsText:
		return f.Text
	case !f.Value.Given:
		return ""
	}
	return Full(f.Value.Value)
}

// Show is the figure for people, rounded to what the readings support, without
// its unit; "-" where there is none.
func (f Figure) Show() string {
	switch {
	case f.IsText && f.Text != "":
		return f.Text
	case f.IsText || !f.Value.Given:
		return "-"
	}
	return f.shown.write(f.Value.Value)
}

// ShowUnit is Show followed by the unit, and "-" alone where there is no figure.
func (f Figure) ShowUnit() string {
	s := f.Show()
	if s == "-" || f.Unit == "" {
		return s
	}
	return s + " " + f.Unit
}

func (r rounding) write(v float64) string {
	s := Fixed(v, r.decimals)
	if r.significant > 0 {
		if short := Significant(v, r.significant); len(short) < len(s) {
			s = short
		}
	}
	if r.never0 && v != 0 && isZero(strings.TrimPrefix(s, "-")) {
		s = Significant(v, 1)
	}
	if r.signed && v > 0 && s[0] != '-' && !isZero(s) {
		s = "+" + s
	}
	return s
}

func isZero(s string) bool {
	for _, c := range s {
		if c != '0' && c != '.' {
			return false
		}
	}
	return true
}

// find returns the figure with a key; the zero Figure where there is none.
func find(figures []Figure, key string) Figure {
	for _, f := range figures {
		if f.Key == key {
			return f
		}
	}
	return Figure{}
}
