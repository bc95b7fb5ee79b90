package feed

const (
	fullStretch = 0.90 // of the output at 100 %; above it nothing is left to trim with (common practice, no source)
	turndown    = 0.10 // of the output at 100 %; below it feed pulses (common practice, no source)
	rounding    = 1e-9 // lets what is exactly at a limit pass
)

// withPump adds the pump's share of its output at 100 %. Below a tenth, feed is
// not steady (common practice, no source) and a code says so; a dose of zero is
// a pump that stands still, not one below its turndown. Above 1 the error is
// *TooSmall.
func (r Rates) withPump(capacity float64) (Rates, error) {
	if capacity <= 0 || !r.HasVolume {
		return r, nil
	}
	r.HasPump = true
	r.PumpFraction = r.VolumePerSecond / capacity
	if r.PumpFraction > 1+rounding {
		return r, &TooSmall{Fraction: r.PumpFraction, Needed: r.VolumePerSecond, Capacity: capacity}
	}
	if r.PumpFraction > 0 && r.PumpFraction < turndown {
		r.Codes = append(r.Codes, CodePumpBelowTurndown)
	}
	if r.PumpFraction > fullStretch {
		r.Codes = append(r.Codes, CodePumpNearLimit)
	}
	return r, nil
}
