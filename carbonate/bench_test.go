package carbonate_test

import (
	"math"
	"testing"

	"beckline/carbonate"
)

// benchWater is a soft river water with the ions that make the pairs work.
func benchWater() (pH float64, w carbonate.Water, k *carbonate.Constants) {
	k, err := carbonate.ConstantsAt(283.15)
	if err != nil {
		panic(err)
	}
	w.Alkalinity = 2 * 30e-3 / carbonate.MolarMassCaCO3
	w.Totals[carbonate.Calcium] = 12e-3 / carbonate.Calcium.MolarMass()
	w.Totals[carbonate.Magnesium] = 3e-3 / carbonate.Magnesium.MolarMass()
	w.Totals[carbonate.Sulfate] = 10e-3 / carbonate.Sulfate.MolarMass()
	return 7, w, k
}

var caustic = carbonate.Reagent{Equivalents: 1, Adds: carbonate.Totals{carbonate.Sodium: 1}}

// TestSolversAllocateNothing: the inner solvers run in tight loops (rows,
// draws, mixes), so none may allocate.
func TestSolversAllocateNothing(t *testing.T) {
	pH, w, k := benchWater()
	s, _, err := k.FromPH(pH, w, carbonate.IonicInput{})
	if err != nil {
		t.Fatal(err)
	}
	for name, f := range map[string]func(){
		"FromPH":          func() { _, _, _ = k.FromPH(pH, w, carbonate.IonicInput{}) },
		"Solve":           func() { _, _ = k.Solve(s.Water) },
		"DoseToPH":        func() { _, _, _ = k.DoseToPH(s.Water, caustic, 8.5) },
		"CCPP":            func() { _, _ = s.CCPP() },
		"SaturationIndex": func() { _, _, _ = s.SaturationIndex() },
		"BufferIntensity": func() { _ = s.BufferIntensity() },
	} {
		if n := testing.AllocsPerRun(100, f); n != 0 {
			t.Errorf("%s allocates %g times", name, n)
		}
	}
}

func BenchmarkRaw(b *testing.B) {
	pH, w, k := benchWater()
	for b.Loop() {
		_, _, _ = k.FromPH(pH, w, carbonate.IonicInput{})
	}
}

func BenchmarkDose(b *testing.B) {
	pH, w, k := benchWater()
	s, _, _ := k.FromPH(pH, w, carbonate.IonicInput{})
	for b.Loop() {
		_, _, _ = k.DoseToPH(s.Water, caustic, 8.5)
	}
}

func BenchmarkClose(b *testing.B) {
	pH, w, k := benchWater()
	s, _, _ := k.FromPH(pH, w, carbonate.IonicInput{})
	_, f, _ := k.DoseToPH(s.Water, caustic, 8.5)
	for b.Loop() {
		_, _ = k.Solve(f.Water)
	}
}

func BenchmarkCCPP(b *testing.B) {
	pH, w, k := benchWater()
	s, _, _ := k.FromPH(pH, w, carbonate.IonicInput{})
	for b.Loop() {
		_, _ = s.CCPP()
	}
}

// BenchmarkFull is the whole answer: raw water, dose, SI and CCPP on both sides
// and the closing solve.
func BenchmarkFull(b *testing.B) {
	pH, w, k := benchWater()
	for b.Loop() {
		s, _, _ := k.FromPH(pH, w, carbonate.IonicInput{})
		_, f, _ := k.DoseToPH(s.Water, caustic, 8.5)
		again, _ := k.Solve(f.Water)
		s.SaturationIndex()
		again.SaturationIndex()
		_, _ = s.CCPP()
		_, _ = again.CCPP()
	}
}

func BenchmarkConstants(b *testing.B) {
	for b.Loop() {
		_, _ = carbonate.ConstantsAt(283.15)
	}
}

// BenchmarkDoseByNest is the same dose by the obvious way, for comparison: a
// root in the dose around a root in pH around a root in the ionic strength, each
// by Brent's method to the same tolerance.
func BenchmarkDoseByNest(b *testing.B) {
	pH, w, k := benchWater()
	s, _, _ := k.FromPH(pH, w, carbonate.IonicInput{})
	var dose float64
	for b.Loop() {
		dose = nestedDose(k, s.Water, 8.5)
	}
	if want, _, _ := k.DoseToPH(s.Water, caustic, 8.5); math.Abs(dose-want) > 1e-6*want {
		b.Fatalf("the nest finds %g, the direct way %g", dose, want)
	}
}

func nestedDose(k *carbonate.Constants, w carbonate.Water, target float64) float64 {
	return brent(0, 1e-2, 1e-13, func(dose float64) float64 {
		v := w.Add(caustic, dose)
		return brent(4, 12, 1e-11, func(pH float64) float64 {
			// The innermost root: the ionic strength at which the species of this
			// pH make up just that ionic strength.
			var alkalinity float64
			brent(1e-6, 0.1, 1e-13, func(ionic float64) float64 {
				var explained float64
				alkalinity, explained = simpleSpecies(k, v, pH, ionic)
				return v.Background + explained - ionic
			})
			return alkalinity - v.Alkalinity
		}) - target
	})
}

