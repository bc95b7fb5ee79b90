package site_test

import (
	"slices"
	"strings"
	"testing"

	"beckline/dosing/site"
)

// TestShow: every value of the file with its line, then what is built in.
func TestShow(t *testing.T) {
	s := template(t)
	rows := s.Show()
	find := func(key string) site.Row {
		t.Helper()
		i := slices.IndexFunc(rows, func(r site.Row) bool { return r.Key == key })
		if i < 0 {
			t.Fatalf("%s is not shown", key)
		}
		return rows[i]
	}
	lines := strings.Split(site.Template(), "\n")
	for _, c := range []struct{ key, value, text string }{
		{"start", "upland", "start ="},
		{"products.caustic.strength", "25 %", "strength ="},
		{"products.caustic.maximum-use", "200 mg/L", "maximum-use ="},
		{"pumps.P1.capacity", "20 L/h", "capacity = 20"},
		{"tanks.C1.volume", "0.3 m3", "volume = 0.30"},
		{"sources.intake.conductivity", "78 µS/cm", "conductivity ="},
		{"lines.upland.readings.flow", "240 m³/h", "readings ="},
		{"lines.upland.add", "alum=22", "add ="},
		{"lines.upland.targets.target-ph", "8.40", "target-ph ="},
		{"lines.upland.limits.alkalinity", "at most 200.0 mg/L as CaCO3", "alkalinity = { max"},
		{"lines.upland.usual.ph", "6.20 to 7.60", "ph = [6.2"},
		{"lines.upland.finished.sodium", "at most 50.0 mg/L as Na", "sodium = {"},
		{"lines.upland.change.dose", "10 %", "dose ="},
		{"lines.upland.tolerances.flow", "3 %", "flow = \"3"},
		{"lines.upland.tolerances.alkalinity", "1 mg/L as CaCO3", "alkalinity = 1.0"},
	} {
		r := find(c.key)
		if r.Value != c.value {
			t.Errorf("%s is %q, want %q", c.key, r.Value, c.value)
		}
		if r.Line < 1 || !strings.HasPrefix(lines[r.Line-1], c.text) || !strings.HasPrefix(r.From, "line ") {
			t.Errorf("%s from %s, where it says %q", c.key, r.From, lines[max(r.Line-1, 0)])
		}
	}
	for key, value := range map[string]string{
		"units.flow":                         "m³/h",
		"lines.upland.limits.temperature":    "0.0 to 50.0 °C",
		"lines.upland.usual.calcium":         "1.00 to 200 mg/L as Ca",
		"products.alum.strength":             "taken as 100 % pure",
		"lines.upland.limits.conductivity":   "0 to 70000 µS/cm",
		"lines.upland.limits.ph-temperature": "0.0 to 50.0 °C",
	} {
		if r := find(key); r.From != "built in" || r.Line != 0 || r.Value != value {
			t.Errorf("%s: %+v, want %q", key, r, value)
		}
	}
	seen := map[string]bool{}
	for i, r := range rows {
		if seen[r.Key] || r.Value == "" || r.From == "" {
			t.Errorf("%+v", r)
		}
		seen[r.Key] = true
		if i > 0 && r.Line != 0 && r.Line < rows[i-1].Line {
			t.Errorf("%s before its line", r.Key)
		}
	}
	table := s.Table()
	if strings.Count(table, "\n") != len(rows) || !strings.Contains(table, "lines.upland.change.ph") {
		t.Errorf("%d lines for %d rows", strings.Count(table, "\n"), len(rows))
	}
}

func TestShowNotes(t *testing.T) {
	s := load(t, "[products.c]\ncatalogue = \"caustic-25\"\ndensity = 1525\n[lines.a]\n")
	if !strings.Contains(s.Table(), "\nline 3: products.c.density: 1525 kg/m3") {
		t.Error(s.Table())
	}
}
