package slips

import (
	"math"
	"slices"
	"testing"
	"time"

	"beckline/dosing"
)

// slip is one slip made on purpose.
type slip struct {
	name  string
	make  func(t *testing.T, c *dosing.Case, x *Context)
	code  string
	field string
	words string  // that the cause must hold
	meant string  // the value that was meant, as typed; "" where there is none
	close float64 // share by which the finding's may be off it; 0 is a hundredth
}

// table holds the slips that can be seen in a case and its context; slips of the
// typing itself are in TestTyping, those of copying in TestLetters.
var table = []slip{
	{"50 % caustic in the 25 % tank", func(t *testing.T, c *dosing.Case, x *Context) {
		x.Product.Density, x.Product.Kelvin = dosing.Some(1525.0), dosing.Some(293.15)
	}, StrengthDensity, "strength", "caustic-50", "50", 0.01},
	{"weight taken for g/L", func(t *testing.T, c *dosing.Case, x *Context) {
		x.Product.ActivePerVolume = dosing.Some(250.0)
	}, WeightForVolume, "strength", "318 g/L, not 250", "25", 0},
	{"weight taken for g/L, seen at the pump", func(t *testing.T, c *dosing.Case, x *Context) {
		x.Pump.Set = dosing.Some(1.274 * solved(t, *c).Dose().Feed.VolumePerSecond)
	}, WeightForVolume, "strength", "by weight or g/L", "25", 0},
	{"ML/d typed as MGD", func(t *testing.T, c *dosing.Case, x *Context) {
		c.Readings.Flow = some(t, "flow", "6.2 MGD")
	}, FlowUnit, "flow", "MGD", "6.2 ML/d", 0},
	{"ML/d typed as MGD, the capacity alone", func(t *testing.T, c *dosing.Case, x *Context) {
		c.Readings.Flow = some(t, "flow", "6.2 MGD")
		*x = Context{Capacity: some(t, "flow", "333"), Units: map[string]string{"flow": "MGD (US)"}}
	}, FlowUnit, "flow", "MGD", "6.2 ML/d", 0},
	{"MGD typed as ML/d", func(t *testing.T, c *dosing.Case, x *Context) {
		c.Readings.Flow = some(t, "flow", "1.64 ML/d")
	}, FlowUnit, "flow", "MGD", "1.64 MGD", 0},
	{"L/s typed as m3/h", func(t *testing.T, c *dosing.Case, x *Context) {
		c.Readings.Flow = some(t, "flow", "71.8")
	}, FlowUnit, "flow", "L/s", "71.8 L/s", 0},
	{"alkalinity as HCO3 typed as CaCO3", func(t *testing.T, c *dosing.Case, x *Context) {
		c.Readings.Alkalinity = some(t, "alkalinity", "29.3")
	}, AlkalinityBasis, "alkalinity", "as CaCO3 or as HCO3? 24.0 and 29.3 differ by 1.22", "24.0", 0},
	{"the same without any past", func(t *testing.T, c *dosing.Case, x *Context) {
		c.Readings.Alkalinity = some(t, "alkalinity", "29.3")
		*x = Context{}
		// All ions, and a careful analysis: the balance alone must tell.
		c.Readings.Potassium, c.Readings.Nitrate = some(t, "potassium", "0.4"), some(t, "nitrate", "0.6")
		c.Readings.Conductivity = some(t, "conductivity", "90")
	}, AlkalinityBasis, "alkalinity", "differ by 1.22", "24.0", 0},
	{"alkalinity in meq/L typed as mg/L", func(t *testing.T, c *dosing.Case, x *Context) {
		c.Readings.Alkalinity = some(t, "alkalinity", "0.48")
	}, AlkalinityUnit, "alkalinity", "meq/L", "0.48 meq/L", 0},
	{"a meter 0.2 low", func(t *testing.T, c *dosing.Case, x *Context) {
		c.Readings.PH, x.SecondPH = some(t, "ph", "6.32"), some(t, "ph", "6.52")
	}, MetersDisagree, "ph", "0.2 low", "6.52", 0},
	{"a meter 0.2 high", func(t *testing.T, c *dosing.Case, x *Context) {
		c.Readings.PH, x.SecondPH = some(t, "ph", "6.72"), some(t, "ph", "6.52")
	}, MetersDisagree, "ph", "0.2 high", "6.52", 0},
	{"41 °F typed as 41 °C", func(t *testing.T, c *dosing.Case, x *Context) {
		c.Readings.Kelvin = some(t, "temperature", "41")
	}, TemperatureUnit, "temperature", "°F", "41 °F", 0},
	{"the same without any past", func(t *testing.T, c *dosing.Case, x *Context) {
		c.Readings.Kelvin = some(t, "temperature", "41")
		*x = Context{}
	}, TemperatureUnit, "temperature", "°F", "41 °F", 0},
	{"calcium as CaCO3 typed as Ca", func(t *testing.T, c *dosing.Case, x *Context) {
		c.Readings.Calcium = some(t, "calcium", "20")
	}, CalciumBasis, "calcium", "as CaCO3", "8.0", 0},
	{"the same against the total hardness alone", func(t *testing.T, c *dosing.Case, x *Context) {
		*x = Context{}
		*c = dosing.Case{Readings: dosing.Readings{PH: c.Readings.PH, Alkalinity: c.Readings.Alkalinity, Kelvin: c.Readings.Kelvin,
			Calcium: some(t, "calcium", "20"), Hardness: some(t, "hardness", "28")}}
	}, CalciumBasis, "calcium", "as CaCO3", "8.0", 0},
	{"calcium hardness typed as Ca", func(t *testing.T, c *dosing.Case, x *Context) {
		c.Readings.Calcium, c.Readings.CalciumHardness = dosing.None, some(t, "calcium-hardness", "8.0")
	}, CalciumBasis, "calcium-hardness", "as Ca", "20", 0},
	{"magnesium as CaCO3", func(t *testing.T, c *dosing.Case, x *Context) {
		c.Readings.Magnesium = some(t, "magnesium", "8.2")
	}, MagnesiumBasis, "magnesium", "as CaCO3", "2.0", 0},
	{"liquid alum weighed as dry", func(t *testing.T, c *dosing.Case, x *Context) {
		settledBy(t, c, x, 10.67) // what 22 mg/L of the liquid really brings
	}, CoagulantForm, "alum-dry", "liquid alum by weight", "", 0},
	{"liquid alum by volume as dry", func(t *testing.T, c *dosing.Case, x *Context) {
		settledBy(t, c, x, 14.2)
	}, CoagulantForm, "alum-dry", "liquid alum by volume", "", 0},
	{"a decimal point", func(t *testing.T, c *dosing.Case, x *Context) {
		c.Readings.Alkalinity = some(t, "alkalinity", "2.40")
	}, DecimalPoint, "alkalinity", "decimal point", "24.0", 0},
	{"a decimal point in an ion", func(t *testing.T, c *dosing.Case, x *Context) {
		c.Readings.Chloride = some(t, "chloride", "80")
	}, DecimalPoint, "chloride", "decimal point", "8.0", 0},
	{"a dose of 80 for 8", func(t *testing.T, c *dosing.Case, x *Context) {
		c.Additions = append([]dosing.Addition{dose(t, "soda-ash", 80)}, c.Additions...)
		x.Last.Additions = append([]dosing.Addition{dose(t, "soda-ash", 8)}, x.Last.Additions...)
	}, DoseDecimal, "soda-ash", "decimal point", "", 0},
	{"pump left running, water stopped", func(t *testing.T, c *dosing.Case, x *Context) {
		x.Pump.Running, x.Pump.FlowNow = true, dosing.Some(0)
	}, PumpWithoutFlow, "pump", "pump running, flow 0:", "", 0},
	{"pump left in manual", func(t *testing.T, c *dosing.Case, x *Context) { x.Pump.Manual = true }, PumpInManual, "pump", "left in manual?", "", 0},
	{"a scaled probe", func(t *testing.T, c *dosing.Case, x *Context) {
		x.Online, x.Grab = probe(8.8, 0.03), dosing.Some(8.3)
	}, ProbeAndGrab, "finished-ph", "scaled", "", 0},
	{"a flat line", func(t *testing.T, c *dosing.Case, x *Context) { x.Online = probe(8.8, 0) }, ProbeFlat, "finished-ph", "flat", "", 0},
	{"alum into the hypochlorite tank", func(t *testing.T, c *dosing.Case, x *Context) {
		x.Delivery = &Delivery{Note: "alum-liquid", Tank: "hypochlorite-12", Density: dosing.Some(1330.0), Label: true, Present: true}
	}, Incompatible, "product", "chlorine gas", "", 0},
	{"acid into the caustic tank", func(t *testing.T, c *dosing.Case, x *Context) {
		x.Delivery = &Delivery{Note: "sulfuric-93", Tank: "caustic-25", Density: dosing.Some(1828.0), Label: true, Present: true}
	}, WrongProduct, "product", "wrong tank", "", 0},
	{"50 % on a note of 25 %", func(t *testing.T, c *dosing.Case, x *Context) {
		x.Delivery = &Delivery{Note: "caustic-25", Tank: "caustic-25", Density: dosing.Some(1525.0), Label: true, Present: true}
	}, StrengthDensity, "product", "caustic-50 and not caustic-25", "", 0},
	{"nobody stands by", func(t *testing.T, c *dosing.Case, x *Context) {
		x.Delivery = &Delivery{Note: "caustic-25", Tank: "caustic-25", Density: dosing.Some(1274.0), Label: true}
	}, DeliveryUnchecked, "product", "not checked", "", 0},
	{"a crystallised line", func(t *testing.T, c *dosing.Case, x *Context) {
		c.Additions[0].Product = catalogue(t, "caustic-50")
		c.Additions[0].Feed.ProductKelvin = dosing.Some(281.15)
		x.Pump.Set, x.Pump.Drawn = dosing.Some(1e-6), dosing.Some(0)
	}, LineFrozen, "pump", "frozen or crystallised", "", 0},
	{"no delivery in the warm", func(t *testing.T, c *dosing.Case, x *Context) {
		x.Pump.Set, x.Pump.Drawn = dosing.Some(1e-6), dosing.Some(0)
	}, NoDelivery, "pump", "air lock", "", 0},
	{"a worn pump", func(t *testing.T, c *dosing.Case, x *Context) {
		x.Pump.Set, x.Pump.Drawn = dosing.Some(1e-6), dosing.Some(0.85e-6)
	}, DeliveryOff, "pump", "worn valve", "", 0},
	{"80 keyed for 8 and not taken back", func(t *testing.T, c *dosing.Case, x *Context) {
		x.Pump.Set, x.Pump.Drawn = dosing.Some(1e-6), dosing.Some(10e-6)
	}, DeliveryOff, "pump", "not what was keyed", "", 0},
	{"an old density for a new lot", func(t *testing.T, c *dosing.Case, x *Context) {
		c.Additions[0].Feed.Density = dosing.Some(1270.0)
		x.Product.DensityAt, x.Product.LotAt = noon.AddDate(0, -2, 0), noon.AddDate(0, 0, -3)
	}, DensityOld, "density", "new lot", "", 0},
	{"a density of the summer", func(t *testing.T, c *dosing.Case, x *Context) {
		c.Additions[0].Feed.Density, c.Additions[0].Feed.ProductKelvin = dosing.Some(1270.0), dosing.Some(278.15)
		x.Product.DensityAt, x.Product.Kelvin = noon.AddDate(0, -6, 0), dosing.Some(298.15)
	}, DensityOld, "density", "another temperature", "", 0},
	{"a burette read from the wrong end", func(t *testing.T, c *dosing.Case, x *Context) {
		x.Burette = &Burette{Start: dosing.Some(2.5), End: dosing.Some(0.1), PerML: si(t, "alkalinity", "10")}
	}, BuretteWrongEnd, "alkalinity", "changed places", "24.0", 0},
	{"what is left taken for what was used", func(t *testing.T, c *dosing.Case, x *Context) {
		c.Readings.Alkalinity = some(t, "alkalinity", "76")
		x.Burette = &Burette{Start: dosing.Some(0), End: dosing.Some(2.4), Capacity: 10, PerML: si(t, "alkalinity", "10")}
	}, BuretteWrongEnd, "alkalinity", "left in the burette", "24.0", 0},
	{"a burette not at zero", func(t *testing.T, c *dosing.Case, x *Context) {
		c.Readings.Alkalinity = some(t, "alkalinity", "27")
		x.Burette = &Burette{Start: dosing.Some(0.3), End: dosing.Some(2.7), PerML: si(t, "alkalinity", "10")}
	}, BuretteNotZeroed, "alkalinity", "not at zero", "24.0", 0},
	{"duplicates apart", func(t *testing.T, c *dosing.Case, x *Context) {
		x.Burette = &Burette{Duplicates: []float64{si(t, "alkalinity", "24"), si(t, "alkalinity", "26.5")}}
	}, DuplicatesApart, "alkalinity", "misread", "", 0},
	{"titrant of 0.1 for 0.02", func(t *testing.T, c *dosing.Case, x *Context) {
		c.Readings.Alkalinity = some(t, "alkalinity", "120")
	}, TitrantStrength, "alkalinity", "0.1 or 0.02", "24", 0},
	{"a titrant of 0.2", func(t *testing.T, c *dosing.Case, x *Context) {
		x.Burette = &Burette{EqPerLitre: dosing.Some(0.2)}
	}, TitrantStrength, "alkalinity", "0.02, 0.1, 0.16 and 1.6", "", 0},
	{"a sample of 25 mL entered as 100", func(t *testing.T, c *dosing.Case, x *Context) {
		c.Readings.Alkalinity = some(t, "alkalinity", "6.0")
	}, SampleVolume, "alkalinity", "25 or 100 mL", "24", 0},
	{"a sample that stood open", func(t *testing.T, c *dosing.Case, x *Context) {
		x.Sample = Sample{Taken: noon.Add(-50 * time.Minute), Read: noon}
	}, SampleStood, "ph", "stand open", "", 0},
	{"the pH of a blend averaged", func(t *testing.T, c *dosing.Case, x *Context) {
		*c = dosing.Case{Readings: dosing.Readings{PH: some(t, "ph", "8.83"), Alkalinity: some(t, "alkalinity", "151"), Kelvin: some(t, "temperature", "11.5")}}
		*x = Context{Sources: blendSources(t)}
	}, BlendAveraged, "ph", "averaged", "7.61", 0.005},
	{"yesterday's case", func(t *testing.T, c *dosing.Case, x *Context) {
		last := softCase(t)
		x.Last, x.LastAt = &last, noon.Add(-26*time.Hour)
	}, CaseReused, "", "last case", "", 0},
	{"yesterday's temperature", func(t *testing.T, c *dosing.Case, x *Context) {
		x.ReadAt = map[string]time.Time{"temperature": noon.Add(-30 * time.Hour), "ph": noon.Add(-time.Hour)}
	}, ReadingOld, "temperature", "yesterday's", "", 0},
	{"a wrong date", func(t *testing.T, c *dosing.Case, x *Context) {
		x.ReadAt = map[string]time.Time{"ph": noon.Add(24 * time.Hour)}
	}, ReadingInFuture, "ph", "date", "", 0},
	{"digits swapped", func(t *testing.T, c *dosing.Case, x *Context) {
		c.Readings.Alkalinity = some(t, "alkalinity", "42.0")
	}, DigitsSwapped, "alkalinity", "changed places", "24.0", 0},
	{"hardness in °fH typed as °dH", func(t *testing.T, c *dosing.Case, x *Context) {
		hardWater(t, c, x, "32.2 °dH")
	}, HardnessDegrees, "hardness", "°fH", "32.2 °fH", 0},
	{"hardness in °dH typed as mg/L", func(t *testing.T, c *dosing.Case, x *Context) {
		hardWater(t, c, x, "18.0")
	}, HardnessDegrees, "hardness", "°dH", "18.0 °dH", 0},
	{"a dose of product taken as active", func(t *testing.T, c *dosing.Case, x *Context) {
		c.Additions = []dosing.Addition{dose(t, "caustic-25", 40)}
		c.Target = dosing.Target{}
		x.Last.Additions = []dosing.Addition{dose(t, "caustic-25", 10)}
	}, DoseBasis, "caustic-25", "product delivered", "", 0},
	{"a dose as CaCO3", func(t *testing.T, c *dosing.Case, x *Context) {
		c.Additions = []dosing.Addition{dose(t, "bicarbonate", 12)}
		c.Target = dosing.Target{}
		x.Last.Additions = []dosing.Addition{dose(t, "bicarbonate", 20.1)}
		measured(t, c, x, 20.1/12)
	}, DoseBasis, "bicarbonate", "as CaCO3", "", 0},
	{"lime that did not dissolve", func(t *testing.T, c *dosing.Case, x *Context) {
		c.Additions = []dosing.Addition{dose(t, "lime", 12)}
		c.Target = dosing.Target{}
		measured(t, c, x, 0.8)
	}, LimeUndissolved, "lime", "dissolved", "", 0},
	{"all the acid of a batch at once", func(t *testing.T, c *dosing.Case, x *Context) {
		*c = dosing.Case{
			Readings: dosing.Readings{PH: some(t, "ph", "11.5"), Alkalinity: some(t, "alkalinity", "620"), Kelvin: some(t, "temperature", "32"), TDS: some(t, "tds", "1900"),
				Calcium: some(t, "calcium", "18")},
			Additions: []dosing.Addition{{Product: catalogue(t, "sulfuric-98"), Solve: true}},
			Target:    dosing.Target{Kind: dosing.TargetPH, Value: 7.5},
		}
		*x = Context{Batch: true}
	}, AcidOvershoot, "sulfuric-98", "all the acid at once", "", 0},
	{"stroke and speed both changed", func(t *testing.T, c *dosing.Case, x *Context) {
		x.Pump.Stroke, x.Pump.LastStroke = dosing.Some(0.8), dosing.Some(0.6)
		x.Pump.Speed, x.Pump.LastSpeed = dosing.Some(0.7), dosing.Some(0.5)
	}, StrokeAndSpeed, "pump", "product", "", 0},
	{"a stroke without a drawdown", func(t *testing.T, c *dosing.Case, x *Context) {
		x.Pump.Stroke, x.Pump.CalibratedStroke = dosing.Some(0.8), dosing.Some(0.6)
	}, StrokeAndSpeed, "pump", "drawdown", "", 0},
	{"mS/cm typed as µS/cm", func(t *testing.T, c *dosing.Case, x *Context) {
		hardWater(t, c, x, "")
		c.Readings.Conductivity = some(t, "conductivity", "0.64")
	}, ConductivityUnit, "conductivity", "mS/cm", "640", 0},
	{"nitrate as N", func(t *testing.T, c *dosing.Case, x *Context) {
		c.Readings.Nitrate = some(t, "nitrate", "2.26")
		x.Usual["nitrate"] = Usual{Median: si(t, "nitrate", "10"), Low: si(t, "nitrate", "8"), High: si(t, "nitrate", "12.5")}
		c.Readings.Sodium = some(t, "sodium", "11.2") // the cations that go with 10 mg/L
		c.Readings.Conductivity = dosing.None
	}, IonBasis, "nitrate", "as N", "10.0", 0},
}

