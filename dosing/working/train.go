package working

import (
	"math"

	"beckline/carbonate"
	"beckline/dosing"
)

// train works the water through every addition, in order. A water is worked in
// full where something hangs on it: before and behind a tower or a contactor, at
// a dose that was asked for, where the target is met, and at the end.
func (b *builder) train(r *dosing.Result) {
	k, err := carbonate.ConstantsAt(r.Raw().Figures.Water.Kelvin)
	if err != nil {
		b.fail(err.Error())
		return
	}
	c := &r.Case
	last := len(c.Additions)
	at := c.TargetAt
	if at == 0 {
		at = last
	}
	for i := range c.Additions {
		before, st := &r.Stations[i], &r.Stations[i+1]
		number := "4." + write(float64(i+1), 3) + "  "
		switch {
		case st.Addition.Process == dosing.Aeration:
			b.tower(number, k, before, st)
		case st.Addition.Process == dosing.LimestoneContactor:
			b.contactor(number, k, st)
		case st.Solved:
			b.solved(number, r, k, i)
		default:
			b.section(number+"AFTER "+upper(st.Addition.Product.Title), "Alkalinity and totals are conserved, so an addition is a sum.")
			chem := &st.Addition.Product.Chemical
			b.given("mg_d", "dose", st.Dose*chem.MolarMass*1000, "mg/L as "+chem.Formula, "given")
			b.step("d", "the same", "mg_d / "+factor(chem.MolarMass)+" / 1000", molar, factor(chem.MolarMass)+" g/mol", st.Dose)
			b.takeIn(chem, "d")
			b.reactions(before, st)
			b.agree(&st.Figures.Water)
			if i+1 == last || i+1 == at && r.Solved > 0 {
				b.here(k, st)
			}
		}
		if b.err != nil {
			return
		}
	}
}

// here works a water in full, its pH found by repetition.
func (b *builder) here(k *carbonate.Constants, st *dosing.Station) {
	s, err := k.Solve(st.Figures.Water)
	if err != nil {
		b.fail(err.Error())
		return
	}
	b.given("pH", "pH", s.PH, "", "the balances, by repetition; checked below")
	b.given("I", "ionic strength", s.IonicStrength(), molar, "the ions, by repetition; checked below")
	b.whole(&s)
}

// tower works aeration: at constant alkalinity, free CO2 goes part of the way to
// its equilibrium with the air, or to the pH that was measured behind it.
func (b *builder) tower(number string, k *carbonate.Constants, before, st *dosing.Station) {
	a := st.Addition
	b.section(number+"BEFORE THE AIR", "The water that comes to it.")
	b.here(k, before)
	b.section(number+"AFTER THE AIR", "Carbon dioxide is exchanged; alkalinity stays.")
	if a.PH.Given {
		s, err := k.Solve(st.Figures.Water)
		if err != nil {
			b.fail(err.Error())
			return
		}
		b.given("pH", "pH behind it", a.PH.Value, "", "reading")
		b.given("I", "ionic strength", s.IonicStrength(), molar, "the ions, by repetition; checked below")
		b.activities(&s)
		b.hydrogen(&s)
		w := b.body(&s)
		b.step("CO3", "carbonate", "(Alk - R) / E", molar, "alkalinity balance", s.Species().CO3)
		b.species(&s, w)
		b.step("C", "inorganic carbon left", "CO3 * D", molar, "", s.Water.Totals[carbonate.Carbon])
		b.check(&s, w)
		return
	}
	b.given("share", "share of the excess that leaves", a.Share.Or(1), "", "given")
	b.given("pCO2", "carbon dioxide in the air", a.AirCO2.Or(carbonate.AirCO2), "atm", "given, or the air of the 2020s")
	b.step("KH", "solubility of carbon dioxide", "10^(108.3865 + 0.01985076 * T - 6919.53 / T - 40.45154 * log10(T) + 669365 / T^2)", "mol/(L atm)", plummer, k.Henry)
	b.work("CO2_f", "free carbon dioxide to be left", "CO2 - share * (CO2 - KH * pCO2 / g0)", molar, "")
	b.given("C", "inorganic carbon left", st.Figures.Water.Totals[carbonate.Carbon], molar, "repetition, until CO2 is CO2_f")
	want := b.names["CO2_f"]
	b.here(k, st)
	b.stepWithin("miss", "check: CO2 less CO2_f, equal to 0", "CO2 - CO2_f", molar, "", 0, 1e-9*math.Abs(want)+1e-15)
}

// contactor works limestone: calcite dissolves up to a saturation index of 0; a
// water that is over it takes up none.
func (b *builder) contactor(number string, k *carbonate.Constants, st *dosing.Station) {
	b.section(number+"AFTER THE LIMESTONE CONTACTOR", "Calcite dissolves until the water is in equilibrium with it; a water over it takes up none.")
	w := &st.Figures.Water
	x := 0.0
	if had, ok := b.names["Ca_t"]; ok {
		x = w.Totals[carbonate.Calcium] - had
	}
	if math.Abs(x) < 1e-15 {
		x = 0
	}
	b.given("x", "calcite dissolved", x, molar, "repetition, until the index is 0")
	b.step("Ca_t", "calcium after it", "Ca_t + x", molar, "", w.Totals[carbonate.Calcium])
	b.step("C", "inorganic carbon after it", "C + x", molar, "", w.Totals[carbonate.Carbon])
	b.step("Alk", "alkalinity after it", "Alk + 2 * x", equivalents, "", w.Alkalinity)
	b.here(k, st)
	index := "log10(g2^2 * Ca * CO3 / Kcal)"
	if x > 0 {
		b.stepWithin("SI", "check: the saturation index, equal to 0", index, "", "definition of Langelier's index", 0, 1e-6)
	} else {
		b.work("SI", "the saturation index, 0 or more", index, "", "definition of Langelier's index")
	}
}

// reactions works what free chlorine does at once: the water's demand makes it
// chloride, and with ammonia it makes monochloramine. Each takes an equivalent.
func (b *builder) reactions(before, st *dosing.Station) {
	after := &st.Figures.Water.Totals
	chlorine := b.names["HOCl_t"]
	used := min(st.Addition.Demand.Or(0), chlorine)
	if used > 0 {
		b.given("used", "free chlorine that the water's demand takes", used, molar, "given, or all there is")
		b.step("HOCl_t", "free chlorine left", "HOCl_t - used", molar, "HOCl becomes Cl", chlorine-used)
		b.gain("Cl", "chloride", 1, "used", molar, "chlorine spent")
		b.work("Alk", "alkalinity after it", "Alk - used", equivalents, "an equivalent for each")
	}
	if made := after[carbonate.Monochloramine] - before.Figures.Water.Totals[carbonate.Monochloramine]; made > 0 {
		b.chloramine(made, &st.Figures.Water)
	}
}

// chloramine works what chlorine and ammonia make of each other.
func (b *builder) chloramine(made float64, after *carbonate.Water) {
	b.given("made", "free chlorine that makes monochloramine", made, molar, "all there is")
	b.step("N_t", "ammonia left", "N_t - made", molar, "NH4 + HOCl = NH2Cl + H + H2O", after.Totals[carbonate.Ammonia])
	b.step("HOCl_t", "free chlorine left", "HOCl_t - made", molar, "", after.Totals[carbonate.Chlorine])
	b.step("Alk", "alkalinity after it", "Alk - made", equivalents, "an equivalent for each", after.Alkalinity)
}
