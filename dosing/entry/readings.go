package entry

import (
	"beckline/dosing"
	"beckline/dosing/reading"
)

// readings fills in the sample and names what is missing. A temperature is
// never assumed; a measured DIC stands in for the pH.
func (w *filling) readings() {
	for _, field := range fields {
		if field.Group != reading.Reading {
			continue
		}
		if v, ok := w.parse(field); ok {
			if place := w.result.Readings.Named(field.Name); place != nil {
				*place = dosing.Some(v.SI)
			}
			continue
		}
		if !w.form.blank(field.Name) {
			continue // its problem is noted
		}
		switch field.Name {
		case "ph":
			if w.form.blank("dic") {
				w.problem("missing", field.Name, "", field.Accepted()+"; or a measured dic")
			}
		case "alkalinity", "temperature":
			w.problem("missing", field.Name, "", field.Accepted())
		}
	}
}
