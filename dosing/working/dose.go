package working

import (
	"math"

	"beckline/carbonate"
	"beckline/dosing"
)

// solved works a dose that was asked for, and the water behind it.
func (b *builder) solved(number string, r *dosing.Result, k *carbonate.Constants, i int) {
	before, st := &r.Stations[i], &r.Stations[i+1]
	c := &st.Addition.Product.Chemical
	s, err := k.Solve(st.Figures.Water)
	if err != nil {
		b.fail(err.Error())
		return
	}
	target := r.Case.Target
	here := r.Case.TargetAt == i+1 || r.Case.TargetAt == 0 && i+1 == len(r.Case.Additions)
	if len(r.Doses()) > 1 {
		here = false // two doses meet two targets together
	}
	heading := number + "DOSE OF " + upper(c.Name)
	switch {
	case here && target.Kind == dosing.TargetPH:
		b.section(heading, "At the target the pH is known, so every species follows; the dose is what closes the alkalinity.")
		b.given("pH", "pH asked for", target.Value, "", "target")
	case here && target.Kind == dosing.TargetAlkalinity:
		b.section(heading, "The dose is what closes the alkalinity at the pH there, and that alkalinity is the one asked for (section 5).")
		b.given("pH", "pH there", s.PH, "", "trial; checked in section 5")
	default:
		b.section(heading, "Found by trial: with this pH behind it the water meets what was asked for, here or farther on. The dose is what closes the alkalinity at that pH.")
		b.given("pH", "pH there", s.PH, "", "trial; checked where the target is met")
	}
	if sum := before.Figures.Water.Add(carbonate.Reagent{Adds: c.Adds, Equivalents: c.Equivalents}, st.Dose); sum.Alkalinity != st.Figures.Water.Alkalinity {
		b.given("d", "dose", st.Dose, molar, "trial: it reacts as it is fed")
		b.takeIn(c, "d")
		b.reactions(before, st)
		b.agree(&st.Figures.Water)
		b.here(k, st)
		return
	}
	b.given("I", "ionic strength", s.IonicStrength(), molar, "the ions, by repetition; checked below")
	b.changed(c, &s)
	b.activities(&s)
	b.hydrogen(&s)
	w := b.body(&s)
	b.close(c, st.Dose)
	b.gain("Alk", "alkalinity", c.Equivalents, "d", equivalents, c.Formula)
	b.gain("C", "inorganic carbon", c.Adds[carbonate.Carbon], "d", molar, c.Formula)
	b.unchanged(c, &s)
	b.agree(&st.Figures.Water)
	b.step("CO3", "carbonate", "C / D", molar, "carbon balance", s.Species().CO3)
	b.species(&s, w)
	b.step("Alk_sum", "check: alkalinity in all its forms, equal to Alk", "CO3 * E + R", equivalents, "", s.Water.Alkalinity)
	b.check(&s, w)
}

// changed gives the totals, other than carbon, that the dose itself moves: they
// are part of the balance that finds it. unchanged checks them.
func (b *builder) changed(c *dosing.Chemical, s *carbonate.State) {
	moved(c, func(n symbol) {
		if _, ok := b.names[n.symbol]; ok {
			b.work(n.symbol+"_0", n.what+" before the dose", n.symbol, molar, "")
		} else {
			b.given(n.symbol+"_0", n.what+" before the dose", 0, molar, "not measured, or none")
		}
		b.given(n.symbol, n.what+" with the dose in it", s.Water.Totals[n.total], molar, "by repetition; checked after the dose")
	})
}

func (b *builder) unchanged(c *dosing.Chemical, s *carbonate.State) {
	moved(c, func(n symbol) {
		b.step(n.symbol, "check: "+n.what+" with the dose in it", n.symbol+"_0 + "+coefficient(c.Adds[n.total])+"d", molar,
			factor(c.Adds[n.total])+" for each mol of "+c.Formula, s.Water.Totals[n.total])
	})
}

// moved calls for each total but carbon that a chemical brings.
func moved(c *dosing.Chemical, each func(symbol)) {
	for _, list := range [][]symbol{active, inert} {
		for _, n := range list {
			if c.Adds[n.total] != 0 {
				each(n)
			}
		}
	}
}

// close works the dose from the balance of alkalinity: with f = E/D equivalents
// a mole of carbon and R beside it, Alk + e d = (C + c d) f + R. Where the
// chemical moves neither (an acid that is its own reference), the dose is what
// its own acid's total rose by.
func (b *builder) close(c *dosing.Chemical, want float64) {
	e, n := c.Equivalents, c.Adds[carbonate.Carbon]
	if e == 0 && n == 0 {
		for _, s := range active {
			if v := c.Adds[s.total]; v != 0 {
				b.given("d", "dose", want, molar, "by repetition: the alkalinity of "+s.what+" closes the balance, checked below")
				return
			}
		}
		b.fail("a chemical that moves nothing")
		return
	}
	b.work("f", "alkalinity for each carbon", "E / D", "", "")
	formula := "(C * f + R - Alk) / " + factor(e)
	switch {
	case n != 0:
		formula = "(C * f + R - Alk) / (" + factor(e) + " - " + coefficient(n) + "f)"
	case e == 1:
		formula = "C * f + R - Alk"
	case e < 0:
		formula = "(Alk - C * f - R) / " + factor(-e)
	}
	// Near the end of a chemical's reach the divisor is small, and the solver's own
	// rounding of the pH shows in the quotient.
	slack := roundingPH * (b.names["C"] + math.Abs(b.names["Alk"])) / math.Abs(e-n*b.names["f"])
	b.stepWithin("d", "dose", formula, molar,
		"alkalinity balance; "+factor(e)+" eq and "+factor(n)+" C for each mol of "+c.Formula, want, slack)
}

// roundingPH is the solver's tolerance of a pH, as a share of the alkalinity that
// it can move.
const roundingPH = 1e-8
