package titration

import (
	"fmt"
	"math"
	"slices"
)

// Titre is what the burette showed before and after. Burettes count downward
// from the top, so End is the larger; reading both, not the difference, shows a
// burette that was not zeroed or was read from the wrong end.
type Titre struct {
	StartML, EndML float64 // mL, 0 to BuretteML
}

// Used is a titre of which only the volume was written down, mL.
func Used(mL float64) Titre { return Titre{EndML: mL} }

// ML is the volume used, mL.
func (t Titre) ML() float64 { return t.EndML - t.StartML }

// Limits of bench readings (common practice, no source).
const (
	BuretteML        = 50.0   // mL, the largest burette in use
	greatestSample   = 1000.0 // mL
	greatestNormal   = 5.0    // eq/L
	smallTitre       = 0.5    // mL; below it the drop at the tip is too large a part
	largeTitre       = 25.0   // mL
	highAlkalinity   = 400.0  // mg/L as CaCO3; more is unusual
	greatestAlk      = 5000.0 // mg/L as CaCO3; more is refused
	lowAlkalinity    = 20.0   // mg/L as CaCO3: Standard Methods 2320 wants two end points below
	duplicatesWithin = 0.05   // of their mean
)

// usualNormalities are the titrants of Standard Methods 2320 (0.02 and 0.1) and
// of field kits (0.16 and 1.6), eq/L (common practice, no source).
var usualNormalities = []float64{0.02, 0.1, 0.16, 1.6}

// Burette is one titration of a sample with a strong acid.
type Burette struct {
	SampleML  float64 // mL, above 0 to 1000
	Normality float64 // eq/L of the acid, above 0 to 5
	Titre     Titre
}

// Alkalinity of the end point to which the acid was added, eq/L: mL x N / mL of
// sample (Standard Methods 2320: mL x N x 50 000 / mL for mg/L as CaCO3). For
// total alkalinity below 20 mg/L a note asks for two end points. Errors: *Error.
func (b Burette) Alkalinity() (float64, []Note, error) {
	eq, notes, err := b.equivalents()
	if err != nil {
		return 0, nil, err
	}
	notes = append(notes, unusualResult(eq, b.Normality)...)
	if mg := AsCaCO3(eq); mg > 0 && mg < lowAlkalinity {
		notes = append(notes, Note{CodeUseTwoEnds, "alkalinity",
			milligrams(eq) + " is under 20: one end point reads high there, take two end points 0.30 pH apart"})
	}
	return eq, notes, nil
}

// equivalents is acid used per litre of sample, eq/L, with the checks of the
// readings themselves.
func (b Burette) equivalents() (float64, []Note, error) {
	if err := b.check(); err != nil {
		return 0, nil, err
	}
	eq := b.Titre.ML() * b.Normality / b.SampleML
	if mg := AsCaCO3(eq); mg > greatestAlk {
		return 0, nil, &Error{CodeOutsideRange, "normality", short(b.Normality) + " eq/L, which gives " + milligrams(eq),
			"readings that give at most 5000 mg/L as CaCO3" + tenfold(b.Normality)}
	}
	return eq, b.notes(), nil
}

func (b Burette) check() error {
	for _, e := range []*Error{
		within("sample", b.SampleML, 0, greatestSample, true, "mL"),
		within("normality", b.Normality, 0, greatestNormal, true, "eq/L"),
		within("start", b.Titre.StartML, 0, BuretteML, false, "mL"),
		within("end", b.Titre.EndML, 0, math.MaxFloat64, false, "mL"),
	} {
		if e != nil {
			return e
		}
	}
	t := b.Titre
	if t.EndML > BuretteML {
		return &Error{CodeOutsideRange, "end", short(t.EndML) + " mL",
			"0 to 50 mL, one burette; use a smaller sample or a stronger titrant"}
	}
	if t.EndML < t.StartML {
		return &Error{CodeOrder, "end", fmt.Sprintf("%s mL after a start of %s mL", short(t.EndML), short(t.StartML)),
			"an end reading not below the start; was the burette read from the wrong end?"}
	}
	return nil
}

func (b Burette) notes() []Note {
	var notes []Note
	mL := b.Titre.ML()
	switch {
	case mL > 0 && mL < smallTitre:
		notes = append(notes, Note{CodeTitreSmall, "titrant",
			short(mL) + " mL is little to read: use more sample or a weaker titrant"})
	case mL > largeTitre:
		notes = append(notes, Note{CodeTitreLarge, "titrant",
			short(mL) + " mL is much: use a smaller sample or a stronger titrant"})
	}
	if !slices.ContainsFunc(usualNormalities, func(n float64) bool { return math.Abs(b.Normality/n-1) < 0.05 }) {
		notes = append(notes, Note{CodeNormality, "normality",
			short(b.Normality) + " eq/L is not one of 0.02, 0.1, 0.16 and 1.6" + tenfold(b.Normality)})
	}
	return notes
}

// tenfold asks whether a slip of the point made the strength.
func tenfold(normality float64) string {
	for _, n := range []float64{0.02, 0.1} {
		if math.Abs(normality/n-10) < 0.5 || math.Abs(normality/n-0.1) < 0.005 {
			return "; is it " + short(n) + "?"
		}
	}
	return ""
}

func unusualResult(eq, normality float64) []Note {
	if mg := AsCaCO3(eq); mg > highAlkalinity {
		return []Note{{CodeUnusual, "alkalinity", "gives " + milligrams(eq) + ", more than usual" + tenfold(normality)}}
	}
	return nil
}

// Working writes the sum out for the log, in plain ASCII.
func (b Burette) Working() string {
	return fmt.Sprintf("(%s - %s) mL x %s eq/L x 50043.5 / %s mL = %.1f mg/L as CaCO3",
		short(b.Titre.EndML), short(b.Titre.StartML), short(b.Normality), short(b.SampleML),
		AsCaCO3(b.Titre.ML()*b.Normality/b.SampleML))
}

// Duplicates is the mean of two titrations of one sample, eq/L, with a note
// where they are over 5 % of it apart (common practice, no source).
func Duplicates(first, second float64) (mean float64, notes []Note) {
	mean = (first + second) / 2
	if math.Abs(first-second) > duplicatesWithin*math.Abs(mean) {
		notes = []Note{{CodeDuplicates, "alkalinity", fmt.Sprintf("%s and %s are over 5 %% apart: titrate a third",
			milligrams(first), milligrams(second))}}
	}
	return mean, notes
}