// simpleSpecies is a plain speciation at a given ionic strength, by repeated
// substitution, written apart from the package under test.
func simpleSpecies(k *carbonate.Constants, w carbonate.Water, pH, ionic float64) (alkalinity, explained float64) {
	dielectric := 60954/(k.Kelvin+116) - 68.937
	a := 1.82e6 * math.Pow(dielectric*k.Kelvin, -1.5)
	lg := -a * (math.Sqrt(ionic)/(1+math.Sqrt(ionic)) - 0.3*ionic)
	g1, g2, g0 := math.Pow(10, lg), math.Pow(10, 4*lg), math.Pow(10, 0.1*ionic)
	h := math.Pow(10, -pH)
	ca, mg, so4, co3 := w.Totals[carbonate.Calcium], w.Totals[carbonate.Magnesium], w.Totals[carbonate.Sulfate], 0.0
	oh := k.Water / h / g1
	for range 200 {
		hco3 := h * g2 / k.Carbonic2 / g1 // per CO3
		co2 := h * h * g2 / (k.Carbonic1 * k.Carbonic2) / g0
		old := co3
		co3 = w.Totals[carbonate.Carbon] / (1 + hco3 + co2 + ca*(k.CaHCO3*g2*hco3+k.CaCO3*g2*g2/g0) + mg*(k.MgHCO3*g2*hco3+k.MgCO3*g2*g2/g0))
		so4 = w.Totals[carbonate.Sulfate] / (1 + k.HSO4*h*g2/g1 + (ca*k.CaSO4+mg*k.MgSO4)*g2*g2/g0)
		ca = w.Totals[carbonate.Calcium] / (1 + co3*(k.CaHCO3*g2*hco3+k.CaCO3*g2*g2/g0) + so4*k.CaSO4*g2*g2/g0 + k.CaOH*g2*oh)
		mg = w.Totals[carbonate.Magnesium] / (1 + co3*(k.MgHCO3*g2*hco3+k.MgCO3*g2*g2/g0) + so4*k.MgSO4*g2*g2/g0 + k.MgOH*g2/g1/h)
		if math.Abs(co3-old) <= 1e-13*co3 {
			break
		}
	}
	hyd := h / g1
	hco3 := h * g2 / k.Carbonic2 / g1 * co3
	caHCO3, mgHCO3 := k.CaHCO3*g2*ca*hco3, k.MgHCO3*g2*mg*hco3
	caCO3, mgCO3 := k.CaCO3*g2*g2/g0*ca*co3, k.MgCO3*g2*g2/g0*mg*co3
	caOH, mgOH := k.CaOH*g2*ca*oh, k.MgOH*g2*mg/g1/h
	hso4 := k.HSO4 * h * g2 / g1 * so4
	inert := w.Totals[carbonate.Sodium] + w.Totals[carbonate.Chloride]
	alkalinity = -hyd + oh + hco3 + 2*co3 + caHCO3 + mgHCO3 + 2*(caCO3+mgCO3) + caOH + mgOH - hso4
	explained = 0.5 * (inert + hyd + oh + hco3 + hso4 + caHCO3 + mgHCO3 + caOH + mgOH + 4*(co3+so4+ca+mg))
	return alkalinity, explained
}

// brent finds a root of f between a and b by Brent's method: inverse quadratic
// or secant steps inside a bracket, halving where they do not shrink it fast.
func brent(a, b, tolerance float64, f func(float64) float64) float64 {
	fa, fb := f(a), f(b)
	if math.Abs(fa) < math.Abs(fb) {
		a, b, fa, fb = b, a, fb, fa
	}
	c, fc, d, halved := a, fa, b-a, true
	for range 200 {
		if fb == 0 || math.Abs(b-a) <= tolerance {
			return b
		}
		var s float64
		if fa != fc && fb != fc {
			s = a*fb*fc/((fa-fb)*(fa-fc)) + b*fa*fc/((fb-fa)*(fb-fc)) + c*fa*fb/((fc-fa)*(fc-fb))
		} else {
			s = b - fb*(b-a)/(fb-fa)
		}
		lo, hi := (3*a+b)/4, b
		if lo > hi {
			lo, hi = hi, lo
		}
		step := math.Abs(b - c)
		if !halved {
			step = math.Abs(c - d)
		}
		if s < lo || s > hi || math.Abs(s-b) >= step/2 || step < tolerance {
			s, halved = (a+b)/2, true
		} else {
			halved = false
		}
		fs := f(s)
		d, c, fc = c, b, fb
		if (fa < 0) != (fs < 0) {
			b, fb = s, fs
		} else {
			a, fa = s, fs
		}
		if math.Abs(fa) < math.Abs(fb) {
			a, b, fa, fb = b, a, fb, fa
		}
	}
	return b
}
