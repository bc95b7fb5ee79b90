package caution

func fluorides() []Sheet {
	dust := Line{"Fluoride poisons by mouth and by dust: no food, drink or smoking where it is handled; wash before eating.", cp}
	fluorideLimit := Limit{"OSHA PEL", "8 h average as fluoride", 2.5, "mg F/m3", "29 CFR 1910.1000, RTECS entry VV8225000"}
	return []Sheet{
		{
			Key: "fluorosilicic-acid", Title: "Hydrofluorosilicic acid",
			Short: []string{
				"Hydrofluorosilicic acid burns deep: face shield, acid suit, long gloves.",
				"In the eye: rinse at once, 15 min or longer, then a doctor; say fluoride.",
				"Its fumes may hold hydrogen fluoride: ventilate. It eats glass.",
				"Never near hypochlorite: it frees chlorine gas. Never near strong bases.",
			},
			GHS:        danger(clp, "", "H314"),
			Hazards:    []Line{{"Deep burns to the eye; harm to the lungs may come late.", "ILO/WHO ICSC 1233"}, dust},
			Protection: []Line{{"Face shield over goggles, acid suit, long gloves, boots; a mask for acid gas within reach.", cp}},
			FirstAid: []Line{eyes15, skin,
				{"Tell the doctor that it is a fluoride; have the supplier's advice on calcium gluconate at hand before it is needed.", cp}, airGas, swallow},
			Handling: []Line{{"Eats glass, also gauge glasses and light bulbs; fumes may hold hydrogen fluoride and etch windows.", "AWWA M4, from memory"}},
			Dilution: []Line{acidIntoWater, {"Diluting with hard water between about 10 and 20 times drops silica that blocks the line.", cp}},
			Storage:  []Line{acidApart, {"Apart from strong bases and from food.", "ILO/WHO ICSC 1233"}},
			Limits:   []Limit{fluorideLimit},
		},
		{
			Key: "sodium-fluoride", Title: "Sodium fluoride",
			Short: []string{
				"Sodium fluoride is poison: no food near it, dust mask, gloves, wash hands.",
				"In the eye: rinse at once, 15 min, then a doctor. Swallowed: doctor now.",
				"Never onto acid: it frees hydrogen fluoride.",
			},
			GHS:        danger(clp, "", "H301", "H315", "H319", "EUH032"),
			Hazards:    []Line{{"A spoonful can kill; dust in the nose counts.", textbook}, dust},
			Protection: []Line{wearDust},
			FirstAid:   []Line{eyes15, airDust, {"Swallowed: call the poison centre at once and say fluoride; do not bring on vomiting; ask whether to give milk or a calcium drink.", cp}},
			Handling:   []Line{{"Empty bags without dust under extraction; do not burn or reuse them, get rid of them as the label says.", cp}},
			Dilution:   []Line{{"In a saturator with softened water; hardness drops calcium fluoride.", cp}},
			Storage:    []Line{{"Dry, locked, marked as poison; apart from acids, which free hydrogen fluoride.", textbook}},
			Limits: []Limit{
				{"OSHA PEL", "8 h average as fluoride", 2.5, "mg F/m3", pocket},
				{"NIOSH IDLH", "immediately dangerous", 250, "mg F/m3", pocket},
			},
		},
		{
			Key: "sodium-fluorosilicate", Title: "Sodium fluorosilicate",
			Short: []string{
				"Sodium fluorosilicate is poison: no food near it, dust mask, gloves.",
				"In the eye: rinse at once, 15 min, then a doctor. Swallowed: doctor now.",
				"Never onto acid: it frees poisonous fluoride gas.",
			},
			GHS:        danger(clp, "", "H301", "H311", "H331"),
			Hazards:    []Line{dust},
			Protection: []Line{wearDust},
			FirstAid:   []Line{eyes15, skin, airDust, {"Swallowed: call the poison centre at once and say fluoride.", cp}},
			Handling:   []Line{{"Empty bags without dust under extraction.", cp}},
			Dilution:   []Line{{"Dissolve in plenty of stirred water; it dissolves slowly and the solution is acid.", cp}},
			Storage:    []Line{{"Dry, locked, marked as poison; apart from acids.", textbook}, acidApart},
			Limits:     []Limit{{"OSHA PEL", "8 h average as fluoride", 2.5, "mg F/m3", pocket}},
		},
	}
}

func otherSheets() []Sheet {
	return []Sheet{
		{
			Key: "sodium-silicate", Title: "Sodium silicate solution",
			Short: []string{
				"Silicate is alkaline, dries to sharp glass: goggles, gloves; rinse 15 min.",
				"Never onto acid: it sets to a gel. Wipe spills before they dry: slippery.",
			},
			GHS:        warning(byMakers, "many suppliers; others do not classify it", "H315", "H319"),
			Hazards:    []Line{{"Alkaline, irritates eyes and skin; dried drops cut like glass.", cp}},
			Protection: []Line{wearLiquid},
			FirstAid:   []Line{eyes15, skin, swallow},
			Handling:   []Line{{"Flush pumps before they stop, or the valves set.", cp}},
			Dilution:   []Line{{"Into softened water, stirred; hardness makes it cloudy.", cp}},
			Storage:    []Line{{"Not below freezing; apart from acids, which set it to a gel, and from aluminium and zinc.", cp}},
		},
		{
			Key: "limestone", Title: "Limestone (calcium carbonate contactor)",
			Short: []string{
				"Limestone dust scratches eyes and lungs: goggles, dust mask when loading.",
				"A contactor vessel is a confined space: permit, gas test, second person.",
			},
			GHS:        GHS{Source: byMakers},
			Hazards:    []Line{{"Dust; and in the vessel carbon dioxide from the water may lie low.", cp}},
			Protection: []Line{wearMild},
			FirstAid:   []Line{eyes15, airDust},
			Handling:   []Line{{"Enter a vessel only with a permit, a gas test and a second person outside.", cp}},
			Dilution:   []Line{{"Not diluted: the water dissolves it as it passes, and stops near saturation.", cp}},
			Storage:    []Line{{"Dry; apart from acids, which make it foam with carbon dioxide.", textbook}},
		},
	}
}
