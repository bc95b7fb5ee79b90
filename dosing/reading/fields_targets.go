package reading

var targetFields = []Field{
	{
		Name: "target-ph", Key: "target_ph", Label: "target pH", Group: Target, Step: 0.05,
		Help:  "pH wanted of the finished water",
		units: phUnits, decimals: 2,
		limits: limits{low: 4, high: 11.5, usualLow: 6.5, usualHigh: 9.5},
	},
	{
		Name: "target-alkalinity", Key: "target_alkalinity_mg_l_caco3", Label: "target alk.", Group: Target, Step: 1,
		Help:  "alkalinity wanted of the finished water",
		units: alkalinityUnits, decimals: 1,
		limits: limits{low: 0, high: 5000, usualLow: 5, usualHigh: 400, lowNote: mineralAcidity},
	},
	{
		Name: "target-si", Key: "target_saturation_index", Label: "target SI", Group: Target, Step: 0.05,
		Help:  "calcite saturation index wanted of the finished water",
		units: indexUnits, decimals: 2,
		limits: limits{low: -6, high: 3, usualLow: -0.5, usualHigh: 0.5},
	},
	{
		Name: "target-ccpp", Key: "target_ccpp_mg_l_caco3", Label: "target CCPP", Group: Target, Step: 0.5,
		Help:  "calcium carbonate precipitation potential wanted of the finished water; negative dissolves",
		units: precipitationUnits, decimals: 1,
		limits: limits{low: -1000, high: 1000, usualLow: -5, usualHigh: 15},
	},
	{
		Name: "target-dic", Key: "target_dic_mmol_l", Label: "target DIC", Group: Target, Step: 0.05,
		Help:  "dissolved inorganic carbon wanted of the finished water",
		units: carbonUnits, decimals: 3,
		limits: limits{low: 0, high: 200, usualLow: 0.02, usualHigh: 12, meantHigh: "mg/L as C"},
	},
}
