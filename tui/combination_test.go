package tui

import (
	"strings"
	"testing"
)

// TestCombinationsShowAtOnce puts two chemicals on the line and looks for what
// they must not do together on the screen of 80 × 24 as it stands.
func TestCombinationsShowAtOnce(t *testing.T) {
	chlorine, ammonia := "NEVER TOGETHER: acid or coagulant with hypochlorite - chlorine gas.", "NEVER TOGETHER: ammonia or ammonium with chlorine"
	base, alum := "NEVER TOGETHER: strong caustic or lime with strong acid", "NEVER TOGETHER: dry alum with quicklime"
	acids := []string{"sulfuric-93", "sulfuric-98", "hydrochloric-32", "hydrochloric-37", "nitric-60", "phosphoric-75", "acetic-80", "formic-85", "citric-50"}
	reacting := append([]string{"alum-dry", "alum-liquid", "ferric-chloride-40", "ferric-sulfate-43", "pacl-10", "hydrofluorosilicic-23", "carbon-dioxide"}, acids...)
	type pair struct{ first, second, line string }
	var pairs []pair
	for _, hypochlorite := range []string{"hypochlorite-12", "calcium-hypochlorite-65"} {
		for _, acid := range reacting {
			pairs = append(pairs, pair{acid, hypochlorite, chlorine})
		}
	}
	for _, a := range []string{"ammonia-19", "ammonium-sulfate-40"} {
		for _, c := range []string{"chlorine-gas", "hypochlorite-12", "calcium-hypochlorite-65"} {
			pairs = append(pairs, pair{a, c, ammonia})
		}
	}
	for _, b := range []string{"caustic-25", "caustic-50", "potassium-hydroxide-45", "lime", "quicklime"} {
		for _, acid := range acids {
			pairs = append(pairs, pair{b, acid, base})
		}
	}
	pairs = append(pairs, pair{"quicklime", "alum-dry", alum})
	for _, p := range pairs {
		for range 2 { // in either order, one of them solved for
			s := demo(t).own().m.sheet
			s.Product, s.Adds = p.first, []feedEntry{{Product: p.second}}
			d := demo(t)
			d.m.use(s)
			d.shows(p.line, "licensed operator decide")
			d.keys("c").shows(p.line)
			p.first, p.second = p.second, p.first
		}
	}
	// One chemical and what stands in any works.
	demo(t).own().keys("p", "quicklime", "Enter").shows("KEEP APART: quicklime and water")
	demo(t).own().shows("KEEP APART: caustic and aluminium, zinc")
}

// TestChlorineInTheRawWater: a free chlorine that was read comes from a feed
// ahead, which is one of the works' chemicals.
func TestChlorineInTheRawWater(t *testing.T) {
	d := demo(t).own().keys("p", "sulfuric-93", "Enter").hides("NEVER TOGETHER")
	d.keys("Left", "Left", "Left", "Home")
	for d.m.place().name != "free-chlorine" {
		d.keys("Down")
	}
	d.keys("0.5", "Enter").shows("NEVER TOGETHER: acid or coagulant with hypochlorite")
	d.keys("Up", "0", "Enter").hides("NEVER TOGETHER")
}

// TestCautionsThatHaveNoRoomAreNamed: where more than the rows must never meet,
// the screen says where the others are.
func TestCautionsThatHaveNoRoomAreNamed(t *testing.T) {
	d := demo(t)
	s := d.own().m.sheet
	s.Adds = []feedEntry{{Product: "sulfuric-93", Dose: "1"}, {Product: "hypochlorite-12", Dose: "1"}, {Product: "ammonia-19", Dose: "1"}}
	d.m.use(s)
	d.shows("NEVER TOGETHER", "more: c")
	if n := strings.Count(d.keys("c").screen(), "NEVER TOGETHER"); n < 3 {
		t.Errorf("%d lines on the page:\n%s", n, d.screen())
	}
}
