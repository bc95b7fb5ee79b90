package carbonate_test

import (
	"encoding/csv"
	"math"
	"os"
	"strconv"
	"strings"
	"testing"

	"beckline/carbonate"
)

// rows reads a file of published values; each row is a map by column name. The
// columns "source" and "how" say where a value was published and whether it was
// read on a page or recalled.
func rows(t *testing.T, name string) []map[string]string {
	t.Helper()
	f, err := os.Open("../testdata/" + name)
	if err != nil {
		t.Fatal(err)
	}
	defer f.Close()
	all, err := csv.NewReader(f).ReadAll()
	if err != nil {
		t.Fatal(err)
	}
	var out []map[string]string
	for _, record := range all[1:] {
		row := map[string]string{}
		for i, column := range all[0] {
			row[column] = record[i]
		}
		out = append(out, row)
	}
	return out
}

func number(t *testing.T, s string) float64 {
	t.Helper()
	v, err := strconv.ParseFloat(s, 64)
	if err != nil {
		t.Fatal(err)
	}
	return v
}

// unsure rows are shown and never gate.
func unsure(row map[string]string) bool { return strings.Contains(row["how"], "unsure") }

func constantsAt(t *testing.T, celsius float64) *carbonate.Constants {
	t.Helper()
	k, err := carbonate.ConstantsAt(celsius + 273.15)
	if err != nil {
		t.Fatal(err)
	}
	return k
}

func pk(x float64) float64 { return -math.Log10(x) }

// otherSets are published values that stand beside the set used here and differ
// from it by more than its own error, with the difference that is known. One
// set is used whole (Plummer & Busenberg 1982); these are its neighbours.
var otherSets = map[string]float64{
	"Christ, Hostetler & Siebert 1974": 0.12,  // +-0.04 by their own word; log K(CaHCO3+) 1.225 beside 1.11 +-0.07
	"Read 1975":                        0.015, // from conductance, not cells
	"literature values collected in a biomedical paper": 0.03, // temperature not printed
}

// TestConstantsAgainstTables compares every constant with the published tables.
// Tolerances: 0.006 for the carbonate system and water (the spread between the
// electrochemical tables of the Harned school and the equations of Plummer &
// Busenberg), 0.015 for water above 45 C, 0.02 for the minor acids, whose
// tables are rounded to 0.01, and 0.03 where a table gives another's constant.
func TestConstantsAgainstTables(t *testing.T) {
	quantities := map[string]struct {
		of        func(k *carbonate.Constants) float64
		tolerance float64
	}{
		"pKsp calcite":               {func(k *carbonate.Constants) float64 { return pk(k.Calcite) }, 0.002},
		"pKsp aragonite":             {func(k *carbonate.Constants) float64 { return pk(k.Aragonite) }, 0.002},
		"log K CaHCO3+ association":  {func(k *carbonate.Constants) float64 { return -pk(k.CaHCO3) }, 0.01},
		"log K CaCO3 aq association": {func(k *carbonate.Constants) float64 { return -pk(k.CaCO3) }, 0.01},
		"pKH CO2 (mol/kg/atm)":       {func(k *carbonate.Constants) float64 { return pk(k.Henry) }, 0.002},
		"pK1 carbonic":               {func(k *carbonate.Constants) float64 { return pk(k.Carbonic1) }, 0.006},
		"pK2 carbonic":               {func(k *carbonate.Constants) float64 { return pk(k.Carbonic2) }, 0.006},
		"pKw":                        {func(k *carbonate.Constants) float64 { return pk(k.Water) }, 0.015},
		"pK HOCl":                    {func(k *carbonate.Constants) float64 { return pk(k.HOCl) }, 0.02},
		"pKa NH4+":                   {func(k *carbonate.Constants) float64 { return pk(k.Ammonium) }, 0.005},
		"pK1 phosphoric":             {func(k *carbonate.Constants) float64 { return pk(k.Phosphoric[0]) }, 0.01},
		"pK2 phosphoric":             {func(k *carbonate.Constants) float64 { return pk(k.Phosphoric[1]) }, 0.01},
		"pK3 phosphoric":             {func(k *carbonate.Constants) float64 { return pk(k.Phosphoric[2]) }, 0.05},
		"pKa boric":                  {func(k *carbonate.Constants) float64 { return pk(k.Boric) }, 0.01},
		"pK2 sulfuric (HSO4-)":       {func(k *carbonate.Constants) float64 { return -pk(k.HSO4) }, 0.01},
		"pKa1 silicic":               {func(k *carbonate.Constants) float64 { return pk(k.Silicic) }, 0.03},
		"pK HF":                      {func(k *carbonate.Constants) float64 { return pk(k.Fluoric) }, 0.03},
		"pKa acetic":                 {func(k *carbonate.Constants) float64 { return pk(k.Acetic) }, 0.005},
	}
	compared := map[string]int{}
	for _, row := range rows(t, "constants.csv") {
		q, ok := quantities[row["quantity"]]
		celsius := number(t, row["temperature_c"])
		if !ok || celsius > 50 {
			continue // vaterite, and temperatures beyond the range
		}
		got, want := q.of(constantsAt(t, celsius)), number(t, row["value"])
		tolerance := q.tolerance
		for source, other := range otherSets {
			if strings.HasPrefix(row["source"], source) {
				tolerance = other
			}
		}
		if d := math.Abs(got - want); d > tolerance && !unsure(row) {
			t.Errorf("%s at %g C: %.4f, published %.4f (%s)", row["quantity"], celsius, got, want, row["source"])
		}
		compared[row["quantity"]]++
	}
	for name := range quantities {
		if compared[name] == 0 {
			t.Errorf("no published value was compared for %s", name)
		}
	}
}

