package mix

import (
	"errors"
	"maps"
	"math"
	"slices"
	"strings"
	"testing"

	"beckline/carbonate"
	"beckline/dosing"
)

// upland is a soft raw water at 8 C with 22 mg/L of dry alum ahead of the mix,
// at 240 m3/h.
func upland(t testing.TB) dosing.Case {
	t.Helper()
	mg := func(c carbonate.Component, v float64) dosing.Optional {
		return dosing.Some(v * 1e-3 / c.MolarMass())
	}
	alum := product(t, "alum-dry")
	return dosing.Case{
		Readings: dosing.Readings{
			PH: dosing.Some(6.9), Alkalinity: dosing.Some(2 * caco3(24)), Kelvin: dosing.Some(281.15),
			Flow: dosing.Some(240. / 3600), Conductivity: dosing.Some(78e-4),
			Calcium: mg(carbonate.Calcium, 7.2), Magnesium: mg(carbonate.Magnesium, 1.5),
			Sulfate: mg(carbonate.Sulfate, 6), Chloride: mg(carbonate.Chloride, 8), Sodium: mg(carbonate.Sodium, 6),
		},
		Additions: []dosing.Addition{{Product: alum, Dose: dosing.Some(22e-3 / alum.Chemical.MolarMass)}},
	}
}

func candidate(t testing.TB, name string, price float64) Candidate {
	return Candidate{Product: product(t, name), Price: price}
}

func between(q Quantity, low, high float64) Limit {
	return Limit{q, dosing.Some(low), dosing.Some(high)}
}

func atLeast(q Quantity, low float64) Limit { return Limit{Quantity: q, Low: dosing.Some(low)} }
func atMost(q Quantity, high float64) Limit { return Limit{Quantity: q, High: dosing.Some(high)} }

func milligrams(c carbonate.Component, v float64) float64 { return v * 1e-3 / c.MolarMass() }

// sixUnderEight is the size of task that has to be quick. The prices are
// invented.
func sixUnderEight(t testing.TB) Task {
	return Task{
		Base: upland(t),
		Candidates: []Candidate{
			candidate(t, "caustic-25", 0.35), candidate(t, "lime", 0.30), candidate(t, "soda-ash", 0.55),
			candidate(t, "bicarbonate", 0.70), candidate(t, "carbon-dioxide", 0.40), candidate(t, "sulfuric-93", 0.25),
		},
		Limits: []Limit{
			between(PH, 7.8, 8.6), between(Alkalinity, 2*caco3(40), 2*caco3(70)), between(CCPP, caco3(-6), caco3(4)),
			atMost(SaturationIndex, 0.3), atMost(Sodium, milligrams(carbonate.Sodium, 20)), atMost(ChlorideSulfate, 0.6),
			between(Calcium, milligrams(carbonate.Calcium, 8), milligrams(carbonate.Calcium, 30)), atMost(Sulfate, milligrams(carbonate.Sulfate, 60)),
		},
	}
}

func solve(t testing.TB, task Task) *Answer {
	t.Helper()
	a, err := Solve(task)
	if err != nil {
		t.Fatal(err)
	}
	return a
}

// dosesOf maps the products of a mix to kg of product per m3.
func dosesOf(a *Answer, m *Mix) map[string]float64 {
	out := map[string]float64{}
	for _, d := range m.Doses {
		out[a.Task.Candidates[d.Candidate].Product.Name] = d.ProductMass
	}
	return out
}

