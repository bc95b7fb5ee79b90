package dosing

import "beckline/carbonate"

// figures reads everything that is shown of a solved water.
func figures(s *carbonate.State, kn known) (Figures, error) {
	w := s.Water
	f := Figures{
		Water:             w,
		PH:                s.PH,
		Alkalinity:        w.Alkalinity,
		DIC:               w.Totals[carbonate.Carbon],
		FreeCO2:           s.FreeCO2(),
		IonicStrength:     s.IonicStrength(),
		IonicStrengthFrom: kn.route,
		BufferIntensity:   s.BufferIntensity(),
	}
	if kn.organics {
		measured, err := titratable(s)
		if err != nil {
			return f, err
		}
		f.Alkalinity = measured
	}
	give := func(ok bool, c carbonate.Component) Optional {
		if !ok {
			return None
		}
		return Some(w.Totals[c])
	}
	f.Calcium = give(kn.calcium, carbonate.Calcium)
	f.Magnesium = give(kn.magnesium, carbonate.Magnesium)
	f.Sodium = give(kn.sodium, carbonate.Sodium)
	f.Chloride = give(kn.chloride, carbonate.Chloride)
	f.Sulfate = give(kn.sulfate, carbonate.Sulfate)
	if kn.calcium {
		if calcite, aragonite, ok := s.SaturationIndex(); ok {
			f.SaturationIndex, f.SaturationAragonite = Some(calcite), Some(aragonite)
		}
		if x, err := s.CCPP(); err == nil {
			f.CCPP = Some(x)
		}
	}
	if kn.chloride && kn.sulfate {
		if ratio, ok := w.ChlorideSulfateRatio(); ok {
			f.ChlorideSulfate = Some(ratio)
		}
		if ratio, ok := w.LarsonRatio(f.Alkalinity); ok {
			f.LarsonRatio = Some(ratio)
		}
	}
	return f, nil
}

// titratable is the alkalinity as a titration to the end point would give it,
// eq/L, for a water with organic acids: it solves titrant = Alk - what is left,
// where the titrant's own ion moves the activities a little.
func titratable(s *carbonate.State) (float64, error) {
	titrant := s.Water.Alkalinity
	for range 100 {
		left, err := leftAtEndPoint(s.Constants(), s.Water, titrant)
		if err != nil {
			return 0, err
		}
		next := s.Water.Alkalinity - left
		if d := next - titrant; d < 1e-15 && d > -1e-15 {
			return next, nil
		}
		titrant = next
	}
	return 0, carbonate.ErrNoConvergence
}
