package report

import (
	"beckline/dosing"
	"beckline/dosing/caution"
)

// CautionLines returns the short cautions of every product on the line, each
// once, then what they must not meet, then who decides; empty where nothing is
// dosed.
func (d Document) CautionLines() []string {
	products := d.products()
	if len(products) == 0 {
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
	for _, p := range products {
		add(caution.Of(p).Short...)
	}
	add(caution.CombinedProducts(products)...)
	add(caution.Deferral)
	return lines
}

// products are what is dosed, each sheet and strength once, in order.
func (d Document) products() []dosing.Product {
	var out []dosing.Product
	seen := map[string]bool{}
	for i := range d.result.Stations {
		if a := d.result.Stations[i].Addition; a != nil && a.Product.Caution != "" && !seen[a.Product.Name] {
			seen[a.Product.Name] = true
			out = append(out, a.Product)
		}
	}
	return out
}
