package report

import (
	"math"

	"beckline/carbonate"
	"beckline/dosing"
)

// waterSpec describes one figure of a water.
type waterSpec struct {
	key, label, unit string
	shown            rounding
	value            func(*dosing.Figures) Number
	text             func(*dosing.Figures) string
}

// Roundings by what the readings behind a figure support: a pH meter reads to
// 0.01, a titration to about 0.1 mg/L or 3 digits (common practice, no source).
var (
	asPH       = rounding{decimals: 2}
	asIndex    = rounding{decimals: 2, signed: true}
	asMass     = rounding{decimals: 1, significant: 3}
	asFine     = rounding{decimals: 3, significant: 3}
	asRatio    = rounding{decimals: 2, significant: 3}
	asDegrees  = rounding{decimals: 1}
	asCCPP     = rounding{decimals: 1, significant: 3, signed: true}
	asStrength = rounding{decimals: 6, significant: 3}
)

var waterSpecs = []waterSpec{
	{key: "ph", label: "pH", shown: asPH,
		value: func(f *dosing.Figures) Number { return Some(f.PH) }},
	{key: "alkalinity_mg_l_caco3", label: "alkalinity", unit: "mg/L as CaCO3", shown: asMass,
		value: func(f *dosing.Figures) Number { return Some(f.Alkalinity * caco3PerEquivalent) }},
	{key: "temperature_c", label: "temperature", unit: "C", shown: asDegrees,
		value: func(f *dosing.Figures) Number { return Some(celsius(f.Water.Kelvin)) }},
	{key: "dic_mmol_l", label: "inorganic carbon", unit: "mmol/L", shown: asFine,
		value: func(f *dosing.Figures) Number { return Some(f.DIC * milli) }},
	{key: "free_co2_mg_l", label: "free CO2", unit: "mg/L", shown: asRatio,
		value: func(f *dosing.Figures) Number { return Some(f.FreeCO2 * carbonDioxideMass * milli) }},
	{key: "ionic_strength_mol_l", label: "ionic strength", unit: "mol/L", shown: asStrength,
		value: func(f *dosing.Figures) Number { return Some(f.IonicStrength) }},
	{key: "ionic_strength_from", label: "ionic strength from",
		text: func(f *dosing.Figures) string { return route(f.IonicStrengthFrom) }},
	{key: "saturation_index", label: "saturation index", unit: "calcite", shown: asIndex,
		value: func(f *dosing.Figures) Number { return scaled(f.SaturationIndex, 1) }},
	{key: "saturation_index_aragonite", label: "saturation index", unit: "aragonite", shown: asIndex,
		value: func(f *dosing.Figures) Number { return scaled(f.SaturationAragonite, 1) }},
	{key: "ccpp_mg_l_caco3", label: "CCPP", unit: "mg/L as CaCO3", shown: asCCPP,
		value: func(f *dosing.Figures) Number { return scaled(f.CCPP, caco3PerMole) }},
	{key: "buffer_intensity_meq_l_ph", label: "buffer intensity", unit: "meq/L per pH", shown: asFine,
		value: func(f *dosing.Figures) Number { return Some(f.BufferIntensity * milli) }},
	{key: "chloride_sulfate_mass_ratio", label: "chloride to sulfate", unit: "by mass", shown: asRatio,
		value: func(f *dosing.Figures) Number { return scaled(f.ChlorideSulfate, 1) }},
	{key: "larson_ratio", label: "Larson ratio", shown: asRatio,
		value: func(f *dosing.Figures) Number { return scaled(f.LarsonRatio, 1) }},
	{key: "calcium_mg_l", label: "calcium", unit: "mg/L as Ca", shown: asMass,
		value: func(f *dosing.Figures) Number { return scaled(f.Calcium, milligrams(carbonate.Calcium)) }},
	{key: "magnesium_mg_l", label: "magnesium", unit: "mg/L as Mg", shown: asMass,
		value: func(f *dosing.Figures) Number { return scaled(f.Magnesium, milligrams(carbonate.Magnesium)) }},
	{key: "sodium_mg_l", label: "sodium", unit: "mg/L as Na", shown: asMass,
		value: func(f *dosing.Figures) Number { return scaled(f.Sodium, milligrams(carbonate.Sodium)) }},
	{key: "chloride_mg_l", label: "chloride", unit: "mg/L as Cl", shown: asMass,
		value: func(f *dosing.Figures) Number { return scaled(f.Chloride, milligrams(carbonate.Chloride)) }},
	{key: "sulfate_mg_l", label: "sulfate", unit: "mg/L as SO4", shown: asMass,
		value: func(f *dosing.Figures) Number { return scaled(f.Sulfate, milligrams(carbonate.Sulfate)) }},
}

// Water returns the figures of one water in their fixed order, every key always
// there.
func Water(f *dosing.Figures) []Figure {
	figures := make([]Figure, len(waterSpecs))
	for i, s := range waterSpecs {
		figures[i] = Figure{Key: s.key, Label: s.label, Unit: s.unit, shown: s.shown}
		if s.text != nil {
			figures[i].Text, figures[i].IsText = s.text(f), true
		} else {
			figures[i].Value = s.value(f)
		}
	}
	return figures
}

// celsius turns K into °C. The subtraction leaves the rounding noise of a
// number near 300 on one that may be near 1; a tenth of a nanokelvin cuts it.
func celsius(kelvin float64) float64 {
	return math.Round((kelvin-kelvinAtZero)*1e10) / 1e10
}

func route(r dosing.IonicRoute) string {
	switch r {
	case dosing.FromConductivity:
		return "conductivity"
	case dosing.FromTDS:
		return "tds"
	}
	return "ions"
}
