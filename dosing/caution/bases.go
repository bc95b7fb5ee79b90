package caution

// solidCaustic is the line that strong caustic alone needs.
const solidCaustic = "50 % caustic goes solid near 12 C: trace the line, expect a blocked pump."

func bases() []Sheet {
	strong := []Line{
		{"Turns skin and eyes to soap; the burn goes deep before it hurts. Strong solutions feel slippery, not sharp.", cp},
	}
	attacks := Line{"Attacks aluminium, zinc and galvanised parts and sets hydrogen free, which burns: no such fittings, ladders or lamps near it.", "NIOSH Pocket Guide / CRC Handbook, from memory"}
	return []Sheet{
		{
			Key: "caustic", Title: "Caustic soda (sodium hydroxide solution)",
			Short: []string{
				"Caustic soda burns eyes and skin: face shield, long gloves, apron.",
				"Caustic in the eye: rinse at once, 30 min, then a doctor.",
				"Dilute caustic into cold water, slowly; never water into caustic: it boils.",
				solidCaustic,
			},
			GHS:        danger(clp+" (H290 by suppliers)", "H314 from 2 %", "H290", "H314"),
			Hazards:    strong,
			Protection: []Line{wearLiquid},
			FirstAid:   []Line{eyes30, skin, swallow},
			Handling: []Line{
				{"Feed it below the surface or into fast water; a drip on a flange dries to crystals that burn.", cp},
				{"Hard dilution water drops calcium carbonate and magnesium hydroxide in the line: dilute with softened water.", cp},
			},
			Dilution: []Line{causticIntoWater},
			Storage:  []Line{attacks, {"Keep apart from acids, acid coagulants, and ammonium salts, which give off ammonia.", textbook}},
			Limits: []Limit{
				{"NIOSH REL", "ceiling", 2, "mg/m3", niosh},
				{"OSHA PEL", "8 h average", 2, "mg/m3", niosh},
				{"NIOSH IDLH", "immediately dangerous", 10, "mg/m3", pocket},
			},
		},
		{
			Key: "potassium-hydroxide", Title: "Potassium hydroxide solution",
			Short: []string{
				"Potassium hydroxide burns eyes and skin: face shield, long gloves, apron.",
				"Potassium hydroxide in the eye: rinse at once, 30 min, then a doctor.",
				"Dilute it into cold water, slowly; never water into it: it boils.",
			},
			GHS:        danger(clp+" (H290 by suppliers)", "", "H290", "H302", "H314"),
			Hazards:    strong,
			Protection: []Line{wearLiquid},
			FirstAid:   []Line{eyes30, skin, swallow},
			Handling:   []Line{{"Handle it as caustic soda; it stays liquid where 50 % caustic soda sets.", cp}},
			Dilution:   []Line{{"Into cold water, slowly and stirred; never water into it. It heats as caustic soda does.", cp}},
			Storage:    []Line{attacks, {"Keep apart from acids, acid coagulants, and ammonium salts, which give off ammonia.", textbook}},
			Limits:     []Limit{{"NIOSH REL", "ceiling", 2, "mg/m3", pocket}},
		},
		{
			Key: "lime", Title: "Hydrated lime (calcium hydroxide)",
			Short: []string{
				"Lime dust can blind and burns wet skin: tight goggles, dust mask, gloves.",
				"Lime in the eye: brush off, rinse at once, 30 min, then a doctor.",
				"Slurry into water, kept moving; keep lime away from acids.",
			},
			GHS:        danger("generic safety data, CAS 1305-62-0", "", "H315", "H318", "H335"),
			Hazards:    []Line{{"Dust cakes on sweat and in the eye and goes on burning; lime in boots takes skin off by the evening.", cp}},
			Protection: []Line{wearDust},
			FirstAid: []Line{{"Eyes: wipe lumps away from the lids, then rinse at once for at least 30 minutes with the lids held open; then a doctor without delay.", jersey + ", for a caustic of the same kind"},
				skin, airDust, swallow},
			Handling: []Line{{"Slurry settles and sets: keep it moving, flush lines, keep suction lines short. Vent bins through a filter; a bridged bin can let go all at once.", cp}},
			Dilution: []Line{{"Lime into water, stirred. Mixing warms it only a little, unlike quicklime.", cp}},
			Storage:  []Line{{"Dry; apart from acids, with which it reacts violently, and from aluminium, zinc and brass, where wet lime can give hydrogen.", "ILO/WHO ICSC 0408"}},
			Limits: []Limit{
				{"OSHA PEL", "total dust, 8 h average", 15, "mg/m3", "29 CFR 1910.1000 table Z-1, from memory"},
				{"NIOSH REL", "average", 5, "mg/m3", pocket},
			},
		},
		{
			Key: "quicklime", Title: "Quicklime (calcium oxide)",
			Short: []string{
				"Quicklime and water boil: keep it dry, slake only in the slaker.",
				"Quicklime dust can blind: tight goggles, dust mask, gloves, long sleeves.",
				"Quicklime in the eye: brush off, rinse at once, 30 min, then a doctor.",
				"Never share a conveyor or bin with dry alum: heat can burst it.",
			},
			GHS:        danger("generic safety data for calcium oxide", "", "H315", "H318", "H335"),
			Hazards:    []Line{{"Takes the water out of skin and eye and heats as it does.", cp}},
			Protection: []Line{wearDust, {"At the slaker a face shield as well: it spits when it runs short of water.", cp}},
			FirstAid: []Line{{"Eyes: wipe lumps away from the lids first, then rinse at once with plenty of water for at least 30 minutes; then a doctor without delay.", jersey + ", for a caustic of the same kind"},
				{"Skin: brush dry lime off before the shower, then plenty of water.", cp}, airDust, swallow},
			Handling: []Line{
				{"Slaking gives enough heat to boil the water: hold the makers' water to lime ratio, alarm on high temperature, and stand clear of the hatch.", cp},
			},
			Dilution: []Line{{"Lime into plenty of water in the slaker; never a little water onto quicklime.", "NIOSH Pocket Guide, from memory (slakes with much heat)"}},
			Storage: []Line{
				{"Dry and apart from acids; a damp bin swells, heats and can set wood or bags alight.", pocket},
				{"Never in a conveyor or bin that carries dry alum: the water in alum slakes it, and heat and hydrogen can burst the bin.", "Recommended Standards for Water Works / AWWA operator texts, from memory"},
			},
			Limits: []Limit{
				{"NIOSH REL", "average", 2, "mg/m3", niosh},
				{"OSHA PEL", "8 h average", 5, "mg/m3", niosh},
				{"NIOSH IDLH", "immediately dangerous", 25, "mg/m3", pocket},
			},
		},
		{
			Key: "magnesium-hydroxide", Title: "Magnesium hydroxide slurry",
			Short: []string{
				"Magnesium hydroxide slurry irritates eyes: goggles, gloves; rinse 15 min.",
				"It settles and sets: keep it moving, and flush lines that stop.",
			},
			GHS:        GHS{Source: byMakers},
			Hazards:    []Line{{"Mild beside other bases: gritty in the eye, drying on the skin.", cp}},
			Protection: []Line{wearMild},
			FirstAid:   []Line{eyes15, swallow},
			Handling: []Line{
				{"It dissolves slowly: hours, and hardly at all near pH 10. Do not raise the dose because the pH lags.", cp},
				{"It settles to a hard cake: circulate, keep velocities up, flush when stopped.", cp},
			},
			Dilution: []Line{{"Into water, stirred; no heat to speak of.", cp}},
			Storage:  []Line{{"Apart from acids: heat, and a sudden loss of the slurry's stiffness.", cp}},
		},
		{
			Key: "soda-ash", Title: "Soda ash (sodium carbonate)",
			Short: []string{
				"Soda ash irritates eyes and airways: goggles, dust mask; rinse 15 min.",
				"Never onto acid: it foams with carbon dioxide and throws acid out.",
			},
			GHS:        warning(clp, "", "H319"),
			Hazards:    []Line{{"Dust and strong solution sting eyes, nose and broken skin.", cp}},
			Protection: []Line{wearMild},
			FirstAid:   []Line{eyes15, swallow, airDust},
			Handling:   []Line{{"Solution drops crystals when it cools: keep it below 10 % in a cold room and trace the line.", cp}},
			Dilution:   []Line{{"Powder into stirred water, a little at a time: it warms and cakes when dumped.", cp}},
			Storage:    []Line{{"Dry; apart from acids, which make it foam with carbon dioxide.", textbook}},
		},
		{
			Key: "bicarbonate", Title: "Sodium bicarbonate",
			Short: []string{
				"Bicarbonate dust irritates eyes: goggles; rinse 15 min. Mild otherwise.",
				"Never onto acid: it foams with carbon dioxide and throws acid out.",
			},
			GHS:        GHS{Source: byMakers},
			Hazards:    []Line{{"The mildest chemical of the list; dust in the eye still scratches.", cp}},
			Protection: []Line{wearMild},
			FirstAid:   []Line{eyes15, airDust},
			Handling:   []Line{{"Lift bags with a second person or a hoist; most harm from it is to backs.", cp}},
			Dilution:   []Line{{"Dissolve in cold water, stirred; above about 60 C it loses carbon dioxide.", cp}},
			Storage:    []Line{{"Dry; apart from acids, which make it foam with carbon dioxide.", textbook}},
		},
	}
}
