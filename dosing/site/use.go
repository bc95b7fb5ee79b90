package site

import (
	"maps"
	"slices"
	"strings"

	"beckline/dosing"
	"beckline/dosing/entry"
	"beckline/dosing/reading"
)

// Form is what the screen and the commands start from: the line's readings, its
// target, its additions, its product and the settings that belong to it. A blend
// has no readings of its own in the form but its flow.
func (l *Line) Form() entry.Form {
	f := entry.Form{Values: map[string]string{}, Adds: slices.Clone(l.Add)}
	if len(l.Shares) == 1 {
		maps.Copy(f.Values, l.Shares[0].Source.Readings)
	}
	maps.Copy(f.Values, l.Readings)
	maps.Copy(f.Values, l.Targets)
	if l.Product != "" {
		l.Choose(&f, l.Product)
	}
	return f
}

// settings are the fields that belong to a product.
var settings = []string{"strength", "product-temperature", "pump"}

// Choose puts another product into a form, with the strength, temperature and
// pump that the plant has for it; those of the product before go.
func (l *Line) Choose(f *entry.Form, product string) {
	f.Product = product
	for _, name := range settings {
		delete(f.Values, name)
	}
	set := func(name, value string) {
		if value != "" {
			f.Values[name] = value
		}
	}
	if own := l.site.ProductNamed(product); own != nil {
		set("strength", own.Strength)
		set("product-temperature", own.Temperature)
	}
	if pump := l.pumpFor(product); pump != nil {
		set("pump", pump.Capacity)
	}
}

// pumpFor is the line's pump where it feeds this product, or else the first of
// the plant that does.
func (l *Line) pumpFor(product string) *Pump {
	if p := l.Pump; p != nil && (p.Product == product || p.Product == "" && product == l.Product) {
		return p
	}
	for _, p := range l.site.Pumps {
		if p.Product == product && product != "" {
			return p
		}
	}
	return nil
}

// Case turns a form into a case of this line: own product names, strengths,
// densities and use levels; the blend where the form has no readings that take
// its place; the line's limits and usual bands. The error is a *dosing.Problem.
func (l *Line) Case(f entry.Form, need entry.Need) (dosing.Case, error) {
	typed := f
	f.Values = maps.Clone(f.Values)
	if f.Values == nil {
		f.Values = map[string]string{}
	}
	blended := len(l.Shares) > 1 && len(f.Sources) == 0 && !hasWater(f)
	if blended { // stands in until the sources take its place
		maps.Copy(f.Values, l.Shares[0].Source.Readings)
	}
	f = l.catalogued(f)
	c, err := f.Case(need)
	if err != nil {
		return dosing.Case{}, err
	}
	if blended {
		if err := l.blend(&c); err != nil {
			return dosing.Case{}, err
		}
	}
	if p := l.check(&c, f, blended); p != nil {
		return dosing.Case{}, p
	}
	l.equip(&c, typed)
	return c, nil
}

// catalogued is a form with the catalogue's names in place of the plant's own.
func (l *Line) catalogued(f entry.Form) entry.Form {
	for _, name := range []*string{&f.Product, &f.Second, &f.TargetAfter} {
		if own := l.site.ProductNamed(*name); own != nil {
			*name = own.Catalogue
		}
	}
	f.Adds, f.Thens = l.inCatalogue(f.Adds), l.inCatalogue(f.Thens)
	return f
}

// Problems lists all that is wrong with a form on this line before a case is
// made of it, its own limits aside.
func (l *Line) Problems(f entry.Form, need entry.Need) []*dosing.Problem {
	return l.catalogued(f).Problems(need)
}

// inCatalogue puts the catalogue's names into additions.
func (l *Line) inCatalogue(adds []string) []string {
	out := make([]string, len(adds))
	for i, add := range adds {
		out[i] = l.site.inCatalogue(add)
	}
	return out
}

// hasWater reports whether a form holds readings of a water.
func hasWater(f entry.Form) bool {
	for name, text := range f.Values {
		field, ok := reading.Lookup(name)
		if ok && field.Group == reading.Reading && name != "flow" && strings.TrimSpace(text) != "" {
			return true
		}
	}
	return false
}

// blend replaces the readings by those of the sources.
func (l *Line) blend(c *dosing.Case) error {
	c.Readings = dosing.Readings{Flow: c.Readings.Flow}
	c.Notes = slices.DeleteFunc(c.Notes, func(w dosing.Warning) bool {
		f, ok := reading.Lookup(w.Field)
		return ok && f.Group == reading.Reading && f.Name != "flow"
	})
	for _, share := range l.Shares {
		one, err := entry.Form{Values: share.Source.Readings}.Case(entry.NeedWater)
		if err != nil {
			p := *err.(*dosing.Problem)
			p.Given = strings.TrimSpace(share.Source.Name + " " + p.Given)
			return &p
		}
		c.Sources = append(c.Sources, dosing.Source{Name: share.Source.Name, Readings: one.Readings, Flow: dosing.Some(share.Parts)})
	}
	return nil
}

