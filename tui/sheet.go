package tui

import (
	"maps"
	"slices"

	"beckline/dosing/entry"
	"beckline/dosing/reading"
	"beckline/dosing/site"
)

// sheet is everything that a person has entered, as typed. It is what undo
// steps through and what a draft holds; the answer follows from it alone.
type sheet struct {
	Values  map[string]string `json:"values"` // by field name, as typed; absent means not measured
	Product string            `json:"product"`
	Target  string            `json:"target"` // the field name of the kind of target in use
	Adds    []feedEntry       `json:"adds,omitempty"`
	// Accepted holds unusual values that the person has confirmed, by field.
	Accepted map[string]string `json:"accepted,omitempty"`
	Units    units             `json:"units,omitempty"`
	Limits   map[string]string `json:"limits,omitempty"` // of the plant, by the names in limits.go, as typed
	// Demo says that the readings are those of the demo plant.
	Demo bool `json:"demo,omitempty"`
	// Untouched says that the target is the one the screen started with, and
	// UntouchedProduct the same of the product: nobody has chosen it yet.
	Untouched        bool `json:"untouched,omitempty"`
	UntouchedProduct bool `json:"untouched_product,omitempty"`

	plant *site.Line // the line of a plant file that the screen was opened with; nil without
}

// targets are the kinds of target in the order in which the screen offers them.
var targets = []string{"target-ph", "target-alkalinity", "target-si", "target-ccpp"}

// newSheet makes a sheet of a form. demo says that its readings are invented.
func newSheet(f entry.Form, demo bool) sheet {
	s := sheet{Values: map[string]string{}, Product: f.Product, Target: targets[0], Accepted: map[string]string{},
		Limits: map[string]string{}, Demo: demo, Untouched: demo, UntouchedProduct: demo}
	for name, text := range f.Values {
		if text != "" {
			s.Values[name] = text
		}
	}
	for _, name := range targets {
		if s.Values[name] != "" {
			s.Target = name
		}
	}
	for _, add := range f.Adds {
		s.Adds = append(s.Adds, splitAdd(add, false))
	}
	for _, add := range f.Thens {
		s.Adds = append(s.Adds, splitAdd(add, true))
	}
	return s
}

// form is the sheet as the commands would be given it.
func (s sheet) form() entry.Form {
	f := entry.Form{Values: map[string]string{}, Product: s.Product}
	for name, text := range s.Values {
		if text == "" || name != s.Target && slices.Contains(targets, name) {
			continue
		}
		f.Values[name] = text
	}
	for _, a := range s.Adds {
		if a.Behind {
			f.Thens = append(f.Thens, a.text())
		} else {
			f.Adds = append(f.Adds, a.text())
		}
	}
	return f
}

// clone is a copy that shares nothing.
func (s sheet) clone() sheet {
	s.Values = maps.Clone(s.Values)
	s.Accepted = maps.Clone(s.Accepted)
	s.Limits = maps.Clone(s.Limits)
	s.Adds = slices.Clone(s.Adds)
	return s
}

// equal reports whether nothing was changed.
func (s sheet) equal(t sheet) bool {
	return maps.Equal(s.Values, t.Values) && s.Product == t.Product && s.Target == t.Target &&
		slices.Equal(s.Adds, t.Adds) && s.Units == t.Units && maps.Equal(s.Accepted, t.Accepted) &&
		maps.Equal(s.Limits, t.Limits) && s.Demo == t.Demo && s.Untouched == t.Untouched && s.UntouchedProduct == t.UntouchedProduct
}

// own is the sheet with which a plant's own readings start: every number of
// the demo plant is gone, so that none can mix with a real one. Product and
// target stay as starting settings, and the screen says that nobody has chosen
// them until somebody does.
func (s sheet) own() sheet {
	n := sheet{Values: map[string]string{}, Product: s.Product, Target: s.Target, Accepted: map[string]string{},
		Limits: maps.Clone(s.Limits), Units: s.Units, Untouched: s.Untouched, UntouchedProduct: s.UntouchedProduct, plant: s.plant}
	if text := s.Values[s.Target]; text != "" {
		n.Values[s.Target] = text
	}
	return n
}

// isReading reports whether a field is measured on the water.
func isReading(name string) bool {
	f, ok := reading.Lookup(name)
	return ok && f.Group == reading.Reading
}

// whole gives a sheet that came from a file the parts that it may lack.
func (s sheet) whole() sheet {
	s = s.clone()
	if s.Values == nil {
		s.Values = map[string]string{}
	}
	if s.Accepted == nil {
		s.Accepted = map[string]string{}
	}
	if s.Limits == nil {
		s.Limits = map[string]string{}
	}
	slices.SortStableFunc(s.Adds, func(a, b feedEntry) int { return a.side() - b.side() })
	if _, known := unitNames[s.Units]; !known {
		s.Units = unitsSI
	}
	if !slices.Contains(targets, s.Target) {
		s.Target = targets[0]
	}
	s.Demo = false
	return s
}

// readings counts the readings that are entered.
func (s sheet) readings() int {
	n := 0
	for name := range s.Values {
		if isReading(name) {
			n++
		}
	}
	return n
}

// unchecked says what is still as the screen started, "" where nothing is.
func (s sheet) unchecked() string {
	switch {
	case s.Untouched && s.UntouchedProduct:
		return "product and target are the starting ones: check them (p, t)"
	case s.Untouched:
		return "the target is the starting one: check it (t)"
	case s.UntouchedProduct:
		return "the product is the starting one: check it (p)"
	}
	return ""
}
