package caution

import (
	"fmt"

	"beckline/dosing"
	"beckline/dosing/feed"
)

// freezing gives a line for each product of a key.
func freezing(key string) []Line {
	var out []Line
	for _, p := range dosing.Products() {
		if p.Caution == key {
			out = append(out, freezingOf(p)...)
		}
	}
	return out
}

// freezingOf says where a liquid product starts to freeze or drop crystals at
// its own strength; solids and gases have no such line.
func freezingOf(p dosing.Product) []Line {
	if p.Form != feed.Liquid {
		return nil
	}
	f := p.Density.Freezing(p.Strength)
	switch celsius := f.Kelvin - 273.15; {
	case !f.Known:
		return []Line{{fmt.Sprintf("%s (%s): no figure held; see the supplier's curve.", p.Name, p.StrengthText), cp}}
	case f.Unsure:
		return []Line{{fmt.Sprintf("%s (%s): starts to freeze or crystallise near %.0f C, a figure that is not sure; see the supplier's curve.", p.Name, p.StrengthText, celsius), f.Source}}
	default:
		return []Line{{fmt.Sprintf("%s (%s): starts to freeze or crystallise near %.0f C.", p.Name, p.StrengthText, celsius), f.Source}}
	}
}