// check holds the readings against the line, in the order of the fields. The
// plant's usual bands take the place of the built-in ones.
func (l *Line) check(c *dosing.Case, f entry.Form, blended bool) *dosing.Problem {
	for _, field := range reading.Fields() {
		text := f.Values[field.Name]
		if field.Group != reading.Reading || strings.TrimSpace(text) == "" || blended && field.Name != "flow" {
			continue
		}
		v, err := field.Parse(text)
		if err != nil {
			continue // the form's own business
		}
		warning, problem := l.CheckReading(field, v.SI, v.Given)
		if problem != nil {
			return problem
		}
		if _, own := l.Usual[field.Name]; own {
			c.Notes = slices.DeleteFunc(c.Notes, func(w dosing.Warning) bool {
				return w.Field == field.Name && strings.HasPrefix(w.Code, "unusual_")
			})
		}
		if warning != nil {
			c.Notes = append(c.Notes, *warning)
		}
	}
	return nil
}

// equip gives the additions what the plant knows of its products. Additions
// stand in the order of the form: those ahead, the solved ones, those behind.
func (l *Line) equip(c *dosing.Case, typed entry.Form) {
	texts := slices.Clone(typed.Adds)
	texts = append(texts, typed.Product)
	if typed.Second != "" {
		texts = append(texts, typed.Second)
	}
	texts = append(texts, typed.Thens...)
	names := make([]string, len(texts))
	for i, text := range texts {
		name, _, _ := strings.Cut(text, "=")
		names[i] = strings.TrimSpace(name)
	}
	next := 0
	for i := range c.Additions {
		a := &c.Additions[i]
		if a.Process != dosing.ChemicalFeed {
			continue
		}
		at := next
		for at < len(names) && !l.isProduct(names[at], a.Product.Name) {
			at++
		}
		if at == len(names) {
			continue
		}
		next = at + 1
		own := l.site.ProductNamed(names[at])
		if own == nil {
			continue
		}
		switch {
		case a.Solve && at == len(typed.Adds):
			l.equipSolved(a, own, typed)
			continue
		case a.Solve: // the second one: the settings in the form are the first's
			a.Product = own.product
			own.feed(a, true)
			if pump := l.pumpFor(names[at]); pump != nil {
				a.Feed.PumpCapacity = pump.Output
			}
			continue
		}
		if d, err := reading.ParseDose(texts[at]); err == nil && d.Basis == "product" && a.Dose.Given {
			a.Dose.Value *= own.product.Strength / a.Product.Strength // stated as this plant's product
		}
		a.Product = own.product
		own.feed(a, true)
	}
}

// isProduct reports whether a name as typed is the catalogue's product.
func (l *Line) isProduct(typed, catalogue string) bool {
	if own := l.site.ProductNamed(typed); own != nil {
		return own.Catalogue == catalogue
	}
	p, err := entry.ProductNamed(typed)
	return err == nil && p.Name == catalogue
}

// equipSolved keeps a strength that was typed over the plant's: then the density
// is not the one that was measured.
func (l *Line) equipSolved(a *dosing.Addition, own *Product, typed entry.Form) {
	same := strings.TrimSpace(typed.Values["strength"]) == own.Strength
	if same || strings.TrimSpace(typed.Values["strength"]) == "" {
		a.Product, same = own.product, true
	} else {
		a.Product.Name, a.Product.Title = own.product.Name, own.product.Title
	}
	own.feed(a, same)
}

// feed sets what the plant knows of the product's feed.
func (p *Product) feed(a *dosing.Addition, sameStrength bool) {
	if p.Density.Given && sameStrength {
		a.Feed.Density = p.Density
	}
	a.Feed.MaximumUse = p.MaximumUse
	if f, ok := reading.Lookup("product-temperature"); ok && p.Temperature != "" && !a.Feed.ProductKelvin.Given {
		if v, err := f.Parse(p.Temperature); err == nil {
			a.Feed.ProductKelvin = dosing.Some(v.SI)
		}
	}
}

// Equipment is what the line has to feed one of its own products with, and how
// far it may go: temperature and density in the tank, the pump's output, the
// certified maximum use level.
func (l *Line) Equipment(p *Product) dosing.FeedSetup {
	var a dosing.Addition
	p.feed(&a, true)
	if pump := l.pumpFor(p.Name); pump != nil {
		a.Feed.PumpCapacity = pump.Output
	}
	return a.Feed
}
