package reading

import (
	"errors"
	"math"
	"regexp"
	"strings"
	"testing"
)

func field(t testing.TB, name string) Field {
	t.Helper()
	f, ok := Lookup(name)
	if !ok {
		t.Fatalf("no field %q", name)
	}
	return f
}

// refusal parses what must be refused and returns the error.
func refusal(t *testing.T, name, text string) *Error {
	t.Helper()
	v, err := field(t, name).Parse(text)
	var e *Error
	if !errors.As(err, &e) {
		t.Fatalf("%s %q was taken as %v", name, text, v.SI)
	}
	if e.Field != name || e.Accepted == "" || strings.ContainsAny(e.Error(), "\n\r\x1b") {
		t.Errorf("%s %q: a poor error: %+v", name, text, *e)
	}
	return e
}

// What people type by mistake, and the code and the hint that they get.
func TestSlipsAreRefusedWithTheirReason(t *testing.T) {
	for _, c := range []struct{ field, text, code, accepted string }{
		{"alkalinity", "", CodeEmpty, "0 to 5000 mg/L as CaCO3"},
		{"alkalinity", "abc", CodeNotANumber, "meq/L"},
		{"alkalinity", "NaN", CodeNotFinite, "0 to 5000"},
		{"alkalinity", "1e999", CodeOverflow, "0 to 5000"},
		{"alkalinity", "-5", CodeTooLow, "mineral acidity"},
		{"alkalinity", "5001", CodeTooHigh, "0 to 5000 mg/L as CaCO3"},
		{"alkalinity", "101 meq/L", CodeTooHigh, "0 to 99.913 meq/L"},
		{"alkalinity", "1,200", CodeAmbiguousNumber, "write 1200 or 1.2"},
		{"alkalinity", "1,200 mg/L", CodeAmbiguousNumber, "write 1200 or 1.2"},
		{"alkalinity", "0.6 mmol/L", CodeAmbiguousUnit, "meq/L or mmol/L H+"},
		{"alkalinity", "0.6 mmol/l", CodeAmbiguousUnit, "meq/L or mmol/L H+"},
		{"alkalinity", "5 °F", CodeAmbiguousUnit, "°fH"},
		{"alkalinity", "5°", CodeAmbiguousUnit, "°dH"},
		{"alkalinity", "30 mS/cm", CodeUnknownUnit, "without a unit it is mg/L as CaCO3"},
		{"alkalinity", "30\x1b]0;x\a", CodeControlCharacters, "0 to 5000"},
		{"alkalinity", "<5", CodeNotMeasured, "nothing where none was measured"},
		{"ph", "15", CodeTooHigh, "0 to 14"},
		{"ph", "-0.1", CodeTooLow, "0 to 14"},
		{"ph", "7.2 mg/L", CodeUnknownUnit, "without a unit"},
		{"temperature", "80", CodeTooHigh, "80 °F would be 26.7 °C"},
		{"temperature", "80 °C", CodeTooHigh, "0 to 50 °C"},
		{"temperature", "200 °F", CodeTooHigh, "32 to 122 °F"},
		{"temperature", "-1", CodeTooLow, "0 to 50 °C"},
		{"temperature", "8°", CodeAmbiguousUnit, "°F"},
		{"temperature", "0x10", CodeHex, "0 to 50"},
		{"temperature", "\u0668", CodeOtherDigits, "0 to 50"},
		{"temperature", "8-9", CodeStraySign, "0 to 50"},
		{"flow", "0", CodeTooLow, "above 0"},
		{"flow", "1e-320", CodeUnderflow, "above 0"},
		{"flow", "-240", CodeTooLow, "above 0"},
		{"flow", "6.2 mL/d", CodeAmbiguousUnit, "ML/d with a capital M"},
		{"flow", "6.2 mld", CodeAmbiguousUnit, "ML/d with a capital M"},
		{"flow", "240 gal", CodeAmbiguousUnit, "gpm or MGD"},
		{"flow", "240 mg/L", CodeUnknownUnit, "m³/h"},
		{"hardness", "50 °F", CodeAmbiguousUnit, "°fH"},
		{"hardness", "3e", CodeAmbiguousUnit, "°e (English degrees)"},
		{"alkalinity", "3 e", CodeAmbiguousUnit, "3e1"},
		{"alkalinity", "-Inf", CodeNotFinite, "0 to 5000"},
		{"alkalinity", "+infinity", CodeNotFinite, "0 to 5000"},
		{"alkalinity", "-nan", CodeNotFinite, "0 to 5000"},
		{"alkalinity", "-mg/L", CodeNotANumber, "0 to 5000"},
		{"hardness", "5001", CodeTooHigh, "0 to 5000"},
		{"calcium", "2001", CodeTooHigh, "0 to 2000 mg/L as Ca"},
		{"calcium", "-1", CodeTooLow, "0 to 2000"},
		{"chloride", "20001", CodeTooHigh, "0 to 20000"},
		{"sulfate", "-0,1", CodeTooLow, "0 to 20000"},
		{"free-chlorine", "51", CodeTooHigh, "0 to 50"},
		{"dic", "4 mg/L", CodeAmbiguousUnit, "mg/L as C or mg/L as CO2"},
		{"conductivity", "0", CodeTooLow, "above 0"},
		{"conductivity", "70001", CodeTooHigh, "70000 µS/cm"},
		{"conductivity", "4 MS/cm", CodeUnknownUnit, "mS/cm"},
		{"target-ph", "3.99", CodeTooLow, "4 to 11.5"},
		{"target-ph", "11.6", CodeTooHigh, "4 to 11.5"},
		{"strength", "0", CodeTooLow, "above 0 to 100 %"},
		{"strength", "120", CodeTooHigh, "above 0 to 100 %"},
		{"strength", "120 %", CodeTooHigh, "above 0 to 100 %"},
		{"strength", "250 g/L", CodeAmbiguousUnit, "% by weight"},
		{"pump", "0", CodeTooLow, "above 0"},
		{"pump", "15 ML/min", CodeAmbiguousUnit, "mL/min"},
		{"product-temperature", "70", CodeTooHigh, "-30 to 60 °C"},
	} {
		e := refusal(t, c.field, c.text)
		if e.Code != c.code || !strings.Contains(e.Accepted, c.accepted) {
			t.Errorf("%s %q: %s, want the code %s and %q", c.field, c.text, e, c.code, c.accepted)
		}
	}
}

