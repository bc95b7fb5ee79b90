package mix

import (
	"errors"
	"math"
	"math/rand/v2"
	"testing"

	"beckline/carbonate"
	"beckline/dosing"
)

func product(t testing.TB, name string) dosing.Product {
	t.Helper()
	p, ok := dosing.ProductByName(name)
	if !ok {
		t.Fatalf("no product %q", name)
	}
	return p
}

func caco3(mgL float64) float64 { return mgL * 1e-3 / carbonate.MolarMassCaCO3 } // mol/L; an equivalent is half

// settled is a soft settled water at 8 C: pH 6.28, alkalinity 13.0 mg/L as CaCO3.
func settled(t testing.TB) carbonate.State {
	t.Helper()
	k, err := carbonate.ConstantsAt(281.15)
	if err != nil {
		t.Fatal(err)
	}
	var w carbonate.Water
	w.Alkalinity = 2 * caco3(13)
	mg := func(c carbonate.Component, v float64) { w.Totals[c] = v * 1e-3 / c.MolarMass() }
	mg(carbonate.Calcium, 7.2)
	mg(carbonate.Magnesium, 1.5)
	mg(carbonate.Sodium, 6)
	mg(carbonate.Chloride, 8)
	mg(carbonate.Sulfate, 16)
	s, _, err := k.FromPH(6.28, w, carbonate.IonicInput{})
	if err != nil {
		t.Fatal(err)
	}
	return s
}

// TestPairByArithmetic: where neither goal is a pH the doses follow from the
// reactions by hand. 1 mol of soda ash brings 2 eq of alkalinity and 1 mol of
// carbon, 1 mol of bicarbonate 1 eq and 1 mol.
func TestPairByArithmetic(t *testing.T) {
	base := settled(t)
	for _, c := range []struct{ ash, bicarbonate float64 }{{2e-4, 3e-4}, {0, 5e-4}, {4e-4, 0}} {
		goals := [2]Goal{
			{Alkalinity, base.Water.Alkalinity + 2*c.ash + c.bicarbonate},
			{DIC, base.Water.Totals[carbonate.Carbon] + c.ash + c.bicarbonate},
		}
		b, err := Pair(base, [2]dosing.Product{product(t, "soda-ash"), product(t, "bicarbonate")}, goals)
		if err != nil {
			t.Fatalf("%+v: %v", c, err)
		}
		if math.Abs(b.Doses[0]-c.ash) > 1e-10 || math.Abs(b.Doses[1]-c.bicarbonate) > 1e-10 {
			t.Errorf("doses %v, want %+v", b.Doses, c)
		}
	}
}

// TestPairsClose: random pairs of doses are found again from the two figures of
// the water that they make, whatever the two figures are, or others that make
// the same two.
func TestPairsClose(t *testing.T) {
	r := rand.New(rand.NewPCG(31, 32))
	pairs := [][2]string{{"soda-ash", "carbon-dioxide"}, {"caustic-25", "bicarbonate"}, {"lime", "carbon-dioxide"},
		{"caustic-25", "carbon-dioxide"}, {"soda-ash", "sulfuric-93"}, {"bicarbonate", "soda-ash"}, {"lime", "bicarbonate"}}
	goals := [][2]Quantity{{PH, Alkalinity}, {PH, CCPP}, {PH, DIC}, {Alkalinity, PH}, {Alkalinity, CCPP},
		{DIC, CCPP}, {PH, SaturationIndex}, {Alkalinity, SaturationIndex}}
	base := settled(t)
	solved, worst := 0, 0.0
	for range 600 {
		pair, goal := pairs[r.IntN(len(pairs))], goals[r.IntN(len(goals))]
		products := [2]dosing.Product{product(t, pair[0]), product(t, pair[1])}
		w := base.Water
		for i := range products {
			w = w.Add(reagent(&products[i]), 6e-4*r.Float64())
		}
		s, err := base.Constants().Solve(w)
		if err != nil {
			t.Fatal(err)
		}
		if s.PH < 5.5 || s.PH > 10.5 {
			continue
		}
		var g [2]Goal
		for i := range g {
			v, ok := quantityOf(&s, goal[i], false)
			if !ok {
				t.Fatalf("no %s", goal[i].Field())
			}
			g[i] = Goal{goal[i], v}
		}
		b, err := Pair(base, products, g)
		if err != nil {
			t.Errorf("%v to %+v: %v", pair, g, err)
			continue
		}
		// The state is checked by another way to its pH.
		again, err := base.Constants().SolveByBracket(b.State.Water)
		if err != nil {
			t.Fatal(err)
		}
		for i := range g {
			v, _ := quantityOf(&again, g[i].Quantity, false)
			off := math.Abs(v-g[i].Value) / g[i].unit(base.Water.Alkalinity)
			if off > 1e-6 {
				t.Errorf("%v to %+v: %s is %g off", pair, g, g[i].Quantity.Field(), off)
			}
			worst = max(worst, off)
		}
		for _, d := range b.Doses {
			if d < 0 {
				t.Errorf("%v to %+v: negative dose %g", pair, g, d)
			}
		}
		solved++
	}
	if solved < 300 {
		t.Fatalf("only %d pairs were tried", solved)
	}
	t.Logf("%d pairs, worst closure %.2g", solved, worst)
}

