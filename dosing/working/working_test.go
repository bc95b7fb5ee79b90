package working_test

import (
	"errors"
	"flag"
	"math"
	"math/rand/v2"
	"strconv"
	"strings"
	"testing"

	"beckline/carbonate"
	"beckline/dosing"
	"beckline/dosing/working"
)

var many = flag.Int("sheets", 300, "how many random sheets are worked back from their text")

func mg(v float64, c carbonate.Component) dosing.Optional {
	return dosing.Some(v * 1e-3 / c.MolarMass())
}

func eq(mgCaCO3 float64) float64 { return 2e-3 * mgCaCO3 / carbonate.MolarMassCaCO3 }

func product(tb testing.TB, name string) dosing.Product {
	tb.Helper()
	p, ok := dosing.ProductByName(name)
	if !ok {
		tb.Fatalf("no product %s", name)
	}
	return p
}

// upland is a soft water with alum in it, to be brought to pH 8.4 with caustic.
func upland(tb testing.TB) dosing.Case {
	tb.Helper()
	return dosing.Case{
		Readings: dosing.Readings{
			PH: dosing.Some(6.90), Alkalinity: dosing.Some(eq(24)), Kelvin: dosing.Some(281.15),
			Calcium: mg(7.2, carbonate.Calcium), Magnesium: mg(1.5, carbonate.Magnesium), Sulfate: mg(6, carbonate.Sulfate),
			Chloride: mg(8, carbonate.Chloride), Sodium: mg(6, carbonate.Sodium),
			Conductivity: dosing.Some(78e-4), Flow: dosing.Some(240.0 / 3600),
		},
		Additions: []dosing.Addition{
			{Product: product(tb, "alum-dry"), Dose: dosing.Some(22e-3 / 599.76)},
			{Product: product(tb, "caustic-25"), Solve: true, Feed: dosing.FeedSetup{PumpCapacity: dosing.Some(20 / 3.6e6)}},
		},
		Target: dosing.Target{Kind: dosing.TargetPH, Value: 8.4},
	}
}

func sheet(tb testing.TB, c dosing.Case) (*dosing.Result, working.Sheet) {
	tb.Helper()
	r, err := dosing.Solve(c)
	if err != nil {
		tb.Fatal(err)
	}
	s, err := working.Of(r)
	if err != nil {
		tb.Fatal(err)
	}
	return r, s
}

const shown = 1e-5 // outcomes have six digits

func same(a, b, relative float64) bool {
	return math.Abs(a-b) <= relative*max(math.Abs(a), math.Abs(b))
}

// workBack works every line of a sheet from its own text: the numbers put in
// give the outcome; they stand where the formula has its names; and each is the
// outcome that the name had before. It returns the last outcome of each name.
func workBack(text string) (map[string]float64, int, error) {
	lines, err := read(text)
	if err != nil {
		return nil, 0, err
	}
	last := map[string]float64{}
	worked := 0
	for _, l := range lines {
		wrong := func(why string) error { return errors.New(why + ":\n" + l.written) }
		outcome, _, _ := strings.Cut(l.parts[len(l.parts)-1], " ")
		value, err := strconv.ParseFloat(outcome, 64)
		if err != nil {
			return nil, 0, wrong(err.Error())
		}
		if len(l.parts) > 1 {
			numbers := l.parts[len(l.parts)-2]
			got, err := work(numbers)
			if err != nil {
				return nil, 0, wrong(err.Error())
			}
			if !same(got, value, shown) && math.Abs(got-value) > 1e-8 {
				return nil, 0, wrong("works out as " + strconv.FormatFloat(got, 'g', 9, 64))
			}
			worked++
		}
		if len(l.parts) == 3 {
			if err := namesMatch(words(l.parts[0]), words(l.parts[1]), last); err != nil {
				return nil, 0, wrong(err.Error())
			}
		}
		last[l.name] = value
	}
	return last, worked, nil
}

