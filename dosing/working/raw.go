package working

import (
	"beckline/carbonate"
	"beckline/dosing"
)

// raw works the raw water: of one sample, or of a blend.
func (b *builder) raw(r *dosing.Result) {
	need := needed(r)
	if len(r.Case.Sources) == 0 {
		b.readings("1  READINGS", &r.Case.Readings, &r.Raw().Figures.Water)
		b.sample("2  CONSTANTS", "3", "RAW WATER", &r.Case.Readings, &r.Raw().Figures, need)
		return
	}
	for i := range r.Case.Sources {
		src := &r.Case.Sources[i]
		b.names = map[string]float64{} // nothing of one source serves another
		number, name := "1."+write(float64(i+1), 3)+"  ", upper(src.Name)
		b.readings(number+"READINGS OF "+name, &src.Readings, &r.Sources[i].Water)
		b.sample(number+"CONSTANTS FOR "+name, number, name, &src.Readings, &r.Sources[i], need)
		if b.err != nil {
			return
		}
		b.keepSource(i, number+name+", FOR THE BLEND")
	}
	b.blend(r, need)
}

// needed are the totals that a constant may be wanted for anywhere on the path.
func needed(r *dosing.Result) *carbonate.Totals {
	var t carbonate.Totals
	take := func(w *carbonate.Water) {
		for i, v := range w.Totals {
			t[i] = max(t[i], v)
		}
	}
	for i := range r.Sources {
		take(&r.Sources[i].Water)
	}
	for i := range r.Stations {
		take(&r.Stations[i].Figures.Water)
	}
	return &t
}

// sample works the inorganic carbon of one sample. Where the pH was read at
// another temperature than the process has, the closed sample is carried over.
func (b *builder) sample(constants, number, name string, rd *dosing.Readings, f *dosing.Figures, need *carbonate.Totals) {
	sample, err := dosing.NewSample(*rd)
	if err != nil {
		b.fail(err.Error())
		return
	}
	process, err := carbonate.ConstantsAt(rd.Kelvin.Value)
	if err != nil {
		b.fail(err.Error())
		return
	}
	atPH, elsewhere := process, rd.PHKelvin.Given && rd.PHKelvin.Value != rd.Kelvin.Value && !rd.DIC.Given
	if elsewhere {
		if atPH, err = carbonate.ConstantsAt(rd.PHKelvin.Value); err != nil {
			b.fail(err.Error())
			return
		}
	}
	s, err := sample.Solve(atPH, atPH)
	if err != nil {
		b.fail(err.Error())
		return
	}
	where := "at the water's temperature"
	if elsewhere {
		where = "at the temperature at which the pH was read"
	}
	b.section(constants, "Activities, mol/L, "+where+".")
	if elsewhere {
		b.given("t", "temperature of the sample when its pH was read", rd.PHKelvin.Value-273.15, "C", "reading")
		b.step("T", "the same", "t + 273.15", "K", "", rd.PHKelvin.Value)
	}
	b.constantsAt(atPH, need)
	if rd.DIC.Given {
		b.section(number+"  "+name, "pH from inorganic carbon and alkalinity; [X] is written X.")
		b.given("pH", "pH", s.PH, "", "the balances, by repetition; checked below")
	} else {
		b.section(number+"  "+name, "Inorganic carbon from pH and alkalinity; [X] is written X.")
	}
	b.ionicFromBulk(rd, f, &s)
	b.activities(&s)
	b.hydrogen(&s)
	w := b.body(&s)
	sp := s.Species()
	if rd.DIC.Given {
		b.step("CO3", "carbonate", "C / D", molar, "carbon balance", sp.CO3)
		b.species(&s, w)
		b.step("Alk_sum", "check: alkalinity in all its forms, equal to Alk", "CO3 * E + R", equivalents, "", s.Water.Alkalinity)
	} else {
		b.step("CO3", "carbonate", "(Alk - R) / E", molar, "alkalinity balance", sp.CO3)
		b.species(&s, w)
		b.step("C", "inorganic carbon in all its forms", "CO3 * D", molar, "", s.Water.Totals[carbonate.Carbon])
	}
	b.check(&s, w)
	if elsewhere {
		b.carry(number, process, &f.Water, need)
	}
}

// carry works the pH of the closed sample at the process temperature.
func (b *builder) carry(number string, k *carbonate.Constants, w *carbonate.Water, need *carbonate.Totals) {
	s, err := k.Solve(*w)
	if err != nil {
		b.fail(err.Error())
		return
	}
	b.section(number+"  THE SAME WATER AT ITS OWN TEMPERATURE", "The sample is closed: carbon and alkalinity stay.")
	b.given("t", "temperature of the water", k.Kelvin-273.15, "C", "reading")
	b.step("T", "the same", "t + 273.15", "K", "", k.Kelvin)
	b.constantsAt(k, need)
	b.given("pH", "pH", s.PH, "", "the balances, by repetition; checked below")
	b.given("I", "ionic strength", s.IonicStrength(), molar, "the ions, by repetition; checked below")
	b.whole(&s)
}
