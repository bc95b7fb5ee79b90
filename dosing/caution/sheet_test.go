package caution

import (
	"slices"
	"strings"
	"testing"

	"beckline/dosing"
)

// plain tells whether a text is printable ASCII.
func plain(s string) bool {
	return strings.IndexFunc(s, func(r rune) bool { return r < ' ' || r > '~' }) < 0
}

func TestEveryProductHasASheet(t *testing.T) {
	covered := map[string]bool{}
	for _, p := range dosing.Products() {
		s := Of(p)
		if s.Title == s.Key || s.Title == "" {
			t.Errorf("%s: no sheet under %q", p.Name, p.Caution)
		}
		covered[p.Chemical.Formula] = true
	}
	// Chemicals without product have a sheet of their own.
	for formula, key := range map[string]string{"CaCO3": "limestone", "Na2SiF6": "sodium-fluorosilicate"} {
		if For(key).Title != key {
			covered[formula] = true
		}
	}
	for _, c := range dosing.Chemicals() {
		if !covered[c.Formula] {
			t.Errorf("%s: no sheet", c.Name)
		}
	}
}

func TestSheetsAreWhole(t *testing.T) {
	keys := map[string]bool{}
	for _, s := range Sheets() {
		if keys[s.Key] {
			t.Errorf("%s stands twice", s.Key)
		}
		keys[s.Key] = true
		if len(s.Short) < 2 || len(s.Short) > 4 {
			t.Errorf("%s: %d short lines", s.Key, len(s.Short))
		}
		if len(s.Hazards) == 0 || len(s.Protection) == 0 || len(s.FirstAid) == 0 || len(s.Handling) == 0 || len(s.Dilution) == 0 || len(s.Storage) == 0 || s.GHS.Source == "" {
			t.Errorf("%s: a part is empty", s.Key)
		}
		for _, code := range s.GHS.Codes {
			if hazardWords[code] == "" {
				t.Errorf("%s: %s has no words", s.Key, code)
			}
		}
		for _, p := range s.parts() {
			for _, l := range p.lines {
				checkLine(t, s.Key+", "+p.heading, l)
			}
		}
	}
	for _, l := range slices.Concat(General(), Unknowable()) {
		checkLine(t, "general", l)
	}
	for _, c := range Combinations() {
		checkLine(t, c.Short, Line{c.Text, c.Source})
		for _, key := range slices.Concat(c.first, c.second) {
			if !keys[key] {
				t.Errorf("%s: no sheet %q", c.Short, key)
			}
		}
	}
}

func checkLine(t *testing.T, where string, l Line) {
	t.Helper()
	if l.Source == "" || len(l.Text) < 10 || !plain(l.Text) || !plain(l.Source) {
		t.Errorf("%s: %q (%q)", where, l.Text, l.Source)
	}
}

// A panel and a slip show these as they are.
func TestShortLinesFit(t *testing.T) {
	lines := []string{Deferral, For("no such thing").Short[0]}
	for _, s := range Sheets() {
		lines = append(lines, s.Short...)
	}
	for _, c := range Combinations() {
		lines = append(lines, c.Short)
	}
	for _, line := range lines {
		if len(line) > 76 || !plain(line) || line == "" {
			t.Errorf("%d columns: %q", len(line), line)
		}
	}
}

// Eyes are flushed at least 15 minutes (ANSI/ISEA Z358.1), for caustics 30 (New
// Jersey Right to Know fact sheet), on the sheet and, for what burns, in the
// short lines too.
func TestEyewash(t *testing.T) {
	caustic := []string{"caustic", "potassium-hydroxide", "lime", "quicklime", "hypochlorite", "calcium-hypochlorite", "ammonia"}
	for _, s := range Sheets() {
		if s.Key == "carbon-dioxide" {
			continue // a gas that does not burn eyes
		}
		want := "15 min"
		if slices.Contains(caustic, s.Key) {
			want = "30 min"
		}
		var aid string
		for _, l := range s.FirstAid {
			aid += l.Text
		}
		if !strings.Contains(aid, want) {
			t.Errorf("%s: first aid does not say %s", s.Key, want)
		}
		burns := slices.Contains(s.GHS.Codes, "H314") || slices.Contains(s.GHS.Codes, "H318")
		if short := strings.Join(s.Short, " "); burns && s.Key != "chlorine" && !strings.Contains(short, want) {
			t.Errorf("%s: short lines do not say %s: %s", s.Key, want, short)
		}
	}
}

// Acid goes into water and so does caustic; no sheet says the reverse.
func TestDilution(t *testing.T) {
	for key, want := range map[string]string{
		"sulfuric-acid": "Acid into the water", "hydrochloric-acid": "Acid into the water", "nitric-acid": "Acid into the water",
		"phosphoric-acid": "Acid into the water", "acetic-acid": "Acid into the water", "formic-acid": "Acid into the water",
		"citric-acid": "Acid into the water", "fluorosilicic-acid": "Acid into the water",
		"caustic": "Caustic into cold water", "potassium-hydroxide": "Into cold water",
	} {
		text := For(key).Dilution[0].Text
		if !strings.HasPrefix(text, want) || !strings.Contains(text, "never water into") {
			t.Errorf("%s: %s", key, text)
		}
	}
}

func TestUnknownKeyStillWarns(t *testing.T) {
	s := For("treacle")
	if len(s.Short) == 0 || len(s.Hazards) == 0 || !strings.Contains(s.Text(), "supplier") {
		t.Errorf("%+v", s)
	}
}

func TestFreezingFollowsTheProduct(t *testing.T) {
	p, _ := dosing.ProductByName("caustic-50")
	if lines := Of(p).Freezing; len(lines) != 1 || !strings.Contains(lines[0].Text, "near 12 C.") {
		t.Errorf("%v", lines)
	}
	p, err := p.AtStrength(0.25)
	if err != nil {
		t.Fatal(err)
	}
	if lines := Of(p).Freezing; len(lines) != 1 || !strings.Contains(lines[0].Text, "-18 C") || !strings.Contains(lines[0].Text, "supplier's curve") {
		t.Errorf("%v", lines)
	}
	if lines := For("caustic").Freezing; len(lines) != 2 {
		t.Errorf("both strengths should have a line: %v", lines)
	}
	p, _ = dosing.ProductByName("ferric-sulfate-43")
	if lines := Of(p).Freezing; len(lines) != 1 || !strings.Contains(lines[0].Text, "no figure held") {
		t.Errorf("%v", lines)
	}
	p, _ = dosing.ProductByName("soda-ash")
	if lines := Of(p).Freezing; lines != nil {
		t.Errorf("a solid freezes: %v", lines)
	}
}

func TestTextFits(t *testing.T) {
	for _, s := range Sheets() {
		text := s.Text()
		for _, line := range strings.Split(text, "\n") {
			if len(line) > 76 || !plain(line) {
				t.Errorf("%s: %d columns: %q", s.Key, len(line), line)
			}
		}
		if !strings.HasPrefix(text, s.Title+"\n") || !strings.HasSuffix(text, "\n"+Deferral+"\n") {
			t.Errorf("%s does not start with its title and end with the deferral:\n%s", s.Key, text)
		}
	}
}