// The ends of what is accepted are accepted, in every unit, whatever the
// rounding of the conversion.
func TestHardStopsAreAcceptedThemselves(t *testing.T) {
	for _, f := range Fields() {
		low, high, open := f.Range()
		for i, u := range f.units {
			for _, limit := range []float64{low, high} {
				text := strings.Replace(sprint(u.fromSI(limit)), "e+", "e", 1) + " " + u.name
				v, err := f.Parse(text)
				if open && limit == low {
					if err == nil {
						t.Errorf("%s %q was accepted", f.Name, text)
					}
					continue
				}
				if err != nil || v.SI != limit {
					t.Errorf("%s %q (unit %d): %v %v, want %v", f.Name, text, i, v.SI, err, limit)
				}
			}
		}
	}
}

// The bands of common practice: a value outside is used and called unusual.
func TestUnusualValues(t *testing.T) {
	for _, c := range []struct {
		field, text, why string // why "" means usual
	}{
		{"ph", "5.5", ""}, {"ph", "10.5", ""}, {"ph", "5.49", "usually 5.5 to 10.5"}, {"ph", "10.51", "usually"},
		{"temperature", "1", ""}, {"temperature", "30", ""}, {"temperature", "0.5", "usually 1 to 30 °C"},
		{"temperature", "86 °F", ""}, {"temperature", "33.8 °F", ""},
		{"temperature", "41", "41 °F would be 5.0 °C"},
		{"temperature", "41 °C", "41 °F would be 5.0 °C"}, // the bare unit, typed out or not
		{"alkalinity", "5", ""}, {"alkalinity", "400", ""}, {"alkalinity", "4.9", "usually 5 to 400"},
		{"alkalinity", "0.6", "0.6 meq/L would be 30.0 mg/L as CaCO3"}, {"alkalinity", "401", "usually"},
		{"calcium", "1", ""}, {"calcium", "200", ""}, {"calcium", "0.9", "usually"},
		{"calcium", "300", "300 mg/L as CaCO3 would be 120 mg/L as Ca"},
		{"hardness", "500", ""}, {"hardness", "501", "usually at most 500"}, {"hardness", "0", ""},
		{"conductivity", "20", ""}, {"conductivity", "1500", ""}, {"conductivity", "1501", "usually"},
		{"conductivity", "0.64", "0.64 mS/cm would be 640 µS/cm"},
		{"chloride", "250", ""}, {"chloride", "251", "usually at most 250"}, {"sulfate", "251", "usually"},
		{"free-chlorine", "5", ""}, {"free-chlorine", "5.1", "usually"},
		{"target-ph", "6.5", ""}, {"target-ph", "9.5", ""}, {"target-ph", "6.4", "usually"}, {"target-ph", "9.6", "usually"},
		{"target-si", "0.5", ""}, {"target-si", "-0.5", ""}, {"target-si", "0.6", "usually"},
		{"target-ccpp", "-5", ""}, {"target-ccpp", "15", ""}, {"target-ccpp", "-6", "usually"}, {"target-ccpp", "16", "usually"},
		{"strength", "0.25", "usually at least 1 %"}, {"strength", "25", ""},
	} {
		v, err := field(t, c.field).Parse(c.text)
		if err != nil {
			t.Errorf("%s %q: %v", c.field, c.text, err)
			continue
		}
		if v.Unusual != (c.why != "") || !strings.Contains(v.UnusualWhy, c.why) || v.Unusual != (v.Limit != 0) {
			t.Errorf("%s %q: unusual %v, %q (limit %v), want %q", c.field, c.text, v.Unusual, v.UnusualWhy, v.Limit, c.why)
		}
	}
}

