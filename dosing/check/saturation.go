package check

import (
	"fmt"
	"math"

	"beckline/carbonate"
)

// saturation computes a saturation pH, or its constant C, from the model.
func saturation(r record) Outcome {
	o := Outcome{
		Name:      fmt.Sprintf("%s at %s C, I %s", r["quantity"], r["temperature_c"], r["ionic_strength_mol_l"]),
		Unit:      "pH",
		Published: r.number("value"), Tolerance: r.number("tolerance"),
	}
	if r["quantity"] == "pHs" {
		o.Value, o.Err = saturationPH(r)
	} else {
		o.Value, o.Err = saturationConstant(r)
	}
	return o
}

// saturationPH is the pH less the saturation index of the given water.
func saturationPH(r record) (float64, error) {
	k, err := carbonate.ConstantsAt(r.kelvin())
	if err != nil {
		return 0, err
	}
	w := carbonate.Water{
		Kelvin:     r.kelvin(),
		Alkalinity: r.number("alkalinity_mg_l_caco3") * 2 / carbonate.MolarMassCaCO3 / 1000,
	}
	w.Totals[carbonate.Calcium] = r.number("calcium_hardness_mg_l_caco3") / carbonate.MolarMassCaCO3 / 1000
	pH := r.number("ph")
	state, _, err := k.FromPH(pH, w, carbonate.IonicInput{Measured: r.number("ionic_strength_mol_l")})
	if err != nil {
		return 0, err
	}
	index, _, ok := state.SaturationIndex()
	if !ok {
		return 0, fmt.Errorf("check: no saturation index")
	}
	return pH - index, nil
}

// saturationConstant is C of pHs = pCa + pAlk + C, with concentrations: from
// the two equilibria, C = pK2 - pKs - log(g1 g2).
func saturationConstant(r record) (float64, error) {
	// A trace of bicarbonate, so that the given ionic strength is all there is.
	const trace = 1e-9
	w := carbonate.Water{Kelvin: r.kelvin(), Alkalinity: trace, Background: r.number("ionic_strength_mol_l")}
	w.Totals[carbonate.Sodium], w.Totals[carbonate.Carbon] = trace, trace
	state, err := carbonate.Solve(w)
	if err != nil {
		return 0, err
	}
	k := state.Constants()
	_, g1, g2, _ := state.ActivityCoefficients()
	return math.Log10(k.Calcite/k.Carbonic2) - math.Log10(g1*g2), nil
}
