package trim

// Cause is one thing that may be wrong.
type Cause string

// The causes, each weighed as if it were the only one.
const (
	Feed          Cause = "feed"           // the pump gives more or less than set
	Strength      Cause = "strength"       // the product is weaker or stronger than stated
	Flow          Cause = "flow"           // more or less water than read, for every feed
	FinishedMeter Cause = "finished_meter" // the finished pH is read wrong
	RawMeter      Cause = "raw_meter"      // the raw pH is read wrong, and so the carbon
	Alkalinity    Cause = "raw_alkalinity" // the raw alkalinity is wrong
	RawCO2        Cause = "raw_co2"        // the raw sample lost or took up CO2 before it was read
	FinishedCO2   Cause = "finished_co2"   // so did the finished sample
)

// causes in the order in which equals are listed: what is checked fastest first.
var causes = []Cause{Feed, FinishedMeter, RawMeter, Strength, Flow, Alkalinity, RawCO2, FinishedCO2}

// Name is the cause in plain words.
func (c Cause) Name() string {
	switch c {
	case Feed:
		return "the pump delivers another dose than set"
	case Strength:
		return "the product has another strength than stated"
	case Flow:
		return "the water flow is another than read"
	case FinishedMeter:
		return "the finished-water pH meter is off"
	case RawMeter:
		return "the raw-water pH is off"
	case Alkalinity:
		return "the raw alkalinity is off"
	case RawCO2:
		return "the raw sample lost or took up CO2 before it was read"
	case FinishedCO2:
		return "the finished sample lost or took up CO2 before it was read"
	}
	return string(c)
}

// Test is what tells within about two minutes whether the cause is the one
// (common practice, no source).
func (c Cause) Test() string {
	switch c {
	case Feed:
		return "drawdown: time a known volume out of the calibration column; look for air, a worn valve, crystals"
	case Strength:
		return "hydrometer and thermometer in a sample from the day tank; compare with the strength table"
	case Flow:
		return "compare the flow meter with a second meter or with the level change of a tank over a minute"
	case FinishedMeter:
		return "put the probe in two fresh buffers around the reading, or read the same grab with a second meter"
	case RawMeter:
		return "read a fresh raw sample with a second meter at the water's own temperature"
	case Alkalinity:
		return "titrate a second raw sample; check the strength of the titrant and that the burette began at its mark"
	case RawCO2:
		return "fill a raw bottle to the brim under water, close it, read at once, and compare with the first reading"
	case FinishedCO2:
		return "read the finished water in a flowing cup or a brim-full closed bottle, not in an open beaker"
	}
	return ""
}

// changesDose tells whether the plant's own water is off, so that the setting
// must change; a misread finished sample asks for none.
func (c Cause) changesDose() bool { return c != FinishedMeter && c != FinishedCO2 }

// Unit is what a Size of the cause is in: "share" (of the figure as set or
// read), "pH", or "mol/L".
func (c Cause) Unit() string {
	switch c {
	case FinishedMeter, RawMeter:
		return "pH"
	case RawCO2, FinishedCO2:
		return "mol/L"
	}
	return "share"
}
