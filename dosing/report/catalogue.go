package report

import (
	"fmt"
	"slices"
	"strings"

	"beckline/dosing"
	"beckline/dosing/feed"
)

// Product is one product of the catalogue in the units that people and scripts
// read.
type Product struct {
	Name          string `json:"name"`
	Title         string `json:"title"`
	Chemical      string `json:"chemical"`
	Formula       string `json:"formula"`
	Basis         string `json:"basis"`
	TradeBasis    words  `json:"trade_basis"` // null where the trade has none of its own
	Strength      string `json:"strength"`
	StrengthPart  Number `json:"strength_percent"` // of the formula, by weight
	Form          string `json:"form"`
	Density       Number `json:"density_kg_m3_20c"` // null for solids and gases
	DensitySource words  `json:"density_source"`    // null as well
	Purpose       string `json:"purpose"`
}

// words is a text that is null in JSON where there is none.
type words string

// MarshalJSON writes the text, or null.
func (w words) MarshalJSON() ([]byte, error) {
	if w == "" {
		return []byte("null"), nil
	}
	return plainJSON(string(w)), nil
}

// Products describes products of the catalogue.
func Products(products []dosing.Product) []Product {
	list := make([]Product, len(products))
	for i, p := range products {
		trade, _ := TradeBasis(p.Chemical)
		list[i] = Product{
			Name: p.Name, Title: p.Title, Chemical: p.Chemical.Name, Formula: p.Chemical.Formula,
			Basis: Basis(p.Chemical), TradeBasis: words(trade.Name),
			Strength: p.StrengthText, StrengthPart: Some(p.Strength * 100),
			Form: formText(p.Form), Purpose: purposeText(p.Purpose),
		}
		if p.Form == feed.Liquid {
			if found, err := p.Density.At(p.Strength, referenceKelvin); err == nil {
				list[i].Density, list[i].DensitySource = Some(found.KgPerM3), words(found.Source)
			}
		}
	}
	return list
}

// ProductsText is the catalogue as a table of at most 79 columns, by purpose,
// with the sources of the densities below it.
func ProductsText(products []dosing.Product) string {
	var b strings.Builder
	var sources []string
	number := map[string]int{}
	purpose := ""
	products = slices.Clone(products)
	slices.SortStableFunc(products, func(a, b dosing.Product) int { return int(a.Purpose) - int(b.Purpose) })
	fmt.Fprintf(&b, "  %-24s %-34s %s\n", "product", "mass in which a dose is stated", "density, or form")
	for _, p := range Products(products) {
		if p.Purpose != purpose {
			purpose = p.Purpose
			fmt.Fprintf(&b, "%s\n", purpose)
		}
		density := p.Form
		if p.Density.Given {
			source := string(p.DensitySource)
			if number[source] == 0 {
				sources = append(sources, source)
				number[source] = len(sources)
			}
			density = fmt.Sprintf("%s kg/m3 [%d]", Fixed(p.Density.Value, 0), number[source])
		}
		basis := p.Basis
		if p.TradeBasis != "" {
			basis += ", or as " + string(p.TradeBasis)
		}
		fmt.Fprintf(&b, "  %-24s %-34s %s\n", p.Name, basis, density)
		b.WriteString(Wrap(fmt.Sprintf("    %s; %s", p.Chemical, p.Strength), textWidth) + "\n")
	}
	b.WriteString("\nDensities at 20 C\n")
	for i, source := range sources {
		b.WriteString(Wrap(fmt.Sprintf("  [%d] %s", i+1, source), textWidth) + "\n")
	}
	b.WriteString("\nDefault strengths are common practice, no source; yours come with --strength.\n")
	return ASCII(b.String())
}

func formText(f feed.Form) string {
	switch f {
	case feed.Liquid:
		return "liquid"
	case feed.Solid:
		return "solid"
	}
	return "gas"
}

func purposeText(p dosing.Purpose) string {
	switch p {
	case dosing.PHControl:
		return "pH and alkalinity"
	case dosing.Coagulation:
		return "coagulation"
	case dosing.Disinfection:
		return "disinfection"
	case dosing.Fluoridation:
		return "fluoridation"
	case dosing.Inhibitor:
		return "corrosion inhibitor"
	}
	return "neutralisation"
}
