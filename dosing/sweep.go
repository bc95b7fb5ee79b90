package dosing

import "beckline/carbonate"

// PHAfter is the finished pH with other doses (mol/L, 0 or more) in the place of
// the first solved addition, everything else as in the result: the curve around
// its working point. It walks the train as Solve does and leaves out what a
// curve does not show, which makes it some twenty times cheaper. A dose at which
// the water is outside the model has no pH.
func PHAfter(res *Result, doses []float64) []Optional {
	out := make([]Optional, len(doses))
	if res.Solved == 0 {
		return out
	}
	raw := res.Raw().Figures
	k, err := carbonate.ConstantsAt(raw.Water.Kelvin)
	if err != nil {
		return out
	}
	r := run{c: &res.Case, k: k, solved: res.Solved - 1, doses: make([]float64, len(res.Case.Additions))}
	r.known.calcium = raw.Calcium.Given
	for i := range r.doses {
		r.doses[i] = res.Stations[i+1].Dose
	}
	before, p := r.through(raw.Water, 0, r.solved)
	if p != nil {
		return out
	}
	for i, dose := range doses {
		w, p := r.step(r.solved, before, dose)
		if p == nil {
			w, p = r.through(w, r.solved+1, len(r.doses))
		}
		if p != nil {
			continue
		}
		if s, err := k.Solve(w); err == nil {
			out[i] = Some(s.PH)
		}
	}
	return out
}