// TestPairByTheTrain: the same two doses as the train finds by its own way, for
// every kind of target.
func TestPairByTheTrain(t *testing.T) {
	for _, c := range []struct {
		names   [2]string
		targets [2]dosing.Target
	}{
		{[2]string{"soda-ash", "carbon-dioxide"}, [2]dosing.Target{{Kind: dosing.TargetPH, Value: 7.6}, {Kind: dosing.TargetAlkalinity, Value: 2 * caco3(60)}}},
		{[2]string{"lime", "carbon-dioxide"}, [2]dosing.Target{{Kind: dosing.TargetPH, Value: 8.2}, {Kind: dosing.TargetCCPP, Value: caco3(1)}}},
		{[2]string{"caustic-25", "bicarbonate"}, [2]dosing.Target{{Kind: dosing.TargetPH, Value: 8.4}, {Kind: dosing.TargetDIC, Value: 9e-4}}},
		{[2]string{"lime", "bicarbonate"}, [2]dosing.Target{{Kind: dosing.TargetSaturationIndex, Value: 0}, {Kind: dosing.TargetAlkalinity, Value: 2 * caco3(70)}}},
	} {
		train := upland(t)
		before, err := dosing.Solve(train)
		if err != nil {
			t.Fatal(err)
		}
		base, err := carbonate.Solve(before.Finished().Figures.Water)
		if err != nil {
			t.Fatal(err)
		}
		var products [2]dosing.Product
		var goals [2]Goal
		for i := range products {
			products[i] = product(t, c.names[i])
			train.Additions = append(train.Additions, dosing.Addition{Product: products[i], Solve: true})
			goals[i], _ = GoalOf(c.targets[i])
		}
		train.Target, train.Second = c.targets[0], c.targets[1]
		r, err := dosing.Solve(train)
		if err != nil {
			t.Fatalf("%v: %v", c.names, err)
		}
		b, err := Pair(base, products, goals)
		if err != nil {
			t.Fatalf("%v: %v", c.names, err)
		}
		for i := range b.Doses {
			if want := r.Stations[2+i].Dose; math.Abs(b.Doses[i]-want) > 1e-6*want {
				t.Errorf("%s: %.9g mol/L, the train says %.9g", c.names[i], b.Doses[i], want)
			}
		}
	}
	if _, ok := GoalOf(dosing.Target{}); ok {
		t.Error("no target is taken for a goal")
	}
}

// TestPairApart: caustic and soda ash both raise the pH, so a little more
// alkalinity than the water has cannot go with a pH below its own. The nearest
// pH with that alkalinity is checked against each product alone.
func TestPairApart(t *testing.T) {
	base := settled(t)
	products := [2]dosing.Product{product(t, "soda-ash"), product(t, "caustic-25")}
	goals := [2]Goal{{Alkalinity, base.Water.Alkalinity + 2*caco3(10)}, {PH, 6.0}}
	_, err := Pair(base, products, goals)
	var apart *Apart
	if !errors.As(err, &apart) {
		t.Fatalf("error %v, want an *Apart", err)
	}
	// All by soda ash adds carbon and stays lowest.
	ash, err := base.Constants().Solve(base.Water.Add(reagent(&products[0]), caco3(10)))
	if err != nil {
		t.Fatal(err)
	}
	if got := apart.Nearest[1]; !got.Given || math.Abs(got.Value-ash.PH) > 1e-6 {
		t.Errorf("nearest pH %v, by soda ash alone %g", got, ash.PH)
	}
	if apart.Binding[1] != 1 {
		t.Errorf("binding product %d, want caustic", apart.Binding[1])
	}
	if apart.Nearest[0].Given {
		t.Errorf("nearest alkalinity %v at a pH that no base reaches", apart.Nearest[0])
	}
	var p *dosing.Problem
	if !errors.As(err2(base, products, goals), &p) || p.Kind != dosing.NoAnswer || p.Given != "caustic-25" || p.Field != "target-ph" {
		t.Errorf("problem %+v", p)
	}
}

func err2(base carbonate.State, products [2]dosing.Product, goals [2]Goal) error {
	_, err := Pair(base, products, goals)
	return err
}

func TestPairRefusals(t *testing.T) {
	base := settled(t)
	ash, co2 := product(t, "soda-ash"), product(t, "carbon-dioxide")
	chlorine, ammonia := product(t, "chlorine-gas"), product(t, "ammonia-19")
	ph, alk := Goal{PH, 8}, Goal{Alkalinity, 1e-3}
	for _, c := range []struct {
		code     string
		products [2]dosing.Product
		goals    [2]Goal
	}{
		{"product_twice", [2]dosing.Product{ash, ash}, [2]Goal{ph, alk}},
		{"target_twice", [2]dosing.Product{ash, co2}, [2]Goal{ph, ph}},
		{"outside_range", [2]dosing.Product{ash, co2}, [2]Goal{{PH, 15}, alk}},
		{"outside_range", [2]dosing.Product{ash, co2}, [2]Goal{ph, {Alkalinity, math.NaN()}}},
		{"missing", [2]dosing.Product{ash, co2}, [2]Goal{ph, {}}},
		{"chlorine_with_ammonia", [2]dosing.Product{chlorine, ammonia}, [2]Goal{ph, alk}},
	} {
		var p *dosing.Problem
		if err := err2(base, c.products, c.goals); !errors.As(err, &p) || p.Code != c.code || p.Kind != dosing.BadInput {
			t.Errorf("%+v: %v, want %s", c.goals, err, c.code)
		}
	}
}

func BenchmarkPair(b *testing.B) {
	base := settled(b)
	products := [2]dosing.Product{product(b, "soda-ash"), product(b, "carbon-dioxide")}
	goals := [2]Goal{{PH, 7.5}, {Alkalinity, 2 * caco3(50)}}
	for b.Loop() {
		if _, err := Pair(base, products, goals); err != nil {
			b.Fatal(err)
		}
	}
}
