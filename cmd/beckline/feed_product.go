package main

import (
	"github.com/spf13/cobra"

	"beckline/dosing/feed"
	"beckline/dosing/report"
)

func dilutionCommand(c *console) *cobra.Command {
	var p productFlags
	var asJSON bool
	cmd := &cobra.Command{
		Use:   "dilution",
		Short: "thinning a product: amounts, heat, freezing",
		Long: "Says how much water and product make a weaker solution, by mass, with the heat\n" +
			"of it and the points at which both freeze. Always the product into the water.",
		Example: "  beckline feed dilution --product caustic-50 --to 25 --make \"200 L\" \\\n    --water-temperature 12",
		Args:    noArguments,
		RunE: func(*cobra.Command, []string) error {
			s, err := p.thinned()
			if err != nil {
				return report.FeedProblem(err)
			}
			return c.show(s, asJSON)
		},
	}
	p.add(cmd, "strength", "product-temperature", "to", "make", "use", "water-temperature")
	addJSON(cmd, &asJSON)
	return cmd
}

func (p *productFlags) thinned() (report.Sheet, error) {
	product, err := p.liquid()
	if err != nil {
		return report.Sheet{}, err
	}
	to, err := p.need("to")
	if err != nil {
		return report.Sheet{}, err
	}
	if to >= product.Strength {
		return report.Sheet{}, badLine("outside_range", "to", p.text("to"), "less than the product's own "+report.Significant(product.Strength*100, 3)+" % by weight")
	}
	more, err := p.several("make", "use", "product-temperature", "water-temperature")
	if err != nil {
		return report.Sheet{}, err
	}
	if more["make"].Given == more["use"].Given {
		return report.Sheet{}, badLine("one_of_two", "make", p.text("make")+p.text("use"), "--make or --use")
	}
	d, err := feed.Dilute(feed.Dilution{Product: product.Density, From: product.Strength, To: to,
		Make: more["make"].Value, Use: more["use"].Value,
		ProductKelvin: more["product-temperature"].Or(referenceKelvin), WaterKelvin: more["water-temperature"].Or(referenceKelvin)})
	if err != nil {
		return report.Sheet{}, err
	}
	return report.ThinningSheet(report.Thinning{Product: product, To: to, Diluted: d}), nil
}

func strengthCommand(c *console) *cobra.Command {
	var p productFlags
	var asJSON bool
	cmd := &cobra.Command{
		Use:     "strength",
		Short:   "a product's strength by hydrometer and thermometer",
		Long:    "Tells the strength of a liquid product from its specific gravity (or density)\nand its temperature, by the published tables.",
		Example: "  beckline feed strength --product caustic-50 --gravity 1.500 \\\n    --product-temperature 24",
		Args:    noArguments,
		RunE: func(*cobra.Command, []string) error {
			s, err := p.told()
			if err != nil {
				return report.FeedProblem(err)
			}
			return c.show(s, asJSON)
		},
	}
	p.add(cmd, "product-temperature")
	p.addGravity(cmd)
	addJSON(cmd, &asJSON)
	return cmd
}

func (p *productFlags) told() (report.Sheet, error) {
	product, err := p.liquid()
	if err != nil {
		return report.Sheet{}, err
	}
	g := report.Gravity{Product: product}
	if g.Measured, g.Kelvin, err = p.density(); err != nil {
		return report.Sheet{}, err
	}
	if g.Strength, err = product.Density.StrengthAt(g.Measured, g.Kelvin); err != nil {
		return report.Sheet{}, err
	}
	return report.GravitySheet(g), nil
}

func carrierCommand(c *console) *cobra.Command {
	var p productFlags
	var asJSON bool
	cmd := &cobra.Command{
		Use:   "carrier",
		Short: "the scale that carrier water makes in the line of a base",
		Long: "Weighs the hardness of the water that takes a base to its feed point: how much\n" +
			"calcium carbonate and magnesium hydroxide can come out of it at the most.",
		Example: "  beckline feed carrier --hardness 180 --calcium-hardness 140 --alkalinity 120 \\\n    --flow \"0.5 m3/h\" --product caustic-50",
		Args:    noArguments,
		RunE: func(*cobra.Command, []string) error {
			s, err := p.carrier()
			if err != nil {
				return report.FeedProblem(err)
			}
			return c.show(s, asJSON)
		},
	}
	p.add(cmd, "strength", "hardness", "calcium-hardness", "alkalinity", "flow")
	addJSON(cmd, &asJSON)
	return cmd
}

func (p *productFlags) carrier() (report.Sheet, error) {
	product, err := p.named()
	if err != nil {
		return report.Sheet{}, err
	}
	w := feed.Carrier{Calcium: -1}
	if w.Hardness, err = p.need("hardness"); err != nil {
		return report.Sheet{}, err
	}
	if w.Alkalinity, err = p.need("alkalinity"); err != nil {
		return report.Sheet{}, err
	}
	more, err := p.several("calcium-hardness", "flow")
	if err != nil {
		return report.Sheet{}, err
	}
	if v := more["calcium-hardness"]; v.Given {
		if w.Calcium = v.Value; w.Calcium > w.Hardness {
			return report.Sheet{}, badLine("calcium_above_hardness", "hardness", p.text("hardness"), "at least the calcium hardness")
		}
	}
	w.Flow = more["flow"].Value
	scale, err := w.Scale()
	if err != nil {
		return report.Sheet{}, err
	}
	return report.CarrierSheet(w, scale, product), nil
}
