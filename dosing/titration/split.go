package titration

// Parts is an alkalinity split into its kinds, eq/L each.
type Parts struct {
	Hydroxide, Carbonate, Bicarbonate float64
}

// Below colourless phenolphthalein has no alkalinity to show; above strong
// colour it must. The end point itself is pH 8.3.
const (
	colourless  = 8.2
	strongPink  = 8.6
	phenolPH    = 8.3
	samePartRel = 1e-9
)

// Split divides the alkalinity by the five rows of Standard Methods 2320 (table
// "alkalinity relationships"), from the phenolphthalein and the total
// alkalinity, both eq/L. It takes hydroxide, carbonate and bicarbonate for the
// only kinds, and hydroxide and bicarbonate for never together; the model's own
// split is finer. ph is the pH of the sample, 0 where not measured. Errors: *Error.
func Split(phenolphthalein, total, ph float64) (Parts, []Note, error) {
	p, t := phenolphthalein, total
	if e := within("total alkalinity", AsCaCO3(t), 0, greatestAlk, false, "mg/L as CaCO3"); e != nil {
		return Parts{}, nil, e
	}
	if e := within("p-alkalinity", AsCaCO3(p), 0, greatestAlk, false, "mg/L as CaCO3"); e != nil {
		return Parts{}, nil, e
	}
	if ph != 0 {
		if e := within("ph", ph, 0, 14, false, ""); e != nil {
			return Parts{}, nil, e
		}
	}
	if p > t*(1+samePartRel) {
		return Parts{}, nil, &Error{CodePAboveTotal, "p-alkalinity", milligrams(p),
			"at most the total, " + milligrams(t) + "; are the two swapped?"}
	}
	var notes []Note
	if ph != 0 && p > 0 && ph < colourless {
		return Parts{}, nil, &Error{CodePBelowPH, "p-alkalinity", milligrams(p) + " at pH " + short(ph),
			"0 below pH 8.2; the meter and the indicator disagree, check both"}
	}
	if p == 0 && ph > strongPink {
		notes = append(notes, Note{CodeNoColour, "p-alkalinity",
			"none at pH " + short(ph) + ", where phenolphthalein is pink: check the meter and the indicator"})
	}
	half, near := t/2, samePartRel*t
	switch {
	case p <= near:
		return Parts{Bicarbonate: t}, notes, nil
	case p < half-near:
		return Parts{Carbonate: 2 * p, Bicarbonate: t - 2*p}, notes, nil
	case p <= half+near:
		return Parts{Carbonate: t}, notes, nil
	case p < t-near:
		return Parts{Hydroxide: 2*p - t, Carbonate: 2 * (t - p)}, notes, nil
	}
	return Parts{Hydroxide: t}, notes, nil
}
