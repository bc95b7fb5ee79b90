package bench

// Name is the reason in plain words.
func (c ReasonCode) Name() string {
	switch c {
	case LostCO2:
		return "CO2 left the jar while it was read"
	case TookUpCO2:
		return "the jar took up CO2 from the air while it was read"
	case Precipitation:
		return "calcium carbonate came out in the jar"
	case Organics:
		return "the sample holds a weak acid that was not entered, such as humic matter"
	case WrongStrength:
		return "the reagent is stronger or weaker than its label"
	case WrongMeter:
		return "the meter is off by the same amount throughout"
	case WrongSample:
		return "the sample's own alkalinity or carbon is not as read"
	}
	return string(c)
}

// Test is what tells whether the reason is the one (common practice, no source).
func (c ReasonCode) Test() string {
	switch c {
	case LostCO2, TookUpCO2:
		return "repeat in a closed, brim-full bottle with the probe through the lid, and do not stir air in"
	case Precipitation:
		return "look for a haze against the light; filter the last jar and read calcium and alkalinity again"
	case Organics:
		return "compare colour or TOC with another day; titrate a sample down to pH 3 and back up"
	case WrongStrength:
		return "titrate the reagent itself, or make a fresh stock from another bottle"
	case WrongMeter:
		return "put the probe in two fresh buffers around the readings, at the jar's temperature"
	case WrongSample:
		return "titrate the alkalinity and read the pH of a fresh sample again"
	}
	return ""
}

// Name is what is odd in plain words.
func (k SlipKind) Name() string {
	switch k {
	case DosesBackwards:
		return "a dose below the one before it: lines swapped, or the burette read from the wrong end?"
	case FallsBack:
		return "the curve falls back: readings out of order, or not settled?"
	case NotRepeated:
		return "one dose gives two pH readings: not settled?"
	case StandsAlone:
		return "one reading is off and the others agree: misread, or not settled?"
	}
	return string(k)
}
