package dosing_test

import (
	"testing"

	"beckline/dosing"
)

// TestPHAfterIsSolve: the curve's pH is the pH that Solve gives with that dose.
func TestPHAfterIsSolve(t *testing.T) {
	c := dosing.Case{Readings: soft(), Target: dosing.Target{Kind: dosing.TargetPH, Value: 8.5},
		Additions: []dosing.Addition{fixed(t, "alum-dry", 12), {Product: product(t, "caustic-50"), Solve: true}, fixed(t, "soda-ash", 5)}}
	r, err := dosing.Solve(c)
	if err != nil {
		t.Fatal(err)
	}
	whole := r.Dose().Dose
	shares := []float64{0, 0.25, 0.9, 1, 1.5}
	doses := make([]float64, len(shares))
	for i, share := range shares {
		doses[i] = share * whole
	}
	for i, got := range dosing.PHAfter(r, doses) {
		given := c
		given.Target = dosing.Target{}
		given.Additions = append([]dosing.Addition(nil), c.Additions...)
		given.Additions[1] = dosing.Addition{Product: product(t, "caustic-50"), Dose: dosing.Some(doses[i])}
		want, err := dosing.Solve(given)
		if err != nil {
			t.Fatal(err)
		}
		if !got.Given {
			t.Fatalf("no pH at %g of the dose", shares[i])
		}
		near(t, "pH", got.Value, want.Finished().Figures.PH, 1e-12)
	}
	if got := dosing.PHAfter(r, []float64{5}); got[0].Given {
		t.Errorf("5 mol/L of caustic has pH %g", got[0].Value)
	}
}