// TestCausticAlone: with one product and one pH the mix is the plain dose.
func TestCausticAlone(t *testing.T) {
	task := Task{Base: upland(t), Candidates: []Candidate{candidate(t, "caustic-25", 0.4)}, Limits: []Limit{between(PH, 8.4, 8.4)}}
	a := solve(t, task)
	c := upland(t)
	c.Additions = append(c.Additions, dosing.Addition{Product: product(t, "caustic-25"), Solve: true})
	c.Target = dosing.Target{Kind: dosing.TargetPH, Value: 8.4}
	r, err := dosing.Solve(c)
	if err != nil {
		t.Fatal(err)
	}
	want := r.Dose().Dose
	if got := a.Best.Doses[0].Amount; math.Abs(got-want) > 1e-6*want {
		t.Errorf("dose %.9g mol/L, single dose %.9g", got, want)
	}
	// 15.85 mg/L NaOH is 63.4 mg/L of product, at 0.4 a kg.
	if got := a.Best.CostML(); math.Abs(got-0.4*want*39.997*4*1000) > 1e-4 {
		t.Errorf("cost %g a ML", got)
	}
	year := a.Best.CostYear()
	if want := a.Best.CostML() * 0.24 * 24 * 365; !year.Given || math.Abs(year.Value-want) > 1e-6*want {
		t.Errorf("cost %v a year, want %g", year, want)
	}
}

// TestAlkalinityByPrice: with nothing but an alkalinity asked for, the cheapest
// equivalent wins, and its dose is a division.
func TestAlkalinityByPrice(t *testing.T) {
	task := Task{
		Base:       upland(t),
		Candidates: []Candidate{candidate(t, "soda-ash", 0.5), candidate(t, "lime", 0.5), candidate(t, "bicarbonate", 0.5)},
		Limits:     []Limit{atLeast(Alkalinity, 2*caco3(40))},
	}
	a := solve(t, task)
	settled := a.Best.Result.Stations[1].Figures.Alkalinity
	want := (2*caco3(40) - settled) / 2 * 74.093 // lime: most equivalents a kg
	if got := dosesOf(a, &a.Best); len(got) != 1 || math.Abs(got["lime"]-want) > 1e-7*want {
		t.Errorf("doses %v, want lime %g", got, want)
	}
}

// TestSixUnderEight: each limit's price is what solving again without it gives.
func TestSixUnderEight(t *testing.T) {
	task := sixUnderEight(t)
	task.Explain = true
	a := solve(t, task)
	t.Logf("best %v at %.4g a ML", dosesOf(a, &a.Best), a.Best.CostML())
	if len(a.Best.Binding) == 0 || len(a.Costs) != len(a.Best.Binding) {
		t.Fatalf("%d bounds bind, %d costs", len(a.Best.Binding), len(a.Costs))
	}
	for _, c := range a.Costs {
		t.Logf("%s side %d at %g: saves %.4g a ML without, %.4g for a step of %g", c.Bound.Quantity.Field(), c.Bound.Side,
			c.Bound.Value, c.SavingM3*1000, c.StepSavingM3*1000, c.Step)
		freer := sixUnderEight(t)
		for i := range freer.Limits {
			if freer.Limits[i].Quantity == c.Bound.Quantity {
				if c.Bound.Side == Low {
					freer.Limits[i].Low = dosing.None
				} else {
					freer.Limits[i].High = dosing.None
				}
				if !freer.Limits[i].Low.Given && !freer.Limits[i].High.Given {
					freer.Limits = append(freer.Limits[:i], freer.Limits[i+1:]...)
				}
				break
			}
		}
		b := solve(t, freer)
		if got := a.Best.CostM3 - b.Best.CostM3; math.Abs(got-c.SavingM3) > 1e-6*a.Best.CostM3 {
			t.Errorf("without the limit %.9g is saved, said %.9g", got, c.SavingM3)
		}
		if c.StepSavingM3 > c.SavingM3*(1+1e-6) {
			t.Errorf("a step saves %g, all of it only %g", c.StepSavingM3, c.SavingM3)
		}
	}
}

