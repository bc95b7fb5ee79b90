package report

import (
	"encoding/json"
	"math"
	"slices"
	"strings"
	"testing"

	"beckline/dosing"
	"beckline/dosing/reading"
)

// The key set of every water, and of every dose, in its order. Scripts hang on
// it: names are added at the end, never changed.
var (
	waterKeys = strings.Fields(`ph alkalinity_mg_l_caco3 temperature_c dic_mmol_l free_co2_mg_l
		ionic_strength_mol_l ionic_strength_from saturation_index saturation_index_aragonite ccpp_mg_l_caco3
		buffer_intensity_meq_l_ph chloride_sulfate_mass_ratio larson_ratio calcium_mg_l magnesium_mg_l sodium_mg_l
		chloride_mg_l sulfate_mg_l`)
	doseKeys = strings.Fields(`product chemical basis dose_mg_l product_mg_l pure_kg_d feed_kg_d feed_lb_d feed_l_h
		feed_ml_min feed_gal_h pump_percent trade_basis trade_dose_mg_l`)
)

func keysOf(figures []Figure) []string {
	var keys []string
	for _, f := range figures {
		keys = append(keys, f.Key)
	}
	return keys
}

func TestKeysAreFixed(t *testing.T) {
	d := solved(t, soft(t), "caustic-25", dosing.None)
	if got := keysOf(d.Finished); !slices.Equal(got, waterKeys) {
		t.Errorf("water keys are %v", got)
	}
	if got := keysOf(d.Dose); !slices.Equal(got, doseKeys) {
		t.Errorf("dose keys are %v", got)
	}
	var want []string
	for _, prefix := range []string{"raw_", "finished_"} {
		for _, k := range waterKeys {
			want = append(want, prefix+k)
		}
	}
	want = append(append(want, doseKeys...), "warnings", "problem")
	var got []string
	for _, c := range Columns() {
		got = append(got, c.Name)
	}
	if !slices.Equal(got, want) {
		t.Errorf("columns are %v", got)
	}
	if n := len(d.Cells()); n != len(want) {
		t.Errorf("%d cells, %d columns", n, len(want))
	}
	if n := len(ProblemCells(&dosing.Problem{Code: "missing"})); n != len(want) {
		t.Errorf("%d cells of a problem, %d columns", n, len(want))
	}
}

// Readings come back in their own unit as they were typed.
func TestReadingsComeBack(t *testing.T) {
	r := soft(t)
	d := New(solve(t, r, "caustic-25", dosing.None))
	for key, want := range map[string]string{
		"ph": "6.28", "alkalinity_mg_l_caco3": "13", "temperature_c": "8", "calcium_mg_l": "7.2", "magnesium_mg_l": "1.5",
		"sulfate_mg_l": "16.6", "chloride_mg_l": "8", "sodium_mg_l": "6",
	} {
		if got := find(d.Raw, key).Full(); got != want {
			t.Errorf("%s is %s, want %s", key, got, want)
		}
	}
}

// The units here are those in which the readings of the same key are read.
func TestUnitsAreThoseOfTheReadings(t *testing.T) {
	f := dosing.Figures{PH: 7, Alkalinity: 1e-3, DIC: 2e-3}
	f.Water.Kelvin = 300
	for _, o := range []*dosing.Optional{&f.Calcium, &f.Magnesium, &f.Sodium, &f.Chloride, &f.Sulfate} {
		*o = dosing.Some(1e-3)
	}
	seen := 0
	for key, value := range map[string]float64{
		"ph": 7, "alkalinity_mg_l_caco3": 1e-3, "dic_mmol_l": 2e-3, "temperature_c": 300, "calcium_mg_l": 1e-3,
		"magnesium_mg_l": 1e-3, "sodium_mg_l": 1e-3, "chloride_mg_l": 1e-3, "sulfate_mg_l": 1e-3,
	} {
		field, ok := reading.LookupKey(key)
		if !ok {
			t.Errorf("no reading has the key %s", key)
			continue
		}
		want := field.ToBare(value)
		if got := find(Water(&f), key).Value.Value; math.Abs(got-want) > 1e-9*math.Abs(want) {
			t.Errorf("%s is %v here and %v as a reading", key, got, want)
		}
		seen++
	}
	for kind, key := range map[dosing.TargetKind]string{
		dosing.TargetAlkalinity: "target_alkalinity_mg_l_caco3", dosing.TargetCCPP: "target_ccpp_mg_l_caco3",
		dosing.TargetPH: "target_ph", dosing.TargetSaturationIndex: "target_saturation_index",
	} {
		field, ok := reading.LookupKey(key)
		if !ok {
			t.Errorf("no target has the key %s", key)
			continue
		}
		p := &dosing.Problem{Target: dosing.Target{Kind: kind}, Nearest: dosing.Some(1e-3)}
		if got, want := Nearest(p).Value, field.ToBare(1e-3); math.Abs(got-want) > 1e-9*math.Abs(want) {
			t.Errorf("nearest of %s is %v, as a reading %v", key, got, want)
		}
		seen++
	}
	if seen != 13 {
		t.Errorf("%d units compared", seen)
	}
}

