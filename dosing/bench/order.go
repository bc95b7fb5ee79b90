package bench

import (
	"math"
	"slices"
)

// SlipKind says what is odd about single readings.
type SlipKind string

// The kinds.
const (
	DosesBackwards SlipKind = "doses_out_of_order" // a dose below the one before it: lines swapped, or the burette read from the wrong end
	FallsBack      SlipKind = "curve_falls_back"   // the pH goes against the dose: readings out of order or not settled
	NotRepeated    SlipKind = "not_repeated"       // one dose, two pH readings: not settled
	StandsAlone    SlipKind = "one_reading_off"    // one reading is off and the others agree: misread or not settled
)

// Slip names readings that cannot all be right, counted from 0 in the order read.
type Slip struct {
	Kind     SlipKind
	Readings []int
	Size     float64 // pH by which they are wrong; for DosesBackwards the dose, mol/L
}

// clear is how many of its own standard deviations a difference must have to be
// called a slip: one chance in two thousand.
const clear = 3.5

// order looks for readings that no water gives, whatever it holds: pH rises or
// falls with the dose all along a stretch where the model's does.
func (m *model) order(s *solution) []Slip {
	var out []Slip
	points := m.t.Points
	for i := 1; i < len(points); i++ {
		if points[i].Dose < points[i-1].Dose {
			out = append(out, Slip{DosesBackwards, []int{i - 1, i}, points[i-1].Dose - points[i].Dose})
		}
	}
	rank := make([]int, len(points))
	for i := range rank {
		rank[i] = i
	}
	slices.SortStableFunc(rank, func(a, b int) int {
		switch {
		case points[a].Dose < points[b].Dose:
			return -1
		case points[a].Dose > points[b].Dose:
			return 1
		}
		return 0
	})
	noise := m.t.sigmaPH()
	for j := 1; j < len(rank); j++ {
		a, b := rank[j-1], rank[j]
		read := points[b].PH - points[a].PH
		want := s.predicted[b] - s.predicted[a]
		// The dose is as unsure as the reading, but it cannot turn the curve round.
		both := noise * math.Sqrt2
		switch {
		case points[a].Dose == points[b].Dose:
			if math.Abs(read) > clear*both {
				out = append(out, Slip{NotRepeated, []int{a, b}, math.Abs(read)})
			}
		case read*want < 0 && math.Abs(read) > clear*both:
			out = append(out, Slip{FallsBack, []int{a, b}, math.Abs(read)})
		}
	}
	return append(out, m.lonely(s)...)
}

// lonely finds one reading that spoils the fit alone.
func (m *model) lonely(s *solution) []Slip {
	worst, size, rest := -1, 0.0, 0.0
	for i, p := range m.t.Points {
		z := math.Abs(p.PH-s.predicted[i]) / s.sigma[i]
		rest += z * z
		if z > size {
			worst, size = i, z
		}
	}
	freedom := len(m.t.Points) - len(s.find) - 1
	if worst < 0 || size < clear || freedom < 2 || chance(rest, freedom+1) >= disbelief {
		return nil
	}
	without := *m.t
	without.Points = slices.Delete(slices.Clone(m.t.Points), worst, worst+1)
	other := newModel(&without, m.k, m.charge)
	again, err := other.fit(s.figures, s.find, fitSteps)
	if err != nil || chance(again.chiSquare, freedom) < disbelief {
		return nil
	}
	state, err := m.state(&again.figures, m.t.Points[worst].Dose, m.progress(worst))
	if err != nil {
		return nil
	}
	return []Slip{{StandsAlone, []int{worst}, math.Abs(m.t.Points[worst].PH - state.PH - again.figures[MeterOffset])}}
}
