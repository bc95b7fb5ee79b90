package trim

import (
	"math"
	"strconv"

	"beckline/carbonate"
	"beckline/dosing"
)

// Input is a plant as it runs and one reading of its finished water.
type Input struct {
	Result   *dosing.Result  // of the setting in force, as it was worked out
	Addition int             // index into the case's additions of the feed to trim; below 0 the solved one
	Measured float64         // pH of the finished water as read, 0 to 14
	Kelvin   dosing.Optional // K at which it was read; default the process temperature
	Target   dosing.Target   // default that of the case
	Tolerances
}

// Tolerances are half-widths of the 95 % interval of each reading and of the
// feed; 0 takes the default (common practice, no source).
type Tolerances struct {
	RawPH      float64 // pH; 0.10
	FinishedPH float64 // pH; 0.10
	Alkalinity float64 // share; the larger of 0.03 and 1 mg/L as CaCO3
	Flow       float64 // share; 0.03
	Strength   float64 // share; 0.01
	Dose       float64 // share that the pump gives more or less than set; 0.03
	FreeCO2    float64 // mol/L that a sample loses or takes up before it is read; the larger of a tenth of what it holds above or below the air's, and 0.2 mg/L
}

const (
	normal95         = 1.959963984540054 // two-sided 95 % point of the normal distribution
	defaultPH        = 0.10
	defaultShare     = 0.03
	defaultStrength  = 0.01
	leastAlkalinity  = 2e-3 / carbonate.MolarMassCaCO3 // eq/L: 1 mg/L as CaCO3
	leastCO2         = 0.2e-3 / 44.009                 // mol/L: 0.2 mg/L
	defaultCO2Share  = 0.1
	mostReasonableCO = 1e-2 // mol/L, 440 mg/L of CO2
)

// fill puts the defaults in.
func (t Tolerances) fill(raw *dosing.Figures, air float64) Tolerances {
	set := func(v *float64, to float64) {
		if *v <= 0 {
			*v = to
		}
	}
	set(&t.RawPH, defaultPH)
	set(&t.FinishedPH, defaultPH)
	set(&t.Alkalinity, max(defaultShare, leastAlkalinity/max(raw.Alkalinity, 1e-9)))
	set(&t.Flow, defaultShare)
	set(&t.Strength, defaultStrength)
	set(&t.Dose, defaultShare)
	set(&t.FreeCO2, max(defaultCO2Share*math.Abs(raw.FreeCO2-air), leastCO2))
	return t
}

// plant is an Input made ready.
type plant struct {
	in       Input
	c        dosing.Case // every dose fixed, no target
	addition int
	set      float64 // mol/L, the dose in force
	target   dosing.Target
	targetAt int // station whose water must meet it, 0 the finished water
	k        *carbonate.Constants
	reading  *carbonate.Constants // at the temperature of the finished reading
	air      float64              // mol/L of CO2 in equilibrium with the air
	tol      Tolerances
}

func (in Input) plant() (*plant, error) {
	if in.Result == nil || len(in.Result.Stations) == 0 {
		return nil, &dosing.Problem{Kind: dosing.BadInput, Code: "missing", Field: "case"}
	}
	if !(in.Measured >= 0 && in.Measured <= 14) {
		return nil, outside("finished-ph", in.Measured, 0, 14)
	}
	p := &plant{in: in, c: in.Result.Case, addition: in.Addition, target: in.Target}
	if p.addition < 0 {
		p.addition = in.Result.Solved - 1
	}
	if p.addition < 0 || p.addition >= len(p.c.Additions) || p.c.Additions[p.addition].Process != dosing.ChemicalFeed {
		return nil, &dosing.Problem{Kind: dosing.BadInput, Code: "missing", Field: "product"}
	}
	if p.target.Kind == dosing.NoTarget {
		p.target = p.c.Target
	}
	p.targetAt = p.c.TargetAt
	p.c = fixed(p.c, in.Result, p.addition)
	p.set = in.Result.Stations[p.addition+1].Dose
	if !(p.set > 0) {
		return nil, outside("dose", p.set, 0, math.Inf(1))
	}
	raw := &in.Result.Raw().Figures
	var err error
	if p.k, err = carbonate.ConstantsAt(raw.Water.Kelvin); err != nil {
		return nil, outside("temperature", raw.Water.Kelvin, carbonate.MinKelvin, carbonate.MaxKelvin)
	}
	p.reading = p.k
	if in.Kelvin.Given {
		if p.reading, err = carbonate.ConstantsAt(in.Kelvin.Value); err != nil {
			return nil, outside("ph-temperature", in.Kelvin.Value, carbonate.MinKelvin, carbonate.MaxKelvin)
		}
	}
	p.air = p.k.Henry * carbonate.AirCO2
	p.tol = in.Tolerances.fill(raw, p.air)
	return p, nil
}

// fixed is a case with the dose that its result found and the dose of the
// trimmed addition, and no target. Other additions stay as they are stated: a
// process or a residual has no dose.
func fixed(c dosing.Case, r *dosing.Result, trimmed int) dosing.Case {
	additions := make([]dosing.Addition, len(c.Additions))
	for i, a := range c.Additions {
		if a.Solve || i == trimmed {
			a.Dose, a.Solve, a.Residual = dosing.Some(r.Stations[i+1].Dose), false, dosing.None
		}
		// What the pump can do is no part of what the water does.
		a.Feed.PumpCapacity = dosing.None
		additions[i] = a
	}
	c.Additions, c.Target, c.TargetAt, c.Notes = additions, dosing.Target{}, 0, nil
	return c
}

func outside(field string, v, low, high float64) *dosing.Problem {
	p := &dosing.Problem{Kind: dosing.BadInput, Code: "outside_range", Field: field,
		Given: strconv.FormatFloat(v, 'g', 6, 64), Value: dosing.Some(v)}
	if !math.IsInf(low, 0) {
		p.Low = dosing.Some(low)
	}
	if !math.IsInf(high, 0) {
		p.High = dosing.Some(high)
	}
	return p
}
