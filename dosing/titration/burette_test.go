package titration_test

import (
	"errors"
	"math"
	"strings"
	"testing"

	"beckline/dosing/titration"
)

// TestBuretteReadings: the difference of two readings counts, with the exact
// factor, and the log line shows the sum.
func TestBuretteReadings(t *testing.T) {
	b := titration.Burette{SampleML: 50, Normality: 0.1, Titre: titration.Titre{StartML: 1.2, EndML: 7.45}}
	eq, notes, err := b.Alkalinity()
	if err != nil {
		t.Fatal(err)
	}
	if math.Abs(eq-0.0125) > 1e-15 {
		t.Errorf("6.25 mL of 0.1 eq/L in 50 mL is %g eq/L", eq)
	}
	if want := 0.0125 * 50043.5; math.Abs(titration.AsCaCO3(eq)-want) > 1e-9 {
		t.Errorf("as CaCO3 %g, want %g", titration.AsCaCO3(eq), want)
	}
	if len(notes) != 1 || notes[0].Code != titration.CodeUnusual {
		t.Errorf("625 mg/L is unusual: %v", notes)
	}
	if want := "(7.45 - 1.2) mL x 0.1 eq/L x 50043.5 / 50 mL = 625.5 mg/L as CaCO3"; b.Working() != want {
		t.Errorf("working %q, want %q", b.Working(), want)
	}
}

// TestBuretteRefusals: each bad reading is refused by its own field, with what
// was given and what would do.
func TestBuretteRefusals(t *testing.T) {
	good := titration.Burette{SampleML: 100, Normality: 0.02, Titre: titration.Used(12)}
	cases := []struct {
		name            string
		change          func(b *titration.Burette)
		code, field     string
		given, accepted string
	}{
		{"no sample", func(b *titration.Burette) { b.SampleML = 0 }, titration.CodeOutsideRange, "sample", "0 mL", "above 0 to 1000 mL"},
		{"not a number", func(b *titration.Burette) { b.SampleML = math.NaN() }, titration.CodeOutsideRange, "sample", "NaN", "1000 mL"},
		{"negative strength", func(b *titration.Burette) { b.Normality = -0.02 }, titration.CodeOutsideRange, "normality", "-0.02 eq/L", "above 0 to 5 eq/L"},
		{"strength as a percentage", func(b *titration.Burette) { b.Normality = 20 }, titration.CodeOutsideRange, "normality", "20 eq/L", "5 eq/L"},
		{"below the start", func(b *titration.Burette) { b.Titre = titration.Titre{StartML: 12, EndML: 3} }, titration.CodeOrder, "end", "3 mL after a start of 12 mL", "wrong end"},
		{"negative start", func(b *titration.Burette) { b.Titre.StartML = -1 }, titration.CodeOutsideRange, "start", "-1 mL", "0 to 50 mL"},
		{"beyond the burette", func(b *titration.Burette) { b.Titre.EndML = 61 }, titration.CodeOutsideRange, "end", "61 mL", "smaller sample"},
		{"far too much", func(b *titration.Burette) { b.Normality, b.Titre.EndML = 0.2, 50; b.SampleML = 25 }, titration.CodeOutsideRange, "normality", "20017.4 mg/L", "is it 0.02?"},
	}
	for _, c := range cases {
		b := good
		c.change(&b)
		_, _, err := b.Alkalinity()
		var e *titration.Error
		if !errors.As(err, &e) {
			t.Errorf("%s: %v", c.name, err)
			continue
		}
		if e.Code != c.code || e.Field != c.field || !strings.Contains(e.Given, c.given) || !strings.Contains(e.Accepted, c.accepted) {
			t.Errorf("%s: %+v", c.name, e)
		}
		if line := e.Error(); strings.ContainsAny(line, "\n\r") || !strings.Contains(line, "; accepted: ") {
			t.Errorf("%s: line %q", c.name, line)
		}
	}
}

func TestBuretteNotes(t *testing.T) {
	cases := []struct {
		b     titration.Burette
		codes string
	}{
		{titration.Burette{SampleML: 100, Normality: 0.02, Titre: titration.Used(12)}, ""},
		{titration.Burette{SampleML: 100, Normality: 0.0195, Titre: titration.Used(12)}, ""},
		{titration.Burette{SampleML: 100, Normality: 0.02, Titre: titration.Used(1.3)}, titration.CodeUseTwoEnds},
		{titration.Burette{SampleML: 25, Normality: 0.02, Titre: titration.Used(0.4)}, titration.CodeTitreSmall + " " + titration.CodeUseTwoEnds},
		{titration.Burette{SampleML: 100, Normality: 0.02, Titre: titration.Used(30)}, titration.CodeTitreLarge},
		{titration.Burette{SampleML: 100, Normality: 0.2, Titre: titration.Used(28.5)}, titration.CodeTitreLarge + " " + titration.CodeNormality + " " + titration.CodeUnusual},
	}
	for _, c := range cases {
		_, notes, err := c.b.Alkalinity()
		if err != nil {
			t.Fatal(err)
		}
		if got := codes(notes); got != c.codes {
			t.Errorf("%+v: %q, want %q", c.b, got, c.codes)
		}
		for _, n := range notes {
			if c.b.Normality == 0.2 && n.Code == titration.CodeUnusual && n.Text != "gives 2852.5 mg/L as CaCO3, more than usual; is it 0.02?" {
				t.Errorf("ten times too strong: %q", n.Text)
			}
		}
	}
}

func codes(notes []titration.Note) string {
	var s []string
	for _, n := range notes {
		s = append(s, n.Code)
	}
	return strings.Join(s, " ")
}

func TestDuplicates(t *testing.T) {
	mean, notes := titration.Duplicates(2e-3, 2.05e-3)
	if math.Abs(mean-2.025e-3) > 1e-15 || len(notes) != 0 {
		t.Errorf("2.5 %% apart: %g, %v", mean, notes)
	}
	if _, notes := titration.Duplicates(2e-3, 2.2e-3); codes(notes) != titration.CodeDuplicates {
		t.Errorf("9.5 %% apart: %v", notes)
	}
}
