package margin

import (
	"math"

	"beckline/carbonate"
	"beckline/dosing"
)

const (
	searchSteps = 40
	// searchTolerance is the last step, as a share of the dose, that is taken
	// without another look: what is left after it is smaller by the bend of the
	// figure over that step, far below what a margin shows.
	searchTolerance = 1e-3
)

// figure is the target's figure of a raw water at the target's station.
func (m *model) figure(k *carbonate.Constants, raw carbonate.Water, d doses) (float64, bool) {
	w, ok := m.walk(k, raw, d, m.to)
	if !ok {
		return 0, false
	}
	st, err := k.Solve(w)
	if err != nil {
		return 0, false
	}
	return m.targets[0].Figure(&st, m.organics)
}

// slope is the target's figure per dose at the answer; 0 where unknown. Few
// answers need it, so it is found when first asked for.
func (m *model) slope() float64 {
	m.slopeOnce.Do(func() {
		const step = 1e-4
		dose := m.feeds[0].dose
		a, okA := m.figure(m.k, m.raw, doses{dose * (1 - step)})
		b, okB := m.figure(m.k, m.raw, doses{dose * (1 + step)})
		if okA && okB {
			m.slopeAt = (b - a) / (2 * step * dose)
		}
	})
	return m.slopeAt
}

// past tells whether a water is at or beyond the target without a dose.
func (m *model) past(k *carbonate.Constants, raw carbonate.Water) bool {
	v, ok := m.figure(k, raw, doses{})
	return ok && (m.targets[0].Value-v)*m.slope() <= 0
}

// search finds the dose by secants from a guess.
func (m *model) search(k *carbonate.Constants, raw carbonate.Water, guess float64) float64 {
	if m.slope() == 0 {
		return math.Inf(1)
	}
	answered := m.feeds[0].dose
	dose, slope := max(guess, answered/10), m.slope()
	var lastDose, lastFigure float64
	for i := range searchSteps {
		v, ok := m.figure(k, raw, doses{dose})
		if !ok {
			return math.Inf(1)
		}
		if i > 0 && dose != lastDose {
			if now := (v - lastFigure) / (dose - lastDose); now*slope > 0 {
				slope = now
			}
		}
		lastDose, lastFigure = dose, v
		step := (m.targets[0].Value - v) / slope
		if math.Abs(step) <= searchTolerance*max(dose, answered) {
			return max(dose+step, 0)
		}
		next := min(dose+step, 4*dose+answered)
		if next <= 0 {
			if m.past(k, raw) {
				return 0
			}
			next = dose / 4
		}
		dose = next
	}
	return math.Inf(1)
}

// lacking is how far a water with two doses is from both targets. For a pH it is
// the alkalinity that it lacks there, eq/L, which is nearly linear in the doses.
func (m *model) lacking(k *carbonate.Constants, raw carbonate.Water, d doses) (f [2]float64, ok bool) {
	w, ok := m.walk(k, raw, d, m.to)
	if !ok {
		return f, false
	}
	var st carbonate.State
	solved := false
	for i, t := range m.targets {
		if t.Kind == dosing.TargetPH {
			alk, err := k.AlkalinityAt(t.Value, w)
			if err != nil {
				return f, false
			}
			f[i] = w.Alkalinity - alk
			continue
		}
		if !solved {
			var err error
			if st, err = k.Solve(w); err != nil {
				return f, false
			}
			solved = true
		}
		v, ok := t.Figure(&st, m.organics)
		if !ok {
			return f, false
		}
		f[i] = v - t.Value
	}
	return f, true
}

// slopes are those of what is lacking with each dose at the answer, inverted.
func (m *model) slopes() *[2][2]float64 {
	m.slopeOnce.Do(func() {
		const step = 1e-4
		d := m.answered()
		size := max(d[0], d[1])
		var j [2][2]float64
		for n := range d {
			low, high := d, d
			by := step * max(d[n], size/100)
			low[n], high[n] = max(d[n]-by, 0), d[n]+by
			a, okA := m.lacking(m.k, m.raw, low)
			b, okB := m.lacking(m.k, m.raw, high)
			if !okA || !okB {
				return
			}
			for i := range a {
				j[i][n] = (b[i] - a[i]) / (high[n] - low[n])
			}
		}
		if det := j[0][0]*j[1][1] - j[0][1]*j[1][0]; det != 0 {
			m.inverse = [2][2]float64{{j[1][1] / det, -j[0][1] / det}, {-j[1][0] / det, j[0][0] / det}}
		}
	})
	return &m.inverse
}

// searchPair finds both doses by chords with the slopes of the answer. A pair
// that would need less than nothing of one product is held at nothing of it.
func (m *model) searchPair(k *carbonate.Constants, raw carbonate.Water, d doses) doses {
	none := doses{math.Inf(1), math.Inf(1)}
	j := m.slopes()
	size := max(m.feeds[0].dose, m.feeds[1].dose)
	for range searchSteps {
		base := doses{max(d[0], 0), max(d[1], 0)}
		f, ok := m.lacking(k, raw, base)
		if !ok {
			return none
		}
		s0, s1 := j[0][0]*f[0]+j[0][1]*f[1], j[1][0]*f[0]+j[1][1]*f[1]
		if s0 == 0 && s1 == 0 && (f[0] != 0 || f[1] != 0) {
			return none
		}
		next := doses{base[0] - s0, base[1] - s1}
		if math.Abs(next[0]-d[0])+math.Abs(next[1]-d[1]) <= 0.1*searchTolerance*size {
			return doses{max(next[0], 0), max(next[1], 0)}
		}
		d = next
	}
	return none
}