// namesMatch walks formula and numbers together.
func namesMatch(formula, numbers []string, last map[string]float64) error {
	j := 0
	for _, f := range formula {
		if j >= len(numbers) {
			return errors.New("numbers end before the formula")
		}
		if f == numbers[j] {
			j++
			continue
		}
		known, ok := last[f]
		if !ok {
			return errors.New("does not say what " + f + " is")
		}
		sign := 1.0
		if numbers[j] == "(" && numbers[j+1] == "-" { // a negative number stands in brackets
			sign, j = -1, j+2
		}
		v, err := strconv.ParseFloat(numbers[j], 64)
		if err != nil {
			return err
		}
		if !same(sign*v, known, shown) && math.Abs(sign*v-known) > 1e-12 {
			return errors.New(f + " was " + strconv.FormatFloat(known, 'g', -1, 64))
		}
		if j++; sign < 0 {
			j++
		}
	}
	if j != len(numbers) {
		return errors.New("numbers go on after the formula")
	}
	return nil
}

// TestSheetWorksBack: every line of the sheet, worked from its own text, gives
// what stands there, and the last lines are the answer's numbers.
func TestSheetWorksBack(t *testing.T) {
	r, s := sheet(t, upland(t))
	last, worked, err := workBack(s.Text())
	if err != nil {
		t.Fatal(err)
	}
	if worked < 100 {
		t.Errorf("only %d lines were worked", worked)
	}
	f := r.Finished().Figures
	for name, want := range map[string]float64{
		"d":      r.Dose().Dose,
		"mg_d":   r.Dose().Feed.PureMass * 1000,
		"L_h":    r.Dose().Feed.VolumePerSecond * 3.6e6,
		"pct":    r.Dose().Feed.PumpFraction * 100,
		"alk_mg": f.Alkalinity * 500 * carbonate.MolarMassCaCO3,
		"dic":    f.DIC * 1000,
		"ccpp":   f.CCPP.Value * 1000 * carbonate.MolarMassCaCO3,
		"csmr":   f.ChlorideSulfate.Value,
		"larson": f.LarsonRatio.Value,
	} {
		if got, ok := last[name]; !ok || !same(got, want, shown) {
			t.Errorf("the sheet ends with %s = %g, the answer has %g", name, got, want)
		}
	}
	t.Logf("%d lines worked", worked)
}

