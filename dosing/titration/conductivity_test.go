package titration_test

import (
	"errors"
	"math"
	"testing"

	"beckline/dosing/titration"
)

// TestConductivity compares the straight line with two factors of the table of
// ISO 7888 (from memory: 1.918 at 0 C, 1.116 at 20 C) within the stated 2 %.
func TestConductivity(t *testing.T) {
	for celsius, factor := range map[float64]float64{0: 1.918, 20: 1.116, 25: 1} {
		k, err := titration.ConductivityAt25(0.01, celsius+273.15, 0)
		if err != nil {
			t.Fatal(err)
		}
		if math.Abs(k/0.01/factor-1) > 0.02 {
			t.Errorf("at %g C the factor is %.3f, ISO 7888 %.3f", celsius, k/0.01, factor)
		}
	}
	// Standard Methods 2510 B: k / (1 + 0.0191 (t - 25)).
	if k, err := titration.ConductivityAt25(0.02, 283.15, 0); err != nil || math.Abs(k-0.02/(1-0.0191*15)) > 1e-15 {
		t.Errorf("%g %v", k, err)
	}
	if k, err := titration.ConductivityAt25(0.02, 283.15, titration.RoundCoefficient); err != nil || math.Abs(k-0.02/0.7) > 1e-14 {
		t.Errorf("%g %v", k, err)
	}
	for _, c := range []struct {
		k, kelvin, coefficient float64
		field                  string
	}{
		{0, 283.15, 0, "conductivity"}, {8, 283.15, 0, "conductivity"},
		{0.01, 260, 0, "temperature"}, {0.01, 330, 0, "temperature"}, {0.01, 283.15, 0.2, "coefficient"},
	} {
		_, err := titration.ConductivityAt25(c.k, c.kelvin, c.coefficient)
		var e *titration.Error
		if !errors.As(err, &e) || e.Field != c.field || e.Accepted == "" {
			t.Errorf("%+v: %v", c, err)
		}
	}
}

// TestCompensated: a meter left at 25 C in water at 5 C shows a true 9.5 as 9.33
// (Nernst: mV in proportion to kelvins).
func TestCompensated(t *testing.T) {
	ph, err := titration.Compensated(9.33, 298.15, 278.15)
	if err != nil || math.Abs(ph-9.50) > 0.005 {
		t.Errorf("%g %v", ph, err)
	}
	if ph, err := titration.Compensated(7, 298.15, 278.15); err != nil || ph != 7 {
		t.Errorf("pH 7 is the meter's zero: %g %v", ph, err)
	}
	for _, c := range [][3]float64{{15, 298.15, 278.15}, {7, 200, 278.15}, {7, 298.15, 350}} {
		var e *titration.Error
		if _, err := titration.Compensated(c[0], c[1], c[2]); !errors.As(err, &e) {
			t.Errorf("%v: %v", c, err)
		}
	}
}
