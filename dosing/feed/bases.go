package feed

// Density tables of the bases.
const (
	SodiumHydroxide    Density = "sodium hydroxide solution"
	PotassiumHydroxide Density = "potassium hydroxide solution"
	SodiumCarbonate    Density = "sodium carbonate solution"
	MagnesiumHydroxide Density = "magnesium hydroxide slurry"
)

// Sources that several tables share.
const (
	crc       = "CRC Handbook section 8, aqueous solutions at 20 C, read on a table that repeats its figures"
	crcMemory = "CRC Handbook section 8, aqueous solutions at 20 C, from memory"
	perry     = "Perry's Chemical Engineers' Handbook, densities of aqueous solutions at 20 C, from memory"
	molality  = "published table of estimated densities by molality (consistent with IAPWS-95 water)"
	water     = "water at 20 C, 998.2 kg/m3, from memory"
)

var sodiumHydroxide20 = []Row{
	{0, 998.2, water},
	{0.01, 1009.5, crc},
	{0.05, 1053.8, crcMemory},
	{0.10, 1108.9, crc},
	{0.15, 1164.0, crcMemory},
	{0.20, 1219.2, crcMemory},
	{0.25, 1273.9, "Perry / CRC Handbook, from memory"},
	{0.30, 1327.7, crc},
	{0.40, 1429.9, crc},
	{0.50, 1525.3, "CRC Handbook / Perry / International Critical Tables vol. III p. 79, from memory"},
}

// By molality in the source: w = 39.997 m / (1000 + 39.997 m).
var sodiumHydroxide10 = []Row{
	{byMolality(1, 39.997), 1043.4, molality},
	{byMolality(2, 39.997), 1083.15, molality},
	{byMolality(4, 39.997), 1154.37, molality},
	{byMolality(6, 39.997), 1216.77, molality},
}

var sodiumHydroxide25 = []Row{
	{byMolality(2, 39.997), 1077.87, molality},
	{byMolality(4, 39.997), 1147.76, molality},
	{byMolality(6, 39.997), 1208.66, molality},
}

// byMolality turns mol per kg of water into kg per kg of solution.
func byMolality(m, gramsPerMole float64) float64 {
	return m * gramsPerMole / (1000 + m*gramsPerMole)
}

const perry15 = "Perry's Chemical Engineers' Handbook, column of 15 C (20 C is about 0.2 % lower), from memory"

var potassiumHydroxide20 = []Row{
	{0, 998.2, water},
	{0.10, 1091.8, perry15},
	{0.20, 1188.4, perry15},
	{0.30, 1290.5, perry15},
	{0.40, 1399.1, perry15},
	{0.50, 1514.3, perry15},
}

var sodiumCarbonate20 = []Row{
	{0, 998.2, water},
	{0.01, 1008.6, crcMemory},
	{0.05, 1050.2, crc},
	{0.10, 1102.9, crcMemory},
	{0.14, 1146.3, crcMemory},
}

const slurry = "volumes of water (998.2 kg/m3) and solid (2360 kg/m3, from memory) added up; suppliers state about 1500 at 60 % (common practice, no source)"

// 1/rho = w/2360 + (1 - w)/998.2.
var magnesiumHydroxide20 = []Row{
	{0, 998.2, water},
	{0.30, 1207.2, slurry},
	{0.40, 1297.7, slurry},
	{0.50, 1403.0, slurry},
	{0.55, 1462.3, slurry},
	{0.60, 1526.8, slurry},
	{0.65, 1597.3, slurry},
}
