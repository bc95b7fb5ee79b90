package site

import (
	"math"
	"regexp"
	"strings"

	"beckline/dosing/reading"
)

// quantity is what a plant file states and no reading does.
type quantity struct {
	units    []quantityUnit // the bare one first
	low, top float64        // accepted, SI; low itself only where openLow is false
	openLow  bool
	accepted string
}

type quantityUnit struct {
	names  []string
	factor float64 // SI = number * factor
}

// Exact by definition (NIST SP 811, from memory).
const (
	usGallon       = 3.785411784e-3 // m3
	imperialGallon = 4.54609e-3     // m3
	cubicFoot      = 0.3048 * 0.3048 * 0.3048
	pound          = 0.45359237 // kg
)

// The bounds are common practice, no source: what a slip of the pen passes.
var (
	volume = quantity{
		units: []quantityUnit{
			{[]string{"m3", "m³"}, 1},
			{[]string{"L", "l", "litres", "liters"}, 1e-3},
			{[]string{"ML"}, 1e3},
			{[]string{"gal", "gal (US)", "US gal"}, usGallon},
			{[]string{"imperial gal", "imp gal"}, imperialGallon},
			{[]string{"MG", "MG (US)"}, 1e6 * usGallon},
			{[]string{"ft3", "ft³"}, cubicFoot},
		},
		low: 0, openLow: true, top: 1e7,
		accepted: "above 0 to 10000000 m3, or with L, gal, imperial gal, ft3 or ML",
	}
	density = quantity{
		units: []quantityUnit{
			{[]string{"kg/m3", "kg/m³", "g/L"}, 1},
			{[]string{"kg/L", "g/cm3", "g/cm³", "g/mL", "SG"}, 1000},
			{[]string{"lb/gal", "lb/gal (US)"}, pound / usGallon},
			{[]string{"lb/ft3"}, pound / cubicFoot},
		},
		low: 900, top: 2000,
		accepted: "900 to 2000 kg/m3, or with kg/L, g/mL, lb/gal or SG",
	}
	price = quantity{
		units: []quantityUnit{
			{[]string{"per kg", "/kg"}, 1},
			{[]string{"per t", "/t", "per tonne"}, 1e-3},
			{[]string{"per lb", "/lb"}, 1 / pound},
			{[]string{"per short ton", "/short ton"}, 1 / (2000 * pound)},
		},
		low: 0, top: 1e6,
		accepted: "0 or more per kg as delivered, or with /t, /lb or /short ton",
	}
	useLevel = quantity{
		units: []quantityUnit{
			{[]string{"mg/L", "mg/l", "ppm", "g/m3"}, 1e-3},
			{[]string{"kg/m3", "g/L"}, 1},
		},
		low: 0, openLow: true, top: 10,
		accepted: "above 0 to 10000 mg/L of product",
	}
	share = quantity{
		units: []quantityUnit{{[]string{"%"}, 0.01}},
		low:   0, openLow: true, top: 1,
		accepted: "above 0 to 100 %",
	}
	phStep = quantity{
		units: []quantityUnit{{[]string{"pH"}, 1}},
		low:   0, openLow: true, top: 5,
		accepted: "above 0 to 5 pH",
	}
	parts = quantity{
		units: []quantityUnit{{[]string{"parts", "part", "%"}, 1}},
		low:   0, openLow: true, top: 1e6,
		accepted: "a part above 0",
	}
	ratio = quantity{
		units:    []quantityUnit{{[]string{""}, 1}},
		low:      0,
		top:      1e4,
		accepted: "0 to 10000",
	}
)

var numberAndUnit = regexp.MustCompile(`^((?:[^\pL%°/]*\d[eE][-+\x{2212}]?\d+)|[^\pL%°/]*)(.*)$`)

// splitUnit parts "240 L" into "240" and "L".
func splitUnit(text string) (number, unit string) {
	text = strings.TrimSpace(text)
	m := numberAndUnit.FindStringSubmatch(text)
	if m == nil {
		return text, ""
	}
	return strings.TrimSpace(m[1]), strings.TrimSpace(m[2])
}

// quantity reads a number in the bare unit, or a text with a unit, to SI.
func (l *loader) quantity(n *node, q *quantity) (float64, bool) {
	text, ok := l.typedText(n, n.value, q.accepted)
	if !ok {
		return 0, false
	}
	si, ok := q.parse(text)
	if !ok {
		l.fail(n, CodeValue, kind(n.value), q.accepted)
		return 0, false
	}
	l.row(n, q.shown(text))
	return si, true
}

func (q *quantity) parse(text string) (float64, bool) {
	number, unit := splitUnit(text)
	v, err := reading.Number(number)
	if err != nil || math.IsNaN(v) {
		return 0, false
	}
	factor, ok := q.units[0].factor, unit == ""
	for _, u := range q.units {
		for _, name := range u.names {
			if unit == name {
				factor, ok = u.factor, true
			}
		}
	}
	si := v * factor
	inside := si >= q.low*(1-1e-12) && si <= q.top*(1+1e-12) && !(q.openLow && si <= q.low)
	return si, ok && inside
}

// shown adds the bare unit where none was typed.
func (q *quantity) shown(text string) string {
	text = reading.Clean(text)
	if _, unit := splitUnit(text); unit == "" {
		return strings.TrimSpace(text + " " + q.units[0].names[0])
	}
	return text
}
