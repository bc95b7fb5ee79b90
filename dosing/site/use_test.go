package site_test

import (
	"errors"
	"math"
	"slices"
	"strings"
	"testing"

	"beckline/dosing"
	"beckline/dosing/entry"
	"beckline/dosing/reading"
	"beckline/dosing/site"
)

const works = `
[products.lye]
catalogue = "caustic-50"
strength = "48 %"
density = "1.506 kg/L"
density-date = 2026-11-03
temperature = 22
price = "450 /t"
maximum-use = 60

[products.alum]
catalogue = "alum-liquid"
strength = 50

[pumps.P1]
product = "lye"
capacity = "5 gph"

[pumps.P2]
product = "carbon-dioxide"
capacity = 30

[sources.river]
ph = 6.9
alkalinity = 24
temperature = 8
conductivity = 78
calcium = 7.2

[sources.well]
ph = 7.4
alkalinity = "3.0 meq/L"
temperature = 12
conductivity = 400
calcium = 50

[lines.one]
source = "river"
readings = { flow = "1 MGD", alkalinity = 26 }
product = "lye"
pump = "P1"
add = ["alum = 40 mg/L product"]
capacity = 200
limits.temperature = [1, 20]
usual.ph = [6.7, 7.0]
usual.alkalinity = { min = 30 }
finished.sodium = { max = 10 }
finished.ph = [7, 8.2]
finished.larson = { max = 0.5 }
finished.sulfate = { min = 1 }
targets.target-ph = 8.4

[lines.two]
blend = { river = 3, well = 1 }
readings.flow = 100
product = "caustic-25"
targets.target-ph = 8.2
limits.ph = [7.2, 9]
`

func problem(t *testing.T, err error) *dosing.Problem {
	t.Helper()
	var p *dosing.Problem
	if !errors.As(err, &p) {
		t.Fatalf("no problem but %v", err)
	}
	return p
}

func answer(t *testing.T, l *site.Line, f entry.Form) *dosing.Result {
	t.Helper()
	c, err := l.Case(f, entry.NeedDose)
	if err != nil {
		t.Fatal(err)
	}
	r, err := dosing.Solve(c)
	if err != nil {
		t.Fatal(err)
	}
	return r
}

// TestForm: the line's readings lie over its source's; product, pump and target
// come with them.
func TestForm(t *testing.T) {
	f := load(t, works).LineNamed("one").Form()
	for name, want := range map[string]string{"ph": "6.9", "alkalinity": "26", "flow": "1 MGD", "target-ph": "8.4",
		"strength": "48 %", "product-temperature": "22", "pump": "5 gph"} {
		if f.Values[name] != want {
			t.Errorf("%s is %q, want %q", name, f.Values[name], want)
		}
	}
	if f.Product != "lye" || !slices.Equal(f.Adds, []string{"alum = 40 mg/L product"}) {
		t.Errorf("%+v", f)
	}
}

// TestChoose: another product brings its own settings and leaves none of the
// last one's behind.
func TestChoose(t *testing.T) {
	l := load(t, works).LineNamed("one")
	f := l.Form()
	l.Choose(&f, "carbon-dioxide")
	if f.Product != "carbon-dioxide" || f.Values["pump"] != "30" || f.Values["strength"] != "" || f.Values["product-temperature"] != "" {
		t.Errorf("%+v", f)
	}
	l.Choose(&f, "lime")
	if _, ok := f.Values["pump"]; ok {
		t.Errorf("lime took the pump %q", f.Values["pump"])
	}
	l.Choose(&f, "lye")
	if f.Values["pump"] != "5 gph" || f.Values["strength"] != "48 %" {
		t.Errorf("%+v", f)
	}
}

