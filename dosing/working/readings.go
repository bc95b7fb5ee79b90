package working

import (
	"beckline/carbonate"
	"beckline/dosing"
)

// symbol names a total in the sheet.
type symbol struct {
	total        carbonate.Component
	symbol, what string
}

// inert ions only carry charge.
var inert = []symbol{
	{carbonate.Sodium, "Na", "sodium"},
	{carbonate.Potassium, "K", "potassium"},
	{carbonate.Chloride, "Cl", "chloride"},
	{carbonate.Nitrate, "NO3", "nitrate"},
	{carbonate.OtherHardness, "Hx", "hardness of unknown kind"},
}

// active totals take part in equilibria.
var active = []symbol{
	{carbonate.Calcium, "Ca_t", "calcium"},
	{carbonate.Magnesium, "Mg_t", "magnesium"},
	{carbonate.Sulfate, "SO4_t", "sulfate"},
	{carbonate.Ammonia, "N_t", "ammonia"},
	{carbonate.Phosphate, "P_t", "phosphate"},
	{carbonate.Silica, "Si_t", "silica"},
	{carbonate.Boron, "B_t", "boron"},
	{carbonate.Fluoride, "F_t", "fluoride"},
	{carbonate.Chlorine, "HOCl_t", "free chlorine"},
	{carbonate.Acetate, "Ac_t", "acetic acid"},
	{carbonate.Formate, "Fo_t", "formic acid"},
	{carbonate.Citrate, "Ci_t", "citric acid"},
}

// grams is the molar mass of a component as the sheet writes it.
func grams(c carbonate.Component) string { return write(c.MolarMass(), shownDigits) }

// readings are put into the units in which the rest is worked.
func (b *builder) readings(heading string, rd *dosing.Readings, w *carbonate.Water) {
	b.section(heading, "As read, and in mol/L, eq/L and kelvin.")
	b.given("t", "temperature of the water", rd.Kelvin.Value-273.15, "C", "reading")
	b.step("T", "the same", "t + 273.15", "K", "", rd.Kelvin.Value)
	b.given("alk", "total alkalinity", rd.Alkalinity.Value*500*carbonate.MolarMassCaCO3, "mg/L as CaCO3", "reading")
	b.step("Alk", "the same", "2 * alk / 100.087 / 1000", equivalents, "100.087 g/mol, two equivalents", rd.Alkalinity.Value)
	if rd.PH.Given && !rd.DIC.Given {
		b.given("pH", "pH", rd.PH.Value, "", "reading")
	}
	if rd.DIC.Given {
		b.given("dic", "dissolved inorganic carbon", rd.DIC.Value*1000, "mmol/L", "reading")
		b.step("C", "the same", "dic / 1000", molar, "", rd.DIC.Value)
	}
	for _, list := range [][]symbol{active, inert} {
		for _, s := range list {
			v := w.Totals[s.total]
			if !(v > 0) {
				continue
			}
			basis := "as " + s.total.Formula()
			b.given("mg_"+s.symbol, s.what, v*s.total.MolarMass()*1000, "mg/L "+basis, "reading")
			b.step(s.symbol, "the same", "mg_"+s.symbol+" / "+grams(s.total)+" / 1000", molar,
				grams(s.total)+" g/mol of "+s.total.Formula(), v)
		}
	}
	if left := w.Alkalinity - rd.Alkalinity.Value; left != 0 {
		b.given("left", "alkalinity that the organic acids still hold at the end of the titration, pH 4.5", left, equivalents,
			"the model at pH 4.5, by repetition")
		b.step("Alk", "alkalinity in full", "Alk + left", equivalents, "", w.Alkalinity)
	}
}

// ionicFromBulk works the ionic strength where conductivity or solids gave it.
func (b *builder) ionicFromBulk(rd *dosing.Readings, f *dosing.Figures, s *carbonate.State) {
	const text = "Snoeyink & Jenkins, Water Chemistry, from memory"
	switch f.IonicStrengthFrom {
	case dosing.FromConductivity:
		b.given("EC", "electrical conductivity at 25 C", rd.Conductivity.Value*1e4, "uS/cm", "reading")
		b.step("I", "ionic strength", "1.6e-5 * EC", molar, text, s.IonicStrength())
	case dosing.FromTDS:
		b.given("TDS", "dissolved solids", rd.TDS.Value*1e3, "mg/L", "reading")
		b.step("I", "ionic strength", "2.5e-5 * TDS", molar, text, s.IonicStrength())
	default:
		b.given("I", "ionic strength", s.IonicStrength(), molar, "the ions, by repetition; checked below")
	}
}
