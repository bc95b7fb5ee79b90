package working

import (
	"math"

	"beckline/carbonate"
	"beckline/dosing"
)

// whole works a water whose carbon and pH are known, with every check.
func (b *builder) whole(s *carbonate.State) {
	b.activities(s)
	b.hydrogen(s)
	w := b.body(s)
	b.step("CO3", "carbonate", "C / D", molar, "carbon balance", s.Species().CO3)
	b.species(s, w)
	b.step("Alk_sum", "check: alkalinity in all its forms, equal to Alk", "CO3 * E + R", equivalents, "", s.Water.Alkalinity)
	b.check(s, w)
}

// takeIn adds dose times what the chemical brings to the totals of the sheet.
func (b *builder) takeIn(c *dosing.Chemical, dose string) {
	b.gain("Alk", "alkalinity", c.Equivalents, dose, equivalents, c.Formula)
	b.gain("C", "inorganic carbon", c.Adds[carbonate.Carbon], dose, molar, c.Formula)
	for _, list := range [][]symbol{active, inert} {
		for _, s := range list {
			b.gain(s.symbol, s.what, c.Adds[s.total], dose, molar, c.Formula)
		}
	}
}

func (b *builder) gain(name, what string, each float64, dose, unit, formula string) {
	if each == 0 {
		return
	}
	if _, ok := b.names[name]; !ok {
		b.given(name, what+" before", 0, unit, "not measured, or none")
	}
	sign := " + "
	if each < 0 {
		sign = " - "
	}
	b.work(name, what+" after it", name+sign+coefficient(math.Abs(each))+dose, unit, factor(each)+" for each mol of "+formula)
}

// coefficient writes a factor before a name; 1 is left out.
func coefficient(v float64) string {
	if v == 1 {
		return ""
	}
	return factor(v) + " * "
}

// factor writes what a chemical brings in full: it is part of the formula.
func factor(v float64) string { return write(v, mostDigits) }

// agree checks the sheet's alkalinity and totals against the answer's water.
func (b *builder) agree(w *carbonate.Water) {
	same := func(name string, want float64) {
		if v, ok := b.names[name]; b.err == nil && (ok || want != 0) && !(math.Abs(v-want) <= drift*math.Abs(want)+nothing*floor(molar)) {
			b.fail("the sheet's " + name + " is " + write(v, 9) + ", the answer's " + write(want, 9))
		}
	}
	same("Alk", w.Alkalinity)
	same("C", w.Totals[carbonate.Carbon])
	for _, list := range [][]symbol{active, inert} {
		for _, s := range list {
			same(s.symbol, w.Totals[s.total])
		}
	}
}
