package main

import (
	"bytes"
	"encoding/csv"
	"encoding/json"
	"fmt"
	"math/rand/v2"
	"strings"
	"testing"

	"beckline/dosing/reading"
)

// Rows and dose give the same figures on the same readings, to the last digit,
// and the same problem where there is one.
func TestRowsAgreeWithDose(t *testing.T) {
	random := rand.New(rand.NewPCG(7, 11))
	between := func(low, high float64, decimals int) string {
		return fmt.Sprintf("%.*f", decimals, low+random.Float64()*(high-low))
	}
	products := []string{"caustic-25", "lime", "soda-ash", "sulfuric-93", "carbon-dioxide", "bicarbonate", "alum-liquid"}
	header := []string{"ph", "alkalinity_mg_l_caco3", "temperature_c", "flow_m3_h", "calcium_mg_l", "magnesium_mg_l",
		"sulfate_mg_l", "chloride_mg_l", "sodium_mg_l", "conductivity_us_cm", "target_ph", "pump_l_h", "product"}
	lines := [][]string{header}
	for range 150 {
		line := []string{between(4.5, 10.8, 2), between(1, 400, 1), between(0, 45, 1), between(1, 900, 0), between(0, 200, 1),
			between(0, 60, 1), between(0, 250, 0), between(0, 250, 0), between(0, 100, 1), between(20, 1500, 0),
			between(5.5, 10, 2), between(5, 200, 0), products[random.IntN(len(products))]}
		for i := 3; i < 10; i++ { // the optional ones may not have been measured
			if random.IntN(4) == 0 {
				line[i] = ""
			}
		}
		lines = append(lines, line)
	}
	var file bytes.Buffer
	w := csv.NewWriter(&file)
	if err := w.WriteAll(lines); err != nil {
		t.Fatal(err)
	}
	var answers, notes bytes.Buffer
	if code := run([]string{"rows"}, &file, &answers, &notes); code != exitFine {
		t.Fatalf("rows: exit code %d: %s", code, &notes)
	}
	rows, err := csv.NewReader(&answers).ReadAll()
	if err != nil {
		t.Fatal(err)
	}
	if len(rows) != len(lines) {
		t.Fatalf("%d rows came out of %d", len(rows), len(lines))
	}
	answered := 0
	for i, row := range rows[1:] {
		if compareRow(t, rows[0], row, lines[i+1]) {
			answered++
		}
	}
	if answered < 40 {
		t.Errorf("only %d of %d rows have an answer: the comparison says little", answered, len(lines)-1)
	}
}

// compareRow runs dose on one row's readings and compares. It tells whether
// there was an answer.
func compareRow(t *testing.T, header, row, readings []string) bool {
	t.Helper()
	args := []string{"dose", "--json"}
	for i, value := range readings {
		name := "product"
		if f, ok := reading.LookupKey(header[i]); ok {
			name = f.Name
		}
		if value != "" {
			args = append(args, "--"+name, value)
		}
	}
	var out, errs bytes.Buffer
	code := run(args, strings.NewReader(""), &out, &errs)
	cell := map[string]string{}
	for i, name := range header {
		cell[name] = row[i]
	}
	if code != exitFine {
		message := strings.TrimSuffix(strings.TrimPrefix(problemLine(t, args), "beckline: "), "\n")
		if !strings.HasSuffix(cell["problem"], message) {
			t.Errorf("%v:\n rows: %s\n dose: %s", readings, cell["problem"], message)
		}
		return false
	}
	if cell["problem"] != "" {
		t.Errorf("%v: rows: %s, dose answers", readings, cell["problem"])
		return false
	}
	var answer struct {
		Raw, Dose, Finished map[string]json.RawMessage
	}
	if err := json.Unmarshal(out.Bytes(), &answer); err != nil {
		t.Fatal(err)
	}
	compared := 0
	for prefix, object := range map[string]map[string]json.RawMessage{"raw_": answer.Raw, "": answer.Dose, "finished_": answer.Finished} {
		for key, value := range object {
			got, there := cell[prefix+key]
			if !there {
				continue // a reading, which is not repeated
			}
			want := strings.Trim(string(value), `"`)
			if want == "null" {
				want = ""
			}
			if got != want {
				t.Errorf("%v: %s%s: rows %q, dose %q", readings, prefix, key, got, want)
			}
			compared++
		}
	}
	if compared < 35 {
		t.Errorf("only %d figures were compared", compared)
	}
	return true
}

// problemLine is what dose says without --json.
func problemLine(t *testing.T, args []string) string {
	t.Helper()
	var out, errs bytes.Buffer
	var plain []string
	for _, a := range args {
		if a != "--json" {
			plain = append(plain, a)
		}
	}
	run(plain, strings.NewReader(""), &out, &errs)
	return errs.String()
}
