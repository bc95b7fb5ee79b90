package slips

import (
	"strings"

	"beckline/dosing/reading"
)

// meaning is another way to take a number.
type meaning struct {
	code  string
	value float64 // SI
	cause string
	do    string
	prior float64 // squared deviations that the evidence must bring besides: the odder, the more
}

// Ratios of the units that are taken for one another. Those of mass follow from
// the molar masses of IUPAC; the others are definitions.
const (
	bicarbonatePerCarbonate = 61.017 / (100.087 / 2)
	carbonatePerCalcium     = 100.087 / 40.078
	carbonatePerMagnesium   = 100.087 / 24.305
	nitratePerNitrogen      = 62.004 / 14.007
	sulfatePerSulfur        = 96.06 / 32.06
)

// needed is the evidence that a plain slip of unit must bring, and rare what a
// slip must that any number can have.
const (
	rareSlip = 3
	oddSlip  = 6
)

// meanings lists what else a reading may be, in SI. typedIn is the unit it was
// typed in, "" where not known: units that it was not typed in are then not
// offered as what it was taken for.
func meanings(f reading.Field, v float64, typedIn string) []meaning {
	var out []meaning
	add := func(code string, value float64, cause, do string, prior float64) {
		low, high, open := f.Range()
		if value < low || value > high || open && value == low {
			return
		}
		out = append(out, meaning{code, value, cause, do, prior})
	}
	typed := func(value float64) string { return f.Show(value) }
	from := func(name string) bool { return typedIn == "" || typedIn == name }
	bare := from(f.Units()[0])
	// other adds the case that a bare number was meant in another unit of the field.
	other := func(code, name string, prior float64, do string) {
		if !bare {
			return
		}
		x := f.ToBare(v)
		si, ok := f.From(name, x)
		if ok {
			add(code, si, typed(v)+unit(f)+" or "+typed(v)+" "+name+"? The second is "+typed(si)+unit(f), do, prior)
		}
	}
	switch f.Name {
	case "alkalinity":
		low, high := v/bicarbonatePerCarbonate, v*bicarbonatePerCarbonate
		const do = "look on the report for what the figure is stated as"
		if typedIn != "mg/L as HCO3" {
			add(AlkalinityBasis, low, "as CaCO3 or as HCO3? "+typed(low)+" and "+typed(v)+" differ by 1.22", do, 0)
		}
		add(AlkalinityBasis, high, "as CaCO3 or as HCO3? "+typed(v)+" and "+typed(high)+" differ by 1.22", do, 0)
		other(AlkalinityUnit, "meq/L", 0, do)
		other(AlkalinityUnit, "°dH", rareSlip, do)
		for _, by := range []float64{5, 0.2} {
			add(TitrantStrength, v*by, "titrant of 0.1 or 0.02 eq/L? "+typed(v)+" and "+typed(v*by)+unit(f)+" differ by 5", "read the label of the titrant and titrate a standard", 0)
		}
		for _, by := range []float64{4, 0.25} {
			add(SampleVolume, v*by, "sample of 25 or 100 mL? "+typed(v)+" and "+typed(v*by)+unit(f)+" differ by 4", "look which flask was used", rareSlip)
		}
	case "calcium":
		if !bare {
			break
		}
		m := v / carbonatePerCalcium
		add(CalciumBasis, m, "calcium as Ca or as CaCO3? "+typed(v)+" as CaCO3 is "+typed(m)+unit(f)+" of Ca", "look on the report for what the figure is stated as", 0)
	case "calcium-hardness":
		m := v * carbonatePerCalcium
		add(CalciumBasis, m, "calcium hardness as CaCO3 or as Ca? "+typed(v)+" as Ca is "+typed(m)+unit(f), "look on the report for what the figure is stated as", 0)
		m = v / carbonatePerCalcium
		add(CalciumBasis, m, "was it turned into CaCO3 twice? Once gives "+typed(m)+unit(f), "look on the report for what the figure is stated as", rareSlip)
	case "magnesium":
		m := v / carbonatePerMagnesium
		add(MagnesiumBasis, m, "magnesium as Mg or as CaCO3? "+typed(v)+" as CaCO3 is "+typed(m)+unit(f)+" of Mg", "look on the report for what the figure is stated as", 0)
	case "hardness":
		const do = "look on the report for the unit: the degrees of three countries look alike"
		for _, name := range []string{"°dH", "°fH", "mmol/L", "gpg"} {
			other(HardnessDegrees, name, 0, do)
		}
		degrees := func(as, to string) {
			n, ok1 := f.In(as, v)
			si, ok2 := f.From(to, n)
			if ok1 && ok2 && from(as) {
				text := figures(n, 3)
				add(HardnessDegrees, si, text+" "+as+" or "+text+" "+to+"? The second is "+typed(si)+unit(f), do, 0)
			}
		}
		degrees("°dH", "°fH")
		degrees("°fH", "°dH")
		degrees("°dH", "°e")
		degrees("°e", "°dH")
	case "flow":
		const do = "look at the flow meter for its unit"
		swap := func(as, to string) {
			n, ok1 := f.In(as, v)
			si, ok2 := f.From(to, n)
			if ok1 && ok2 && from(as) {
				text := figures(n, 3)
				add(FlowUnit, si, text+" "+as+" or "+text+" "+to+"? The second is "+typed(si)+unit(f), do, 0)
			}
		}
		for _, pair := range [][2]string{{"ML/d", "MGD (US)"}, {"m³/h", "L/s"}, {"m³/h", "gpm (US)"}, {"m³/h", "m³/d"}} {
			swap(pair[0], pair[1])
			swap(pair[1], pair[0])
		}
	case "temperature", "ph-temperature":
		const do = "read the thermometer again with its unit"
		other(TemperatureUnit, "°F", 0, do)
		if n, ok := f.In("°F", v); ok {
			add(TemperatureUnit, f.FromBare(n), figures(n, 2)+" °F or "+figures(n, 2)+" °C?", do, 0)
		}
	case "conductivity":
		other(ConductivityUnit, "mS/cm", 0, "look at the meter for mS or µS")
		other(ConductivityUnit, "mS/m", 0, "look at the meter for mS/m or µS/cm")
	case "nitrate":
		m := v * nitratePerNitrogen
		add(IonBasis, m, "nitrate as NO3 or as N? "+typed(v)+" as N is "+typed(m)+unit(f), "look on the report for what the figure is stated as", 0)
	case "sulfate":
		m := v * sulfatePerSulfur
		add(IonBasis, m, "sulfate as SO4 or as S? "+typed(v)+" as S is "+typed(m)+unit(f), "look on the report for what the figure is stated as", rareSlip)
	}
	if !straight[f.Name] {
		for _, by := range []float64{10, 0.1} {
			moved := f.FromBare(f.ToBare(v) * by)
			add(DecimalPoint, moved, "is the decimal point in its place? "+typed(v)+" or "+typed(moved)+unit(f)+"?", "type the number again from its source", rareSlip)
		}
	}
	for _, text := range swapped(typed(v)) {
		if n, err := reading.Number(text); err == nil {
			add(DigitsSwapped, f.FromBare(n), "two digits changed places? "+typed(v)+" or "+text+unit(f)+"?", "type the number again from its source", oddSlip)
		}
	}
	return out
}

// swapped lists what a number becomes when two neighbouring digits change places.
func swapped(text string) []string {
	var at []int
	for i, r := range text {
		if r >= '0' && r <= '9' {
			at = append(at, i)
		}
	}
	var out []string
	for i := 1; i < len(at); i++ {
		a, b := at[i-1], at[i]
		if text[a] == text[b] {
			continue
		}
		digits := []byte(text)
		digits[a], digits[b] = digits[b], digits[a]
		if s := string(digits); s[0] != '0' || strings.HasPrefix(s, "0.") {
			out = append(out, s)
		}
	}
	return out
}
