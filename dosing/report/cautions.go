package report

import "beckline/dosing/caution"

// CautionLines returns the short cautions of every product on the line, each
// once, then what they must not meet, then who decides; empty where nothing is
// dosed.
func (d Document) CautionLines() []string {
	keys := d.cautionKeys()
	if len(keys) == 0 {
		return nil
	}
	var lines []string
	seen := map[string]bool{}
	add := func(more ...string) {
		for _, line := range more {
			if !seen[line] {
				seen[line] = true
				lines = append(lines, line)
			}
		}
	}
	for _, key := range keys {
		add(caution.For(key).Short...)
	}
	add(caution.Combined(keys)...)
	add(caution.Deferral)
	return lines
}

// cautionKeys are the sheets of what is dosed, each once, in order.
func (d Document) cautionKeys() []string {
	var keys []string
	seen := map[string]bool{}
	for i := range d.result.Stations {
		if a := d.result.Stations[i].Addition; a != nil && a.Product.Caution != "" && !seen[a.Product.Caution] {
			seen[a.Product.Caution] = true
			keys = append(keys, a.Product.Caution)
		}
	}
	return keys
}
