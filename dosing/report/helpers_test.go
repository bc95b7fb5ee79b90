package report

import (
	"testing"

	"beckline/dosing"
	"beckline/dosing/reading"
)

// soft is a settled upland water with every common reading.
func soft(t *testing.T) dosing.Readings {
	t.Helper()
	return dosing.Readings{
		PH:           si(t, "ph", 6.28),
		Alkalinity:   si(t, "alkalinity", 13),
		Kelvin:       si(t, "temperature", 8),
		Flow:         si(t, "flow", 240),
		Calcium:      si(t, "calcium", 7.2),
		Magnesium:    si(t, "magnesium", 1.5),
		Sulfate:      si(t, "sulfate", 16.6),
		Chloride:     si(t, "chloride", 8),
		Sodium:       si(t, "sodium", 6),
		Conductivity: si(t, "conductivity", 78),
	}
}

// si is a value of a field, given in its bare unit.
func si(t *testing.T, field string, bare float64) dosing.Optional {
	t.Helper()
	f, ok := reading.Lookup(field)
	if !ok {
		t.Fatalf("no field %s", field)
	}
	return dosing.Some(f.FromBare(bare))
}

// solved is a document of a water brought to pH 8.4.
func solved(t *testing.T, r dosing.Readings, product string, pump dosing.Optional) Document {
	t.Helper()
	return New(solve(t, r, product, pump))
}

func solve(t *testing.T, r dosing.Readings, product string, pump dosing.Optional) *dosing.Result {
	t.Helper()
	p, ok := dosing.ProductByName(product)
	if !ok {
		t.Fatalf("no product %s", product)
	}
	result, err := dosing.Solve(dosing.Case{
		Readings:  r,
		Additions: []dosing.Addition{{Product: p, Solve: true, Feed: dosing.FeedSetup{PumpCapacity: pump}}},
		Target:    dosing.Target{Kind: dosing.TargetPH, Value: 8.4},
	})
	if err != nil {
		t.Fatal(err)
	}
	return result
}

// given is a document of a water with one dose that is given, mg/L.
func given(t *testing.T, r dosing.Readings, product string, mgPerLitre float64) Document {
	t.Helper()
	p, ok := dosing.ProductByName(product)
	if !ok {
		t.Fatalf("no product %s", product)
	}
	result, err := dosing.Solve(dosing.Case{
		Readings:  r,
		Additions: []dosing.Addition{{Product: p, Dose: dosing.Some(mgPerLitre / 1000 / p.Chemical.MolarMass)}},
	})
	if err != nil {
		t.Fatal(err)
	}
	return New(result)
}
