package carbonate

// AirCO2 is the default partial pressure of carbon dioxide in air at one
// atmosphere, atm (about 420 ppmv, the mid-2020s; NOAA record, from memory).
const AirCO2 = 4.2e-4

// Aerate removes a share (0 to 1) of the free CO2 in excess of equilibrium with
// air of the given CO2 partial pressure, atm, at constant alkalinity, and
// returns the water with less inorganic carbon. A water below equilibrium takes
// CO2 up by the same rule.
func (s *State) Aerate(share, pCO2 float64) (Water, error) {
	if !(share >= 0 && share <= 1) {
		return Water{}, &RangeError{"share of CO2 removed", share, 0, 1}
	}
	if !(pCO2 >= 0 && pCO2 <= 1) {
		return Water{}, &RangeError{"CO2 partial pressure", pCO2, 0, 1}
	}
	// At constant alkalinity the free CO2 left over fixes the water, but carbon
	// leaves as CO2 while bicarbonate re-forms it: find the carbon at which the
	// solved free CO2 is the wanted one.
	k := s.p.k
	equilibrium := k.Henry * pCO2 * s.p.act.inv0
	want := s.p.co2 - share*(s.p.co2-equilibrium)
	return k.carbonForCO2(s.Water, want)
}

// carbonForCO2 finds the total carbon at which a water of this alkalinity has
// the wanted free CO2, mol/L.
func (k *Constants) carbonForCO2(w Water, want float64) (Water, error) {
	// Free CO2 rises strictly with carbon at constant alkalinity: bracket and halve
	// on a logarithmic scale, finishing with the secant.
	lo, hi := 0.0, w.Totals[Carbon]+want+1e-9
	co2 := func(c float64) (float64, error) {
		w.Totals[Carbon] = c
		s, err := k.Solve(w)
		return s.FreeCO2(), err
	}
	for range 60 {
		v, err := co2(hi)
		if err != nil {
			return Water{}, err
		}
		if v >= want {
			break
		}
		lo, hi = hi, hi*2
	}
	for range 200 {
		mid := 0.5 * (lo + hi)
		v, err := co2(mid)
		if err != nil {
			return Water{}, err
		}
		if v < want {
			lo = mid
		} else {
			hi = mid
		}
		if hi-lo <= 1e-15*hi {
			break
		}
	}
	w.Totals[Carbon] = 0.5 * (lo + hi)
	return w, nil
}
