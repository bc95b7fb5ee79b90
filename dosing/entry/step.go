package entry

import (
	"strings"

	"beckline/carbonate"
	"beckline/dosing"
	"beckline/dosing/reading"
)

// The steps of the path that are not the dose of a product, as they are typed.
const (
	aerationStep  = "aeration"
	contactorStep = "contactor"
	aerationForm  = "aeration=80 % (the share of the excess CO2 that leaves) or aeration=pH 7.9 (as measured after it)"
	contactorForm = "contactor, with nothing behind it"
	chlorineForm  = "PRODUCT=DOSE demand DEMAND, or PRODUCT=residual RESIDUAL demand DEMAND, each in mg/L Cl2"
)

// process reads an aeration or a limestone contactor; ok is false where the
// text is neither.
func (w *filling) process(text string) (ok bool) {
	name, rest, equals := strings.Cut(text, "=")
	switch strings.ToLower(strings.TrimSpace(name)) {
	case contactorStep:
		if equals {
			w.problem("bad_step", reading.DoseField, text, contactorForm)
		} else {
			w.result.Additions = append(w.result.Additions, dosing.Addition{Process: dosing.LimestoneContactor})
		}
		return true
	case aerationStep:
		w.aeration(text, strings.TrimSpace(rest))
		return true
	}
	return false
}

func (w *filling) aeration(text, rest string) {
	a := dosing.Addition{Process: dosing.Aeration}
	if pH, found := cutWord(rest, "ph"); found && strings.TrimSpace(rest[:len(rest)-len(pH)]) != "" {
		field, _ := reading.Lookup("ph")
		v, err := field.Parse(strings.TrimSpace(pH))
		if err != nil {
			w.problem("bad_step", reading.DoseField, text, aerationForm)
			return
		}
		a.PH = dosing.Some(v.SI)
	} else {
		number := strings.TrimSpace(strings.TrimSuffix(rest, "%"))
		share, err := reading.Number(number)
		// A share is written in per cent: 0.8 without a sign could be either.
		if err != nil || !strings.HasSuffix(rest, "%") || share < 0 || share > 100 {
			w.problem("bad_step", reading.DoseField, text, aerationForm)
			return
		}
		a.Share = dosing.Some(share / 100)
	}
	w.result.Additions = append(w.result.Additions, a)
}

// cutWord returns what follows a word at the start of a text, in any case.
func cutWord(text, word string) (rest string, found bool) {
	if len(text) < len(word) || !strings.EqualFold(text[:len(word)], word) {
		return text, false
	}
	return text[len(word):], true
}

// chlorine reads a dose of chlorine with the water's demand, or the residual
// that is wanted instead of a dose; ok is false where the text has neither word.
func (w *filling) chlorine(text string) (ok bool) {
	name, amount, _ := strings.Cut(text, "=")
	words := strings.Fields(amount)
	at := func(word string) int {
		for i, v := range words {
			if strings.EqualFold(v, word) {
				return i
			}
		}
		return -1
	}
	demand, residual := at("demand"), at("residual")
	if demand < 0 && residual < 0 {
		return false
	}
	product, problem := productNamed(name)
	if problem != nil {
		problem.Field, problem.Given = reading.DoseField, reading.Clean(text)
		w.problems = append(w.problems, problem)
		return true
	}
	if product.Chemical.Adds[carbonate.Chlorine] == 0 {
		w.problem("not_chlorine", reading.DoseField, text, "a demand or a residual of a product that brings chlorine")
		return true
	}
	end := len(words)
	var wanted dosing.Optional
	if demand >= 0 {
		v, good := w.asChlorine(words[demand+1:])
		if !good {
			w.problem("bad_step", reading.DoseField, text, chlorineForm)
			return true
		}
		wanted, end = dosing.Some(v), demand
	}
	if residual < 0 {
		d, err := reading.ParseDose(name + "=" + strings.Join(words[:end], " "))
		if err != nil {
			w.problem("bad_step", reading.DoseField, text, chlorineForm)
			return true
		}
		before := len(w.result.Additions)
		w.addition(d, product)
		if len(w.result.Additions) > before {
			w.result.Additions[before].Demand = wanted
		}
		return true
	}
	v, good := w.asChlorine(words[min(residual+1, end):end])
	if residual != 0 || !good {
		w.problem("bad_step", reading.DoseField, text, chlorineForm)
		return true
	}
	w.result.Additions = append(w.result.Additions, dosing.Addition{Product: product, Residual: dosing.Some(v), Demand: wanted})
	return true
}

// asChlorine reads an amount of chlorine, mg/L as Cl2, into mol/L.
func (w *filling) asChlorine(words []string) (float64, bool) {
	d, err := reading.ParseDose("chlorine=" + strings.Join(words, " "))
	if err != nil || d.Basis != "" && !strings.EqualFold(d.Basis, "Cl2") {
		return 0, false
	}
	return d.MgPerLitre / 1000 / carbonate.Chlorine.MolarMass(), true
}

// targetAfter says which addition's water must meet the target.
func (w *filling) targetAfter() {
	wanted := w.form.TargetAfter
	if strings.TrimSpace(wanted) == "" {
		return
	}
	var names []string
	for i := range w.result.Additions {
		a := &w.result.Additions[i]
		name := a.Product.Name
		switch a.Process {
		case dosing.Aeration:
			name = aerationStep
		case dosing.LimestoneContactor:
			name = contactorStep
		}
		if name == hyphened(wanted) {
			w.result.TargetAt = i + 1
			return
		}
		names = append(names, name)
	}
	w.problem("unknown_step", "target-after", wanted, orList(names))
}
