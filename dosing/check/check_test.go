package check

import (
	"encoding/csv"
	"math"
	"os"
	"path/filepath"
	"strings"
	"testing"
)

// Every published value that ships in the binary agrees; the sources stand in
// the CSV files beside the values.
func TestPublishedValuesAgree(t *testing.T) {
	all, err := Run()
	if err != nil {
		t.Fatal(err)
	}
	seen := map[string]int{}
	for _, o := range all {
		seen[o.Group]++
		if !o.Agrees() {
			t.Errorf("%s: %s: %.5g, published %.5g, difference %.2g over %.2g (%v; %s)",
				o.Group, o.Name, o.Value, o.Published, o.Difference(), o.Tolerance, o.Err, o.Source)
		}
	}
	for _, name := range Groups() {
		if seen[name] == 0 {
			t.Errorf("no comparison in group %s", name)
		}
	}
}

func TestEveryValueHasSourceAndTolerance(t *testing.T) {
	all, err := Run()
	if err != nil {
		t.Fatal(err)
	}
	for _, o := range all {
		if o.Source == "" || o.How == "" || o.Name == "" || o.Unit == "" {
			t.Errorf("%s %q: source, how, name or unit is empty", o.Group, o.Name)
		}
		if strings.Contains(o.How, "unsure") {
			t.Errorf("%s %q: an unsure value is used as a gate", o.Group, o.Name)
		}
		if !(o.Tolerance >= 0) || math.IsInf(o.Tolerance, 0) {
			t.Errorf("%s %q: tolerance %v", o.Group, o.Name, o.Tolerance)
		}
	}
}

func TestDisagreementIsSeen(t *testing.T) {
	o := Outcome{Value: 10.031, Published: 10.012, Tolerance: 0.015}
	if o.Agrees() {
		t.Errorf("a difference of %.3f counts as agreeing within %.3f", o.Difference(), o.Tolerance)
	}
	if o.Value = math.NaN(); o.Agrees() {
		t.Error("NaN counts as agreeing")
	}
}

// The values inside the binary are those of the project's own tables of
// published values; only the choice of rows and the tolerances are its own.
func TestValuesAreThoseOfTheTables(t *testing.T) {
	for name, key := range map[string][]string{
		"buffers":   {"composition", "temperature_c", "ph", "how"},
		"constants": {"quantity", "temperature_c", "value", "source", "how"},
	} {
		table := map[string]bool{}
		f, err := os.Open(filepath.Join("..", "..", "testdata", name+".csv"))
		if err != nil {
			t.Fatal(err)
		}
		lines, err := csv.NewReader(f).ReadAll()
		f.Close()
		if err != nil {
			t.Fatal(err)
		}
		for _, line := range lines[1:] {
			r := record{}
			for i, column := range lines[0] {
				r[strings.TrimSuffix(column, "_molality")] = line[i]
			}
			table[joined(r, key)] = true
		}
		rows, err := read(name)
		if err != nil {
			t.Fatal(err)
		}
		for _, r := range rows {
			if !table[joined(r, key)] {
				t.Errorf("%s: %s is not in the table", name, joined(r, key))
			}
		}
	}
}

func joined(r record, columns []string) string {
	var parts []string
	for _, c := range columns {
		parts = append(parts, r[c])
	}
	return strings.Join(parts, " | ")
}
