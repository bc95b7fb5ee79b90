package bench

import (
	"beckline/carbonate"
)

// model predicts a jar from a set of figures.
type model struct {
	t      *Titration
	k      *carbonate.Constants
	charge int       // of the acid form of the unknown acid
	near   []float64 // share of the unknown acid in its base form at each point, as last found
}

func newModel(t *Titration, k *carbonate.Constants, charge int) model {
	near := make([]float64, len(t.Points))
	for i := range near {
		near[i] = 0.5
	}
	return model{t: t, k: k, charge: charge, near: near}
}

// state is the jar after a dose by the label. progress, 0 to 1, is how far
// through the readings it is, for what happens with time.
func (m *model) state(f *figures, dose, progress float64) (carbonate.State, error) {
	half := 0.5
	return m.stateFrom(f, dose, progress, &half)
}

func (m *model) stateFrom(f *figures, dose, progress float64, near *float64) (carbonate.State, error) {
	w := m.t.Water
	w.Alkalinity = f[Alkalinity]
	w.Totals[carbonate.Carbon] = max(f[Carbon]-f[CarbonLost]*progress, 0)
	w = w.Add(m.t.Reagent, dose*f[Strength])
	acid := Acid{Amount: f[AcidAmount], PK: f[AcidPK], Charge: m.charge}
	if m.t.Stock > 0 {
		w, acid.Amount = thin(w, acid.Amount, 1/(1+dose/m.t.Stock))
	}
	s, err := acid.solve(m.k, w, near)
	if err != nil || f[Precipitated] == 0 {
		return s, err
	}
	above, err := s.CCPP()
	if err != nil || !(above > 0) {
		return s, nil // nothing can come out
	}
	out := f[Precipitated] * above
	w.Totals[carbonate.Calcium] -= out
	w.Totals[carbonate.Carbon] -= out
	w.Alkalinity -= 2 * out
	return acid.solve(m.k, w, near)
}

// thin multiplies everything dissolved by a factor.
func thin(w carbonate.Water, acid, by float64) (carbonate.Water, float64) {
	for i := range w.Totals {
		w.Totals[i] *= by
	}
	w.Alkalinity *= by
	w.Background *= by
	return w, acid * by
}

// reading is what the meter would show at point i.
func (m *model) reading(f *figures, i int) (float64, error) {
	s, err := m.stateFrom(f, m.t.Points[i].Dose, m.progress(i), &m.near[i])
	return s.PH + f[MeterOffset], err
}

func (m *model) progress(i int) float64 {
	if n := len(m.t.Points); n > 1 {
		return float64(i) / float64(n-1)
	}
	return 0
}

// slope is d(pH)/d(dose) at point i, by a difference over about the dose's own
// error.
func (m *model) slope(f *figures, i int) (float64, error) {
	dose := m.t.Points[i].Dose
	step := max(m.t.sigmaDose(dose), 1e-9)
	lo := max(dose-step, 0)
	a, err := m.state(f, lo, m.progress(i))
	if err != nil {
		return 0, err
	}
	b, err := m.state(f, dose+step, m.progress(i))
	return (b.PH - a.PH) / (dose + step - lo), err
}