// Every spelling that people use for a unit means that unit.
func TestSpellingsOfUnits(t *testing.T) {
	for name, sets := range map[string][][]string{
		"flow": {
			{"240", "240 m3/h", "240m3/h", "240 m³/h", "240\u00a0m³/h", "240 M3/H", "240 m^3/hr", "240 m3 h-1", "240 m³·h⁻¹", "240 m3 per hour"},
			{"1 MGD", "1 mgd", "1 Mgd", "1MGD", "1 MGD (US)", "1 US MGD", "1 U.S. mgd", "1 Mgal/d", "1 Mgal/day"},
			{"1 imperial MGD", "1 IMGD", "1 MIGD", "1 imp. MGD", "1 UK MGD"},
			{"700 gpm", "700 GPM", "700 US gpm", "700 gpm (US)", "700 gal/min", "700 gal per min", "700 gal/minute"},
			{"700 imperial gpm", "700 imp gpm", "700 igpm", "700 Imp. gal/min"},
			{"6.2 ML/d", "6.2 Ml/d", "6.2 ML/day", "6,2 MLD", "6.2 ML per day"},
			{"70 L/s", "70 l/s", "70 lps", "70 L s-1", "70 LPS"},
		},
		"alkalinity": {
			{"30", "30 mg/L", "30 mg/l", "30 MG/L", "30 ppm", "30 mg/L as CaCO3", "30 mg/L CaCO3", "30 mg/l as caco3", "30mg/LCaCO3", "30 mg/L (CaCO₃)", "30 mg L⁻¹ CaCO₃", "30 mg per L as CaCO3"},
			{"0.6 meq/L", "0.6 meq/l", "0.6meq/L", "0.6 MEQ/L", "0.6 mmol/L H+", "0.6 mmol/l h+", "0.6 mmol/L H⁺"},
			{"600 µeq/L", "600 ueq/L", "600 \u03bceq/l"},
			{"5 °dH", "5 dH", "5°dH", "5 ºdH", "5 deg dH", "5 °dh", "5 °DH", "5 dKH"},
			{"5 °fH", "5 fH", "5 °f", "5 deg fH"},
			{"5 °e", "5 deg e", "5°e", "5 °Clark"},
			{"5 gpg", "5 GPG", "5 grains/gallon", "5 grains per gallon"},
			{"36 mg/L HCO3", "36 mg/L as HCO3", "36 mg/L HCO₃⁻", "36 mg/l hco3-"},
		},
		"temperature": {
			{"8", "8 C", "8 °C", "8°C", "8 c", "8 ℃", "8 º C", "8 ˚C", "8 deg C", "8 degrees C", "8 Celsius", "8,0 °C"},
			{"46.4 °F", "46.4 F", "46.4F", "46.4 ℉", "46.4 deg F", "46,4 °f"},
			{"281.15 K", "281.15 \u212a", "281.15k"},
		},
		"conductivity": {
			{"78", "78 µS/cm", "78 uS/cm", "78 μS/cm", "78 US/CM", "78 us/cm", "78 µS cm⁻¹", "78 umhos/cm"},
			{"7.8 mS/m", "7.8 ms/m"}, {"0.078 mS/cm", "0.078 mmho/cm"},
		},
		"calcium": {
			{"7.2", "7.2 mg/L", "7.2 mg/L as Ca", "7.2 mg/L Ca", "7.2 ppm", "7.2 g/m3"},
			{"18 mg/L CaCO3", "18 mg/L as CaCO3", "18 ppm CaCO3"},
			{"0.18 mmol/L", "0.18 mmol/l", "0.18 mol/m³"}, {"7200 µg/L", "7200 ug/L", "7200 ppb"},
		},
		"ammonia":  {{"1", "1 mg/L", "1 mg/L as N", "1 mg/L N"}, {"1.2 mg/L NH3", "1.2 mg/l as nh3"}},
		"strength": {{"25", "25 %", "25%", "25 percent"}, {"25 % by weight", "25 % w/w", "25% wt", "25 wt%"}, {"12.5 % trade", "12.5 trade %"}, {"125 g/L Cl2", "125 g/L as Cl2"}},
		"pump":     {{"15", "15 L/h", "15 l/h", "15 LPH", "15 L/hr"}, {"250 mL/min", "250 ml/min", "250 mL/MIN"}, {"4 gph", "4 gal/h", "4 GPH", "4 gal/hr", "4 gal/h (US)"}},
		"hardness": {{"3 mmol/L", "3 mmol/l"}, {"5 °dH", "5 dGH"}},
		"dic":      {{"0.5", "0.5 mmol/L"}, {"6 mg/L C", "6 mg C/L", "6 mg/L as C"}},
	} {
		f := field(t, name)
		for _, set := range sets {
			first, err := f.Parse(set[0])
			if err != nil {
				t.Errorf("%s %q: %v", name, set[0], err)
				continue
			}
			for _, text := range set[1:] {
				v, err := f.Parse(text)
				if err != nil || math.Abs(v.SI-first.SI) > 1e-12*first.SI {
					t.Errorf("%s %q = %v, %v, want %v as %q", name, text, v.SI, err, first.SI, set[0])
				}
			}
		}
	}
}

