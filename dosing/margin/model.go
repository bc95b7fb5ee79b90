package margin

import (
	"sync"

	"beckline/carbonate"
	"beckline/dosing"
)

// sigmas is the half-width of a normal 95 % interval in standard deviations,
// the 0.975 quantile.
const sigmas = 1.959963984540054

// varied is one reading that varies.
type varied struct {
	*reading
	name   string // with the source's or the product's name where there are several
	column int    // of the draws: its own for each reading of each source and product
	of     int    // which source, or for a strength which feed
	value  float64
	half   float64 // half-width, SI
}

// origin is one sample: the raw water, or one source of a blend.
type origin struct {
	name     string
	sample   dosing.Sample
	readings dosing.Readings // without what the model does not look at
	flow     float64         // part of a blend
	other    bool            // a reading varies for which the totals must be sorted out anew
}

// thermo holds the constants at the temperatures of one sample's process and pH
// reading: one pointer where one thermometer gave both.
type thermo struct{ process, atPH *carbonate.Constants }

// doses of the products that are solved for, mol/L: one or two.
type doses [2]float64

// model is a result made ready to be asked what its dose would have been, had
// the readings been others.
type model struct {
	kase    dosing.Case
	origins []origin
	thermos []thermo
	varied  []varied
	effects []effect // of each, at first order

	train
	route route

	slopeOnce sync.Once
	slopeAt   float64       // the target's figure per dose; 0 where unknown
	inverse   [2][2]float64 // of two doses: slopes of what is lacking, inverted

	raw carbonate.Water      // as answered
	k   *carbonate.Constants // of its temperature, as answered
	pH  float64              // finished, as answered

	lowBuffer, organics bool
}

// newModel prepares a result. The error is a *dosing.Problem.
func newModel(r *dosing.Result, tol Tolerances) (*model, error) {
	m := &model{kase: r.Case, raw: r.Raw().Figures.Water, pH: r.Finished().Figures.PH}
	if len(r.Case.Sources) == 0 {
		m.origins = []origin{{readings: used(r.Case.Readings)}}
	}
	for _, s := range r.Case.Sources {
		m.origins = append(m.origins, origin{name: s.Name, readings: used(s.Readings), flow: s.Flow.Value})
	}
	m.thermos = make([]thermo, len(m.origins))
	for i := range m.origins {
		o := &m.origins[i]
		var err error
		if o.sample, err = dosing.NewSample(o.readings); err != nil {
			return nil, err
		}
		m.organics = m.organics || o.sample.Organics()
		m.thermos[i].process = constantsAt(o.readings.Kelvin.Value)
		m.thermos[i].atPH = m.thermos[i].process
		if o.readings.PHKelvin.Given {
			m.thermos[i].atPH = constantsAt(o.readings.PHKelvin.Value)
		}
	}
	m.k = m.thermos[0].process
	if len(m.origins) > 1 {
		m.k = constantsAt(m.raw.Kelvin)
	}
	m.setTrain(r)
	for _, w := range r.Warnings {
		m.lowBuffer = m.lowBuffer || w.Code == "low_buffer"
	}
	if err := m.vary(r, tol); err != nil {
		return nil, err
	}
	m.chooseRoute()
	return m, nil
}

// vary finds which readings vary and by how much.
func (m *model) vary(r *dosing.Result, tol Tolerances) error {
	m.varied = make([]varied, 0, len(tol.list))
	for _, e := range tol.list {
		before := len(m.varied)
		switch q := &table[e.index]; q.kind {
		case ofStrength:
			for i := range m.feeds {
				f := &m.feeds[i]
				m.add(e, prefixed(len(m.feeds), f.product.Name, q.name), i, f.product.Strength)
			}
		case ofFlow:
			if m.hasFlow() {
				m.add(e, q.name, -1, r.Case.Readings.Flow.Value)
			}
			if len(m.origins) > 1 {
				for i := range m.origins {
					m.add(e, prefixed(2, m.origins[i].name, q.name), i, m.origins[i].flow)
				}
			}
		default:
			for i := range m.origins {
				o := &m.origins[i]
				if v := q.get(&o.readings); v.Given {
					m.add(e, prefixed(len(m.origins), o.name, q.name), i, v.Value)
					o.other = o.other || q.kind == ofWater
				}
			}
		}
		if e.named && len(m.varied) == before {
			return refuse("tolerance_without_reading", table[e.index].name, "tolerances of readings that were given and that the answer uses")
		}
	}
	if len(m.varied) == 0 {
		return refuse("no_tolerance", "none", "a tolerance of at least one reading that was given")
	}
	return nil
}

func prefixed(of int, whose, name string) string {
	if of < 2 || whose == "" {
		return name
	}
	return whose + " " + name
}

func (m *model) add(e entry, name string, of int, value float64) {
	v := varied{reading: &table[e.index], name: name, of: of, value: value, half: e.tolerance.at(value)}
	v.column = e.index + len(table)*max(of, 0)
	if v.kind == ofFlow {
		v.column = e.index + len(table)*(of+1) // the whole flow first, then the sources'
		if of >= 0 {
			v.reading = &partOfBlend
		}
	}
	if v.half > 0 {
		m.varied = append(m.varied, v)
	}
}

// partOfBlend is a source's flow: it moves the raw water.
var partOfBlend = reading{name: "flow", kind: ofPart, relative: true}

// constantsAt are the constants at a temperature; one outside the model's range
// is taken at its end, since no water is colder than ice.
func constantsAt(kelvin float64) *carbonate.Constants {
	k, _ := carbonate.ConstantsAt(min(max(kelvin, carbonate.MinKelvin), carbonate.MaxKelvin))
	return k
}

// water is the raw water with the readings at these values, in the order of
// varied, and the constants at its temperature. ok is false where the readings
// contradict each other.
func (m *model) water(values []float64, at []thermo) (w carbonate.Water, k *carbonate.Constants, ok bool) {
	if len(m.origins) == 1 {
		w, ok = m.originWater(0, values, at[0])
		return w, at[0].process, ok
	}
	streams := make([]carbonate.Stream, len(m.origins))
	for i := range streams {
		streams[i].Flow = m.origins[i].flow
		if streams[i].Water, ok = m.originWater(i, values, at[i]); !ok {
			return w, nil, false
		}
	}
	for i := range m.varied {
		if v := &m.varied[i]; v.kind == ofPart {
			streams[v.of].Flow = max(values[i], 0)
		}
	}
	if w, ok = m.kase.Mix(streams...); !ok {
		return w, nil, false
	}
	return w, constantsAt(w.Kelvin), true
}

// originWater is the water of one sample.
func (m *model) originWater(which int, values []float64, at thermo) (carbonate.Water, bool) {
	o := &m.origins[which]
	s := o.sample
	if o.other {
		r := o.readings
		for i := range m.varied {
			if v := &m.varied[i]; v.kind == ofWater && v.of == which {
				v.get(&r).Value = max(values[i], 0)
			}
		}
		var err error
		if s, err = dosing.NewSample(r); err != nil {
			return carbonate.Water{}, false
		}
	}
	for i := range m.varied {
		v := &m.varied[i]
		if v.of != which {
			continue
		}
		switch v.kind {
		case ofPH:
			s.SetPH(values[i])
		case ofAlkalinity:
			s.SetAlkalinity(max(values[i], 0))
		case ofDIC:
			s.SetDIC(max(values[i], 0))
		}
	}
	st, err := s.Solve(at.process, at.atPH)
	return st.Water, err == nil
}
