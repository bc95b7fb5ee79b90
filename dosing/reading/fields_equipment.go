package reading

import "slices"

// equipmentTable holds what the commands about pumps, tanks, jars and a running
// plant ask for. Its limits only keep out what cannot be.
var equipmentTable = build(slices.Concat(tankFields, pumpFields, jarFields, trimFields))

var tankFields = []Field{
	setting("in-tank", "in_tank_m3", "volume of product in the tank now", volumeUnits, 0, 1e5),
	setting("heel", "heel_m3", "part of it that the pump cannot take; 0 where not given", volumeUnits, 0, 1e5),
	setting("full", "full_m3", "volume of the tank at its fill mark", volumeUnits, 0, 1e5),
	setting("feed", "feed_l_h", "feed of product that is wanted or runs", pumpUnits, 0, 1e5),
	setting("margin", "margin_h", "time before the tank runs empty at which filling begins; 2 h where not given", timeUnits("h"), 0, 1000),
	setting("lead", "lead_d", "time from an order to its delivery", timeUnits("d"), 0, 400),
	setting("load", "load_m3", "volume of one delivery", volumeUnits, 0, 1e4),
	setting("load-mass", "load_kg", "mass of one delivery, instead of its volume", massUnits, 0, 1e6),
	setting("gravity", "specific_gravity", "specific gravity of the product as read on the hydrometer", gravityUnits, 0.5, 3),
	setting("make", "make_m3", "volume of the weaker solution that is wanted", volumeUnits, 0, 1e4),
	setting("use", "use_m3", "volume of the product to be used up, instead of --make", volumeUnits, 0, 1e4),
	setting("to", "to_percent", "strength wanted, % by weight", []unit{{name: PercentByWeight, also: []string{"%", "percent"}, factor: 0.01}}, 0, 100),
	setting("water-temperature", "water_temperature_c", "temperature of the water that thins it; 20 C where not given", temperatureUnits, 0, 60),
}

var pumpFields = []Field{
	setting("stroke", "stroke_percent", "stroke, % of full; 100 where not given", percentUnits, 0, 100),
	setting("speed", "speed_percent", "speed, % of full; 100 where not given", percentUnits, 0, 100),
	setting("step", "step_percent", "one step of the speed setting; 1 % where not given", percentUnits, 0, 50),
	setting("draw-volume", "volume_ml", "volume drawn", labVolumeUnits, 0, 1e6),
	setting("draw-time", "seconds", "time that it took", timeUnits("s"), 0, 86400),
}

var jarFields = []Field{
	setting("stock", "stock_mol_l", "strength of what is poured, mol of the chemical in a litre", []unit{{name: "mol/L", also: []string{"M"}, factor: 1}, {name: "mmol/L", also: []string{"mM"}, factor: perMille}}, 0, 30),
	setting("jar", "jar_ml", "volume of the sample in the jar", labVolumeUnits, 0, 1e6),
	setting("added", "added_ml", "stock poured in all", labVolumeUnits, 0, 1e6),
	setting("ph-tolerance", "ph_tolerance", "half-width of the 95 % interval of one pH against the others; 0.05 where not given", phUnits, 0, 2),
	setting("dose-tolerance", "dose_tolerance_percent", "the same of each dose, in % of it", percentUnits, 0, 100),
}

var trimFields = []Field{
	setting("measured", "measured_ph", "pH of the finished water as read", phUnits, 0, 14),
	setting("measured-temperature", "measured_temperature_c", "temperature at which it was read; the water's where not given", temperatureUnits, 0, 50),
	setting("volume", "volume_m3", "water between the feed point and the meter, for the waits", volumeUnits, 0, 1e6),
	setting("step-ph", "step_ph", "most that one step may change the pH; 0.3 where not given", phUnits, 0, 3),
	setting("step-dose", "step_dose_percent", "most that one step may change the dose; 10 % where not given", percentUnits, 0, 100),
	setting("low-ph", "low_ph", "plant's own limit: finished pH not below", phUnits, 0, 14),
	setting("high-ph", "high_ph", "plant's own limit: finished pH not above", phUnits, 0, 14),
}

// mayBeZero are the settings of which 0 says something.
var mayBeZero = []string{"in-tank", "heel", "margin", "lead", "added", "measured", "low-ph"}

func setting(name, key, help string, units []unit, low, high float64) Field {
	offset := len(units) > 0 && units[0].offset != 0
	return Field{Name: name, Key: key, Label: name, Help: help, Group: Setting, units: units, decimals: 4, trim: true,
		limits: limits{low: low, lowOpen: low == 0 && !offset && !slices.Contains(mayBeZero, name), high: high, usualLow: low, usualHigh: high}}
}

var percentUnits = []unit{{name: "%", also: []string{"percent", "per cent"}, factor: 0.01}}

// gravityUnits take a density as well; the factor of a bare number is settled by
// whoever knows against which water the hydrometer reads.
var gravityUnits = []unit{
	{name: "SI", factor: 1},
	{name: "kg/m3", factor: 1e-3}, {name: "g/mL", also: []string{"kg/L", "g/cm3"}, factor: 1},
}

var massUnits = []unit{{name: "kg", factor: 1}, {name: "t", also: []string{"tonnes", "tonne"}, factor: 1000}, {name: "lb", also: []string{"pounds"}, factor: 0.45359237}}

// timeUnits convert to seconds; a bare number is in the unit named.
func timeUnits(bare string) []unit {
	all := []unit{
		{name: "s", also: []string{"seconds", "sec"}, factor: 1}, {name: "min", also: []string{"minutes"}, factor: 60},
		{name: "h", also: []string{"hours", "hour"}, factor: 3600}, {name: "d", also: []string{"days", "day"}, factor: 86400},
	}
	slices.SortStableFunc(all, func(a, b unit) int {
		switch {
		case a.name == bare:
			return -1
		case b.name == bare:
			return 1
		}
		return 0
	})
	return all
}
