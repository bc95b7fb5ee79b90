package margin

import (
	"math"

	"beckline/carbonate"
)

// first is the first-order answer and what it thinks of itself.
type first struct {
	Estimate
	reason Reason
}

// effect is what one reading does, for its half-width: to the doses in mol/L, to
// the feeds relative to themselves, to the finished pH.
type effect struct {
	dose, feed, volume doses
	pH                 float64
}

// firstOrder makes the ranges from slopes at the answer. Slopes of the water's
// readings are central differences over the reading's own interval, which shows
// the curvature too. Where the target is the finished pH, that needs no solving
// of its own: pH(r, dose(r)) is constant, so its slope is minus the dose's times
// that of the pH with dose.
func (m *model) firstOrder() first {
	m.effects = make([]effect, len(m.varied))
	direct := m.route != byBalance || m.to != m.end
	var bend doses // sums of slope^2 x curvature
	limit := false
	values := m.values()
	at := append([]thermo(nil), m.thermos...)
	for i := range m.varied {
		v := &m.varied[i]
		e := &m.effects[i]
		switch v.kind {
		case ofFlow:
			for n := range m.feeds {
				e.feed[n], e.volume[n] = v.half/v.value, v.half/v.value
			}
			continue
		case ofStrength:
			e.feed[v.of] = -v.half / v.value
			e.volume[v.of] = m.feeds[v.of].thinning * e.feed[v.of]
			continue
		}
		high := m.side(values, at, i, 1, direct)
		low := one{doses: m.answered(), pH: m.pH}
		if !straight(v) || !m.usable(&high) {
			low = m.side(values, at, i, -1, direct)
		}
		for n := range m.feeds {
			f := &m.feeds[n]
			slope, curvature, ok := difference(low.doses[n], high.doses[n], f.dose, low.x, high.x)
			limit = limit || !ok
			e.dose[n] = slope
			bend[n] += slope * slope * curvature
			if f.dose > 0 {
				e.feed[n] = slope / f.dose
				e.volume[n] = e.feed[n]
			}
		}
		if direct {
			e.pH, _, _ = difference(low.pH, high.pH, m.pH, low.x, high.x)
		}
	}
	pHBend := m.pHEffects(direct)
	f := first{Estimate: m.estimate()}
	f.reason = m.reason(&f.Estimate, bend, pHBend, limit)
	return f
}

// values are the readings that vary, as read.
func (m *model) values() []float64 {
	values := make([]float64, len(m.varied))
	for i := range m.varied {
		values[i] = m.varied[i].value
	}
	return values
}

// straight: over a kelvin either way the constants go in a line to within 1 %,
// and a temperature moves a dose little, so its lower side is the upper one's
// mirror. It saves an eighth of the work.
func straight(v *varied) bool {
	return (v.kind == ofKelvin || v.kind == ofPHKelvin) && v.half <= 1
}

// one is the answer with one reading moved by x half-widths.
type one struct {
	x     float64
	doses doses
	pH    float64
}

// usable tells whether a side has an answer to take a slope from.
func (m *model) usable(o *one) bool {
	good := o.x > 0
	for n := range m.feeds {
		good = good && finite(o.doses[n]) && o.doses[n] > 0
	}
	return good && (len(m.feeds) > 0 || finite(o.pH))
}

func finite(v float64) bool { return !math.IsNaN(v) && !math.IsInf(v, 0) }

// moved is the raw water with one reading moved by x half-widths; ok is false
// where that is no water.
type moved struct {
	x     float64
	water carbonate.Water
	k     *carbonate.Constants
	ok    bool
}

// move moves reading i by a half-width down or up, less where it would leave
// the model's range. values and at are as read, and are put back.
func (m *model) move(values []float64, at []thermo, i int, sign float64) (out moved) {
	v := &m.varied[i]
	to := v.value + sign*v.half
	switch v.kind {
	case ofKelvin, ofPHKelvin:
		to = min(max(to, carbonate.MinKelvin), carbonate.MaxKelvin)
	case ofPH:
		to = min(max(to, 0), 14)
	default:
		to = max(to, 0)
	}
	out.x = (to - v.value) / v.half
	if v.kind == ofKelvin || v.kind == ofPHKelvin {
		before := at[v.of]
		at[v.of] = before.with(v.kind, constantsAt(to))
		defer func() { at[v.of] = before }()
	}
	values[i] = to
	out.water, out.k, out.ok = m.water(values, at)
	values[i] = v.value
	return out
}

// with is a sample's constants with one temperature moved.
func (t thermo) with(which kind, k *carbonate.Constants) thermo {
	switch {
	case which == ofPHKelvin:
		t.atPH = k
	case t.atPH == t.process:
		t.process, t.atPH = k, k
	default:
		t.process = k
	}
	return t
}

