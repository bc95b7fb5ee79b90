package titration_test

import (
	"errors"
	"math"
	"strings"
	"testing"

	"beckline/carbonate"
	"beckline/dosing/titration"
)

// neutral is a water whose ions and alkalinity balance.
func neutral() carbonate.Water {
	var w carbonate.Water
	w.Totals[carbonate.Calcium] = 1e-3
	w.Totals[carbonate.Magnesium] = 0.3e-3
	w.Totals[carbonate.Sodium] = 0.5e-3
	w.Totals[carbonate.Chloride] = 0.4e-3
	w.Totals[carbonate.Sulfate] = 0.2e-3
	w.Totals[carbonate.Nitrate] = 0.1e-3
	w.Alkalinity = 2.2e-3
	w.Kelvin = 288.15
	return w
}

func TestIonCheck(t *testing.T) {
	w := neutral()
	c, err := titration.CheckIons(w)
	if err != nil || !c.Agrees || math.Abs(c.FromIons-2.2e-3) > 1e-15 || math.Abs(c.Allowed-0.02*3.1e-3) > 1e-15 {
		t.Fatalf("%+v %v", c, err)
	}
	for factor, word := range map[float64]string{1.2193: "HCO3", 10: "ten times weaker", 0.2: "0.1 eq/L", 0.5: "half as large", 1.1: ""} {
		w.Alkalinity = factor * 2.2e-3
		c, err := titration.CheckIons(w)
		if err != nil || c.Agrees {
			t.Fatalf("%g times: %+v %v", factor, c, err)
		}
		if word == "" && c.Likely != "" || !strings.Contains(c.Likely, word) || !strings.Contains(c.Text(), "disagree") {
			t.Errorf("%g times: %q", factor, c.Text())
		}
	}
	soft := carbonate.Water{Alkalinity: 0.3e-3}
	soft.Totals[carbonate.Sodium] = 0.45e-3
	if c, err := titration.CheckIons(soft); err != nil || !c.Agrees || c.Allowed != 0.2e-3 {
		t.Errorf("0.15 meq/L apart in a soft water: %+v %v", c, err)
	}
	hard := neutral()
	for i := range hard.Totals {
		hard.Totals[i] *= 5
	}
	hard.Alkalinity = 11.9e-3 // 8 % over the 11 meq/L of the ions; 16.4 meq/L of anions
	if c, err := titration.CheckIons(hard); err != nil || c.Agrees || math.Abs(c.Allowed-0.05*16.4e-3) > 1e-15 {
		t.Errorf("hard water: %+v %v", c, err)
	}
	var none carbonate.Water
	none.Alkalinity = 1e-3
	var e *titration.Error
	if _, err := titration.CheckIons(none); !errors.As(err, &e) || e.Code != titration.CodeNoIons {
		t.Errorf("no ions: %v", err)
	}
	acid := neutral()
	acid.Totals[carbonate.Chloride] = 9e-3
	if c, err := titration.CheckIons(acid); err != nil || c.Agrees || !strings.Contains(c.Likely, "no alkalinity at all") {
		t.Errorf("%+v %v", c, err)
	}
}
