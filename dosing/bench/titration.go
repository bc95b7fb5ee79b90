package bench

import (
	"math"
	"strconv"

	"beckline/carbonate"
	"beckline/dosing"
)

// Point is one reading of a jar.
type Point struct {
	Dose float64 // mol of the reagent's formula by its label, per litre of the sample before any was added; 0 or more
	PH   float64 // as read once it stood still
}

// Titration is a jar test: a sample, what was poured in, what was read.
type Titration struct {
	Water   carbonate.Water // the sample as its own readings make it, at the jar's temperature
	Reagent carbonate.Reagent
	Points  []Point // in the order in which they were read

	// Stock is the reagent in what was poured, mol/L by the label. The sample is
	// thinned by it; 0 means so strong that it is not.
	Stock float64

	// Half-widths of the 95 % interval of one reading against its neighbours. A
	// meter that is off by the same amount throughout is not meant: that is the
	// unknown MeterOffset.
	PHTolerance   float64 // pH; 0 means 0.05 (common practice, no source)
	DoseTolerance float64 // share of each dose, 0 to 1: the pipette or the weighing
	DoseStep      float64 // mol/L, the same for every dose: the graduation of the burette
}

// Of makes a titration, without points yet, of a water as worked out with a
// product as the reagent. The jar is taken to be at the water's temperature; set
// Water.Kelvin where it is not.
func Of(water *dosing.Figures, reagent dosing.Product) Titration {
	c := &reagent.Chemical
	return Titration{Water: water.Water, Reagent: carbonate.Reagent{Adds: c.Adds, Equivalents: c.Equivalents}}
}

// DefaultPHTolerance is the half-width of the 95 % interval of a settled pH
// reading against the others of the same run (common practice, no source).
const DefaultPHTolerance = 0.05

const normal95 = 1.959963984540054 // two-sided 95 % point of the normal distribution

// FromBurette makes points from burette readings: litres poured in all, the
// stock in mol/L, litres of sample, and the pH beside each. The slices must be
// equally long; else the error is a *dosing.Problem of field "points".
func FromBurette(litres, pH []float64, stock, sample float64) ([]Point, error) {
	switch {
	case len(litres) != len(pH):
		return nil, &dosing.Problem{Kind: dosing.BadInput, Code: "pairs_incomplete", Field: "points",
			Given:    strconv.Itoa(len(litres)) + " volumes and " + strconv.Itoa(len(pH)) + " pH readings",
			Accepted: "one pH beside each volume"}
	case !(stock > 0):
		return nil, outside("stock", stock, 0, math.Inf(1), "the strength of what is poured, above 0")
	case !(sample > 0):
		return nil, outside("sample", sample, 0, math.Inf(1), "the volume of the sample, above 0")
	}
	points := make([]Point, len(litres))
	for i, v := range litres {
		points[i] = Point{Dose: v * stock / sample, PH: pH[i]}
	}
	return points, nil
}

// check refuses readings that cannot be any.
func (t *Titration) check() error {
	for i, p := range t.Points {
		where := "points " + strconv.Itoa(i+1)
		if !(p.PH >= 0 && p.PH <= 14) {
			return outside(where, p.PH, 0, 14, "pH 0 to 14")
		}
		if !(p.Dose >= 0) || math.IsInf(p.Dose, 0) {
			return outside(where, p.Dose, 0, math.Inf(1), "a dose of 0 or more")
		}
	}
	for _, f := range []struct {
		field string
		value float64
		most  float64
	}{
		{"ph-tolerance", t.PHTolerance, 2},
		{"dose-tolerance", t.DoseTolerance, 1},
		{"dose-step", t.DoseStep, math.MaxFloat64},
		{"stock", t.Stock, math.MaxFloat64},
	} {
		if !(f.value >= 0 && f.value <= f.most) {
			return outside(f.field, f.value, 0, f.most, "0 or more")
		}
	}
	return nil
}

// sigmaPH is the standard deviation of a pH reading.
func (t *Titration) sigmaPH() float64 {
	if t.PHTolerance > 0 {
		return t.PHTolerance / normal95
	}
	return DefaultPHTolerance / normal95
}

// sigmaDose is the standard deviation of a dose, mol/L.
func (t *Titration) sigmaDose(dose float64) float64 {
	return math.Hypot(t.DoseTolerance*dose, t.DoseStep) / normal95
}

func outside(field string, v, low, high float64, accepted string) *dosing.Problem {
	p := &dosing.Problem{Kind: dosing.BadInput, Code: "outside_range", Field: field,
		Given: strconv.FormatFloat(v, 'g', 6, 64), Accepted: accepted, Value: dosing.Some(v)}
	if !math.IsInf(low, 0) {
		p.Low = dosing.Some(low)
	}
	if !math.IsInf(high, 0) && high < math.MaxFloat64 {
		p.High = dosing.Some(high)
	}
	return p
}
