package reading

import (
	"fmt"
	"math"
	"strconv"
	"testing"

	"pgregory.net/rapid"
)

func sprint(x float64) string { return strconv.FormatFloat(x, 'g', -1, 64) }

func TestShowRoundsToWhatTheReadingSupports(t *testing.T) {
	for _, c := range []struct {
		field string
		bare  float64
		want  string
	}{
		{"ph", 8.4, "8.40"}, {"ph", 10.254, "10.25"}, {"alkalinity", 24, "24.0"}, {"alkalinity", 1234.6, "1235"},
		{"temperature", 8, "8.0"}, {"flow", 240, "240"}, {"flow", 157.7255, "157.7"}, {"flow", 0.00123456, "0.001235"},
		{"calcium", 7.2, "7.20"}, {"calcium", 123.4, "123"}, {"fluoride", 0.7, "0.700"}, {"phosphate", 0.03, "0.030"}, {"silica", 9.996, "10.0"}, {"sodium", 0, "0.00"},
		{"conductivity", 78, "78"}, {"target-si", -0.0001, "0.00"}, {"target-si", -0.25, "-0.25"}, {"strength", 25, "25"},
		{"strength", 48.5, "48.5"}, {"pump", 15, "15"},
	} {
		f := field(t, c.field)
		if got := f.Show(f.FromBare(c.bare)); got != c.want {
			t.Errorf("%s %v is shown as %q, want %q", c.field, c.bare, got, c.want)
		}
	}
}

func TestShowInAnotherUnit(t *testing.T) {
	for _, c := range []struct {
		field string
		bare  float64
		unit  string
		want  string
	}{
		{"flow", 157.7255, "MGD", "1"}, {"flow", 240, "L/s", "66.667"}, {"temperature", 5, "°F", "41.0"},
		{"alkalinity", 50.0435, "meq/L", "1.000"}, {"alkalinity", 24, "mg/L as CaCO3", "24.0"}, {"pump", 15, "mL/min", "250"},
	} {
		f := field(t, c.field)
		if got, ok := f.ShowIn(c.unit, f.FromBare(c.bare)); !ok || got != c.want {
			t.Errorf("%s %v is shown as %q %s, want %q", c.field, c.bare, got, c.unit, c.want)
		}
	}
	if _, ok := field(t, "flow").ShowIn("mg/L", 1); ok {
		t.Error("a flow was shown in mg/L")
	}
	if _, ok := field(t, "flow").In("mg/L", 1); ok {
		t.Error("a flow was converted to mg/L")
	}
	if _, ok := field(t, "flow").From("mg/L", 1); ok {
		t.Error("mg/L was converted to a flow")
	}
}

// anyField draws a field and a value in its bare unit that it accepts.
func anyField(r *rapid.T) (Field, float64) {
	f := table[rapid.IntRange(0, len(table)-1).Draw(r, "field")]
	low, high := f.limits.low, f.limits.high
	if f.limits.lowOpen {
		// From a thousandth of what is usual up, evenly in the logarithm.
		low = math.Max(f.limits.usualLow/1000, high*1e-9)
		return f, math.Exp(rapid.Float64Range(math.Log(low), math.Log(high)).Draw(r, "log"))
	}
	bare := rapid.Float64Range(low, high).Draw(r, "bare")
	if math.Abs(bare) < 1e-12 {
		bare = 0
	}
	return f, bare
}

func TestParseUndoesShow(t *testing.T) {
	rapid.Check(t, func(r *rapid.T) {
		f, bare := anyField(r)
		shown := f.Show(f.FromBare(bare))
		v, err := f.Parse(shown)
		if err != nil {
			r.Fatalf("%s shows %v as %q, which is refused: %v", f.Name, bare, shown, err)
		}
		if again := f.Show(v.SI); again != shown {
			r.Fatalf("%s: %q is shown as %q", f.Name, shown, again)
		}
		if off := math.Abs(f.ToBare(v.SI) - bare); off > 0.51*lastPlace(shown, f) {
			r.Fatalf("%s: %v shown as %q is off by %v", f.Name, bare, shown, off)
		}
	})
}

// lastPlace is the size of one in the last shown digit; a trimmed text may have
// had more zeros.
func lastPlace(shown string, f Field) float64 {
	decimals := 0
	for i := range shown {
		if shown[i] == '.' {
			decimals = len(shown) - i - 1
		}
	}
	return math.Pow10(-decimals)
}

func TestUnitsSwitchWithoutLoss(t *testing.T) {
	rapid.Check(t, func(r *rapid.T) {
		f, bare := anyField(r)
		shown := f.Show(f.FromBare(bare))
		v, err := f.Parse(shown)
		if err != nil {
			r.Fatalf("%q: %v", shown, err)
		}
		unit := rapid.SampledFrom(f.Units()).Draw(r, "unit")
		other, ok := f.ShowIn(unit, v.SI)
		if !ok {
			r.Fatalf("%s cannot be shown in %s", f.Name, unit)
		}
		back, err := f.Parse(other + " " + unit)
		if err != nil {
			r.Fatalf("%s %s %s: %v", f.Name, other, unit, err)
		}
		if f.Show(back.SI) != shown {
			r.Fatalf("%s: %s became %s %s became %s", f.Name, shown, other, unit, f.Show(back.SI))
		}
	})
}