// Milli and mega differ by a thousand million: no spelling mixes them up.
func TestLeadingMIsNeverFolded(t *testing.T) {
	for _, f := range Fields() {
		for _, u := range f.units {
			for _, text := range append([]string{u.name}, u.also...) {
				var swapped string
				switch text[0] {
				case 'm':
					swapped = "M" + text[1:]
				case 'M':
					swapped = "m" + text[1:]
				default:
					continue
				}
				was, err1 := f.Parse("1 " + text)
				now, err2 := f.Parse("1 " + swapped)
				if err1 == nil && err2 == nil && math.Abs(was.SI-now.SI) > 1e-12*was.SI {
					t.Errorf("%s: %q is %v but %q is %v", f.Name, text, was.SI, swapped, now.SI)
				}
			}
		}
	}
	if _, err := field(t, "flow").Parse("1 ML/d"); err != nil {
		t.Error(err)
	}
}

// Spellings of different units of a field must not meet.
func TestSpellingsAreUnique(t *testing.T) {
	for _, f := range Fields() {
		seen := map[string]int{}
		for i, u := range f.units {
			for _, text := range append([]string{u.name}, u.also...) {
				for _, key := range []string{normalise(text), "fold:" + fold(normalise(text))} {
					if j, ok := seen[key]; ok && j != i {
						t.Errorf("%s: %q is both %s and %s", f.Name, text, f.units[j].name, u.name)
					}
					seen[key] = i
				}
			}
		}
	}
}

