package margin_test

import (
	"math"
	"testing"

	"beckline/carbonate"
	"beckline/dosing"
	"beckline/dosing/margin"
)

// TestOtherTrains: whatever the water meets on its way, the ranges of the dose
// and of the finished pH are those of the answers at the ends of the reading.
func TestOtherTrains(t *testing.T) {
	caustic := dosing.Addition{Product: product(t, "caustic-25"), Solve: true}
	alum := dosing.Addition{Product: product(t, "alum-dry"), Dose: dosing.Some(22e-3 / 599.76)}
	chlorine := dosing.Addition{Product: product(t, "chlorine-gas"), Dose: dosing.Some(2e-3 / 70.906), Demand: dosing.Some(0.7e-3 / 70.906)}
	for _, c := range []struct {
		name   string
		change func(*dosing.Case)
	}{
		{"tower", func(c *dosing.Case) {
			c.Additions = []dosing.Addition{alum, {Process: dosing.Aeration, Share: dosing.Some(0.6)}, caustic}
		}},
		{"tower with the pH behind it measured", func(c *dosing.Case) {
			c.Additions = []dosing.Addition{{Process: dosing.Aeration, PH: dosing.Some(7.5)}, alum, caustic}
		}},
		{"contactor", func(c *dosing.Case) {
			c.Additions = []dosing.Addition{{Product: product(t, "carbon-dioxide"), Dose: dosing.Some(1e-4)}, {Process: dosing.LimestoneContactor}, caustic}
			c.Target.Value = 9
		}},
		{"chlorine demand", func(c *dosing.Case) { c.Additions = []dosing.Addition{alum, caustic, chlorine} }},
		{"target between", func(c *dosing.Case) {
			c.Additions = []dosing.Addition{{Product: product(t, "sulfuric-93"), Solve: true}, alum, {Product: caustic.Product, Dose: dosing.Some(3e-4)}}
			c.Target.Value, c.TargetAt = 5.9, 2
		}},
		{"carbon asked for", func(c *dosing.Case) {
			c.Additions = []dosing.Addition{{Product: product(t, "soda-ash"), Solve: true}}
			c.Target = dosing.Target{Kind: dosing.TargetDIC, Value: 1e-3}
		}},
	} {
		k := upland(t)
		c.change(&k)
		r := solve(t, k)
		m, err := margin.Of(r, only(t, "ph", margin.Tolerance{Absolute: 0.06}), margin.Options{Method: margin.Draws, Draws: 1000})
		if err != nil {
			t.Fatalf("%s: %v", c.name, err)
		}
		var dose, pH [2]float64
		for i, by := range []float64{-0.06, 0.06} {
			moved := k
			moved.Readings.PH.Value += by
			dose[i] = solve(t, moved).Dose().Dose
			set := moved
			set.Target, set.TargetAt = dosing.Target{}, 0
			set.Additions = append([]dosing.Addition(nil), k.Additions...)
			for j := range set.Additions {
				if set.Additions[j].Solve {
					set.Additions[j].Solve, set.Additions[j].Dose = false, dosing.Some(r.Dose().Dose)
				}
			}
			pH[i] = solve(t, set).Finished().Figures.PH
		}
		for what, v := range map[string]struct {
			got  margin.Range
			ends [2]float64
		}{"dose": {m.Dose, dose}, "finished pH": {m.FinishedPH, pH}} {
			low, high := min(v.ends[0], v.ends[1]), max(v.ends[0], v.ends[1])
			slack := 0.04*(high-low) + 1e-4*high
			if math.Abs(v.got.Low-low) > slack || math.Abs(v.got.High-high) > slack {
				t.Errorf("%s: %s %+v, want %g to %g", c.name, what, v.got, low, high)
			}
		}
		if apart := m.FirstOrder.DoseDeviation - m.DoseDeviation; math.Abs(apart) > 0.04*m.DoseDeviation+1e-12 {
			t.Errorf("%s: deviation %g at first order, %g by draws", c.name, m.FirstOrder.DoseDeviation, m.DoseDeviation)
		}
	}
}

