package check

import (
	"fmt"
	"regexp"

	"beckline/carbonate"
)

// salt is what one mole of a salt brings into a water.
type salt struct {
	totals      carbonate.Totals
	equivalents float64 // eq of alkalinity per mole, by the proton condition
}

var salts = map[string]salt{
	"NaHCO3":  {carbonate.Totals{carbonate.Sodium: 1, carbonate.Carbon: 1}, 1},
	"Na2CO3":  {carbonate.Totals{carbonate.Sodium: 2, carbonate.Carbon: 1}, 2},
	"KH2PO4":  {carbonate.Totals{carbonate.Potassium: 1, carbonate.Phosphate: 1}, 0},
	"Na2HPO4": {carbonate.Totals{carbonate.Sodium: 2, carbonate.Phosphate: 1}, 1},
	// Borax dissolves to two boric acids and two borates.
	"Na2B4O7.10H2O": {carbonate.Totals{carbonate.Sodium: 2, carbonate.Boron: 4}, 2},
}

var part = regexp.MustCompile(`([0-9.]+) mol/(?:kg|L) (\S+)`)

// buffer solves the pH of a standard buffer from its composition through the
// whole model. Molality is taken as mol/L, as everywhere here.
func buffer(r record) Outcome {
	o := Outcome{
		Name:      fmt.Sprintf("%s at %s C", r["composition"], r["temperature_c"]),
		Unit:      "pH",
		Published: r.number("ph"), Tolerance: r.number("tolerance"),
	}
	w := carbonate.Water{Kelvin: r.kelvin()}
	for _, m := range part.FindAllStringSubmatch(r["composition"], -1) {
		amount := record{"n": m[1]}.number("n")
		s, ok := salts[m[2]]
		if !ok {
			o.Err = fmt.Errorf("check: unknown salt %s", m[2])
			return o
		}
		for i, n := range s.totals {
			w.Totals[i] += amount * n
		}
		w.Alkalinity += amount * s.equivalents
	}
	state, err := carbonate.Solve(w)
	o.Value, o.Err = state.PH, err
	return o
}
