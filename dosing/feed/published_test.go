package feed

import (
	"encoding/csv"
	"os"
	"path/filepath"
	"strconv"
	"testing"
)

// published reads one file of check values as maps by column name.
func published(t *testing.T, file string) []map[string]string {
	t.Helper()
	f, err := os.Open(filepath.Join("..", "..", "testdata", file))
	if err != nil {
		t.Fatal(err)
	}
	defer f.Close()
	lines, err := csv.NewReader(f).ReadAll()
	if err != nil {
		t.Fatal(err)
	}
	var rows []map[string]string
	for _, cells := range lines[1:] {
		row := map[string]string{}
		for i, name := range lines[0] {
			row[name] = cells[i]
		}
		rows = append(rows, row)
	}
	return rows
}

// number reads a cell that must hold one.
func number(t *testing.T, text string) float64 {
	t.Helper()
	v, err := strconv.ParseFloat(text, 64)
	if err != nil {
		t.Fatalf("%q: %v", text, err)
	}
	return v
}

// apart tells whether two numbers differ by more than a relative tolerance.
func apart(got, want, relative float64) bool {
	d := got - want
	if d < 0 {
		d = -d
	}
	if want < 0 {
		want = -want
	}
	return !(d <= relative*want+1e-12)
}
