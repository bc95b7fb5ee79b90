package bench

import (
	"errors"
	"math"
	"math/rand/v2"
	"testing"

	"beckline/carbonate"
	"beckline/dosing"
)

// softWater is a coagulated soft water: pH 6.5, alkalinity 12.4 mg/L as CaCO3,
// 5 C.
func softWater(t *testing.T) carbonate.Water {
	return water(t, 6.52, 12.4, 5, 4, 1)
}

// hardWater is a well water near saturation: pH 7.3, alkalinity 250, 12 C.
func hardWater(t *testing.T) carbonate.Water { return water(t, 7.3, 250, 12, 90, 12) }

func water(t *testing.T, pH, alkalinity, celsius, calcium, magnesium float64) carbonate.Water {
	t.Helper()
	k, err := carbonate.ConstantsAt(celsius + 273.15)
	if err != nil {
		t.Fatal(err)
	}
	w := carbonate.Water{Alkalinity: 2e-3 * alkalinity / carbonate.MolarMassCaCO3, Kelvin: celsius + 273.15}
	w.Totals[carbonate.Calcium] = calcium * 1e-3 / carbonate.Calcium.MolarMass()
	w.Totals[carbonate.Magnesium] = magnesium * 1e-3 / carbonate.Magnesium.MolarMass()
	s, _, err := k.FromPH(pH, w, carbonate.IonicInput{})
	if err != nil {
		t.Fatal(err)
	}
	return s.Water
}

// jar makes the readings of a titration from known figures, with normal errors
// of the stated tolerances.
type jar struct {
	t    Titration
	true figures
	acid Acid
	r    *rand.Rand
}

func (j *jar) pour(t *testing.T, doses []float64) {
	t.Helper()
	j.t.Points = nil
	for _, d := range doses {
		j.t.Points = append(j.t.Points, Point{Dose: d})
	}
	k, err := carbonate.ConstantsAt(j.t.Water.Kelvin)
	if err != nil {
		t.Fatal(err)
	}
	m := newModel(&j.t, k, j.acid.Charge)
	for i, d := range doses {
		poured := max(d+j.t.sigmaDose(d)*j.r.NormFloat64(), 0)
		s, err := m.state(&j.true, poured, m.progress(i))
		if err != nil {
			t.Fatal(err)
		}
		j.t.Points[i].PH = s.PH + j.true[MeterOffset] + j.t.sigmaPH()*j.r.NormFloat64()
	}
}

func newJar(w carbonate.Water, seed uint64) *jar {
	j := &jar{t: Titration{Water: w, Reagent: caustic, PHTolerance: 0.05}, r: rand.New(rand.NewPCG(seed, 11))}
	j.true = asRead(&w)
	return j
}

func evenly(most float64, n int) []float64 {
	out := make([]float64, n)
	for i := range out {
		out[i] = most * float64(i) / float64(n-1)
	}
	return out
}

const mgNaOH = 1e-3 / 39.997 // mol/L in 1 mg/L