// drawCase draws a case with every kind of reading, product and target.
func drawCase(tb testing.TB, r *rand.Rand) dosing.Case {
	tb.Helper()
	log := func(lo, hi float64) float64 { return lo * math.Pow(hi/lo, r.Float64()) }
	some := func(chance float64, o *dosing.Optional, c carbonate.Component, hi float64) {
		if r.Float64() < chance {
			*o = mg(log(hi/100, hi), c)
		}
	}
	rd := dosing.Readings{
		PH: dosing.Some(5 + 5*r.Float64()), Alkalinity: dosing.Some(eq(log(5, 400))), Kelvin: dosing.Some(274 + 40*r.Float64()),
	}
	some(0.7, &rd.Calcium, carbonate.Calcium, 150)
	some(0.6, &rd.Magnesium, carbonate.Magnesium, 50)
	some(0.6, &rd.Sulfate, carbonate.Sulfate, 300)
	some(0.6, &rd.Sodium, carbonate.Sodium, 300)
	some(0.6, &rd.Chloride, carbonate.Chloride, 300)
	some(0.2, &rd.Potassium, carbonate.Potassium, 20)
	some(0.2, &rd.Nitrate, carbonate.Nitrate, 50)
	some(0.2, &rd.Ammonia, carbonate.Ammonia, 10)
	some(0.2, &rd.Phosphate, carbonate.Phosphate, 5)
	some(0.2, &rd.Silica, carbonate.Silica, 40)
	some(0.2, &rd.Boron, carbonate.Boron, 2)
	some(0.2, &rd.Fluoride, carbonate.Fluoride, 2)
	some(0.1, &rd.Acetate, carbonate.Acetate, 30)
	some(0.1, &rd.Formate, carbonate.Formate, 30)
	some(0.1, &rd.Citrate, carbonate.Citrate, 30)
	if !rd.Ammonia.Given {
		some(0.2, &rd.FreeChlorine, carbonate.Chlorine, 3)
	}
	switch r.IntN(4) {
	case 0:
		rd.Conductivity = dosing.Some(log(50, 3000) * 1e-4)
	case 1:
		rd.TDS = dosing.Some(log(50, 3000) * 1e-3)
	}
	if r.IntN(5) == 0 {
		rd.PHKelvin = dosing.Some(293.15)
	}
	if r.IntN(8) == 0 {
		rd.DIC = dosing.Some(rd.Alkalinity.Value * (0.9 + 0.4*r.Float64()))
	}
	if r.IntN(2) == 0 {
		rd.Flow = dosing.Some(0.02)
	}
	if r.IntN(6) == 0 && !rd.Calcium.Given && !rd.Magnesium.Given {
		rd.Hardness = dosing.Some(5e-4)
	}
	c := dosing.Case{Readings: rd}
	for range r.IntN(3) {
		c.Additions = append(c.Additions, drawStep(tb, r))
	}
	all := dosing.Products()
	if r.IntN(6) > 0 {
		p := all[r.IntN(len(all))]
		c.Additions = append(c.Additions, dosing.Addition{Product: p, Solve: true})
		up := 1.0
		if p.Chemical.Equivalents < 0 || p.Chemical.Equivalents == 0 {
			up = -1
		}
		switch r.IntN(5) {
		case 0:
			c.Target = dosing.Target{Kind: dosing.TargetAlkalinity, Value: rd.Alkalinity.Value * (1 + 0.3*up)}
		case 1:
			c.Target = dosing.Target{Kind: dosing.TargetSaturationIndex, Value: -1 + 2*r.Float64()}
		default:
			c.Target = dosing.Target{Kind: dosing.TargetPH, Value: rd.PH.Value + up*(0.2+r.Float64())}
		}
		if r.IntN(4) == 0 {
			c.TargetAt = len(c.Additions)
			c.Additions = append(c.Additions, drawStep(tb, r))
		}
		if r.IntN(6) == 0 {
			c.Target = dosing.Target{Kind: dosing.TargetPH, Value: rd.PH.Value + 0.5}
			c.Second = dosing.Target{Kind: dosing.TargetAlkalinity, Value: rd.Alkalinity.Value * 1.5}
			c.Additions, c.TargetAt = []dosing.Addition{{Product: product(tb, "bicarbonate"), Solve: true}, {Product: product(tb, "caustic-50"), Solve: true}}, 0
		}
	}
	if r.IntN(6) == 0 {
		other := rd
		other.PH, other.Alkalinity, other.Kelvin, other.PHKelvin = dosing.Some(7.5), dosing.Some(eq(90)), dosing.Some(288), dosing.None
		other.DIC, other.Silica, other.Ammonia = dosing.None, mg(8, carbonate.Silica), dosing.None
		c.Readings = dosing.Readings{Flow: rd.Flow}
		c.Sources = []dosing.Source{{Name: "river", Readings: rd, Flow: dosing.Some(3)}, {Name: "well", Readings: other, Flow: dosing.Some(1)}}
	}
	return c
}

// drawStep draws a feed of known dose, a tower or a contactor.
func drawStep(tb testing.TB, r *rand.Rand) dosing.Addition {
	tb.Helper()
	switch r.IntN(8) {
	case 0:
		return dosing.Addition{Process: dosing.Aeration, Share: dosing.Some(r.Float64())}
	case 1:
		return dosing.Addition{Process: dosing.Aeration, PH: dosing.Some(7 + r.Float64())}
	case 2:
		return dosing.Addition{Process: dosing.LimestoneContactor}
	case 3:
		return dosing.Addition{Product: product(tb, "chlorine-gas"), Dose: dosing.Some(2e-5), Demand: dosing.Some(3e-5 * r.Float64())}
	}
	name := []string{"alum-dry", "pacl-10", "ferric-chloride-40", "sodium-fluoride", "soda-ash"}[r.IntN(5)]
	return dosing.Addition{Product: product(tb, name), Dose: dosing.Some(2e-5)}
}

