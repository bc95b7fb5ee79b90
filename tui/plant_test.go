package tui

import (
	"testing"

	"beckline/dosing"
	"beckline/dosing/entry"
	"beckline/dosing/site"
)

// plantFile is an invented works.
const plantFile = `
[products.lye]
catalogue = "caustic-50"
strength = "48 %"
temperature = 22
maximum-use = 20

[products.alum]
catalogue = "alum-liquid"
strength = 50

[pumps.P1]
product = "lye"
capacity = "5 gph"

[sources.river]
ph = 6.9
alkalinity = 24
temperature = 8
sodium = 6
calcium = 7.2

[sources.well]
ph = 7.4
alkalinity = 60
temperature = 12
calcium = 50

[lines.one]
plant = "Invented works"
title = "filter line"
source = "river"
readings = { flow = "1 MGD" }
product = "lye"
pump = "P1"
add = ["alum = 40 mg/L product"]
limits.temperature = [1, 20]
usual.ph = [6.7, 7.0]
finished.ph = { max = 8.2 }
targets.target-ph = 8.4
tolerances.ph = 0.05

[lines.two]
blend = { river = 3, well = 1 }
readings.flow = 100
product = "caustic-25"
targets.target-ph = 8.2
`

func plant(t *testing.T, line string) *driver {
	t.Helper()
	s, err := site.Parse("plant.toml", []byte(plantFile))
	if err != nil {
		t.Fatal(err)
	}
	l := s.LineNamed(line)
	return &driver{t, newModel(newPlantSheet(l), dosing.Solve, fullLook)}
}

// sameAsLine fails unless the dose is that of the line's own case.
func (d *driver) sameAsLine() {
	d.t.Helper()
	l := d.m.sheet.plant
	c, err := l.Case(l.Form(), entry.NeedDose)
	if err != nil {
		d.t.Fatal(err)
	}
	r, err := dosing.Solve(c)
	if err != nil {
		d.t.Fatal(err)
	}
	if d.solved() != r.Dose().Dose || d.m.good.result.Dose().Feed.PumpFraction != r.Dose().Feed.PumpFraction {
		d.t.Errorf("dose %v, the line's is %v:\n%s", d.solved(), r.Dose().Dose, d.screen())
	}
}

func TestPlantFileOpensItsLine(t *testing.T) {
	d := plant(t, "one").shows("Invented works, filter line", "lye", "alum", "SET THE PUMP TO", "%").hides("DEMO", "check them")
	d.sameAsLine()
	d.shows("ALARM").keys("w").shows("8.2", "maximum use level").keys("Esc") // both of the plant's own
	if tol, ok := d.m.sheet.tolerances().Of("ph"); !ok || tol.Absolute != 0.05 {
		t.Errorf("tolerance of pH %+v", tol)
	}
	d.keys("Right", "Right", "Right", "End", "Up").shows("(8.20)")
	d.keys("8.5", "Enter").shows("ALARM") // one's own limit does not undo the plant's
	d.keys("Home", "Down", "8.1", "Enter").hides("8.2 ").keys("w").hides("finished water is over")
}

func TestPlantBandsOfReadings(t *testing.T) {
	d := plant(t, "one").keys("7.2", "Enter").shows("is unusual").keys("Esc")
	d.keys("Down", "Down", "25", "Enter").shows("OLD FIGURES", "accepted: 1.0", "20.0 C")
}

func TestPlantProductsInTheList(t *testing.T) {
	d := plant(t, "one").keys("p").shows("this plant's own").keys("caustic-25", "Enter")
	if v := d.m.sheet.Values; v["strength"] != "" || v["pump"] != "" {
		t.Errorf("strength %q and pump %q of another product", v["strength"], v["pump"])
	}
	d.keys("p", "lye", "Enter").sameAsLine()
	if v := d.m.sheet.Values["pump"]; v != "5 gph" {
		t.Errorf("pump %q", v)
	}
}

func TestPlantBlend(t *testing.T) {
	d := plant(t, "two").shows("blend of river, well").hides("STILL NEEDED")
	d.sameAsLine()
	d.keys("Home", "7.1", "Enter").shows("STILL NEEDED").hides("blend of") // a sample takes its place
	d.keys("u").sameAsLine()
	d.keys("Home").fits(d.size(80, 24).screen())
}
