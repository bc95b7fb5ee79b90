package working

import (
	"strings"

	"beckline/carbonate"
	"beckline/dosing"
)

func upper(s string) string { return strings.ToUpper(s) }

// figures works what is shown of the finished water.
func (b *builder) figures(r *dosing.Result) {
	f := &r.Finished().Figures
	b.section("5  THE FINISHED WATER IN ITS USUAL UNITS", "")
	caco3 := 500 * carbonate.MolarMassCaCO3
	if f.Alkalinity == f.Water.Alkalinity {
		b.step("alk_mg", "alkalinity", "Alk * 1000 * 100.087 / 2", "mg/L as CaCO3", "", f.Alkalinity*caco3)
	} else {
		b.given("alk_mg", "alkalinity as it would be titrated", f.Alkalinity*caco3, "mg/L as CaCO3", "the model at pH 4.5, by repetition")
	}
	b.step("dic", "dissolved inorganic carbon", "C * 1000", "mmol/L", "", f.DIC*1000)
	b.step("co2", "free carbon dioxide", "CO2 * 44.009 * 1000", "mg/L", "44.009 g/mol", f.FreeCO2*44009)
	if f.SaturationIndex.Given {
		b.step("SI", "saturation index, calcite", "log10(g2^2 * Ca * CO3 / Kcal)", "", "definition of Langelier's index", f.SaturationIndex.Value)
	}
	if f.ChlorideSulfate.Given {
		b.step("csmr", "chloride to sulfate by mass", "Cl * 35.453 / (SO4_t * 96.06)", "", "", f.ChlorideSulfate.Value)
	}
	if f.LarsonRatio.Given {
		alk := "Alk"
		if f.Alkalinity != f.Water.Alkalinity {
			alk = "(alk_mg * 2 / 1000 / 100.087)"
		}
		b.step("larson", "Larson ratio", "(Cl + 2 * SO4_t) / "+alk, "", "Larson & Skold 1958", f.LarsonRatio.Value)
	}
	if f.CCPP.Given {
		b.ccpp(r, f)
	}
}

// ccpp works the potential from its definition: with so much CaCO3 gone, the
// index is 0.
func (b *builder) ccpp(r *dosing.Result, f *dosing.Figures) {
	x := f.CCPP.Value
	w := f.Water
	w.Totals[carbonate.Calcium] -= x
	w.Totals[carbonate.Carbon] -= x
	w.Alkalinity -= 2 * x
	s, err := carbonate.Solve(w)
	if err != nil {
		b.fail(err.Error())
		return
	}
	b.section("6  CALCIUM CARBONATE PRECIPITATION POTENTIAL", "Found by repetition; shown here: with x taken out, the saturation index is 0. A negative x is what the water dissolves.")
	b.given("x", "CaCO3 to be taken out", x, molar, "repetition")
	b.step("Ca_t", "calcium after it", "Ca_t - x", molar, "", w.Totals[carbonate.Calcium])
	b.step("C", "inorganic carbon after it", "C - x", molar, "", w.Totals[carbonate.Carbon])
	b.step("Alk", "alkalinity after it", "Alk - 2 * x", equivalents, "", w.Alkalinity)
	b.given("pH", "pH after it", s.PH, "", "the balances, by repetition; checked below")
	b.given("I", "ionic strength after it", s.IonicStrength(), molar, "the ions, by repetition; checked below")
	b.whole(&s)
	b.step("SI", "check: the saturation index, equal to 0", "log10(g2^2 * Ca * CO3 / Kcal)", "", "Standard Methods 2330", 0)
	b.step("ccpp", "precipitation potential", "x * 100.087 * 1000", "mg/L as CaCO3", "100.087 g/mol", x*1000*carbonate.MolarMassCaCO3)
}