// TestNextBest: the alternatives are the cheapest answers to the same task with
// every choice of fewer candidates, each set of products once.
func TestNextBest(t *testing.T) {
	task := sixUnderEight(t)
	task.Limits[6].Low = dosing.None // or nothing goes without lime
	task.Alternatives = 4
	a := solve(t, task)
	got := []float64{a.Best.CostM3}
	for i := range a.Alternatives {
		got = append(got, a.Alternatives[i].CostM3)
	}
	byProducts := map[string]float64{}
	for set := range 1 << len(task.Candidates) {
		some := task
		some.Alternatives, some.Candidates = 0, nil
		for j, c := range task.Candidates {
			if set&(1<<j) != 0 {
				some.Candidates = append(some.Candidates, c)
			}
		}
		if set == 0 {
			continue
		}
		b, err := Solve(some)
		var no *Infeasible
		if errors.As(err, &no) {
			continue
		}
		if err != nil {
			t.Fatal(err)
		}
		byProducts[productsOf(b, &b.Best)] = b.Best.CostM3
	}
	want := slices.Sorted(maps.Values(byProducts))
	if len(got) != 5 || len(want) < 5 {
		t.Fatalf("%d mixes, of %d", len(got), len(want))
	}
	for i := range got {
		if math.Abs(got[i]-want[i]) > 1e-6*want[i] {
			t.Errorf("mix %d costs %.9g, %.9g is the next", i, got[i], want[i])
		}
	}
}

func productsOf(a *Answer, m *Mix) string {
	return strings.Join(slices.Sorted(maps.Keys(dosesOf(a, m))), "+")
}

// TestNothingNeeded: a water within every limit needs no dose, and says so.
func TestNothingNeeded(t *testing.T) {
	task := Task{Base: upland(t), Candidates: []Candidate{candidate(t, "caustic-25", 0.4)}, Limits: []Limit{between(PH, 6, 7)}}
	a := solve(t, task)
	if !a.NothingNeeded || len(a.Best.Doses) != 0 || a.Best.CostM3 != 0 || a.Best.Result == nil {
		t.Errorf("%+v", a)
	}
}

// TestPumpFloors: a dose below what the pump can feed is either raised to that
// or left to another product, whichever is cheaper.
func TestPumpFloors(t *testing.T) {
	base := Task{Base: upland(t), Candidates: []Candidate{candidate(t, "caustic-25", 0.4), candidate(t, "soda-ash", 3)},
		Limits: []Limit{between(PH, 7.6, 8.8)}}
	free := solve(t, base)
	least := free.Best.Doses[0].ProductMass * 1.05
	raised := base
	raised.Candidates = append([]Candidate(nil), base.Candidates...)
	raised.Candidates[0].Least = dosing.Some(least)
	a := solve(t, raised)
	if got := dosesOf(a, &a.Best); len(got) != 1 || math.Abs(got["caustic-25"]-least) > 1e-8*least {
		t.Errorf("doses %v, want caustic at its least %g", got, least)
	}
	if b := a.Best.Binding; len(b) != 1 || b[0].Source != FromLeast || b[0].Side != Low {
		t.Errorf("binding %+v", b)
	}
	raised.Candidates[0].Least = dosing.Some(least * 10)
	a = solve(t, raised)
	if got := dosesOf(a, &a.Best); len(got) != 1 || !(got["soda-ash"] > 0) {
		t.Errorf("doses %v, want soda ash alone", got)
	}
	// A pump of 10 L/h at 100 % that feeds no less than a tenth.
	pumped := base
	pumped.Candidates = append([]Candidate(nil), base.Candidates...)
	pumped.Candidates[0].Feed.PumpCapacity = dosing.Some(4e-3 / 3600)
	a = solve(t, pumped)
	if got := a.Best.Result.Stations[2].Feed; !got.HasPump || math.Abs(got.PumpFraction-1) > 1e-6 {
		t.Errorf("pump at %g, want all of it and soda ash for the rest", got.PumpFraction)
	}
	if b := a.Best.Binding; len(b) == 0 || b[len(b)-1].Source != FromPump {
		t.Errorf("binding %+v", b)
	}
}

