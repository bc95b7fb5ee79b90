package reading

import (
	"math"
	"testing"
)

// The factors are definitions (NIST SP 811, from memory) and arithmetic from the
// molar mass of CaCO3.
func TestQuantitiesOfCommands(t *testing.T) {
	for _, c := range []struct {
		name, text string
		want       float64 // SI
	}{
		{"tank", "60", 60}, {"tank", "60 m3", 60}, {"tank", "500 L", 0.5}, {"tank", "1000 gal", 3.785411784},
		{"tank", "1000 imperial gal", 4.54609}, {"tank", "1 ML", 1000}, {"tank", "100 ft3", 2.8316846592},
		{"sample", "100", 1e-4}, {"sample", "0.1 L", 1e-4}, {"normality", "0.02 N", 0.02}, {"normality", "20 meq/L", 0.02},
		{"molarity", "10 mmol/L", 0.01}, {"molarity", "1.00087 mg CaCO3/mL", 0.01}, {"coefficient", "2 %", 0.02},
		{"p-alkalinity", "50.0435", 1e-3}, {"start", "0", 0}, {"end-ph", "4.5", 4.5},
	} {
		f, ok := Command(c.name)
		if !ok {
			t.Fatalf("no quantity %s", c.name)
		}
		v, err := f.Parse(c.text)
		if err != nil || math.Abs(v.SI-c.want) > 1e-9*math.Abs(c.want) {
			t.Errorf("%s %s is %v, %v; want %v", c.name, c.text, v.SI, err, c.want)
		}
	}
	for name, texts := range map[string][]string{
		"tank": {"0", "-1", "60 kg", "2e6", ""}, "sample": {"0", "1001"}, "normality": {"0", "6", "0.02 M"}, "molarity": {"0.6"},
	} {
		f, _ := Command(name)
		for _, text := range texts {
			if v, err := f.Parse(text); err == nil {
				t.Errorf("%s %q was taken as %v", name, text, v.SI)
			}
		}
	}
}

// They are in no form, column or plant file.
func TestQuantitiesOfCommandsAreNoReadings(t *testing.T) {
	for _, f := range commandTable {
		if _, ok := Lookup(f.Name); ok {
			t.Errorf("%s is a reading too", f.Name)
		}
		if f.Help == "" || f.Key == "" || f.Label == "" || len(f.find.exact) == 0 {
			t.Errorf("%s lacks words or units", f.Name)
		}
	}
	if _, ok := Command("ph"); ok {
		t.Error("ph is a quantity of a single command")
	}
}
