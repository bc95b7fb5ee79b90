package entry

import (
	"errors"
	"math"
	"reflect"
	"strings"
	"testing"

	"github.com/google/go-cmp/cmp"

	"beckline/carbonate"
	"beckline/dosing"
	"beckline/dosing/reading"
)

// plant is a form with everything that a dose needs.
func plant() Form {
	return Form{
		Values: map[string]string{
			"ph": "7.0", "alkalinity": "30", "temperature": "10", "target-ph": "8.5",
		},
		Product: "caustic-50",
	}
}

// with returns the form with some values changed: name, value, name, value.
func (f Form) with(pairs ...string) Form {
	changed := map[string]string{}
	for name, v := range f.Values {
		changed[name] = v
	}
	for i := 0; i < len(pairs); i += 2 {
		changed[pairs[i]] = pairs[i+1]
	}
	f.Values = changed
	return f
}

func (f Form) withProduct(name string) Form { f.Product = name; return f }

func (f Form) withAdds(adds ...string) Form { f.Adds = adds; return f }

func mustCase(t *testing.T, f Form, need Need) dosing.Case {
	t.Helper()
	c, err := f.Case(need)
	if err != nil {
		t.Fatalf("%+v: %v", f, err)
	}
	return c
}

// problem returns the first problem of a form that must have one.
func problem(t *testing.T, f Form, need Need) *dosing.Problem {
	t.Helper()
	c, err := f.Case(need)
	var p *dosing.Problem
	if !errors.As(err, &p) {
		t.Fatalf("%+v was taken as %+v", f, c)
	}
	if all := f.Problems(need); len(all) == 0 || !reflect.DeepEqual(all[0], p) {
		t.Errorf("the first of all problems %v is not %v", all, p)
	}
	if p.Kind != dosing.BadInput || p.Accepted == "" || !reflect.DeepEqual(c, dosing.Case{}) {
		t.Errorf("a poor problem: %+v with %+v", p, c)
	}
	return p
}

func TestCaseHoldsTheReadingsInSI(t *testing.T) {
	c := mustCase(t, plant().with(
		"calcium", "40.078 mg/L", "hardness", "10 °dH", "sulfate", "96.06", "flow", "1 MGD", "conductivity", "78",
		"temperature", "50 °F", "ph-temperature", "20", "tds", "", "sodium", " ", "magnesium", "0",
		"product-temperature", "15", "pump", "36 L/h",
	), NeedDose)
	near := func(name string, got dosing.Optional, want float64) {
		t.Helper()
		if !got.Given || math.Abs(got.Value-want) > 1e-6*want {
			t.Errorf("%s is %+v, want %v", name, got, want)
		}
	}
	near("ph", c.Readings.PH, 7)
	near("alkalinity", c.Readings.Alkalinity, 30/50.0435e3)
	near("temperature", c.Readings.Kelvin, 283.15)
	near("ph-temperature", c.Readings.PHKelvin, 293.15)
	near("calcium", c.Readings.Calcium, 1e-3)
	near("hardness", c.Readings.Hardness, 100e-3/56.077)
	near("sulfate", c.Readings.Sulfate, 1e-3)
	near("flow", c.Readings.Flow, 0.0438126364)
	near("conductivity", c.Readings.Conductivity, 78e-4)
	if c.Readings.TDS.Given || c.Readings.Sodium.Given {
		t.Error("a blank reading was taken as measured")
	}
	if c.Readings.Magnesium != dosing.Some(0) {
		t.Error("a measured zero was lost")
	}
	if c.Target != (dosing.Target{Kind: dosing.TargetPH, Value: 8.5}) {
		t.Errorf("the target is %+v", c.Target)
	}
	if len(c.Additions) != 1 || !c.Additions[0].Solve || c.Additions[0].Dose.Given || c.Additions[0].Product.Name != "caustic-50" {
		t.Fatalf("the additions are %+v", c.Additions)
	}
	near("product-temperature", c.Additions[0].Feed.ProductKelvin, 288.15)
	near("pump", c.Additions[0].Feed.PumpCapacity, 1e-5)
	if len(c.Notes) != 0 {
		t.Errorf("notes on a usual water: %+v", c.Notes)
	}
}

// Every reading has its own place in the case, and every target its own kind.
func TestEveryFieldHasItsPlace(t *testing.T) {
	places := map[*dosing.Optional]string{}
	var r dosing.Readings
	readings, targets := 0, map[dosing.TargetKind]bool{}
	for _, f := range reading.Fields() {
		switch f.Group {
		case reading.Reading:
			readings++
			place := r.Named(f.Name)
			if place == nil || places[place] != "" {
				t.Errorf("%s has no place of its own (shares %q)", f.Name, places[place])
			}
			places[place] = f.Name
		case reading.Target:
			kind := targetKinds[f.Name]
			if kind == dosing.NoTarget || targets[kind] {
				t.Errorf("%s has no kind of its own", f.Name)
			}
			targets[kind] = true
		}
	}
	if n := reflect.TypeOf(r).NumField(); n != readings {
		t.Errorf("%d readings in the table and %d in the case", readings, n)
	}
	if r.Named("pump") != nil {
		t.Error("a setting has a place among the readings")
	}
}

