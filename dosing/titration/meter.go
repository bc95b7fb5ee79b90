package titration

// Compensated corrects a pH that a meter without automatic compensation showed
// while set to one temperature (K) in a sample at another: the electrode gives
// mV in proportion to the sample's kelvins (Nernst), and is zero near pH 7, so
// pH = 7 + (shown - 7) set/sample. It corrects the electrode, not the water: the
// pH is still that of the sample at its own temperature. Both 273.15 to 323.15 K.
// Errors: *Error.
func Compensated(shown, setKelvin, sampleKelvin float64) (float64, error) {
	for _, e := range []*Error{
		within("ph", shown, 0, 14, false, ""),
		withinCelsius("meter's temperature", setKelvin),
		withinCelsius("sample's temperature", sampleKelvin),
	} {
		if e != nil {
			return 0, e
		}
	}
	return 7 + (shown-7)*setKelvin/sampleKelvin, nil
}
