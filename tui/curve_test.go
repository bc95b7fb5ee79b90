package tui

import (
	"math"
	"strings"
	"testing"

	"beckline/dosing"
	"beckline/dosing/margin"
)

// TestCurveIsTheSolversOwn compares every point of the curve with a whole
// solution at that dose: the curve may be cheap, but never another number.
func TestCurveIsTheSolversOwn(t *testing.T) {
	for _, adds := range [][]feedEntry{nil, {{Product: "alum-dry", Dose: "22"}, {Product: "aeration", Dose: "50"}},
		{{Product: "hypochlorite-12", Residual: "0.5", Demand: "1", Behind: true}}} {
		d := demo(t).hard()
		s := d.m.sheet.clone()
		s.Adds = adds
		d.m.use(s)
		r, k := d.m.good.result, d.m.good.curve
		if !d.m.good.solved || len(k.ph) != samples {
			t.Fatalf("%v: %d points:\n%s", adds, len(k.ph), d.screen())
		}
		perMole := r.Dose().Addition.Product.Chemical.MolarMass * 1000
		c := r.Case
		c.Target, c.Additions = dosing.Target{}, append([]dosing.Addition(nil), c.Additions...)
		c.Additions[r.Solved-1].Solve = false
		at := func(mg float64) float64 {
			c.Additions[r.Solved-1].Dose = dosing.Some(mg / perMole)
			p, err := dosing.Solve(c)
			if err != nil {
				t.Fatal(err)
			}
			return p.Finished().Figures.PH
		}
		for i, ph := range k.ph {
			if want := at(k.top * float64(i) / (samples - 1)); math.Abs(ph-want) > 1e-9 {
				t.Errorf("%v: point %d is %v, the solver says %v", adds, i, ph, want)
			}
		}
		if want := at(k.dose+k.step) - k.at; math.Abs(k.moves-want) > 1e-9 {
			t.Errorf("%v: a step moves it by %v, the solver says %v", adds, k.moves, want)
		}
	}
}

// TestBandAndTrust checks that the curve lies in its band, that the band at the
// dose is the range that the trust gives, and that both are on the screen.
func TestBandAndTrust(t *testing.T) {
	d := demo(t).hard()
	k := d.m.good.curve
	for i := range 100 {
		share := float64(i) / 100
		ph, _ := k.phAt(share)
		b, ok := k.bandAt(share)
		if slack := 0.2; !ok || b.Low > ph+slack || b.High < ph-slack { // both are drawn between samples
			t.Errorf("at %v the pH is %v, the band %+v", share, ph, b)
		}
	}
	m, err := margin.Of(d.m.good.result, margin.Defaults(), margin.Options{Method: margin.FirstOrder})
	if err != nil {
		t.Fatal(err)
	}
	d.shows(spanText(m.Dose, d.m.good.result.Dose().Addition.Product.Chemical.MolarMass*1000, 3)+" mg/L", "read pH again first")
	dots := func(k curve) (n int) {
		d.m.good.curve = k
		for _, r := range d.screen() {
			if r > 0x2800 && r < 0x2900 {
				for bits := r - 0x2800; bits > 0; bits &= bits - 1 {
					n++
				}
			}
		}
		return n
	}
	bare := k
	bare.band = nil
	if with, without := dots(k), dots(bare); with <= without {
		t.Errorf("%d dots with the band, %d without", with, without)
	}
	d.m.look = plainLook
	d.m.good.curve = k
	if !strings.Contains(d.screen(), " : ") {
		t.Errorf("no band in plain characters:\n%s", d.screen())
	}
}
