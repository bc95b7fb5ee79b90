package reading

var ionFields = []Field{
	{
		Name: "calcium", Key: "calcium_mg_l", Label: "calcium", Group: Reading, Step: 1,
		Help:  "calcium, as the ion",
		units: amountUnits(2, stated{"Ca", gCa}, stated{"CaCO3", gCaCO3}), decimals: 2, figures: 3,
		limits: limits{low: 0, high: 2000, usualLow: 1, usualHigh: 200, meantHigh: "mg/L as CaCO3"},
	},
	{
		Name: "magnesium", Key: "magnesium_mg_l", Label: "magnesium", Group: Reading, Step: 0.5,
		Help:  "magnesium, as the ion",
		units: amountUnits(2, stated{"Mg", gMg}, stated{"CaCO3", gCaCO3}), decimals: 2, figures: 3,
		limits: limits{low: 0, high: 2000, usualLow: -none, usualHigh: 100, meantHigh: "mg/L as CaCO3"},
	},
	{
		Name: "calcium-hardness", Key: "calcium_hardness_mg_l_caco3", Label: "Ca hardness", Group: Reading, Step: 1,
		Help:  "calcium part of the hardness",
		units: calciumHardnessUnits, decimals: 1,
		// The same stop as calcium: 2000 mg/L as Ca.
		limits: limits{low: 0, high: 5000, usualLow: 2.5, usualHigh: 500},
	},
	{
		Name: "hardness", Key: "hardness_mg_l_caco3", Label: "hardness", Group: Reading, Step: 1,
		Help:  "total hardness, calcium and magnesium",
		units: hardnessUnits, decimals: 1,
		limits: limits{low: 0, high: 5000, usualLow: -none, usualHigh: 500},
	},
	ion("sulfate", "sulfate_mg_l", -2, 20000, 250, 1, stated{"SO4", gSO4}, stated{"S", gS}),
	ion("chloride", "chloride_mg_l", -1, 20000, 250, 1, stated{"Cl", gCl}),
	ion("sodium", "sodium_mg_l", 1, 20000, 250, 1, stated{"Na", gNa}),
	ion("potassium", "potassium_mg_l", 1, 20000, 100, 0.5, stated{"K", gK}),
	// 50 mg/L as NO3: WHO guideline value (from memory).
	ion("nitrate", "nitrate_mg_l", -1, 5000, 50, 1, stated{"NO3", gNO3}, stated{"N", gN}),
}

// ion is a measured ion of which none is usual too; high is the hard stop,
// usual the top of the usual band, in mg/L as the first formula.
func ion(name, key string, charge, high, usual, step float64, forms ...stated) Field {
	if charge < 0 {
		charge = -charge
	}
	return Field{
		Name: name, Key: key, Label: name, Group: Reading, Step: step,
		Help:  name + ", as " + forms[0].formula,
		units: amountUnits(charge, forms...), decimals: 2, figures: 3,
		limits: limits{low: 0, high: high, usualLow: -none, usualHigh: usual},
	}
}

var minorFields = []Field{
	minor("ammonia", "ammonia_n_mg_l", 1000, 5, 0.1, stated{"N", gN}, stated{"NH3", gNH3}, stated{"NH4", gNH4}),
	minor("phosphate", "phosphate_p_mg_l", 1000, 5, 0.1, stated{"P", gP}, stated{"PO4", gPO4}),
	minor("silica", "silica_mg_l", 1000, 100, 1, stated{"SiO2", gSiO2}, stated{"Si", gSi}),
	// 2.4 mg/L of boron, 1.5 of fluoride and 5 of chlorine: WHO guideline
	// values (from memory).
	minor("boron", "boron_mg_l", 1000, 2.4, 0.1, stated{"B", gB}),
	minor("fluoride", "fluoride_mg_l", 1000, 1.5, 0.1, stated{"F", gF}),
	chlorine(),
	minor("acetate", "acetate_mg_l", 5000, 50, 1, stated{"CH3COOH", gAcetic}),
	minor("formate", "formate_mg_l", 5000, 50, 1, stated{"HCOOH", gFormic}),
	minor("citrate", "citrate_mg_l", 5000, 50, 1, stated{"C6H8O7", gCitric}),
}

// minor is a constituent that is in several states of charge, so that
// milliequivalents of it say nothing.
func minor(name, key string, high, usual, step float64, forms ...stated) Field {
	f := ion(name, key, 0, high, usual, step, forms...)
	f.decimals = 3 // some are tenths of a milligram or less
	return f
}

func chlorine() Field {
	f := minor("free-chlorine", "free_chlorine_mg_l", 50, 5, 0.1, stated{"Cl2", gCl2})
	f.Label = "free chlorine"
	f.Help = "free chlorine, as Cl2"
	return f
}
