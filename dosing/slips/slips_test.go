package slips

import (
	"math"
	"slices"
	"strings"
	"testing"
	"time"

	"beckline/dosing"
	"beckline/dosing/reading"
)

// si reads a typed value of a field.
func si(t testing.TB, field, text string) float64 {
	t.Helper()
	f, ok := reading.Lookup(field)
	if !ok {
		t.Fatal(field)
	}
	v, err := f.Parse(text)
	if err != nil {
		t.Fatal(err)
	}
	return v.SI
}

func some(t testing.TB, field, text string) dosing.Optional { return dosing.Some(si(t, field, text)) }

func catalogue(t testing.TB, name string) dosing.Product {
	t.Helper()
	p, ok := dosing.ProductByName(name)
	if !ok {
		t.Fatal(name)
	}
	return p
}

func dose(t testing.TB, name string, mgL float64) dosing.Addition {
	p := catalogue(t, name)
	return dosing.Addition{Product: p, Dose: dosing.Some(mgL * 1e-3 / p.Chemical.MolarMass)}
}

var noon = time.Date(2026, 3, 4, 12, 0, 0, 0, time.UTC)

// softCase is an invented soft upland water after coagulation: its ions balance
// and its conductivity is theirs. Caustic takes it to pH 8.8.
func softCase(t testing.TB) dosing.Case {
	return dosing.Case{
		Readings: dosing.Readings{
			PH: some(t, "ph", "6.52"), Alkalinity: some(t, "alkalinity", "24.0"), Kelvin: some(t, "temperature", "5"),
			Flow: some(t, "flow", "258"), Calcium: some(t, "calcium", "8.0"), Magnesium: some(t, "magnesium", "2.0"),
			Sodium: some(t, "sodium", "7.5"), Chloride: some(t, "chloride", "8.0"), Sulfate: some(t, "sulfate", "8.5"),
			Conductivity: some(t, "conductivity", "95"),
		},
		Additions: []dosing.Addition{{Product: catalogue(t, "caustic-25"), Solve: true}},
		Target:    dosing.Target{Kind: dosing.TargetPH, Value: 8.8},
	}
}

// softContext is its plant on an ordinary day.
func softContext(t testing.TB) Context {
	band := func(field, low, median, high string) Usual {
		return Usual{Median: si(t, field, median), Low: si(t, field, low), High: si(t, field, high)}
	}
	last := softCase(t)
	last.Readings.Alkalinity = some(t, "alkalinity", "23.5")
	last.Readings.PH = some(t, "ph", "6.55")
	return Context{
		Now: noon, Last: &last, LastAt: noon.Add(-8 * time.Hour), Capacity: some(t, "flow", "333"),
		Usual: map[string]Usual{
			"ph":          band("ph", "6.3", "6.5", "6.7"),
			"alkalinity":  band("alkalinity", "22", "24", "26"),
			"temperature": band("temperature", "2", "5", "8"),
			"flow":        band("flow", "210", "255", "300"),
			"calcium":     band("calcium", "7.2", "8", "8.8"),
		},
	}
}

func solved(t testing.TB, c dosing.Case) *dosing.Result {
	t.Helper()
	r, err := dosing.Solve(c)
	if err != nil {
		return nil // a refused case is checked without its result
	}
	return r
}

func find(fs []Finding, code string) (Finding, bool) {
	i := slices.IndexFunc(fs, func(f Finding) bool { return f.Code == code })
	if i < 0 {
		return Finding{}, false
	}
	return fs[i], true
}

func TestEverySlipIsCaught(t *testing.T) {
	used := map[string]bool{}
	for _, s := range table {
		c, x := softCase(t), softContext(t)
		s.make(t, &c, &x)
		got := Check(c, solved(t, c), x)
		f, ok := find(got, s.code)
		if !ok || f.Field != s.field {
			t.Errorf("%s: %+v", s.name, got)
			continue
		}
		used[s.code] = true
		if !strings.Contains(f.Cause, s.words) {
			t.Errorf("%s: the cause is %q", s.name, f.Cause)
		}
		if f.Evidence == "" || f.Do == "" {
			t.Errorf("%s: no evidence or no way on: %+v", s.name, f)
		}
		if s.meant != "" {
			want := si(t, s.field, s.meant)
			if !f.Meant.Given || math.Abs(f.Meant.Value-want) > max(s.close, 0.01)*want {
				t.Errorf("%s: meant %v, want %g", s.name, f.Meant, want)
			}
		}
		if len(got) > 2 {
			t.Errorf("%s: one slip, %d findings: %+v", s.name, len(got), got)
		}
	}
	for _, code := range Codes() {
		if !used[code] {
			t.Errorf("no slip shows %s", code)
		}
	}
}

// An ordinary day has no findings.
func TestOrdinaryDay(t *testing.T) {
	c := softCase(t)
	if got := Check(c, solved(t, c), softContext(t)); len(got) != 0 {
		t.Errorf("%+v", got)
	}
	if got := Check(dosing.Case{}, nil, Context{}); len(got) != 0 {
		t.Errorf("nothing at all: %+v", got)
	}
}