// TestInfeasible: what conflicts is named with the move that it would take, and
// making that move makes room.
func TestInfeasible(t *testing.T) {
	task := Task{
		Base:       upland(t),
		Candidates: []Candidate{candidate(t, "caustic-25", 0.4), candidate(t, "soda-ash", 0.5)},
		Limits:     []Limit{between(PH, 8, 8.4), atLeast(Alkalinity, 2*caco3(60)), atMost(Sodium, milligrams(carbonate.Sodium, 25))},
	}
	_, err := Solve(task)
	var no *Infeasible
	if !errors.As(err, &no) {
		t.Fatalf("error %v, want an *Infeasible", err)
	}
	if len(no.Alone) == 0 && len(no.Together) == 0 {
		t.Fatal("nothing is named")
	}
	for _, r := range no.Alone {
		t.Logf("%s side %d: %g to %g", r.Bound.Quantity.Field(), r.Bound.Side, r.Bound.Value, r.Needed)
		checkRelaxation(t, task, r)
	}
	for _, r := range no.Together {
		t.Logf("together %s side %d: %g to %g", r.Bound.Quantity.Field(), r.Bound.Side, r.Bound.Value, r.Needed)
	}
	var p *dosing.Problem
	if !errors.As(err, &p) || p.Kind != dosing.NoAnswer || p.Code != "no_mix" || p.Field == "" || !p.Nearest.Given {
		t.Errorf("problem %+v", p)
	}
}

// checkRelaxation: moved a hair further than said there is a mix, a tenth less
// there is none.
func checkRelaxation(t *testing.T, task Task, r Relaxation) {
	t.Helper()
	try := func(share float64) error {
		moved := task
		moved.Limits = append([]Limit(nil), task.Limits...)
		moved.Candidates = append([]Candidate(nil), task.Candidates...)
		to := dosing.Some(r.Bound.Value + share*r.By())
		switch {
		case r.Bound.Source == FromLimit:
			for i := range moved.Limits {
				if l := &moved.Limits[i]; l.Quantity == r.Bound.Quantity {
					if r.Bound.Side == Low {
						l.Low = to
					} else {
						l.High = to
					}
				}
			}
		case r.Bound.Side == Low:
			moved.Candidates[r.Bound.Candidate].Least = to
		default:
			moved.Candidates[r.Bound.Candidate].Most = to
		}
		_, err := Solve(moved)
		return err
	}
	if err := try(1.00001); err != nil {
		t.Errorf("%+v: moved as said: %v", r, err)
	}
	if try(0.9) == nil {
		t.Errorf("%+v: nine tenths of it would do", r)
	}
}

// TestInfeasibleDose: a ceiling on a product is what is in the way.
func TestInfeasibleDose(t *testing.T) {
	task := Task{Base: upland(t), Candidates: []Candidate{candidate(t, "caustic-25", 0.4)}, Limits: []Limit{between(PH, 8.2, 8.6)}}
	task.Candidates[0].Most = dosing.Some(0.03)
	_, err := Solve(task)
	var no *Infeasible
	if !errors.As(err, &no) || len(no.Alone) != 2 {
		t.Fatalf("error %v", err)
	}
	for _, r := range no.Alone {
		checkRelaxation(t, task, r)
	}
}

// TestRelaxedPH: how far a pH bound has to move is the least, also where the
// water that lacks least alkalinity at the bound is not the nearest in pH.
func TestRelaxedPH(t *testing.T) {
	task := Task{
		Base: dosing.Case{Readings: dosing.Readings{
			PH: dosing.Some(7.42), Alkalinity: dosing.Some(2 * caco3(88.8)), Kelvin: dosing.Some(299.85),
			Calcium: dosing.Some(milligrams(carbonate.Calcium, 1.283)), Magnesium: dosing.Some(milligrams(carbonate.Magnesium, 9.55)),
			Sulfate: dosing.Some(milligrams(carbonate.Sulfate, 34.1)), Chloride: dosing.Some(milligrams(carbonate.Chloride, 9.05)),
			Sodium: dosing.Some(milligrams(carbonate.Sodium, 31.3)),
		}},
		Candidates: []Candidate{candidate(t, "caustic-25", 0.9), candidate(t, "bicarbonate", 0.65)},
		Limits:     []Limit{between(PH, 8.06, 8.54), between(CCPP, caco3(-17.1), caco3(-15.06))},
	}
	task.Candidates[1].Most = dosing.Some(0.0814)
	_, err := Solve(task)
	var no *Infeasible
	if !errors.As(err, &no) {
		t.Fatalf("error %v", err)
	}
	found := false
	for _, r := range no.Alone {
		found = found || r.Bound.Quantity == PH
		checkRelaxation(t, task, r)
	}
	if !found {
		t.Errorf("no pH among %+v", no.Alone)
	}
}

