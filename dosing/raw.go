package dosing

import (
	"errors"
	"math"

	"beckline/carbonate"
)

// sameReading is how far two forms of one reading may differ before they
// contradict each other: 2 %, the size of a reading error (common practice, no
// source).
const sameReading = 0.02

// known says which of the figures that hang on optional readings can be given.
// A total that was not measured stays unknown after dosing: what is added is
// known, what was there is not.
type known struct {
	calcium, magnesium, sodium, chloride, sulfate bool
	organics                                      bool // organic acids were entered: alkalinity is by titration
	route                                         IonicRoute
}

// raw turns readings into the water at its process temperature.
func raw(r *Readings) (s carbonate.State, kn known, warnings []Warning, err error) {
	if err := required(r); err != nil {
		return s, kn, nil, err
	}
	w, kn, err := totals(r)
	if err != nil {
		return s, kn, nil, err
	}
	in := ionicInput(r, &kn)
	k, err := carbonate.ConstantsAt(r.Kelvin.Value)
	if err != nil {
		return s, kn, nil, outside("temperature", r.Kelvin.Value, carbonate.MinKelvin, carbonate.MaxKelvin)
	}
	reading := k
	if r.PHKelvin.Given && r.PHKelvin.Value != r.Kelvin.Value {
		if reading, err = carbonate.ConstantsAt(r.PHKelvin.Value); err != nil {
			return s, kn, nil, outside("ph-temperature", r.PHKelvin.Value, carbonate.MinKelvin, carbonate.MaxKelvin)
		}
	}
	var ionsWin, uncertain bool
	if r.DIC.Given {
		s, ionsWin, err = fromCarbon(k, r, w, in)
		if err == nil && r.PH.Given {
			warnings = append(warnings, checkPH(reading, s.Water, r.PH.Value)...)
		}
	} else {
		s, ionsWin, err = fromPH(reading, r, w, in)
		// The carbon hangs on the pH where it was read, not where it is used.
		uncertain = err == nil && carbonUncertain(&s)
		if err == nil && reading != k {
			// The sample is closed on its way from the pipe to the bench.
			s, err = k.Solve(s.Water)
		}
	}
	if err != nil {
		return s, kn, nil, refusal(err, r, reading, w)
	}
	if ionsWin {
		warnings = append(warnings, Warning{Code: "ionic_strength_disagrees", Field: bulkReading(kn.route)})
		kn.route = FromIons
	}
	if uncertain {
		warnings = append(warnings, Warning{Code: "dic_uncertain", Field: "ph", Value: r.PH.Value})
	}
	if !kn.calcium {
		warnings = append(warnings, Warning{Code: "calcium_needed", Field: "calcium"})
	}
	if v, ok := imbalance(r, kn, &s.Water); ok && v > 0.10 {
		warnings = append(warnings, Warning{Code: "charge_imbalance", Value: v, Limit: 0.10})
	}
	return s, kn, warnings, nil
}

func required(r *Readings) error {
	if !r.PH.Given && !r.DIC.Given {
		return &Problem{Kind: BadInput, Code: "missing", Field: "ph"}
	}
	if !r.Alkalinity.Given {
		return &Problem{Kind: BadInput, Code: "missing", Field: "alkalinity"}
	}
	if !r.Kelvin.Given {
		return &Problem{Kind: BadInput, Code: "missing", Field: "temperature"}
	}
	if r.PH.Given && !(r.PH.Value >= 0 && r.PH.Value <= 14) {
		return outside("ph", r.PH.Value, 0, 14)
	}
	if !(r.Alkalinity.Value >= 0) {
		return outside("alkalinity", r.Alkalinity.Value, 0, math.Inf(1))
	}
	return nil
}

