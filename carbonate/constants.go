package carbonate

import "math"

const (
	gasConstant = 8.314462618 // J/(mol K), CODATA 2018, exact
	kelvin25    = 298.15

	// MinKelvin and MaxKelvin bound the temperatures at which the constants are
	// used: 0 to 50 C.
	MinKelvin = 273.15
	MaxKelvin = 323.15

	// MaxIonicStrength is the largest ionic strength, mol/L, at which the Davies
	// equation is used.
	MaxIonicStrength = 0.5
)

// ConstantSet names the set of constants, for records that must be repeatable.
const ConstantSet = "PB82-N90-1"

// Constants holds the thermodynamic equilibrium constants at one temperature,
// activity based, mol/L (taken as mol/kg: the difference is that of the density
// of water from 1 kg/L, under 0.5 % to 30 C and 1.2 % at 50 C), with pressures in
// atm. The coefficients were recalled from the papers named beside them and then
// checked against the published values in testdata.
type Constants struct {
	Kelvin float64

	daviesA float64 // ln(10) times the Davies slope, (L/mol)^1/2

	Water      float64 // H2O = H + OH
	Henry      float64 // CO2(g) = CO2(aq), mol/(L atm)
	Carbonic1  float64 // CO2 + H2O = H + HCO3
	Carbonic2  float64 // HCO3 = H + CO3
	Calcite    float64 // CaCO3 = Ca + CO3
	Aragonite  float64
	CaHCO3     float64 // Ca + HCO3 = CaHCO3, and so on
	CaCO3      float64
	MgHCO3     float64
	MgCO3      float64
	CaSO4      float64
	MgSO4      float64
	CaOH       float64 // Ca + OH = CaOH
	MgOH       float64 // Mg + H2O = MgOH + H
	HSO4       float64 // H + SO4 = HSO4
	Ammonium   float64 // NH4 = H + NH3
	Phosphoric [3]float64
	Silicic    float64
	Boric      float64
	Fluoric    float64 // HF = H + F
	HOCl       float64
	Acetic     float64
	Formic     float64
	Citric     [3]float64
}

// ConstantsAt returns the constants at a temperature in kelvin, 273.15 to
// 323.15; outside it returns a *RangeError.
func ConstantsAt(kelvin float64) (*Constants, error) {
	if !(kelvin >= MinKelvin && kelvin <= MaxKelvin) {
		return nil, &RangeError{"temperature", kelvin, MinKelvin, MaxKelvin}
	}
	T := kelvin
	lgT := math.Log10(T)

	// The five-term form of Plummer & Busenberg and Nordstrom et al.:
	// log K = a + bT + c/T + d log T + e/T^2.
	five := func(a, b, c, d, e float64) float64 {
		return pow10(a + b*T + c/T + d*lgT + e/(T*T))
	}
	// van 't Hoff from 25 C with a constant enthalpy in kJ/mol.
	hoff := func(logK25, enthalpy float64) float64 {
		return pow10(logK25 - enthalpy*1e3/(gasConstant*math.Ln10)*(1/T-1/kelvin25))
	}
	// The three-term form of the Harned school: pK = a/T - b + cT.
	three := func(a, b, c float64) float64 { return pow10(-(a/T - b + c*T)) }

	k := &Constants{Kelvin: kelvin}

	// Davies slope and the dielectric constant of water, the pair given in
	// Standard Methods 2330.
	dielectric := 60954/(T+116) - 68.937
	k.daviesA = math.Ln10 * 1.82e6 * math.Pow(dielectric*T, -1.5)

	// Nordstrom et al. 1990, ACS Symp. Ser. 416, ch. 31.
	k.Water = five(-283.9710, -0.05069842, 13323.00, 102.24447, -1119669)

	// Plummer & Busenberg 1982, Geochim. Cosmochim. Acta 46, 1011-1040, 0-90 C.
	k.Henry = five(108.3865, 0.01985076, -6919.53, -40.45154, 669365)
	k.Carbonic1 = five(-356.3094, -0.06091964, 21834.37, 126.8339, -1684915)
	k.Carbonic2 = five(-107.8871, -0.03252849, 5151.79, 38.92561, -563713.9)
	k.Calcite = five(-171.9065, -0.077993, 2839.319, 71.595, 0)
	k.Aragonite = five(-171.9773, -0.077993, 2903.293, 71.595, 0)
	k.CaHCO3 = five(1209.120, 0.31294, -34765.05, -478.782, 0)
	k.CaCO3 = five(-1228.732, -0.299444, 35512.75, 485.818, 0)

	// Nordstrom et al. 1990.
	k.MgHCO3 = five(-59.215, 0, 2537.455, 20.92298, 0)
	k.MgCO3 = five(0.9910, 0.00667, 0, 0, 0)
	k.CaSO4 = hoff(2.30, 6.90)
	k.MgSO4 = hoff(2.37, 19.04)
	k.HSO4 = hoff(1.988, 16.11)
	k.Silicic = five(-302.3724, -0.050698, 15669.69, 108.18466, -1119669)
	k.Fluoric = hoff(-3.18, -13.3)

	// CaOH+: fitted to the pH of saturated lime at 0-50 C of Bates, Bower & Smith
	// 1956, J. Res. NBS 56, 305-312 (see saturated lime in the tests).
	k.CaOH = hoff(1.413, 15.43)
	// Baes & Mesmer 1976, The Hydrolysis of Cations; the enthalpy is from memory.
	k.MgOH = hoff(-11.44, 66.74)

	// Bates & Pinching 1949, J. Res. NBS 42, 419-430.
	k.Ammonium = three(2835.76, 0.6322, 0.001225)
	// Bates 1951, J. Res. NBS 47, 127-134; Bates & Acree 1943, J. Res. NBS 30,
	// 129-155; third constant Nordstrom et al. 1990.
	k.Phosphoric[0] = three(799.31, 4.5535, 0.013486)
	k.Phosphoric[1] = three(2073.0, 5.9884, 0.020912)
	k.Phosphoric[2] = hoff(-12.346, 14.77)
	// Manov, DeLollis & Acree 1944, J. Res. NBS 33, 287-306.
	k.Boric = three(2237.94, 3.305, 0.016883)
	// Morris 1966, J. Phys. Chem. 70, 3798-3805; data about 5-35 C.
	k.HOCl = three(3000.00, 10.0686, 0.0253)
	// Harned & Ehlers 1933, J. Am. Chem. Soc. 55, 652-656.
	k.Acetic = three(1170.48, 3.1649, 0.013399)
	// Harned & Embree 1934, J. Am. Chem. Soc. 56, 1042-1044.
	k.Formic = three(1342.85, 5.2743, 0.015168)
	// Bates & Pinching 1949, J. Am. Chem. Soc. 71, 1274-1283.
	k.Citric[0] = hoff(-3.128, 4.07)
	k.Citric[1] = hoff(-4.761, 2.23)
	k.Citric[2] = hoff(-6.396, -3.38)
	return k, nil
}

func pow10(x float64) float64 { return math.Exp(x * math.Ln10) }