// TestCoverage: the 95 % interval holds the true figure in 95 of 100 jars, give
// or take what so many jars can tell (3.3 standard deviations of the count).
func TestCoverage(t *testing.T) {
	var held, all float64
	for name, c := range map[string]struct {
		jars  int
		find  []Unknown
		set   func(j *jar)
		doses []float64
		hard  bool
	}{
		"alkalinity and carbon": {250, []Unknown{Alkalinity, Carbon}, func(j *jar) {
			j.true[Alkalinity] *= 1.08
			j.true[Carbon] *= 0.93
		}, evenly(16*mgNaOH, 12), false},
		"carbon and strength": {250, []Unknown{Carbon, Strength}, func(j *jar) {
			j.true[Carbon] *= 1.1
			j.true[Strength] = 0.88
		}, evenly(16*mgNaOH, 12), false},
		"with unsure doses": {250, []Unknown{Alkalinity, Carbon}, func(j *jar) {
			j.true[Carbon] *= 1.1
			j.t.DoseTolerance, j.t.DoseStep = 0.01, 0.1*mgNaOH
			j.t.Stock = 0.025
		}, evenly(16*mgNaOH, 12), false},
		"strength in a hard water": {250, []Unknown{Strength, MeterOffset}, func(j *jar) {
			j.true[Strength] = 1.05
			j.true[MeterOffset] = 0.08
		}, evenly(60*mgNaOH, 10), true},
		"an unknown acid": {60, []Unknown{Carbon, AcidAmount, AcidPK}, func(j *jar) {
			j.true[AcidAmount], j.true[AcidPK] = 8e-5, 8.9
			j.t.PHTolerance = 0.02
		}, evenly(20*mgNaOH, 16), false},
	} {
		w := softWater(t)
		if c.hard {
			w = hardWater(t)
		}
		inside := map[Unknown]int{}
		disagree := 0
		for i := range c.jars {
			j := newJar(w, uint64(i)+5000)
			c.set(j)
			j.pour(t, c.doses)
			r, err := Fit(j.t, c.find...)
			if err != nil {
				t.Fatalf("%s, jar %d: %v", name, i, err)
			}
			for _, e := range r.Estimates {
				if e.Low <= j.true[e.Unknown] && j.true[e.Unknown] <= e.High {
					inside[e.Unknown]++
				}
			}
			if !r.Agrees {
				disagree++
			}
		}
		n := float64(c.jars)
		room := 3.3 * math.Sqrt(0.95*0.05/n)
		for _, u := range c.find {
			share := float64(inside[u]) / n
			held += float64(inside[u])
			all += n
			t.Logf("%s: %s inside in %.1f %%", name, u.Name(), share*100)
			if math.Abs(share-0.95) > room {
				t.Errorf("%s: %s inside its interval in %.1f %% of %d jars", name, u.Name(), share*100, c.jars)
			}
		}
		if share := float64(disagree) / n; share > disbelief+3.3*math.Sqrt(disbelief/n) {
			t.Errorf("%s: %.1f %% of sound jars are said to part from the model", name, share*100)
		}
	}
	t.Logf("all: %.2f %% of %g", held/all*100, all)
	if math.Abs(held/all-0.95) > 0.015 {
		t.Errorf("all together: %.2f %% of %g intervals hold the true figure", held/all*100, all)
	}
}

// TestReasons: a jar spoilt on purpose is said to part from the model, and the
// reason is among the likely ones: first, or beaten by less than what one figure
// without meaning brings (a factor and an offset can look alike).
func TestReasons(t *testing.T) {
	for name, c := range map[string]struct {
		water carbonate.Water
		find  []Unknown
		set   func(f *figures)
		most  float64
		want  ReasonCode
		only  Unknown
	}{
		"CO2 lost":        {hardWater(t), []Unknown{Strength}, func(f *figures) { f[CarbonLost] = 0.08 * f[Carbon] }, 16, LostCO2, CarbonLost},
		"CO2 gained":      {softWater(t), []Unknown{Strength}, func(f *figures) { f[CarbonLost] = -0.15 * f[Carbon] }, 22, TookUpCO2, CarbonLost},
		"precipitation":   {hardWater(t), nil, func(f *figures) { f[Precipitated] = 0.25 }, 80, Precipitation, Precipitated},
		"organics":        {softWater(t), []Unknown{Carbon}, func(f *figures) { f[AcidAmount], f[AcidPK] = 6e-5, 9 }, 20, Organics, AcidAmount},
		"a weak product":  {softWater(t), nil, func(f *figures) { f[Strength] = 0.85 }, 16, WrongStrength, Strength},
		"meter off":       {softWater(t), nil, func(f *figures) { f[MeterOffset] = 0.2 }, 16, WrongMeter, MeterOffset},
		"meter off, hard": {hardWater(t), []Unknown{Carbon}, func(f *figures) { f[MeterOffset] = -0.25 }, 60, WrongMeter, MeterOffset},
	} {
		j := newJar(c.water, 5)
		j.t.PHTolerance = 0.02
		c.set(&j.true)
		j.pour(t, evenly(c.most*mgNaOH, 14))
		r, err := Fit(j.t, c.find...)
		if err != nil {
			t.Errorf("%s: %v", name, err)
			continue
		}
		if r.Agrees || len(r.Reasons) == 0 {
			t.Errorf("%s: agrees %v, chance %.2g, %d reasons", name, r.Agrees, r.Chance, len(r.Reasons))
			continue
		}
		var found *Reason
		for i := range r.Reasons {
			if code := r.Reasons[i].Code; code.Name() == string(code) || code.Test() == "" {
				t.Errorf("%s has no words", code)
			}
			if r.Reasons[i].Code == c.want {
				found = &r.Reasons[i]
			}
		}
		if found == nil || !found.Explains || found.weight() > r.Reasons[0].weight()+2 {
			t.Errorf("%s: not named: %+v", name, r.Reasons)
			continue
		}
		want := j.true[c.only]
		for _, e := range found.Estimates {
			if e.Unknown == c.only && math.Abs(e.Value-want) > 4*e.StandardError {
				t.Errorf("%s: %.4g +- %.2g, made with %.4g", name, e.Value, e.StandardError, want)
			}
		}
	}
}