// side is the answer with reading i moved.
func (m *model) side(values []float64, at []thermo, i int, sign float64, direct bool) one {
	w := m.move(values, at, i, sign)
	out := one{x: w.x, doses: doses{math.NaN(), math.NaN()}, pH: math.NaN()}
	if !w.ok {
		return out
	}
	if len(m.feeds) > 0 {
		out.doses = m.needed(w.k, w.water, m.answered())
	}
	if direct {
		out.pH = m.finished(w.k, w.water, m.answered())
	}
	return out
}

// difference is the slope and the curvature of a figure over one half-width,
// from its values at xLow and xHigh and the answer between. ok is false where a
// side has no value, or a dose of nothing: the slope is then the good side's.
func difference(low, high, mid, xLow, xHigh float64) (slope, curvature float64, ok bool) {
	if xLow == 0 && high != 0 && finite(high) && xHigh > 0 {
		return (high - mid) / xHigh, 0, true
	}
	goodLow := finite(low) && xLow < 0
	goodHigh := finite(high) && xHigh > 0
	switch {
	case goodLow && goodHigh:
		slope = (high - low) / (xHigh - xLow)
		if xHigh == -xLow {
			curvature = (low + high - 2*mid) / 2
		}
		return slope, curvature, low != 0 && high != 0
	case goodLow:
		return (low - mid) / xLow, 0, xHigh == 0
	case goodHigh:
		return (high - mid) / xHigh, 0, xLow == 0
	}
	return 0, 0, false
}

// pHEffects adds how the finished pH goes with an error of the doses that are
// really fed, and returns how bent that is: the part of the range's half-width
// by which its ends stand unevenly.
func (m *model) pHEffects(direct bool) (bend float64) {
	for n := range m.feeds {
		dose := m.feeds[n].dose
		fed := func(i int) float64 { // error of the real dose, mol/L
			e := &m.effects[i]
			if k := m.varied[i].kind; k == ofFlow || k == ofStrength {
				return -dose * e.feed[n]
			}
			if direct {
				return 0
			}
			return -e.dose[n]
		}
		width := 0.0
		for i := range m.effects {
			width += fed(i) * fed(i)
		}
		if width = min(math.Sqrt(width), dose); width == 0 {
			continue
		}
		low, high := m.answered(), m.answered()
		low[n] -= width
		high[n] += width
		slope, curvature, _ := difference(m.finished(m.k, m.raw, low), m.finished(m.k, m.raw, high), m.pH, -1, 1)
		for i := range m.effects {
			m.effects[i].pH += fed(i) / width * slope
		}
		if slope != 0 {
			bend = max(bend, math.Abs(curvature/slope))
		}
	}
	return bend
}

// estimate turns effects into ranges and shares.
func (m *model) estimate() (out Estimate) {
	pH := 0.0
	for i := range m.effects {
		pH += m.effects[i].pH * m.effects[i].pH
	}
	pH = math.Sqrt(pH)
	out.FinishedPH = Range{m.pH - pH, m.pH + pH}
	out.PHShares = m.shares(func(i int) float64 { return m.effects[i].pH * m.effects[i].pH })
	for n := range m.feeds {
		out.set(n, m.feedEstimate(n))
	}
	return out
}

func (m *model) feedEstimate(n int) (out Feed) {
	f := &m.feeds[n]
	var dose, product, mass, volume float64
	for i := range m.effects {
		e := &m.effects[i]
		dose += e.dose[n] * e.dose[n]
		mass += e.feed[n] * e.feed[n]
		volume += e.volume[n] * e.volume[n]
		if m.varied[i].kind != ofFlow {
			product += e.feed[n] * e.feed[n]
		}
	}
	out.HasFlow, out.HasVolume = f.rates.HasFlow, f.rates.HasVolume
	out.Dose = around(f.dose, math.Sqrt(dose))
	out.DoseDeviation = math.Sqrt(dose) / sigmas
	at := f.dose * f.perDose
	out.Product = around(at, at*math.Sqrt(product))
	if out.HasFlow {
		out.Mass = around(f.rates.MassPerSecond, f.rates.MassPerSecond*math.Sqrt(mass))
	}
	if out.HasVolume {
		out.Volume = around(f.rates.VolumePerSecond, f.rates.VolumePerSecond*math.Sqrt(volume))
	}
	out.DoseShares = m.shares(func(i int) float64 { return m.effects[i].dose[n] * m.effects[i].dose[n] })
	out.FeedShares = m.shares(func(i int) float64 { return m.effects[i].feed[n] * m.effects[i].feed[n] })
	return out
}

func around(v, half float64) Range { return Range{max(v-half, 0), v + half} }

// shares makes a list that sums to 1 of the parts of a variance; nil where the
// sum is nothing.
func (m *model) shares(part func(i int) float64) []Share {
	sum := 0.0
	for i := range m.varied {
		sum += part(i)
	}
	if !(sum > 0) || math.IsInf(sum, 0) {
		return nil
	}
	out := make([]Share, len(m.varied))
	for i := range m.varied {
		out[i] = Share{m.varied[i].name, part(i) / sum}
	}
	return out
}
