package margin

import "math"

const lowTail, highTail = 0.025, 0.975

// summarise reads ranges and shares off the draws.
func (m *model) summarise(d *drawn, out *Margin) {
	n := len(d.pH)
	out.Drawn = n
	kept := make([]float64, 0, n)
	take := func(value func(j int) float64) Range {
		kept = kept[:0]
		for j := range n {
			if v := value(j); !math.IsNaN(v) {
				kept = append(kept, v)
			}
		}
		return percentiles(kept)
	}
	e := Estimate{FinishedPH: take(func(j int) float64 { return d.pH[j] })}
	e.PHShares, _ = m.regress(d, d.pH, func(*varied) bool { return true })
	for i := range m.feeds {
		e.set(i, m.feedSummary(d, i, take))
	}
	out.Estimate = e
	first := d.pH
	if len(m.feeds) > 0 {
		first = d.doses[0]
	}
	for _, v := range first {
		switch {
		case math.IsNaN(v):
			out.Refused++
		case len(m.feeds) > 0 && v == 0:
			out.NoDose++
		case math.IsInf(v, 1):
			out.Unreached++
		}
	}
}

func (m *model) feedSummary(d *drawn, n int, take func(func(j int) float64) Range) (out Feed) {
	f := &m.feeds[n]
	dose, fed := d.doses[n], d.fed[n]
	strength, flow := m.which(ofStrength, n), m.which(ofFlow, -1)
	// factor is a reading's true value over the one read.
	factor := func(i, j int) float64 {
		if i < 0 {
			return 1
		}
		v := &m.varied[i]
		return max(1+d.columns[i].z[j]*v.half/sigmas/v.value, leastShare)
	}
	out.HasFlow, out.HasVolume = f.rates.HasFlow, f.rates.HasVolume
	out.Dose = take(func(j int) float64 { return dose[j] })
	out.DoseShares, out.DoseDeviation = m.regress(d, dose, func(v *varied) bool { return v.kind != ofFlow && v.kind != ofStrength })
	out.Product = take(func(j int) float64 { return dose[j] * f.perDose / factor(strength, j) })
	feed := make([]float64, len(dose))
	for j := range feed {
		feed[j] = dose[j] / fed[j]
	}
	out.FeedShares, _ = m.regress(d, feed, func(v *varied) bool { return v.kind != ofStrength || v.of == n })
	if out.HasFlow {
		each := f.rates.MassPerSecond / f.dose
		out.Mass = take(func(j int) float64 { return feed[j] * each })
	}
	if out.HasVolume {
		each := f.rates.VolumePerSecond / f.dose
		out.Volume = take(func(j int) float64 {
			return dose[j] * each * factor(flow, j) * math.Pow(factor(strength, j), -f.thinning)
		})
	}
	return out
}

func (m *model) which(k kind, of int) int {
	for i := range m.varied {
		if v := &m.varied[i]; v.kind == k && v.of == of {
			return i
		}
	}
	return -1
}

// percentiles reorders its argument. Inf is a value like any other. Only two of
// the values are wanted, so nothing is sorted in full.
func percentiles(v []float64) Range {
	n := len(v)
	if n == 0 {
		return Range{math.NaN(), math.NaN()}
	}
	at := func(tail float64) int { return max(int(math.Ceil(tail*float64(n)))-1, 0) }
	low := at(lowTail)
	out := Range{Low: smallest(v, low)}
	out.High = smallest(v[low:], at(highTail)-low)
	return out
}

// smallest moves the value that would stand at place n, counted from 0, if v
// were sorted, to that place, with none greater before it and none less behind
// (Hoare 1961, Commun. ACM 4, 321).
func smallest(v []float64, n int) float64 {
	lo, hi := 0, len(v)-1
	for lo < hi {
		pivot, i, j := v[(lo+hi)/2], lo, hi
		for i <= j {
			for v[i] < pivot {
				i++
			}
			for v[j] > pivot {
				j--
			}
			if i <= j {
				v[i], v[j] = v[j], v[i]
				i, j = i+1, j-1
			}
		}
		if n > j && n < i {
			break
		}
		if n <= j {
			hi = j
		} else {
			lo = i
		}
	}
	return v[n]
}

// regress gives the shares of the readings in the variance of a figure, by its
// regression on each (the columns are independent), and its standard deviation,
// over the draws that have one. A reading that does not move the figure is left
// out: what it showed would be noise.
func (m *model) regress(d *drawn, figure []float64, moves func(*varied) bool) (shares []Share, deviation float64) {
	n, mean := 0.0, 0.0
	for _, v := range figure {
		if finite(v) {
			n++
			mean += v
		}
	}
	if n < 2 {
		return nil, 0
	}
	mean /= n
	variance := 0.0
	parts := make([]float64, len(m.varied))
	for i, c := range d.columns {
		if !moves(&m.varied[i]) {
			continue
		}
		var sum, square, cross float64
		for j, v := range figure {
			if finite(v) {
				z := c.z[j]
				sum += z
				square += z * z
				cross += z * (v - mean)
			}
		}
		if spread := square - sum*sum/n; spread > 0 {
			parts[i] = cross * cross / spread / n
		}
	}
	for _, v := range figure {
		if finite(v) {
			variance += (v - mean) * (v - mean)
		}
	}
	deviation = math.Sqrt(variance / (n - 1))
	if deviation <= noWidth*math.Abs(mean) {
		return nil, deviation // rounding, not spread
	}
	return m.shares(func(i int) float64 { return parts[i] }), deviation
}
