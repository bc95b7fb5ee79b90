package entry

import (
	"math"
	"strings"
	"testing"
	"unicode"

	"beckline/dosing/reading"
)

// Whatever is typed anywhere: no panic, and either finite numbers or problems
// that can be shown.
func FuzzForm(f *testing.F) {
	f.Add("7.0", "30", "10", "8.5", "caustic-25", "25", "alum-dry=22")
	f.Add("", "1,200", "-5", "15", "caustik", "0", "=")
	f.Add("NaN", "1e999", "80", "\x1b[2J", "\x00", "120", "hypochlorite-12=1.2 mg/L Cl2")
	f.Add("7", "0.6 mmol/L", "46 °F", "8,5", "NaOH", "12.5 % trade", "lime=5 Ca(OH)2")
	f.Fuzz(func(t *testing.T, ph, alkalinity, temperature, target, product, strength, add string) {
		form := Form{
			Values: map[string]string{
				"ph": ph, "alkalinity": alkalinity, "temperature": temperature, "target-ph": target, "strength": strength,
			},
			Product: product, Adds: []string{add},
		}
		c, err := form.Case(NeedDose)
		problems := form.Problems(NeedDose)
		if (err == nil) != (len(problems) == 0) {
			t.Fatalf("the error is %v and the problems are %v", err, problems)
		}
		for _, p := range problems {
			shown := p.Field + p.Given + p.Accepted
			if p.Code == "" || p.Accepted == "" || len([]rune(p.Given)) > reading.EchoLimit || strings.ContainsFunc(shown, unicode.IsControl) {
				t.Fatalf("a poor problem: %+v", p)
			}
		}
		if err != nil {
			return
		}
		for _, x := range []float64{
			c.Readings.PH.Value, c.Readings.Alkalinity.Value, c.Readings.Kelvin.Value, c.Target.Value,
			c.Additions[0].Dose.Value, c.Additions[len(c.Additions)-1].Product.Strength,
		} {
			if math.IsNaN(x) || math.IsInf(x, 0) {
				t.Fatalf("%+v holds %v", form, x)
			}
		}
	})
}