// TestInfeasibleTogether: two limits that no single move makes room for.
func TestInfeasibleTogether(t *testing.T) {
	task := Task{Base: upland(t), Candidates: []Candidate{candidate(t, "soda-ash", 0.4)},
		Limits: []Limit{atMost(Sodium, milligrams(carbonate.Sodium, 3)), between(Calcium, milligrams(carbonate.Calcium, 20), milligrams(carbonate.Calcium, 30))}}
	_, err := Solve(task)
	var no *Infeasible
	if !errors.As(err, &no) || len(no.Alone) != 0 || len(no.Together) != 2 {
		t.Fatalf("error %v: %+v", err, no)
	}
	for _, r := range no.Together {
		if q := r.Bound.Quantity; q == Sodium && math.Abs(r.Needed-milligrams(carbonate.Sodium, 6)) > 1e-9 ||
			q == Calcium && math.Abs(r.Needed-milligrams(carbonate.Calcium, 7.2)) > 1e-9 {
			t.Errorf("%s to %g: soda ash cannot take sodium out or bring calcium", q.Field(), r.Needed)
		}
	}
}

// TestRefusedTasks: each thing that cannot be read, by its code and field.
func TestRefusedTasks(t *testing.T) {
	good := func() Task {
		return Task{Base: upland(t), Candidates: []Candidate{candidate(t, "caustic-25", 0.4)}, Limits: []Limit{between(PH, 8, 8.4)}}
	}
	for _, c := range []struct {
		code, field string
		spoil       func(*Task)
	}{
		{"missing", "product", func(t *Task) { t.Candidates = nil }},
		{"missing", "limit", func(t *Task) { t.Limits = nil }},
		{"missing", "ph", func(t *Task) { t.Limits[0] = Limit{Quantity: PH} }},
		{"too_many_products", "product", func(t *Task) { t.Candidates = make([]Candidate, 7) }},
		{"product_twice", "product", func(t *Task) { t.Candidates = append(t.Candidates, t.Candidates[0]) }},
		{"limit_twice", "ph", func(t *Task) { t.Limits = append(t.Limits, t.Limits[0]) }},
		{"limit_crossed", "ph", func(t *Task) { t.Limits[0] = between(PH, 8.4, 8) }},
		{"outside_range", "ph", func(t *Task) { t.Limits[0] = between(PH, 8, 15) }},
		{"outside_range", "sodium", func(t *Task) { t.Limits[0] = atMost(Sodium, math.NaN()) }},
		{"unknown_quantity", "limit", func(t *Task) { t.Limits[0].Quantity = 99 }},
		{"outside_range", "price", func(t *Task) { t.Candidates[0].Price = -1 }},
		{"outside_range", "price", func(t *Task) { t.Candidates[0].Price = math.Inf(1) }},
		{"outside_range", "turndown", func(t *Task) { t.Candidates[0].Turndown = 1 }},
		{"outside_range", "most", func(t *Task) { t.Candidates[0].Most = dosing.Some(-1) }},
		{"dose_range_crossed", "product", func(t *Task) {
			t.Candidates[0].Least, t.Candidates[0].Most = dosing.Some(0.2), dosing.Some(0.1)
		}},
		{"outside_range", "alternatives", func(t *Task) { t.Alternatives = 99 }},
		{"outside_range", "strength", func(t *Task) { t.Candidates[0].Product.Strength = 0 }},
		{"density_unknown", "strength", func(t *Task) {
			t.Candidates[0].Product.Strength, t.Candidates[0].Feed.PumpCapacity = 0.9, dosing.Some(1e-6)
		}},
		{"missing", "flow", func(t *Task) {
			t.Base.Readings.Flow, t.Candidates[0].Feed.PumpCapacity = dosing.None, dosing.Some(1e-6)
		}},
		{"calcium_needed", "calcium", func(t *Task) {
			t.Base.Readings.Calcium, t.Limits[0] = dosing.None, atLeast(SaturationIndex, 0)
		}},
		{"missing", "sodium", func(t *Task) { t.Base.Readings.Sodium, t.Limits[0] = dosing.None, atMost(Sodium, 1e-3) }},
		{"missing", "sulfate", func(t *Task) { t.Base.Readings.Sulfate, t.Limits[0] = dosing.None, atMost(ChlorideSulfate, 1) }},
		{"missing", "ph", func(t *Task) { t.Base.Readings.PH = dosing.None }},
		{"target_beside_limits", "target-ph", func(t *Task) { t.Base.Target = dosing.Target{Kind: dosing.TargetPH, Value: 8} }},
		{"fixed_dose_needed", "add", func(t *Task) { t.Base.Additions[0].Solve = true }},
	} {
		task := good()
		c.spoil(&task)
		_, err := Solve(task)
		var p *dosing.Problem
		if !errors.As(err, &p) || p.Code != c.code || p.Field != c.field || p.Kind != dosing.BadInput {
			t.Errorf("want %s of %s, got %+v", c.code, c.field, err)
		}
	}
}