// Reading may not import the model, so it has molar masses of its own: a bare
// mg/L of every component has to mean the same moles in both.
func TestMolarMassesAgreeWithTheModel(t *testing.T) {
	components := map[string]carbonate.Component{
		"calcium": carbonate.Calcium, "magnesium": carbonate.Magnesium, "sulfate": carbonate.Sulfate,
		"chloride": carbonate.Chloride, "sodium": carbonate.Sodium, "potassium": carbonate.Potassium,
		"nitrate": carbonate.Nitrate, "ammonia": carbonate.Ammonia, "phosphate": carbonate.Phosphate,
		"silica": carbonate.Silica, "boron": carbonate.Boron, "fluoride": carbonate.Fluoride,
		"free-chlorine": carbonate.Chlorine, "acetate": carbonate.Acetate, "formate": carbonate.Formate,
		"citrate": carbonate.Citrate,
	}
	for name, component := range components {
		f, ok := reading.Lookup(name)
		if !ok {
			t.Fatalf("no field %q", name)
		}
		if got, want := 1/f.FromBare(1)/1000, component.MolarMass(); math.Abs(got-want) > 1e-9*want {
			t.Errorf("%s: %v g/mol, the model has %v", name, got, want)
		}
		if !strings.HasSuffix(f.Bare, " "+component.Formula()) {
			t.Errorf("%s is in %s, the model means %s", name, f.Bare, component.Formula())
		}
	}
	for name, want := range map[string]float64{
		"alkalinity": carbonate.MolarMassCaCO3 / 2, "target-alkalinity": carbonate.MolarMassCaCO3 / 2,
		"hardness": carbonate.MolarMassCaCO3, "calcium-hardness": carbonate.MolarMassCaCO3, "target-ccpp": carbonate.MolarMassCaCO3,
	} {
		f, _ := reading.Lookup(name)
		if got := 1 / f.FromBare(1) / 1000; math.Abs(got-want) > 1e-9*want {
			t.Errorf("%s: %v g/mol, the model has %v", name, got, want)
		}
	}
	for unit, want := range map[string]float64{"mg/L as HCO3": carbonate.MolarMassHCO3} {
		f, _ := reading.Lookup("alkalinity")
		if si, ok := f.From(unit, 1); !ok || math.Abs(1/si/1000-want) > 1e-9*want {
			t.Errorf("%s: %v g/mol, the model has %v", unit, 1/si/1000, want)
		}
	}
	dic, _ := reading.Lookup("dic")
	if si, ok := dic.From("mg/L as C", 1); !ok || math.Abs(1/si/1000-carbonate.Carbon.MolarMass()) > 1e-9 {
		t.Errorf("mg/L as C: %v g/mol", 1/si/1000)
	}
}

func TestWhatIsMissingIsNamed(t *testing.T) {
	for _, c := range []struct {
		form     Form
		need     Need
		field    string
		accepted string
	}{
		{plant().with("ph", ""), NeedDose, "ph", "0 to 14"},
		{plant().with("ph", "\u00a0"), NeedWater, "ph", "dic"},
		{plant().with("alkalinity", ""), NeedDose, "alkalinity", "mg/L as CaCO3"},
		{plant().with("temperature", ""), NeedDose, "temperature", "0 to 50 °C"},
		{plant().with("temperature", " "), NeedWater, "temperature", "°F"},
		{plant().with("target-ph", ""), NeedDose, "target-ph", "target-alkalinity, target-si, target-ccpp or target-dic"},
		{plant().withProduct(""), NeedDose, "product", "caustic-25"},
		{Form{}, NeedDose, "ph", "0 to 14"},
	} {
		p := problem(t, c.form, c.need)
		if p.Code != "missing" || p.Field != c.field || !strings.Contains(p.Accepted, c.accepted) || p.Given != "" {
			t.Errorf("%+v: %+v, want %s missing and %q", c.form.Values, p, c.field, c.accepted)
		}
	}
	// A measured DIC stands in for the pH; flow and the optional readings are optional.
	mustCase(t, plant().with("ph", "", "dic", "0.7"), NeedDose)
	// The water alone needs neither target nor product, and does not look at them.
	c := mustCase(t, plant().with("target-ph", "", "strength", "abc").withProduct("no such"), NeedWater)
	if c.Target.Kind != dosing.NoTarget || len(c.Additions) != 0 {
		t.Errorf("a water with target %+v and additions %+v", c.Target, c.Additions)
	}
}

