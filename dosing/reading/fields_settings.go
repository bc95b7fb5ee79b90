package reading

var settingFields = []Field{
	{
		Name: "strength", Key: "strength_percent", Label: "strength", Group: Setting, Step: 0.5, relative: true,
		Help:  "strength of the product in the terms of its catalogue entry, where not the one in its name",
		units: strengthUnits, decimals: 2, trim: true,
		limits: limits{low: 0, lowOpen: true, high: 100, usualLow: 1, usualHigh: none},
	},
	{
		Name: "product-temperature", Key: "product_temperature_c", Label: "product temp.", Group: Setting, Step: 0.5,
		Help:  "temperature of the product in its tank, for its density; 20 °C where not given",
		units: temperatureUnits, decimals: 1,
		limits: limits{low: -30, high: 60, usualLow: 0, usualHigh: 40, meantHigh: "°F"},
	},
	{
		Name: "pump", Key: "pump_l_h", Label: "pump at 100 %", Group: Setting, Step: 1, relative: true,
		Help:  "output of the feed pump at 100 %",
		units: pumpUnits, decimals: 3, trim: true,
		limits: limits{low: 0, lowOpen: true, high: 100000, usualLow: 0.02, usualHigh: 5000},
	},
}
