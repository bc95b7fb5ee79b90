package hand

import (
	"math"

	"beckline/carbonate"
	"beckline/dosing"
)

// Steps are the hand method's numbers, in the order in which they are worked.
// Amounts mol/L, alkalinity eq/L.
type Steps struct {
	Reading     Constants // at the temperature of the pH reading
	Process     Constants // at the process temperature
	FromStation bool      // begun at the water that the chemical meets, not at the readings
	IonicRaw    float64   // from conductivity, solids or the ions; of the station
	Raw         Point     // at the pH read; zero where DIC was measured, or begun at a station
	Carbon      float64   // inorganic carbon of the raw water, or of the station
	CarbonMet   float64   // with everything else that is dosed
	AlkMet      float64   // with everything else that is dosed
	IonicTarget float64   // after the dose
	Target      Point     // at the target pH
	Needed      float64   // eq/L: alkalinity that the target wants less what is there
	PerDose     float64   // eq of that closed by a mole of the chemical
	Dose        float64   // Needed/PerDose; NaN where PerDose is 0
}

// path is what the hand method follows: from the readings through every
// addition up to the target, where the additions only add; else only the step of
// the solved product, from the water that it meets.
type path struct {
	readings *dosing.Readings
	raw      *dosing.Figures
	from     *dosing.Figures   // where not nil, the water that the product meets
	fixed    []*dosing.Station // what else is dosed
	chem     *dosing.Chemical  // nil where nothing is solved for
	dose     float64           // the model's, mol/L
	pH       float64           // after it
}

// method is the hand method with its choices laid open, so that the ladder can
// take them back one at a time.
type method struct {
	reading, process Constants
	// ionicRaw and ionicTarget are given where not NaN, else by the simple rules.
	ionicRaw, ionicTarget float64
	// saltingOut is the slope of log10 gamma of CO2 against ionic strength; the
	// hand method has none.
	saltingOut float64
}

func (p *path) plain() method {
	m := method{process: At(p.raw.Water.Kelvin), ionicRaw: math.NaN(), ionicTarget: math.NaN()}
	m.reading = m.process
	if p.from == nil {
		m.reading = At(p.readings.PHKelvin.Or(p.readings.Kelvin.Value))
	}
	return m
}

// point is Constants.Point with the salting-out of CO2.
func (m *method) point(c Constants, pH, ionic float64) Point {
	if m.saltingOut != 0 {
		c.K1 *= math.Pow(10, m.saltingOut*ionic)
	}
	return c.Point(pH, ionic)
}

// met goes from the readings to the inorganic carbon and adds up what is dosed
// apart from the solved addition.
func (m *method) met(p *path) Steps {
	s := Steps{Reading: m.reading, Process: m.process, IonicRaw: m.ionicRaw}
	rd := p.readings
	switch {
	case p.from != nil:
		s.FromStation = true
		s.IonicRaw = p.from.IonicStrength
		s.Carbon, s.AlkMet = p.from.DIC, p.from.Water.Alkalinity
	case rd.DIC.Given:
		s.Carbon, s.AlkMet = rd.DIC.Value, rd.Alkalinity.Value
	default:
		s.AlkMet = rd.Alkalinity.Value
	}
	if math.IsNaN(s.IonicRaw) {
		s.IonicRaw = ionicStrength(rd, &p.raw.Water)
	}
	if p.from == nil && !rd.DIC.Given {
		s.Raw = m.point(m.reading, rd.PH.Value, s.IonicRaw)
		s.Carbon = s.Raw.Carbon(rd.Alkalinity.Value)
	}
	s.CarbonMet, s.IonicTarget = s.Carbon, s.IonicRaw
	for _, st := range p.fixed {
		c := &st.Addition.Product.Chemical
		s.AlkMet += c.Equivalents * st.Dose
		s.CarbonMet += c.Adds[carbonate.Carbon] * st.Dose
		s.IonicTarget += ionicPerMole(c) * st.Dose
	}
	if !math.IsNaN(m.ionicTarget) {
		s.IonicTarget = m.ionicTarget
	}
	return s
}

// dose works the method through to the dose of the chemical. The ionic strength
// at the target hangs a little on the dose: a second round settles it.
func (m *method) dose(p *path) Steps {
	s := m.met(p)
	before := s.IonicTarget
	for range 3 {
		s.Target = m.point(m.process, p.pH, s.IonicTarget)
		s.Needed = s.Target.Alkalinity(s.CarbonMet) - s.AlkMet
		s.PerDose = p.chem.Equivalents - p.chem.Adds[carbonate.Carbon]*s.Target.PerCarbon()
		if s.PerDose == 0 {
			s.Dose = math.NaN() // an acid that the method does not know
			break
		}
		s.Dose = s.Needed / s.PerDose
		if !math.IsNaN(m.ionicTarget) {
			break
		}
		s.IonicTarget = math.Max(before+ionicPerMole(p.chem)*math.Max(s.Dose, 0), 0)
	}
	return s
}

// finished finds the pH of the water after every dose, by trial.
func (m *method) finished(p *path) Steps {
	s := m.met(p)
	lo, hi := 0.0, 14.0
	for range 60 {
		s.Target = m.point(m.process, (lo+hi)/2, s.IonicTarget)
		if s.Target.Alkalinity(s.CarbonMet) < s.AlkMet {
			lo = s.Target.PH
		} else {
			hi = s.Target.PH
		}
	}
	return s
}

// ionicStrength of the raw water: from conductivity or solids where measured,
// after Snoeyink & Jenkins, Water Chemistry (from memory), else half the sum of
// z^2 c over the ions entered, the alkalinity as bicarbonate, and one ion of
// charge 1 that closes the charges.
func ionicStrength(r *dosing.Readings, w *carbonate.Water) float64 {
	switch {
	case r.Conductivity.Given:
		return 0.16 * r.Conductivity.Value // 1.6e-5 mol/L per uS/cm
	case r.TDS.Given:
		return 0.025 * r.TDS.Value // 2.5e-5 mol/L per mg/L
	}
	sum, charge := r.Alkalinity.Value, -r.Alkalinity.Value
	for i, v := range w.Totals {
		z := carbonate.Component(i).ReferenceCharge()
		sum += z * z * v
		charge += z * v
	}
	return (sum + math.Abs(charge)) / 2
}

// ionicPerMole is what a mole of a chemical adds to the ionic strength: its own
// ions, and the bicarbonate that its alkalinity makes or takes.
func ionicPerMole(c *dosing.Chemical) float64 {
	sum := c.Equivalents
	for i, v := range c.Adds {
		z := carbonate.Component(i).ReferenceCharge()
		sum += z * z * v
	}
	return sum / 2
}
