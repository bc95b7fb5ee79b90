package tui

import (
	"slices"
	"testing"
)

// TestOldFiguresStayWithTheirStations: while a step that was put on the line has
// no dose yet, the figures of before stand under the stations that they are of.
func TestOldFiguresStayWithTheirStations(t *testing.T) {
	d := demo(t).own()
	dose := d.solved()
	d.keys("a", "alum-dry", "Enter").shows("OLD FIGURES")
	if w := d.m.water(d.m.line[1]); w != nil {
		t.Errorf("alum, not fed yet, has a water: %+v", w.Figures.PH)
	}
	for _, n := range []int{2, 3} { // caustic and the finished water
		if w := d.m.water(d.m.line[n]); w == nil || w.Dose != dose {
			t.Errorf("%s lost its figures", d.m.line[n].title)
		}
	}
	if w := d.m.water(d.m.line[0]); w == nil || w.Addition != nil {
		t.Error("the raw water lost its figures")
	}
}

func TestOldIndex(t *testing.T) {
	raw, a, b := lineStep{}, lineStep{given: feedEntry{Product: "alum-dry", Dose: "20"}}, lineStep{given: feedEntry{Product: "aeration", Dose: "50"}}
	solved, other := lineStep{product: "caustic-25"}, lineStep{product: "lime"}
	for _, c := range []struct {
		old, now []lineStep
		want     []int
	}{
		{[]lineStep{raw, solved}, []lineStep{raw, a, solved}, []int{0, -1, 1}},
		{[]lineStep{raw, a, solved}, []lineStep{raw, solved}, []int{0, 2}},
		{[]lineStep{raw, a, b, solved}, []lineStep{raw, b, a, solved}, []int{0, 2, -1, 3}},
		{[]lineStep{raw, a, solved}, []lineStep{raw, a, other}, []int{0, 1, -1}},
		{[]lineStep{raw, solved}, []lineStep{raw, solved, a}, []int{0, 1, -1}},
	} {
		var got []int
		for i := range c.now {
			got = append(got, oldIndex(c.old, c.now, i))
		}
		if !slices.Equal(got, c.want) {
			t.Errorf("%v after %v: %v, want %v", c.now, c.old, got, c.want)
		}
	}
}

// TestRefusalKeepsTheWaterAhead: where no dose does it, what is fed ahead is
// known all the same.
func TestRefusalKeepsTheWaterAhead(t *testing.T) {
	d := demo(t).own().keys("a", "alum-dry", "Enter", "22", "Enter")
	want := d.m.good.result.Stations[1].Figures.PH
	d.keys("t", "Enter", "5.5", "Enter", "Enter").shows("WRONG WAY")
	w := d.m.water(d.m.line[1])
	if w == nil || w.Figures.PH != want {
		t.Fatalf("the water behind the alum is %v, want pH %v", w, want)
	}
	if d.m.water(d.m.line[2]) != nil || d.m.water(d.m.line[3]) != nil {
		t.Error("a dose that does not exist has a water")
	}
}

// TestAnotherValueAnswersTheQuestion: a digit does not grow the value that is
// asked about.
func TestAnotherValueAnswersTheQuestion(t *testing.T) {
	d := demo(t).own().keys("Home", "Down", "Down", "41", "Enter").shows("is unusual").keys("9")
	if got := d.m.edit.String(); got != "9" {
		t.Errorf("the field holds %q, want 9", got)
	}
}

// TestChoosingOneLeavesTheOtherUnchecked: product and target are checked each by
// itself.
func TestChoosingOneLeavesTheOtherUnchecked(t *testing.T) {
	d := demo(t).own().shows("check them (p, t)")
	d.keys("p", "soda-ash", "Enter").shows("the target is the starting one").hides("check them")
	d.keys("t", "Enter").hides("starting one")
	demo(t).own().keys("t", "Enter").shows("the product is the starting one: check it (p)")
}
