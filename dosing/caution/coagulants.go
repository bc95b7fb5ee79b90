package caution

func coagulants() []Sheet {
	noBleach := Line{"Acid-reacting: keep apart from hypochlorite in tank, bund, drain and fill point; it sets chlorine gas free.", csb}
	spill := Line{"Spills are slippery: hose them to a safe drain at once, after looking what else the drain holds.", cp}
	return []Sheet{
		{
			Key: "alum-dry", Title: "Dry alum (aluminium sulfate)",
			Short: []string{
				"Alum dust can blind, it turns to acid in the eye: goggles, dust mask.",
				"Alum in the eye: rinse at once, 15 min or longer, then a doctor.",
				"Never in a bin or conveyor shared with quicklime: heat can burst it.",
				"Never near hypochlorite: alum is acid and frees chlorine gas.",
			},
			GHS:        danger("generic safety data, CAS 10043-01-3", "", "H290", "H318"),
			Hazards:    []Line{{"Dust makes acid with sweat, tears and spittle.", cp}},
			Protection: []Line{wearDust},
			FirstAid:   []Line{eyes15, airDust, swallow},
			Handling:   []Line{{"Ventilate the hopper through a filter; sweep dry, then hose.", cp}},
			Dilution:   []Line{{"Powder into stirred water; the solution is acid and eats steel, zinc and concrete.", cp}},
			Storage: []Line{noBleach, {"Dry, and never in a bin or conveyor that has carried quicklime: heat and hydrogen can burst it.",
				"Recommended Standards for Water Works / AWWA operator texts, from memory"}},
			Limits: []Limit{{"NIOSH REL", "soluble aluminium salts, average", 2, "mg Al/m3", pocket}},
		},
		{
			Key: "alum-liquid", Title: "Liquid alum (aluminium sulfate solution)",
			Short: []string{
				"Liquid alum is acid and can blind: goggles or face shield, gloves.",
				"Alum in the eye: rinse at once, 15 min or longer, then a doctor.",
				"Never near hypochlorite: alum is acid and frees chlorine gas.",
			},
			GHS:        danger("generic safety data, CAS 10043-01-3", "", "H290", "H318"),
			Hazards:    []Line{{"Acid enough to burn an eye and to eat steel, zinc and concrete.", cp}},
			Protection: []Line{wearLiquid},
			FirstAid:   []Line{eyes15, skin, swallow},
			Handling:   []Line{spill, {"Stronger than it should be, it crystallises sooner: 50.7 % well before 48.8 %.", "Davis, Water and Wastewater Engineering, p. 5-5"}},
			Dilution:   []Line{{"Fed as delivered, or into stirred water; weak dilutions go cloudy and scale the line.", cp}},
			Storage:    []Line{noBleach, {"Lined or plastic tanks; apart from caustic and lime.", cp}},
			Limits:     []Limit{{"NIOSH REL", "soluble aluminium salts, average", 2, "mg Al/m3", pocket}},
		},
		{
			Key: "ferric-chloride", Title: "Ferric chloride solution",
			Short: []string{
				"Ferric chloride is strong acid, burns and stains: face shield, gloves.",
				"In the eye: rinse at once, 15 min or longer, then a doctor.",
				"Never near hypochlorite: it frees chlorine gas. Eats most metals.",
			},
			GHS:        danger("encyclopedia entry with GHS box", "", "H290", "H302", "H314"),
			Hazards:    []Line{{"Holds free hydrochloric acid; stains everything brown for good.", cp}},
			Protection: []Line{wearLiquid},
			FirstAid:   []Line{eyes15, skin, swallow},
			Handling:   []Line{{"Acid, stains, and attacks most metals, stainless steel among them: rubber, plastic or titanium only.", "operator practice, and H290 above"}, spill},
			Dilution:   []Line{{"Into water, stirred; it warms a little. Weak dilutions drop iron hydroxide.", cp}},
			Storage:    []Line{noBleach, {"Apart from caustic, lime and metals.", cp}},
			Limits:     []Limit{{"NIOSH REL", "soluble iron salts, average", 1, "mg Fe/m3", pocket}},
		},
		{
			Key: "ferric-sulfate", Title: "Ferric sulfate solution",
			Short: []string{
				"Ferric sulfate is strong acid and can blind: face shield, gloves.",
				"In the eye: rinse at once, 15 min or longer, then a doctor.",
				"Never near hypochlorite: it frees chlorine gas.",
			},
			GHS:        danger(byMakers, "", "H290", "H302", "H315", "H318"),
			Hazards:    []Line{{"Holds free sulfuric acid; stains brown.", cp}},
			Protection: []Line{wearLiquid},
			FirstAid:   []Line{eyes15, skin, swallow},
			Handling:   []Line{spill, {"Rubber or plastic; it eats mild steel.", cp}},
			Dilution:   []Line{{"Into water, stirred; weak dilutions drop iron hydroxide.", cp}},
			Storage:    []Line{noBleach, {"Apart from caustic, lime and metals.", cp}},
			Limits:     []Limit{{"NIOSH REL", "soluble iron salts, average", 1, "mg Fe/m3", pocket}},
		},
		{
			Key: "polyaluminium-chloride", Title: "Polyaluminium chloride solution",
			Short: []string{
				"Polyaluminium chloride is acid, harms eyes: goggles, gloves; rinse 15 min.",
				"Never near hypochlorite: it frees chlorine gas. Never mix with alum.",
			},
			GHS:        danger(byMakers, "", "H290", "H318"),
			Hazards:    []Line{{"Milder than alum or iron salts, and still acid in the eye.", cp}},
			Protection: []Line{wearLiquid},
			FirstAid:   []Line{eyes15, skin, swallow},
			Handling:   []Line{spill, {"Not in a tank or line that has held alum: the two make a gel that blocks it.", cp}},
			Dilution:   []Line{{"Fed as delivered; weak dilutions break down within hours.", cp}},
			Storage:    []Line{noBleach, {"Plastic or lined tanks; it eats metals.", cp}},
			Limits:     []Limit{{"NIOSH REL", "soluble aluminium salts, average", 2, "mg Al/m3", pocket}},
		},
	}
}
