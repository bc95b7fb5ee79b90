package tui

import (
	"strings"

	"beckline/dosing"
	"beckline/dosing/entry"
	"beckline/dosing/margin"
	"beckline/dosing/reading"
	"beckline/dosing/site"
)

// newPlantSheet is the sheet that a line of a plant file opens with.
func newPlantSheet(l *site.Line) sheet {
	s := newSheet(l.Form(), false)
	s.plant = l
	s.Target = firstTarget(s)
	return s
}

func firstTarget(s sheet) string {
	for _, name := range targets {
		if s.Values[name] != "" {
			return name
		}
	}
	return targets[0]
}

// blended tells whether the water is the plant's blend: nobody has typed a
// reading of a sample over it.
func (s sheet) blended() bool {
	if s.plant == nil || len(s.plant.Shares) < 2 {
		return false
	}
	for name := range s.Values {
		if isReading(name) && name != "flow" {
			return false
		}
	}
	return true
}

// caseFor is the case of the sheet, in the plant's terms where there is one, with
// the limits that were entered. The error is a *dosing.Problem.
func (s sheet) caseFor(need entry.Need) (c dosing.Case, err error) {
	if s.plant != nil {
		c, err = s.plant.Case(s.form(), need)
	} else {
		c, err = s.form().Case(need)
	}
	if err != nil {
		return c, err
	}
	if most, e := useLevelOf(s.Limits[mostUse]); e == nil && most.Given {
		for i := range c.Additions {
			if c.Additions[i].Solve {
				c.Additions[i].Feed.MaximumUse = most
			}
		}
	}
	return c, nil
}

// problems lists what keeps the sheet from being a case.
func (s sheet) problems() []*dosing.Problem {
	if s.plant == nil {
		return s.form().Problems(entry.NeedDose)
	}
	f := s.form()
	var out []*dosing.Problem
	for _, p := range f.Problems(entry.NeedDose) {
		missing := p.Code == "missing" && isReading(p.Field)
		if !(missing && s.blended()) && !s.namesOwn(p, f) {
			out = append(out, p)
		}
	}
	if len(out) == 0 {
		if _, err := s.caseFor(entry.NeedDose); err != nil {
			if p, ok := err.(*dosing.Problem); ok {
				out = append(out, p)
			}
		}
	}
	return out
}

// namesOwn tells whether a problem is only that the catalogue does not know one
// of the plant's own products.
func (s sheet) namesOwn(p *dosing.Problem, f entry.Form) bool {
	if p.Field == "product" && s.plant.Site().ProductNamed(f.Product) != nil {
		return true
	}
	name, _, _ := strings.Cut(p.Given, "=")
	return p.Field == reading.DoseField && s.plant.Site().ProductNamed(strings.TrimSpace(name)) != nil
}

// productNamed finds a product by the plant's own name or the catalogue's.
func (s sheet) productNamed(name string) (dosing.Product, bool) {
	if s.plant != nil {
		if own := s.plant.Site().ProductNamed(name); own != nil {
			return own.Dosing(), true
		}
	}
	return dosing.ProductByName(name)
}

// tolerances are the plant's, over the usual ones.
func (s sheet) tolerances() margin.Tolerances {
	t := margin.Defaults()
	if s.plant == nil {
		return t
	}
	for _, name := range margin.Names() {
		own, ok := s.plant.Tolerances[name]
		if !ok || s.Values[name] == "" {
			continue
		}
		_ = t.Set(name, margin.Tolerance{Absolute: own.Absolute, Relative: own.Relative}) // one it cannot take leaves the usual one
	}
	return t
}

// plantName says whose water this is, and that a blend is one.
func (s sheet) plantName() string {
	l := s.plant
	name := l.Title
	if name == "" {
		name = l.Name
	}
	if l.Plant != "" {
		name = l.Plant + ", " + name
	}
	if s.blended() {
		var parts []string
		for _, share := range l.Shares {
			parts = append(parts, share.Source.Name)
		}
		name += ": blend of " + strings.Join(parts, ", ") + "; a reading typed takes its place"
	}
	return name
}
