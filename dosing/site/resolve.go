package site

import (
	"errors"
	"fmt"
	"math"
	"slices"
	"strings"

	"beckline/dosing"
	"beckline/dosing/entry"
	"beckline/dosing/feed"
	"beckline/dosing/reading"
)

// offTable is how far a measured density may be from the published one of the
// strength before a note (common practice, no source).
const offTable = 0.02

// resolveProduct finds the catalogue's product behind the plant's own, and puts
// it at the plant's strength.
func (l *loader) resolveProduct(n *node, p *Product) {
	name := p.Catalogue
	at := n.child("catalogue")
	switch {
	case at == nil:
		name = p.Name // a table named as the catalogue has it
		at = n
	case name == "":
		return // refused already
	}
	found, err := entry.ProductNamed(name)
	if err != nil {
		given := fmt.Sprintf("there is no product %q in the catalogue", name)
		if at == n {
			l.fail(n, CodeMissing, given, "a key catalogue with one of its names, such as "+l.acceptedProduct(err))
			return
		}
		l.fail(at, CodeReference, given, l.acceptedProduct(err))
		return
	}
	p.Catalogue = found.Name
	if p.Strength != "" {
		if found, err = stronger(p); err != nil {
			l.fail(n.child("strength"), CodeValue, fmt.Sprintf("%q", p.Strength), accepted(err))
			return
		}
	}
	found.Name = p.Name
	if p.Title != "" {
		found.Title = p.Title
	}
	p.product = found
	l.checkDensity(n, p)
}

// stronger is the catalogue's product at the strength that was typed, by the
// same rules as on the command line.
func stronger(p *Product) (dosing.Product, error) {
	f := entry.Form{Product: p.Catalogue, Values: map[string]string{
		"strength": p.Strength, "ph": "7", "alkalinity": "100", "temperature": "10", "target-ph": "8"}}
	c, err := f.Case(entry.NeedDose)
	if err != nil {
		return dosing.Product{}, err
	}
	i := slices.IndexFunc(c.Additions, func(a dosing.Addition) bool { return a.Solve })
	if i < 0 {
		return dosing.Product{}, errors.New("site: no product in the case")
	}
	return c.Additions[i].Product, nil
}

func accepted(err error) string {
	var p *dosing.Problem
	if errors.As(err, &p) && p.Accepted != "" {
		return p.Accepted
	}
	return "a strength that the product can have"
}

func (l *loader) acceptedProduct(err error) string {
	var p *dosing.Problem
	if errors.As(err, &p) {
		return p.Accepted
	}
	return "a product of the catalogue"
}

// checkDensity compares a measured density with the published one of the
// strength: a pair that does not fit is often the wrong product in the tank.
func (l *loader) checkDensity(n *node, p *Product) {
	if !p.Density.Given {
		if p.DensityOn != "" && n.child("density") == nil {
			l.fail(n.child("density-date"), CodeContradict, "a date without a density", "density, as measured on that day")
		}
		return
	}
	if p.product.Form != feed.Liquid {
		l.fail(n.child("density"), CodeContradict, "a density of a product that is not a liquid", "no density for "+p.Catalogue)
		return
	}
	kelvin := 293.15
	if f, ok := reading.Lookup("product-temperature"); ok && p.Temperature != "" {
		if v, err := f.Parse(p.Temperature); err == nil {
			kelvin = v.SI
		}
	}
	found, err := p.product.Density.At(p.product.Strength, kelvin)
	if err != nil || math.Abs(p.Density.Value/found.KgPerM3-1) <= offTable {
		return
	}
	c := n.child("density")
	l.site.Notes = append(l.site.Notes, Note{Line: c.line, Key: c.path,
		Text: fmt.Sprintf("%.0f kg/m3 is not the density of %s (%.0f): is the strength, the density or the product another one?",
			p.Density.Value, p.product.StrengthText, found.KgPerM3)})
}

// productName reads the name of one of the plant's own products or of one in the
// catalogue.
func (l *loader) productName(n *node) string {
	name, ok := l.text(n)
	if !ok {
		return ""
	}
	if l.site.ProductNamed(name) != nil {
		return name
	}
	p, err := entry.ProductNamed(name)
	if err == nil {
		return p.Name
	}
	offered := l.acceptedProduct(err)
	if len(l.site.Products) > 0 { // the plant's own first
		var names []string
		for _, own := range l.site.Products {
			names = append(names, own.Name)
		}
		for _, p := range dosing.Products() {
			names = append(names, p.Name)
		}
		offered = offer(name, names)
	}
	l.fail(n, CodeReference, fmt.Sprintf("there is no product %q here or in the catalogue", name), offered)
	return ""
}

// linePump reads the pump of a line.
func (l *loader) linePump(n *node, line *Line) {
	name, ok := l.text(n)
	if !ok {
		return
	}
	var names []string
	for _, p := range l.site.Pumps {
		if p.Name == name {
			line.Pump = p
			return
		}
		names = append(names, p.Name)
	}
	l.fail(n, CodeReference, fmt.Sprintf("there is no pump %q", name), offerOr(name, names, "the name of a table [pumps.NAME]"))
}

func offerOr(name string, names []string, none string) string {
	if len(names) == 0 {
		return none
	}
	return offer(name, names)
}

