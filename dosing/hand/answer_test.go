package hand_test

import (
	"encoding/csv"
	"math"
	"os"
	"strconv"
	"strings"
	"testing"

	"beckline/carbonate"
	"beckline/dosing"
	"beckline/dosing/hand"
)

// TestConstantsAgainstTables: the three-term equations against published values,
// each with its source in the file (several of them from memory, as it says).
func TestConstantsAgainstTables(t *testing.T) {
	f, err := os.Open("../../testdata/constants.csv")
	if err != nil {
		t.Fatal(err)
	}
	defer f.Close()
	rows, err := csv.NewReader(f).ReadAll()
	if err != nil {
		t.Fatal(err)
	}
	compared := 0
	for _, row := range rows[1:] {
		celsius, err := strconv.ParseFloat(row[0], 64)
		if err != nil {
			t.Fatal(err)
		}
		value, err := strconv.ParseFloat(row[2], 64)
		if err != nil {
			t.Fatal(err)
		}
		if celsius > 50 || strings.Contains(row[4], "unsure") || strings.HasPrefix(row[3], "Read 1975") || strings.HasPrefix(row[3], "literature") {
			continue // outside the range, or not a table of the electrochemical school
		}
		c := hand.At(celsius + 273.15)
		got, within := 0.0, 0.004
		switch row[1] {
		case "pK1 carbonic":
			got = c.PK1
		case "pK2 carbonic":
			got = c.PK2
		case "pKw":
			got, within = c.PKw, 0.006
		default:
			continue
		}
		compared++
		if math.Abs(got-value) > within {
			t.Errorf("%s at %g C is %.4f, published %.4f (%s)", row[1], celsius, got, value, row[3])
		}
	}
	if compared < 30 {
		t.Errorf("only %d published values were compared", compared)
	}
}

// TestSlope: the rounded activity slope against the Davies slope at 25 C, 0.509
// (Stumm & Morgan, Aquatic Chemistry, from memory), and the model's elsewhere.
func TestSlope(t *testing.T) {
	if a := hand.At(298.15).DaviesA; math.Abs(a-0.509) > 0.005 {
		t.Errorf("slope at 25 C is %g", a)
	}
	for kelvin := 273.15; kelvin <= 323.15; kelvin += 5 {
		k, err := carbonate.ConstantsAt(kelvin)
		if err != nil {
			t.Fatal(err)
		}
		if a := hand.At(kelvin).DaviesA; math.Abs(a-k.DaviesSlope()) > 0.0035 {
			t.Errorf("slope at %g K is %g, the model's %g", kelvin, a, k.DaviesSlope())
		}
	}
}

// TestPoint: shares sum to 1, and meet at the pK's.
func TestPoint(t *testing.T) {
	c := hand.At(298.15)
	for pH := 3.0; pH <= 14; pH += 0.5 {
		p := c.Point(pH, 0.01)
		if s := p.Alpha0 + p.Alpha1 + p.Alpha2; math.Abs(s-1) > 1e-12 {
			t.Errorf("shares at pH %g sum to %g", pH, s)
		}
		if back := p.Carbon(p.Alkalinity(2e-3)); math.Abs(back-2e-3) > 1e-12 {
			t.Errorf("carbon 2e-3 comes back from the alkalinity at pH %g as %g", pH, back)
		}
	}
	if p := c.Point(c.PK1, 0); math.Abs(p.Alpha0-p.Alpha1) > 1e-9 {
		t.Errorf("at pK1 the shares are %g and %g", p.Alpha0, p.Alpha1)
	}
	if p := c.Point(c.PK2, 0); math.Abs(p.Alpha1-p.Alpha2) > 1e-9 {
		t.Errorf("at pK2 the shares are %g and %g", p.Alpha1, p.Alpha2)
	}
}

// soft is a water in which every assumption holds.
func soft(t *testing.T) dosing.Case {
	t.Helper()
	return dosing.Case{
		Readings: dosing.Readings{
			PH: dosing.Some(6.90), Alkalinity: dosing.Some(eq(24)), Kelvin: dosing.Some(281.15),
			Calcium: mg(7.2, carbonate.Calcium), Magnesium: mg(1.5, carbonate.Magnesium), Sulfate: mg(6, carbonate.Sulfate),
			Chloride: mg(8, carbonate.Chloride), Sodium: mg(6, carbonate.Sodium), Conductivity: dosing.Some(78e-4),
		},
		Additions: []dosing.Addition{
			{Product: product(t, "alum-dry"), Dose: dosing.Some(22e-3 / 599.76)},
			{Product: product(t, "caustic-25"), Solve: true},
		},
		Target: dosing.Target{Kind: dosing.TargetPH, Value: 8.4},
	}
}

