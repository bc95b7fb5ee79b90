package caution

// Sources that many lines share.
const (
	cp       = "common practice, no source"
	ansi     = "ANSI/ISEA Z358.1, as told by a safety trade page"
	jersey   = "New Jersey Right to Know fact sheet, sodium hydroxide (Nov 2015)"
	niosh    = "NIOSH IDLH documentation (May 1994)"
	pocket   = "NIOSH Pocket Guide, from memory"
	textbook = "textbook, from memory"
	csb      = "US CSB case study of the October 2016 Kansas release"
	florida  = "Florida Rural Water Association, ammonia and bleach storage notes"
	clp      = "EU CLP Annex VI, from memory"
	byMakers = "suppliers' own classification, from memory"
)

// first-aid lines.
var (
	eyes30  = Line{"Eyes: rinse at once under running water with the lids held open, for at least 30 minutes, contact lenses out as soon as they come; then a doctor without delay.", jersey}
	eyes15  = Line{"Eyes: rinse at once under running water with the lids held open, for at least 15 minutes, contact lenses out as soon as they come; then a doctor without delay.", ansi}
	skin    = Line{"Skin: under the shower at once, clothes and shoes off while the water runs; a doctor for any burn.", cp}
	swallow = Line{"Swallowed: rinse the mouth, do not bring on vomiting, call the poison centre or a doctor.", cp}
	airGas  = Line{"Breathed in: out into fresh air, at rest, half sitting; call for medical help even if it seems mild, since the lungs can fill hours later. Rescuers wear breathing apparatus.", cp}
	airDust = Line{"Breathed in: out into fresh air; a doctor if coughing does not pass.", cp}
)

// what to wear.
var (
	wearLiquid = Line{"Face shield over goggles, long chemical gloves, apron and boots whenever a line, drum or pump head is opened.", cp}
	wearDust   = Line{"Tight goggles, dust mask, gloves, long sleeves and trousers over the boots; wash dust off before it cakes with sweat.", cp}
	wearMild   = Line{"Goggles and gloves; a dust mask where bags are emptied.", cp}
)

// acidIntoWater and causticIntoWater are the rule of dilution.
var (
	acidIntoWater    = Line{"Acid into the water, slowly and stirred; never water into the acid.", "laboratory protocol page; the same rule in NIOSH and OSHA guides"}
	causticIntoWater = Line{"Caustic into cold water, slowly and stirred; never water into the caustic. The heat can make it boil and spatter.", "encyclopedia entry on sodium hydroxide (heat and splashing)"}
)

// acidApart is what keeps an acid from hypochlorite.
var acidApart = Line{"Keep apart from hypochlorite and chlorine compounds in tank, bund, drain and fill point: acid sets chlorine gas free.", csb}

// General holds for every corrosive chemical, whichever it is.
func General() []Line {
	return []Line{
		{"Where eyes or body may meet a corrosive, there must be means in the work area to drench and flush them quickly.", "29 CFR 1910.151(c)"},
		{"Eyewash at least 0.4 US gal/min and shower 20 US gal/min, each for 15 minutes, within 10 seconds' walk.", "Washington Administrative Code 296-800-15030"},
		{"The water should be tepid, 16 to 38 C, and eyes are flushed for at least 15 minutes; for caustics 30.", ansi + "; 30 minutes: " + jersey},
		{"A hose and a face shield will do only where contact is very unlikely; where chemicals are handled it takes a proper eyewash.", "OSHA letter of interpretation, 26 July 1994"},
		{"Before a delivery is connected, check the delivery note, the label, the specific gravity of a sample and the fill point, with a second person, and stay until it is done.", cp},
		{"Fill points: locked, marked with the chemical's name, far from each other and of different fittings. In one release that sent more than 140 people for treatment, two look-alike unmarked fill connections stood 18 inches apart.", csb},
		{"A pump left in manual feeds on when the water stops, and the slug moves at the next start: interlock the feeder with the water, and hand over what is in manual.", cp},
		{"Isolate, relieve and flush a line before it is opened; a blocked line may be under pressure from the pump or from gas.", cp},
		{"Anti-siphon valves and a day tank no larger than needed keep a bulk tank from emptying itself into the main.", cp},
		{"Nobody works alone with gas, with a delivery or inside a tank; a tank is a confined space.", cp},
	}
}

// Unknowable is what no calculation here can see.
func Unknowable() []Line {
	return []Line{
		{"What is in the tank. Strength is what was typed or the catalogue's default, density is a table's; only a sample tells.", cp},
		{"What the pump delivers. A setting comes from the capacity that was typed; only a drawdown tells. Air locks, worn valves, scale and crystals are not seen.", cp},
		{"Whether the water flows. A dose is per volume of water; if the water stands and the pump runs, the figures mean nothing.", cp},
		{"Whether the readings are right: a meter off by 0.2, a sample that has stood open, a probe with scale, a strength of titrant that has drifted, a temperature from yesterday.", cp},
		{"What else is in the water: organic acids, phosphate, silica, ammonia or sulfide that were not entered, and what other feeds add.", cp},
		{"How fast things happen. Lime, quicklime and magnesium hydroxide are taken as fully dissolved, mixing as complete, air as shut out, scale as not yet formed.", cp},
		{"Whether the water is fit to drink, legal to discharge or kind to pipes. Lead, copper, disinfection and health are not judged here.", cp},
		{"The certified maximum use level of your product (NSF/ANSI/CAN 60 or its like), its impurities, and its label, unless you enter the level.", cp},
		{"Local rules, permits and the orders of the authority: they come before any figure here.", cp},
		{"Whether anyone stands in the line of fire.", cp},
	}
}
