package site

import (
	"fmt"
	"math"
	"regexp"
	"strconv"
	"strings"
	"time"

	"beckline/dosing"
	"beckline/dosing/reading"
)

// loader is the work on one file.
type loader struct {
	path string
	site *Site
	errs Errors
}

func (l *loader) fail(n *node, code, given, accepted string) {
	l.errs = append(l.errs, &Error{Code: code, Path: l.path, Line: n.line, Key: reading.Clean(n.path), Given: given, Accepted: accepted})
}

// row notes a value that holds, and where it stands.
func (l *loader) row(n *node, value string) {
	l.site.rows = append(l.site.rows, Row{Key: n.path, Value: value, From: fmt.Sprintf("line %d", n.line), Line: n.line})
}

// kind says what a TOML value is, for a person.
func kind(v any) string {
	switch v := v.(type) {
	case nil:
		return "a table"
	case string:
		return fmt.Sprintf("%q", reading.Clean(v))
	case bool:
		return strconv.FormatBool(v)
	case int64, float64:
		return numberText(v)
	case time.Time:
		return "a date"
	case []any:
		return fmt.Sprintf("a list of %d", len(v))
	}
	return "a list of tables"
}

// numberText writes a TOML number as a person would type it; "" for what is none.
func numberText(v any) string {
	switch v := v.(type) {
	case int64:
		return strconv.FormatInt(v, 10)
	case float64:
		return strconv.FormatFloat(v, 'f', -1, 64)
	}
	return ""
}

// text is a title or the like: one printable line that is not empty.
func (l *loader) text(n *node) (string, bool) {
	s, ok := n.value.(string)
	if !ok {
		l.fail(n, CodeKind, kind(n.value), "text in quotes")
		return "", false
	}
	clean := reading.Clean(s)
	if clean == "" || clean != strings.TrimSpace(s) {
		l.fail(n, CodeValue, kind(s), "one line of 1 to 60 printable characters")
		return "", false
	}
	l.row(n, clean)
	return clean, true
}

var namePattern = regexp.MustCompile(`^[A-Za-z0-9][A-Za-z0-9_-]{0,39}$`)

const nameForm = "letters, digits and hyphens, up to 40, starting with a letter or digit"

// named checks the name of a table such as [pumps.P2].
func (l *loader) named(n *node) bool {
	if !namePattern.MatchString(n.key) {
		l.fail(n, CodeName, fmt.Sprintf("%q", reading.Clean(n.key)), nameForm)
		return false
	}
	return l.isTable(n)
}

func (l *loader) isTable(n *node) bool {
	if n.isTable() {
		return true
	}
	l.fail(n, CodeKind, kind(n.value), "a table of keys")
	return false
}

// typedText is a number or a text of one, as it would be typed.
func (l *loader) typedText(n *node, v any, accepted string) (string, bool) {
	if s, ok := v.(string); ok {
		return s, true
	}
	if s := numberText(v); s != "" {
		return s, true
	}
	l.fail(n, CodeKind, kind(v), accepted)
	return "", false
}

// field reads a value of a reading's kind: a number in its bare unit, or a text
// with a unit.
func (l *loader) field(n *node, f reading.Field, v any) (text string, si float64, ok bool) {
	text, ok = l.typedText(n, v, f.Accepted())
	if !ok {
		return "", 0, false
	}
	value, err := f.Parse(text)
	if err != nil {
		l.badReading(n, err)
		return "", 0, false
	}
	return value.Given, value.SI, true
}

func (l *loader) badReading(n *node, err error) {
	e, ok := err.(*reading.Error)
	if !ok {
		l.fail(n, CodeValue, reading.Clean(err.Error()), "")
		return
	}
	l.fail(n, CodeValue, fmt.Sprintf("%q %s", e.Given, reading.Reason(e.Code)), e.Accepted)
}

// withUnit writes a field's value as shown, with the bare unit.
func withUnit(f reading.Field, si float64) string {
	return strings.TrimSpace(f.Show(si) + " " + f.Bare)
}

