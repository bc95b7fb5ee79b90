package carbonate

import "errors"

// Stream is a water and its share of a blend by flow, in any one unit.
type Stream struct {
	Water Water
	Flow  float64
}

// Blend mixes streams by flow. Totals, alkalinity, background and heat are
// conserved; pH is not averaged but follows from Solve. Flows must not be
// negative and their sum must be positive.
func Blend(streams ...Stream) (Water, error) {
	sum := 0.0
	for _, s := range streams {
		if !(s.Flow >= 0) {
			return Water{}, errors.New("carbonate: a blend's flow is negative")
		}
		sum += s.Flow
	}
	if !(sum > 0) {
		return Water{}, errors.New("carbonate: a blend has no flow")
	}
	var w Water
	coldest, warmest := streams[0].Water.Kelvin, streams[0].Water.Kelvin
	for _, s := range streams {
		f := s.Flow / sum
		coldest, warmest = min(coldest, s.Water.Kelvin), max(warmest, s.Water.Kelvin)
		for i := range w.Totals {
			w.Totals[i] += f * s.Water.Totals[i]
		}
		w.Alkalinity += f * s.Water.Alkalinity
		w.Background += f * s.Water.Background
		w.Kelvin += f * s.Water.Kelvin
	}
	// Rounding must not carry a mean outside what was mixed.
	w.Kelvin = min(max(w.Kelvin, coldest), warmest)
	return w, nil
}