// TestConfirmed: what a person stands by is not asked again, and another value
// is.
func TestConfirmed(t *testing.T) {
	for _, s := range table {
		c, x := softCase(t), softContext(t)
		s.make(t, &c, &x)
		f, ok := find(Check(c, solved(t, c), x), s.code)
		if !ok {
			continue // TestEverySlipIsCaught says so
		}
		x.Confirmed = []Confirmation{{Code: f.Code, Field: f.Field, Value: f.Value}}
		if got, ok := find(Check(c, solved(t, c), x), s.code); ok && got.Field == f.Field {
			t.Errorf("%s: asked again after it was confirmed: %+v", s.name, got)
		}
	}
	c, x := softCase(t), softContext(t)
	c.Readings.Alkalinity = some(t, "alkalinity", "29.3")
	x.Confirmed = []Confirmation{{Field: "alkalinity", Value: some(t, "alkalinity", "29.3")}}
	if got := Check(c, solved(t, c), x); len(got) != 0 {
		t.Errorf("the reading itself was confirmed: %+v", got)
	}
	c.Readings.Alkalinity = some(t, "alkalinity", "29.4")
	if _, ok := find(Check(c, solved(t, c), x), AlkalinityBasis); !ok {
		t.Error("another value than the confirmed one passes")
	}
	x.Confirmed = []Confirmation{{Field: "alkalinity"}, {}}
	if _, ok := find(Check(c, solved(t, c), x), AlkalinityBasis); !ok {
		t.Error("a confirmation of nothing silences a finding")
	}
}

// Check never changes what it looks at.
func TestCheckChangesNothing(t *testing.T) {
	c, x := softCase(t), softContext(t)
	c.Additions = append(c.Additions, dose(t, "lime", 3))
	x.Measured = map[int]Water{2: {PH: dosing.Some(7)}}
	r := solved(t, c)
	before, dose := c.Additions[1].Dose.Value, r.Stations[1].Dose
	Check(c, r, x)
	if c.Additions[1].Dose.Value != before || r.Stations[1].Dose != dose || !c.Additions[0].Solve {
		t.Error("the case or the result was changed")
	}
}

// TestTyping: commas that can be read in two ways, letters for digits and odd
// units do not get as far as a case; what is accepted says what was understood.
func TestTyping(t *testing.T) {
	alkalinity, _ := reading.Lookup("alkalinity")
	for text, code := range map[string]string{
		"1,500": reading.CodeAmbiguousNumber, "1O": "", "l2.5": "", "2O.5": "", "24 mmol/L": reading.CodeAmbiguousUnit, "24 parsecs": reading.CodeUnknownUnit,
	} {
		v, err := alkalinity.Parse(text)
		e, ok := err.(*reading.Error)
		if !ok || code != "" && e.Code != code || e.Accepted == "" {
			t.Errorf("%q: %+v, %v", text, v, err)
		}
	}
	for text, want := range map[string]string{"1,5": "1.5", "24 mg/L": "24", "0.48 meq/L": "24.0", "29.3 mg/L HCO3": "24.0"} {
		v, err := alkalinity.Parse(text)
		if err != nil || math.Abs(v.SI-si(t, "alkalinity", want)) > 0.002*v.SI || v.Given != text {
			t.Errorf("%q: %+v, %v", text, v, err)
		}
	}
}

func TestLetters(t *testing.T) {
	const line = "04 Mar 12:00 raw 6.52 alk 24.0 flow 258 NaOH 10.4 mg/L pump 53 % pH 8.80"
	letters := Letters(line)
	if len(letters) != 2 || !Verify(line, letters) || !Verify("  04 mar   12:00 raw 6.52 alk 24.0 flow 258 NaOH 10.4 mg/L pump 53 % pH 8.80 ", strings.ToLower(letters)) {
		t.Fatalf("%q", letters)
	}
	// Every wrong character and every swap of two neighbours shows.
	for i := range len(line) {
		for _, b := range []byte("0123456789.,ABCKLMOPSZ") {
			other := line[:i] + string(b) + line[i+1:]
			if !strings.EqualFold(other, line) && line[i] != ' ' && Verify(other, letters) {
				t.Errorf("%q passes", other)
			}
		}
		if i > 0 && line[i] != line[i-1] && line[i] != ' ' && line[i-1] != ' ' {
			other := line[:i-1] + string([]byte{line[i], line[i-1]}) + line[i+1:]
			if Verify(other, letters) {
				t.Errorf("%q passes", other)
			}
		}
	}
	// The base has no shorter cycle than a line.
	seen, weight := map[int]bool{}, 1
	for range checkPrime - 1 {
		weight = weight * checkBase % checkPrime
		if seen[weight] {
			t.Fatal("two places weigh alike")
		}
		seen[weight] = true
	}
}
