package feed

// Density tables of disinfectants, fluoride and silicate.
const (
	SodiumHypochlorite Density = "sodium hypochlorite solution"
	AquaAmmonia        Density = "aqua ammonia"
	AmmoniumSulfate    Density = "ammonium sulfate solution"
	FluorosilicicAcid  Density = "hydrofluorosilicic acid"
	SodiumSilicate     Density = "sodium silicate solution"
)

const (
	white         = "White, Handbook of Chlorination: 1160 to 1220 by salt and excess caustic, from memory, unsure"
	bleach        = "household strength, common practice, no source"
	bleach15      = "15 % trade as delivered, common practice, no source, unsure"
	fluPerry      = "Perry's Chemical Engineers' Handbook, fluosilicic acid at 17.5 C, from memory"
	baume         = "41 degrees Baume (145/(145 - 41)) at 37.6 % solids, common practice, no source"
	silicateWater = "water at 20 C, 998.2 kg/m3, from memory; between it and the delivered strength a straight line, within about 2 %"
)

// Strength as NaOCl by weight. Trade strengths are by volume: 125 g/L of Cl2 is
// 125 x 74.442/70.906 = 131.23 kg/m3 of NaOCl, over the density.
var sodiumHypochlorite20 = []Row{
	{0, 998.2, water},
	{0.0525, 1080, bleach},
	{131.23 / 1200, 1200, white},
	{157.48 / 1240, 1240, bleach15},
}

var aquaAmmonia20 = []Row{
	{0, 998.2, water},
	{0.01, 993.8, crcMemory},
	{0.05, 977.0, crcMemory},
	{0.10, 957.5, crcMemory},
	{0.14, 943.0, crcMemory},
	{0.20, 922.8, crcMemory},
	{0.24, 910.1, crcMemory},
	{0.28, 898.0, crcMemory},
}

var ammoniumSulfate20 = []Row{
	{0, 998.2, water},
	{0.10, 1057.4, crcMemory},
	{0.20, 1115.4, crcMemory},
	{0.30, 1172.1, crcMemory},
	{0.40, 1227.7, crcMemory},
	{0.43, 1244, crcMemory},
}

var fluorosilicicAcid20 = []Row{
	{0, 998.2, water},
	{0.10, 1083.4, fluPerry},
	{0.20, 1174.8, fluPerry},
	{0.30, 1274.2, fluPerry},
}

// Strength as solids, Na2O and SiO2 together, of 3.2 SiO2 to Na2O by weight.
var sodiumSilicate20 = []Row{
	{0, 998.2, silicateWater},
	{0.376, 1394, baume},
}