// Feed figures by the definitions of their units (US gallon 3.785411784 L,
// pound 0.45359237 kg, both exact).
func TestFeedUnits(t *testing.T) {
	d := solved(t, soft(t), "caustic-25", si(t, "pump", 20))
	v := func(key string) float64 { return find(d.Dose, key).Value.Value }
	for _, c := range []struct {
		what      string
		got, want float64
	}{
		{"kg/d pure = mg/L x m3/d / 1000", v("pure_kg_d"), v("dose_mg_l") * 240 * 24 / 1000},
		{"kg/d of product", v("feed_kg_d"), v("product_mg_l") * 240 * 24 / 1000},
		{"lb/d", v("feed_lb_d") * 0.45359237, v("feed_kg_d")},
		{"mL/min", v("feed_ml_min"), v("feed_l_h") * 1000 / 60},
		{"US gal/h", v("feed_gal_h") * 3.785411784, v("feed_l_h")},
		{"percent of 20 L/h", v("pump_percent"), v("feed_l_h") / 20 * 100},
		{"25 % by weight", v("dose_mg_l"), v("product_mg_l") * 0.25},
	} {
		if math.Abs(c.got-c.want) > 1e-9*math.Abs(c.want) || c.want == 0 {
			t.Errorf("%s: %v, want %v", c.what, c.got, c.want)
		}
	}
}

func TestJSONHasEveryKey(t *testing.T) {
	bare := dosing.Readings{PH: si(t, "ph", 7), Alkalinity: si(t, "alkalinity", 30), Kelvin: si(t, "temperature", 10)}
	for name, d := range map[string]Document{
		"all readings": solved(t, soft(t), "caustic-25", dosing.None),
		"few readings": solved(t, bare, "lime", dosing.None),
		"a given dose": given(t, bare, "alum-dry", 5),
	} {
		text, err := d.JSON()
		if err != nil {
			t.Fatal(err)
		}
		var top map[string]any
		if err := json.Unmarshal(text, &top); err != nil {
			t.Fatalf("%s: %v", name, err)
		}
		for _, key := range []string{"raw", "dose", "finished", "stations", "warnings", "checks"} {
			if _, there := top[key]; !there {
				t.Errorf("%s: no %s", name, key)
			}
		}
		for _, water := range []string{"raw", "finished"} {
			object := top[water].(map[string]any)
			for _, key := range waterKeys {
				if _, there := object[key]; !there {
					t.Errorf("%s: %s has no %s", name, water, key)
				}
			}
		}
		stations := top["stations"].([]any)
		last := stations[len(stations)-1].(map[string]any)
		if last["kind"] != "addition" || last["solved"] != (top["dose"] != nil) {
			t.Errorf("%s: the last station is %v, solved %v", name, last["kind"], last["solved"])
		}
		again, _ := json.Marshal(last["water"])
		finished, _ := json.Marshal(top["finished"])
		if string(again) != string(finished) {
			t.Errorf("%s: the last station is not the finished water", name)
		}
	}
}

func TestNothingMeasuredIsNull(t *testing.T) {
	bare := dosing.Readings{PH: si(t, "ph", 7), Alkalinity: si(t, "alkalinity", 30), Kelvin: si(t, "temperature", 10)}
	text, err := solved(t, bare, "caustic-25", dosing.None).JSON()
	if err != nil {
		t.Fatal(err)
	}
	for _, want := range []string{`"saturation_index": null`, `"chloride_mg_l": null`, `"feed_l_h": null`,
		`"pump_percent": null`, `"trade_basis": null`} {
		if !strings.Contains(string(text), want) {
			t.Errorf("no %s in\n%s", want, text)
		}
	}
}

func TestCheckThatDisagreesIsSeen(t *testing.T) {
	d := Document{Checks: []Check{{Name: "closure_ph", Agrees: true}}}
	if !d.Agrees() {
		t.Error("an agreeing check counts as disagreeing")
	}
	d.Checks = append(d.Checks, Check{Name: "carbon_balance"})
	if d.Agrees() {
		t.Error("a disagreeing check counts as agreeing")
	}
}