// totals sets the conserved totals from whichever readings were taken.
func totals(r *Readings) (w carbonate.Water, kn known, err error) {
	w.Alkalinity = r.Alkalinity.Value
	w.Kelvin = r.Kelvin.Value
	for _, f := range []struct {
		reading Optional
		total   carbonate.Component
		field   string
	}{
		{r.Sulfate, carbonate.Sulfate, "sulfate"},
		{r.Chloride, carbonate.Chloride, "chloride"},
		{r.Sodium, carbonate.Sodium, "sodium"},
		{r.Potassium, carbonate.Potassium, "potassium"},
		{r.Nitrate, carbonate.Nitrate, "nitrate"},
		{r.Ammonia, carbonate.Ammonia, "ammonia"},
		{r.Phosphate, carbonate.Phosphate, "phosphate"},
		{r.Silica, carbonate.Silica, "silica"},
		{r.Boron, carbonate.Boron, "boron"},
		{r.Fluoride, carbonate.Fluoride, "fluoride"},
		{r.FreeChlorine, carbonate.Chlorine, "free-chlorine"},
		{r.Acetate, carbonate.Acetate, "acetate"},
		{r.Formate, carbonate.Formate, "formate"},
		{r.Citrate, carbonate.Citrate, "citrate"},
		{r.DIC, carbonate.Carbon, "dic"},
	} {
		if f.reading.Given {
			if !(f.reading.Value >= 0) || math.IsInf(f.reading.Value, 0) {
				return w, kn, outside(f.field, f.reading.Value, 0, math.Inf(1))
			}
			w.Totals[f.total] = f.reading.Value
		}
	}
	calcium, magnesium, other, err := hardness(r)
	if err != nil {
		return w, kn, err
	}
	w.Totals[carbonate.Calcium] = calcium.Or(0)
	w.Totals[carbonate.Magnesium] = magnesium.Or(0)
	w.Totals[carbonate.OtherHardness] = other
	kn.calcium, kn.magnesium = calcium.Given, magnesium.Given
	kn.sodium, kn.chloride, kn.sulfate = r.Sodium.Given, r.Chloride.Given, r.Sulfate.Given
	kn.organics = r.Acetate.Value > 0 || r.Formate.Value > 0 || r.Citrate.Value > 0
	return w, kn, nil
}

// hardness sorts out calcium, magnesium, calcium hardness and total hardness,
// all mol/L: magnesium is total less calcium, calcium total less magnesium.
// Total hardness alone is of unknown kind: it carries charge and nothing else.
func hardness(r *Readings) (calcium, magnesium Optional, other float64, err error) {
	calcium, magnesium = r.Calcium, r.Magnesium
	if r.CalciumHardness.Given {
		if calcium.Given && apart(calcium.Value, r.CalciumHardness.Value) {
			return calcium, magnesium, 0, &Problem{Kind: BadInput, Code: "readings_disagree", Field: "calcium-hardness",
				Value: r.CalciumHardness, Low: calcium, High: calcium}
		}
		if !calcium.Given {
			calcium = r.CalciumHardness
		}
	}
	total := r.Hardness
	if !total.Given {
		return calcium, magnesium, 0, nil
	}
	switch {
	case calcium.Given && calcium.Value > total.Value*(1+sameReading):
		return calcium, magnesium, 0, &Problem{Kind: BadInput, Code: "calcium_above_hardness", Field: "hardness",
			Value: total, Low: calcium}
	case calcium.Given && magnesium.Given:
		if apart(calcium.Value+magnesium.Value, total.Value) {
			sum := Some(calcium.Value + magnesium.Value)
			return calcium, magnesium, 0, &Problem{Kind: BadInput, Code: "readings_disagree", Field: "hardness",
				Value: total, Low: sum, High: sum}
		}
	case calcium.Given:
		magnesium = Some(max(total.Value-calcium.Value, 0))
	case magnesium.Given:
		if magnesium.Value > total.Value*(1+sameReading) {
			return calcium, magnesium, 0, &Problem{Kind: BadInput, Code: "magnesium_above_hardness", Field: "hardness",
				Value: total, Low: magnesium}
		}
		calcium = Some(max(total.Value-magnesium.Value, 0))
	default:
		other = total.Value
	}
	return calcium, magnesium, other, nil
}

