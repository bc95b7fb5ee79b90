package working

import "beckline/carbonate"

// constant is an equilibrium constant as the sheet writes it: the formula is
// worked and compared with the model's own on every sheet.
type constant struct {
	name, what, formula, source string
	of                          func(*carbonate.Constants) float64
	used                        func(*carbonate.Totals) bool
}

const (
	plummer   = "Plummer & Busenberg 1982"
	nordstrom = "Nordstrom et al. 1990"
)

func always(*carbonate.Totals) bool { return true }

func where(all ...carbonate.Component) func(*carbonate.Totals) bool {
	return func(t *carbonate.Totals) bool {
		for _, c := range all {
			if !(t[c] > 0) {
				return false
			}
		}
		return true
	}
}

// constants in the order in which the sheet works them. R = 8.314462618 J/(mol K),
// so that 1000/(R ln 10) = 52.2336, written out in the van 't Hoff lines.
var constants = []constant{
	{"Kw", "water, H2O = H + OH",
		"10^(-283.9710 - 0.05069842 * T + 13323.00 / T + 102.24447 * log10(T) - 1119669 / T^2)", nordstrom,
		func(k *carbonate.Constants) float64 { return k.Water }, always},
	{"K1", "carbonic acid, CO2 + H2O = H + HCO3",
		"10^(-356.3094 - 0.06091964 * T + 21834.37 / T + 126.8339 * log10(T) - 1684915 / T^2)", plummer,
		func(k *carbonate.Constants) float64 { return k.Carbonic1 }, always},
	{"K2", "bicarbonate, HCO3 = H + CO3",
		"10^(-107.8871 - 0.03252849 * T + 5151.79 / T + 38.92561 * log10(T) - 563713.9 / T^2)", plummer,
		func(k *carbonate.Constants) float64 { return k.Carbonic2 }, always},
	{"KCaHCO3", "pair, Ca + HCO3 = CaHCO3", "10^(1209.120 + 0.31294 * T - 34765.05 / T - 478.782 * log10(T))", plummer,
		func(k *carbonate.Constants) float64 { return k.CaHCO3 }, where(carbonate.Calcium)},
	{"KCaCO3", "pair, Ca + CO3 = CaCO3", "10^(-1228.732 - 0.299444 * T + 35512.75 / T + 485.818 * log10(T))", plummer,
		func(k *carbonate.Constants) float64 { return k.CaCO3 }, where(carbonate.Calcium)},
	{"KCaOH", "pair, Ca + OH = CaOH", "10^(1.413 - 15.43 * 52.2336201 * (1 / T - 1 / 298.15))", "fitted to saturated lime, Bates et al. 1956",
		func(k *carbonate.Constants) float64 { return k.CaOH }, where(carbonate.Calcium)},
	{"KMgHCO3", "pair, Mg + HCO3 = MgHCO3", "10^(-59.215 + 2537.455 / T + 20.92298 * log10(T))", nordstrom,
		func(k *carbonate.Constants) float64 { return k.MgHCO3 }, where(carbonate.Magnesium)},
	{"KMgCO3", "pair, Mg + CO3 = MgCO3", "10^(0.9910 + 0.00667 * T)", nordstrom,
		func(k *carbonate.Constants) float64 { return k.MgCO3 }, where(carbonate.Magnesium)},
	{"KMgOH", "pair, Mg + H2O = MgOH + H", "10^(-11.44 - 66.74 * 52.2336201 * (1 / T - 1 / 298.15))", "Baes & Mesmer 1976, enthalpy from memory",
		func(k *carbonate.Constants) float64 { return k.MgOH }, where(carbonate.Magnesium)},
	{"KCaSO4", "pair, Ca + SO4 = CaSO4", "10^(2.30 - 6.90 * 52.2336201 * (1 / T - 1 / 298.15))", nordstrom,
		func(k *carbonate.Constants) float64 { return k.CaSO4 }, where(carbonate.Calcium, carbonate.Sulfate)},
	{"KMgSO4", "pair, Mg + SO4 = MgSO4", "10^(2.37 - 19.04 * 52.2336201 * (1 / T - 1 / 298.15))", nordstrom,
		func(k *carbonate.Constants) float64 { return k.MgSO4 }, where(carbonate.Magnesium, carbonate.Sulfate)},
	{"KHSO4", "bisulfate, H + SO4 = HSO4", "10^(1.988 - 16.11 * 52.2336201 * (1 / T - 1 / 298.15))", nordstrom,
		func(k *carbonate.Constants) float64 { return k.HSO4 }, where(carbonate.Sulfate)},
	{"KNH4", "ammonium, NH4 = H + NH3", "10^(-(2835.76 / T - 0.6322 + 0.001225 * T))", "Bates & Pinching 1949",
		func(k *carbonate.Constants) float64 { return k.Ammonium }, where(carbonate.Ammonia)},
	{"KP1", "phosphoric acid, first", "10^(-(799.31 / T - 4.5535 + 0.013486 * T))", "Bates 1951",
		func(k *carbonate.Constants) float64 { return k.Phosphoric[0] }, where(carbonate.Phosphate)},
	{"KP2", "phosphoric acid, second", "10^(-(2073.0 / T - 5.9884 + 0.020912 * T))", "Bates & Acree 1943",
		func(k *carbonate.Constants) float64 { return k.Phosphoric[1] }, where(carbonate.Phosphate)},
	{"KP3", "phosphoric acid, third", "10^(-12.346 - 14.77 * 52.2336201 * (1 / T - 1 / 298.15))", nordstrom,
		func(k *carbonate.Constants) float64 { return k.Phosphoric[2] }, where(carbonate.Phosphate)},
	{"KSi", "silicic acid", "10^(-302.3724 - 0.050698 * T + 15669.69 / T + 108.18466 * log10(T) - 1119669 / T^2)", nordstrom,
		func(k *carbonate.Constants) float64 { return k.Silicic }, where(carbonate.Silica)},
	{"KB", "boric acid", "10^(-(2237.94 / T - 3.305 + 0.016883 * T))", "Manov et al. 1944",
		func(k *carbonate.Constants) float64 { return k.Boric }, where(carbonate.Boron)},
	{"KHF", "hydrofluoric acid, HF = H + F", "10^(-3.18 + 13.3 * 52.2336201 * (1 / T - 1 / 298.15))", nordstrom,
		func(k *carbonate.Constants) float64 { return k.Fluoric }, where(carbonate.Fluoride)},
	{"KHOCl", "hypochlorous acid", "10^(-(3000.00 / T - 10.0686 + 0.0253 * T))", "Morris 1966",
		func(k *carbonate.Constants) float64 { return k.HOCl }, where(carbonate.Chlorine)},
	{"KAc", "acetic acid", "10^(-(1170.48 / T - 3.1649 + 0.013399 * T))", "Harned & Ehlers 1933",
		func(k *carbonate.Constants) float64 { return k.Acetic }, where(carbonate.Acetate)},
	{"KFo", "formic acid", "10^(-(1342.85 / T - 5.2743 + 0.015168 * T))", "Harned & Embree 1934",
		func(k *carbonate.Constants) float64 { return k.Formic }, where(carbonate.Formate)},
	{"KCi1", "citric acid, first", "10^(-3.128 - 4.07 * 52.2336201 * (1 / T - 1 / 298.15))", "Bates & Pinching 1949",
		func(k *carbonate.Constants) float64 { return k.Citric[0] }, where(carbonate.Citrate)},
	{"KCi2", "citric acid, second", "10^(-4.761 - 2.23 * 52.2336201 * (1 / T - 1 / 298.15))", "Bates & Pinching 1949",
		func(k *carbonate.Constants) float64 { return k.Citric[1] }, where(carbonate.Citrate)},
	{"KCi3", "citric acid, third", "10^(-6.396 + 3.38 * 52.2336201 * (1 / T - 1 / 298.15))", "Bates & Pinching 1949",
		func(k *carbonate.Constants) float64 { return k.Citric[2] }, where(carbonate.Citrate)},
	{"Kcal", "calcite, CaCO3 = Ca + CO3", "10^(-171.9065 - 0.077993 * T + 2839.319 / T + 71.595 * log10(T))", plummer,
		func(k *carbonate.Constants) float64 { return k.Calcite }, where(carbonate.Calcium)},
}

// constantsAt works the constants that a water needs, at T.
func (b *builder) constantsAt(k *carbonate.Constants, t *carbonate.Totals) {
	b.step("eps", "dielectric constant of water", "60954 / (T + 116) - 68.937", "", "the pair in Standard Methods 2330",
		60954/(k.Kelvin+116)-68.937)
	b.step("A", "slope of the activity equation", "1.82e6 * (eps * T)^(-1.5)", "", "Standard Methods 2330", k.DaviesSlope())
	for i := range constants {
		if c := &constants[i]; c.used(t) {
			b.step(c.name, c.what, c.formula, "", c.source, c.of(k))
		}
	}
}
