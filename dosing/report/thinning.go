package report

import (
	"fmt"
	"slices"

	"beckline/dosing"
	"beckline/dosing/feed"
)

// Thinning is a product thinned with water.
type Thinning struct {
	Product dosing.Product
	To      float64 // share by weight
	Diluted feed.Diluted
}

// ThinningSheet is the answer of a dilution. Where the heat table ends the
// figures are shown only as lower bounds.
func ThinningSheet(in Thinning) Sheet {
	d := in.Diluted
	s := Sheet{Name: "dilution"}
	s.Head = []string{
		fmt.Sprintf("Put in %s L (%s kg) of water first, then add %s L (%s kg) of %s slowly, stirring",
			Significant(d.WaterVolume*litresPerM3, 4), Significant(d.WaterMass, 4), Significant(d.ProductVolume*litresPerM3, 4),
			Significant(d.ProductMass, 4), in.Product.Name),
		fmt.Sprintf("It makes %s L (%s kg) of %s %% by weight; the volumes do not add up, the masses do",
			Significant(d.Volume*litresPerM3, 4), Significant(d.Mass, 4), Significant(in.To*100, 3)),
	}
	if h := d.Heat; h.Known {
		more := ""
		if h.AtLeast {
			more = "more than "
		}
		s.Head = append(s.Head, fmt.Sprintf("It warms by %s%s C, to %s%s C if nothing is lost", more, Fixed(h.Rise, 0), more, Fixed(celsius(h.FinalKelvin), 0)))
	} else if slices.Contains(d.Codes, feed.CodeDilutionHeats) {
		s.Head = append(s.Head, "It warms by an amount that is not known here: small portions, a thermometer in it")
	}
	heat := d.Heat
	bound := ""
	if heat.Known && heat.AtLeast {
		bound = "at least"
	} else if heat.Known {
		bound = "about"
	}
	s.Figures = []Figure{
		worded("product", "", in.Product.Name),
		number("from_percent", "strength from", "% by weight", Some(in.Product.Strength*100), asShare),
		number("to_percent", "to", "% by weight", Some(in.To*100), asShare),
		number("product_l", "", "L", litres(d.ProductVolume), asVolume),
		number("product_kg", "", "kg", Some(d.ProductMass), asVolume),
		number("water_l", "", "L", litres(d.WaterVolume), asVolume),
		number("water_kg", "", "kg", Some(d.WaterMass), asVolume),
		number("made_l", "", "L", litres(d.Volume), asVolume),
		number("made_kg", "", "kg", Some(d.Mass), asVolume),
		number("shrinks_l", "less than the two volumes together by", "L", litres(d.Shrinks), asVolume),
		worded("heat_is", "", bound),
		number("rise_c", "", "C", onlyIf(heat.Known, heat.Rise), asDegrees),
		number("final_c", "", "C", onlyIf(heat.Known, celsius(heat.FinalKelvin)), asDegrees),
		freezes("product_freezes_c", "the product freezes near", d.FreezingFrom),
		freezes("made_freezes_c", "what is made freezes near", d.FreezingTo),
		worded("heat_source", "", heat.Source),
	}
	s.Warn("", d.Codes...)
	s.Handle(in.Product.Caution)
	return s
}

func freezes(key, label string, f feed.Freezing) Figure {
	unit := "C"
	if f.Unsure {
		unit = "C, unsure: see the supplier's curve"
	}
	return number(key, label, unit, onlyIf(f.Known, celsius(f.Kelvin)), rounding{decimals: 0})
}

// Gravity is a strength told by a density.
type Gravity struct {
	Product  dosing.Product
	Measured float64 // kg/m3
	Kelvin   float64
	Strength feed.Strength
}

// GravitySheet is the answer of a hydrometer.
func GravitySheet(in Gravity) Sheet {
	s := Sheet{Name: "strength"}
	g := in.Strength
	s.Head = []string{fmt.Sprintf("%s of %s kg/m3 at %s C is %s %% by weight", in.Product.Chemical.Name, Fixed(in.Measured, 1),
		Fixed(celsius(in.Kelvin), 1), Significant(g.Strength*100, 3))}
	for _, other := range g.Others {
		s.Head = append(s.Head, fmt.Sprintf("or %s %% by weight", Significant(other*100, 3)))
	}
	s.Figures = []Figure{
		worded("product", "", in.Product.Name),
		number("density_kg_m3", "", "kg/m3", Some(in.Measured), rounding{decimals: 1}),
		number("temperature_c", "", "C", Some(celsius(in.Kelvin)), asDegrees),
		number("strength_percent", "", "% by weight", Some(g.Strength*100), asShare),
		number("grams_per_litre", "which is", "g/L", Some(g.Strength*in.Measured), asVolume),
		number("catalogue_percent", "the catalogue has", "% by weight", Some(in.Product.Strength*100), asShare),
		number("per_gravity_point_percent", "0.001 of specific gravity changes it by", "% by weight", Some(g.PerKgM3*100), asShare),
		worded("source", "", g.Source),
	}
	var others []Number
	for _, o := range g.Others {
		others = append(others, Some(o*100))
	}
	if len(others) > 0 {
		s.Figures = append(s.Figures, number("other_strength_percent", "", "", others[0], asShare))
	}
	s.Warn("gravity", g.Codes...)
	s.Handle(in.Product.Caution)
	return s
}

// CarrierSheet is the answer about the water that takes a base to its feed
// point.
func CarrierSheet(c feed.Carrier, sc feed.Scale, product dosing.Product) Sheet {
	s := Sheet{Name: "carrier"}
	word, risk := "none", "No scale to speak of: the carrier water is soft"
	switch sc.Risk {
	case feed.SomeScale:
		word, risk = "some", "Some scale: look and clean often, better soften the carrier water"
	case feed.HeavyScale:
		word, risk = "heavy", "Heavy scale: soften the carrier water, or feed without one"
	}
	s.Head = []string{risk}
	s.Figures = []Figure{
		worded("risk", "risk", word),
		number("hardness_mg_l_caco3", "hardness", "mg/L as CaCO3", Some(c.Hardness*caco3PerMole), asMass),
		number("calcium_carbonate_g_m3", "calcium carbonate, at the most", "g per m3", Some(sc.CalciumCarbonate*milli), asMass),
		number("magnesium_hydroxide_g_m3", "magnesium hydroxide, at the most", "g per m3", Some(sc.MagnesiumHydroxide*milli), asMass),
		number("scale_kg_d", "in the line, at the most", "kg/d", onlyIf(c.Flow > 0, sc.PerSecond*secondsPerDay), asFeed),
	}
	if sc.Risk != feed.NoScaleRisk {
		s.Warnings = append(s.Warnings, Notice{"carrier_scales", "hardness", "over 35 to 50 mg/L of hardness the line of a base scales (common practice, no source)"})
	}
	s.Handle(product.Caution)
	return s
}
