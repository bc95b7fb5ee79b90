package tui

import (
	"math"
	"testing"
)

func TestCoagulantAhead(t *testing.T) {
	d := demo(t).own()
	plain := d.solved()
	d.keys("a", "alum-dry", "Enter").shows("[alum-dry]", "STILL NEEDED: dose of alum-dry", "OLD FIGURES")
	d.keys("22", "Enter").shows("22.0").hides("OLD FIGURES")
	r := d.m.good.result
	if len(r.Stations) != 3 || r.Solved != 2 {
		t.Fatalf("%d stations, solved %d", len(r.Stations), r.Solved)
	}
	// Alum as the 14.3 hydrate: 6 eq of alkalinity a mole of 599.76 g.
	used := r.Stations[0].Figures.Alkalinity - r.Stations[1].Figures.Alkalinity
	if want := 22e-3 / 599.76 * 6; math.Abs(used-want) > 1e-9 {
		t.Errorf("alum takes %v eq/L, want %v", used, want)
	}
	if d.solved() <= plain {
		t.Errorf("dose %v after alum, %v without", d.solved(), plain)
	}
	d.keys("+").shows("23.0")
	d.keys("a", "hypochlorite", "Enter", "1.2 mg/L Cl2", "Enter").shows("[hypochl…]")
	d.shows("NEVER TOGETHER")
	d.keys("[").keys("Left", "Left")
	if got := d.m.sheet.Adds[0].Product; got != "hypochlorite-12" {
		t.Errorf("first is %s after moving", got)
	}
	d.keys("u", "u", "u", "x").shows("only a step that is given")
	d.keys("Right", "x").hides("alum-dry ▶")
	if d.solved() != plain {
		t.Errorf("dose %v after taking alum off, %v before it", d.solved(), plain)
	}
	d.keys("u").shows("alum-dry")
}

func TestManyStationsScroll(t *testing.T) {
	d := demo(t).own()
	for range 5 {
		d.keys("a", "alum-dry", "Enter", "2", "Enter")
	}
	d.shows("more")
	d.golden("many-stations-80x24")
	d.keys("Left", "Left", "Left", "Left", "Left", "Left", "Left").shows("[raw wat…]")
	d.keys("Right", "Right", "Right", "Right", "Right", "Right", "Right", "Right").shows("[finished]", "more")
}

func TestUnusualDoseAsks(t *testing.T) {
	d := demo(t).own().keys("a", "alum-dry", "Enter", "150", "Enter").shows("is unusual")
	d.keys("Enter").hides("OLD FIGURES")
	if len(d.m.good.result.Stations) != 3 {
		t.Error("the confirmed dose is not in the result")
	}
	d.keys("BS").shows("OLD FIGURES", "STILL NEEDED: dose of alum-dry")
	d.keys("9999999", "Enter").shows("accepted")
}
