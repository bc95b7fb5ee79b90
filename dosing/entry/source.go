package entry

import (
	"strings"

	"beckline/dosing"
	"beckline/dosing/reading"
)

const sourceForm = "NAME; flow=40 L/s; ph=7.15; alkalinity=285; temperature=11.5; and so on, with ; between"

// sources reads the waters of a blend, one text each: a name, then readings as
// name=value with semicolons between, since a comma may be a decimal one.
func (w *filling) sources() {
	for _, text := range w.form.Sources {
		w.source(text)
	}
	if len(w.form.Sources) == 1 {
		w.problem("two_sources_needed", "source", w.form.Sources[0], "two or more sources")
	}
}

func (w *filling) source(text string) {
	parts := strings.Split(text, ";")
	name := strings.TrimSpace(parts[0])
	if name == "" || strings.Contains(name, "=") {
		w.problem("bad_source", "source", text, sourceForm)
		return
	}
	values := map[string]string{}
	for _, part := range parts[1:] {
		if strings.TrimSpace(part) == "" {
			continue
		}
		key, value, ok := strings.Cut(part, "=")
		key = hyphened(key)
		field, known := reading.Lookup(key)
		if !ok || !known || field.Group != reading.Reading {
			w.problem("bad_source", "source", part, sourceForm)
			return
		}
		values[key] = value
	}
	one := &filling{form: Form{Values: values}, need: NeedWater}
	one.readings()
	for _, p := range one.problems {
		p.Given = reading.Clean(name + ": " + p.Given)
		w.problems = append(w.problems, p)
	}
	flow := one.result.Readings.Flow
	if !flow.Given && values["flow"] == "" {
		w.problem("missing", "flow", name, "the flow of each source, or its share in any one unit")
	}
	for _, n := range one.result.Notes {
		n.Given = reading.Clean(name + ": " + n.Given)
		w.note(n)
	}
	one.result.Readings.Flow = dosing.None
	w.result.Sources = append(w.result.Sources, dosing.Source{Name: reading.Clean(name), Readings: one.result.Readings, Flow: flow})
	// The blend's own flow is the sum of its parts.
	w.result.Readings.Flow = dosing.Some(w.result.Readings.Flow.Or(0) + flow.Or(0))
}
