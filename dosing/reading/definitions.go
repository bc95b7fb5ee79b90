package reading

// Definitions of the units that are not powers of ten of SI. Exact by
// definition, as listed in NIST SP 811 (2008), appendix B (from memory).
const (
	litre          = 1e-3                     // m3
	usGallon       = 3.785411784e-3           // m3, 231 cubic inches
	imperialGallon = 4.54609e-3               // m3
	pound          = 0.45359237               // kg
	grain          = pound / 7000             // kg
	cubicFoot      = 0.3048 * 0.3048 * 0.3048 // m3

	minute = 60.0    // s
	hour   = 3600.0  // s
	day    = 86400.0 // s

	zeroCelsius    = 273.15 // K
	zeroFahrenheit = 459.67 // added to °F gives degrees Rankine; times 5/9 gives K
)

// Molar masses in g/mol of the formulas in which amounts are stated (IUPAC
// standard atomic masses, abridged). They stand here because this package
// imports nothing of ours; a test elsewhere compares them with the model's.
const (
	gCaCO3   = 100.087
	gCaO     = 56.077
	gHCO3    = 61.017
	gCO2     = 44.009
	gC       = 12.011
	gCa      = 40.078
	gMg      = 24.305
	gSO4     = 96.06
	gS       = 32.06
	gCl      = 35.453
	gCl2     = 70.906
	gNa      = 22.990
	gK       = 39.098
	gNO3     = 62.004
	gN       = 14.007
	gNH3     = 17.031
	gNH4     = 18.039
	gP       = 30.974
	gPO4     = 94.970
	gSiO2    = 60.083
	gSi      = 28.085
	gB       = 10.81
	gF       = 18.998
	gAcetic  = 60.052
	gFormic  = 46.025
	gCitric  = 192.12
	perMille = 1e-3 // mg in g, mmol in mol
)

// Degrees of hardness in mol/L of CaCO3, from their definitions: the German
// degree is 10 mg CaO in a litre, the French 10 mg CaCO3 in a litre, the
// English (Clark) a grain of CaCO3 in an imperial gallon; grains per gallon
// mean the US gallon.
const (
	germanDegree   = 10e-3 / gCaO
	frenchDegree   = 10e-3 / gCaCO3
	englishDegree  = grain * 1e3 / (imperialGallon / litre) / gCaCO3
	grainPerGallon = grain * 1e3 / (usGallon / litre) / gCaCO3
)