// settledBy puts 22 mg/L of dry alum first and sets the settled pH to what another
// dose gives.
func settledBy(t *testing.T, c *dosing.Case, x *Context, mgL float64) {
	c.Readings.PH = some(t, "ph", "6.9")
	x.Usual["ph"] = Usual{Median: 6.9, Low: 6.7, High: 7.1}
	c.Additions = append([]dosing.Addition{dose(t, "alum-dry", 22)}, c.Additions...)
	truth := *c
	truth.Additions = []dosing.Addition{dose(t, "alum-dry", mgL)}
	truth.Target = dosing.Target{}
	r := solved(t, truth)
	if r == nil {
		t.Fatal("no settled water")
	}
	fin := &r.Finished().Figures
	x.Measured = map[int]Water{1: {PH: dosing.Some(fin.PH), Alkalinity: dosing.Some(fin.Alkalinity)}}
}

// measured sets the pH after the only addition to what a share of it gives.
func measured(t *testing.T, c *dosing.Case, x *Context, share float64) {
	truth := *c
	truth.Additions = slices.Clone(c.Additions)
	truth.Additions[0].Dose.Value *= share
	r := solved(t, truth)
	if r == nil {
		t.Fatal("no finished water")
	}
	fin := &r.Finished().Figures
	x.Measured = map[int]Water{1: {PH: dosing.Some(fin.PH), Alkalinity: dosing.Some(fin.Alkalinity)}}
}

