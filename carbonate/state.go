package carbonate

import "math"

// State is a water at equilibrium: its pH and every species.
type State struct {
	Water Water
	PH    float64 // -log10 of the hydrogen-ion activity
	p     point
}

// IonicStrength is the ionic strength, mol/L.
func (s *State) IonicStrength() float64 { return s.p.ionic }

// Constants are the equilibrium constants that the state was solved with.
func (s *State) Constants() *Constants { return s.p.k }

// ActivityCoefficients returns the coefficients of a neutral species and of
// ions of charge 1, 2 and 3.
func (s *State) ActivityCoefficients() (g0, g1, g2, g3 float64) {
	a := &s.p.act
	return a.g0, a.g1, a.g2, a.g3
}

// Species are the concentrations of the carbonate system and the ion pairs, mol/L.
type Species struct {
	H, OH, CO2, HCO3, CO3      float64
	Ca, Mg, SO4, HSO4          float64
	CaHCO3, CaCO3, CaSO4, CaOH float64
	MgHCO3, MgCO3, MgSO4, MgOH float64
	MinorAlkalinity            float64 // eq/L that the minor acids contribute
}

// Species returns the concentrations, mol/L.
func (s *State) Species() Species {
	p := &s.p
	return Species{
		H: p.hyd, OH: p.oh, CO2: p.co2, HCO3: p.hco3, CO3: p.co3,
		Ca: p.ca, Mg: p.mg, SO4: p.so4, HSO4: p.hso4,
		CaHCO3: p.caHCO3, CaCO3: p.caCO3, CaSO4: p.caSO4, CaOH: p.caOH,
		MgHCO3: p.mgHCO3, MgCO3: p.mgCO3, MgSO4: p.mgSO4, MgOH: p.mgOH,
		MinorAlkalinity: p.minorAlk,
	}
}

// FreeCO2 is dissolved carbon dioxide (with the trace of H2CO3), mol/L.
func (s *State) FreeCO2() float64 { return s.p.co2 }

// check refuses what the equations do not describe.
func check(w *Water) error {
	if w.Totals[Chlorine] > 0 && w.Totals[Ammonia] > 0 {
		return ErrChlorineWithAmmonia
	}
	for i, v := range w.Totals {
		if !(v >= 0) || math.IsInf(v, 0) {
			return &RangeError{Component(i).Name(), v, 0, math.Inf(1)}
		}
	}
	if !(w.Background >= 0) {
		return &RangeError{"background ionic strength", w.Background, 0, MaxIonicStrength}
	}
	if math.IsNaN(w.Alkalinity) || math.IsInf(w.Alkalinity, 0) {
		return &RangeError{"alkalinity", w.Alkalinity, math.Inf(-1), math.Inf(1)}
	}
	return nil
}

func (p *point) checkIonic() error {
	if !(p.ionic <= MaxIonicStrength) {
		return &RangeError{"ionic strength", p.ionic, 0, MaxIonicStrength}
	}
	return nil
}
