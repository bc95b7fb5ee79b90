package working

import (
	"beckline/carbonate"
	"beckline/dosing"
)

// conserved are the names that a blend takes the mean of.
func conserved() []symbol {
	list := []symbol{{carbonate.Carbon, "C", "inorganic carbon"}}
	return append(append(list, active...), inert...)
}

// keepSource puts a source's conserved numbers by, under names of its own.
func (b *builder) keepSource(i int, heading string) {
	suffix := "_" + write(float64(i+1), 3)
	if b.kept == nil {
		b.kept = map[string]float64{}
	}
	b.section(heading, "What is blended.")
	keep := func(name, what, unit string) {
		if _, ok := b.names[name]; ok {
			b.work(name+suffix, what, name, unit, "")
			b.kept[name+suffix] = b.names[name+suffix]
		}
	}
	keep("T", "temperature", "K")
	keep("Alk", "alkalinity", equivalents)
	for _, s := range conserved() {
		keep(s.symbol, s.what, molar)
	}
}

// blend works the mean of the sources by flow. pH is not averaged: it follows.
func (b *builder) blend(r *dosing.Result, need *carbonate.Totals) {
	b.names = b.kept
	raw := &r.Raw().Figures
	b.section("2  BLEND", "Alkalinity, totals and heat are conserved, so each is the mean by flow (name_1 is the first source's). The pH is not averaged.")
	flows := sum{}
	for i := range r.Case.Sources {
		q := "q_" + write(float64(i+1), 3)
		b.given(q, "flow of "+r.Case.Sources[i].Name+", or its parts", r.Case.Sources[i].Flow.Value, "", "given")
		flows.plus(q)
	}
	mean := func(name, what, unit string) {
		parts := sum{}
		for i := range r.Case.Sources {
			n := write(float64(i+1), 3)
			if _, ok := b.names[name+"_"+n]; ok {
				parts.plus("q_" + n + " * " + name + "_" + n)
			}
		}
		if !parts.empty() {
			b.work(name, what, "("+parts.text+") / ("+flows.text+")", unit, "")
		}
	}
	mean("T", "temperature", "K")
	mean("Alk", "alkalinity", equivalents)
	for _, s := range conserved() {
		mean(s.symbol, s.what, molar)
	}
	if made := raw.Water.Totals[carbonate.Monochloramine]; made > 0 {
		b.chloramine(made, &raw.Water)
	}
	k, err := carbonate.ConstantsAt(raw.Water.Kelvin)
	if err != nil {
		b.fail(err.Error())
		return
	}
	b.constantsAt(k, need)
	b.here(k, r.Raw())
}
