package hand

import (
	"math"

	"beckline/carbonate"
)

// Assumption is something that the hand method takes for granted.
type Assumption string

// The assumptions, in the order in which the ladder takes them up.
const (
	NoOtherAcids   Assumption = "no_other_acids"  // ammonia, phosphate, silica, boron, fluoride, chlorine, organic acids, also as the chemical itself
	NoPairs        Assumption = "no_ion_pairs"    // calcium and magnesium bind no carbonate, hydroxide or sulfate
	NoBisulfate    Assumption = "no_bisulfate"    // sulfate takes no proton, which it does below pH 4
	SimpleActivity Assumption = "simple_activity" // ionic strength by the simple rules; CO2 is not salted out
	OneSet         Assumption = "constants"       // the constants of one school are as good as another's
	NotNearReach   Assumption = "not_near_reach"  // the chemical still moves the water at the target
)

// Effect is what giving up one assumption does to the answer: model less hand,
// step by step; the effects of all sum to the whole difference. NaN where the
// model without it has no answer.
type Effect struct {
	Assumption Assumption
	Amount     float64 // mol/L of the chemical, or pH where no dose was solved for
}

// ladder goes from the model's answer down to the hand method's, taking up one
// assumption at each rung.
type ladder struct {
	path
	figure func(*method) float64
}

// climb returns the effects of the assumptions.
func (l *ladder) climb(model, byHand float64) []Effect {
	withoutAcids, _ := l.model(false, true)
	withoutPairs, ionic := l.model(false, false)
	// From here the closed form holds exactly with the model's constants.
	exact := l.modelMethod()
	exact.ionicRaw, exact.ionicTarget, exact.saltingOut = l.raw.IonicStrength, ionic, saltingOut
	closed := l.figure(&exact)
	simple := l.modelMethod()
	rule := l.figure(&simple)
	return []Effect{
		{NoOtherAcids, model - withoutAcids},
		{NoPairs, withoutAcids - withoutPairs},
		{NoBisulfate, withoutPairs - closed},
		{SimpleActivity, closed - rule},
		{OneSet, rule - byHand},
	}
}

// saltingOut is the model's slope for CO2, after Harned & Davis 1943.
const saltingOut = 0.1

// modelMethod is the hand method with the model's constants.
func (l *ladder) modelMethod() method {
	m := l.plain()
	m.process, m.reading = fromModel(m.process.Kelvin), fromModel(m.reading.Kelvin)
	return m
}

func fromModel(kelvin float64) Constants {
	k, err := carbonate.ConstantsAt(kelvin)
	if err != nil {
		return Constants{} // the case was solved at this temperature
	}
	return Constants{Kelvin: kelvin, K1: k.Carbonic1, K2: k.Carbonic2, Kwater: k.Water, DaviesA: k.DaviesSlope(),
		PK1: -math.Log10(k.Carbonic1), PK2: -math.Log10(k.Carbonic2), PKw: -math.Log10(k.Water)}
}

// model is the model's answer without the other acids and, where pairs is
// false, with calcium and magnesium that only carry charge; and the ionic
// strength at the end.
func (l *ladder) model(acids, pairs bool) (figure, ionic float64) {
	none := math.NaN()
	keep := func(t carbonate.Totals) carbonate.Totals { return strip(t, acids, pairs) }
	process, err := carbonate.ConstantsAt(l.raw.Water.Kelvin)
	if err != nil {
		return none, none
	}
	w, ok := l.start(process, acids, keep)
	if !ok {
		return none, none
	}
	for _, st := range l.fixed {
		c := &st.Addition.Product.Chemical
		w = w.Add(carbonate.Reagent{Adds: keep(c.Adds), Equivalents: c.Equivalents}, st.Dose)
	}
	if l.chem == nil {
		s, err := process.Solve(w)
		if err != nil {
			return none, none
		}
		return s.PH, s.IonicStrength()
	}
	dose, s, err := process.DoseToPH(w, carbonate.Reagent{Adds: keep(l.chem.Adds), Equivalents: l.chem.Equivalents}, l.pH)
	if err != nil || dose < 0 {
		return none, none
	}
	return dose, s.IonicStrength()
}

// start is the water where the path begins, without what is not kept.
func (l *ladder) start(process *carbonate.Constants, acids bool, keep func(carbonate.Totals) carbonate.Totals) (carbonate.Water, bool) {
	if l.from != nil {
		w := l.from.Water
		w.Totals = keep(w.Totals)
		return w, true
	}
	rd := l.readings
	w := l.raw.Water
	w.Totals = keep(w.Totals)
	if !acids {
		w.Alkalinity = rd.Alkalinity.Value // else as the model took it, past the end point
	}
	reading := process
	var err error
	if rd.PHKelvin.Given && rd.PHKelvin.Value != rd.Kelvin.Value {
		if reading, err = carbonate.ConstantsAt(rd.PHKelvin.Value); err != nil {
			return w, false
		}
	}
	in := carbonate.IonicInput{Measured: l.raw.IonicStrength}
	var s carbonate.State
	if rd.DIC.Given {
		w.Totals[carbonate.Carbon] = rd.DIC.Value
		s, _, err = process.FromCarbon(w, in)
	} else {
		s, _, err = reading.FromPH(rd.PH.Value, w, in)
	}
	return s.Water, err == nil
}

// closes tells whether the model's own dose, in a water made anew, lands where
// the result says: an assumption must not be blamed for a slip.
func (l *ladder) closes() bool {
	w := l.raw.Water
	if l.from != nil {
		w = l.from.Water
	}
	for _, st := range l.fixed {
		c := &st.Addition.Product.Chemical
		w = w.Add(carbonate.Reagent{Adds: c.Adds, Equivalents: c.Equivalents}, st.Dose)
	}
	if l.chem != nil {
		w = w.Add(carbonate.Reagent{Adds: l.chem.Adds, Equivalents: l.chem.Equivalents}, l.path.dose)
	}
	s, err := carbonate.Solve(w)
	return err == nil && math.Abs(s.PH-l.pH) < closurePH
}

// closurePH is far above the solvers' rounding and far below a meter's step.
const closurePH = 1e-5

// strip takes out of totals what the hand method does not know.
func strip(t carbonate.Totals, acids, pairs bool) carbonate.Totals {
	if !acids {
		for c := carbonate.Ammonia; c <= carbonate.Citrate; c++ {
			t[c] = 0
		}
	}
	if !pairs {
		t[carbonate.OtherHardness] += t[carbonate.Calcium] + t[carbonate.Magnesium]
		t[carbonate.Calcium], t[carbonate.Magnesium] = 0, 0
	}
	return t
}
