package site_test

import (
	"math"
	"strings"
	"testing"

	"beckline/dosing/reading"
	"beckline/dosing/site"
)

func TestQuantities(t *testing.T) {
	s := load(t, `
[products.a]
catalogue = "caustic-25"
density = "10.6 lb/gal"
price = "0.2 /lb"
maximum-use = "0,05 g/L"
[tanks.a]
volume = "1e3 L"
[tanks.b]
kind = "bulk"
volume = "60 gal"
[tanks.c]
volume = 2
[lines.x]
contact-volume = "0.25 MG"
sensor-volume = "1 200 L"
change = { ph = "0.2 pH", dose = 5 }
`)
	p := s.ProductNamed("a")
	for name, c := range map[string][2]float64{
		"density":     {p.Density.Value, 10.6 * 0.45359237 / 3.785411784e-3},
		"price":       {p.Price.Value, 0.2 / 0.45359237},
		"use level":   {p.MaximumUse.Value, 0.05},
		"tank a":      {s.Tanks[0].Volume, 1},
		"tank b":      {s.Tanks[1].Volume, 60 * 3.785411784e-3},
		"tank c":      {s.Tanks[2].Volume, 2},
		"contact":     {s.Start.Contact.Value, 0.25e6 * 3.785411784e-3},
		"sensor":      {s.Start.Sensor.Value, 1.2},
		"change ph":   {s.Start.Change.PH, 0.2},
		"change dose": {s.Start.Change.Dose, 0.05},
	} {
		if math.Abs(c[0]/c[1]-1) > 1e-12 {
			t.Errorf("%s is %g, want %g", name, c[0], c[1])
		}
	}
	if s.Tanks[0].Kind != "day" || s.Tanks[1].Kind != "bulk" {
		t.Errorf("%+v %+v", s.Tanks[0], s.Tanks[1])
	}
}

func TestTolerances(t *testing.T) {
	l := load(t, `
[lines.x.tolerances]
ph = 0.05
temperature = "0.9 F"
ph-temperature = 0.5
flow = "2 %"
alkalinity = "0.02 meq/L"
calcium = 0.4
`).Start
	calcium, _ := reading.Lookup("calcium")
	for name, c := range map[string][2]float64{
		"ph":          {l.Tolerances["ph"].Of(7), 0.05},
		"temperature": {l.Tolerances["temperature"].Of(281), 0.5},
		"bare":        {l.Tolerances["ph-temperature"].Of(281), 0.5},
		"flow":        {l.Tolerances["flow"].Of(0.1), 0.002},
		"alkalinity":  {l.Tolerances["alkalinity"].Of(1e-3), 0.02e-3},
		"calcium":     {l.Tolerances["calcium"].Of(1e-3), calcium.FromBare(0.4)},
	} {
		if math.Abs(c[0]/c[1]-1) > 1e-9 {
			t.Errorf("%s is %g, want %g", name, c[0], c[1])
		}
	}
	if (site.Tolerance{Absolute: 1, Relative: 0.1}).Of(-20) != 2 {
		t.Error("the larger of the two counts")
	}
}

func TestBands(t *testing.T) {
	l := load(t, `
[lines.x.limits]
ph = [6, "8.5"]
temperature = { min = "41 F" }
flow = { max = 300 }
`).Start
	ph, temperature, flow := l.Limits["ph"], l.Limits["temperature"], l.Limits["flow"]
	for name, ok := range map[string]bool{
		"6": ph.Holds(6), "8.5": ph.Holds(8.5), "not 5.99": !ph.Holds(5.99), "not 8.51": !ph.Holds(8.51),
		"5 C": temperature.Holds(278.15), "50 C": temperature.Holds(323.15), "not 4 C": !temperature.Holds(277.15),
		"300": flow.Holds(300.0 / 3600), "0": flow.Holds(0), "not 301": !flow.Holds(301.0 / 3600),
	} {
		if !ok {
			t.Errorf("%s", name)
		}
	}
	if ph.Line != 3 || flow.Line != 5 {
		t.Errorf("lines %d, %d", ph.Line, flow.Line)
	}
}

// TestStart: the line that the file names opens, else its first.
func TestStart(t *testing.T) {
	const two = "[lines.a]\ntitle = \"x\"\n[lines.b]\ntitle = \"y\"\n"
	if s := load(t, two); s.Start.Name != "a" || len(s.Lines) != 2 || s.Start.Site() != s {
		t.Errorf("%+v", s.Start)
	}
	if s := load(t, "start = \"b\"\n"+two); s.Start.Name != "b" {
		t.Errorf("%+v", s.Start)
	}
}