// TestCaseUsesThePlantsProducts: strength, measured density and use level of the
// plant's own product count; a dose stated as product is the plant's product.
func TestCaseUsesThePlantsProducts(t *testing.T) {
	s := load(t, works)
	r := answer(t, s.LineNamed("one"), s.LineNamed("one").Form())
	st := r.Dose()
	if p := st.Addition.Product; p.Name != "lye" || math.Abs(p.Strength-0.48) > 1e-12 || p.Chemical.Formula != "NaOH" {
		t.Errorf("%+v", p)
	}
	if st.Feed.Density != 1506 || st.Feed.DensitySource != "measured" {
		t.Errorf("density %g from %s", st.Feed.Density, st.Feed.DensitySource)
	}
	if want := st.Dose * 39.997 / 0.48 * (1e6 * 3.785411784e-3 / 86400) / 1506; math.Abs(st.Feed.VolumePerSecond/want-1) > 1e-9 {
		t.Errorf("%g m3/s, want %g", st.Feed.VolumePerSecond, want)
	}
	if st.Addition.Feed.MaximumUse != dosing.Some(0.06) || math.Abs(st.Addition.Feed.ProductKelvin.Value-295.15) > 1e-9 {
		t.Errorf("%+v", st.Addition.Feed)
	}
	alum := r.Stations[1]
	if want := 0.040 * 0.50 / 599.76; math.Abs(alum.Dose/want-1) > 1e-9 || alum.Addition.Product.Name != "alum" {
		t.Errorf("40 mg/L of 50 %% alum is %g mol/L, want %g", alum.Dose, want)
	}
	if p := s.ProductNamed("lye"); math.Abs(p.Price.Value-0.45) > 1e-12 || p.DensityOn != "2026-11-03" || p.Dosing().Name != "lye" {
		t.Errorf("%+v", p)
	}
}

// TestTypedStrengthDropsDensity: a strength typed over the plant's is not the one
// whose density was measured.
func TestTypedStrengthDropsDensity(t *testing.T) {
	l := load(t, works).LineNamed("one")
	f := l.Form()
	f.Values["strength"] = "50"
	st := answer(t, l, f).Dose()
	if st.Feed.DensitySource == "measured" || math.Abs(st.Addition.Product.Strength-0.5) > 1e-12 || st.Addition.Product.Name != "lye" {
		t.Errorf("%+v %s", st.Addition.Product, st.Feed.DensitySource)
	}
	f.Values["strength"] = ""
	if st := answer(t, l, f).Dose(); st.Feed.DensitySource != "measured" || math.Abs(st.Addition.Product.Strength-0.48) > 1e-12 {
		t.Errorf("left blank: %+v", st.Addition.Product)
	}
}

// TestBlend: a line of two sources is solved as a blend; readings that are typed
// take its place.
func TestBlend(t *testing.T) {
	l := load(t, works).LineNamed("two")
	f := l.Form()
	if f.Values["ph"] != "" || f.Values["flow"] != "100" {
		t.Errorf("%+v", f.Values)
	}
	r := answer(t, l, f)
	want := (3*24/50043.5 + 3e-3) / 4
	if raw := r.Raw().Figures; len(r.Sources) != 2 || math.Abs(raw.Alkalinity/want-1) > 1e-4 {
		t.Errorf("%d sources, alkalinity %g, want %g", len(r.Sources), raw.Alkalinity, want)
	}
	if f.Values["ph"] != "" {
		t.Error("the caller's form was changed")
	}
	if !r.Dose().Feed.HasFlow {
		t.Error("the flow is lost")
	}
	for name, text := range map[string]string{"ph": "7.5", "alkalinity": "60", "temperature": "9"} {
		f.Values[name] = text
	}
	if r := answer(t, l, f); len(r.Sources) != 0 || math.Abs(r.Raw().Figures.PH-7.5) > 1e-9 {
		t.Errorf("typed readings: %d sources, pH %g", len(r.Sources), r.Raw().Figures.PH)
	}
	if c := l.Form(); c.Values["ph"] != "" {
		t.Error("the line was changed")
	}
}

