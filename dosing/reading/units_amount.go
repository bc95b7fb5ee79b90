package reading

// stated is a formula by which an amount may be stated: grams per mole of the
// reading's own formula.
type stated struct {
	formula string
	grams   float64
}

// amountUnits lists the units of a concentration that convert to mol/L. The
// first formula is the one that a bare mg/L means; charge is that of the ion,
// 0 where milliequivalents would be unclear.
func amountUnits(charge float64, forms ...stated) []unit {
	bare := forms[0]
	units := []unit{
		{name: "mg/L as " + bare.formula, also: []string{"mg/L", "MG/L", "ppm", "ppm " + bare.formula, "g/m3", "MG/L " + bare.formula}, factor: perMille / bare.grams},
		{name: "µg/L as " + bare.formula, also: []string{"ug/L", "ppb", "mg/m3"}, factor: 1e-6 / bare.grams},
		{name: "g/L as " + bare.formula, also: []string{"g/L"}, factor: 1 / bare.grams},
		{name: "mmol/L", also: []string{"mol/m3"}, factor: perMille},
		{name: "µmol/L", factor: 1e-6},
	}
	if charge != 0 {
		units = append(units, unit{name: "meq/L", also: []string{"MEQ/L"}, factor: perMille / charge})
	}
	for _, f := range forms[1:] {
		units = append(units, unit{
			name:   "mg/L as " + f.formula,
			also:   []string{"MG/L " + f.formula, "ppm " + f.formula},
			factor: perMille / f.grams,
		})
	}
	return units
}

// carbonUnits convert dissolved inorganic carbon to mol/L of C.
var carbonUnits = []unit{
	{name: "mmol/L", also: []string{"mmol/L C", "mol/m3"}, factor: perMille},
	{name: "mg/L as C", also: []string{"mg C/L", "ppm C", "MG/L C"}, factor: perMille / gC},
	{name: "mg/L as CO2", also: []string{"ppm CO2"}, factor: perMille / gCO2},
	{name: "µmol/L", factor: 1e-6},
}

// Inorganic carbon is stated as C, as CO2 and as HCO3; a bare mg/L is any.
var carbonUnclear = []unclear{{[]string{"mg/L", "ppm", "MG/L", "g/m3"}, "mmol/L, mg/L as C or mg/L as CO2"}}
