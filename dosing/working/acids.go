package working

import "beckline/carbonate"

// acid is one of the acids that bind no metal. From the products x of constants
// and activity coefficients follow its alkalinity and its part in the ionic
// strength.
type acid struct {
	total    carbonate.Component
	symbol   string // of its total in the sheet
	name     string
	ratios   []string // x1, x2, x3: each species over the one with a proton more, multiplied up
	alk      string   // eq/L, with x1.. and the symbol
	strength string   // sum of z^2 c
}

// acids in the order of the model's proton condition. Reference species carry
// no alkalinity: NH4, H2PO4, H4SiO4, B(OH)3, F, HOCl and the whole organic acids.
var acids = []acid{
	{carbonate.Ammonia, "N_t", "ammonia", []string{"KNH4 / h * g1 / g0"}, "N_t * x1 / (1 + x1)", "N_t / (1 + x1)"},
	{carbonate.Phosphate, "P_t", "phosphate",
		[]string{"KP1 / h * g0 / g1", "KP1 / h * g0 / g1 * KP2 / h * g1 / g2", "KP1 / h * g0 / g1 * KP2 / h * g1 / g2 * KP3 / h * g2 / g3"},
		"P_t * (x2 + 2 * x3 - 1) / (1 + x1 + x2 + x3)", "P_t * (x1 + 4 * x2 + 9 * x3) / (1 + x1 + x2 + x3)"},
	{carbonate.Silica, "Si_t", "silica", []string{"KSi / h * g0 / g1"}, "Si_t * x1 / (1 + x1)", "Si_t * x1 / (1 + x1)"},
	{carbonate.Boron, "B_t", "boron", []string{"KB / h * g0 / g1"}, "B_t * x1 / (1 + x1)", "B_t * x1 / (1 + x1)"},
	{carbonate.Fluoride, "F_t", "fluoride", []string{"KHF / h * g0 / g1"}, "-F_t / (1 + x1)", "F_t * x1 / (1 + x1)"},
	{carbonate.Chlorine, "HOCl_t", "free chlorine", []string{"KHOCl / h * g0 / g1"}, "HOCl_t * x1 / (1 + x1)", "HOCl_t * x1 / (1 + x1)"},
	{carbonate.Acetate, "Ac_t", "acetic acid", []string{"KAc / h * g0 / g1"}, "Ac_t * x1 / (1 + x1)", "Ac_t * x1 / (1 + x1)"},
	{carbonate.Formate, "Fo_t", "formic acid", []string{"KFo / h * g0 / g1"}, "Fo_t * x1 / (1 + x1)", "Fo_t * x1 / (1 + x1)"},
	{carbonate.Citrate, "Ci_t", "citric acid",
		[]string{"KCi1 / h * g0 / g1", "KCi1 / h * g0 / g1 * KCi2 / h * g1 / g2", "KCi1 / h * g0 / g1 * KCi2 / h * g1 / g2 * KCi3 / h * g2 / g3"},
		"Ci_t * (x1 + 2 * x2 + 3 * x3) / (1 + x1 + x2 + x3)", "Ci_t * (x1 + 4 * x2 + 9 * x3) / (1 + x1 + x2 + x3)"},
}

// otherAcids works the alkalinity MA of the acids present, and their part MI in
// twice the ionic strength; both are left out where there are none.
func (b *builder) otherAcids(s *carbonate.State) (any bool) {
	var alk, strength sum
	for i := range acids {
		a := &acids[i]
		if !(s.Water.Totals[a.total] > 0) {
			continue
		}
		for j, r := range a.ratios {
			b.work("x"+string(rune('1'+j)), a.name+": with "+[]string{"one proton", "two protons", "three protons"}[j]+" less, over the acid itself", r, "", "")
		}
		b.work("MA_"+a.symbol, a.name+": alkalinity", a.alk, equivalents, "")
		b.work("MI_"+a.symbol, a.name+": sum of charge squared times concentration", a.strength, molar, "")
		alk.plus("MA_" + a.symbol)
		strength.plus("MI_" + a.symbol)
	}
	if alk.empty() {
		return false
	}
	b.step("MA", "alkalinity of the other acids", alk.text, equivalents, "", s.Species().MinorAlkalinity)
	b.work("MI", "their part of twice the ionic strength", strength.text, molar, "")
	return true
}

// sum strings terms together.
type sum struct{ text string }

func (s *sum) plus(term string) {
	if s.text != "" {
		s.text += " + "
	}
	s.text += term
}

func (s *sum) minus(term string) {
	if s.text != "" {
		s.text += " - " + term
		return
	}
	s.text = "-" + term
}

func (s *sum) empty() bool { return s.text == "" }
