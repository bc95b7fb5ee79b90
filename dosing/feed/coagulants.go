package feed

// Density tables of the coagulants.
const (
	LiquidAlum            Density = "liquid alum"
	FerricChloride        Density = "ferric chloride solution"
	FerricSulfate         Density = "ferric sulfate solution"
	PolyaluminiumChloride Density = "polyaluminium chloride solution"
)

const (
	alumTable   = "liquid-alum strength table (dry alum of 17 % Al2O3; no temperature printed, trade practice 60 F)"
	alumPounds  = "derived from the pounds of dry alum per US gallon of the liquid-alum strength table, within 0.2 %"
	ferricPerry = "Perry's Chemical Engineers' Handbook, ferric sulfate at 17.5 C, from memory"
	pacl        = "polyaluminium chloride as delivered, common practice, no source"
)

// Strength as dry alum. Specific gravity is taken as kg/L.
var liquidAlum20 = []Row{
	{0, 998.2, water},
	{0.0841, 1050.7, alumTable},
	{0.1724, 1106.9, alumTable},
	{0.2512, 1159, alumPounds}, // 2.43 lb/gal
	{0.3776, 1250, alumTable},
	{0.4659, 1318.2, alumTable},
	{0.4976, 1341, alumPounds}, // 5.57 lb/gal
}

var ferricChloride20 = []Row{
	{0, 998.2, water},
	{0.01, 1006.8, crc},
	{0.05, 1040.8, crc},
	{0.10, 1085.3, crc},
	{0.20, 1181.6, crc},
	{0.30, 1291.0, perry},
	{0.35, 1353.0, perry},
	{0.40, 1417.6, perry},
	{0.45, 1485.0, perry},
}

var ferricSulfate20 = []Row{
	{0, 998.2, water},
	{0.10, 1085.4, ferricPerry},
	{0.20, 1181.1, ferricPerry},
	{0.30, 1307.3, ferricPerry},
	{0.40, 1448.7, ferricPerry},
	{0.50, 1612.7, ferricPerry},
}

// Strength as Al2O3, for basicities of about a half.
var polyaluminiumChloride20 = []Row{
	{0, 998.2, water},
	{0.05, 1100, pacl},
	{0.10, 1200, pacl},
	{0.18, 1370, pacl},
}
