package check

import (
	"fmt"

	"beckline/carbonate"
	"beckline/dosing"
)

// stoichiometry computes the alkalinity that a milligram of a chemical adds,
// or takes where negative.
func stoichiometry(r record) Outcome {
	per := r["basis"]
	if per == "" {
		per = r["formula"]
	}
	o := Outcome{
		Name:      fmt.Sprintf("alkalinity from %s, per mg as %s", r["formula"], per),
		Unit:      "mg CaCO3/mg",
		Published: r.number("mg_caco3_per_mg"), Tolerance: r.number("tolerance"),
	}
	c, ok := dosing.ChemicalByFormula(r["formula"])
	if !ok {
		o.Err = fmt.Errorf("check: unknown chemical %s", r["formula"])
		return o
	}
	mass := c.MolarMass
	if basis := r["basis"]; basis != "" {
		if mass = basisMass(c, basis); mass == 0 {
			o.Err = fmt.Errorf("check: %s has no basis %s", c.Formula, basis)
			return o
		}
	}
	o.Value = c.Equivalents * carbonate.MolarMassCaCO3 / 2 / mass * r.number("purity")
	return o
}

// basisMass is the mass of a basis per mole of the chemical, g; 0 for none. An
// acid's own anion is not among the bases in which doses are stated.
func basisMass(c dosing.Chemical, basis string) float64 {
	for _, b := range c.Bases {
		if b.Name == basis {
			return b.Mass
		}
	}
	if basis == carbonate.Chloride.Formula() {
		return carbonate.Chloride.MolarMass() * c.Adds[carbonate.Chloride]
	}
	return 0
}
