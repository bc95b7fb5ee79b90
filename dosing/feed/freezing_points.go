package feed

const (
	kirk      = "sodium hydroxide-water diagram, Kirk-Othmer, from memory, unsure"
	memory    = "handbook figure, from memory"
	suppliers = "suppliers' sheets, common practice, no source"
	seidell   = "solubility (Seidell / CRC Handbook), from memory"
	hclMelts  = "hydrochloric acid table, encyclopedic reprint"
)

// freezing holds the points by rising strength. Where a source gives a span the
// warmer end stands, since the warning should come early. A liquid that is not
// here has no figure that could be relied on: ferric sulfate.
var freezing = map[Density][]point{
	SodiumHydroxide: {
		{0.19, -28, true, kirk},
		{0.25, -18, true, kirk},
		{0.30, 0, true, kirk},
		{0.35, 11, true, kirk},
		{0.39, 15.6, true, kirk},
		{0.45, 6, true, kirk},
		{0.50, 12.3, false, "12 C, International Critical Tables / Kirk-Othmer, from memory; monohydrate from 12.3 C, Great Soviet Encyclopedia, entry sodium hydroxide"},
	},
	PotassiumHydroxide: {
		{0.45, -29, true, suppliers},
		{0.50, 6, true, suppliers},
	},
	SodiumCarbonate: {
		{0.065, 0, true, seidell},
		{0.109, 10, true, seidell},
		{0.179, 20, false, "21.8 g per 100 g water at 20 C, Chemister substance data base, entry sodium carbonate"},
	},
	MagnesiumHydroxide: {{0.55, 0, true, "the water of the slurry freezes"}, {0.62, 0, true, "the water of the slurry freezes"}},
	SulfuricAcid: {
		{0.83, 7.56, false, echa},
		{0.845, 8.5, true, memory},
		{0.90, -10, true, memory},
		{0.93, -27, true, "Perry freezing curve, about -27 to -34 C, from memory, unsure"},
		{0.96, -10, false, echa},
		{0.98, 3.0, false, echa},
		{1.00, 10.9, false, echa},
	},
	HydrochloricAcid: {
		{0.10, -18, false, hclMelts},
		{0.20, -59, false, hclMelts},
		{0.30, -52, false, hclMelts},
		{0.32, -43, false, hclMelts},
		{0.34, -36, false, hclMelts},
		{0.36, -30, false, hclMelts},
		{0.38, -26, false, hclMelts},
	},
	NitricAcid: {
		{0.54, -18.5, true, memory},
		{0.60, -22, true, memory},
	},
	PhosphoricAcid: {
		{0.75, -17.5, true, memory},
		{0.80, 4.6, true, memory},
		{0.85, 21.1, true, memory},
	},
	AceticAcid: {
		{0.80, -7, true, memory},
		{1.00, 16.6, true, memory},
	},
	FormicAcid: {
		{0.85, -12, true, memory},
		{0.90, -6, true, memory},
		{1.00, 8.4, true, memory},
	},
	CitricAcid: {
		{0.49, 0, true, seidell},
		{0.54, 10, true, seidell},
		{0.592, 20, true, seidell},
	},
	LiquidAlum: {
		{0.488, -15.6, true, "Davis, Water and Wastewater Engineering, p. 5-5, figure from memory"},
		{0.507, 18.3, true, "Davis, Water and Wastewater Engineering, p. 5-5, figure from memory"},
	},
	FerricChloride: {
		{0.40, -12, true, suppliers},
		{0.427, 0, true, seidell},
		{0.45, 10, true, seidell},
	},
	PolyaluminiumChloride: {{0.10, -10, true, suppliers}},
	SodiumHypochlorite:    {{0.109, -20, true, suppliers}},
	AquaAmmonia: {
		{0.19, -34, true, memory},
		{0.28, -69, true, memory},
	},
	AmmoniumSulfate: {
		{0.398, -18.5, true, seidell},
		{0.414, 0, true, seidell},
		{0.43, 20, true, seidell},
	},
	FluorosilicicAcid: {{0.23, -15.5, true, "AWWA M4, from memory, unsure"}},
	SodiumSilicate:    {{0.37, -1, true, suppliers}},
}
