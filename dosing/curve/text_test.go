package curve_test

import (
	"bytes"
	"encoding/csv"
	"math"
	"slices"
	"strconv"
	"strings"
	"testing"
	"unicode/utf8"

	"beckline/dosing"
	"beckline/dosing/curve"
)

func seasons(t *testing.T) curve.Series {
	t.Helper()
	s, err := curve.OverTemperature(upland(), curve.Span(273.15, 297.15, 13), curve.HoldWater)
	if err != nil {
		t.Fatal(err)
	}
	return s
}

// TestText: one line a point, the figures of the answer rounded, at most 78
// columns.
func TestText(t *testing.T) {
	s := seasons(t)
	text := s.Text(nil)
	lines := strings.Split(strings.TrimRight(text, "\n"), "\n")
	if len(lines) != 4+1+13+3 {
		t.Fatalf("%d lines:\n%s", len(lines), text)
	}
	for _, l := range lines {
		if utf8.RuneCountInString(l) > 78 {
			t.Errorf("%d columns: %s", utf8.RuneCountInString(l), l)
		}
	}
	var row string
	for _, l := range lines {
		if strings.HasPrefix(l, "8.0 ") {
			row = strings.Join(strings.Fields(l), " ")
			break
		}
	}
	p := s.Points[4]
	fin, feed := p.Result.Finished().Figures, p.Dose().Feed
	want := strings.Join([]string{"8.0", fixed(p.Y.Value*39997, 2), fixed(feed.ProductMass*1000, 2), fixed(feed.VolumePerSecond*3.6e6, 2),
		fixed(fin.PH, 2), fixed(fin.Alkalinity*50043.5, 1), fixed(fin.SaturationIndex.Value, 2), fixed(fin.CCPP.Value*100087, 1)}, " ")
	if row != want {
		t.Errorf("row %q, want %q", row, want)
	}
}

func fixed(v float64, decimals int) string { return strconv.FormatFloat(v, 'f', decimals, 64) }

func TestTextOfProblems(t *testing.T) {
	c := upland()
	high := c.Readings
	high.PH, high.Alkalinity = dosing.Some(9.5), dosing.Some(200/50043.5)
	s, err := curve.OverWaters(c, []curve.Water{{"January", c.Readings}, {"a name that is far too long", high}})
	if err != nil {
		t.Fatal(err)
	}
	text := s.Text(func(p *dosing.Problem) string { return "said of " + p.Code })
	if !strings.Contains(text, "a name that ..  said of wrong_side") || !strings.Contains(text, "January") {
		t.Error(text)
	}
	long, err := curve.OverTemperature(c, curve.Span(273.15, 297.15, 241), curve.HoldWater)
	if err != nil {
		t.Fatal(err)
	}
	if n := strings.Count(long.Text(nil), "\n"); n != 4+1+40+3 {
		t.Errorf("a long series has %d lines", n)
	}
	if text := long.Text(nil); !strings.Contains(text, "\n0.0 ") || !strings.Contains(text, "\n24.0 ") {
		t.Error("the ends are missing")
	}
}

// TestCSV: one row a point in full precision; what cannot be had is empty.
func TestCSV(t *testing.T) {
	s := seasons(t)
	c := upland()
	bad := c.Readings
	bad.PH, bad.Alkalinity = dosing.Some(9.5), dosing.Some(200/50043.5)
	nocalcium := c.Readings
	nocalcium.Calcium, nocalcium.Flow = dosing.None, dosing.None
	table, err := curve.OverWaters(c, []curve.Water{{"well", bad}, {"stream", nocalcium}})
	if err != nil {
		t.Fatal(err)
	}
	var b bytes.Buffer
	if err := curve.WriteCSV(&b, s, table); err != nil {
		t.Fatal(err)
	}
	rows, err := csv.NewReader(&b).ReadAll()
	if err != nil {
		t.Fatal(err)
	}
	if len(rows) != 1+13+2 || !slices.Equal(rows[0], curve.Header()) {
		t.Fatalf("%d rows", len(rows))
	}
	cell := func(row int, key string) string { return rows[row][slices.Index(rows[0], key)] }
	dose, err := strconv.ParseFloat(cell(5, "dose_mg_l"), 64)
	if err != nil || math.Abs(dose/(s.Points[4].Y.Value*39997)-1) > 1e-12 || cell(5, "temperature_c") != "8" {
		t.Errorf("dose %s at %s", cell(5, "dose_mg_l"), cell(5, "temperature_c"))
	}
	if cell(5, "product") != "caustic-25" || cell(5, "basis") != "NaOH" || cell(5, "problem") != "" || cell(5, "pump_percent") == "" {
		t.Error(rows[5])
	}
	if cell(14, "water") != "well" || cell(14, "problem") != "wrong_side" || cell(14, "dose_mg_l") != "" {
		t.Error(rows[14])
	}
	if cell(15, "finished_saturation_index") != "" || cell(15, "feed_l_h") != "" || cell(15, "dose_mg_l") == "" ||
		!strings.Contains(cell(15, "warnings"), "calcium_needed") {
		t.Error(rows[15])
	}
}
