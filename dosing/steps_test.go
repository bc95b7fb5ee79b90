package dosing_test

import (
	"errors"
	"testing"

	"beckline/carbonate"
	"beckline/dosing"
)

// chlorinated solves the soft water with chlorine gas at 2 mg/L and a demand.
func chlorinated(t *testing.T, demand float64) *dosing.Result {
	t.Helper()
	a := fixed(t, "chlorine-gas", 2)
	a.Demand = mgL(carbonate.Chlorine, demand)
	r, err := dosing.Solve(dosing.Case{Readings: soft(), Additions: []dosing.Addition{a}})
	if err != nil {
		t.Fatal(err)
	}
	return r
}

// TestChlorineDemand: chlorine gas uses 0.706 mg/L of alkalinity per mg/L while
// it stays free (White, Handbook of Chlorination, from memory: 0.7) and 1.412
// once it is spent (table of CaCO3 equivalents: 1.41), in between in proportion.
func TestChlorineDemand(t *testing.T) {
	for _, c := range []struct{ demand, used float64 }{{0, 2 * 0.706}, {2, 2 * 1.412}, {0.5, 2*0.706 + 0.5*0.706}, {9, 2 * 1.412}} {
		r := chlorinated(t, c.demand)
		used := (r.Raw().Figures.Water.Alkalinity - r.Finished().Figures.Water.Alkalinity) / caco3(1)
		near(t, "alkalinity used", used, c.used, 0.003)
		free := r.Finished().Figures.Water.Totals[carbonate.Chlorine] * carbonate.Chlorine.MolarMass() * 1e3
		near(t, "free chlorine left", free, max(2-c.demand, 0), 1e-9)
	}
}

// TestResidualAndDemand: demand 2 mg/L and a residual of 5 mg/L need 7 mg/L (US
// Army Medical Department, batch chlorination example, testdata/feed.csv).
func TestResidualAndDemand(t *testing.T) {
	a := dosing.Addition{Product: product(t, "chlorine-gas"), Demand: mgL(carbonate.Chlorine, 2), Residual: mgL(carbonate.Chlorine, 5)}
	r, err := dosing.Solve(dosing.Case{Readings: soft(), Additions: []dosing.Addition{a}})
	if err != nil {
		t.Fatal(err)
	}
	near(t, "dose", doseMgL(&r.Stations[1]), 7, 1e-9)
	near(t, "residual", r.Finished().Figures.Water.Totals[carbonate.Chlorine]*carbonate.Chlorine.MolarMass()*1e3, 5, 1e-9)
}

// TestChloramine: chlorine and ammonia combine one for one and take an
// equivalent each; above 5:1 by mass is breakpoint, which is refused.
func TestChloramine(t *testing.T) {
	ammonia := fixed(t, "ammonium-sulfate-40", 1*132.14/(2*14.007)) // 1 mg/L as N
	solve := func(chlorine float64) (*dosing.Result, error) {
		return dosing.Solve(dosing.Case{Readings: soft(), Additions: []dosing.Addition{fixed(t, "chlorine-gas", chlorine), ammonia}})
	}
	r, err := solve(4)
	if err != nil {
		t.Fatal(err)
	}
	w := r.Finished().Figures.Water
	near(t, "monochloramine as Cl2", w.Totals[carbonate.Monochloramine]*70.906e3, 4, 1e-9)
	near(t, "free chlorine", w.Totals[carbonate.Chlorine], 0, 0)
	if !warned(r, "chloramine_formed") {
		t.Error("the loss of free chlorine is not said")
	}
	near(t, "ammonia left as N", w.Totals[carbonate.Ammonia]*14.007e3, 1-4*14.007/70.906, 1e-9)
	// One equivalent for Cl2 -> HOCl + HCl, one for the chloramine.
	near(t, "alkalinity used", (r.Raw().Figures.Water.Alkalinity-w.Alkalinity)/caco3(1), 4*1.412, 0.005)
	_, err = solve(6)
	var p *dosing.Problem
	if !errors.As(err, &p) || p.Code != "breakpoint_chlorination" {
		t.Errorf("6:1: %v", err)
	}
}

// TestAerationInTheTrain: carbon dioxide leaves, alkalinity stays, and a pH
// measured after the tower sets what left.
func TestAerationInTheTrain(t *testing.T) {
	tower := dosing.Addition{Process: dosing.Aeration, Share: dosing.Some(0.8)}
	caustic := dosing.Addition{Product: product(t, "caustic-25"), Solve: true}
	to := dosing.Target{Kind: dosing.TargetPH, Value: 8.5}
	r, err := dosing.Solve(dosing.Case{Readings: soft(), Additions: []dosing.Addition{tower, caustic}, Target: to})
	if err != nil {
		t.Fatal(err)
	}
	near(t, "alkalinity after the tower", r.Stations[1].Figures.Water.Alkalinity, r.Raw().Figures.Water.Alkalinity, 0)
	near(t, "finished pH", r.Finished().Figures.PH, 8.5, 1e-6)
	plain, err := dosing.Solve(dosing.Case{Readings: soft(), Additions: []dosing.Addition{caustic}, Target: to})
	if err != nil {
		t.Fatal(err)
	}
	if r.Dose().Dose >= plain.Dose().Dose {
		t.Errorf("stripping CO2 did not save caustic: %g and %g", r.Dose().Dose, plain.Dose().Dose)
	}
	tower = dosing.Addition{Process: dosing.Aeration, PH: dosing.Some(r.Stations[1].Figures.PH)}
	again, err := dosing.Solve(dosing.Case{Readings: soft(), Additions: []dosing.Addition{tower}})
	if err != nil {
		t.Fatal(err)
	}
	near(t, "carbon after, by the measured pH", again.Finished().Figures.DIC, r.Stations[1].Figures.DIC, 1e-9*r.Stations[1].Figures.DIC)
}