// TestEverySheetWorksBack: whatever was read, dosed and asked for, a sheet can
// be made (so that no formula parts from the answer) and works back.
func TestEverySheetWorksBack(t *testing.T) {
	r := rand.New(rand.NewPCG(51, 52))
	made, kinds, trains := 0, map[string]int{}, map[string]int{}
	for tries := 0; made < *many && tries < 20**many; tries++ {
		c := drawCase(t, r)
		result, err := dosing.Solve(c)
		if err != nil {
			continue
		}
		s, err := working.Of(result)
		if err != nil {
			t.Fatalf("%v\n%+v\n%+v", err, c.Readings, c.Additions)
		}
		last, _, err := workBack(s.Text())
		if err != nil {
			t.Fatalf("%v\n%+v\n%+v", err, c.Readings, c.Additions)
		}
		made++
		for i := range c.Additions {
			trains[[]string{"feed", "tower", "contactor"}[c.Additions[i].Process]]++
		}
		if len(c.Sources) > 0 {
			trains["blend"]++
		}
		if len(result.Doses()) > 1 {
			trains["two doses"]++
		}
		if result.Finished().Figures.Water.Totals[carbonate.Monochloramine] > 0 {
			trains["chloramine"]++
		}
		if doses := result.Doses(); len(doses) > 0 {
			st := doses[len(doses)-1]
			kinds[st.Addition.Product.Chemical.Formula]++
			if !same(last["mg_d"], st.Feed.PureMass*1000, shown) {
				t.Fatalf("dose %g on the sheet, %g in the answer", last["mg_d"], st.Feed.PureMass*1000)
			}
		}
	}
	for _, k := range []string{"feed", "tower", "contactor", "blend", "two doses", "chloramine"} {
		if trains[k] == 0 {
			t.Errorf("no sheet has a %s", k)
		}
	}
	if made < *many || len(kinds) < 15 {
		t.Errorf("%d sheets of %d chemicals", made, len(kinds))
	}
	t.Logf("%d sheets of %d chemicals worked back; on their way %v", made, len(kinds), trains)
}

// TestSheetRefusesASlip: an answer that was tampered with has no sheet.
func TestSheetRefusesASlip(t *testing.T) {
	for name, slip := range map[string]func(*dosing.Result){
		"dose":  func(r *dosing.Result) { r.Stations[r.Solved].Dose *= 1.00001 },
		"index": func(r *dosing.Result) { r.Finished().Figures.SaturationIndex.Value += 0.001 },
		"feed":  func(r *dosing.Result) { r.Dose().Feed.VolumePerSecond *= 1.001 },
		"water": func(r *dosing.Result) { r.Finished().Figures.Water.Alkalinity *= 1.001 },
		"ccpp":  func(r *dosing.Result) { r.Finished().Figures.CCPP.Value *= 1.01 },
	} {
		r, err := dosing.Solve(upland(t))
		if err != nil {
			t.Fatal(err)
		}
		slip(r)
		var p *dosing.Problem
		if _, err := working.Of(r); !errors.As(err, &p) || p.Code != "working_failed" {
			t.Errorf("a slip in the %s: %v", name, err)
		}
	}
}

// TestConstantsAtEveryTemperature: the sheet's formulas are the model's at all
// its temperatures (each sheet checks those that it uses).
func TestConstantsAtEveryTemperature(t *testing.T) {
	c := upland(t)
	c.Readings.Phosphate, c.Readings.Silica, c.Readings.Boron = mg(1, carbonate.Phosphate), mg(10, carbonate.Silica), mg(1, carbonate.Boron)
	c.Readings.Fluoride, c.Readings.FreeChlorine = mg(1, carbonate.Fluoride), mg(1, carbonate.Chlorine)
	c.Readings.Acetate, c.Readings.Formate, c.Readings.Citrate = mg(1, carbonate.Acetate), mg(1, carbonate.Formate), mg(1, carbonate.Citrate)
	for celsius := 0.0; celsius <= 50; celsius += 5 {
		c.Readings.Kelvin = dosing.Some(273.15 + celsius)
		_, s := sheet(t, c)
		n := 0
		for _, section := range s.Sections {
			for _, step := range section.Steps {
				if strings.HasPrefix(step.Formula, "10^(") && strings.Contains(step.Formula, "T") {
					n++
				}
			}
		}
		if n != 25 { // all but ammonium, which chlorine keeps out
			t.Errorf("at %g C %d constants are worked, want 25", celsius, n)
		}
	}
}

func BenchmarkSheet(b *testing.B) {
	r, err := dosing.Solve(upland(b))
	if err != nil {
		b.Fatal(err)
	}
	for b.Loop() {
		s, err := working.Of(r)
		if err != nil {
			b.Fatal(err)
		}
		_ = s.Text()
	}
}
