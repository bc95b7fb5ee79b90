package titration_test

import (
	"errors"
	"math"
	"testing"

	"beckline/dosing/titration"
)

func TestEDTA(t *testing.T) {
	h, notes, err := titration.EDTA{SampleML: 50, Molarity: 0.01, Titre: titration.Titre{StartML: 2, EndML: 11.5}}.Hardness()
	if err != nil || len(notes) != 0 || math.Abs(h-1.9e-3) > 1e-15 {
		t.Errorf("9.5 mL of 0.01 mol/L in 50 mL: %g %v %v", h, notes, err)
	}
	if m := titration.MolarityOf(1); math.Abs(m-1/100.087) > 1e-15 {
		t.Errorf("1 mg of CaCO3 a mL is %g mol/L", m)
	}
	if _, notes, err := (titration.EDTA{SampleML: 50, Molarity: 0.1, Titre: titration.Used(2)}).Hardness(); err != nil || codes(notes) != titration.CodeNormality {
		t.Errorf("0.1 mol/L: %v %v", notes, err)
	}
	for _, c := range []struct {
		e     titration.EDTA
		field string
	}{
		{titration.EDTA{SampleML: 50, Molarity: 0, Titre: titration.Used(5)}, "molarity"},
		{titration.EDTA{SampleML: 50, Molarity: 1, Titre: titration.Used(5)}, "molarity"},
		{titration.EDTA{SampleML: 5, Molarity: 0.1, Titre: titration.Used(50)}, "molarity"},
		{titration.EDTA{SampleML: 0, Molarity: 0.01, Titre: titration.Used(5)}, "sample"},
		{titration.EDTA{SampleML: 50, Molarity: 0.01, Titre: titration.Titre{StartML: 5, EndML: 1}}, "end"},
	} {
		_, _, err := c.e.Hardness()
		var e *titration.Error
		if !errors.As(err, &e) || e.Field != c.field || e.Accepted == "" {
			t.Errorf("%+v: %v", c.e, err)
		}
	}
}

func TestMagnesium(t *testing.T) {
	if m, err := titration.Magnesium(3e-3, 2e-3); err != nil || math.Abs(m-1e-3) > 1e-15 {
		t.Errorf("%g %v", m, err)
	}
	if m, err := titration.Magnesium(2e-3, 2.03e-3); err != nil || m != 0 {
		t.Errorf("calcium 1.5 %% above: %g %v", m, err)
	}
	var e *titration.Error
	if _, err := titration.Magnesium(2e-3, 3e-3); !errors.As(err, &e) || e.Code != titration.CodeBelowHardness {
		t.Errorf("swapped: %v", err)
	}
}
