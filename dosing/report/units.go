package report

import "beckline/carbonate"

// Factors from SI (amounts in mol/L) to the units of the keys.
const (
	milli             = 1e3
	secondsPerHour    = 3600
	secondsPerDay     = 86400
	litresPerM3       = 1e3
	kgPerPound        = 0.45359237  // international pound, exact
	litresPerUSGallon = 3.785411784 // US liquid gallon, exact
	kelvinAtZero      = 273.15
	referenceKelvin   = 293.15 // of the density tables
	m3PerMegagallon   = litresPerUSGallon * 1e3
)

// caco3PerEquivalent turns eq/L into mg/L as CaCO3 (half a mole per equivalent).
const caco3PerEquivalent = carbonate.MolarMassCaCO3 / 2 * milli

// caco3PerMole turns mol/L of CaCO3 into mg/L.
const caco3PerMole = carbonate.MolarMassCaCO3 * milli

// carbonDioxideMass is the molar mass of CO2 in g/mol (C 12.011, O 15.999).
const carbonDioxideMass = 12.011 + 2*15.999

func milligrams(c carbonate.Component) float64 { return c.MolarMass() * milli }
