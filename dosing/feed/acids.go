package feed

// Density tables of the acids.
const (
	SulfuricAcid     Density = "sulfuric acid"
	HydrochloricAcid Density = "hydrochloric acid"
	NitricAcid       Density = "nitric acid"
	PhosphoricAcid   Density = "phosphoric acid"
	AceticAcid       Density = "acetic acid"
	FormicAcid       Density = "formic acid"
	CitricAcid       Density = "citric acid solution"
)

const (
	chemister = "Chemister substance data base, entry sulfuric acid"
	echa      = "ECHA registered-substance dossier 16122, sulphuric acid"
	acidPerry = "Perry's Chemical Engineers' Handbook / CRC Handbook, from memory"
	hclTable  = "hydrochloric acid table, 20 C and 1 atm, encyclopedic reprint"
)

var sulfuricAcid20 = []Row{
	{0, 998.2, water},
	{0.00986, 1005, chemister},
	{0.04, 1025, chemister},
	{0.09843, 1065, chemister},
	{0.20, 1139.4, acidPerry},
	{0.30, 1218.5, acidPerry},
	{0.40, 1302.8, acidPerry},
	{0.50, 1395.1, acidPerry},
	{0.60, 1498.3, acidPerry},
	{0.70, 1610.5, acidPerry},
	{0.80, 1727.2, acidPerry},
	{0.90, 1814.4, echa},
	{0.93, 1827.9, acidPerry},
	{0.95, 1833.7, acidPerry},
	{0.96, 1835.5, acidPerry},
	{0.98, 1836.1, acidPerry},
	{1.00, 1830.5, echa},
}

var hydrochloricAcid20 = []Row{
	{0, 998.2, water},
	{0.05, 1022.8, crc},
	{0.10, 1047.6, crc},
	{0.20, 1098, hclTable},
	{0.30, 1149.2, crc},
	{0.32, 1159, hclTable},
	{0.34, 1169, hclTable},
	{0.36, 1179, hclTable},
	{0.38, 1189, hclTable},
	{0.40, 1197.7, crc},
}

// By molality in the source: w = 36.461 m / (1000 + 36.461 m).
var hydrochloricAcid10 = []Row{
	{byMolality(1, 36.461), 1017.67, molality},
	{byMolality(6, 36.461), 1091.71, molality},
}

var nitricAcid20 = []Row{
	{0, 998.2, water},
	{0.10, 1054.3, perry},
	{0.20, 1115.0, perry},
	{0.30, 1180.0, perry},
	{0.40, 1246.3, perry},
	{0.50, 1310.0, perry},
	{0.60, 1366.7, perry},
	{0.70, 1413.4, perry},
}

var phosphoricAcid20 = []Row{
	{0, 998.2, water},
	{0.10, 1053.2, perry},
	{0.20, 1113.4, perry},
	{0.30, 1180.5, perry},
	{0.40, 1254, perry},
	{0.50, 1335, perry},
	{0.60, 1426, perry},
	{0.75, 1579, perry},
	{0.85, 1689, perry},
}

var aceticAcid20 = []Row{
	{0, 998.2, water},
	{0.10, 1012.6, perry},
	{0.20, 1026.3, perry},
	{0.30, 1038.4, perry},
	{0.40, 1048.8, perry},
	{0.50, 1057.5, perry},
	{0.60, 1064.2, perry},
	{0.70, 1068.5, perry},
	{0.80, 1070.0, perry},
	{0.90, 1066.1, perry},
	{1.00, 1049.8, perry},
}

var formicAcid20 = []Row{
	{0, 998.2, water},
	{0.10, 1024.6, perry},
	{0.20, 1048.8, perry},
	{0.30, 1072.9, perry},
	{0.40, 1096.3, perry},
	{0.50, 1120.7, perry},
	{0.60, 1142.4, perry},
	{0.70, 1165.5, perry},
	{0.80, 1186.0, perry},
	{0.85, 1195.3, perry},
	{0.90, 1204.4, perry},
	{1.00, 1221.2, perry},
}

var citricAcid20 = []Row{
	{0, 998.2, water},
	{0.10, 1039.2, crcMemory},
	{0.20, 1080.5, crcMemory},
	{0.50, 1240, "50 % solution as delivered, common practice, no source"},
}