// texts reads a list of texts.
func (l *loader) texts(n *node, accepted string) ([]string, bool) {
	list, ok := n.value.([]any)
	if !ok {
		l.fail(n, CodeKind, kind(n.value), accepted)
		return nil, false
	}
	var out []string
	for _, v := range list {
		s, ok := v.(string)
		if !ok {
			l.fail(n, CodeKind, kind(v)+" in the list", accepted)
			return nil, false
		}
		out = append(out, s)
	}
	return out, true
}

func (l *loader) lineTanks(n *node, line *Line) {
	names, ok := l.texts(n, `a list of tanks, ["day"]`)
	if !ok {
		return
	}
	var known []string
	for _, t := range l.site.Tanks {
		known = append(known, t.Name)
	}
	for _, name := range names {
		i := slices.Index(known, name)
		if i < 0 {
			l.fail(n, CodeReference, fmt.Sprintf("there is no tank %q", reading.Clean(name)), offerOr(name, known, "the name of a table [tanks.NAME]"))
			continue
		}
		line.Tanks = append(line.Tanks, l.site.Tanks[i])
	}
	l.row(n, reading.Clean(strings.Join(names, ", ")))
}

// additions reads the doses that go in ahead of the solved one.
func (l *loader) additions(n *node, line *Line) {
	list, ok := l.texts(n, `a list of doses, ["alum-dry=22", "hypochlorite-12=1.2 mg/L Cl2"]`)
	if !ok {
		return
	}
	for _, text := range list {
		f := entry.Form{Adds: []string{l.site.inCatalogue(text)}}
		for _, p := range f.Problems(entry.NeedWater) {
			if p.Field == reading.DoseField {
				l.fail(n, CodeValue, fmt.Sprintf("%q", reading.Clean(text)), p.Accepted)
			}
		}
		line.Add = append(line.Add, text)
		l.row(n, reading.Clean(text))
	}
}

// inCatalogue replaces one of the plant's own names in PRODUCT=DOSE by the
// catalogue's.
func (s *Site) inCatalogue(add string) string {
	name, dose, found := strings.Cut(add, "=")
	if p := s.ProductNamed(strings.TrimSpace(name)); found && p != nil {
		return p.Catalogue + "=" + dose
	}
	return add
}

// shares reads source = "intake", or blend = { intake = 3, well = 1 }.
func (l *loader) shares(n *node, line *Line, whole *node) {
	if n.key == "source" && whole.child("blend") != nil {
		l.fail(n, CodeContradict, "both source and blend", "one of the two")
		return
	}
	if n.key == "source" {
		if name, ok := l.text(n); ok {
			l.share(n, name, 1, line)
		}
		return
	}
	if !n.isTable() || len(n.table) < 2 {
		l.fail(n, CodeKind, fmt.Sprintf("%s of %d", kind(n.value), len(n.table)), "two sources or more with their parts, { intake = 3, well = 1 }")
		return
	}
	for _, c := range n.table {
		if part, ok := l.quantity(c, &parts); ok {
			l.share(c, c.key, part, line)
		}
	}
}

func (l *loader) share(n *node, name string, part float64, line *Line) {
	var names []string
	for _, s := range l.site.Sources {
		if s.Name == name {
			line.Shares = append(line.Shares, Share{s, part})
			return
		}
		names = append(names, s.Name)
	}
	l.fail(n, CodeReference, fmt.Sprintf("there is no source %q", reading.Clean(name)), offerOr(name, names, "the name of a table [sources.NAME]"))
}

// ratioBand is a band of a figure without a unit.
func (l *loader) ratioBand(n *node) (Band, bool) {
	const form = "two numbers, [low, high], or { min = ... }, { max = ... }, each 0 to 10000"
	b := Band{Line: n.line}
	ends := map[string]any{}
	switch v := n.value.(type) {
	case nil:
		l.table(n, []key{{"min", func(c *node) { ends["min"] = c.value }}, {"max", func(c *node) { ends["max"] = c.value }}})
	case []any:
		if len(v) == 2 {
			ends["min"], ends["max"] = v[0], v[1]
		}
	}
	for _, name := range []string{"min", "max"} {
		v, given := ends[name]
		if !given {
			continue
		}
		text, ok := l.typedText(n, v, form)
		if !ok {
			return b, false
		}
		x, ok := ratio.parse(text)
		if !ok {
			l.fail(n, CodeValue, kind(v), form)
			return b, false
		}
		if name == "min" {
			b.Low = dosing.Some(x)
		} else {
			b.High = dosing.Some(x)
		}
	}
	if !b.Low.Given && !b.High.Given || b.Low.Given && b.High.Given && b.Low.Value > b.High.Value {
		l.fail(n, CodeBand, kind(n.value), form)
		return b, false
	}
	l.row(n, b.plain())
	return b, true
}

// plain writes a band without a unit.
func (b Band) plain() string {
	switch {
	case b.Low.Given && b.High.Given:
		return fmt.Sprintf("%g to %g", b.Low.Value, b.High.Value)
	case b.Low.Given:
		return fmt.Sprintf("at least %g", b.Low.Value)
	}
	return fmt.Sprintf("at most %g", b.High.Value)
}
