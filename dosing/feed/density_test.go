package feed

import (
	"errors"
	"math"
	"strings"
	"testing"

	"pgregory.net/rapid"
)

// substances maps the names of the published rows to tables and g/mol.
var substances = map[string]struct {
	table        Density
	gramsPerMole float64
}{
	"NaOH":               {SodiumHydroxide, 39.997},
	"Na2CO3":             {SodiumCarbonate, 105.988},
	"HCl":                {HydrochloricAcid, 36.461},
	"H2SO4":              {SulfuricAcid, 98.079},
	"FeCl3":              {FerricChloride, 162.204},
	"alum, liquid":       {LiquidAlum, 599.76},
	"NaOCl":              {SodiumHypochlorite, 74.442},
	"H2SiF6":             {FluorosilicicAcid, 144.09},
	"NH3 (aqua ammonia)": {AquaAmmonia, 17.031},
}

// notADensity lists published rows that are no density of a liquid product.
var notADensity = map[string]string{
	"NaHCO3":         "sold dry, no liquid product",
	"NaOH.H2O":       "a solid phase; see the freezing points",
	"solubility":     "see the freezing points",
	"freezing point": "see the freezing points", "freezing point, low end": "see the freezing points",
	"freezing point, high end": "see the freezing points", "melting point": "see the freezing points",
	"crystallisation temperature": "see the freezing points", "eutectic freezing point": "see the freezing points",
	"constant-boiling temperature": "no property of a feed",
	"NH3 (aqua ammonia), molarity": "the list's own 0.90 and 28 % make 14.8 mol/L, not its 14.5",
	"Al2O3":                        "composition; checked with the products",
	"available fluoride":           "composition; checked with the chemicals",
}

// tolerance of a published density: tables that agree with each other agree to
// a tenth of a per cent; laboratory reagent lists print two or three digits, and
// "room" temperature is worth half a per cent.
func tolerance(row map[string]string) float64 {
	if row["temperature_c"] == "room" {
		return 0.006
	}
	if row["quantity"] == "dry alum per gallon" {
		return 0.008 // two decimals of 0.74 to 5.57 lb
	}
	return 0.001
}

func TestPublishedDensities(t *testing.T) {
	checked := map[Density]int{}
	for _, row := range published(t, "densities.csv") {
		name, quantity := row["substance"], row["quantity"]
		if notADensity[name] != "" || notADensity[quantity] != "" || notADensity[name+", "+quantity] != "" {
			continue
		}
		s, ok := substances[name]
		if !ok {
			t.Errorf("%s, %s: neither checked nor listed", name, quantity)
			continue
		}
		c, want := number(t, row["concentration"]), number(t, row["value"])
		strength, kelvin := c/100, referenceKelvin
		switch {
		case row["concentration_unit"] == "mol/kg water":
			strength, kelvin = byMolality(c, s.gramsPerMole), number(t, row["temperature_c"])+273.15
		case strings.HasPrefix(row["concentration_unit"], "trade %"):
			var err error
			if strength, err = s.table.Fraction(c * 10 * cl2ToNaOCl); err != nil {
				t.Fatal(err)
			}
		}
		found, err := s.table.At(strength, kelvin)
		if err != nil {
			t.Errorf("%s %g: %v", name, c, err)
			continue
		}
		if !found.AtTemperature {
			t.Errorf("%s %g: %s C is published and was not used", name, c, row["temperature_c"])
		}
		got := found.KgPerM3 / 1000
		switch quantity {
		case "molarity":
			got = found.KgPerM3 * strength / s.gramsPerMole
		case "dry alum per gallon":
			got = found.KgPerM3 * strength / lbPerGal
		}
		if strings.Contains(row["how"], "unsure") {
			t.Logf("%s %g: %s %.4f, recalled %g (unsure, no gate)", name, c, quantity, got, want)
			continue
		}
		checked[s.table]++
		if apart(got, want, tolerance(row)) {
			t.Errorf("%s %g %s at %s C: %s %.5f, published %g\n%s (%s)",
				name, c, row["concentration_unit"], row["temperature_c"], quantity, got, want, row["source"], row["how"])
		}
	}
	for _, table := range []Density{SodiumHydroxide, SodiumCarbonate, HydrochloricAcid, SulfuricAcid, FerricChloride, LiquidAlum, AquaAmmonia} {
		if checked[table] == 0 {
			t.Errorf("%s: no published row was compared", table)
		}
	}
}

func TestTablesRiseInStrength(t *testing.T) {
	for _, name := range Tables() {
		rows := name.Rows()
		if len(rows) < 2 {
			t.Errorf("%s: %d rows", name, len(rows))
		}
		for i, r := range rows {
			if r.Source == "" || r.KgPerM3 < 800 || r.KgPerM3 > 2000 || r.Strength < 0 || r.Strength > 1 {
				t.Errorf("%s: row %+v", name, r)
			}
			if i > 0 && r.Strength <= rows[i-1].Strength {
				t.Errorf("%s: strength %g after %g", name, r.Strength, rows[i-1].Strength)
			}
			if got, err := name.At(r.Strength, referenceKelvin); err != nil || got.KgPerM3 != r.KgPerM3 {
				t.Errorf("%s at its own row %g: %v, %v, want %g", name, r.Strength, got.KgPerM3, err, r.KgPerM3)
			}
		}
	}
}