// TestOrder: what no water gives is named with the readings that it is about.
func TestOrder(t *testing.T) {
	fresh := func() *jar {
		j := newJar(softWater(t), 3)
		j.t.PHTolerance = 0.03
		j.pour(t, evenly(16*mgNaOH, 11))
		return j
	}
	for name, c := range map[string]struct {
		spoil func(p []Point) []Point
		want  SlipKind
		at    int
	}{
		"two lines swapped": {func(p []Point) []Point { p[4], p[5] = p[5], p[4]; return p }, DosesBackwards, 4},
		"two pH swapped":    {func(p []Point) []Point { p[7].PH, p[8].PH = p[8].PH, p[7].PH; return p }, FallsBack, 7},
		"read too early":    {func(p []Point) []Point { p[8].PH -= 1.2; return p }, FallsBack, 7},
		"read twice":        {func(p []Point) []Point { return append(p, Point{Dose: p[10].Dose, PH: p[10].PH + 0.3}) }, NotRepeated, 10},
		"one misread":       {func(p []Point) []Point { p[3].PH += 0.15; return p }, StandsAlone, 3},
	} {
		j := fresh()
		j.t.Points = c.spoil(j.t.Points)
		r, err := Fit(j.t, Alkalinity, Carbon)
		if err != nil {
			t.Errorf("%s: %v", name, err)
			continue
		}
		found := false
		for _, s := range r.Order {
			found = found || s.Kind == c.want && s.Readings[0] == c.at
			if s.Kind.Name() == string(s.Kind) {
				t.Errorf("%s has no words", s.Kind)
			}
		}
		if !found {
			t.Errorf("%s: %+v", name, r.Order)
		}
	}
	r, err := Fit(fresh().t, Alkalinity, Carbon)
	if err != nil || len(r.Order) != 0 {
		t.Errorf("a sound jar: %+v, %v", r.Order, err)
	}
}

// TestDoseTo: the fitted jar gives back the dose for a pH and the pH for a dose.
func TestDoseTo(t *testing.T) {
	j := newJar(softWater(t), 9)
	j.true[Strength], j.true[Carbon] = 0.9, j.true[Carbon]*1.1
	j.pour(t, evenly(16*mgNaOH, 12))
	r, err := Fit(j.t, Carbon, Strength)
	if err != nil {
		t.Fatal(err)
	}
	dose, err := r.DoseTo(8.6)
	if err != nil {
		t.Fatal(err)
	}
	if pH, err := r.PH(dose); err != nil || math.Abs(pH-8.6) > 1e-6 {
		t.Errorf("pH %v after the dose to 8.6, %v", pH, err)
	}
	// What really happens at that dose lies within what the readings support.
	k, _ := carbonate.ConstantsAt(j.t.Water.Kelvin)
	m := newModel(&j.t, k, 0)
	if s, err := m.state(&j.true, dose, 0); err != nil || math.Abs(s.PH-8.6) > 0.1 {
		t.Errorf("the true pH at that dose is %.3f, %v", s.PH, err)
	}
	var p *dosing.Problem
	if _, err := r.DoseTo(3); !errors.As(err, &p) || p.Code != "out_of_reach" || p.Kind != dosing.NoAnswer {
		t.Errorf("pH 3 with caustic: %v", err)
	}
	if _, err := r.PH(math.NaN()); !errors.As(err, &p) {
		t.Errorf("no dose: %v", err)
	}
}