func TestConversionsInvert(t *testing.T) {
	rapid.Check(t, func(r *rapid.T) {
		f, bare := anyField(r)
		si := f.FromBare(bare)
		unit := rapid.SampledFrom(f.Units()).Draw(r, "unit")
		x, ok := f.In(unit, si)
		if !ok {
			r.Fatalf("%s does not convert to %s", f.Name, unit)
		}
		back, ok := f.From(unit, x)
		if !ok || math.Abs(back-si) > 1e-12*math.Max(math.Abs(si), 1e-12) {
			r.Fatalf("%s: %v SI is %v %s is %v SI", f.Name, si, x, unit, back)
		}
		v, err := f.Parse(sprint(x) + " " + unit)
		if err != nil || math.Abs(v.SI-si) > 1e-12*math.Max(math.Abs(si), 1e-12) {
			r.Fatalf("%s %v %s was read as %v, %v, want %v", f.Name, x, unit, v.SI, err, si)
		}
		if v.Unit != unit {
			r.Fatalf("%s %v %s was read in %s", f.Name, x, unit, v.Unit)
		}
	})
}

func TestNudgeStaysOnTheGridAndWithinLimits(t *testing.T) {
	rapid.Check(t, func(r *rapid.T) {
		f, bare := anyField(r)
		steps := rapid.IntRange(-20, 20).Draw(r, "steps")
		si := f.Nudge(f.FromBare(bare), steps)
		low, high, open := f.Range()
		if si < low || si > high || open && si == low {
			r.Fatalf("%s: %v nudged by %d is %v", f.Name, bare, steps, f.ToBare(si))
		}
		if got, err := f.Parse(sprint(f.ToBare(si))); err != nil || got.SI != si && math.Abs(got.SI-si) > 1e-12*math.Abs(si) {
			r.Fatalf("%s: a nudge made %v, read as %v, %v", f.Name, f.ToBare(si), got.SI, err)
		}
	})
	for _, c := range []struct {
		field string
		bare  float64
		steps int
		want  string
	}{
		{"ph", 6.28, 1, "6.35"}, {"ph", 6.3, -1, "6.25"}, {"ph", 14, 1, "14.00"}, {"alkalinity", 0, -1, "0.0"},
		{"flow", 240, 1, "250"}, {"flow", 2, 1, "2.1"}, {"flow", 0.5, -1, "0.4"}, {"target-ph", 8.4, 1, "8.45"},
	} {
		f := field(t, c.field)
		if got := f.Show(f.Nudge(f.FromBare(c.bare), c.steps)); got != c.want {
			t.Errorf("%s %v nudged by %d shows %s, want %s", c.field, c.bare, c.steps, got, c.want)
		}
	}
}

func TestNumberReadsWhatGoWrites(t *testing.T) {
	rapid.Check(t, func(r *rapid.T) {
		x := rapid.Float64().Draw(r, "x")
		got, err := Number(sprint(x))
		if err != nil || got != x {
			r.Fatalf("%v was read as %v, %v", x, got, err)
		}
	})
}

// Whole numbers in every habit of writing thousands.
func TestNumberReadsThousands(t *testing.T) {
	rapid.Check(t, func(r *rapid.T) {
		n := rapid.IntRange(1_000_000, math.MaxInt32).Draw(r, "n")
		tenths := rapid.IntRange(0, 9).Draw(r, "tenths")
		separator := rapid.SampledFrom([]string{",", ".", " ", "\u2009", "\u00a0", "\u202f"}).Draw(r, "separator")
		decimal := map[string]string{",": ".", ".": ","}[separator]
		if decimal == "" {
			decimal = rapid.SampledFrom([]string{".", ","}).Draw(r, "decimal")
		}
		text := fmt.Sprintf("%d%s%03d%s%03d", n/1_000_000, separator, n/1000%1000, separator, n%1000)
		got, err := Number(text)
		if n/1_000_000 > 999 { // a first group of four is none
			if err == nil {
				r.Fatalf("%q was read as %v", text, got)
			}
			return
		}
		if err != nil || got != float64(n) {
			r.Fatalf("%q was read as %v, %v", text, got, err)
		}
		got, err = Number(fmt.Sprintf("%s%s%d", text, decimal, tenths))
		if err != nil || math.Abs(got-(float64(n)+float64(tenths)/10)) > 1e-6 {
			r.Fatalf("%q%s%d was read as %v, %v", text, decimal, tenths, got, err)
		}
	})
}
