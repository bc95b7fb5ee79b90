package reading

// flowUnits convert to m3/s. A gallon is the US gallon unless imperial is said.
var flowUnits = []unit{
	{name: "m³/h", also: []string{"M3/h", "cubic metres/h", "cubic meters/h"}, factor: 1 / hour},
	{name: "m³/d", also: []string{"M3/d"}, factor: 1 / day},
	{name: "L/s", also: []string{"lps"}, factor: litre},
	{name: "L/min", also: []string{"lpm"}, factor: litre / minute},
	{name: "ML/d", also: []string{"MLD"}, factor: 1e6 * litre / day},
	{name: "gpm (US)", also: []string{"gpm", "US gpm", "gal/min", "US gal/min", "gal/min US"}, factor: usGallon / minute},
	{name: "MGD (US)", also: []string{"MGD", "mgd", "US MGD", "mgd US", "Mgal/d", "MG/d"}, factor: 1e6 * usGallon / day},
	{name: "imperial gpm", also: []string{"imp gpm", "gpm imperial", "gpm imp", "igpm", "UK gpm", "gpm UK", "imperial gal/min", "imp gal/min", "UK gal/min"}, factor: imperialGallon / minute},
	{name: "imperial MGD", also: []string{"imp MGD", "MGD imperial", "MGD imp", "mgd imperial", "mgd imp", "IMGD", "MIGD", "migd", "UK MGD", "MGD UK", "mgd UK"}, factor: 1e6 * imperialGallon / day},
	{name: "gal/d (US)", also: []string{"gpd", "gal/d", "US gpd", "gpd US", "US gal/d"}, factor: usGallon / day},
	{name: "L/h", also: []string{"lph"}, factor: litre / hour},
	{name: "m³/s", also: []string{"M3/s"}, factor: 1},
	{name: "ft³/s", also: []string{"cfs"}, factor: cubicFoot},
}

// The small m is a thousand millionth of the capital one.
var flowUnclear = []unclear{
	{[]string{"mL/d", "mLd", "mld", "ml/d"}, "ML/d with a capital M (megalitres a day)"},
	{[]string{"gal", "gallon", "gallons", "G", "MG", "Mgal"}, "a flow with its time, such as gpm or MGD"},
}

// pumpUnits convert a pump's output at 100 % to m3/s.
var pumpUnits = []unit{
	{name: "L/h", also: []string{"lph"}, factor: litre / hour},
	{name: "mL/min", also: []string{"cm3/min", "cc/min"}, factor: 1e-3 * litre / minute},
	{name: "L/min", also: []string{"lpm"}, factor: litre / minute},
	{name: "L/d", factor: litre / day},
	{name: "gal/h (US)", also: []string{"gal/h", "gph", "US gph", "gph US", "US gal/h"}, factor: usGallon / hour},
	{name: "gal/d (US)", also: []string{"gal/d", "gpd", "US gpd", "gpd US", "US gal/d"}, factor: usGallon / day},
	{name: "imperial gal/h", also: []string{"imp gal/h", "imperial gph", "imp gph", "gph imperial", "gph imp", "UK gal/h", "UK gph"}, factor: imperialGallon / hour},
	{name: "m³/h", also: []string{"M3/h"}, factor: 1 / hour},
}

var pumpUnclear = []unclear{{[]string{"ML/min"}, "mL/min with a small m (millilitres a minute)"}}

// The units of a strength in which more is said than a bare per cent; a product
// is stated in one of these terms, and another cannot be used for it.
const (
	PercentByWeight = "% by weight"
	PercentTrade    = "% trade"    // grams of chlorine in 100 mL
	GramsChlorine   = "g/L as Cl2" // the same, in a litre
)

// strengthUnits convert to a fraction. What a bare per cent is of, the product
// says: by weight for most, grams of chlorine in 100 mL for hypochlorite.
var strengthUnits = []unit{
	{name: "%", also: []string{"percent", "per cent"}, factor: 0.01},
	{name: PercentByWeight, also: []string{"% w/w", "% wt", "wt %", "% weight", "w/w %", "percent by weight", "weight %"}, factor: 0.01},
	{name: PercentTrade, also: []string{"trade %", "trade percent", "percent trade"}, factor: 0.01},
	{name: GramsChlorine, also: []string{"g Cl2/L", "g/L chlorine"}, factor: 1e-3},
}

// Grams in a litre need the density as well.
var strengthUnclear = []unclear{
	{[]string{"g/L", "w/v", "% w/v", "kg/L", "kg/m3"}, "% by weight (250 g/L is not 25 %), or g/L as Cl2 for hypochlorite"},
}
