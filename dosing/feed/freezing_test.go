package feed

import (
	"math"
	"strings"
	"testing"
)

// Published freezing and crystallisation points. Rows that are only a low end
// of a span are bounds; unsure ones are shown, not gated.
func TestPublishedFreezingPoints(t *testing.T) {
	reasons := map[string]string{
		"NaHCO3":        "sold dry",
		"NaOH.H2O":      "a solid phase; caustic of 50 % stands for it below",
		"H2SO4 at 4":    "no product so weak",
		"Na2CO3 at 20+": "above 20 C the salt is another hydrate and no tank is so warm",
	}
	checked := 0
	for _, row := range published(t, "densities.csv") {
		name, q := row["substance"], row["quantity"]
		if !strings.Contains(q, "freezing") && q != "melting point" && q != "crystallisation temperature" && q != "solubility" {
			continue
		}
		if reasons[name] != "" || name == "H2SO4" && row["concentration"] == "4" ||
			name == "Na2CO3" && row["temperature_c"] != "20" {
			continue
		}
		var strength, want float64
		if q == "solubility" { // g per 100 g of water that just dissolves at a temperature
			s := number(t, row["value"])
			strength, want = s/(100+s), number(t, row["temperature_c"])
		} else {
			strength, want = number(t, row["concentration"])/100, number(t, row["value"])
		}
		f := substances[name].table.Freezing(strength)
		if !f.Known {
			t.Errorf("%s %g: no freezing point", name, strength)
			continue
		}
		got := f.Kelvin - 273.15
		if strings.Contains(row["how"], "unsure") {
			if !f.Unsure {
				t.Errorf("%s %g: the source is unsure and the point does not say so", name, strength)
			}
			t.Logf("%s %g: %.1f C, recalled %g (unsure, no gate)", name, strength, got, want)
			continue
		}
		checked++
		if strings.HasSuffix(q, "low end") {
			if got < want {
				t.Errorf("%s %g: %g C is below the span that starts at %g C, %s", name, strength, got, want, row["source"])
			}
			continue
		}
		if math.Abs(got-want) > 0.5 {
			t.Errorf("%s %g: %.2f C, published %g, %s", name, strength, got, want, row["source"])
		}
	}
	if checked < 12 {
		t.Errorf("only %d published points compared", checked)
	}
}

// Every liquid either has a freezing point at a strength that is sold, or is
// named here as having none that could be relied on.
func TestEveryLiquidHasAFreezingPoint(t *testing.T) {
	none := map[Density]bool{FerricSulfate: true}
	for _, name := range Tables() {
		points := freezing[name]
		if none[name] != (len(points) == 0) {
			t.Errorf("%s: %d freezing points", name, len(points))
		}
		for i, p := range points {
			if p.source == "" || p.celsius < -80 || p.celsius > 25 || i > 0 && p.strength <= points[i-1].strength {
				t.Errorf("%s: point %+v", name, p)
			}
			if strings.Contains(p.source, "unsure") && !p.unsure {
				t.Errorf("%s: point %+v does not say that it is unsure", name, p)
			}
		}
	}
}

func TestFreezingOutsidePointsIsUnknown(t *testing.T) {
	for strength, known := range map[float64]bool{0.10: false, 0.177: false, 0.18: true, 0.22: true, 0.51: true, 0.52: false} {
		if got := SodiumHydroxide.Freezing(strength); got.Known != known {
			t.Errorf("caustic %g: known %v, want %v", strength, got.Known, known)
		}
	}
	if got := FerricSulfate.Freezing(0.43); got.Known {
		t.Errorf("ferric sulfate: %+v", got)
	}
}

// A point between a sure and an unsure one is unsure, on a straight line.
func TestFreezingBetweenPoints(t *testing.T) {
	got := SodiumHydroxide.Freezing(0.475)
	if !got.Known || !got.Unsure || math.Abs(got.Kelvin-273.15-(6+12.3)/2) > 1e-9 {
		t.Errorf("%+v", got)
	}
	if got := SodiumHydroxide.Freezing(0.50); got.Unsure {
		t.Errorf("%+v", got)
	}
}
