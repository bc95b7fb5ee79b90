package margin

import (
	"math"

	"beckline/carbonate"
	"beckline/dosing"
	"beckline/dosing/feed"
)

// feeding is one product that is solved for.
type feeding struct {
	index    int // into the additions
	product  *dosing.Product
	reagent  carbonate.Reagent
	dose     float64 // mol/L, as answered
	rates    feed.Rates
	perDose  float64 // kg/m3 of product for each mol/L
	thinning float64 // volume goes with strength to the minus this
}

// train is the path of the water, as far as a margin must walk it.
type train struct {
	feeds   []feeding
	targets [2]dosing.Target
	all     []float64 // every dose, as answered
	to, end int       // stations of the target and of the finished water

	// Where additions only add they commute: one mole of these is everything that
	// is dosed besides the solved products.
	plainTo, plainEnd bool
	fixedTo, fixedEnd carbonate.Reagent
}

func (m *model) setTrain(r *dosing.Result) {
	c := &m.kase
	m.end = len(c.Additions)
	m.to = c.TargetAt
	if m.to == 0 {
		m.to = m.end
	}
	m.targets = [2]dosing.Target{c.Target, c.Second}
	m.plainTo, m.plainEnd = c.Plain(m.raw, m.to), c.Plain(m.raw, m.end)
	m.all = make([]float64, m.end)
	for i := range m.all {
		st := &r.Stations[i+1]
		m.all[i] = st.Dose
		if st.Solved {
			m.feeds = append(m.feeds, newFeeding(i, st))
			continue
		}
		chem := &c.Additions[i].Product.Chemical
		for j, v := range chem.Adds {
			if i < m.to {
				m.fixedTo.Adds[j] += v * st.Dose
			}
			m.fixedEnd.Adds[j] += v * st.Dose
		}
		if i < m.to {
			m.fixedTo.Equivalents += chem.Equivalents * st.Dose
		}
		m.fixedEnd.Equivalents += chem.Equivalents * st.Dose
	}
}

func newFeeding(i int, st *dosing.Station) feeding {
	p := &st.Addition.Product
	f := feeding{index: i, product: p, dose: st.Dose, rates: st.Feed, thinning: 1,
		reagent: carbonate.Reagent{Adds: p.Chemical.Adds, Equivalents: p.Chemical.Equivalents},
		perDose: p.Chemical.MolarMass / p.Strength}
	if !st.Feed.HasVolume || st.Addition.Feed.Density.Given {
		return f // a density measured in the tank is that of what is in it
	}
	// A stronger product is denser too: volume goes with 1/(strength x density).
	kelvin := st.Addition.Feed.ProductKelvin.Or(293.15)
	low, errLow := p.Density.At(p.Strength*0.99, kelvin)
	high, errHigh := p.Density.At(p.Strength*1.01, kelvin)
	if errLow == nil && errHigh == nil {
		f.thinning += math.Log(high.KgPerM3/low.KgPerM3) / math.Log(1.01/0.99)
	}
	return f
}

func (m *model) hasFlow() bool { return len(m.feeds) > 0 && m.feeds[0].rates.HasFlow }

// answered are the doses as answered.
func (m *model) answered() (d doses) {
	for i := range m.feeds {
		d[i] = m.feeds[i].dose
	}
	return d
}

// walk is a raw water at a station, with these doses of the solved products.
func (m *model) walk(k *carbonate.Constants, w carbonate.Water, d doses, to int) (carbonate.Water, bool) {
	plain, fixed := m.plainTo, &m.fixedTo
	if to == m.end {
		plain, fixed = m.plainEnd, &m.fixedEnd
	}
	if plain {
		w = w.Add(*fixed, 1)
		for i := range m.feeds {
			w = w.Add(m.feeds[i].reagent, d[i])
		}
		return w, true
	}
	all := append([]float64(nil), m.all...)
	for i := range m.feeds {
		all[m.feeds[i].index] = d[i]
	}
	return m.kase.Walk(k, w, all, to)
}

// finished is the pH of a raw water after the train with these doses; NaN where
// it has none.
func (m *model) finished(k *carbonate.Constants, raw carbonate.Water, d doses) float64 {
	w, ok := m.walk(k, raw, d, m.end)
	if !ok {
		return math.NaN()
	}
	st, err := k.Solve(w)
	if err != nil {
		return math.NaN()
	}
	return st.PH
}