func TestFieldsAreWhole(t *testing.T) {
	names, keys := map[string]bool{}, map[string]bool{}
	flag, key := regexp.MustCompile(`^[a-z]+(-[a-z]+)*$`), regexp.MustCompile(`^[a-z]+[a-z0-9_]*$`)
	for _, f := range Fields() {
		if names[f.Name] || keys[f.Key] || !flag.MatchString(f.Name) || !key.MatchString(f.Key) {
			t.Errorf("%s: name or key %q is not new or not in the style", f.Name, f.Key)
		}
		names[f.Name], keys[f.Key] = true, true
		if f.Label == "" || len(f.Label) > 14 || f.Help == "" || strings.HasSuffix(f.Help, ".") || f.Step <= 0 || f.Group == 0 {
			t.Errorf("%s: label %q, help %q, step %v or group is missing or too long", f.Name, f.Label, f.Help, f.Step)
		}
		low, high, _ := f.Range()
		usualLow, usualHigh := f.Usual()
		if !(low < high) || !(usualLow < usualHigh) || !math.IsInf(usualLow, 0) && usualLow < low || !math.IsInf(usualHigh, 0) && usualHigh > high {
			t.Errorf("%s: limits %v %v and usual %v %v do not nest", f.Name, low, high, usualLow, usualHigh)
		}
		for _, meant := range []string{f.limits.meantLow, f.limits.meantHigh} {
			if _, ok := f.find.find(meant); meant != "" && !ok {
				t.Errorf("%s: the unit %q that may be meant is not accepted", f.Name, meant)
			}
		}
		byName, ok1 := Lookup(f.Name)
		byKey, ok2 := LookupKey(f.Key)
		if !ok1 || !ok2 || byName.Key != f.Key || byKey.Name != f.Name {
			t.Errorf("%s cannot be looked up", f.Name)
		}
	}
	for name := range refusedUnits {
		if !names[name] {
			t.Errorf("refused units for %q, which is no field", name)
		}
	}
	if _, ok := Lookup("ph_temperature_c"); ok {
		t.Error("a key was found as a name")
	}
}

// The names that scripts rely on, in their order.
func TestFieldNamesAndKeys(t *testing.T) {
	want := strings.Fields(`
		ph=ph ph-temperature=ph_temperature_c alkalinity=alkalinity_mg_l_caco3 temperature=temperature_c flow=flow_m3_h
		calcium=calcium_mg_l magnesium=magnesium_mg_l
		calcium-hardness=calcium_hardness_mg_l_caco3 hardness=hardness_mg_l_caco3
		sulfate=sulfate_mg_l chloride=chloride_mg_l sodium=sodium_mg_l potassium=potassium_mg_l nitrate=nitrate_mg_l
		ammonia=ammonia_n_mg_l phosphate=phosphate_p_mg_l
		silica=silica_mg_l boron=boron_mg_l fluoride=fluoride_mg_l free-chlorine=free_chlorine_mg_l
		acetate=acetate_mg_l formate=formate_mg_l citrate=citrate_mg_l
		dic=dic_mmol_l conductivity=conductivity_us_cm tds=tds_mg_l
		target-ph=target_ph target-alkalinity=target_alkalinity_mg_l_caco3
		target-si=target_saturation_index target-ccpp=target_ccpp_mg_l_caco3 target-dic=target_dic_mmol_l
		strength=strength_percent product-temperature=product_temperature_c pump=pump_l_h`)
	var got []string
	for _, f := range Fields() {
		got = append(got, f.Name+"="+f.Key)
	}
	if strings.Join(got, " ") != strings.Join(want, " ") {
		t.Errorf("fields are\n%v\nwant\n%v", got, want)
	}
}

// Windows consoles and plain terminals: every unit has a spelling in ASCII, and
// it is accepted.
func TestASCIIUnitsAreAccepted(t *testing.T) {
	for _, f := range Fields() {
		for _, name := range f.Units() {
			plain := ASCII(name)
			if strings.ContainsFunc(plain, func(r rune) bool { return r > 126 }) {
				t.Errorf("%s: %q is not ASCII", f.Name, plain)
			}
			i, ok := f.find.find(plain)
			if !ok || f.units[i].name != name {
				t.Errorf("%s: %q is not read as %q", f.Name, plain, name)
			}
		}
	}
}

func TestErrorLineNamesFieldValueAndWhatIsAccepted(t *testing.T) {
	e := refusal(t, "alkalinity", "1,200")
	want := `alkalinity: "1,200" can be read in two ways; accepted: write 1200 or 1.2`
	if e.Error() != want {
		t.Errorf("%q, want %q", e.Error(), want)
	}
	if got := Reason("no such code"); got != "cannot be used" {
		t.Errorf("Reason of an unknown code: %q", got)
	}
	long := refusal(t, "alkalinity", strings.Repeat("x", 500))
	if n := len([]rune(long.Given)); n != EchoLimit {
		t.Errorf("an echo of %d characters", n)
	}
}
