package tui

import (
	"strings"
	"unicode"

	"beckline/dosing/reading"
)

// units is a habit of units. It decides how values are shown and what a bare
// number means; what was typed is kept as typed, so that switching to and fro
// loses nothing.
type units string

// The habits. US plants often keep degrees Celsius and mg/L beside US flows and
// feeds: that is the mixed one.
const (
	unitsSI    units = ""
	unitsUS    units = "us"
	unitsMixed units = "mixed"
)

var unitNames = map[units]string{
	unitsSI: "SI: °C, m³/h, L/h", unitsUS: "US: °F, MGD, gal/h", unitsMixed: "mixed: °C, MGD, gal/h",
}

var nextUnits = map[units]units{unitsSI: unitsUS, unitsUS: unitsMixed, unitsMixed: unitsSI}

// otherUnits are the units of the habits where they are not the bare ones, by
// field.
var otherUnits = map[units]map[string]string{
	unitsUS: {"temperature": "°F", "ph-temperature": "°F", "product-temperature": "°F",
		"flow": "MGD (US)", "pump": "gal/h (US)"},
	unitsMixed: {"flow": "MGD (US)", "pump": "gal/h (US)"},
}

// of is the unit of a field, by its full name.
func (u units) of(f reading.Field) string {
	if name, ok := otherUnits[u][f.Name]; ok {
		return name
	}
	return f.Units()[0]
}

// label is the unit as it stands beside a value.
func (u units) label(p place) string {
	if name, ok := otherUnits[u][p.field.Name]; ok && p.kind == numberPlace && !p.plainText() {
		return shortUnit(name)
	}
	return shortUnit(p.unit)
}

// complete writes the unit behind a bare number where the habit's is not the
// one that a bare number has.
func (u units) complete(p place, text string) string {
	if p.kind != numberPlace || p.plainText() || text == "" || hasUnit(text) {
		return text
	}
	if name, ok := otherUnits[u][p.field.Name]; ok {
		return text + " " + name
	}
	return text
}

// shown is what stands in a place's value column: what was typed where it is in
// the habit's unit, else the value in that unit. ok is false where the text
// cannot be read; it is then shown as typed.
func (s sheet) shown(p place) (text string, ok bool) {
	text = s.text(p)
	if p.kind != numberPlace || p.plainText() || text == "" {
		return text, text != "" && !hasUnit(text)
	}
	v, err := p.field.Parse(text)
	if err != nil {
		return text, !hasUnit(text)
	}
	want := s.Units.of(p.field)
	if v.Unit == want {
		return numberPart(text), true
	}
	if converted, ok := p.field.ShowIn(want, v.SI); ok {
		return converted, true
	}
	return text, false
}

// plainText tells whether a place's number has no field, so that only its own
// unit is known.
func (p place) plainText() bool { return p.add >= 0 || p.name == mostUse }

// numberPart is a typed value without its unit.
func numberPart(text string) string {
	r := []rune(text)
	for i, c := range r {
		exponent := (c == 'e' || c == 'E') && i > 0 && unicode.IsDigit(r[i-1]) && i+1 < len(r) && strings.ContainsRune("+-−0123456789", r[i+1])
		if !exponent && (unicode.IsLetter(c) || strings.ContainsRune("°˚º℃℉%", c)) {
			return strings.TrimSpace(string(r[:i]))
		}
	}
	return text
}

// hasUnit reports whether a typed text names its own unit.
func hasUnit(text string) bool { return numberPart(text) != text }

// shortUnit leaves words out of a unit so that it fits beside a value.
func shortUnit(unit string) string {
	return strings.TrimSuffix(strings.Replace(unit, " as ", " ", 1), " (US)")
}

// understood says how a value with a unit of its own was read, "" where that
// is plain.
func (s sheet) understood(p place) string {
	text := s.text(p)
	if p.kind != numberPlace || p.plainText() || !hasUnit(text) {
		return ""
	}
	shown, ok := s.shown(p)
	if v, err := p.field.Parse(text); err != nil || !ok || v.Unit == s.Units.of(p.field) {
		return ""
	}
	return p.label + ": " + text + " = " + shown + " " + s.Units.label(p)
}

// switchUnits goes on to the next habit.
func (m *Model) switchUnits() {
	s := m.sheet.clone()
	s.Units = nextUnits[s.Units]
	m.change(s)
	m.note = "units " + unitNames[m.sheet.Units]
}
