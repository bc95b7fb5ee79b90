package dosing

import (
	"slices"

	"beckline/carbonate"
)

// Grams per mole of the bases on which the trade states doses (IUPAC abridged
// atomic masses: N 14.007, F 18.998, P 30.974, Cl 35.453, Al 26.982, Fe 55.845,
// O 15.999, Si 28.085, Ca 40.078, H 1.008).
const (
	gramsCl2    = 70.906
	gramsF      = 18.998
	gramsN      = 14.007
	gramsP      = 30.974
	gramsPO4    = 94.970
	gramsFe     = 55.845
	gramsAl     = 26.982
	gramsAl2O3  = 101.961
	gramsSiO2   = 60.083
	gramsCaO    = 56.077
	gramsCaOH2  = 74.093
	gramsNaOH   = 39.997
	gramsNa2O   = 61.979
	gramsNaOCl  = 74.442
	gramsCaOCl2 = 142.98
)

// silicateRatio is SiO2 to Na2O by moles. The trade's ratio is by weight: its
// usual 3.22 is 3.32 by moles, this 3.3 is 3.20 by weight (common practice, no
// source); the two are within 1 % of each other.
const silicateRatio = 3.3

// paclBasicity is OH/(3 Al) of the polyaluminium chloride in the table: that
// share of its aluminium is already neutralised (common practice, no source).
const paclBasicity = 0.5

// chemicals is the one table of pure substances. Equivalents and totals per
// mole follow from the reaction to the reference species of the proton
// condition (CO2, SO4, NH4+, H2PO4-, H4SiO4, F-, HOCl, uncharged organic
// acids), with all aluminium and iron leaving as the hydroxide. Each row obeys
// the charge identity: Equivalents = sum of Adds times reference charge.
var chemicals = []Chemical{
	{Formula: "NaOH", Name: "sodium hydroxide", MolarMass: gramsNaOH, Equivalents: 1,
		Adds: carbonate.Totals{carbonate.Sodium: 1}},
	{Formula: "KOH", Name: "potassium hydroxide", MolarMass: 56.106, Equivalents: 1,
		Adds: carbonate.Totals{carbonate.Potassium: 1}},
	{Formula: "Ca(OH)2", Name: "calcium hydroxide", MolarMass: gramsCaOH2, Equivalents: 2,
		Adds:  carbonate.Totals{carbonate.Calcium: 1},
		Bases: []Basis{{Name: "CaO", Mass: gramsCaO}}},
	{Formula: "CaO", Name: "calcium oxide", MolarMass: gramsCaO, Equivalents: 2,
		Adds:  carbonate.Totals{carbonate.Calcium: 1},
		Bases: []Basis{{Name: "Ca(OH)2", Mass: gramsCaOH2}}},
	{Formula: "Mg(OH)2", Name: "magnesium hydroxide", MolarMass: 58.320, Equivalents: 2,
		Adds: carbonate.Totals{carbonate.Magnesium: 1}},
	{Formula: "Na2CO3", Name: "sodium carbonate", MolarMass: 105.988, Equivalents: 2,
		Adds: carbonate.Totals{carbonate.Carbon: 1, carbonate.Sodium: 2}},
	{Formula: "NaHCO3", Name: "sodium bicarbonate", MolarMass: 84.007, Equivalents: 1,
		Adds: carbonate.Totals{carbonate.Carbon: 1, carbonate.Sodium: 1}},
	{Formula: "CO2", Name: "carbon dioxide", MolarMass: 44.009, Equivalents: 0,
		Adds: carbonate.Totals{carbonate.Carbon: 1}},
	// Dissolved in a limestone contactor; sold as stone, so no product.
	{Formula: "CaCO3", Name: "calcium carbonate", MolarMass: carbonate.MolarMassCaCO3, Equivalents: 2,
		Adds: carbonate.Totals{carbonate.Calcium: 1, carbonate.Carbon: 1}},
	{Formula: "H2SO4", Name: "sulfuric acid", MolarMass: 98.079, Equivalents: -2,
		Adds: carbonate.Totals{carbonate.Sulfate: 1}},
	{Formula: "HCl", Name: "hydrogen chloride", MolarMass: 36.461, Equivalents: -1,
		Adds: carbonate.Totals{carbonate.Chloride: 1}},
	{Formula: "HNO3", Name: "nitric acid", MolarMass: 63.013, Equivalents: -1,
		Adds:  carbonate.Totals{carbonate.Nitrate: 1},
		Bases: []Basis{{Name: "N", Mass: gramsN}}},
	{Formula: "H3PO4", Name: "phosphoric acid", MolarMass: 97.995, Equivalents: -1,
		Adds:  carbonate.Totals{carbonate.Phosphate: 1},
		Bases: []Basis{{Name: "PO4", Mass: gramsPO4, Habitual: true}, {Name: "P", Mass: gramsP}}},
	{Formula: "CH3COOH", Name: "acetic acid", MolarMass: 60.052, Equivalents: 0,
		Adds: carbonate.Totals{carbonate.Acetate: 1}},
	{Formula: "HCOOH", Name: "formic acid", MolarMass: 46.025, Equivalents: 0,
		Adds: carbonate.Totals{carbonate.Formate: 1}},
	{Formula: "C6H8O7", Name: "citric acid", MolarMass: 192.12, Equivalents: 0,
		Adds: carbonate.Totals{carbonate.Citrate: 1}},
	// 14.3 waters make 17.0 % Al2O3, the grade sold as dry alum.
	{Formula: "Al2(SO4)3.14.3H2O", Name: "aluminium sulfate (alum)", MolarMass: 599.76, Equivalents: -6,
		Adds:      carbonate.Totals{carbonate.Sulfate: 3},
		Bases:     []Basis{{Name: "Al", Mass: 2 * gramsAl}, {Name: "Al2O3", Mass: gramsAl2O3}},
		Coagulant: Aluminium},
	{Formula: "FeCl3", Name: "ferric chloride", MolarMass: 162.204, Equivalents: -3,
		Adds:      carbonate.Totals{carbonate.Chloride: 3},
		Bases:     []Basis{{Name: "Fe", Mass: gramsFe, Habitual: true}},
		Coagulant: Iron},
	{Formula: "Fe2(SO4)3", Name: "ferric sulfate", MolarMass: 399.88, Equivalents: -6,
		Adds:      carbonate.Totals{carbonate.Sulfate: 3},
		Bases:     []Basis{{Name: "Fe", Mass: 2 * gramsFe, Habitual: true}},
		Coagulant: Iron},
	// One mole here is one mole of aluminium, stated as half a mole of Al2O3.
	{Formula: "Al2O3", Name: "polyaluminium chloride", MolarMass: 50.98, Equivalents: -3 * (1 - paclBasicity),
		Adds:      carbonate.Totals{carbonate.Chloride: 3 * (1 - paclBasicity)},
		Bases:     []Basis{{Name: "Al", Mass: gramsAl}},
		Coagulant: Aluminium},
	{Formula: "Cl2", Name: "chlorine", MolarMass: gramsCl2, Equivalents: -1,
		Adds: carbonate.Totals{carbonate.Chlorine: 1, carbonate.Chloride: 1}},
	sodiumHypochlorite(0),
	{Formula: "Ca(OCl)2", Name: "calcium hypochlorite", MolarMass: gramsCaOCl2, Equivalents: 2,
		Adds:  carbonate.Totals{carbonate.Chlorine: 2, carbonate.Calcium: 1},
		Bases: []Basis{{Name: "Cl2", Mass: 2 * gramsCl2, Habitual: true}}},
	{Formula: "NH3", Name: "ammonia", MolarMass: 17.031, Equivalents: 1,
		Adds:  carbonate.Totals{carbonate.Ammonia: 1},
		Bases: []Basis{{Name: "N", Mass: gramsN, Habitual: true}}},
	{Formula: "(NH4)2SO4", Name: "ammonium sulfate", MolarMass: 132.14, Equivalents: 0,
		Adds:  carbonate.Totals{carbonate.Ammonia: 2, carbonate.Sulfate: 1},
		Bases: []Basis{{Name: "N", Mass: 2 * gramsN, Habitual: true}}},
	{Formula: "H2SiF6", Name: "hydrofluorosilicic acid", MolarMass: 144.09, Equivalents: -6,
		Adds:  carbonate.Totals{carbonate.Fluoride: 6, carbonate.Silica: 1},
		Bases: []Basis{{Name: "F", Mass: 6 * gramsF, Habitual: true}}},
	{Formula: "Na2SiF6", Name: "sodium fluorosilicate", MolarMass: 188.06, Equivalents: -4,
		Adds:  carbonate.Totals{carbonate.Fluoride: 6, carbonate.Silica: 1, carbonate.Sodium: 2},
		Bases: []Basis{{Name: "F", Mass: 6 * gramsF, Habitual: true}}},
	{Formula: "NaF", Name: "sodium fluoride", MolarMass: 41.988, Equivalents: 0,
		Adds:  carbonate.Totals{carbonate.Fluoride: 1, carbonate.Sodium: 1},
		Bases: []Basis{{Name: "F", Mass: gramsF, Habitual: true}}},
	{Formula: "Na2O.3.3SiO2", Name: "sodium silicate", MolarMass: gramsNa2O + silicateRatio*gramsSiO2, Equivalents: 2,
		Adds:  carbonate.Totals{carbonate.Sodium: 2, carbonate.Silica: silicateRatio},
		Bases: []Basis{{Name: "SiO2", Mass: silicateRatio * gramsSiO2, Habitual: true}}},
}

