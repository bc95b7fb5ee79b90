package caution

func disinfectants() []Sheet {
	noAcid := Line{"Keep apart from every acid, and from alum, iron salts and other acid-reacting coagulants: chlorine gas. Fill points apart, locked and marked.", csb}
	noAmmonia := Line{"Keep apart from ammonia and ammonium salts, in separate sealed rooms: toxic chloramines and explosive nitrogen trichloride.", florida}
	return []Sheet{
		{
			Key: "chlorine", Title: "Chlorine gas",
			Short: []string{
				"Chlorine gas kills: alarm and exhaust on, breathing apparatus within reach.",
				"Leak: out, upwind and uphill; only a trained, masked team goes back.",
				"Never near ammonia, oil, grease or organics. Never water on a leak.",
				"Cylinders chained, caps on, valve never heated; leak kit outside the door.",
			},
			GHS: danger(clp+"; the China catalogue of 2015 has H330 in place of H331", "", "H270", "H280", "H331", "H330", "H315", "H319", "H335", "H400"),
			Hazards: []Line{
				{"Heavier than air, yellow-green when there is much of it; lungs can fill hours after breathing it.", textbook},
			},
			Protection: []Line{{"Escape mask on the belt, breathing apparatus outside the door, never stored in the chlorine room.", cp}},
			FirstAid:   []Line{airGas, eyes15, skin},
			Handling: []Line{
				{"Look for leaks with a puff of ammonia vapour, vapour only, never liquid and never by nose; a new lead washer at every change.", cp},
				{"Plants that hold 2500 lb or more need a risk management plan under the US rule.", "40 CFR 68.130, as told by a trade safety page"},
			},
			Dilution: []Line{{"By vacuum feeder into water only; wet chlorine eats steel, so never let water back into the cylinder.", cp}},
			Storage:  []Line{noAmmonia, {"Cool, apart from fuels, oil, grease, metals in powder, and from other cylinders.", cp}},
			Limits: []Limit{
				{"NIOSH REL", "15 min ceiling", 0.5, "ppm", niosh},
				{"OSHA PEL", "ceiling", 1, "ppm", niosh},
				{"NIOSH IDLH", "immediately dangerous", 10, "ppm", niosh},
			},
		},
		{
			Key: "hypochlorite", Title: "Sodium hypochlorite solution",
			Short: []string{
				"Hypochlorite and any acid or alum make chlorine gas: never together.",
				"It burns eyes and skin: face shield, gloves; rinse at once, 30 min.",
				"Never with ammonia. Vent it: it gasses, and bursts shut valves and lines.",
			},
			GHS: danger("GisChem data sheet 898 (10 % chlorine and more); Safe Work Australia HCIS, CAS 7681-52-9, has H335 too", "ILO/WHO ICSC 0482 has Warning under 10 %",
				"H290", "H314", "H335", "H410", "EUH031"),
			Hazards:    []Line{{"Caustic as well as oxidising: burns eyes and skin; bleaches and rots clothes.", cp}},
			Protection: []Line{wearLiquid},
			FirstAid:   []Line{eyes30, skin, airGas, swallow},
			Handling: []Line{
				{"It gives off oxygen: no ball valves without a vent hole, no shut-in lengths, degas pump heads.", cp},
				{"Leave no spill to dry: what is left sets rags and wood alight.", cp},
			},
			Dilution: []Line{{"Into clean, soft, cool water; hard water scales, acid water frees chlorine.", cp}},
			Storage: []Line{noAcid, noAmmonia,
				{"Cool, dark, no longer than about 45 days: it loses strength with heat, light, its own strength, and traces of copper or nickel.", "Pennsylvania DEP operator training, module 25 answer key; copper and nickel from a second page"}},
		},
		{
			Key: "calcium-hypochlorite", Title: "Calcium hypochlorite",
			Short: []string{
				"Calcium hypochlorite sets fire to oil, rags, sugar, acid: clean scoop, dry.",
				"Never with acid, alum or ammonia: chlorine or worse. Never with other tabs.",
				"Dust burns eyes and lungs: goggles, dust mask; rinse at once, 30 min.",
				"Powder into water, never water onto powder.",
			},
			GHS:        danger(clp, "", "H272", "H302", "H314", "H400", "EUH031"),
			Hazards:    []Line{{"A damp or soiled drum heats by itself and can burn or burst.", textbook}},
			Protection: []Line{wearDust, {"Face shield where it is dissolved.", cp}},
			FirstAid:   []Line{eyes30, skin, airGas, swallow},
			Handling:   []Line{{"A clean, dry, plastic scoop kept for it alone; never sweep spills back into the drum.", cp}},
			Dilution:   []Line{{"Powder into plenty of water, never a little water onto powder.", cp}},
			Storage:    []Line{noAcid, noAmmonia, {"Dry, cool, apart from everything that burns and from every other pool or drain chemical.", cp}},
		},
		{
			Key: "ammonia", Title: "Aqua ammonia",
			Short: []string{
				"Ammonia burns eyes and lungs: goggles that seal, gas mask, ventilation.",
				"In the eye: rinse at once, 30 min, then a doctor. Vapour: out, upwind.",
				"Never with chlorine or hypochlorite: poison gas, explosive at worst.",
			},
			GHS: danger(clp+"; for anhydrous gas H221, H280, H331, H314, H400 of the same annex", "solution of about 19 %", "H314", "H335", "H400"),
			Hazards: []Line{
				{"Vapour stings long before it kills, and blinds at a splash; in air it burns from 15 % by volume.", niosh},
			},
			Protection: []Line{wearLiquid, {"Goggles that seal, not spectacles; a mask for ammonia within reach.", cp}},
			FirstAid:   []Line{eyes30, skin, airGas, swallow},
			Handling:   []Line{{"Gas comes off when it warms or is splashed: closed filling, vent led outside or through water.", cp}, {"No copper, brass or zinc.", cp}},
			Dilution:   []Line{{"Below the surface of softened water, slowly: it warms, and hard water scales.", cp}},
			Storage:    []Line{{"In its own sealed room, apart from chlorine and every hypochlorite.", florida}, {"Cool; apart from acids, with which it heats and fumes.", textbook}},
			Limits: []Limit{
				{"NIOSH REL", "average", 25, "ppm", niosh},
				{"NIOSH STEL", "15 min", 35, "ppm", niosh},
				{"OSHA PEL", "8 h average", 50, "ppm", niosh},
				{"NIOSH IDLH", "immediately dangerous", 300, "ppm", "NIOSH, on a Minnesota Department of Agriculture page"},
			},
		},
		{
			Key: "ammonium-sulfate", Title: "Ammonium sulfate solution",
			Short: []string{
				"Ammonium sulfate is mild: goggles, gloves; rinse eyes 15 min.",
				"Never with hypochlorite or chlorine: poison gas, explosive at worst.",
				"With caustic or lime it gives off ammonia gas.",
			},
			GHS:        GHS{Source: byMakers},
			Hazards:    []Line{{"Irritates eyes a little; harms fish in a spill.", cp}},
			Protection: []Line{wearMild},
			FirstAid:   []Line{eyes15, swallow},
			Handling:   []Line{{"Near its limit of solubility: crystals block lines when it cools or dries.", cp}},
			Dilution:   []Line{{"Into water, stirred; it cools as it dissolves.", cp}},
			Storage:    []Line{{"Apart from chlorine and every hypochlorite, in another room.", florida}, {"Apart from caustic and lime, which free ammonia.", textbook}},
		},
	}
}
