package mix

import (
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
