package entry

import "beckline/dosing/reading"

// Units returns the unit in which each reading of the form was typed, by field
// name. What is blank or cannot be read is left out.
func (f Form) Units() map[string]string {
	units := map[string]string{}
	for _, field := range fields {
		if field.Group != reading.Reading || f.blank(field.Name) {
			continue
		}
		if v, err := field.Parse(f.Values[field.Name]); err == nil {
			units[field.Name] = v.Unit
		}
	}
	return units
}
