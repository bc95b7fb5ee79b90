package reading

import "math"

var phUnits = []unit{{name: "pH", factor: 1}}

var indexUnits = []unit{{name: "SI", factor: 1}}

var temperatureUnits = []unit{
	{name: "°C", also: []string{"C", "Celsius", "°Celsius"}, factor: 1, offset: zeroCelsius},
	{name: "°F", also: []string{"F", "Fahrenheit", "°Fahrenheit"}, factor: 5.0 / 9.0, offset: zeroFahrenheit},
	{name: "K", also: []string{"kelvin"}, factor: 1},
}

var temperatureUnclear = []unclear{{[]string{"°"}, "°C, °F or K"}}

// asCaCO3 lists the units that state an amount as calcium carbonate; mole is
// the SI amount in one mole of CaCO3: 1 for hardness, 2 for alkalinity.
func asCaCO3(mole float64) []unit {
	return []unit{
		{name: "mg/L as CaCO3", also: []string{"mg/L", "MG/L", "MG/L CaCO3", "ppm", "ppm CaCO3", "g/m3", "g/m3 CaCO3"}, factor: perMille * mole / gCaCO3},
		{name: "°dH", also: []string{"dH", "°d"}, factor: germanDegree * mole},
		{name: "°fH", also: []string{"fH", "°f"}, factor: frenchDegree * mole},
		{name: "°e", also: []string{"°eH", "°Clark", "Clark"}, factor: englishDegree * mole},
		{name: "gpg", also: []string{"grains/gallon", "grains/gal", "gr/gal", "US gpg", "gpg US"}, factor: grainPerGallon * mole},
	}
}

// A capital F after a degree sign is a temperature, not a French degree; 3e may
// be a number whose exponent is missing.
var degreeUnclear = []unclear{
	{[]string{"e"}, "°e (English degrees), or a whole exponent such as 3e1"},
	{[]string{"°"}, "°dH, °fH or °e"},
	{[]string{"°F"}, "°fH (French degrees)"},
}

// alkalinityUnits convert to eq/L.
var alkalinityUnits = insert(asCaCO3(2), []unit{
	{name: "meq/L", also: []string{"MEQ/L", "meq HCO3/L", "mval/L"}, factor: perMille},
	{name: "mmol/L H+", also: []string{"mmol H+/L"}, factor: perMille},
	{name: "µeq/L", factor: 1e-6},
	{name: "mg/L as HCO3", also: []string{"mg/L HCO3-", "MG/L HCO3", "mg/L bicarbonate", "ppm HCO3"}, factor: perMille / gHCO3},
}, unit{name: "°dKH", also: []string{"dKH"}, factor: germanDegree * 2})

// A millimole of alkalinity may mean one of CaCO3 (two equivalents) or one of
// acid (one equivalent).
var alkalinityUnclear = append([]unclear{
	{[]string{"mmol/L", "mmol"}, "meq/L or mmol/L H+"},
}, degreeUnclear...)

// hardnessUnits convert to mol/L of Ca + Mg.
var hardnessUnits = insert(asCaCO3(1), []unit{
	{name: "mmol/L", also: []string{"mmol/L CaCO3", "mmol/L Ca+Mg"}, factor: perMille},
	{name: "meq/L", also: []string{"MEQ/L", "mval/L"}, factor: perMille / 2},
}, unit{name: "°dGH", also: []string{"dGH"}, factor: germanDegree})

// calciumHardnessUnits convert to mol/L of Ca; the metal may be named.
var calciumHardnessUnits = insert(asCaCO3(1), []unit{
	{name: "mmol/L", also: []string{"mmol/L CaCO3", "mmol/L Ca"}, factor: perMille},
	{name: "meq/L", also: []string{"MEQ/L", "mval/L"}, factor: perMille / 2},
	{name: "mg/L as Ca", also: []string{"ppm Ca"}, factor: perMille / gCa},
})

// insert puts more units after the first, the bare one, and others at the end.
func insert(units, after []unit, last ...unit) []unit {
	out := append([]unit{units[0]}, after...)
	out = append(out, units[1:]...)
	return append(out, last...)
}

var precipitationUnits = []unit{
	{name: "mg/L as CaCO3", also: []string{"mg/L", "MG/L", "ppm", "ppm CaCO3", "g/m3"}, factor: perMille / gCaCO3},
	{name: "mmol/L", also: []string{"mmol/L CaCO3"}, factor: perMille},
}

// conductivityUnits convert to S/m; a mho is a siemens.
var conductivityUnits = []unit{
	{name: "µS/cm", also: []string{"umho/cm", "umhos/cm"}, factor: 1e-4},
	{name: "mS/m", factor: 1e-3},
	{name: "mS/cm", also: []string{"mmho/cm", "mmhos/cm", "dS/m"}, factor: 0.1},
	{name: "S/m", factor: 1},
}

// dissolvedUnits convert to kg/m3.
var dissolvedUnits = []unit{
	{name: "mg/L", also: []string{"MG/L", "ppm", "g/m3"}, factor: perMille},
	{name: "g/L", also: []string{"kg/m3"}, factor: 1},
}

var none = math.Inf(1) // a limit that does not exist; negated below
