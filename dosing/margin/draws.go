package margin

import (
	"math"
	"runtime"
	"sync"

	"beckline/carbonate"
)

// drawn holds what each draw came to; NaN in a dose (or the pH where nothing was
// solved for) marks a water that contradicts itself.
type drawn struct {
	columns []*column
	doses   [2][]float64 // mol/L
	fed     [2][]float64 // real dose over the one set: (true strength/stated)/(true flow/read)
	pH      []float64
}

// draw makes n draws of the true readings and puts their summary into out. Each
// draw is a water of its own; the work is shared among the processors and comes
// out the same however many there are.
func (m *model) draw(n int, out *Margin) {
	d := drawn{columns: make([]*column, len(m.varied)), pH: make([]float64, n)}
	for i := range m.feeds {
		d.doses[i], d.fed[i] = make([]float64, n), make([]float64, n)
	}
	tables := make([][]*carbonate.Constants, len(m.varied)) // of the temperatures
	for i := range m.varied {
		v := &m.varied[i]
		d.columns[i] = columnFor(v.column, v.kind == ofKelvin || v.kind == ofPHKelvin, n)
		if d.columns[i].point != nil {
			tables[i] = v.constants()
		}
	}
	workers := min(runtime.GOMAXPROCS(0), 8)
	var group sync.WaitGroup
	for w := range workers {
		group.Go(func() { m.drawRange(&d, tables, n*w/workers, n*(w+1)/workers) })
	}
	group.Wait()
	m.summarise(&d, out)
}

// constants at the points of a temperature.
func (v *varied) constants() []*carbonate.Constants {
	out := make([]*carbonate.Constants, temperaturePoints)
	for i, z := range temperatures() {
		out[i] = constantsAt(v.value + z*v.half/sigmas)
	}
	return out
}

// leastShare keeps a flow or a strength drawn far out in the tail above nothing.
const leastShare = 0.01

func (m *model) drawRange(d *drawn, tables [][]*carbonate.Constants, from, to int) {
	values := make([]float64, len(m.varied))
	at := make([]thermo, len(m.thermos))
	answered := m.answered()
	for j := from; j < to; j++ {
		copy(at, m.thermos)
		fed, guess := doses{1, 1}, answered
		for i := range m.varied {
			v := &m.varied[i]
			z := d.columns[i].z[j] / sigmas
			values[i] = v.value + z*v.half
			for n := range m.feeds {
				guess[n] += z * m.effects[i].dose[n]
			}
			switch v.kind {
			case ofPH:
				values[i] = min(max(values[i], 0), 14)
			case ofKelvin, ofPHKelvin:
				at[v.of] = at[v.of].with(v.kind, tables[i][d.columns[i].point[j]])
			case ofFlow:
				factor := max(values[i]/v.value, leastShare)
				fed[0], fed[1] = fed[0]/factor, fed[1]/factor
			case ofStrength:
				fed[v.of] *= max(values[i]/v.value, leastShare)
			}
		}
		needed, pH := m.one(values, at, fed, guess)
		for n := range m.feeds {
			d.doses[n][j], d.fed[n][j] = needed[n], fed[n]
		}
		d.pH[j] = pH
	}
}

// one draw: the doses that the true water needs, and the pH that the feeds as
// set give it.
func (m *model) one(values []float64, at []thermo, fed, guess doses) (needed doses, pH float64) {
	raw, k, ok := m.water(values, at)
	if !ok {
		return doses{math.NaN(), math.NaN()}, math.NaN()
	}
	if len(m.feeds) > 0 {
		needed = m.needed(k, raw, guess)
	}
	real := m.answered()
	return needed, m.finished(k, raw, doses{real[0] * fed[0], real[1] * fed[1]})
}
