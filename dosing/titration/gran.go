package titration

import (
	"cmp"
	"fmt"
	"math"
	"slices"

	"beckline/carbonate"
)

// CurvePoint is one reading of a titration curve.
type CurvePoint struct {
	ML float64 // mL of acid added since the start, 0 or more
	PH float64 // 0 to 14
}

// GranCurve is a titration with the pH written down after each addition.
type GranCurve struct {
	SampleML  float64 // mL, above 0 to 1000
	Normality float64 // eq/L of the acid, above 0 to 5
	Points    []CurvePoint
	Kelvin    float64 // K of the sample, 273.15 to 323.15; 0 means 298.15
	Ionic     float64 // mol/L, ionic strength of the sample, 0 to 0.5; 0 means 1.5 times its alkalinity
	// The stretch of pH to which the line is fitted; both 0 means 3.0 to 4.0:
	// beyond the end point, where free acid outweighs what bicarbonate is left,
	// and before the electrode's error in strong acid.
	LowPH, HighPH float64
}

// GranFit is the outcome of a fit; Within is half the interval of 95 %
// confidence (Student's t), from the scatter of the points alone: it knows
// nothing of a wrong titrant or sample volume.
type GranFit struct {
	Alkalinity  float64 // eq/L
	Within      float64 // eq/L
	EndPointML  float64 // mL
	EndPointErr float64 // mL, one standard error
	Slope       float64 // of the line over the normality: the electrode's factor, about 1, less in a water rich in sulfate
	RSquared    float64
	Used        int // points on the straight part
	Notes       []Note
}

const (
	granLowPH, granHighPH = 3.0, 4.0
	fewestPoints          = 4
	leastR2               = 0.95
	slopeLow, slopeHigh   = 0.80, 1.15
)

// Gran fits a straight line to (V + v) 10^-pH / gamma against v, which is the
// free acid beyond the end point, and takes the end point where it is zero (Gran
// 1952, Analyst 77, 661). It needs no end-point pH and no standardised electrode:
// an offset of the meter only changes the slope. The activity coefficient gamma
// follows the acid added; left out, it bends the line and takes 0.2 mg/L off a
// soft water's alkalinity. Errors: *Error.
func Gran(c GranCurve) (GranFit, error) {
	if c.LowPH == 0 && c.HighPH == 0 {
		c.LowPH, c.HighPH = granLowPH, granHighPH
	}
	if c.Kelvin == 0 {
		c.Kelvin = 298.15
	}
	points, err := c.straight()
	if err != nil {
		return GranFit{}, err
	}
	k, err := carbonate.ConstantsAt(c.Kelvin)
	if err != nil {
		return GranFit{}, modelError(err, carbonate.Water{Kelvin: c.Kelvin})
	}
	l, err := c.line(k, points, c.Ionic)
	if err != nil {
		return GranFit{}, err
	}
	if c.Ionic == 0 { // known better once the alkalinity is
		estimate := min(max(ionicPerAlkalinity*l.zero*c.Normality/c.SampleML, 0), carbonate.MaxIonicStrength/2)
		if l, err = c.line(k, points, estimate); err != nil {
			return GranFit{}, err
		}
	}
	if !(l.slope > 0) || !(l.determination >= leastR2) {
		return GranFit{}, &Error{CodeNotStraight, "curve", fmt.Sprintf("%d points with R squared %.3f", l.points, l.determination),
			"points that rise along a line (0.95 or more); readings out of order or not settled?"}
	}
	if l.zero < 0 {
		return GranFit{}, &Error{CodeAcid, "curve", fmt.Sprintf("an end point at %.3f mL", l.zero),
			"an end point at 0 mL or more; a water with no alkalinity holds mineral acid"}
	}
	perML := c.Normality / c.SampleML
	f := GranFit{
		Alkalinity: l.zero * perML, Within: l.zeroWithin * perML,
		EndPointML: l.zero, EndPointErr: l.zeroError,
		Slope: l.slope / c.Normality, RSquared: l.determination, Used: l.points,
	}
	f.Notes = unusualResult(f.Alkalinity, c.Normality)
	if f.Slope < slopeLow || f.Slope > slopeHigh {
		f.Notes = append(f.Notes, Note{CodeNormalityDoubt, "normality", fmt.Sprintf(
			"the line's slope is %.2f of the normality, usually 0.8 to 1.15: check the titrant's strength and the meter's slope", f.Slope)})
	}
	return f, nil
}

// ionicPerAlkalinity is the usual ionic strength of a fresh water, mol/L per eq/L
// of its alkalinity: calcium bicarbonate alone makes 1.5 (stoichiometry).
const ionicPerAlkalinity = 1.5

// line fits the free acid, with the ionic strength of the sample given.
func (c GranCurve) line(k *carbonate.Constants, points []CurvePoint, ionic float64) (line, error) {
	x, y := make([]float64, len(points)), make([]float64, len(points))
	for i, p := range points {
		activity := math.Pow(10, -p.PH)
		// A solution of that ionic strength gives the coefficient; the acid's own
		// ions count in it.
		s, err := k.Solve(carbonate.Water{Background: ionic*c.SampleML/(c.SampleML+p.ML) + activity})
		if err != nil {
			return line{}, modelError(err, carbonate.Water{})
		}
		_, gamma, _, _ := s.ActivityCoefficients()
		x[i] = p.ML
		y[i] = (c.SampleML + p.ML) * activity / gamma
	}
	return fit(x, y), nil
}

// straight checks the curve and returns the points to fit, by volume.
func (c GranCurve) straight() ([]CurvePoint, error) {
	for _, e := range []*Error{
		within("sample", c.SampleML, 0, greatestSample, true, "mL"),
		within("normality", c.Normality, 0, greatestNormal, true, "eq/L"),
		withinCelsius("temperature", c.Kelvin),
		within("ionic strength", c.Ionic, 0, carbonate.MaxIonicStrength, false, "mol/L"),
		within("lowest pH of the fit", c.LowPH, 2, 4.5, false, ""),
		within("highest pH of the fit", c.HighPH, c.LowPH, 5, true, ""),
	} {
		if e != nil {
			return nil, e
		}
	}
	var used []CurvePoint
	for i, p := range c.Points {
		where := fmt.Sprintf("point %d", i+1)
		if e := within(where, p.ML, 0, 10*BuretteML, false, "mL"); e != nil {
			return nil, e
		}
		if e := within(where, p.PH, 0, 14, false, "pH"); e != nil {
			return nil, e
		}
		if p.PH >= c.LowPH && p.PH <= c.HighPH {
			used = append(used, p)
		}
	}
	slices.SortStableFunc(used, func(a, b CurvePoint) int { return cmp.Compare(a.ML, b.ML) })
	distinct := slices.CompactFunc(slices.Clone(used), func(a, b CurvePoint) bool { return a.ML == b.ML })
	if len(distinct) < fewestPoints {
		return nil, &Error{CodeTooFew, "curve", fmt.Sprintf("%d points from pH %s to %s", len(distinct), short(c.LowPH), short(c.HighPH)),
			"4 points or more there, at different volumes; titrate further"}
	}
	return used, nil
}
