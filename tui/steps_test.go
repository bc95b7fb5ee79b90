package tui

import (
	"testing"

	"beckline/dosing"
	"beckline/dosing/entry"
)

// same fails unless the screen's result is the solver's for the form.
func (d *driver) same(f entry.Form) {
	d.t.Helper()
	c, err := f.Case(entry.NeedDose)
	if err != nil {
		d.t.Fatal(err)
	}
	want, err := dosing.Solve(c)
	if err != nil {
		d.t.Fatal(err)
	}
	got := d.m.good.result
	if got == nil || !d.m.good.solved || len(got.Stations) != len(want.Stations) {
		d.t.Fatalf("no such answer on the screen:\n%s", d.screen())
	}
	for i := range want.Stations {
		if got.Stations[i].Dose != want.Stations[i].Dose || got.Stations[i].Figures.PH != want.Stations[i].Figures.PH {
			d.t.Errorf("station %d: dose %v, pH %v; the solver says %v, %v", i,
				got.Stations[i].Dose, got.Stations[i].Figures.PH, want.Stations[i].Dose, want.Stations[i].Figures.PH)
		}
	}
}

func soft(adds, thens []string) entry.Form {
	return entry.Form{Product: "caustic-25", Adds: adds, Thens: thens,
		Values: map[string]string{"ph": "7.0", "alkalinity": "30", "temperature": "10", "flow": "240", "target-ph": "8.40", "calcium": "12"}}
}

// hard types four readings and calcium, and goes back to the first field.
func (d *driver) hard() *driver { return d.own().keys("Down", "12", "Enter", "Home") }

func TestAerationOnTheLine(t *testing.T) {
	d := demo(t).hard().keys("a", "aeration", "Enter").shows("[aeration]", "CO2 out", "STILL NEEDED")
	d.keys("80", "Enter").same(soft([]string{"aeration=80 %"}, nil))
	d.shows("80 ")
	d.keys("Enter", "BS", "BS", "pH 7.6", "Enter").same(soft([]string{"aeration=pH 7.6"}, nil))
	d.keys("Enter", "C-u", "180", "Enter").shows("accepted", "OLD FIGURES")
	d.keys("x").same(soft(nil, nil))
}

func TestContactorOnTheLine(t *testing.T) {
	demo(t).own().keys("a", "contactor", "Enter").shows("[contact…]", "calcium")
	d := demo(t).hard().keys("a", "contactor", "Enter").shows("WRONG WAY", "contactor takes no dose") // it alone goes past 8.40
	d.keys("Right", "Right", "Down", "9.2", "Enter")
	want := soft([]string{"contactor"}, nil)
	want.Values["target-ph"] = "9.2"
	d.same(want)
	d.keys("c").shows("Limestone").keys("Esc")
	d.keys("Left", "Left", "p", "alum-dry", "Enter").shows("STILL NEEDED")
}

func TestChlorineWithDemandAndResidual(t *testing.T) {
	d := demo(t).hard().keys("a", "chlorine-gas", "Enter").shows("residual", "demand", "STILL NEEDED")
	d.keys("Down", "0.5", "Enter", "1.2", "Enter").same(soft([]string{"chlorine-gas=residual 0.5 demand 1.2"}, nil))
	d.keys("Home", "Down", "2", "Enter").same(soft([]string{"chlorine-gas=2 demand 1.2"}, nil)) // a dose in place of the residual
	d.keys("Home", "Down", "Down", "0.7", "Enter").same(soft([]string{"chlorine-gas=residual 0.7 demand 1.2"}, nil))
	d.keys("Enter", "C-u", "-1", "Enter").shows("accepted")
}

func TestStepsBehindTheSolvedOne(t *testing.T) {
	d := demo(t).hard().keys("Right", "a", "hypochlorite-12", "Enter", "1.2 mg/L Cl2", "Enter")
	d.same(soft(nil, []string{"hypochlorite-12=1.2 mg/L Cl2"}))
	d.shows("caustic… ▶[hypochl…]")
	d.keys("[").same(soft([]string{"hypochlorite-12=1.2 mg/L Cl2"}, nil))
	d.keys("]").same(soft(nil, []string{"hypochlorite-12=1.2 mg/L Cl2"}))
	d.keys("Left", "A", "alum-dry", "Enter", "20", "Enter").same(soft([]string{"alum-dry=20"}, []string{"hypochlorite-12=1.2 mg/L Cl2"}))
	d.keys("Right", "]").same(soft([]string{"alum-dry=20", "hypochlorite-12=1.2 mg/L Cl2"}, nil)) // the solved one itself
	d.keys("[", "[").same(soft(nil, []string{"alum-dry=20", "hypochlorite-12=1.2 mg/L Cl2"}))
	d.keys("[").shows("it cannot go there")
	d.keys("Right", "Right", "x").same(soft(nil, []string{"alum-dry=20"}))
}

// TestStepsComeBackFromAForm checks that a sheet of a form is that form again.
func TestStepsComeBackFromAForm(t *testing.T) {
	want := soft([]string{"aeration=80 %", "contactor", "alum-dry=22"}, []string{"chlorine-gas=residual 0.5 demand 1.2", "chlorine-gas=2 demand 1.2"})
	got := newSheet(want, false).form()
	for i, list := range [][2][]string{{got.Adds, want.Adds}, {got.Thens, want.Thens}} {
		if len(list[0]) != len(list[1]) {
			t.Fatalf("%d: %q, want %q", i, list[0], list[1])
		}
		for j := range list[0] {
			if list[0][j] != list[1][j] {
				t.Errorf("%q, want %q", list[0][j], list[1][j])
			}
		}
	}
}
