package reading

// A negative alkalinity is free mineral acid, which the model does not take as
// a reading.
const mineralAcidity = "below 0 is mineral acidity, which is not taken as an alkalinity"

var waterFields = []Field{
	{
		Name: "ph", Key: "ph", Label: "pH", Group: Reading, Step: 0.05,
		Help:  "pH of the water as read on the meter",
		units: phUnits, decimals: 2,
		limits: limits{low: 0, high: 14, usualLow: 5.5, usualHigh: 10.5},
	},
	{
		Name: "ph-temperature", Key: "ph_temperature_c", Label: "pH read at", Group: Reading, Step: 0.5,
		Help:  "temperature of the sample when its pH was read, where not that of the process",
		units: temperatureUnits, decimals: 1,
		limits: limits{low: 0, high: 50, usualLow: 1, usualHigh: 30, meantHigh: "°F"},
	},
	{
		Name: "alkalinity", Key: "alkalinity_mg_l_caco3", Label: "alkalinity", Group: Reading, Step: 1,
		Help:  "total alkalinity",
		units: alkalinityUnits, decimals: 1,
		limits: limits{low: 0, high: 5000, usualLow: 5, usualHigh: 400, lowNote: mineralAcidity, meantLow: "meq/L"},
	},
	{
		Name: "temperature", Key: "temperature_c", Label: "temperature", Group: Reading, Step: 0.5,
		Help:  "temperature of the water in the process",
		units: temperatureUnits, decimals: 1,
		limits: limits{low: 0, high: 50, usualLow: 1, usualHigh: 30, meantHigh: "°F"},
	},
	{
		// The largest works in the world treat about 200 000 m3/h.
		Name: "flow", Key: "flow_m3_h", Label: "flow", Group: Reading, Step: 10, relative: true,
		Help:  "flow of water past the feed point",
		units: flowUnits, decimals: 2, trim: true,
		limits: limits{low: 0, lowOpen: true, high: 1e6, usualLow: 0.1, usualHigh: 50000},
	},
}

var bulkFields = []Field{
	{
		Name: "dic", Key: "dic_mmol_l", Label: "DIC", Group: Reading, Step: 0.05,
		Help:  "dissolved inorganic carbon as measured; the pH is then checked, not used",
		units: carbonUnits, decimals: 3,
		limits: limits{low: 0, high: 200, usualLow: 0.02, usualHigh: 12, meantHigh: "mg/L as C"},
	},
	{
		Name: "conductivity", Key: "conductivity_us_cm", Label: "conductivity", Group: Reading, Step: 10, relative: true,
		Help:  "electrical conductivity at 25 °C, for the ionic strength",
		units: conductivityUnits, decimals: 1, trim: true,
		limits: limits{low: 0, lowOpen: true, high: 70000, usualLow: 20, usualHigh: 1500, meantLow: "mS/cm"},
	},
	{
		Name: "tds", Key: "tds_mg_l", Label: "TDS", Group: Reading, Step: 10, relative: true,
		Help:  "total dissolved solids, for the ionic strength where conductivity is not known",
		units: dissolvedUnits, decimals: 1, trim: true,
		limits: limits{low: 0, high: 50000, usualLow: 10, usualHigh: 1000, meantLow: "g/L"},
	},
}