// TestStandardBuffers takes the standard buffers through the whole model:
// carbonate within 0.015 pH, phosphate and borax within 0.03, at 0-50 C.
func TestStandardBuffers(t *testing.T) {
	type recipe struct {
		tolerance float64
		water     func() carbonate.Water
	}
	phosphate := func(acid, base float64) func() carbonate.Water {
		return func() (w carbonate.Water) {
			// KH2PO4 and Na2HPO4 (one equivalent more than H2PO4).
			w.Totals[carbonate.Phosphate] = acid + base
			w.Totals[carbonate.Potassium] = acid
			w.Totals[carbonate.Sodium] = 2 * base
			w.Alkalinity = base
			return w
		}
	}
	recipes := map[string]recipe{
		"0.025 mol/kg NaHCO3 + 0.025 mol/kg Na2CO3": {0.015, func() (w carbonate.Water) {
			w.Totals[carbonate.Carbon] = 0.05
			w.Totals[carbonate.Sodium] = 0.075
			w.Alkalinity = 0.075
			return w
		}},
		"0.025 mol/kg KH2PO4 + 0.025 mol/kg Na2HPO4":      {0.03, phosphate(0.025, 0.025)},
		"0.008695 mol/kg KH2PO4 + 0.03043 mol/kg Na2HPO4": {0.03, phosphate(0.008695, 0.03043)},
		"0.01 mol/kg Na2B4O7.10H2O": {0.03, func() (w carbonate.Water) {
			// Borax is half boric acid, half borate.
			w.Totals[carbonate.Boron] = 0.04
			w.Totals[carbonate.Sodium] = 0.02
			w.Alkalinity = 0.02
			return w
		}},
	}
	compared, worst := map[string]int{}, map[string]float64{}
	for _, row := range rows(t, "buffers.csv") {
		name := strings.ReplaceAll(row["composition_molality"], "mol/L", "mol/kg")
		r, ok := recipes[name]
		if !ok {
			t.Errorf("no recipe for %q", name)
			continue
		}
		celsius, want := number(t, row["temperature_c"]), number(t, row["ph"])
		w := r.water()
		w.Kelvin = celsius + 273.15
		s, err := carbonate.Solve(w)
		if err != nil {
			t.Fatal(err)
		}
		tolerance := r.tolerance
		if strings.Contains(row["composition_molality"], "mol/L") {
			tolerance += 0.005 // printed there to two decimals, per litre
		}
		d := math.Abs(s.PH - want)
		if d > tolerance && !unsure(row) {
			t.Errorf("%s at %g C: pH %.4f, published %.3f (%s)", name, celsius, s.PH, want, row["source"])
		}
		compared[name]++
		worst[name] = max(worst[name], d)
	}
	for name := range recipes {
		if compared[name] < 9 {
			t.Errorf("%s was compared at %d temperatures only", name, compared[name])
		}
		t.Logf("%s: worst %.4f pH of %d values", name, worst[name], compared[name])
	}
}
