package slips

import (
	"math"

	"beckline/dosing"
)

const (
	overshootBy = 0.05 // share of the dose
	overshootPH = 0.3  // pH that it may move by and still be forgiving
	limeShort   = 0.2  // pH under what dissolved lime would give
)

// batch: an acid batch near its end, where a little too much is far too much.
func (k *check) batch() []Finding {
	if !k.x.Batch || k.r == nil || k.r.Solved == 0 {
		return nil
	}
	st := k.r.Dose()
	if st.Addition == nil || !(st.Addition.Product.Chemical.Equivalents < 0) || k.c.Target.Kind != dosing.TargetPH {
		return nil
	}
	w, ok := k.with(k.r.Solved, 1+overshootBy, k.last())
	over, aim := w.PH, k.r.Finished().Figures.PH
	if !ok || math.Abs(over-aim) < overshootPH {
		return nil
	}
	f := Finding{Code: AcidOvershoot, Field: st.Addition.Product.Name, Value: dosing.Some(st.Dose), Weight: math.Pow((over-aim)/0.1, 2),
		Cause:    "all the acid at once? 5 % too much ends at pH " + pH(over) + ", not " + pH(aim),
		Evidence: "there is hardly any buffer left at the end",
		Do:       "give nine tenths first, mix, wait, read the pH, work the rest out anew and give it in three parts"}
	if most, ok := k.with(k.r.Solved, 1.3, k.last()); ok {
		f.Evidence += "; 30 % too much ends at pH " + pH(most.PH)
	}
	return []Finding{f}
}

// lime: taken as pure and dissolved, and the pH after it stays short.
func (k *check) lime() []Finding {
	if k.r == nil {
		return nil
	}
	var out []Finding
	for i, a := range k.c.Additions {
		switch a.Product.Chemical.Formula {
		case "Ca(OH)2", "CaO", "Mg(OH)2":
		default:
			continue
		}
		read := k.x.Measured[i+1].PH
		if !read.Given {
			continue
		}
		measured := read.Value
		predicted := k.r.Stations[i+1].Figures.PH
		if predicted-measured < limeShort {
			continue
		}
		f := Finding{Code: LimeUndissolved, Field: a.Product.Name, Value: dosing.Some(measured), Meant: dosing.Some(predicted),
			Weight:   math.Pow((predicted-measured)/0.07, 2),
			Cause:    "not all dissolved, or not pure?",
			Evidence: "the pH after it reads " + pH(measured) + "; all of it dissolved and pure gives " + pH(predicted),
			Do:       "enter the purity of the certificate; a jar test tells how much dissolves in the time there is"}
		// The share that would explain it.
		lo, hi := 0.0, 1.0
		for range 40 {
			mid := 0.5 * (lo + hi)
			if w, ok := k.with(i+1, mid, i+1); ok && w.PH < measured {
				lo = mid
			} else {
				hi = mid
			}
		}
		f.Evidence += "; " + percent(hi) + " of it would do that"
		out = append(out, f)
	}
	return out
}
