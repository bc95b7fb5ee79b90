package site

import (
	"fmt"

	"beckline/dosing/reading"
)

// FinishedNames are the figures of finished water that a plant file may bound,
// with the reading whose units they take.
var finishedFields = []struct{ name, field string }{
	{"ph", "ph"},
	{"alkalinity", "alkalinity"},
	{"si", "target-si"},
	{"ccpp", "target-ccpp"},
	{"calcium", "calcium"},
	{"sodium", "sodium"},
	{"chloride", "chloride"},
	{"sulfate", "sulfate"},
	{"chloride-sulfate", ""},
	{"larson", ""},
}

// FinishedNames lists the figures of finished water that Line.Finished may
// bound: pH, alkalinity, saturation index, CCPP, ions, and the two ratios
// chloride-sulfate (by mass) and larson.
func FinishedNames() []string {
	var names []string
	for _, f := range finishedFields {
		names = append(names, f.name)
	}
	return names
}

func finishedField(name string) (reading.Field, bool) {
	for _, f := range finishedFields {
		if f.name == name && f.field != "" {
			return reading.Lookup(f.field)
		}
	}
	return reading.Field{}, false
}

func (l *loader) line(n *node) {
	line := &Line{Name: n.key, site: l.site, Readings: map[string]string{}, Targets: map[string]string{},
		Limits: map[string]Band{}, Usual: map[string]Band{}, Finished: map[string]Band{},
		Tolerances: map[string]Tolerance{}, Change: usualChange}
	l.table(n, []key{
		{"plant", func(c *node) { line.Plant, _ = l.text(c) }},
		{"title", func(c *node) { line.Title, _ = l.text(c) }},
		{"source", func(c *node) { l.shares(c, line, n) }},
		{"blend", func(c *node) { l.shares(c, line, n) }},
		{"readings", func(c *node) {
			l.sub(c, l.readings(line.Readings, func(f reading.Field) bool { return f.Group == reading.Reading }))
		}},
		{"product", func(c *node) { line.Product = l.productName(c) }},
		{"pump", func(c *node) { l.linePump(c, line) }},
		{"tanks", func(c *node) { l.lineTanks(c, line) }},
		{"add", func(c *node) { l.additions(c, line) }},
		{"targets", func(c *node) { l.targets(c, line) }},
		{"capacity", func(c *node) { l.flow(c, line) }},
		{"contact-volume", func(c *node) { l.optional(c, &volume, &line.Contact) }},
		{"sensor-volume", func(c *node) { l.optional(c, &volume, &line.Sensor) }},
		{"limits", func(c *node) { l.limits(c, line) }},
		{"usual", func(c *node) { l.usual(c, line) }},
		{"finished", func(c *node) { l.finished(c, line) }},
		{"change", func(c *node) { l.change(c, line) }},
		{"tolerances", func(c *node) { l.tolerances(c, line) }},
	})
	if line.Pump != nil && line.Product != "" && line.Pump.Product != "" && line.Pump.Product != line.Product {
		l.fail(n.child("pump"), CodeContradict, fmt.Sprintf("pump %s feeds %s", line.Pump.Name, line.Pump.Product), "a pump that feeds "+line.Product)
	}
	l.site.Lines = append(l.site.Lines, line)
}

// sub reads a table inside a line.
func (l *loader) sub(n *node, keys []key) {
	if l.isTable(n) {
		l.table(n, keys)
	}
}

// flow reads the most that the works can pass.
func (l *loader) flow(n *node, line *Line) {
	f, ok := reading.Lookup("flow")
	if !ok {
		return
	}
	if _, si, ok := l.field(n, f, n.value); ok {
		line.Capacity.Value, line.Capacity.Given = si, true
		l.row(n, withUnit(f, si))
	}
}

// targets: at most one, and who approved it.
func (l *loader) targets(n *node, line *Line) {
	keys := l.readings(line.Targets, func(f reading.Field) bool { return f.Group == reading.Target })
	keys = append(keys, key{"approved", func(c *node) { line.Approved, _ = l.text(c) }})
	l.sub(n, keys)
	if len(line.Targets) > 1 {
		l.fail(n, CodeContradict, fmt.Sprintf("%d targets", len(line.Targets)), "one target at a time")
	}
}

// bands reads a table of bands of readings.
func (l *loader) bands(n *node, to map[string]Band, fits func(*node, reading.Field, Band) bool) {
	var keys []key
	for _, f := range reading.Fields() {
		if f.Group == reading.Reading {
			keys = append(keys, key{f.Name, func(c *node) {
				if b, ok := l.band(c, f); ok && fits(c, f, b) {
					to[f.Name] = b
				}
			}})
		}
	}
	l.sub(n, keys)
}

// limits only narrow what is built in; field has refused values outside of that.
func (l *loader) limits(n *node, line *Line) {
	l.bands(n, line.Limits, func(c *node, f reading.Field, b Band) bool {
		if b.Low.Given && b.High.Given && b.Low.Value == b.High.Value {
			l.fail(c, CodeBand, b.text(f), "a band that leaves room for a reading")
			return false
		}
		return true
	})
}

// usual bands lie within the line's own limits.
func (l *loader) usual(n *node, line *Line) {
	l.bands(n, line.Usual, func(c *node, f reading.Field, b Band) bool {
		limit, ok := line.Limits[f.Name]
		if !ok {
			return true
		}
		for _, end := range []struct {
			given bool
			value float64
		}{{b.Low.Given, b.Low.Value}, {b.High.Given, b.High.Value}} {
			if end.given && !limit.Holds(end.value) {
				l.fail(c, CodeWider, b.text(f), fmt.Sprintf("within the line's limits, %s (line %d)", limit.text(f), limit.Line))
				return false
			}
		}
		return true
	})
}

func (l *loader) finished(n *node, line *Line) {
	var keys []key
	for _, name := range FinishedNames() {
		keys = append(keys, key{name, func(c *node) {
			b, ok := l.finishedBand(c, name)
			if ok {
				line.Finished[name] = b
			}
		}})
	}
	l.sub(n, keys)
}

func (l *loader) finishedBand(n *node, name string) (Band, bool) {
	if f, ok := finishedField(name); ok {
		return l.band(n, f)
	}
	return l.ratioBand(n)
}

func (l *loader) change(n *node, line *Line) {
	l.sub(n, []key{
		{"ph", func(c *node) {
			if v, ok := l.quantity(c, &phStep); ok {
				line.Change.PH = v
			}
		}},
		{"dose", func(c *node) {
			if v, ok := l.quantity(c, &share); ok {
				line.Change.Dose = v
			}
		}},
	})
}

func (l *loader) tolerances(n *node, line *Line) {
	var keys []key
	for _, f := range reading.Fields() {
		if f.Group == reading.Reading {
			keys = append(keys, key{f.Name, func(c *node) {
				if t, ok := l.tolerance(c, f); ok {
					line.Tolerances[f.Name] = t
				}
			}})
		}
	}
	l.sub(n, keys)
}