func TestAllProblemsInOrder(t *testing.T) {
	f := Form{
		Values: map[string]string{
			"ph": "15", "alkalinity": "1,200", "calcium": "abc", "target-ph": "3", "strength": "120",
			"pump": "0", "alkalinty": "30",
		},
		Product: "caustik-25",
		Adds:    []string{"alum-dry", "lime=5 mg/L Al", "alum-dri=22"},
	}
	var got []string
	for _, p := range f.Problems(NeedDose) {
		got = append(got, p.Field+" "+p.Code)
	}
	want := []string{
		"ph above_limit", "alkalinity ambiguous_number", "temperature missing", "calcium not_a_number",
		"target-ph below_limit", "product unknown_product", "strength above_limit", "pump below_limit",
		"add dose_form", "add unknown_basis", "add unknown_product", "alkalinty unknown_field",
	}
	if diff := cmp.Diff(want, got); diff != "" {
		t.Errorf("problems (want, got):\n%s", diff)
	}
	if more := plant().Problems(NeedDose); len(more) != 0 {
		t.Errorf("problems of a good form: %v", more)
	}
}

func TestOneTargetOnly(t *testing.T) {
	p := problem(t, plant().with("target-alkalinity", "60"), NeedDose)
	if p.Code != "two_targets" || p.Field != "target-alkalinity" ||
		p.Given != "target-ph and target-alkalinity" || !strings.Contains(p.Accepted, "target-ph or target-alkalinity") {
		t.Errorf("two targets: %+v", p)
	}
	for name, want := range map[string]dosing.Target{
		"target-alkalinity": {Kind: dosing.TargetAlkalinity, Value: 1e-3},
		"target-si":         {Kind: dosing.TargetSaturationIndex, Value: -0.2},
		"target-ccpp":       {Kind: dosing.TargetCCPP, Value: 1e-3},
	} {
		text := map[string]string{"target-alkalinity": "1 meq/L", "target-si": "−0.2", "target-ccpp": "1 mmol/L"}[name]
		c := mustCase(t, plant().with("target-ph", "", name, text), NeedDose)
		if c.Target != want {
			t.Errorf("%s %s is %+v, want %+v", name, text, c.Target, want)
		}
	}
}

func TestUnusualValuesAreNoted(t *testing.T) {
	c := mustCase(t, plant().with("temperature", "41", "ph", "11", "target-ph", "6", "calcium-hardness", "600"), NeedDose)
	want := []dosing.Warning{
		{Code: "unusual_ph", Field: "ph", Given: "11", Value: 11, Limit: 10.5},
		{Code: "unusual_temperature", Field: "temperature", Given: "41", Value: 314.15, Limit: 303.15},
		{Code: "unusual_calcium_hardness", Field: "calcium-hardness", Given: "600", Value: 600 / 100.087e3, Limit: 500 / 100.087e3},
		{Code: "unusual_target_ph", Field: "target-ph", Given: "6", Value: 6, Limit: 6.5},
	}
	if diff := cmp.Diff(want, c.Notes, cmp.Comparer(func(a, b float64) bool { return math.Abs(a-b) < 1e-9 })); diff != "" {
		t.Errorf("notes (want, got):\n%s", diff)
	}
}

func TestAMisspeltReadingIsNotForgotten(t *testing.T) {
	p := problem(t, plant().with("calcuim", "12"), NeedDose)
	if p.Code != "unknown_field" || p.Field != "calcuim" || !strings.HasPrefix(p.Accepted, "calcium") {
		t.Errorf("%+v", p)
	}
	p = problem(t, plant().with("\x1b[2J", "12"), NeedDose)
	if strings.Contains(p.Field+p.Given, "\x1b") {
		t.Errorf("an echo of a control character: %+v", p)
	}
}

// The demo plant is whole: it needs nothing more and everything in it is usual.
func TestDemoIsAWholePlant(t *testing.T) {
	c := mustCase(t, Demo(), NeedDose)
	if len(c.Notes) != 0 {
		t.Errorf("notes on the demo: %+v", c.Notes)
	}
	if !c.Readings.Flow.Given || !c.Readings.Calcium.Given || c.Target.Value != 8.4 || c.Additions[0].Product.Name != "caustic-25" {
		t.Errorf("the demo is %+v", c)
	}
	// The figures of a settled water have to be possible together: charges of
	// the ions within a tenth of their sum.
	r := c.Readings
	plus := 2*r.Calcium.Value + 2*r.Magnesium.Value + r.Sodium.Value
	minus := r.Alkalinity.Value + 2*r.Sulfate.Value + r.Chloride.Value
	if off := math.Abs(plus-minus) / (plus + minus); off > 0.1 {
		t.Errorf("the demo's charges differ by %v of their sum", off)
	}
	first, second := Demo(), Demo()
	first.Values["ph"] = "9"
	if second.Values["ph"] == "9" {
		t.Error("two demos share their values")
	}
}