func apart(a, b float64) bool { return math.Abs(a-b) > sameReading*max(a, b) }

// leastIonic stands for a bulk reading of zero: measured, and less than any
// water has, so the ions win and a warning says so.
const leastIonic = 1e-12

func ionicInput(r *Readings, kn *known) carbonate.IonicInput {
	switch {
	case r.Conductivity.Given:
		kn.route = FromConductivity
		return carbonate.IonicInput{Measured: max(carbonate.IonicStrengthFromConductivity(r.Conductivity.Value), leastIonic)}
	case r.TDS.Given:
		kn.route = FromTDS
		return carbonate.IonicInput{Measured: max(carbonate.IonicStrengthFromSolids(r.TDS.Value), leastIonic)}
	}
	kn.route = FromIons
	return carbonate.IonicInput{}
}

func bulkReading(route IonicRoute) string {
	if route == FromConductivity {
		return "conductivity"
	}
	return "tds"
}

// endPointPH ends an alkalinity titration (Standard Methods 2320: 4.3 to 4.9 by
// the alkalinity; 4.5 is the common choice).
const endPointPH = 4.5

// fromPH finds the carbon, with the alkalinity as titrated. With organic acids
// the titration stops while they still hold some of their protons' places: the
// measured figure is the acid down to the end point, so the conserved
// alkalinity is that plus what the sample still has there, found by repetition
// (what is left at the end point hardly depends on the start, so it contracts).
func fromPH(k *carbonate.Constants, r *Readings, w carbonate.Water, in carbonate.IonicInput) (s carbonate.State, ionsWin bool, err error) {
	solve := func(w carbonate.Water) error {
		s, ionsWin, err = k.FromPH(r.PH.Value, w, in)
		return err
	}
	return s, ionsWin, titrated(k, r, w, &s, solve)
}

func fromCarbon(k *carbonate.Constants, r *Readings, w carbonate.Water, in carbonate.IonicInput) (s carbonate.State, ionsWin bool, err error) {
	solve := func(w carbonate.Water) error {
		s, ionsWin, err = k.FromCarbon(w, in)
		return err
	}
	return s, ionsWin, titrated(k, r, w, &s, solve)
}

// titrated solves with the conserved alkalinity that belongs to the titrated
// one. A sample already at the end point has none to titrate: refused.
func titrated(k *carbonate.Constants, r *Readings, w carbonate.Water, s *carbonate.State, solve func(carbonate.Water) error) error {
	if !hasOrganics(&w) {
		return solve(w)
	}
	if !r.DIC.Given && r.PH.Value <= endPointPH {
		return outside("ph", r.PH.Value, endPointPH, 14)
	}
	// Start from what the organic acids alone hold at the end point.
	start := w
	start.Totals[carbonate.Carbon] = 0
	left, err := leftAtEndPoint(k, start, w.Alkalinity)
	if err != nil {
		return err
	}
	w.Alkalinity = r.Alkalinity.Value + left
	if err := solve(w); err != nil {
		return err
	}
	// Near the end point most of the carbon's alkalinity is left there, so plain
	// repetition crawls; the straight line through two passes does not.
	var in, out float64
	for i := range 100 {
		left, err := leftAtEndPoint(k, s.Water, r.Alkalinity.Value)
		if err != nil {
			return err
		}
		before, next := w.Alkalinity, r.Alkalinity.Value+left
		if math.Abs(next-before) <= 1e-13*math.Abs(next)+1e-18 {
			return nil
		}
		w.Alkalinity = next
		if rate := (next - out) / (before - in); i > 0 && rate > 0 && rate < 0.999 {
			w.Alkalinity = before + (next-before)/(1-rate)
		}
		in, out = before, next
		if err := solve(w); err != nil {
			return err
		}
	}
	return carbonate.ErrNoConvergence
}

