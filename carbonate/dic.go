package carbonate

import "math"

// IonicInput says how the ionic strength of a raw water is known.
type IonicInput struct {
	// Measured is the ionic strength from conductivity or dissolved solids,
	// mol/L; 0 means that it is to be summed from the ions.
	Measured float64
}

// Ionic strength from bulk readings, after Snoeyink & Jenkins, Water Chemistry
// (from memory): 1.6e-5 per uS/cm at 25 C and 2.5e-5 per mg/L of dissolved solids.
const (
	ionicPerSiemensMetre = 1.6e-5 * 1e4 // mol/L per S/m
	ionicPerKilogramM3   = 2.5e-5 * 1e3 // mol/L per kg/m3
)

// IonicStrengthFromConductivity gives mol/L from S/m at 25 C.
func IonicStrengthFromConductivity(siemensPerMetre float64) float64 {
	return ionicPerSiemensMetre * siemensPerMetre
}

// IonicStrengthFromSolids gives mol/L from kg/m3 of total dissolved solids.
func IonicStrengthFromSolids(kgPerM3 float64) float64 { return ionicPerKilogramM3 * kgPerM3 }

// ChargeBalance is the charge of all ions of a water, eq/L, positive where
// cations exceed anions. Alkalinity being the proton condition, it needs no
// speciation: the reference species' charge less the alkalinity.
func (w *Water) ChargeBalance() float64 {
	q := -w.Alkalinity
	for i, v := range w.Totals {
		q += components[i].charge * v
	}
	return q
}

// FromPH solves a water whose pH and alkalinity are known for its inorganic
// carbon. w.Totals[Carbon] and w.Background are results, not input.
//
// The ionic strength is the measured one where given: what the species do not
// explain becomes the constant Background. Where they need more than was
// measured the ions win and ionsWin is true. Without a measurement the charge
// imbalance is closed by a monovalent ion, half of which is the Background.
//
// Errors: *RangeError, ErrAlkalinityBelowPH, ErrChlorineWithAmmonia.
func (k *Constants) FromPH(pH float64, w Water, in IonicInput) (s State, ionsWin bool, err error) {
	w.Totals[Carbon], w.Background = 0, 0
	if err := check(&w); err != nil {
		return State{}, false, err
	}
	if !(pH >= 0 && pH <= 14) {
		return State{}, false, &RangeError{"pH", pH, 0, 14}
	}
	ionsWin, err = k.fromPH(&s, math.Exp(-pH*math.Ln10), &w, in)
	if err != nil {
		return State{}, ionsWin, err
	}
	s.PH = pH
	return s, ionsWin, nil
}

func (k *Constants) fromPH(s *State, h float64, w *Water, in IonicInput) (ionsWin bool, err error) {
	s.Water = *w
	s.Water.Kelvin = k.Kelvin
	p := &s.p
	background := 0.0
	if in.Measured == 0 {
		background = math.Abs(w.ChargeBalance()) / 2
	}
	p.start(k, &w.Totals, background)
	p.setH(h)
	if in.Measured > 0 {
		if in.Measured > MaxIonicStrength {
			return false, &RangeError{"ionic strength", in.Measured, 0, MaxIonicStrength}
		}
		p.imposed, p.ionic = true, in.Measured
	} else {
		p.ionic = min(background+0.5*(p.inertI2+4*(p.ca+p.mg+p.so4)+math.Abs(w.Alkalinity)), MaxIonicStrength)
	}
	converged := p.converge(alkalinityGiven, w.Alkalinity)
	if p.imposed {
		background = in.Measured - p.explainedIonic()
		if background < 0 {
			ionsWin, background = true, 0
			p.imposed, p.background = false, 0
			converged = p.converge(alkalinityGiven, w.Alkalinity)
		}
	}
	p.imposed, p.background = false, background
	s.Water.Background = background
	if err := p.checkIonic(); err != nil {
		return ionsWin, err
	}
	// Rounding at the edge of no carbon at all is not the reader's fault.
	if p.forCarbon < -1e-12 {
		return ionsWin, ErrAlkalinityBelowPH
	}
	carbon := p.carbon()
	if !converged || math.IsNaN(carbon) {
		return ionsWin, ErrNoConvergence
	}
	p.t[Carbon] = carbon
	s.Water.Totals[Carbon] = carbon
	return ionsWin, nil
}
