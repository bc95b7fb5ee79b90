package site

import (
	"cmp"
	"fmt"
	"slices"

	"beckline/dosing"
	"beckline/dosing/reading"
)

// Format is the layout of plant files that this program reads.
const Format = 1

// key is one key of a table and what to do with it.
type key struct {
	name string
	read func(*node)
}

// table reads the keys of a table in the order in which they are listed, and
// refuses all others.
func (l *loader) table(n *node, keys []key) {
	for _, k := range keys {
		if c := n.child(k.name); c != nil {
			k.read(c)
		}
	}
	for _, c := range n.table {
		if slices.ContainsFunc(keys, func(k key) bool { return k.name == c.key }) {
			continue
		}
		names := make([]string, len(keys))
		for i, k := range keys {
			names[i] = k.name
		}
		l.fail(c, CodeUnknownKey, fmt.Sprintf("there is no key %q here", reading.Clean(c.key)), offer(c.key, names))
	}
}

// each reads a table of named tables, [pumps.P1] and [pumps.P2].
func (l *loader) each(n *node, read func(*node)) {
	if !l.isTable(n) {
		return
	}
	for _, c := range n.table {
		if l.named(c) {
			read(c)
		}
	}
}

// root reads the whole file. Names are resolved after, so that the order of
// tables does not matter.
func (l *loader) root(n *node) {
	l.table(n, []key{
		{"format", l.format},
		{"start", func(*node) {}}, // once the lines are known
		{"currency", func(c *node) { l.site.Currency, _ = l.text(c) }},
		{"units", l.units},
		{"products", func(c *node) { l.each(c, l.product) }},
		{"pumps", func(c *node) { l.each(c, l.pump) }},
		{"tanks", func(c *node) { l.each(c, l.tank) }},
		{"sources", func(c *node) { l.each(c, l.source) }},
		{"lines", func(c *node) { l.each(c, l.line) }},
	})
	l.start(n)
}

func (l *loader) format(n *node) {
	switch v, ok := n.value.(int64); {
	case !ok:
		l.fail(n, CodeKind, kind(n.value), fmt.Sprint(Format))
	case v > Format:
		l.fail(n, CodeNewer, fmt.Sprint(v), fmt.Sprintf("%d; the file is for a newer program", Format))
	case v < 1:
		l.fail(n, CodeValue, fmt.Sprint(v), fmt.Sprint(Format))
	default:
		l.row(n, fmt.Sprint(v))
	}
}

func (l *loader) product(n *node) {
	p := &Product{Name: n.key, line: n.line}
	l.table(n, []key{
		{"catalogue", func(c *node) { p.Catalogue, _ = l.text(c) }},
		{"title", func(c *node) { p.Title, _ = l.text(c) }},
		{"strength", func(c *node) { p.Strength = l.typed(c, "strength") }},
		{"temperature", func(c *node) { p.Temperature = l.typed(c, "product-temperature") }},
		{"density", func(c *node) { l.optional(c, &density, &p.Density) }},
		{"density-date", func(c *node) { p.DensityOn, _ = l.date(c) }},
		{"price", func(c *node) { l.optional(c, &price, &p.Price) }},
		{"maximum-use", func(c *node) { l.optional(c, &useLevel, &p.MaximumUse) }},
	})
	l.resolveProduct(n, p)
	l.site.Products = append(l.site.Products, p)
}

// typed keeps a setting's text after checking it as its field does.
func (l *loader) typed(n *node, field string) string {
	f, ok := reading.Lookup(field)
	if !ok {
		l.fail(n, CodeUnknownKey, field, "")
		return ""
	}
	text, si, ok := l.field(n, f, n.value)
	if !ok {
		return ""
	}
	shown := text
	if _, unit := splitUnit(text); unit == "" {
		shown = withUnit(f, si)
	}
	l.row(n, shown)
	return text
}

func (l *loader) optional(n *node, q *quantity, to *dosing.Optional) {
	if v, ok := l.quantity(n, q); ok {
		*to = dosing.Some(v)
	}
}

func (l *loader) pump(n *node) {
	p := &Pump{Name: n.key}
	l.table(n, []key{
		{"capacity", func(c *node) {
			p.Capacity = l.typed(c, "pump")
			if f, ok := reading.Lookup("pump"); ok && p.Capacity != "" {
				if v, err := f.Parse(p.Capacity); err == nil {
					p.Output = dosing.Some(v.SI)
				}
			}
		}},
		{"product", func(c *node) { p.Product = l.productName(c) }},
	})
	if n.child("capacity") == nil {
		l.fail(n, CodeMissing, "the pump has no capacity", "capacity, its output at 100 % in L/h")
	}
	l.site.Pumps = append(l.site.Pumps, p)
}

func (l *loader) tank(n *node) {
	t := &Tank{Name: n.key, Kind: "day"}
	l.table(n, []key{
		{"volume", func(c *node) { t.Volume, _ = l.quantity(c, &volume) }},
		{"kind", func(c *node) { t.Kind = cmp.Or(l.oneOf(c, "day", "bulk"), t.Kind) }},
		{"product", func(c *node) { t.Product = l.productName(c) }},
	})
	if n.child("volume") == nil {
		l.fail(n, CodeMissing, "the tank has no volume", "volume, what can be used of it in m3")
	}
	l.site.Tanks = append(l.site.Tanks, t)
}

// oneOf reads a word out of a few; "" where it is none of them.
func (l *loader) oneOf(n *node, words ...string) string {
	if s, ok := n.value.(string); ok && slices.Contains(words, s) {
		l.row(n, s)
		return s
	}
	l.fail(n, CodeValue, kind(n.value), orList(words))
	return ""
}

func (l *loader) source(n *node) {
	s := &Source{Name: n.key, Readings: map[string]string{}}
	keys := append([]key{{"title", func(c *node) { s.Title, _ = l.text(c) }}},
		l.readings(s.Readings, func(f reading.Field) bool { return f.Group == reading.Reading && f.Name != "flow" })...)
	l.table(n, keys)
	l.site.Sources = append(l.site.Sources, s)
}

// readings are keys for the fields that are wanted, kept as typed.
func (l *loader) readings(to map[string]string, wanted func(reading.Field) bool) []key {
	var keys []key
	for _, f := range reading.Fields() {
		if wanted(f) {
			keys = append(keys, key{f.Name, func(c *node) {
				if text := l.typed(c, f.Name); text != "" {
					to[f.Name] = text
				}
			}})
		}
	}
	return keys
}

func (l *loader) start(n *node) {
	if len(l.site.Lines) == 0 {
		if n.child("lines") == nil {
			l.fail(n, CodeMissing, "the file has no treatment line", "a table [lines.NAME]")
		}
		return
	}
	l.site.Start = l.site.Lines[0]
	c := n.child("start")
	if c == nil {
		return
	}
	name, ok := l.text(c)
	if !ok {
		return
	}
	if line := l.site.LineNamed(name); line != nil {
		l.site.Start = line
		return
	}
	var names []string
	for _, line := range l.site.Lines {
		names = append(names, line.Name)
	}
	l.fail(c, CodeReference, fmt.Sprintf("there is no line %q", name), offer(name, names))
}
