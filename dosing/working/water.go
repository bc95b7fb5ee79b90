package working

import "beckline/carbonate"

const davies = "Davies 1962"

// activities works the activity coefficients from the ionic strength I.
func (b *builder) activities(s *carbonate.State) {
	g0, g1, g2, g3 := s.ActivityCoefficients()
	b.step("g1", "activity coefficient, charge 1", "10^(-A * (sqrt(I) / (1 + sqrt(I)) - 0.3 * I))", "", davies, g1)
	b.step("g2", "charge 2", "g1^4", "", davies, g2)
	if t := &s.Water.Totals; t[carbonate.Phosphate] > 0 || t[carbonate.Citrate] > 0 {
		b.step("g3", "charge 3", "g1^9", "", davies, g3)
	}
	b.step("g0", "uncharged", "10^(0.1 * I)", "", "Harned & Davis 1943", g0)
}

// hydrogen works h, H and OH from pH.
func (b *builder) hydrogen(s *carbonate.State) {
	sp := s.Species()
	b.work("h", "hydrogen-ion activity", "10^(-pH)", "", "pH is an activity")
	b.step("H", "hydrogen ion", "h / g1", molar, "", sp.H)
	b.step("OH", "hydroxide", "Kw / (h * g1)", molar, "", sp.OH)
}

// terms says which ions a water holds.
type terms struct{ calcium, magnesium, sulfate, acids bool }

// body works what carbonate meets at this pH: the free metals, the species per
// CO3, and the alkalinity R that is not carbonate's.
func (b *builder) body(s *carbonate.State) terms {
	sp := s.Species()
	t := &s.Water.Totals
	w := terms{calcium: t[carbonate.Calcium] > 0, magnesium: t[carbonate.Magnesium] > 0, sulfate: t[carbonate.Sulfate] > 0}
	const repeated = "the mass balances, by repetition; checked below"
	if w.calcium {
		b.given("Ca", "free calcium", sp.Ca, molar, repeated)
	}
	if w.magnesium {
		b.given("Mg", "free magnesium", sp.Mg, molar, repeated)
	}
	if w.sulfate {
		b.given("SO4", "free sulfate", sp.SO4, molar, repeated)
		b.step("HSO4", "bisulfate", "KHSO4 * h * g2 / g1 * SO4", molar, "", sp.HSO4)
	}
	if w.calcium {
		b.step("CaOH", "pair of calcium and hydroxide", "KCaOH * g2 * OH * Ca", molar, "", sp.CaOH)
	}
	if w.magnesium {
		b.step("MgOH", "pair of magnesium and hydroxide", "KMgOH / h * g2 / g1 * Mg", molar, "", sp.MgOH)
	}
	w.acids = b.otherAcids(s)
	b.work("b", "HCO3 for each CO3", "h * g2 / (K2 * g1)", "", "")
	b.work("a", "CO2 for each CO3", "b * h * g1 / (K1 * g0)", "", "")
	d, e, r := sum{"1 + b + a"}, sum{"2 + b"}, sum{"OH - H"}
	if w.calcium {
		b.work("p", "CaHCO3 for each Ca and CO3", "KCaHCO3 * g2 * b", "L/mol", "")
		b.work("q", "CaCO3 for each Ca and CO3", "KCaCO3 * g2^2 / g0", "L/mol", "")
		d.plus("Ca * (p + q)")
		e.plus("Ca * (p + 2 * q)")
		r.plus("CaOH")
	}
	if w.magnesium {
		b.work("u", "MgHCO3 for each Mg and CO3", "KMgHCO3 * g2 * b", "L/mol", "")
		b.work("v", "MgCO3 for each Mg and CO3", "KMgCO3 * g2^2 / g0", "L/mol", "")
		d.plus("Mg * (u + v)")
		e.plus("Mg * (u + 2 * v)")
		r.plus("MgOH")
	}
	if w.sulfate {
		r.minus("HSO4")
	}
	if w.acids {
		r.plus("MA")
	}
	b.work("D", "inorganic carbon for each CO3", d.text, "", "")
	b.work("E", "alkalinity for each CO3", e.text, "", "")
	b.work("R", "alkalinity that is not carbonate's", r.text, equivalents, "")
	return w
}

// species works the carbonate species from CO3.
func (b *builder) species(s *carbonate.State, w terms) {
	sp := s.Species()
	b.step("HCO3", "bicarbonate", "b * CO3", molar, "", sp.HCO3)
	b.step("CO2", "carbon dioxide", "a * CO3", molar, "", sp.CO2)
	if w.calcium {
		b.step("CaHCO3", "pair of calcium and bicarbonate", "p * Ca * CO3", molar, "", sp.CaHCO3)
		b.step("CaCO3", "pair of calcium and carbonate", "q * Ca * CO3", molar, "", sp.CaCO3)
	}
	if w.magnesium {
		b.step("MgHCO3", "pair of magnesium and bicarbonate", "u * Mg * CO3", molar, "", sp.MgHCO3)
		b.step("MgCO3", "pair of magnesium and carbonate", "v * Mg * CO3", molar, "", sp.MgCO3)
	}
}

// check works the mass balances and the ionic strength back from the species,
// where they were found by repetition.
func (b *builder) check(s *carbonate.State, w terms) {
	sp := s.Species()
	t := &s.Water.Totals
	twice := sum{"H + OH + HCO3"}
	four := sum{"CO3"}
	if w.calcium {
		balance := sum{"Ca + CaHCO3 + CaCO3 + CaOH"}
		if w.sulfate {
			b.step("CaSO4", "pair of calcium and sulfate", "KCaSO4 * g2^2 / g0 * Ca * SO4", molar, "", sp.CaSO4)
			balance.plus("CaSO4")
		}
		b.step("Ca_sum", "check: calcium in all its forms, equal to Ca_t", balance.text, molar, "", t[carbonate.Calcium])
		twice.plus("CaHCO3 + CaOH")
		four.plus("Ca")
	}
	if w.magnesium {
		balance := sum{"Mg + MgHCO3 + MgCO3 + MgOH"}
		if w.sulfate {
			b.step("MgSO4", "pair of magnesium and sulfate", "KMgSO4 * g2^2 / g0 * Mg * SO4", molar, "", sp.MgSO4)
			balance.plus("MgSO4")
		}
		b.step("Mg_sum", "check: magnesium in all its forms, equal to Mg_t", balance.text, molar, "", t[carbonate.Magnesium])
		twice.plus("MgHCO3 + MgOH")
		four.plus("Mg")
	}
	if w.sulfate {
		balance := sum{"SO4 + HSO4"}
		if w.calcium {
			balance.plus("CaSO4")
		}
		if w.magnesium {
			balance.plus("MgSO4")
		}
		b.step("SO4_sum", "check: sulfate in all its forms, equal to SO4_t", balance.text, molar, "", t[carbonate.Sulfate])
		twice.plus("HSO4")
		four.plus("SO4")
	}
	if w.acids {
		twice.plus("MI")
	}
	for i := range inert {
		if n := &inert[i]; t[n.total] > 0 {
			if n.total == carbonate.OtherHardness {
				four.plus(n.symbol)
			} else {
				twice.plus(n.symbol)
			}
		}
	}
	formula := "0.5 * (" + twice.text + " + 4 * (" + four.text + "))"
	if s.Water.Background > 0 {
		b.given("Bg", "background: ionic strength that these species do not explain", s.Water.Background, molar, "constant through dosing")
		formula = "Bg + " + formula
	}
	b.step("I_sum", "check: half the sum of charge squared times concentration, equal to I", formula, molar, "", s.IonicStrength())
}
