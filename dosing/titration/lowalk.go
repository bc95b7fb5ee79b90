package titration

import (
	"fmt"
	"math"
)

// The two end points of Standard Methods 2320 for low alkalinity: the first
// between pH 4.3 and 4.7, the second 0.30 pH lower, where the free acid is twice
// as much.
const (
	firstLow, firstHigh = 4.3, 4.7
	endPointStep        = 0.30
	stepTolerance       = 0.02 // common practice, no source
	aLittle             = 1e-9 // lets 4.50 - 4.22 be exactly 0.28
)

// LowAlkalinity is a titration to two end points 0.30 pH apart, for waters
// under 20 mg/L as CaCO3, where the acid that only lowers the pH is a large part
// of the titre.
type LowAlkalinity struct {
	SampleML  float64 // mL, above 0 to 1000; the standard takes 100 to 200
	Normality float64 // eq/L, above 0 to 5; the standard takes 0.02
	First     Titre   // to the first end point
	Second    Titre   // from the same start to the second
	FirstPH   float64 // pH at the first end point; 0 where it was not written down
	SecondPH  float64 // pH at the second
}

// Solve gives the alkalinity, eq/L: (2B - C) N / V with B mL to the first and C
// mL to the second end point (Standard Methods 2320, low alkalinity: times
// 50 000 for mg/L as CaCO3). Errors: *Error.
func (l LowAlkalinity) Solve() (float64, []Note, error) {
	first := Burette{l.SampleML, l.Normality, l.First}
	second := Burette{l.SampleML, l.Normality, l.Second}
	b, notes, err := first.equivalents()
	if err != nil {
		return 0, nil, err
	}
	c, _, err := second.equivalents()
	if err != nil {
		return 0, nil, err
	}
	if l.Second.ML() <= l.First.ML() {
		return 0, nil, &Error{CodeOrder, "second end point", short(l.Second.ML()) + " mL",
			"more than the " + short(l.First.ML()) + " mL to the first end point, both counted from the same start"}
	}
	if err := l.checkPH(); err != nil {
		return 0, nil, err
	}
	eq := 2*b - c
	if eq < 0 {
		return 0, nil, &Error{CodeAcid, "second end point", short(l.Second.ML()) + " mL, more than twice the first",
			"at most " + short(2*l.First.ML()) + " mL; a water with no alkalinity holds mineral acid"}
	}
	notes = append(notes, unusualResult(eq, l.Normality)...)
	if AsCaCO3(eq) > lowAlkalinity {
		notes = append(notes, Note{CodeNotLow, "alkalinity",
			milligrams(eq) + " is over 20: one end point by the usual method is enough"})
	}
	return eq, notes, nil
}

// checkPH looks at the end points where they were written down.
func (l LowAlkalinity) checkPH() error {
	if l.FirstPH == 0 && l.SecondPH == 0 {
		return nil
	}
	if !(l.FirstPH >= firstLow-aLittle && l.FirstPH <= firstHigh+aLittle) {
		return &Error{CodeEndPoint, "first end point", "pH " + short(l.FirstPH), "pH 4.3 to 4.7"}
	}
	if step := l.FirstPH - l.SecondPH; !(math.Abs(step-endPointStep) <= stepTolerance+aLittle) {
		return &Error{CodeStep, "second end point", fmt.Sprintf("pH %s, %.2f below the first", short(l.SecondPH), step),
			fmt.Sprintf("0.28 to 0.32 below, pH %.2f to %.2f; titrate again",
				l.FirstPH-endPointStep-stepTolerance, l.FirstPH-endPointStep+stepTolerance)}
	}
	return nil
}

// Working writes the sum out for the log, in plain ASCII.
func (l LowAlkalinity) Working() string {
	b, c := l.First.ML(), l.Second.ML()
	return fmt.Sprintf("(2 x %s - %s) mL x %s eq/L x 50043.5 / %s mL = %.1f mg/L as CaCO3",
		short(b), short(c), short(l.Normality), short(l.SampleML), AsCaCO3((2*b-c)*l.Normality/l.SampleML))
}