// TestTwoDoses: both doses of a pair have the ranges of the pairs answered at
// the ends of the reading.
func TestTwoDoses(t *testing.T) {
	c := upland(t)
	c.Additions = []dosing.Addition{c.Additions[0], {Product: product(t, "bicarbonate"), Solve: true}, {Product: product(t, "caustic-25"), Solve: true}}
	c.Second = dosing.Target{Kind: dosing.TargetAlkalinity, Value: alkalinity(45)}
	m := of(t, c, only(t, "ph", margin.Tolerance{Absolute: 0.03}), margin.Options{Method: margin.Draws, Draws: 1000})
	at := func(by float64) (a, b float64) {
		k := c
		k.Readings.PH.Value += by
		d := solve(t, k).Doses()
		return d[0].Dose, d[1].Dose
	}
	a0, b0 := at(-0.03)
	a1, b1 := at(0.03)
	if m.Second == nil || m.FirstOrder.Second == nil {
		t.Fatal("the second dose has no range")
	}
	for _, v := range []struct {
		what string
		got  margin.Range
		a, b float64
	}{
		{"first", m.Dose, a0, a1}, {"second", m.Second.Dose, b0, b1},
		{"first, first order", m.FirstOrder.Dose, a0, a1}, {"second, first order", m.FirstOrder.Second.Dose, b0, b1},
	} {
		low, high := min(v.a, v.b), max(v.a, v.b)
		if slack := 0.1 * (high - low); math.Abs(v.got.Low-low) > slack || math.Abs(v.got.High-high) > slack {
			t.Errorf("%s: %+v, want %g to %g", v.what, v.got, low, high)
		}
	}
	m = of(t, c, margin.Defaults(), margin.Options{Method: margin.FirstOrder})
	names := map[string]bool{}
	for _, s := range m.FeedShares {
		names[s.Reading] = true
	}
	if !names["bicarbonate strength"] || !names["caustic-25 strength"] {
		t.Errorf("two strengths are not told apart: %+v", m.FeedShares)
	}
}

// TestBlend: each source's readings vary apart, and so do their parts.
func TestBlend(t *testing.T) {
	hard := well(t).Readings
	softened := dosing.Readings{PH: dosing.Some(9.95), Alkalinity: dosing.Some(alkalinity(62)), Kelvin: hard.Kelvin,
		Calcium: mg(34, carbonate.Calcium), Conductivity: dosing.Some(250e-4)}
	c := dosing.Case{
		Readings:  dosing.Readings{Flow: dosing.Some(0.14)},
		Sources:   []dosing.Source{{Name: "well", Readings: hard, Flow: dosing.Some(0.4)}, {Name: "softened", Readings: softened, Flow: dosing.Some(0.6)}},
		Additions: []dosing.Addition{{Product: product(t, "caustic-25"), Solve: true}},
		Target:    dosing.Target{Kind: dosing.TargetPH, Value: 8.3},
	}
	m := of(t, c, margin.Defaults(), margin.Options{Method: margin.Draws, Draws: 2000})
	sum := 0.0
	shares := map[string]float64{}
	for _, s := range m.Shares {
		sum += s.Fraction
		shares[s.Reading] = s.Fraction
	}
	if math.Abs(sum-1) > 1e-9 || len(m.Shares) != 10 {
		t.Errorf("%d shares sum to %g: %+v", len(m.Shares), sum, m.Shares)
	}
	if m.Repeat != "well ph" {
		t.Errorf("the well brings the carbonic acid, but %q is to be repeated (%+v)", m.Repeat, m.Shares)
	}
	if !(shares["well flow"] > 0.01) || shares["flow"] > 1e-9 {
		t.Errorf("parts of the blend move the dose, the whole flow does not: %+v", m.Shares)
	}
	alone := of(t, c, only(t, "flow", margin.Tolerance{Relative: 0.03}), margin.Options{Method: margin.FirstOrder})
	at := func(by float64) float64 {
		k := c
		k.Sources = append([]dosing.Source(nil), c.Sources...)
		k.Sources[0].Flow.Value *= 1 + by
		return solve(t, k).Dose().Dose
	}
	// The two parts' errors are equal and opposite in what they do: root two of one.
	one := math.Abs(at(0.03)-at(-0.03)) / 2
	if half := (alone.Dose.High - alone.Dose.Low) / 2; math.Abs(half/(one*math.Sqrt2)-1) > 0.02 {
		t.Errorf("parts of the blend give a half-width of %g, want %g", half, one*math.Sqrt2)
	}
}

// BenchmarkDrawsThroughTower is a train that must be walked, with the draws that
// such a one gets.
func BenchmarkDrawsThroughTower(b *testing.B) {
	c := upland(b)
	c.Additions = []dosing.Addition{{Process: dosing.Aeration, Share: dosing.Some(0.6)}, c.Additions[1]}
	benchmark(b, c, margin.Options{Method: margin.Draws})
}