// leftAtEndPoint is the alkalinity that a titrated sample still has, eq/L, with
// the titrant's ion counted in the ionic strength.
func leftAtEndPoint(k *carbonate.Constants, w carbonate.Water, titrant float64) (float64, error) {
	w.Totals[carbonate.Chloride] += max(titrant, 0)
	return k.AlkalinityAt(endPointPH, w)
}

func hasOrganics(w *carbonate.Water) bool {
	t := &w.Totals
	return t[carbonate.Acetate] > 0 || t[carbonate.Formate] > 0 || t[carbonate.Citrate] > 0
}

// phAgreement is how far the pH may be from the one that carbon and alkalinity
// give before a warning (common practice, no source: the reproducibility of a pH).
const phAgreement = 0.1

func checkPH(k *carbonate.Constants, w carbonate.Water, pH float64) []Warning {
	s, err := k.Solve(w)
	if err != nil || math.Abs(s.PH-pH) > phAgreement {
		return []Warning{{Code: "ph_disagrees_with_dic", Field: "ph", Value: pH, Limit: s.PH}}
	}
	return nil
}

// carbonUncertain: above pH 10.5, or where carbonate brings less than a tenth of
// the buffer, the carbon found from the pH hangs on its last digits. So it does
// under pH 5, where nearly all of it is carbon dioxide and a tenth of a pH is a
// quarter of the carbon.
func carbonUncertain(s *carbonate.State) bool {
	return s.PH > 10.5 || s.PH < 5 || s.CarbonateBufferShare() < 0.1
}

// imbalance is |cations - anions| / (cations + anions) in equivalents, after
// Standard Methods 1030 E (from memory), where all major ions were entered.
func imbalance(r *Readings, kn known, w *carbonate.Water) (float64, bool) {
	if !kn.calcium || !kn.magnesium || !r.Sodium.Given || !r.Chloride.Given || !r.Sulfate.Given {
		return 0, false
	}
	sum := math.Abs(w.Alkalinity)
	for i, v := range w.Totals {
		sum += math.Abs(carbonate.Component(i).ReferenceCharge()) * v
	}
	if sum == 0 {
		return 0, false
	}
	return math.Abs(w.ChargeBalance()) / sum, true
}

func outside(field string, v, low, high float64) *Problem {
	p := &Problem{Kind: BadInput, Code: "outside_range", Field: field, Value: Some(v)}
	if !math.IsInf(low, 0) {
		p.Low = Some(low)
	}
	if !math.IsInf(high, 0) {
		p.High = Some(high)
	}
	return p
}

// refusal turns the model's error into the operator's.
func refusal(err error, r *Readings, k *carbonate.Constants, w carbonate.Water) *Problem {
	var p *Problem
	if errors.As(err, &p) {
		return p
	}
	var out *carbonate.RangeError
	switch {
	case errors.Is(err, carbonate.ErrAlkalinityBelowPH):
		p := &Problem{Kind: BadInput, Code: "alkalinity_below_ph", Field: "alkalinity", Value: r.Alkalinity}
		if least, err := k.LeastAlkalinity(r.PH.Value, w); err == nil {
			p.Low = Some(least)
		}
		return p
	case errors.Is(err, carbonate.ErrChlorineWithAmmonia):
		return &Problem{Kind: BadInput, Code: "chlorine_with_ammonia", Field: "free-chlorine"}
	case errors.As(err, &out) && out.Quantity == "ionic strength":
		return &Problem{Kind: NoAnswer, Code: "ionic_strength", Value: Some(out.Value), High: Some(carbonate.MaxIonicStrength)}
	case errors.As(err, &out) && out.Quantity == "pH":
		return &Problem{Kind: NoAnswer, Code: "ph_outside_scale", Value: Some(out.Value), Low: Some(0), High: Some(14)}
	}
	return &Problem{Kind: Failed, Code: "solver_failed", Given: err.Error()}
}
