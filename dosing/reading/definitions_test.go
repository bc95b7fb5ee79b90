package reading

import (
	"encoding/csv"
	"math"
	"os"
	"strconv"
	"testing"
)

// The units against the definitions and published factors in the table, each
// with its source.
func TestUnitsAgreeWithPublishedFactors(t *testing.T) {
	file, err := os.Open("../../testdata/units_definitions.csv")
	if err != nil {
		t.Fatal(err)
	}
	defer file.Close()
	rows, err := csv.NewReader(file).ReadAll()
	if err != nil {
		t.Fatal(err)
	}
	if len(rows) < 40 {
		t.Fatalf("only %d rows", len(rows))
	}
	for _, row := range rows[1:] {
		name, given, source := row[0], row[1], row[4]
		want, err1 := strconv.ParseFloat(row[2], 64)
		tolerance, err2 := strconv.ParseFloat(row[3], 64)
		field, ok := Lookup(name)
		if err1 != nil || err2 != nil || !ok || source == "" {
			t.Errorf("row %v cannot be used", row)
			continue
		}
		v, err := field.Parse(given)
		if err != nil {
			t.Errorf("%s %q: %v", name, given, err)
			continue
		}
		if math.Abs(v.SI-want) > tolerance*math.Abs(want) {
			t.Errorf("%s %q = %.8g, published %.8g (%s)", name, given, v.SI, want, source)
		}
	}
}

// The factors of the trade that operators know by heart, from an operator
// mathematics sheet (rounded as there): 1 MGD = 3.785 ML/d = 43.81 L/s =
// 157.7 m3/h = 694.4 gpm.
func TestOneMillionGallonsADay(t *testing.T) {
	flow, _ := Lookup("flow")
	v, err := flow.Parse("1 MGD")
	if err != nil {
		t.Fatal(err)
	}
	for unit, want := range map[string]float64{"ML/d": 3.785, "L/s": 43.81, "m³/h": 157.7, "gpm (US)": 694.4} {
		if got, ok := flow.In(unit, v.SI); !ok || math.Abs(got-want) > 0.0005*want {
			t.Errorf("1 MGD = %v %s, want %v", got, unit, want)
		}
	}
}