// TestIonicStrength: by the simple rules, 78 uS/cm and 50 mg/L of solids are
// 1.248e-3 and 1.25e-3 mol/L; the ions of the soft water by hand:
// half of Ca 1.7965e-4 x 4, Mg 6.172e-5 x 4, SO4 6.246e-5 x 4, Cl 2.2565e-4,
// Na 2.6098e-4, HCO3 4.7958e-4, and the charge left over, 8.6e-5.
func TestIonicStrength(t *testing.T) {
	for _, c := range []struct {
		want   float64
		change func(*dosing.Readings)
	}{
		{1.248e-3, func(*dosing.Readings) {}},
		{1.25e-3, func(r *dosing.Readings) { r.Conductivity, r.TDS = dosing.None, dosing.Some(0.05) }},
		{1.1334e-3, func(r *dosing.Readings) { r.Conductivity = dosing.None }},
	} {
		k := soft(t)
		c.change(&k.Readings)
		if got := hand.Of(solve(t, k)).Steps.IonicRaw; math.Abs(got/c.want-1) > 0.002 {
			t.Errorf("ionic strength %.6g, want %.6g", got, c.want)
		}
	}
}

// TestNamesWhatBroke: each assumption broken on purpose is the one that is named.
func TestNamesWhatBroke(t *testing.T) {
	for _, c := range []struct {
		broken hand.Assumption
		change func(*dosing.Case)
	}{
		{"", func(*dosing.Case) {}},
		{hand.NoPairs, func(c *dosing.Case) {
			c.Readings.Calcium, c.Readings.Magnesium = mg(300, carbonate.Calcium), mg(80, carbonate.Magnesium)
			c.Readings.Conductivity = dosing.None
			c.Target.Value = 9.8
		}},
		{hand.NoOtherAcids, func(c *dosing.Case) { c.Readings.Ammonia = mg(15, carbonate.Ammonia); c.Target.Value = 9.3 }},
		{hand.NoOtherAcids, func(c *dosing.Case) {
			c.Additions[1].Product = product(t, "phosphoric-75")
			c.Target.Value = 3
		}},
		{hand.NoOtherAcids, func(c *dosing.Case) { // no strong acid in it, as far as the method knows
			c.Additions[1].Product = product(t, "citric-50")
			c.Target.Value = 5
		}},
		{hand.NoBisulfate, func(c *dosing.Case) {
			c.Readings.Sulfate = mg(2000, carbonate.Sulfate)
			c.Readings.Conductivity = dosing.None
			c.Additions[1].Product = product(t, "hydrochloric-32")
			c.Target.Value = 2.2
		}},
		{hand.SimpleActivity, func(c *dosing.Case) { // far less than its ions need
			c.Readings.Sodium, c.Readings.Chloride = mg(6000, carbonate.Sodium), mg(9000, carbonate.Chloride)
			c.Readings.Calcium, c.Readings.Magnesium = dosing.None, dosing.None
			c.Readings.Alkalinity = dosing.Some(eq(300))
			c.Target.Value = 10.3
		}},
		{hand.NotNearReach, func(c *dosing.Case) {
			c.Readings.Calcium, c.Readings.Magnesium = dosing.None, dosing.None
			c.Additions[1].Product = product(t, "bicarbonate")
			c.Target.Value = 8.20
		}},
	} {
		k := soft(t)
		c.change(&k)
		a := hand.Of(solve(t, k))
		want := hand.Explained
		if c.broken == "" {
			want = hand.Agrees
		}
		if a.Verdict != want || a.Broken != c.broken {
			t.Errorf("%s names %q, want %q: hand %g, model %g, bound %g, %+v", a.Verdict, a.Broken, c.broken, a.Hand, a.Model, a.Bound, a.Effects)
		}
	}
}

