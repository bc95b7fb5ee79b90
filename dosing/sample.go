package dosing

import "beckline/carbonate"

// Sample is one set of readings made ready to be solved many times with other
// constants, pH, alkalinity or DIC: what margins draw from. It solves the raw
// water exactly as Solve does, without its warnings.
type Sample struct {
	readings Readings
	water    carbonate.Water
	in       carbonate.IonicInput
	known    known
}

// NewSample prepares readings. The error is a *Problem: a reading that is
// missing, outside its range, or that contradicts another.
func NewSample(r Readings) (Sample, error) {
	if err := required(&r); err != nil {
		return Sample{}, err
	}
	w, kn, err := totals(&r)
	if err != nil {
		return Sample{}, err
	}
	s := Sample{readings: r, water: w, known: kn}
	s.in = ionicInput(&s.readings, &s.known)
	return s, nil
}

// Readings are the readings that the sample stands for.
func (s *Sample) Readings() Readings { return s.readings }

// SetPH replaces the pH read.
func (s *Sample) SetPH(pH float64) { s.readings.PH.Value = pH }

// SetAlkalinity replaces the alkalinity read, eq/L.
func (s *Sample) SetAlkalinity(v float64) {
	s.readings.Alkalinity.Value = v
	s.water.Alkalinity = v
}

// SetDIC replaces the dissolved inorganic carbon read, mol/L.
func (s *Sample) SetDIC(v float64) {
	s.readings.DIC.Value = v
	s.water.Totals[carbonate.Carbon] = v
}

// Solve is the raw water at its process temperature. process and atPH are the
// constants at the temperatures of the process and of the pH reading; the same
// pointer where they are one. The error is the carbonate package's.
func (s *Sample) Solve(process, atPH *carbonate.Constants) (carbonate.State, error) {
	if s.readings.DIC.Given {
		st, _, err := fromCarbon(process, &s.readings, s.water, s.in)
		return st, err
	}
	st, _, err := fromPH(atPH, &s.readings, s.water, s.in)
	if err == nil && process != atPH {
		st, err = process.Solve(st.Water)
	}
	return st, err
}

// Walk carries a raw water through the additions of a case to a station (1 is
// the first addition's), with a dose for each addition, mol/L (those of the
// processes are not looked at), at the temperature of the constants. ok is false
// where a step has no answer: breakpoint chlorination, a pH that no carbon gives.
func (c *Case) Walk(k *carbonate.Constants, w carbonate.Water, doses []float64, to int) (carbonate.Water, bool) {
	r := &run{c: c, k: k, doses: doses, held: true, known: known{calcium: true}}
	w, p := r.through(w, 0, to)
	return w, p == nil
}

// Plain says whether the additions up to a station only add to this raw water:
// then they commute, and doses are sums of alkalinity and totals.
func (c *Case) Plain(raw carbonate.Water, to int) bool {
	r := &run{c: c}
	r.base.Water = raw
	return r.plain(to)
}

// Mix blends the raw waters of the sources of a case by flow and lets chlorine
// and ammonia that meet in it combine, as Solve does.
func (c *Case) Mix(streams ...carbonate.Stream) (carbonate.Water, bool) {
	w, err := carbonate.Blend(streams...)
	if err != nil {
		return w, false
	}
	w, p := react(w, &Addition{})
	return w, p == nil
}

// Figure is a target's figure of a water, in the target's unit; ok is false
// where that water has none. organics says that organic acids were entered, so
// that alkalinity means the titrated one. Calcium is taken as known.
func (t Target) Figure(st *carbonate.State, organics bool) (v float64, ok bool) {
	look := search{target: t, known: known{calcium: true, organics: organics}}
	return look.figure(st)
}

// Organics says whether the sample has organic acids.
func (s *Sample) Organics() bool { return s.known.organics }