// TestOrganicAlkalinity: with organic acids the limit is on the titrated
// alkalinity, the one that the finished water is described with.
func TestOrganicAlkalinity(t *testing.T) {
	task := Task{Base: upland(t), Candidates: []Candidate{candidate(t, "soda-ash", 0.4)}, Limits: []Limit{between(Alkalinity, 2*caco3(40), 2*caco3(40))}}
	task.Base.Readings.Acetate = dosing.Some(20e-3 / carbonate.Acetate.MolarMass())
	a := solve(t, task)
	f := &a.Best.Result.Finished().Figures
	if math.Abs(f.Alkalinity-2*caco3(40)) > 1e-9 || math.Abs(f.Water.Alkalinity-f.Alkalinity) < 1e-6 {
		t.Errorf("titrated %g, conserved %g", f.Alkalinity, f.Water.Alkalinity)
	}
}

// TestQuantityNames: every quantity has a name of its own and is found by it.
func TestQuantityNames(t *testing.T) {
	if n := len(Quantities()); n != 11 {
		t.Errorf("%d quantities", n)
	}
	for _, q := range Quantities() {
		if got, ok := QuantityNamed(q.Field()); !ok || got != q {
			t.Errorf("%q is found as %d", q.Field(), got)
		}
	}
	if _, ok := QuantityNamed("colour"); ok {
		t.Error("a quantity that there is not")
	}
}

// TestHardStops: the largest dose looked for is the largest that is accepted.
func TestHardStops(t *testing.T) {
	for _, p := range dosing.Products() {
		c := upland(t)
		c.Readings.Alkalinity, c.Readings.PH = dosing.Some(2*caco3(2000)), dosing.Some(8.0)
		c.Additions = []dosing.Addition{{Product: p, Dose: dosing.Some(dosing.GreatestDose(p) * 1.001)}}
		_, err := dosing.Solve(c)
		var problem *dosing.Problem
		if !errors.As(err, &problem) || problem.Code != "dose_outside_range" {
			t.Errorf("%s: a thousandth over the hard stop: %v", p.Name, err)
		}
		c.Additions[0].Dose = dosing.Some(dosing.GreatestDose(p))
		if _, err = dosing.Solve(c); errors.As(err, &problem) && problem.Code == "dose_outside_range" {
			t.Errorf("%s: the hard stop itself is refused", p.Name)
		}
	}
}
