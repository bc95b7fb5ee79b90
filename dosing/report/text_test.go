package report

import (
	"strings"
	"testing"
	"time"

	"beckline/dosing"
)

// everyDocument makes a document with each product of the catalogue.
func everyDocument(t *testing.T) map[string]Document {
	t.Helper()
	all := map[string]Document{"caustic-25 solved": solved(t, soft(t), "caustic-25", si(t, "pump", 20))}
	for _, p := range dosing.Products() {
		all[p.Name] = given(t, soft(t), p.Name, 3)
	}
	return all
}

func plainWithin(t *testing.T, name, text string, width int) {
	t.Helper()
	for _, line := range strings.Split(text, "\n") {
		if len(line) > width {
			t.Errorf("%s: a line of %d columns, over %d: %s", name, len(line), width, line)
		}
		for _, c := range line {
			if c < ' ' || c > '~' {
				t.Errorf("%s: %q is not plain ASCII: %s", name, c, line)
			}
		}
		if strings.TrimRight(line, " ") != line {
			t.Errorf("%s: spaces at the end of %q", name, line)
		}
	}
}

func TestTextIsPlainAndNarrow(t *testing.T) {
	for name, d := range everyDocument(t) {
		plainWithin(t, name, d.Text(), textWidth)
	}
	plainWithin(t, "products", ProductsText(dosing.Products()), 79)
}

// The answer comes first, and each part has its place.
func TestTextOrder(t *testing.T) {
	text := solved(t, soft(t), "caustic-25", si(t, "pump", 20)).Text()
	at := -1
	for _, part := range []string{"Set the pump to ", "L/h", "US gal/h", "kg/h", "lb/d", "\nDose ", "as 100 % NaOH", "as product",
		"finished", "raw", "\nWarnings", "\nCautions", "\nChecked"} {
		next := strings.Index(text, part)
		if next <= at {
			t.Errorf("%q is not where it should be in\n%s", part, text)
		}
		at = next
	}
}

// The first line says what to set, and no line says it again; the flow that it
// is for is shown in two units, since a slip of unit there is a slip of dose.
func TestAnswerLines(t *testing.T) {
	bare := dosing.Readings{PH: si(t, "ph", 7), Alkalinity: si(t, "alkalinity", 30), Kelvin: si(t, "temperature", 10)}
	flowing := bare
	flowing.Flow = si(t, "flow", 100)
	for name, c := range map[string]struct {
		d    Document
		want []string // how the lines before the dose start
	}{
		"pump": {solved(t, flowing, "caustic-25", si(t, "pump", 20)),
			[]string{"Set the pump to 10.6 % of its 20.0 L/h", "  = 2.11 L/h = ", "  = 2.69 kg/h = ", "  into 100.0 m3/h = 0.634 US MGD of water"}},
		"no pump": {solved(t, flowing, "caustic-25", dosing.None),
			[]string{"Feed 2.11 L/h of caustic-25; with --pump", "  = 35.2 mL/min = ", "  = 2.69 kg/h = ", "  into 100.0 m3/h = "}},
		"a solid": {solved(t, flowing, "lime", dosing.None),
			[]string{"Feed 0.626 kg/h of lime", "  = 15.0 kg/d = ", "  into 100.0 m3/h = "}},
		"a solid and a pump": {solved(t, flowing, "lime", si(t, "pump", 20)),
			[]string{"Feed 0.626 kg/h of lime; a pump in L/h does not feed a solid", "  = 15.0 kg/d = ", "  into 100.0 m3/h = "}},
		"no flow": {solved(t, bare, "caustic-25", dosing.None),
			[]string{"Feed 26.9 mg/L of caustic-25; with --flow"}},
	} {
		answer, _, _ := strings.Cut(c.d.Text(), "\n\n")
		lines := strings.Split(answer, "\n")
		if len(lines) != len(c.want) {
			t.Errorf("%s: %d lines, want %d:\n%s", name, len(lines), len(c.want), answer)
			continue
		}
		for i, want := range c.want {
			if !strings.HasPrefix(lines[i], want) {
				t.Errorf("%s: %q should start with %q", name, lines[i], want)
			}
		}
	}
	if text := solved(t, flowing, "caustic-25", dosing.None).Text(); !strings.Contains(text, "25 % by weight, 1274 kg/m3 (318 g/L of NaOH)") {
		t.Errorf("no grams in a litre beside the strength:\n%s", text)
	}
}