// hardWater is an invented well water of 18 °dH; hardness "" leaves the total out.
func hardWater(t *testing.T, c *dosing.Case, x *Context, hardness string) {
	*c = dosing.Case{Readings: dosing.Readings{
		PH: some(t, "ph", "7.15"), Alkalinity: some(t, "alkalinity", "285"), Kelvin: some(t, "temperature", "11.5"), Flow: some(t, "flow", "504"),
		Sodium: some(t, "sodium", "10.5"), Chloride: some(t, "chloride", "22"), Sulfate: some(t, "sulfate", "28"), Conductivity: some(t, "conductivity", "640"),
	}}
	if hardness != "" {
		c.Readings.Hardness = some(t, "hardness", hardness)
	} else {
		c.Readings.Calcium, c.Readings.Magnesium = some(t, "calcium", "106"), some(t, "magnesium", "14")
	}
	*x = Context{Now: noon}
}

func blendSources(t *testing.T) []dosing.Source {
	source := func(pH, alkalinity, calcium, magnesium string, parts float64) dosing.Source {
		return dosing.Source{Flow: dosing.Some(parts), Readings: dosing.Readings{
			PH: some(t, "ph", pH), Alkalinity: some(t, "alkalinity", alkalinity), Kelvin: some(t, "temperature", "11.5"),
			Calcium: some(t, "calcium", calcium), Magnesium: some(t, "magnesium", magnesium), Sodium: some(t, "sodium", "10.5"),
			Chloride: some(t, "chloride", "22"), Sulfate: some(t, "sulfate", "28"),
		}}
	}
	return []dosing.Source{source("7.15", "285", "106", "14", 0.4), source("9.95", "62", "34", "4", 0.6)}
}

// probe is half a day of a recorder that moves by so much.
func probe(at, by float64) []Timed {
	var out []Timed
	for i := range 24 {
		out = append(out, Timed{noon.Add(time.Duration(i-23) * 30 * time.Minute), at + by*math.Sin(float64(i))})
	}
	return out
}