// TestSlipIsSeen: a dose that is not the model's own differs, whatever the water
// holds; no assumption is blamed for it.
func TestSlipIsSeen(t *testing.T) {
	for _, by := range []float64{0.9, 0.99, 1.01, 1.25} {
		c := soft(t)
		c.Readings.Ammonia = mg(5, carbonate.Ammonia)
		r := solve(t, c)
		r.Stations[r.Solved].Dose *= by
		if a := hand.Of(r); a.Verdict != hand.Differs || a.Check() {
			t.Errorf("a dose times %g %s", by, a.Verdict)
		}
		if got, err := hand.Titrate(r); err != nil || got.Verdict != hand.Differs {
			t.Errorf("a dose times %g: the titration %s, %v", by, got.Verdict, err)
		}
	}
}

// TestByCalculator is the method with every number worked apart from the code,
// for a water of pH 6.5, alkalinity 50 mg/L as CaCO3, 25 C, no salts entered, to
// pH 8.0 with caustic. I = alkalinity; pK1 6.351, pK2 10.330, pKw 13.995;
// log gamma = -0.5135 (sqrt I/(1+sqrt I) - 0.3 I) = -0.01557 at I 9.99e-4.
func TestByCalculator(t *testing.T) {
	c := dosing.Case{
		Readings:  dosing.Readings{PH: dosing.Some(6.5), Alkalinity: dosing.Some(eq(50)), Kelvin: dosing.Some(298.15)},
		Additions: []dosing.Addition{{Product: product(t, "caustic-25"), Solve: true}},
		Target:    dosing.Target{Kind: dosing.TargetPH, Value: 8},
	}
	a := hand.Of(solve(t, c))
	s := a.Steps
	for _, n := range []struct {
		what      string
		got, want float64
	}{
		{"ionic strength", s.IonicRaw, 9.991e-4},
		{"gamma", s.Raw.Gamma1, 0.9648},
		{"share of CO2", s.Raw.Alpha0, 0.4065},
		{"share of HCO3", s.Raw.Alpha1, 0.5934},
		{"carbon", s.Carbon, 1.683e-3},
		{"carbonate alkalinity at pH 8 per carbon", s.Target.PerCarbon(), 0.9844},
		{"dose", a.Hand, 6.59e-4},
	} {
		if math.Abs(n.got/n.want-1) > 0.002 {
			t.Errorf("%s is %.6g, by calculator %.6g", n.what, n.got, n.want)
		}
	}
	if a.Verdict != hand.Agrees {
		t.Errorf("%s: hand %g, model %g", a.Verdict, a.Hand, a.Model)
	}
}

// TestOtherTargets: alkalinity by division; an index and a CCPP at the pH where
// the model meets them; the finished pH where nothing is solved for.
func TestOtherTargets(t *testing.T) {
	c := soft(t)
	c.Target = dosing.Target{Kind: dosing.TargetAlkalinity, Value: eq(40)}
	a := hand.Of(solve(t, c))
	// Alum 22 mg/L takes 22/599.76 x 6 meq/L from 24 mg/L as CaCO3.
	want := eq(40) - (eq(24) - 6*22e-3/599.76)
	if a.Verdict != hand.Agrees || math.Abs(a.Hand/want-1) > 1e-9 {
		t.Errorf("alkalinity: %s, %g, want %g", a.Verdict, a.Hand, want)
	}
	for _, target := range []dosing.Target{
		{Kind: dosing.TargetSaturationIndex, Value: -1},
		{Kind: dosing.TargetCCPP, Value: -5e-3 / carbonate.MolarMassCaCO3},
	} {
		c.Target = target
		r := solve(t, c)
		if a := hand.Of(r); a.Verdict != hand.Agrees {
			t.Errorf("%s: %s, hand %g, model %g", target.Kind.Field(), a.Verdict, a.Hand, a.Model)
		}
		if got, err := hand.Titrate(r); err != nil || got.Verdict != hand.Agrees {
			t.Errorf("%s: titration %s %v: %g, model %g", target.Kind.Field(), got.Verdict, err, got.Dose, got.Model)
		}
	}
	c.Target = dosing.Target{}
	c.Additions = c.Additions[:1]
	r := solve(t, c)
	a = hand.Of(r)
	if a.Verdict != hand.Agrees || a.IsDose || math.Abs(a.Hand-6.28) > 0.05 {
		t.Errorf("settled water: %s, pH %.3f, model %.3f", a.Verdict, a.Hand, a.Model)
	}
	if got, err := hand.Titrate(r); err != nil || got.Verdict != hand.Absent {
		t.Errorf("nothing to titrate: %s %v", got.Verdict, err)
	}
}

