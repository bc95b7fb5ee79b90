package titration_test

import (
	"errors"
	"math"
	"math/rand/v2"
	"slices"
	"testing"

	"beckline/dosing/titration"
)

// TestGranOnModelWaters: curves titrated in the model, dilution included, give
// back the alkalinity within 0.5 % or 0.1 mg/L, soft water to hard.
func TestGranOnModelWaters(t *testing.T) {
	for _, c := range []struct{ alkalinity, pH, celsius, normality float64 }{
		{4, 6.4, 10, 0.02}, {13, 6.28, 8, 0.02}, {80, 7.6, 20, 0.1}, {285, 7.15, 25, 0.1}, {400, 9.8, 20, 0.1},
	} {
		b := newBench(t, c.alkalinity, c.pH, c.celsius, 100, c.normality)
		end := c.alkalinity / 50043.5 * 100 / c.normality
		past := 1.5 * 100 * 1e-3 / c.normality // reaches below pH 3.0
		fit, err := titration.Gran(titration.GranCurve{SampleML: 100, Normality: c.normality,
			Kelvin: c.celsius + 273.15, Points: b.curve(0, end+past, (end+past)/60)})
		if err != nil {
			t.Fatal(c, err)
		}
		found := titration.AsCaCO3(fit.Alkalinity)
		if math.Abs(found-c.alkalinity) > max(0.1, 5e-3*c.alkalinity) {
			t.Errorf("%+v: found %.3f", c, found)
		}
		if fit.Used < 4 || fit.RSquared < 0.9998 || len(fit.Notes) != 0 || fit.Slope < 0.95 || fit.Slope > 1.01 {
			t.Errorf("%+v: %+v", c, fit)
		}
		if math.Abs(fit.EndPointML-fit.Alkalinity*100/c.normality) > 1e-12 {
			t.Errorf("end point %g mL against alkalinity %g", fit.EndPointML, fit.Alkalinity)
		}
	}
}

// TestGranCoverage: with 0.01 pH of scatter the interval holds the exact answer
// about as often as it says, on a curve of the model.
func TestGranCoverage(t *testing.T) {
	r := rand.New(rand.NewPCG(7, 8))
	const trials = 2000
	b := newBench(t, 250, 7.6, 25, 100, 0.1)
	clean := b.curve(5.3, 6.2, 0.1)
	inside := 0
	for range trials {
		points := slices.Clone(clean)
		for i := range points {
			points[i].PH += 0.01 * r.NormFloat64()
		}
		fit, err := titration.Gran(titration.GranCurve{SampleML: 100, Normality: 0.1, Points: points, LowPH: 2.5, HighPH: 4})
		if err != nil {
			t.Fatal(err)
		}
		if math.Abs(fit.Alkalinity-b.w.Alkalinity) <= fit.Within {
			inside++
		}
	}
	// The scatter of h grows with h, so the plain interval is a little wide or
	// narrow; 95 % is not to be had, 85 to 99.9 % is.
	if share := float64(inside) / trials; share < 0.85 || share > 0.999 {
		t.Errorf("95 %% interval holds the answer in %.1f %%", 100*share)
	}
}

// TestGranOffset: a meter that reads 0.1 high changes the slope by 10^-0.1, not
// the end point.
func TestGranOffset(t *testing.T) {
	b := newBench(t, 80, 7.6, 20, 100, 0.1)
	points := b.curve(1.5, 3.2, 0.02)
	c := titration.GranCurve{SampleML: 100, Normality: 0.1, Points: points, LowPH: 3.1, HighPH: 3.8}
	straight, err := titration.Gran(c)
	if err != nil {
		t.Fatal(err)
	}
	for i := range points {
		points[i].PH += 0.1
	}
	c.LowPH, c.HighPH = 3.2, 3.9
	off, err := titration.Gran(c)
	if err != nil {
		t.Fatal(err)
	}
	if math.Abs(off.Alkalinity/straight.Alkalinity-1) > 1e-3 {
		t.Errorf("alkalinity moved from %g to %g", straight.Alkalinity, off.Alkalinity)
	}
	if math.Abs(off.Slope/straight.Slope-math.Pow(10, -0.1)) > 5e-3 {
		t.Errorf("slope moved by %g", off.Slope/straight.Slope)
	}
}

func TestGranRefusals(t *testing.T) {
	good := func() titration.GranCurve {
		return titration.GranCurve{SampleML: 100, Normality: 0.02, Points: []titration.CurvePoint{
			{0, 7}, {5, 6}, {11, 3.95}, {11.5, 3.75}, {12, 3.6}, {12.5, 3.49}, {13, 3.4}}}
	}
	if fit, err := titration.Gran(good()); err != nil || fit.Used != 5 {
		t.Fatalf("%+v %v", fit, err)
	}
	for _, c := range []struct {
		name        string
		change      func(g *titration.GranCurve)
		code, field string
	}{
		{"no sample", func(g *titration.GranCurve) { g.SampleML = 0 }, titration.CodeOutsideRange, "sample"},
		{"no titrant", func(g *titration.GranCurve) { g.Normality = math.Inf(1) }, titration.CodeOutsideRange, "normality"},
		{"few points", func(g *titration.GranCurve) { g.Points = g.Points[:5] }, titration.CodeTooFew, "curve"},
		{"one volume", func(g *titration.GranCurve) {
			for i := range g.Points {
				g.Points[i].ML = 12
			}
		}, titration.CodeTooFew, "curve"},
		{"falling back", func(g *titration.GranCurve) { g.Points[6].PH = 3.9 }, titration.CodeNotStraight, "curve"},
		{"backward", func(g *titration.GranCurve) {
			for i := range g.Points {
				g.Points[i].ML = 20 - g.Points[i].ML
			}
		}, titration.CodeNotStraight, "curve"},
		{"negative volume", func(g *titration.GranCurve) { g.Points[2].ML = -1 }, titration.CodeOutsideRange, "point 3"},
		{"pH off the scale", func(g *titration.GranCurve) { g.Points[0].PH = 17 }, titration.CodeOutsideRange, "point 1"},
		{"too warm", func(g *titration.GranCurve) { g.Kelvin = 400 }, titration.CodeOutsideRange, "temperature"},
		{"brine", func(g *titration.GranCurve) { g.Ionic = 0.6 }, titration.CodeOutsideRange, "ionic strength"},
		{"stretch turned round", func(g *titration.GranCurve) { g.LowPH, g.HighPH = 4, 3 }, titration.CodeOutsideRange, "highest pH of the fit"},
		{"mineral acid", func(g *titration.GranCurve) {
			for i := range g.Points {
				g.Points[i].ML = max(0, g.Points[i].ML-10.9)
			}
		}, titration.CodeAcid, "curve"},
	} {
		g := good()
		c.change(&g)
		_, err := titration.Gran(g)
		var e *titration.Error
		if !errors.As(err, &e) || e.Code != c.code || e.Field != c.field || e.Given == "" || e.Accepted == "" {
			t.Errorf("%s: %+v", c.name, err)
		}
	}
	weak := good()
	weak.Normality = 0.1
	if fit, err := titration.Gran(weak); err != nil || codes(fit.Notes) != titration.CodeUnusual+" "+titration.CodeNormalityDoubt {
		t.Errorf("0.02 entered as 0.1: %+v %v", fit, err)
	}
}