// Every output names what a dose is the mass of.
func TestBasisIsAlwaysNamed(t *testing.T) {
	for name, d := range everyDocument(t) {
		s := d.result.Finished()
		basis := Basis(s.Addition.Product.Chemical)
		outputs := map[string]string{"text": strings.Join(strings.Fields(d.Text()), " ")}
		if d.Dose != nil {
			outputs["slip"] = strings.Join(strings.Fields(d.Slip()), " ")
		}
		for kind, text := range outputs {
			if !strings.Contains(text, "mg/L as "+basis) || !strings.Contains(text, "mg/L as product") {
				t.Errorf("%s: the %s does not name %s and the product", name, kind, basis)
			}
			if trade, ok := TradeBasis(s.Addition.Product.Chemical); ok && !strings.Contains(text, "mg/L as "+trade.Name) {
				t.Errorf("%s: the %s does not name the trade's %s", name, kind, trade.Name)
			}
		}
	}
}

func TestSlipHasTheSameLines(t *testing.T) {
	want := []string{"----", "pump", "feed", "product", "by mass", "pure", "dose", "target", "flow", "water", "  pH",
		"  alkalinity", "  temperature", "  inorganic carbon", "  saturation index", "  CCPP", "  calcium", "warnings"}
	bare := dosing.Readings{PH: si(t, "ph", 7), Alkalinity: si(t, "alkalinity", 30), Kelvin: si(t, "temperature", 10)}
	for name, d := range map[string]Document{
		"pump":    solved(t, soft(t), "caustic-25", si(t, "pump", 20)),
		"no flow": solved(t, bare, "caustic-50", dosing.None),
		"solid":   solved(t, soft(t), "lime", dosing.None),
	} {
		slip := d.Slip()
		plainWithin(t, name, slip, slipWidth)
		var starts []string
		for _, line := range strings.Split(slip, "\n") {
			if !strings.HasPrefix(line, "   ") { // what a long line goes on with
				starts = append(starts, line)
			}
		}
		for i, start := range want {
			if i >= len(starts) || !strings.HasPrefix(starts[i], start) {
				t.Fatalf("%s: line %d should start with %q in\n%s", name, i+1, start, slip)
			}
		}
		if again := d.Slip(); again != slip {
			t.Errorf("%s: the slip changes from call to call", name)
		}
	}
}

func TestLogLineFits(t *testing.T) {
	when := time.Date(2026, 12, 1, 8, 40, 0, 0, time.UTC)
	line := solved(t, soft(t), "caustic-25", si(t, "pump", 20)).LogLine(when)
	for _, part := range []string{"2026-12-01 08:40 caustic-25 ", " mg/L pure ", " L/h pump ", " % pH 6.28 > 8.40"} {
		if !strings.Contains(line, part) {
			t.Errorf("no %q in %s", part, line)
		}
	}
	for _, p := range dosing.Products() {
		if p.Purpose != dosing.PHControl {
			continue
		}
		r := soft(t)
		if p.Chemical.Equivalents <= 0 {
			r.PH = si(t, "ph", 9.9) // something to bring down
			r.Alkalinity = si(t, "alkalinity", 60)
		}
		if p.Name == "bicarbonate" {
			continue // it cannot reach the target
		}
		line := solved(t, r, p.Name, dosing.None).LogLine(when)
		plainWithin(t, p.Name, line, logWidth)
		if strings.Contains(line, "\n") || !strings.Contains(line, p.Name) || !strings.HasSuffix(line, " > 8.40") {
			t.Errorf("%s: %s", p.Name, line)
		}
	}
}

func TestWrapKeepsTheWords(t *testing.T) {
	text := "  - one two three four five six\nseven"
	got := Wrap(text, 16)
	if want := "  - one two\n    three four\n    five six\nseven"; got != want {
		t.Errorf("wrapped to %q, want %q", got, want)
	}
}

func TestASCII(t *testing.T) {
	if got, want := ASCII("8 °C · m³/h µS “x” ≤ 5–6 é"), "8 C . m3/h uS \"x\" <= 5-6 ?"; got != want {
		t.Errorf("%q, want %q", got, want)
	}
}