func TestRefusals(t *testing.T) {
	w := softWater(t)
	sound := Titration{Water: w, Reagent: caustic, Points: []Point{{0, 6.5}, {5 * mgNaOH, 7.1}, {9 * mgNaOH, 8.3}}}
	for name, c := range map[string]struct {
		change func(t *Titration)
		find   []Unknown
		code   string
		field  string
	}{
		"too few":       {func(t *Titration) {}, []Unknown{Alkalinity, Carbon, Strength}, "too_few_points", "points"},
		"twice":         {func(t *Titration) {}, []Unknown{Carbon, Carbon}, "unknown_twice", "find"},
		"no pH":         {func(t *Titration) { t.Points[1].PH = 15 }, nil, "outside_range", "points 2"},
		"negative dose": {func(t *Titration) { t.Points[2].Dose = -1 }, nil, "outside_range", "points 3"},
		"NaN":           {func(t *Titration) { t.Points[0].PH = math.NaN() }, nil, "outside_range", "points 1"},
		"tolerance":     {func(t *Titration) { t.PHTolerance = -1 }, nil, "outside_range", "ph-tolerance"},
		"too warm":      {func(t *Titration) { t.Water.Kelvin = 400 }, nil, "outside_range", "temperature"},
		"beyond Davies": {func(t *Titration) { t.Points[2].Dose = 3 }, nil, "outside_model", "points"},
		// At one dose alkalinity and carbon move the pH alike.
		"two alike":       {func(t *Titration) { t.Points = []Point{{0, 6.5}, {0, 6.51}, {0, 6.49}, {0, 6.5}} }, []Unknown{Alkalinity, Carbon}, "cannot_tell_apart", "find"},
		"nothing to tell": {func(t *Titration) { t.Points = []Point{{0, 6.5}, {0, 6.5}, {0, 6.5}} }, []Unknown{Strength}, "cannot_tell_apart", "find"},
	} {
		j := sound
		j.Points = append([]Point(nil), sound.Points...)
		c.change(&j)
		var p *dosing.Problem
		if _, err := Fit(j, c.find...); !errors.As(err, &p) || p.Code != c.code || p.Field != c.field {
			t.Errorf("%s: %v", name, err)
		}
	}
	if _, err := FromBurette([]float64{1, 2}, []float64{7}, 0.02, 1); err == nil {
		t.Error("volumes without pH were taken")
	}
	if _, err := FromBurette([]float64{1}, []float64{7}, 0, 1); err == nil {
		t.Error("a stock of nothing was taken")
	}
	points, err := FromBurette([]float64{0, 0.0025}, []float64{6.5, 7.2}, 0.02, 0.5)
	if err != nil || math.Abs(points[1].Dose-1e-4) > 1e-15 || points[1].PH != 7.2 {
		t.Errorf("2.5 mL of 0.02 mol/L in half a litre: %+v, %v", points, err)
	}
}

