package report

import (
	"math"
	"strconv"
	"testing"

	"pgregory.net/rapid"
)

func TestFull(t *testing.T) {
	for v, want := range map[float64]string{
		30:                     "30",
		29.999999999999996:     "30",
		0.1 + 0.2:              "0.3",
		-17.8:                  "-17.8",
		0:                      "0",
		math.Copysign(0, -1):   "0",
		1.0 / 3:                "0.333333333333333",
		1234567890123456:       "1.23456789012346e+15",
		1.5e-7:                 "1.5e-07",
		0.00317228401234567891: "0.00317228401234568",
	} {
		if got := Full(v); got != want {
			t.Errorf("%v is written %s, want %s", v, got, want)
		}
	}
}

// Full loses no more than the 15th digit and reads back.
func TestFullReadsBack(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		v := rapid.Float64().Draw(t, "v")
		back, err := strconv.ParseFloat(Full(v), 64)
		if err != nil || math.Abs(back-v) > 1e-14*math.Abs(v) {
			t.Fatalf("%v is written %s", v, Full(v))
		}
	})
}

func TestSignificant(t *testing.T) {
	for _, c := range []struct {
		v      float64
		digits int
		want   string
	}{
		{9.999, 3, "10.0"}, {0.0123456, 3, "0.0123"}, {12345, 3, "12345"}, {-2.345, 2, "-2.3"}, {0, 3, "0"},
		{99.95, 3, "100"}, {1, 3, "1.00"}, {math.NaN(), 3, "0"}, {1e-20, 3, "0.000000000000"},
	} {
		if got := Significant(c.v, c.digits); got != c.want {
			t.Errorf("%v with %d digits is %s, want %s", c.v, c.digits, got, c.want)
		}
	}
}

func TestShownFigures(t *testing.T) {
	for _, c := range []struct {
		r    rounding
		v    float64
		want string
	}{
		{asPH, 8.4, "8.40"}, {asIndex, -0.004, "0.00"}, {asIndex, 0.37, "+0.37"}, {asIndex, -1.957, "-1.96"},
		{asMass, 285.3, "285"}, {asMass, 12.43, "12.4"}, {asMass, 0.04, "0.0"}, {asDose, 6.7903, "6.79"},
		{asDose, 0.0123, "0.012"}, {asDose, 0.00004, "0.00004"}, {asDose, 0, "0"}, {asFeed, 2.44e-8, "0.00000002"},
		{asPercent, 0.021, "0.02"}, {asPercent, 9.44, "9.4"}, {asStrength, 0.0031722, "0.00317"}, {asCCPP, 0.04, "0.0"},
	} {
		if got := c.r.write(c.v); got != c.want {
			t.Errorf("%v is shown %s, want %s", c.v, got, c.want)
		}
	}
}

func TestNoFigureIsNeitherZeroNorWords(t *testing.T) {
	f := Figure{Unit: "mg/L"}
	if f.Full() != "" || f.Show() != "-" || f.ShowUnit() != "-" {
		t.Errorf("a figure that is not given reads %q, %q, %q", f.Full(), f.Show(), f.ShowUnit())
	}
	if n := Some(math.Inf(1)); n.Given {
		t.Error("infinity counts as given")
	}
	text, err := Number{}.MarshalJSON()
	if err != nil || string(text) != "null" {
		t.Errorf("JSON is %s, %v", text, err)
	}
}
