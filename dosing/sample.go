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

// Figure is the target's figure of a water of this sample, in the target's
// unit; ok is false where that water has none.
func (s *Sample) Figure(t Target, st *carbonate.State) (v float64, ok bool) {
	look := search{target: t, known: s.known}
	return look.figure(st)
}
