package margin_test

import (
	"testing"

	"beckline/carbonate"
	"beckline/dosing"
	"beckline/dosing/margin"
)

func mg(v float64, c carbonate.Component) dosing.Optional {
	return dosing.Some(v * 1e-3 / c.MolarMass())
}

func product(tb testing.TB, name string) dosing.Product {
	tb.Helper()
	p, ok := dosing.ProductByName(name)
	if !ok {
		tb.Fatalf("no product %s", name)
	}
	return p
}

// alkalinity turns mg/L as CaCO3 into eq/L.
func alkalinity(v float64) float64 { return 2e-3 * v / carbonate.MolarMassCaCO3 }

// upland is a soft cold water after alum, to be brought to pH 8.4 with caustic.
func upland(tb testing.TB) dosing.Case {
	tb.Helper()
	return dosing.Case{
		Readings: dosing.Readings{
			PH: dosing.Some(6.90), Alkalinity: dosing.Some(alkalinity(24)), Kelvin: dosing.Some(281.15),
			Calcium: mg(7.2, carbonate.Calcium), Magnesium: mg(1.5, carbonate.Magnesium), Sulfate: mg(6, carbonate.Sulfate),
			Chloride: mg(8, carbonate.Chloride), Sodium: mg(6, carbonate.Sodium),
			Conductivity: dosing.Some(78e-4), Flow: dosing.Some(240.0 / 3600),
		},
		Additions: []dosing.Addition{
			{Product: product(tb, "alum-dry"), Dose: dosing.Some(22e-3 / 599.76)},
			{Product: product(tb, "caustic-25"), Solve: true},
		},
		Target: dosing.Target{Kind: dosing.TargetPH, Value: 8.4},
	}
}

// well is a hard well buffered water, brought to pH 7.6 with caustic.
func well(tb testing.TB) dosing.Case {
	tb.Helper()
	return dosing.Case{
		Readings: dosing.Readings{
			PH: dosing.Some(7.15), Alkalinity: dosing.Some(alkalinity(285)), Kelvin: dosing.Some(284.65),
			Calcium: mg(106, carbonate.Calcium), Magnesium: mg(14, carbonate.Magnesium), Sulfate: mg(28, carbonate.Sulfate),
			Chloride: mg(22, carbonate.Chloride), Sodium: mg(10.5, carbonate.Sodium),
			Conductivity: dosing.Some(640e-4), Flow: dosing.Some(0.14),
		},
		Additions: []dosing.Addition{{Product: product(tb, "caustic-50"), Solve: true}},
		Target:    dosing.Target{Kind: dosing.TargetPH, Value: 7.6},
	}
}

func solve(tb testing.TB, c dosing.Case) *dosing.Result {
	tb.Helper()
	r, err := dosing.Solve(c)
	if err != nil {
		tb.Fatal(err)
	}
	return r
}

func benchmark(b *testing.B, c dosing.Case, o margin.Options) {
	r := solve(b, c)
	tol := margin.Defaults()
	b.ReportAllocs()
	b.ResetTimer()
	for b.Loop() {
		if _, err := margin.Of(r, tol, o); err != nil {
			b.Fatal(err)
		}
	}
}

func BenchmarkFirstOrder(b *testing.B) {
	benchmark(b, upland(b), margin.Options{Method: margin.FirstOrder})
}

func BenchmarkDraws(b *testing.B) {
	benchmark(b, upland(b), margin.Options{Method: margin.Draws})
}

func BenchmarkDrawsToIndex(b *testing.B) {
	c := upland(b)
	c.Target = dosing.Target{Kind: dosing.TargetSaturationIndex, Value: -1}
	benchmark(b, c, margin.Options{Method: margin.Draws})
}

func BenchmarkDrawsToCCPP(b *testing.B) {
	c := upland(b)
	c.Target = dosing.Target{Kind: dosing.TargetCCPP, Value: -5e-3 / carbonate.MolarMassCaCO3}
	benchmark(b, c, margin.Options{Method: margin.Draws})
}