// sodiumHypochlorite is NaOCl as it is made: from chlorine and caustic, so one
// mole of NaCl comes with each mole of it, and with them excess mol of free
// NaOH per mole of NaOCl (0 or more) that keeps the product from decaying.
func sodiumHypochlorite(excess float64) Chemical {
	return Chemical{
		Formula: "NaOCl", Name: "sodium hypochlorite", MolarMass: gramsNaOCl, Equivalents: 1 + excess,
		Adds:  carbonate.Totals{carbonate.Chlorine: 1, carbonate.Sodium: 2 + excess, carbonate.Chloride: 1},
		Bases: []Basis{{Name: "Cl2", Mass: gramsCl2, Habitual: true}},
	}
}

// Chemicals returns every pure substance that the program knows, in the order
// of the table: bases, carbonates, acids, coagulants, disinfectants, fluorides,
// silicate. The slice and its bases are the caller's to change.
func Chemicals() []Chemical {
	out := slices.Clone(chemicals)
	for i := range out {
		out[i].Bases = slices.Clone(out[i].Bases)
	}
	return out
}

// ChemicalByFormula finds a chemical by the formula of its default basis, as
// written in the table ("NaOH"). PolyAluminium chloride is under "Al2O3".
func ChemicalByFormula(formula string) (Chemical, bool) {
	for _, c := range chemicals {
		if c.Formula == formula {
			c.Bases = slices.Clone(c.Bases)
			return c, true
		}
	}
	return Chemical{}, false
}
