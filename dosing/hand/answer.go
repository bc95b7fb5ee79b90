package hand

import (
	"math"
	"slices"

	"beckline/carbonate"
	"beckline/dosing"
)

// Verdict is how two ways stand to each other, in one word.
type Verdict string

// The verdicts.
const (
	Agrees    Verdict = "agrees"    // within the stated bound
	Explained Verdict = "explained" // apart, by an assumption that does not hold here; without it they agree
	Differs   Verdict = "differs"   // apart, and nothing explains it: do not use the answer
	Absent    Verdict = "absent"    // no such way for this case
)

// Answer is the hand method's answer and how it stands to the model's. Amounts
// are mol/L; where no dose was solved for, Hand, Model and Bound are pH.
type Answer struct {
	Verdict Verdict
	Steps   Steps
	IsDose  bool // the figure compared is a dose; else it is the finished pH

	Hand, Model float64
	// Bound is how far apart they may be: what the spread of published constants
	// can do (Spread), and the repeatability of a bench titration (the larger
	// of 3 % of the dose and 0.5 % of the water's carbon, or pH 0.05; common
	// practice, no source).
	Bound, Spread float64

	// Effects say where the difference comes from, largest first; Broken is the
	// assumption that matters most where they are apart, else "".
	Effects []Effect
	Broken  Assumption
}

// Check tells whether the result may be given: everything but an unexplained
// difference.
func (a *Answer) Check() bool { return a.Verdict != Differs }

// Difference is hand less model.
func (a *Answer) Difference() float64 { return a.Hand - a.Model }

// Of does a case by hand. Where the target is an index, a carbon or a CCPP, the
// hand method checks the dose to the pH at which the model meets it. Behind a
// tower, a contactor or a reaction, in a blend, and of two doses the first, it
// checks the step of the product alone, from the water that it meets. It is
// absent where the pH has left 0 to 14, where the product itself reacts, and
// where no dose was solved for and the waters do more than add.
func Of(r *dosing.Result) Answer {
	p, ok := follow(r)
	if !ok || p.pH < 0 || p.pH > 14 {
		return Answer{Verdict: Absent}
	}
	l := ladder{path: p}
	switch {
	case p.chem == nil:
		return l.pHAnswer()
	case p.from == nil && r.Case.Target.Kind == dosing.TargetAlkalinity && p.chem.Equivalents != 0:
		return l.byDivision(r.Case.Target.Value)
	}
	l.figure = func(m *method) float64 { s := m.dose(&l.path); return s.Dose }
	plain := l.plain()
	a := Answer{IsDose: true, Steps: plain.dose(&l.path), Model: l.path.dose}
	a.Hand = a.Steps.Dose
	a.Spread = plain.spread(func(m method) float64 { return l.figure(&m) })
	a.Bound = a.Spread + max(repeatable*a.Model, repeatableCarbon*math.Abs(a.Steps.CarbonMet/a.Steps.PerDose))
	l.judge(&a)
	return a
}

// follow finds the path of the hand method; ok is false where there is none.
func follow(r *dosing.Result) (p path, ok bool) {
	c := &r.Case
	p = path{readings: &c.Readings, raw: &r.Raw().Figures}
	to := c.TargetAt
	if to == 0 || r.Solved == 0 {
		to = len(c.Additions)
	}
	simple := len(c.Sources) == 0 && c.Plain(p.raw.Water, to) && len(r.Doses()) < 2
	if st := r.Dose(); st != nil {
		p.chem, p.dose = &st.Addition.Product.Chemical, st.Dose
		if !simple {
			p.from, p.pH = &r.Stations[r.Solved-1].Figures, st.Figures.PH
			return p, p.from.Water.Add(carbonate.Reagent{Adds: p.chem.Adds, Equivalents: p.chem.Equivalents}, p.dose).Alkalinity == st.Figures.Water.Alkalinity
		}
	} else if !simple {
		return p, false
	}
	p.pH = r.Stations[to].Figures.PH
	if r.Solved > 0 && c.Target.Kind == dosing.TargetPH {
		p.pH = c.Target.Value
	}
	for i := range to {
		if st := &r.Stations[i+1]; !st.Solved {
			p.fixed = append(p.fixed, st)
		}
	}
	return p, true
}

// pHAnswer compares the finished pH after doses that are all given.
func (l *ladder) pHAnswer() Answer {
	l.figure = func(m *method) float64 { s := m.finished(&l.path); return s.Target.PH }
	plain := l.plain()
	a := Answer{Steps: plain.finished(&l.path), Model: l.pH}
	a.Hand = a.Steps.Target.PH
	a.Spread = plain.spread(func(m method) float64 { return l.figure(&m) })
	a.Bound = a.Spread + repeatablePH
	l.judge(&a)
	return a
}

// byDivision is a target alkalinity: no chemistry, one division. With organic
// acids the titration does not give the alkalinity outright.
func (l *ladder) byDivision(target float64) Answer {
	plain := l.plain()
	a := Answer{IsDose: true, Steps: plain.met(&l.path), Model: l.path.dose}
	a.Steps.Needed = target - a.Steps.AlkMet
	a.Steps.PerDose = l.chem.Equivalents
	a.Steps.Dose = a.Steps.Needed / a.Steps.PerDose
	a.Hand = a.Steps.Dose
	a.Bound = repeatable * a.Model
	a.Effects = []Effect{{NoOtherAcids, a.Model - a.Hand}}
	switch {
	case math.Abs(a.Difference()) <= a.Bound:
		a.Verdict = Agrees
	case organics(&l.raw.Water.Totals):
		a.Verdict, a.Broken = Explained, NoOtherAcids
	default:
		a.Verdict = Differs
	}
	return a
}

func organics(t *carbonate.Totals) bool {
	return t[carbonate.Acetate] > 0 || t[carbonate.Formate] > 0 || t[carbonate.Citrate] > 0
}

// judge explains the difference and finds the word for it.
func (l *ladder) judge(a *Answer) {
	a.Effects = l.climb(a.Model, a.Hand)
	constants := a.Effects[len(a.Effects)-1].Amount
	slices.SortStableFunc(a.Effects, func(x, y Effect) int {
		switch a, b := size(x.Amount), size(y.Amount); {
		case a > b:
			return -1
		case a < b:
			return 1
		}
		return 0
	})
	pull := math.Abs(a.Steps.PerDose)
	switch {
	case !l.closes():
		a.Verdict = Differs
	case a.IsDose && pull == 0:
		a.Verdict, a.Broken = Explained, NoOtherAcids
	case math.Abs(a.Difference()) <= a.Bound && (a.Hand > 0 || !a.IsDose):
		a.Verdict = Agrees
	case a.IsDose && pull < smallPull:
		// The chemical hardly moves the water here: the dose is the quotient of two
		// small numbers, and no hand can tell them.
		a.Verdict, a.Broken = Explained, NotNearReach
	case math.Abs(constants) <= a.Spread:
		a.Verdict, a.Broken = Explained, a.Effects[0].Assumption
	default:
		a.Verdict = Differs
	}
}

// smallPull is the equivalents that a mole closes below which a chemical is
// near the end of its reach.
const smallPull = 0.1

func size(v float64) float64 {
	if math.IsNaN(v) {
		return math.Inf(1)
	}
	return math.Abs(v)
}
