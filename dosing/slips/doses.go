package slips

import (
	"math"

	"beckline/dosing"
	"beckline/dosing/reading"
)

const (
	doseSpread        = 0.25 // standard deviation of ln(dose) from one accepted case to the next
	stationPH         = 0.15 // standard deviation of a measured against a predicted pH of a station
	stationSlope      = 0.05 // share of a dose that is ordinary error, as it moves that pH
	stationAlkalinity = 0.03 // standard deviation of a measured against a predicted alkalinity of a station, share
	leastAlkalinity   = 0.7  // the same, mg/L as CaCO3, where that is more
	gramsCaCO3PerEq   = 100.087 / 2
	alumStrength      = 0.485
	alumVolumeKgL     = 0.645 // kg of dry alum in a litre of liquid alum of 48.5 % (density 1.33)
)

// doses weighs every typed dose against what else it may have been: mass of
// product, mass as CaCO3, liquid for dry, a decimal point. Evidence is the dose of
// the last accepted case and the pH measured after the addition.
func (k *check) doses() []Finding {
	var out []Finding
	for i, a := range k.c.Additions {
		if a.Process != dosing.ChemicalFeed || a.Solve || !a.Dose.Given || !(a.Dose.Value > 0) {
			continue
		}
		if f, ok := k.dose(i, &a); ok {
			out = append(out, f)
		}
	}
	return out
}

// meantDose is another way to take a typed dose: what is meant over what is typed.
type meantDose struct {
	code   string
	factor float64
	cause  string
	prior  float64
}

func (k *check) dose(i int, a *dosing.Addition) (best Finding, found bool) {
	field := a.Product.Name
	grams := a.Dose.Value * a.Product.Chemical.MolarMass * 1000 // mg/L
	typed := doseText(grams)
	before, text := k.doseLoss(i, a, 1)
	if before < enough {
		return Finding{}, false
	}
	for _, m := range meantDoses(&a.Product) {
		after, _ := k.doseLoss(i, a, m.factor)
		gain := before - after - m.prior
		if gain < enough || after > plausible*plausible || found && gain <= best.Weight {
			continue
		}
		best = Finding{
			Code: m.code, Field: field, Weight: gain, Evidence: text,
			Cause: m.cause + " " + typed + " or " + doseText(grams*m.factor) + " of " + a.Product.Chemical.Formula + "?",
			Do:    "write the dose with its basis, and compare with what the pump draws",
			Value: dosing.Some(a.Dose.Value), Meant: dosing.Some(a.Dose.Value * m.factor),
		}
		found = true
	}
	return best, found
}

func doseText(mgL float64) string { return figures(mgL, 3) + " mg/L" }

// meantDoses lists the ways.
func meantDoses(p *dosing.Product) []meantDose {
	var out []meantDose
	add := func(code string, factor, prior float64, cause string) {
		if factor > 0 && math.Abs(factor-1) > 0.15 && !math.IsInf(factor, 0) {
			out = append(out, meantDose{code, factor, cause, prior})
		}
	}
	basis := DoseBasis
	if p.Chemical.Coagulant != dosing.NotCoagulant {
		basis = CoagulantForm
	}
	if p.Strength < 1 {
		add(basis, p.Strength, 0, "as the pure substance or as the product delivered?")
		add(basis, 1/p.Strength, 0, "as the product delivered or as the pure substance?")
		if p.Density != "" {
			if found, err := p.Density.At(p.Strength, 293.15); err == nil {
				add(basis, p.Strength*found.KgPerM3/1000, 0, "by weight, or by volume of the liquid?")
			}
		}
	}
	if p.Chemical.Formula == "Al2(SO4)3.14.3H2O" && p.Strength == 1 {
		add(CoagulantForm, alumStrength, 0, "dry alum, or liquid alum by weight?")
		add(CoagulantForm, alumVolumeKgL, 0, "dry alum, or liquid alum by volume?")
	}
	if e := p.Chemical.Equivalents; e != 0 {
		add(DoseBasis, p.Chemical.MolarMass/(math.Abs(e)*gramsCaCO3PerEq), rareSlip, "as the substance or as CaCO3?")
	}
	for _, b := range p.Chemical.Bases {
		add(basis, p.Chemical.MolarMass/b.Mass, 0, "as "+p.Chemical.Formula+" or as "+b.Name+"?")
	}
	add(DoseDecimal, 10, rareSlip, "is the decimal point in its place?")
	add(DoseDecimal, 0.1, rareSlip, "is the decimal point in its place?")
	return out
}

// doseLoss compares a dose with the last one and with what was read after it.
func (k *check) doseLoss(i int, a *dosing.Addition, factor float64) (loss float64, text string) {
	if last, ok := k.lastDose(a.Product.Chemical.Formula); ok {
		t := term{z: math.Log(a.Dose.Value*factor/last) / doseSpread}
		loss += t.loss()
		text = "last time it was " + doseText(last*a.Product.Chemical.MolarMass*1000)
	}
	read := k.x.Measured[i+1]
	if !read.PH.Given && !read.Alkalinity.Given {
		return loss, text
	}
	w, ok1 := k.with(i+1, factor, i+1)
	other, ok2 := k.with(i+1, factor*(1+stationSlope), i+1)
	if !ok1 || !ok2 {
		return loss + enough, text // that dose has no water at all
	}
	say := func(more string) {
		if text != "" {
			text += "; "
		}
		text += more
	}
	if read.PH.Given {
		t := term{z: (read.PH.Value - w.PH) / math.Hypot(stationPH, other.PH-w.PH)}
		loss += t.loss()
		say("the pH after it reads " + pH(read.PH.Value) + ", this dose gives " + pH(w.PH))
	}
	if read.Alkalinity.Given {
		f, _ := reading.Lookup("alkalinity")
		sigma := math.Hypot(max(stationAlkalinity*w.Alkalinity, f.FromBare(leastAlkalinity)), other.Alkalinity-w.Alkalinity)
		t := term{z: (read.Alkalinity.Value - w.Alkalinity) / sigma}
		loss += t.loss()
		say("the alkalinity after it reads " + f.Show(read.Alkalinity.Value) + ", this dose leaves " + f.Show(w.Alkalinity) + unit(f))
	}
	return loss, text
}

// lastDose is the dose of a chemical in the last accepted case, mol/L.
func (k *check) lastDose(formula string) (float64, bool) {
	if k.x.Last == nil {
		return 0, false
	}
	for _, a := range k.x.Last.Additions {
		if a.Product.Chemical.Formula == formula && a.Dose.Given && a.Dose.Value > 0 {
			return a.Dose.Value, true
		}
	}
	return 0, false
}