func BenchmarkHand(b *testing.B) {
	p, _ := dosing.ProductByName("caustic-25")
	r := solve(b, dosing.Case{
		Readings:  dosing.Readings{PH: dosing.Some(6.5), Alkalinity: dosing.Some(eq(50)), Kelvin: dosing.Some(298.15)},
		Additions: []dosing.Addition{{Product: p, Solve: true}},
		Target:    dosing.Target{Kind: dosing.TargetPH, Value: 8},
	})
	for b.Loop() {
		_ = hand.Of(r)
	}
}

func BenchmarkTitrate(b *testing.B) {
	p, _ := dosing.ProductByName("caustic-25")
	r := solve(b, dosing.Case{
		Readings:  dosing.Readings{PH: dosing.Some(6.5), Alkalinity: dosing.Some(eq(50)), Kelvin: dosing.Some(298.15)},
		Additions: []dosing.Addition{{Product: p, Solve: true}},
		Target:    dosing.Target{Kind: dosing.TargetPH, Value: 8},
	})
	for b.Loop() {
		if _, err := hand.Titrate(r); err != nil {
			b.Fatal(err)
		}
	}
}

// TestOtherTrains: behind a tower or a reaction, in a blend and of two doses the
// product's own step is checked; the titration walks the whole train.
func TestOtherTrains(t *testing.T) {
	caustic := dosing.Addition{Product: product(t, "caustic-25"), Solve: true}
	chlorine := dosing.Addition{Product: product(t, "chlorine-gas"), Dose: dosing.Some(3e-5), Demand: dosing.Some(3e-5)} // all of it spent
	for name, change := range map[string]func(*dosing.Case){
		"tower": func(c *dosing.Case) {
			c.Additions = []dosing.Addition{{Process: dosing.Aeration, Share: dosing.Some(0.7)}, caustic}
		},
		"contactor behind": func(c *dosing.Case) {
			c.Additions = []dosing.Addition{{Product: product(t, "carbon-dioxide"), Solve: true}, {Process: dosing.LimestoneContactor}}
			c.Target = dosing.Target{Kind: dosing.TargetAlkalinity, Value: eq(60)}
		},
		"demand": func(c *dosing.Case) { c.Additions = []dosing.Addition{chlorine, caustic} },
		"two": func(c *dosing.Case) {
			c.Additions = []dosing.Addition{{Product: product(t, "bicarbonate"), Solve: true}, caustic}
			c.Second = dosing.Target{Kind: dosing.TargetAlkalinity, Value: eq(45)}
		},
		"between": func(c *dosing.Case) {
			c.Additions = []dosing.Addition{caustic, c.Additions[0]}
			c.Target.Value, c.TargetAt = 8, 1
		},
		"blend": func(c *dosing.Case) {
			other := c.Readings
			other.PH, other.Alkalinity = dosing.Some(7.4), dosing.Some(eq(60))
			c.Sources = []dosing.Source{{Name: "river", Readings: c.Readings, Flow: dosing.Some(2)}, {Name: "well", Readings: other, Flow: dosing.Some(1)}}
			c.Readings = dosing.Readings{}
		},
	} {
		c := soft(t)
		change(&c)
		r := solve(t, c)
		a := hand.Of(r)
		if a.Verdict != hand.Agrees || !a.IsDose {
			t.Errorf("%s: %s (%s), hand %g, model %g, bound %g", name, a.Verdict, a.Broken, a.Hand, a.Model, a.Bound)
		}
		if a.Steps.FromStation == (name == "between") {
			t.Errorf("%s: begun at a station: %v", name, a.Steps.FromStation)
		}
		if got, err := hand.Titrate(r); err != nil || got.Verdict != hand.Agrees {
			t.Errorf("%s: titration %s %v: %g, model %g", name, got.Verdict, err, got.Dose, got.Model)
		}
	}
	// A product that reacts as it is dosed, and waters that do more than add.
	c := soft(t)
	c.Additions = []dosing.Addition{{Product: product(t, "hypochlorite-12"), Solve: true, Demand: dosing.Some(1e-6)}}
	c.Target.Value = 7
	if a := hand.Of(solve(t, c)); a.Verdict != hand.Absent {
		t.Errorf("chlorine with a demand: %s", a.Verdict)
	}
	c = soft(t)
	c.Target = dosing.Target{}
	c.Additions = []dosing.Addition{{Process: dosing.Aeration}}
	if a := hand.Of(solve(t, c)); a.Verdict != hand.Absent {
		t.Errorf("a tower alone: %s", a.Verdict)
	}
}
