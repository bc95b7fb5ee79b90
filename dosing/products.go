package dosing

import (
	"slices"

	"beckline/dosing/feed"
)

// Warning codes that come with a product as it is sold.
const purityAssumed = "purity_assumed" // a solid taken as 100 %

// products is the one table of what is delivered, in the order in which lists
// show it. Default strengths are common practice, no source; a plant states its
// own. Solids are taken as pure and say so.
var products = []Product{
	liquid("caustic-25", "caustic soda 25 %", "NaOH", 0.25, feed.SodiumHydroxide, PHControl, "caustic"),
	liquid("caustic-50", "caustic soda 50 %", "NaOH", 0.50, feed.SodiumHydroxide, PHControl, "caustic"),
	liquid("potassium-hydroxide-45", "potassium hydroxide 45 %", "KOH", 0.45, feed.PotassiumHydroxide, PHControl, "potassium-hydroxide"),
	solid("lime", "hydrated lime", "Ca(OH)2", PHControl, "lime"),
	solid("quicklime", "quicklime", "CaO", PHControl, "quicklime"),
	liquid("magnesium-hydroxide-60", "magnesium hydroxide slurry 60 %", "Mg(OH)2", 0.60, feed.MagnesiumHydroxide, PHControl, "magnesium-hydroxide"),
	solid("soda-ash", "soda ash", "Na2CO3", PHControl, "soda-ash"),
	liquid("soda-ash-10", "soda ash solution 10 %", "Na2CO3", 0.10, feed.SodiumCarbonate, PHControl, "soda-ash"),
	solid("bicarbonate", "sodium bicarbonate", "NaHCO3", PHControl, "bicarbonate"),
	gas("carbon-dioxide", "carbon dioxide", "CO2", PHControl, "carbon-dioxide"),
	liquid("sulfuric-93", "sulfuric acid 93 %", "H2SO4", 0.93, feed.SulfuricAcid, PHControl, "sulfuric-acid"),
	liquid("sulfuric-98", "sulfuric acid 98 %", "H2SO4", 0.98, feed.SulfuricAcid, PHControl, "sulfuric-acid"),
	liquid("hydrochloric-32", "hydrochloric acid 32 %", "HCl", 0.32, feed.HydrochloricAcid, PHControl, "hydrochloric-acid"),
	liquid("hydrochloric-37", "hydrochloric acid 37 %", "HCl", 0.37, feed.HydrochloricAcid, PHControl, "hydrochloric-acid"),
	liquid("nitric-60", "nitric acid 60 %", "HNO3", 0.60, feed.NitricAcid, Neutralisation, "nitric-acid"),
	liquid("phosphoric-75", "phosphoric acid 75 %", "H3PO4", 0.75, feed.PhosphoricAcid, Inhibitor, "phosphoric-acid"),
	liquid("acetic-80", "acetic acid 80 %", "CH3COOH", 0.80, feed.AceticAcid, Neutralisation, "acetic-acid"),
	liquid("formic-85", "formic acid 85 %", "HCOOH", 0.85, feed.FormicAcid, Neutralisation, "formic-acid"),
	liquid("citric-50", "citric acid 50 %", "C6H8O7", 0.50, feed.CitricAcid, Neutralisation, "citric-acid"),
	solid("alum-dry", "dry alum", "Al2(SO4)3.14.3H2O", Coagulation, "alum-dry"),
	liquid("alum-liquid", "liquid alum 48.5 %", "Al2(SO4)3.14.3H2O", 0.485, feed.LiquidAlum, Coagulation, "alum-liquid",
		"48.5 % by weight as dry alum"),
	liquid("ferric-chloride-40", "ferric chloride 40 %", "FeCl3", 0.40, feed.FerricChloride, Coagulation, "ferric-chloride"),
	liquid("ferric-sulfate-43", "ferric sulfate 43 %", "Fe2(SO4)3", 0.43, feed.FerricSulfate, Coagulation, "ferric-sulfate"),
	liquid("pacl-10", "polyaluminium chloride 10 % Al2O3", "Al2O3", 0.10, feed.PolyaluminiumChloride, Coagulation, "polyaluminium-chloride",
		"10 % by weight as Al2O3, basicity 0.5"),
	gas("chlorine-gas", "chlorine gas", "Cl2", Disinfection, "chlorine"),
	hypochlorite("hypochlorite-12", "sodium hypochlorite 12.5 % trade", 0.125, 5, "hypochlorite"),
	availableChlorine("calcium-hypochlorite-65", "calcium hypochlorite 65 %", 0.65, "calcium-hypochlorite"),
	liquid("ammonia-19", "aqua ammonia 19 %", "NH3", 0.19, feed.AquaAmmonia, Disinfection, "ammonia"),
	liquid("ammonium-sulfate-40", "ammonium sulfate solution 40 %", "(NH4)2SO4", 0.40, feed.AmmoniumSulfate, Disinfection, "ammonium-sulfate"),
	liquid("hydrofluorosilicic-23", "hydrofluorosilicic acid 23 %", "H2SiF6", 0.23, feed.FluorosilicicAcid, Fluoridation, "fluorosilicic-acid"),
	solid("sodium-fluoride", "sodium fluoride", "NaF", Fluoridation, "sodium-fluoride"),
	liquid("sodium-silicate", "sodium silicate 37 %", "Na2O.3.3SiO2", 0.37, feed.SodiumSilicate, Inhibitor, "sodium-silicate",
		"37 % solids by weight, 3.3 SiO2 to Na2O by moles"),
}

// Products returns every product of the catalogue, in its order. The slice is
// the caller's to change.
func Products() []Product {
	out := slices.Clone(products)
	for i := range out {
		out[i] = out[i].copy()
	}
	return out
}

// ProductByName finds a product by its exact name, such as "caustic-25".
func ProductByName(name string) (Product, bool) {
	for _, p := range products {
		if p.Name == name {
			return p.copy(), true
		}
	}
	return Product{}, false
}

// copy is p with slices of its own.
func (p Product) copy() Product {
	p.Chemical.Bases = slices.Clone(p.Chemical.Bases)
	p.Warns = slices.Clone(p.Warns)
	return p
}