// TestLimitsOfReadings: the plant's limits refuse, its usual bands warn in place
// of the built-in ones, and 120 % of its capacity is the end of the flow.
func TestLimitsOfReadings(t *testing.T) {
	l := load(t, works).LineNamed("one")
	f := l.Form()
	f.Values["temperature"] = "22"
	_, err := l.Case(f, entry.NeedDose)
	if p := problem(t, err); p.Code != "outside_plant_limit" || p.Field != "temperature" || p.Kind != dosing.BadInput ||
		p.Accepted != "1.0 to 20.0 °C (plant.toml, line 44)" || p.Given != "22" {
		t.Errorf("%+v", p)
	}
	f.Values["temperature"], f.Values["flow"] = "8", "241"
	_, err = l.Case(f, entry.NeedDose)
	if p := problem(t, err); p.Field != "flow" || !strings.Contains(p.Accepted, "200 m³/h") {
		t.Errorf("%+v", p)
	}
	f.Values["flow"] = "240"
	c, err := l.Case(f, entry.NeedDose)
	if err != nil {
		t.Fatal(err)
	}
	notes := func(c dosing.Case, code string) int {
		n := 0
		for _, w := range c.Notes {
			if w.Code == code {
				n++
			}
		}
		return n
	}
	// 26 mg/L is usual by the built-in band and not by the plant's.
	if notes(c, "unusual_alkalinity") != 1 || notes(c, "unusual_ph") != 0 {
		t.Errorf("%+v", c.Notes)
	}
	f.Values["alkalinity"], f.Values["ph"] = "450", "7.1"
	if c, err = l.Case(f, entry.NeedDose); err != nil {
		t.Fatal(err)
	}
	// 450 is unusual by the built-in band only, and the plant's holds.
	if notes(c, "unusual_alkalinity") != 0 || notes(c, "unusual_ph") != 1 {
		t.Errorf("%+v", c.Notes)
	}
	ph, _ := reading.Lookup("ph")
	if w, p := l.CheckReading(ph, 6.5, "6.5"); p != nil || w == nil || w.Limit != 6.7 || w.Given != "6.5" {
		t.Errorf("%+v %+v", w, p)
	}
	if w, p := l.CheckReading(ph, 7.0, "7"); p != nil || w != nil {
		t.Errorf("%+v %+v", w, p)
	}
}

// TestLimitsOfFinishedWater: each limit that the water breaks is named with its
// line; a figure that is not known breaks none.
func TestLimitsOfFinishedWater(t *testing.T) {
	l := load(t, works).LineNamed("one")
	f := l.Form()
	f.Values["sodium"] = "6"
	broken := l.CheckFinished(answer(t, l, f))
	if len(broken) != 2 || broken[0].Field != "ph" || broken[1].Field != "sodium" {
		t.Fatalf("%v", broken)
	}
	for _, p := range broken {
		if p.Kind != dosing.NoAnswer || p.Code != "plant_limit" || !p.Value.Given || !strings.Contains(p.Accepted, "plant.toml, line") {
			t.Errorf("%+v", p)
		}
	}
	if p := broken[0]; p.Given != "8.40" || !strings.HasPrefix(p.Accepted, "7.00 to 8.20 (") || p.High != dosing.Some(8.2) {
		t.Errorf("%+v", p)
	}
	if p := broken[1]; !strings.HasPrefix(p.Accepted, "at most 10.0 mg/L as Na (") {
		t.Errorf("%+v", p)
	}
	if broken := l.CheckFinished(answer(t, l, l.Form())); len(broken) != 1 {
		t.Errorf("sodium is not known: %v", broken)
	}
	f.Values["chloride"], f.Values["sulfate"] = "200", "20"
	broken = l.CheckFinished(answer(t, l, f))
	if len(broken) != 3 || broken[2].Field != "larson" || !strings.HasPrefix(broken[2].Accepted, "at most 0.5 (") {
		t.Errorf("%v", broken)
	}
}

// TestCaseProblems: what the form itself has wrong comes first.
func TestCaseProblems(t *testing.T) {
	l := load(t, works).LineNamed("one")
	f := l.Form()
	f.Values["ph"] = "7..1"
	if _, err := l.Case(f, entry.NeedDose); problem(t, err).Field != "ph" {
		t.Error(err)
	}
	f = l.Form()
	f.Product = "lyre"
	if _, err := l.Case(f, entry.NeedDose); problem(t, err).Code != "unknown_product" {
		t.Error(err)
	}
	if _, err := l.Case(entry.Form{}, entry.NeedDose); problem(t, err).Code != "missing" {
		t.Error(err)
	}
}

// TestTwoAdditionsOfOneProduct: they keep their order and their own strengths.
func TestTwoAdditionsOfOneProduct(t *testing.T) {
	l := load(t, works).LineNamed("one")
	f := l.Form()
	f.Adds = []string{"alum-liquid=10", "alum=10", "alum-liquid=5"}
	r := answer(t, l, f)
	var names []string
	for _, st := range r.Stations[1:] {
		names = append(names, st.Addition.Product.Name)
	}
	if want := []string{"alum-liquid", "alum", "alum-liquid", "lye"}; !slices.Equal(names, want) {
		t.Errorf("%v", names)
	}
}
