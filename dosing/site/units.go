package site

import (
	"fmt"
	"slices"

	"beckline/dosing/reading"
)

// System is a set of units to show.
type System string

// The systems. Mixed is US flows and feeds with degrees Celsius, the habit of
// many laboratories (common practice, no source).
const (
	SI    System = "SI"
	US    System = "US"
	Mixed System = "mixed"
)

// systemUnits are the units of a system where they are not the bare ones.
var systemUnits = map[System]map[string]string{
	SI:    {},
	US:    {"flow": "MGD (US)", "pump": "gal/h (US)", "temperature": "°F", "ph-temperature": "°F", "product-temperature": "°F"},
	Mixed: {"flow": "MGD (US)", "pump": "gal/h (US)"},
}

// follows names the field whose unit another takes unless it has its own.
var follows = map[string]string{
	"ph-temperature": "temperature", "product-temperature": "temperature",
	"target-alkalinity": "alkalinity", "calcium-hardness": "hardness",
}

// Units are the units in which a plant is shown. Its zero value is SI.
type Units struct {
	System System
	byName map[string]string
}

// For is the unit of a field: one of its Units, "" where it has none.
func (u Units) For(f reading.Field) string {
	for _, name := range []string{f.Name, follows[f.Name]} {
		if unit, ok := u.byName[name]; ok {
			if _, fits := f.In(unit, 0); fits {
				return unit
			}
		}
	}
	if unit, ok := systemUnits[u.System][f.Name]; ok {
		return unit
	}
	return f.Bare
}

func (l *loader) units(n *node) {
	u := &l.site.Units
	u.byName = map[string]string{}
	keys := []key{{"system", func(c *node) { u.System = System(l.oneOf(c, string(SI), string(US), string(Mixed))) }}}
	for _, f := range reading.Fields() {
		if f.Bare == "" {
			continue // nothing to choose
		}
		keys = append(keys, key{f.Name, func(c *node) {
			text, ok := l.text(c)
			if !ok {
				return
			}
			if _, ok := f.In(text, 0); !ok {
				l.site.rows = l.site.rows[:len(l.site.rows)-1]
				l.fail(c, CodeValue, fmt.Sprintf("%q is not a unit of %s", text, f.Name), orList(slices.Clone(f.Units())))
				return
			}
			u.byName[f.Name] = text
		}})
	}
	l.sub(n, keys)
}