// TestSteps: 6.3 to 8.4 in steps of 0.3 pH is 7; from 10 to 12 mg/L in steps of
// 10 % of 10 is 2.
func TestSteps(t *testing.T) {
	c := site.Change{PH: 0.3, Dose: 0.1}
	for _, k := range []struct {
		from, to, d0, d1 float64
		want             int
	}{{6.3, 8.4, 0, 15, 7}, {8.4, 8.4, 10, 12, 2}, {8.4, 8.3, 10, 10.5, 1}, {8.4, 8.4, 10, 10, 1}, {8, 7.3, 10, 9, 3}} {
		if n := c.Steps(k.from, k.to, k.d0, k.d1); n != k.want {
			t.Errorf("%+v: %d", k, n)
		}
	}
	if n := (site.Change{}).Steps(6, 9, 1, 5); n != 1 {
		t.Error(n)
	}
}

func TestUnits(t *testing.T) {
	field := func(name string) reading.Field {
		f, ok := reading.Lookup(name)
		if !ok {
			t.Fatal(name)
		}
		return f
	}
	for text, wants := range map[string]map[string]string{
		"":                                  {"flow": "m³/h", "temperature": "°C", "ph": "", "alkalinity": "mg/L as CaCO3"},
		"units.system = \"US\"\n":           {"flow": "MGD (US)", "ph-temperature": "°F", "pump": "gal/h (US)", "hardness": "mg/L as CaCO3"},
		"units.system = \"mixed\"\n":        {"flow": "MGD (US)", "temperature": "°C"},
		"units.temperature = \"K\"\n":       {"temperature": "K", "product-temperature": "K", "flow": "m³/h"},
		"units.alkalinity = \"meq/L\"\n":    {"alkalinity": "meq/L", "target-alkalinity": "meq/L"},
		"units.hardness = \"°dH\"\n":        {"hardness": "°dH", "calcium-hardness": "°dH"},
		"units.hardness = \"mg/L as Ca\"\n": nil,
	} {
		s, err := site.Parse("p", []byte(text+"[lines.a]\n"))
		if wants == nil {
			if err == nil {
				t.Errorf("%q was accepted", text)
			}
			continue
		}
		if err != nil {
			t.Fatal(err)
		}
		for name, want := range wants {
			if got := s.Units.For(field(name)); got != want {
				t.Errorf("%q: %s in %q, want %q", text, name, got, want)
			}
		}
	}
	if got := (site.Units{}).For(field("flow")); got != "m³/h" {
		t.Errorf("the zero value shows %q", got)
	}
}

// TestDensityNote: a measured density that does not fit the strength is accepted
// and pointed out.
func TestDensityNote(t *testing.T) {
	s := load(t, "[products.c]\ncatalogue = \"caustic-25\"\ndensity = 1525\n[lines.a]\n")
	if len(s.Notes) != 1 || s.Notes[0].Line != 3 || s.Notes[0].Key != "products.c.density" || !strings.Contains(s.Notes[0].Text, "1525 kg/m3 is not the density of 25 % by weight (127") {
		t.Errorf("%+v", s.Notes)
	}
	if s := load(t, "[products.c]\ncatalogue = \"caustic-25\"\ndensity = 1270\n[lines.a]\n"); len(s.Notes) != 0 {
		t.Errorf("%+v", s.Notes)
	}
}

// TestPlaces: keys know their lines through tables, dotted keys, lists over
// several lines, comments and Windows line ends.
func TestPlaces(t *testing.T) {
	text := "# one\r\n[lines.a]\r\ntitle = 'x'\r\n\r\nadd = [\r\n  \"alum-dry=22\", # two\r\n]\r\nlimits.ph = [\r\n 6, 8,\r\n]\r\nusual = { ph = [6, 7], flow = [1, 2] }\r\n"
	s, err := site.Parse("p", []byte(text))
	if err != nil {
		t.Fatal(err)
	}
	want := map[string]int{"lines.a.title": 3, "lines.a.add": 5, "lines.a.limits.ph": 8, "lines.a.usual.flow": 11}
	for _, r := range s.Show() {
		if n, ok := want[r.Key]; ok {
			delete(want, r.Key)
			if r.Line != n {
				t.Errorf("%s on line %d, want %d", r.Key, r.Line, n)
			}
		}
	}
	if len(want) != 0 {
		t.Errorf("not shown: %v", want)
	}
}
