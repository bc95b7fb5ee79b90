package hand

import "math"

// Constants are what the hand method looks up or works out for one temperature.
// They are not the model's: three-term equations of the electrochemical school
// against its five-term ones, so that a slip in either shows.
type Constants struct {
	Kelvin         float64
	PK1, PK2, PKw  float64
	DaviesA        float64 // log10 slope of the activity equation, (L/mol)^1/2
	K1, K2, Kwater float64 // mol/L
}

// At returns the constants at a temperature in kelvin, 273.15 to 323.15. The
// coefficients are from memory; tests compare them with published tables (within
// 0.004 of the carbonic ones and 0.006 of water's).
func At(kelvin float64) Constants {
	T := kelvin
	c := Constants{
		Kelvin: T,
		// Harned & Davis 1943, J. Am. Chem. Soc. 65, 2030-2037, 0-50 C.
		PK1: 3404.71/T - 14.8435 + 0.032786*T,
		// Harned & Scholes 1941, J. Am. Chem. Soc. 63, 1706-1709, 0-50 C.
		PK2: 2902.39/T - 6.4980 + 0.02379*T,
		// Harned & Hamer 1933, J. Am. Chem. Soc. 55, 2194-2206, 0-60 C.
		PKw: 4470.99/T - 6.0875 + 0.01706*T,
		// A straight line through the slope's values at 0 and 50 C, within 0.003.
		DaviesA: 0.491 + 0.0009*(T-273.15),
	}
	c.K1, c.K2, c.Kwater = math.Pow(10, -c.PK1), math.Pow(10, -c.PK2), math.Pow(10, -c.PKw)
	return c
}

// Gamma1 is the activity coefficient of an ion of charge 1 at an ionic strength,
// mol/L: Davies 1962, Ion Association, with the slope rounded. That of charge 2
// is its fourth power.
func (c Constants) Gamma1(ionic float64) float64 {
	root := math.Sqrt(ionic)
	return math.Pow(10, -c.DaviesA*(root/(1+root)-0.3*ionic))
}