// band reads [low, high], or a table with min, max or both.
func (l *loader) band(n *node, f reading.Field) (Band, bool) {
	const form = "two values, [low, high], or { min = ... }, { max = ... } or both"
	b := Band{Line: n.line}
	before := len(l.errs)
	end := func(at *node, v any, to *dosing.Optional) {
		if _, si, ok := l.field(at, f, v); ok {
			*to = dosing.Some(si)
		}
	}
	switch v := n.value.(type) {
	case nil:
		l.table(n, []key{
			{"min", func(c *node) { end(c, c.value, &b.Low) }},
			{"max", func(c *node) { end(c, c.value, &b.High) }},
		})
		if len(n.table) == 0 {
			l.fail(n, CodeBand, "an empty band", form)
		}
	case []any:
		if len(v) != 2 {
			l.fail(n, CodeBand, kind(v), form)
			return b, false
		}
		end(n, v[0], &b.Low)
		end(n, v[1], &b.High)
	default:
		l.fail(n, CodeKind, kind(v), form)
	}
	if len(l.errs) > before {
		return b, false
	}
	if b.Low.Given && b.High.Given && b.Low.Value > b.High.Value {
		l.fail(n, CodeBand, withUnit(f, b.Low.Value)+" to "+withUnit(f, b.High.Value), "the low end first")
		return b, false
	}
	l.row(n, b.text(f))
	return b, true
}

// text writes a band in the field's bare unit.
func (b Band) text(f reading.Field) string {
	var s string
	switch {
	case b.Low.Given && b.High.Given:
		s = f.Show(b.Low.Value) + " to " + f.Show(b.High.Value)
	case b.Low.Given:
		s = "at least " + f.Show(b.Low.Value)
	default:
		s = "at most " + f.Show(b.High.Value)
	}
	return strings.TrimSpace(s + " " + f.Bare)
}

// tolerance reads a distance in the field's unit, or a percentage of the reading.
func (l *loader) tolerance(n *node, f reading.Field) (Tolerance, bool) {
	accepted := "above 0: a number"
	if f.Bare != "" {
		accepted += " in " + f.Bare
	}
	accepted += `, or a share such as "2 %"`
	text, ok := l.typedText(n, n.value, accepted)
	if !ok {
		return Tolerance{}, false
	}
	number, unit := splitUnit(text)
	v, err := reading.Number(number)
	if err != nil || !(v > 0) || math.IsInf(v, 0) {
		l.fail(n, CodeValue, kind(text), accepted)
		return Tolerance{}, false
	}
	var t Tolerance
	switch {
	case unit == "%":
		if v > 100 {
			l.fail(n, CodeValue, kind(text), accepted)
			return t, false
		}
		t.Relative = v / 100
	case unit == "":
		t.Absolute = f.FromBare(v) - f.FromBare(0)
	default:
		high, known := f.From(unit, v)
		low, _ := f.From(unit, 0)
		if !known {
			l.fail(n, CodeValue, kind(text)+" has a unit that is not known here", accepted)
			return t, false
		}
		t.Absolute = high - low
	}
	l.row(n, reading.Clean(strings.TrimSpace(text+" "+bareUnlessGiven(unit, f))))
	return t, true
}

func bareUnlessGiven(unit string, f reading.Field) string {
	if unit != "" {
		return ""
	}
	return f.Bare
}

// date reads a TOML date, or a text of one, as YYYY-MM-DD.
func (l *loader) date(n *node) (string, bool) {
	const form = "a date such as 2026-11-03"
	switch v := n.value.(type) {
	case time.Time:
		s := v.Format(time.DateOnly)
		l.row(n, s)
		return s, true
	case string:
		if _, err := time.Parse(time.DateOnly, v); err == nil {
			l.row(n, v)
			return v, true
		}
	}
	l.fail(n, CodeValue, kind(n.value), form)
	return "", false
}
