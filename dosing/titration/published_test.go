package titration_test

import (
	"encoding/csv"
	"math"
	"os"
	"strconv"
	"testing"

	"beckline/dosing/titration"
)

// TestPublished works the standards' own figures (sources in the file). Their
// factor 50 000 is rounded, and 1 mL of EDTA means CaCO3 of molar mass 100: 0.1 %.
func TestPublished(t *testing.T) {
	alkalinity := func(sample, normality, mL float64) float64 {
		eq, _, err := titration.Burette{SampleML: sample, Normality: normality, Titre: titration.Used(mL)}.Alkalinity()
		if err != nil {
			t.Fatal(err)
		}
		return titration.AsCaCO3(eq)
	}
	edta := func(molarity float64) float64 {
		m, _, err := titration.EDTA{SampleML: 1000, Molarity: molarity, Titre: titration.Used(1)}.Hardness()
		if err != nil {
			t.Fatal(err)
		}
		return m
	}
	got := map[string]float64{
		"0.02 N acid":     alkalinity(1000, 0.02, 1),
		"0.1 N acid":      alkalinity(1000, 0.1, 1),
		"usual titration": alkalinity(100, 0.02, 10),
		"two end points":  twoEnds(t, 1.30, 1.37, 4.5, 4.2),
		"EDTA 0.01 M":     2 * titration.AsCaCO3(edta(0.01)),
		"EDTA calcium":    edta(0.01) * 40.078e3,
	}
	rows := read(t, "testdata/published.csv")
	if len(rows) != len(got) {
		t.Fatalf("%d rows, %d results", len(rows), len(got))
	}
	for _, row := range rows {
		want, err := strconv.ParseFloat(row["value"], 64)
		if err != nil || row["source"] == "" {
			t.Fatalf("row %v", row)
		}
		v, ok := got[row["case"]]
		if !ok || math.Abs(v-want) > 1e-3*want {
			t.Errorf("%s: %.5g, published %g (%s)", row["case"], v, want, row["source"])
		}
	}
}

func twoEnds(t *testing.T, b, c, firstPH, secondPH float64) float64 {
	t.Helper()
	eq, _, err := titration.LowAlkalinity{SampleML: 100, Normality: 0.02,
		First: titration.Used(b), Second: titration.Used(c), FirstPH: firstPH, SecondPH: secondPH}.Solve()
	if err != nil {
		t.Fatal(err)
	}
	return titration.AsCaCO3(eq)
}

func read(t *testing.T, path string) []map[string]string {
	t.Helper()
	f, err := os.Open(path)
	if err != nil {
		t.Fatal(err)
	}
	defer f.Close()
	all, err := csv.NewReader(f).ReadAll()
	if err != nil {
		t.Fatal(err)
	}
	var rows []map[string]string
	for _, r := range all[1:] {
		row := map[string]string{}
		for i, h := range all[0] {
			row[h] = r[i]
		}
		rows = append(rows, row)
	}
	return rows
}