// Between two rows the density lies between theirs; the pure substance in a
// litre rises with strength everywhere (which Fraction needs), and Fraction
// undoes it.
func TestDensityBetweenRows(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		name := rapid.SampledFrom(Tables()).Draw(t, "table")
		w := rapid.Float64Range(0, name.Greatest()).Draw(t, "strength")
		found, err := name.At(w, referenceKelvin)
		if err != nil {
			t.Fatal(err)
		}
		rows := name.Rows()
		last := rows[len(rows)-1]
		if found.BeyondTable != (w > last.Strength) {
			t.Fatalf("%s %g: beyond the table %v, last row %g", name, w, found.BeyondTable, last.Strength)
		}
		for i := 1; i < len(rows); i++ {
			a, b := rows[i-1], rows[i]
			if w < a.Strength || w > b.Strength {
				continue
			}
			if found.KgPerM3 < min(a.KgPerM3, b.KgPerM3)-1e-9 || found.KgPerM3 > max(a.KgPerM3, b.KgPerM3)+1e-9 {
				t.Fatalf("%s %g: %g kg/m3 is outside %g and %g", name, w, found.KgPerM3, a.KgPerM3, b.KgPerM3)
			}
		}
		stronger := rapid.Float64Range(w, name.Greatest()).Draw(t, "stronger")
		other, err := name.At(stronger, referenceKelvin)
		if err != nil {
			t.Fatal(err)
		}
		if stronger > w && stronger*other.KgPerM3 <= w*found.KgPerM3 {
			t.Fatalf("%s: %g holds %g kg/m3, %g only %g", name, w, w*found.KgPerM3, stronger, stronger*other.KgPerM3)
		}
		back, err := name.Fraction(w * found.KgPerM3)
		if err != nil || math.Abs(back-w) > 1e-9 {
			t.Fatalf("%s: %g by weight came back as %g, %v", name, w, back, err)
		}
	})
}

func TestDensityFallsWithTemperature(t *testing.T) {
	for _, strength := range []float64{0.08, 0.12, 0.19} {
		last := math.Inf(1)
		for kelvin := 283.15; kelvin <= 298.15; kelvin += 1 {
			found, err := SodiumHydroxide.At(strength, kelvin)
			if err != nil || !found.AtTemperature {
				t.Fatalf("%g at %g K: %+v, %v", strength, kelvin, found, err)
			}
			if found.KgPerM3 >= last {
				t.Errorf("%g at %g K: %g kg/m3, colder was %g", strength, kelvin, found.KgPerM3, last)
			}
			last = found.KgPerM3
		}
	}
}

func TestDensityOfOtherTemperatureIsMarked(t *testing.T) {
	for _, c := range []struct {
		strength, kelvin float64
		want             bool
	}{
		{0.15, 288.15, true},  // published at 10 and 20 C
		{0.15, 293.155, true}, // 20 C itself
		{0.15, 282.0, false},  // colder than any table
		{0.15, 300.0, false},
		{0.05, 297.0, false}, // the 25 C table starts at 7.4 %
		{0.25, 288.15, false},
		{0.50, 313.15, false},
	} {
		found, err := SodiumHydroxide.At(c.strength, c.kelvin)
		if err != nil || found.AtTemperature != c.want {
			t.Errorf("%g at %g K: at temperature %v, %v, want %v", c.strength, c.kelvin, found.AtTemperature, err, c.want)
		}
	}
}

func TestStrengthOutsideTableIsRefused(t *testing.T) {
	for _, strength := range []float64{-0.1, 0.5201, 0.9, 1.2, math.NaN(), math.Inf(1)} {
		var out *OutOfTable
		if _, err := SodiumHydroxide.At(strength, referenceKelvin); !errors.As(err, &out) || out.High != 0.52 {
			t.Errorf("%g: %v", strength, err)
		}
	}
	for _, mass := range []float64{-1, 900, math.NaN()} {
		var out *OutOfTable
		if w, err := SodiumHydroxide.Fraction(mass); !errors.As(err, &out) {
			t.Errorf("%g kg/m3 gave strength %g, %v", mass, w, err)
		}
	}
	var out *OutOfTable
	if _, err := Density("treacle").At(0.1, referenceKelvin); !errors.As(err, &out) || out.High != 0 {
		t.Errorf("unknown table: %v", err)
	}
}

// The strongest product by volume is one that Compute then takes, rounding or not.
func TestFractionAtTheLimit(t *testing.T) {
	for _, name := range Tables() {
		w, err := name.Fraction(name.GreatestMass() * (1 + 1e-10))
		if err != nil {
			t.Errorf("%s: %v", name, err)
			continue
		}
		if _, err := name.At(w, referenceKelvin); err != nil {
			t.Errorf("%s: %v", name, err)
		}
	}
}
