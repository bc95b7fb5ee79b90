package entry

import (
	"errors"
	"math"
	"testing"

	"beckline/dosing"
	"beckline/dosing/margin"
)

// Half-widths by the definitions of the units: 0.9 F are 0.5 K, 1 mg/L as CaCO3
// is 2/100.087 meq/L, 1 m3/h is 1/3600 m3/s.
func TestTolerances(t *testing.T) {
	tol, err := Tolerances(" pH=0,05, temperature = 0.9 °F;alkalinity=1 mg/L, flow=3.6 m3/h,strength=1%,calcium=5 %,ph-temperature=0.5 K")
	if err != nil {
		t.Fatal(err)
	}
	want := map[string]margin.Tolerance{
		"ph":             {Absolute: 0.05},
		"temperature":    {Absolute: 0.5},
		"ph-temperature": {Absolute: 0.5},
		"alkalinity":     {Absolute: 2e-3 / 100.087},
		"flow":           {Absolute: 1e-3},
		"strength":       {Relative: 0.01},
		"calcium":        {Relative: 0.05},
	}
	if n := len(tol.Names()); n != len(want) {
		t.Errorf("%d tolerances: %v", n, tol.Names())
	}
	for name, w := range want {
		got, ok := tol.Of(name)
		if !ok || math.Abs(got.Absolute-w.Absolute) > 1e-9*(w.Absolute+1e-3) || math.Abs(got.Relative-w.Relative) > 1e-12 {
			t.Errorf("%s: %+v, want %+v", name, got, w)
		}
	}
}

func TestTolerancesRefused(t *testing.T) {
	for text, code := range map[string]string{
		"":                    "tolerance_form",
		"ph":                  "tolerance_form",
		"=0.1":                "tolerance_form",
		"ph=":                 "tolerance_form",
		"ph=0.1,":             "bad_tolerance",
		"ph=0.1,ph=0.2":       "given_twice",
		"colour=2":            "unknown_reading",
		"target-ph=0.1":       "unknown_reading",
		"ph=2%":               "bad_tolerance",
		"temperature=2%":      "bad_tolerance",
		"alkalinity=0":        "bad_tolerance",
		"alkalinity=-1":       "bad_tolerance",
		"alkalinity=60%":      "bad_tolerance",
		"alkalinity=two":      "bad_tolerance",
		"alkalinity=1 parsec": "bad_tolerance",
		"ph=3":                "bad_tolerance",
	} {
		_, err := Tolerances(text)
		var p *dosing.Problem
		if !errors.As(err, &p) || p.Code != code || p.Field != "tolerance" || p.Accepted == "" {
			t.Errorf("%q: %+v, want %s", text, p, code)
		}
	}
}

func TestUnitsAsTyped(t *testing.T) {
	f := Form{Values: map[string]string{"ph": "7", "alkalinity": "1.7 dH", "temperature": "50 F", "flow": "left", "calcium": " "}}
	units := f.Units()
	if len(units) != 3 || units["alkalinity"] != "°dH" || units["temperature"] != "°F" || units["ph"] == "" {
		t.Errorf("units are %v", units)
	}
}

// 10 mg/L of a product of 25 % are 2.5 mg/L of NaOH, 39.997 g/mol.
func TestDoseOf(t *testing.T) {
	p, err := ProductAt("Caustic 25", "")
	if err != nil {
		t.Fatal(err)
	}
	for amount, want := range map[string]float64{"10 mg/L product": 2.5e-3 / 39.997, "4": 4e-3 / 39.997, "4 mg/L NaOH": 4e-3 / 39.997} {
		got, err := DoseOf(p, "set", amount)
		if err != nil || math.Abs(got-want) > 1e-5*want {
			t.Errorf("%s: %g, %v; want %g", amount, got, err, want)
		}
	}
	for amount, code := range map[string]string{"4 mg/L Cl2": "unknown_basis", "four": "dose_form"} {
		_, err := DoseOf(p, "set", amount)
		var problem *dosing.Problem
		if !errors.As(err, &problem) || problem.Field != "set" || problem.Accepted == "" {
			t.Errorf("%s: %v, want %s", amount, err, code)
		}
	}
	if p, err = ProductAt("caustic-50", "30 %"); err != nil || math.Abs(p.Strength-0.3) > 1e-12 {
		t.Errorf("%g, %v", p.Strength, err)
	}
	if _, err = ProductAt("caustic-50", "300 %"); err == nil {
		t.Error("300 % is taken")
	}
	if _, err = ProductAt("", ""); err == nil {
		t.Error("no product is taken")
	}
}
