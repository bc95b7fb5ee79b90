package hand

import (
	"math"

	"beckline/carbonate"
	"beckline/dosing"
)

// Step is one addition of the titration: the dose so far, mol/L, and the
// target's figure there, in the target's unit (pH, eq/L, index, mol/L).
type Step struct{ Dose, Figure float64 }

// Titration is the dose found by adding the chemical step by step.
type Titration struct {
	Verdict Verdict // Agrees, Differs, or Absent where nothing was solved for
	Dose    float64 // mol/L, between the last step short of the target and the first past it
	Model   float64 // mol/L
	Steps   []Step  // from no dose to the first past the target
	Halved  int     // halvings of the last step that it took
}

const (
	firstStep    = 1e-4 // of the water's carbon and alkalinity
	growth       = 1.25 // each step is so many times the one before
	mostSteps    = 120
	mostHalvings = 60
	sameDose     = 1e-6 // relative
)

// Titrate doses the water of a result in growing steps until the target is met,
// then halves the last step. The pH of each is found by plain halving
// (carbonate's SolveByBracket), so that the way shares neither the balance at the
// target nor Newton's steps with the answer that it checks. Of two doses it titrates the first,
// with the second as answered. The error is a *dosing.Problem: the titration
// never met the target.
func Titrate(r *dosing.Result) (Titration, error) {
	if r.Solved == 0 {
		return Titration{Verdict: Absent}, nil
	}
	b, err := newBurette(r)
	if err != nil {
		return Titration{}, err
	}
	out := Titration{Model: r.Dose().Dose, Verdict: Differs}
	start, err := b.read(0)
	if err != nil {
		return Titration{}, err
	}
	out.Steps = append(out.Steps, Step{0, start})
	side := b.target.Value - start
	w := &b.water
	step := firstStep * (w.Totals[carbonate.Carbon] + math.Abs(w.Alkalinity) + 1e-6)
	short, past := 0.0, step
	for {
		if len(out.Steps) > mostSteps {
			return Titration{}, failed("the target was not met")
		}
		v, err := b.read(past)
		if err != nil {
			return Titration{}, err
		}
		out.Steps = append(out.Steps, Step{past, v})
		if (b.target.Value-v)*side <= 0 {
			break
		}
		short, past = past, past*growth
	}
	for short < past && out.Halved < mostHalvings {
		mid := short + (past-short)/2
		if mid <= short || mid >= past {
			break
		}
		v, err := b.read(mid)
		if err != nil {
			return Titration{}, err
		}
		if (b.target.Value-v)*side > 0 {
			short = mid
		} else {
			past = mid
		}
		out.Halved++
	}
	out.Dose = past
	if math.Abs(out.Dose-out.Model) <= sameDose*out.Model {
		out.Verdict = Agrees
	}
	return out, nil
}

// burette holds the water that is titrated.
type burette struct {
	kase     dosing.Case
	k        *carbonate.Constants
	water    carbonate.Water // raw
	doses    []float64       // of every addition
	which    int             // the one that is titrated
	to       int             // station of the target
	target   dosing.Target
	organics bool
}

func newBurette(r *dosing.Result) (*burette, error) {
	b := &burette{kase: r.Case, water: r.Raw().Figures.Water, target: r.Case.Target, which: r.Solved - 1, to: r.Case.TargetAt}
	var err error
	if b.k, err = carbonate.ConstantsAt(b.water.Kelvin); err != nil {
		return nil, failed(err.Error())
	}
	b.organics = organics(&b.water.Totals)
	if b.to == 0 {
		b.to = len(r.Case.Additions)
	}
	for i := range r.Case.Additions {
		b.doses = append(b.doses, r.Stations[i+1].Dose)
	}
	return b, nil
}

// read is the target's figure after a dose.
func (b *burette) read(dose float64) (float64, error) {
	b.doses[b.which] = dose
	w, ok := b.kase.Walk(b.k, b.water, b.doses, b.to)
	if !ok {
		return 0, failed("a step of the train has no answer")
	}
	s, err := b.k.SolveByBracket(w)
	if err != nil {
		return 0, failed(err.Error())
	}
	v, ok := b.target.Figure(&s, b.organics)
	if !ok {
		return 0, failed("the water has no such figure")
	}
	return v, nil
}

func failed(why string) *dosing.Problem {
	return &dosing.Problem{Kind: dosing.Failed, Code: "titration_failed", Given: why}
}
