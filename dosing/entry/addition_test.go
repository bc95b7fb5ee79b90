package entry

import (
	"math"
	"strings"
	"testing"

	"beckline/dosing"
	"beckline/dosing/reading"
)

// A dose on any basis is the moles of the chemical's formula. The factors are
// arithmetic from the IUPAC abridged atomic masses.
func TestDosesOnEveryBasis(t *testing.T) {
	for text, want := range map[string]float64{ // mmol/L
		"alum-dry=59.976":                          0.1,
		"alum-dry=59.976 mg/L Al2(SO4)3.14.3H2O":   0.1,
		"alum-dry=5.3964 mg/L Al":                  0.1, // two Al, 26.982 each
		"alum-dry=10.1961 mg/L as Al2O3":           0.1,
		"alum-liquid=59.976 mg/L":                  0.1, // bare: as dry alum
		"alum-liquid=59.976 product":               0.0485,
		"ferric-chloride-40=5.5845 mg/L Fe":        0.1,
		"ferric-sulfate-43=5.5845 mg/L fe":         0.05, // two Fe
		"pacl-10=2.6982 mg/L Al":                   0.1,  // a mole is a mole of Al
		"hypochlorite-12=7.0906 mg/L Cl2":          0.1,
		"chlorine-gas=7.0906":                      0.1,
		"calcium-hypochlorite-65=1.41812 mg/L Cl2": 0.01, // two Cl2
		"hydrofluorosilicic-23=1.13988 mg/L F":     0.01, // six F
		"ammonia-19=1.4007 mg/L N":                 0.1,
		"phosphoric-75=0.9497 mg/L PO4":            0.01,
		"phosphoric-75=0.30974 mg/L P":             0.01,
		"lime=7.4093 mg/L Ca(OH)2":                 0.1,
		"caustic-25=15.9988 mg/L product":          0.1,
		"caustic-25=0":                             0,
	} {
		c := mustCase(t, plant().withAdds(text), NeedDose)
		if len(c.Additions) != 2 || c.Additions[0].Solve || !c.Additions[1].Solve {
			t.Fatalf("%q gave %+v", text, c.Additions)
		}
		got := c.Additions[0].Dose
		if !got.Given || math.Abs(got.Value*1000-want) > 1e-5*want {
			t.Errorf("%q is %v mmol/L, want %v", text, got.Value*1000, want)
		}
	}
}

// Every basis that the catalogue lists for a product can be typed.
func TestEveryBasisOfTheCatalogueIsRead(t *testing.T) {
	for _, p := range dosing.Products() {
		for _, basis := range basisNames(p) {
			text := p.Name + "=1 mg/L as " + basis
			c, err := plant().withAdds(text).Case(NeedWater)
			if err != nil || len(c.Additions) != 1 || !(c.Additions[0].Dose.Value > 0) {
				t.Errorf("%q: %+v, %v", text, c.Additions, err)
			}
		}
	}
}

func TestAdditionsKeepTheirOrder(t *testing.T) {
	c := mustCase(t, plant().withAdds("soda-ash=10", "alum-dry=22", "soda-ash=5"), NeedDose)
	var names []string
	for _, a := range c.Additions {
		names = append(names, a.Product.Name)
	}
	if got := strings.Join(names, " "); got != "soda-ash alum-dry soda-ash caustic-50" {
		t.Errorf("additions in the order %s", got)
	}
	c = mustCase(t, plant().withAdds("soda-ash=10"), NeedWater)
	if len(c.Additions) != 1 {
		t.Errorf("a water with %+v", c.Additions)
	}
}

func TestABareDoseAgainstTheTradesHabitIsNoted(t *testing.T) {
	for text, want := range map[string]bool{
		"hypochlorite-12=1.2": true, "hypochlorite-12=1.2 mg/L": true, "hypochlorite-12=1.2 mg/L Cl2": false,
		"hypochlorite-12=1.2 mg/L NaOCl": false, "hydrofluorosilicic-23=0.7": true, "ferric-chloride-40=5": true,
		"alum-dry=22": false, "lime=5": false, "chlorine-gas=1.2": false,
	} {
		notes := mustCase(t, plant().withAdds(text), NeedDose).Notes
		product, amount, _ := strings.Cut(text, "=")
		if got := len(notes) == 1 && notes[0] == (dosing.Warning{Code: "basis_assumed", Field: product, Given: amount}); got != want {
			t.Errorf("%q: notes %+v, want basis_assumed %v", text, notes, want)
		}
	}
}

func TestDosesOutsideTheirLimits(t *testing.T) {
	for _, c := range []struct{ text, code, accepted string }{
		{"alum-dry=501", "above_limit", "0 to 500 mg/L"},
		{"alum-liquid=1100 product", "above_limit", "0 to 500 mg/L as Al2(SO4)3"},
		{"hypochlorite-12=51 mg/L Cl2", "above_limit", "0 to 50 mg/L as Cl2"},
		{"chlorine-gas=50.1", "above_limit", "0 to 50 mg/L as Cl2"},
		{"caustic-25=10001", "above_limit", "10000 mg/L"},
		{"ammonium-sulfate-40=3000 mg/L N", "above_limit", "0 to 10000 mg/L"},
		{"caustic-25=-1", "below_limit", "0 to 10000"},
		{"caustic-25=5 mg/L Al", "unknown_basis", "NaOH or product"},
		{"alum-dry=5 mg/L Fe", "unknown_basis", "Al, Al2O3 or product"},
		{"alum=22", "unknown_product", "alum-dry or alum-liquid"},
		{"alum-dry=1,200", "ambiguous_number", "write 1200 or 1.2"},
		{"alum-dry", "dose_form", "PRODUCT=DOSE"},
	} {
		p := problem(t, plant().withAdds(c.text), NeedWater)
		if p.Code != c.code || p.Field != reading.DoseField || p.Given != c.text || !strings.Contains(p.Accepted, c.accepted) {
			t.Errorf("%q: %+v, want %s and %q", c.text, p, c.code, c.accepted)
		}
	}
	for text, limit := range map[string]float64{
		"alum-dry=100": 0, "alum-dry=101": 0.1, "alum-dry=500": 0.1,
		"chlorine-gas=5": 0, "chlorine-gas=5.1": 0.005, "hypochlorite-12=5.1 mg/L Cl2": 0.005 * 74.442 / 70.906,
		"hypochlorite-12=5 mg/L Cl2": 0, "caustic-25=101": 0,
	} {
		notes := mustCase(t, plant().withAdds(text), NeedWater).Notes
		if limit == 0 {
			if len(notes) != 0 {
				t.Errorf("%q: notes %+v", text, notes)
			}
			continue
		}
		if len(notes) != 1 || notes[0].Code != "unusual_dose" || notes[0].Given != text ||
			math.Abs(notes[0].Limit-limit) > 1e-9 || !(notes[0].Value > limit) {
			t.Errorf("%q: notes %+v, want unusual_dose over %v", text, notes, limit)
		}
	}
}
