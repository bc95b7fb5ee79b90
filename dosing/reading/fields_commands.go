package reading

// commandTable holds quantities that single commands ask for. They are no
// readings of a water and no settings of its feed, so no column and no form has
// them.
var commandTable = build([]Field{
	{
		Name: "tank", Key: "tank_m3", Label: "tank", Group: Setting,
		Help:  "volume of water in a tank that is treated instead of a flow",
		units: volumeUnits, decimals: 3, trim: true,
		limits: limits{low: 0, lowOpen: true, high: 1e6, usualLow: 0.01, usualHigh: 1e5},
	},
	bench("sample", "sample_ml", "volume of the sample", labVolumeUnits, 1000, true),
	bench("start", "start_ml", "burette before the titration; 0 where not given", labVolumeUnits, 50, false),
	bench("end", "end_ml", "burette at the end point", labVolumeUnits, 50, false),
	bench("used", "used_ml", "titrant used, instead of start and end", labVolumeUnits, 50, false),
	bench("low-end", "low_end_ml", "burette at a second end point 0.30 pH below the first: the method under 20 mg/L", labVolumeUnits, 50, false),
	bench("phenolphthalein-end", "phenolphthalein_end_ml", "burette where phenolphthalein lost its colour, pH 8.3", labVolumeUnits, 50, false),
	bench("calcium-used", "calcium_used_ml", "titrant used at pH 12 with a calcium indicator, on as much sample", labVolumeUnits, 50, false),
	bench("ml", "ml", "acid added since the start", labVolumeUnits, 500, false),
	bench("normality", "normality_eq_l", "strength of the acid", normalityUnits, 5, true),
	bench("molarity", "molarity_mol_l", "strength of the EDTA; the standard takes 0.01", molarityUnits, 0.5, true),
	bench("coefficient", "coefficient_percent_k", "change of the conductivity with temperature; 1.91 where not given", coefficientUnits, 3, true),
	alkalinityPart(),
	bench("end-ph", "end_ph", "pH at the first end point", phUnits, 14, false),
	bench("low-end-ph", "low_end_ph", "pH at the second end point", phUnits, 14, false),
	bench("meter-set", "meter_set_c", "temperature to which the pH meter was set", temperatureUnits, 50, false),
	bench("sample-temperature", "sample_temperature_c", "temperature of the sample in which it was read", temperatureUnits, 50, false),
})

// bench is a quantity of the bench: 0, or above it, to high in its bare unit.
// What is unusual of it, the method says.
func bench(name, key, help string, units []unit, high float64, open bool) Field {
	return Field{Name: name, Key: key, Label: name, Help: help, Group: Reading, units: units, decimals: 4, trim: true,
		limits: limits{low: 0, lowOpen: open, high: high, usualLow: 0, usualHigh: high}}
}

func alkalinityPart() Field {
	f := bench("p-alkalinity", "p_alkalinity_mg_l_caco3", "phenolphthalein alkalinity, to pH 8.3", alkalinityUnits, 5000, true)
	f.decimals = 1
	return f
}

// Command finds a quantity of a single command by its command-line name: tank
// (m3), the volumes of the bench (m3), normality (eq/L), molarity (mol/L),
// coefficient (per K), p-alkalinity (eq/L), the end points' pH; of pumps, tanks,
// jars and a running plant volumes (m3), rates (m3/s), times (s), masses (kg),
// temperatures (K), shares, a specific gravity.
func Command(name string) (Field, bool) {
	for _, table := range [][]Field{commandTable, equipmentTable} {
		for _, f := range table {
			if f.Name == name {
				return f, true
			}
		}
	}
	return Field{}, false
}

// volumeUnits convert the volume of a tank to m3. A gallon is the US gallon
// unless imperial is said.
var volumeUnits = []unit{
	{name: "m³", also: []string{"M3", "cubic metres", "cubic meters"}, factor: 1},
	{name: "L", also: []string{"litres", "liters", "litre", "liter"}, factor: litre},
	{name: "ML", factor: 1e6 * litre},
	{name: "gal (US)", also: []string{"gal", "US gal", "gal US", "gallons"}, factor: usGallon},
	{name: "imperial gal", also: []string{"imp gal", "gal imperial", "UK gal"}, factor: imperialGallon},
	{name: "ft³", also: []string{"cubic feet", "cu ft"}, factor: cubicFoot},
}

// labVolumeUnits convert volumes of the bench to m3.
var labVolumeUnits = []unit{
	{name: "mL", also: []string{"cm3", "cc"}, factor: 1e-3 * litre},
	{name: "L", also: []string{"litres", "liters"}, factor: litre},
}

// normalityUnits convert the strength of an acid to eq/L.
var normalityUnits = []unit{
	{name: "eq/L", also: []string{"N"}, factor: 1},
	{name: "meq/L", factor: perMille},
}

// molarityUnits convert the strength of EDTA to mol/L. What a bottle states is
// the CaCO3 that a millilitre takes.
var molarityUnits = []unit{
	{name: "mol/L", also: []string{"M"}, factor: 1},
	{name: "mmol/L", also: []string{"mM"}, factor: perMille},
	{name: "mg CaCO3/mL", also: []string{"mg/mL as CaCO3", "mg/mL CaCO3"}, factor: 1 / gCaCO3},
}

var coefficientUnits = []unit{{name: "%/K", also: []string{"%", "%/C", "%/°C", "% per kelvin"}, factor: 0.01}}
