package carbonate_test

import (
	"math"
	"testing"

	"pgregory.net/rapid"

	"beckline/carbonate"
)

// anyWater draws a solved water of the ordinary range and beyond.
func anyWater(t *rapid.T) carbonate.State {
	k, err := carbonate.ConstantsAt(rapid.Float64Range(carbonate.MinKelvin, carbonate.MaxKelvin).Draw(t, "kelvin"))
	if err != nil {
		t.Fatal(err)
	}
	var w carbonate.Water
	draw := func(c carbonate.Component, most float64) {
		w.Totals[c] = rapid.OneOf(rapid.Just(0.0), rapid.Float64Range(0, most)).Draw(t, c.Name()) * 1e-3 / c.MolarMass()
	}
	w.Alkalinity = 2e-3 * rapid.Float64Range(0.5, 2000).Draw(t, "alkalinity") / carbonate.MolarMassCaCO3
	draw(carbonate.Calcium, 800)
	draw(carbonate.Magnesium, 300)
	draw(carbonate.Sulfate, 2500)
	draw(carbonate.Sodium, 1500)
	draw(carbonate.Chloride, 2500)
	draw(carbonate.Phosphate, 10)
	draw(carbonate.Silica, 50)
	draw(carbonate.Boron, 3)
	draw(carbonate.Fluoride, 3)
	draw(carbonate.Acetate, 30)
	draw(carbonate.Citrate, 30)
	if rapid.Bool().Draw(t, "chlorine") {
		draw(carbonate.Chlorine, 5)
	} else {
		draw(carbonate.Ammonia, 20)
	}
	s, _, err := k.FromPH(rapid.Float64Range(4.3, 11).Draw(t, "pH"), w, carbonate.IonicInput{})
	if refused(err) {
		t.Skip(err)
	}
	if err != nil {
		t.Fatal(err)
	}
	return s
}

// Each mass balance and the proton condition hold over the species, to rounding.
func TestSpeciesConserve(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		s := anyWater(t)
		sp, w := s.Species(), s.Water
		balance := func(name string, sum, total float64) {
			if math.Abs(sum-total) > 1e-10*math.Abs(total)+1e-18 {
				t.Fatalf("%s: species %g, total %g", name, sum, total)
			}
		}
		balance("carbon", sp.CO2+sp.HCO3+sp.CO3+sp.CaHCO3+sp.CaCO3+sp.MgHCO3+sp.MgCO3, w.Totals[carbonate.Carbon])
		balance("calcium", sp.Ca+sp.CaHCO3+sp.CaCO3+sp.CaSO4+sp.CaOH, w.Totals[carbonate.Calcium])
		balance("magnesium", sp.Mg+sp.MgHCO3+sp.MgCO3+sp.MgSO4+sp.MgOH, w.Totals[carbonate.Magnesium])
		balance("sulfate", sp.SO4+sp.HSO4+sp.CaSO4+sp.MgSO4, w.Totals[carbonate.Sulfate])
		alk := -sp.H + sp.OH + sp.HCO3 + 2*sp.CO3 + sp.CaHCO3 + 2*sp.CaCO3 + sp.MgHCO3 + 2*sp.MgCO3 +
			sp.CaOH + sp.MgOH - sp.HSO4 + sp.MinorAlkalinity
		balance("alkalinity", alk, w.Alkalinity)
	})
}

// A strong base raises the pH, a strong acid lowers it, CO2 lowers it.
func TestPHMovesWithDose(t *testing.T) {
	base := carbonate.Reagent{Equivalents: 1, Adds: carbonate.Totals{carbonate.Sodium: 1}}
	acid := carbonate.Reagent{Equivalents: -1, Adds: carbonate.Totals{carbonate.Chloride: 1}}
	gas := carbonate.Reagent{Adds: carbonate.Totals{carbonate.Carbon: 1}}
	rapid.Check(t, func(t *rapid.T) {
		s := anyWater(t)
		dose := rapid.Float64Range(1e-5, 3e-3).Draw(t, "dose")
		for _, step := range []struct {
			name    string
			reagent carbonate.Reagent
			sign    float64
		}{{"base", base, 1}, {"acid", acid, -1}, {"CO2", gas, -1}} {
			before := s.PH
			for n := 1; n <= 3; n++ {
				after, err := s.Constants().Solve(s.Water.Add(step.reagent, float64(n)*dose))
				if refused(err) {
					break
				}
				if err != nil {
					t.Fatal(err)
				}
				if (after.PH-before)*step.sign <= 0 {
					t.Fatalf("%s: pH %g to %g", step.name, before, after.PH)
				}
				before = after.PH
			}
		}
	})
}