// TestThinning: a weak stock thins the sample; figures fitted with it counted
// are the sample's own.
func TestThinning(t *testing.T) {
	j := newJar(hardWater(t), 4)
	j.t.Stock = 0.02
	j.t.PHTolerance = 1e-6
	j.pour(t, evenly(1.5e-3, 12))
	r, err := Fit(j.t, Carbon, Alkalinity)
	if err != nil {
		t.Fatal(err)
	}
	e, _ := r.Estimate(Alkalinity)
	if math.Abs(e.Value/j.true[Alkalinity]-1) > 1e-4 {
		t.Errorf("alkalinity %.6g, made with %.6g", e.Value, j.true[Alkalinity])
	}
	w := j.t
	w.Stock = 0
	if r, err = Fit(w, Carbon, Alkalinity); err != nil {
		t.Fatal(err)
	}
	e, _ = r.Estimate(Alkalinity)
	if math.Abs(e.Value/j.true[Alkalinity]-1) < 0.005 {
		t.Errorf("7 %% more water changes nothing: %.6g", e.Value)
	}
}

// With everything above saturation gone the jar is at saturation, whatever it
// held; with none of it gone it is as the water model has it.
func TestPrecipitatedJar(t *testing.T) {
	w := hardWater(t)
	k, err := carbonate.ConstantsAt(w.Kelvin)
	if err != nil {
		t.Fatal(err)
	}
	j := Titration{Water: w, Reagent: caustic}
	m := newModel(&j, k, 0)
	f := asRead(&w)
	dose := 60 * mgNaOH
	plain, err := m.state(&f, dose, 0)
	if err != nil {
		t.Fatal(err)
	}
	if s, err := k.Solve(w.Add(caustic, dose)); err != nil || s.PH != plain.PH {
		t.Errorf("pH %.6f, by the water model %.6f, %v", plain.PH, s.PH, err)
	}
	f[Precipitated] = 1
	all, err := m.state(&f, dose, 0)
	if err != nil {
		t.Fatal(err)
	}
	before, _, _ := plain.SaturationIndex()
	after, _, _ := all.SaturationIndex()
	if before < 0.5 || math.Abs(after) > 1e-6 {
		t.Errorf("saturation index %.3f before and %.2g after", before, after)
	}
}

// The tolerance is the half-width of a 95 % interval: 1.96 standard deviations.
func TestDeviations(t *testing.T) {
	j := Titration{Water: softWater(t), Reagent: caustic, Points: []Point{{0, 6.5}, {9 * mgNaOH, 8.4}}}
	for tolerance, want := range map[float64]float64{0: 0.0255, 0.1: 0.0510} {
		j.PHTolerance = tolerance
		r, err := Fit(j)
		if err != nil || math.Abs(r.Readings[0].Deviation-want) > 1e-4 {
			t.Errorf("%g: %+v, %v", tolerance, r, err)
		}
	}
	// Where the curve is steep an unsure dose makes an unsure pH.
	j.DoseStep = 0.2 * mgNaOH
	r, err := Fit(j)
	if err != nil || !(r.Readings[1].Deviation > 1.5*r.Readings[0].Deviation) {
		t.Errorf("%+v, %v", r, err)
	}
}

// A titration of a worked-out water with a product is that of the water and the
// chemical by hand.
func TestOf(t *testing.T) {
	p, ok := dosing.ProductByName("caustic-25")
	if !ok {
		t.Fatal("no caustic")
	}
	r, err := dosing.Solve(dosing.Case{Readings: dosing.Readings{PH: dosing.Some(6.52), Alkalinity: dosing.Some(2.5e-4), Kelvin: dosing.Some(278.15)}})
	if err != nil {
		t.Fatal(err)
	}
	j := Of(&r.Raw().Figures, p)
	j.Points = []Point{{0, 6.52}, {10 * mgNaOH, 8.8}}
	got, err := Fit(j)
	if err != nil {
		t.Fatal(err)
	}
	if got.Readings[0].Predicted < 6.5199 || got.Readings[0].Predicted > 6.5201 {
		t.Errorf("pH %.4f before any dose", got.Readings[0].Predicted)
	}
	k, _ := carbonate.ConstantsAt(278.15)
	s, err := k.Solve(r.Raw().Figures.Water.Add(caustic, 10*mgNaOH))
	if err != nil || math.Abs(s.PH-got.Readings[1].Predicted) > 1e-9 {
		t.Errorf("pH %.4f after the dose, by hand %.4f, %v", got.Readings[1].Predicted, s.PH, err)
	}
}
