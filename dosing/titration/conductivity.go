package titration

import "math"

// Temperature coefficients of the conductivity of natural waters, per kelvin at
// 25 C.
const (
	// StandardCoefficient is that of Standard Methods 2510 B (from memory).
	StandardCoefficient = 0.0191
	// RoundCoefficient is set in many meters (common practice, no source).
	RoundCoefficient = 0.02
)

const (
	zeroCelsius      = 273.15
	leastKelvin      = zeroCelsius
	greatestKelvin   = zeroCelsius + 50
	greatestConduct  = 7.0 // S/m
	leastCoefficient = 0.01
	mostCoefficient  = 0.03
)

// ConductivityAt25 turns a conductivity read without temperature compensation,
// S/m above 0 to 7, at a temperature in K, 273.15 to 323.15, into that at 25 C:
// k / (1 + a (t - 25)), linear with the coefficient a per kelvin (0 means
// StandardCoefficient). Real waters bend: against the factors of ISO 7888 at 0
// and 20 C (1.918 and 1.116, from memory) the straight line is within 2 %, an eighth
// of the error of the ionic strength that it serves. A meter that shows values at
// 25 C already needs none of this. Errors: *Error.
func ConductivityAt25(siemensPerMetre, kelvin, coefficient float64) (float64, error) {
	if coefficient == 0 {
		coefficient = StandardCoefficient
	}
	for _, e := range []*Error{
		within("conductivity", siemensPerMetre*1e4, 0, greatestConduct*1e4, true, "uS/cm"),
		withinCelsius("temperature", kelvin),
		within("coefficient", coefficient*100, leastCoefficient*100, mostCoefficient*100, false, "% per kelvin"),
	} {
		if e != nil {
			return 0, e
		}
	}
	return siemensPerMetre / (1 + coefficient*(kelvin-zeroCelsius-25)), nil
}

func withinCelsius(field string, kelvin float64) *Error {
	return within(field, math.Round((kelvin-zeroCelsius)*1e9)/1e9, leastKelvin-zeroCelsius, greatestKelvin-zeroCelsius, false, "deg C")
}