// A blend of a water with itself is that water, and a blend conserves.
func TestBlendConserves(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		a, b := anyWater(t), anyWater(t)
		x, y := rapid.Float64Range(0.01, 100).Draw(t, "x"), rapid.Float64Range(0.01, 100).Draw(t, "y")
		same, err := carbonate.Blend(carbonate.Stream{Water: a.Water, Flow: x}, carbonate.Stream{Water: a.Water, Flow: y})
		if err != nil {
			t.Fatal(err)
		}
		again, err := carbonate.Solve(same)
		if err != nil {
			t.Fatal(err)
		}
		if math.Abs(again.PH-a.PH) > 1e-9 {
			t.Fatalf("a water blended with itself goes from pH %g to %g", a.PH, again.PH)
		}
		mix, err := carbonate.Blend(carbonate.Stream{Water: a.Water, Flow: x}, carbonate.Stream{Water: b.Water, Flow: y})
		if err != nil {
			t.Fatal(err)
		}
		for i := range mix.Totals {
			want := (x*a.Water.Totals[i] + y*b.Water.Totals[i]) / (x + y)
			if math.Abs(mix.Totals[i]-want) > 1e-12*want+1e-300 { // below, floats lose digits
				t.Fatalf("%s: %g, want %g", carbonate.Component(i).Name(), mix.Totals[i], want)
			}
		}
		want := (x*a.Water.Alkalinity + y*b.Water.Alkalinity) / (x + y)
		if math.Abs(mix.Alkalinity-want) > 1e-12*math.Abs(want) {
			t.Fatalf("alkalinity: %g, want %g", mix.Alkalinity, want)
		}
	})
}

// The two ways to a pH, Newton and plain halving, agree.
func TestIndependentRoutesAgree(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		s := anyWater(t)
		slow, err := s.Constants().SolveByBracket(s.Water)
		if err != nil {
			t.Fatal(err)
		}
		if math.Abs(slow.PH-s.PH) > 1e-8 {
			t.Fatalf("pH %.12f and %.12f", s.PH, slow.PH)
		}
	})
}

// Aeration keeps alkalinity and every total but carbon, and moves free CO2 by
// the share that was asked for.
func TestAeration(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		s := anyWater(t)
		share := rapid.Float64Range(0, 1).Draw(t, "share")
		w, err := s.Aerate(share, carbonate.AirCO2)
		if refused(err) {
			t.Skip()
		}
		if err != nil {
			t.Fatal(err)
		}
		after, err := s.Constants().Solve(w)
		if err != nil {
			t.Fatal(err)
		}
		g0, _, _, _ := s.ActivityCoefficients()
		equilibrium := s.Constants().Henry * carbonate.AirCO2 / g0
		want := s.FreeCO2() - share*(s.FreeCO2()-equilibrium)
		if math.Abs(after.FreeCO2()-want) > 1e-6*max(want, s.FreeCO2()) {
			t.Fatalf("free CO2 %g, want %g of %g", after.FreeCO2(), want, s.FreeCO2())
		}
		w.Totals[carbonate.Carbon] = s.Water.Totals[carbonate.Carbon]
		if w != s.Water {
			t.Fatal("aeration changed more than the carbon")
		}
	})
}

// Nothing outside the range is answered.
func TestRefusals(t *testing.T) {
	k := constantsAt(t, 10)
	var w carbonate.Water
	w.Alkalinity = 1e-3
	for name, f := range map[string]func() error{
		"frozen":  func() error { _, err := carbonate.ConstantsAt(273.0); return err },
		"hot":     func() error { _, err := carbonate.ConstantsAt(323.2); return err },
		"NaN":     func() error { _, err := carbonate.ConstantsAt(math.NaN()); return err },
		"pH 15":   func() error { _, _, err := k.FromPH(15, w, carbonate.IonicInput{}); return err },
		"pH NaN":  func() error { _, _, err := k.FromPH(math.NaN(), w, carbonate.IonicInput{}); return err },
		"pH 12":   func() error { _, _, err := k.FromPH(12, w, carbonate.IonicInput{}); return err },
		"brine":   func() error { _, _, err := k.FromPH(8, w, carbonate.IonicInput{Measured: 0.6}); return err },
		"Ca < 0":  func() error { v := w; v.Totals[carbonate.Calcium] = -1e-9; _, err := k.Solve(v); return err },
		"alk NaN": func() error { v := w; v.Alkalinity = math.NaN(); _, err := k.Solve(v); return err },
		"chloramine": func() error {
			v := w
			v.Totals[carbonate.Chlorine], v.Totals[carbonate.Ammonia] = 1e-5, 1e-5
			_, err := k.Solve(v)
			return err
		},
		"blend of nothing": func() error { _, err := carbonate.Blend(); return err },
		"negative flow":    func() error { _, err := carbonate.Blend(carbonate.Stream{Flow: -1}); return err },
	} {
		if f() == nil {
			t.Errorf("%s: answered", name)
		}
	}
}