// TestContactorStopsAtSaturation: limestone dissolves up to SI 0 and no further.
func TestContactorStopsAtSaturation(t *testing.T) {
	contactor := dosing.Addition{Process: dosing.LimestoneContactor}
	r, err := dosing.Solve(dosing.Case{Readings: soft(), Additions: []dosing.Addition{contactor}})
	if err != nil {
		t.Fatal(err)
	}
	near(t, "SI", r.Finished().Figures.SaturationIndex.Value, 0, 1e-6)
	dissolved := r.Finished().Figures.Calcium.Value - r.Raw().Figures.Calcium.Value
	near(t, "dissolved", dissolved, -r.Raw().Figures.CCPP.Value, 1e-12)
	again, err := dosing.Solve(dosing.Case{Readings: soft(), Additions: []dosing.Addition{contactor, contactor}})
	if err != nil {
		t.Fatal(err)
	}
	near(t, "a second contactor", again.Finished().Figures.DIC, r.Finished().Figures.DIC, 1e-9)
}

// TestTargetBetween: acid ahead of a coagulant for a coagulation pH, with more
// fed behind it.
func TestTargetBetween(t *testing.T) {
	r := soft()
	r.Alkalinity = dosing.Some(caco3(120))
	c := dosing.Case{Readings: r, TargetAt: 2, Target: dosing.Target{Kind: dosing.TargetPH, Value: 6.3},
		Additions: []dosing.Addition{{Product: product(t, "sulfuric-93"), Solve: true}, fixed(t, "alum-dry", 40), fixed(t, "caustic-25", 20)}}
	res, err := dosing.Solve(c)
	if err != nil {
		t.Fatal(err)
	}
	near(t, "coagulation pH", res.Stations[2].Figures.PH, 6.3, 1e-6)
	if res.Finished().Figures.PH < 6.4 {
		t.Errorf("caustic behind the coagulant left pH %g", res.Finished().Figures.PH)
	}
	c.TargetAt = 0
	c.Target.Value = 6.8
	res, err = dosing.Solve(c)
	if err != nil {
		t.Fatal(err)
	}
	near(t, "finished pH", res.Finished().Figures.PH, 6.8, 1e-6)
}

// wells are a hard well and a softened water; the figures of their blends are an
// independent working of the same equations.
func wells() (well, softened dosing.Readings) {
	well = dosing.Readings{
		PH: dosing.Some(7.15), Alkalinity: dosing.Some(caco3(285)), Kelvin: dosing.Some(284.65),
		Calcium: mgL(carbonate.Calcium, 106), Magnesium: mgL(carbonate.Magnesium, 14), Sodium: mgL(carbonate.Sodium, 10.5),
		Chloride: mgL(carbonate.Chloride, 22), Sulfate: mgL(carbonate.Sulfate, 28), Conductivity: dosing.Some(640e-4),
	}
	softened = well
	softened.PH, softened.Alkalinity = dosing.Some(9.95), dosing.Some(caco3(62))
	softened.Calcium, softened.Magnesium = mgL(carbonate.Calcium, 34), mgL(carbonate.Magnesium, 4)
	softened.Conductivity = dosing.Some(250e-4)
	return well, softened
}

func TestBlendOfSources(t *testing.T) {
	well, softened := wells()
	for _, c := range []struct{ share, pH, si, ccpp float64 }{
		{0.4, 7.61, 0.02, 0.6}, {0.1, 9.38, 1.22, 23}, {0.2, 8.79, 0.905, 13.4},
	} {
		r, err := dosing.Solve(dosing.Case{Sources: []dosing.Source{
			{Name: "well", Readings: well, Flow: dosing.Some(c.share)},
			{Name: "softened", Readings: softened, Flow: dosing.Some(1 - c.share)},
		}})
		if err != nil {
			t.Fatal(err)
		}
		f := r.Raw().Figures
		near(t, "pH of the blend", f.PH, c.pH, 0.005)
		near(t, "SI of the blend", f.SaturationIndex.Value, c.si, 0.005)
		near(t, "CCPP of the blend", f.CCPP.Value*1e3*carbonate.MolarMassCaCO3, c.ccpp, 0.1)
		mean := c.share*7.15 + (1-c.share)*9.95
		if d := mean - f.PH; d < 0.2 {
			t.Errorf("the mean pH %g is hardly wrong here", mean)
		}
		if len(r.Sources) != 2 || r.Sources[0].PH != 7.15 {
			t.Errorf("sources: %d", len(r.Sources))
		}
		share, err := dosing.ShareToMeet(dosing.Case{Sources: r.Case.Sources, Target: dosing.Target{Kind: dosing.TargetPH, Value: f.PH}})
		if err != nil {
			t.Fatal(err)
		}
		near(t, "share that meets that pH", share, c.share, 1e-6)
	}
	_, err := dosing.ShareToMeet(dosing.Case{Sources: []dosing.Source{{Name: "a", Readings: well}, {Name: "b", Readings: softened}},
		Target: dosing.Target{Kind: dosing.TargetPH, Value: 10.5}})
	var p *dosing.Problem
	if !errors.As(err, &p) || p.Code != "out_of_reach" {
		t.Fatal(err)
	}
	near(t, "nearest", p.Nearest.Value, 9.95, 1e-9)
}
