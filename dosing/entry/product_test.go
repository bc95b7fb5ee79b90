package entry

import (
	"errors"
	"math"
	"strings"
	"testing"

	"beckline/dosing"
)

func TestProductNamed(t *testing.T) {
	for _, p := range dosing.Products() {
		for _, name := range []string{p.Name, strings.ToUpper(p.Name), " " + strings.ReplaceAll(p.Name, "-", " "), strings.ReplaceAll(p.Name, "-", "_")} {
			got, err := ProductNamed(name)
			if err != nil || got.Name != p.Name {
				t.Errorf("%q is %q, %v, want %s", name, got.Name, err, p.Name)
			}
		}
	}
}

func TestUnknownProductOffersTheNearest(t *testing.T) {
	for name, want := range map[string]string{
		"caustic-26":         "caustic-25",
		"castic":             "caustic-25 or caustic-50",
		"xyzzy":              "a product of the catalogue, such as caustic-25", // lime is as near as anything
		"nosuch":             "a product of the catalogue, such as caustic-25",
		"cuastic-25":         "caustic-25",
		"caustic":            "caustic-25 or caustic-50",
		"NaOH":               "caustic-25 or caustic-50",
		"sodium hydroxide":   "caustic-25 or caustic-50",
		"alum":               "alum-dry or alum-liquid",
		"H2SO4":              "sulfuric-93 or sulfuric-98",
		"sulphuric-93":       "sulfuric-93",
		"limee":              "lime",
		"co2":                "carbon-dioxide",
		"hypochlorite":       "hypochlorite-12",
		"\x1b[31mlime":       "lime",
		"sodium bicarbonate": "bicarbonate",
	} {
		_, err := ProductNamed(name)
		var p *dosing.Problem
		if !errors.As(err, &p) || p.Code != "unknown_product" || p.Field != "product" ||
			!strings.Contains(p.Accepted, want) || strings.Contains(p.Given, "\x1b") {
			t.Errorf("%q: %+v, want the offer %q", name, p, want)
		}
	}
	long := strings.Repeat("x", 100_000)
	if _, err := ProductNamed(long); err == nil || len(err.Error()) > 300 {
		t.Errorf("a long name: %.300v", err)
	}
}

func TestStrengthReplacesTheCataloguesOwn(t *testing.T) {
	for _, c := range []struct {
		product, strength string
		want              float64 // of Product.Strength
		says              string
	}{
		{"caustic-25", "30", 0.30, "30 % by weight"},
		{"caustic-25", "30 % by weight", 0.30, "30 %"},
		{"caustic-50", "52", 0.52, "52 %"},
		{"lime", "90 %", 0.90, "90 %"},
		{"alum-liquid", "48,5", 0.485, "48.5 %"},
	} {
		p := mustCase(t, plant().with("strength", c.strength).withProduct(c.product), NeedDose).Additions[0].Product
		if math.Abs(p.Strength-c.want) > 1e-12 || !strings.Contains(p.StrengthText, c.says) {
			t.Errorf("%s at %s: %v %q, want %v %q", c.product, c.strength, p.Strength, p.StrengthText, c.want, c.says)
		}
	}
	// A solid whose purity is given is no longer assumed pure.
	p := mustCase(t, plant().with("strength", "90").withProduct("lime"), NeedDose).Additions[0].Product
	if len(p.Warns) != 0 {
		t.Errorf("lime of a stated purity warns %v", p.Warns)
	}
	// Hypochlorite in the trade's own terms: 12.5 trade per cent is 125 g/L Cl2.
	own, _ := dosing.ProductByName("hypochlorite-12")
	for _, text := range []string{"12.5", "12.5 % trade", "125 g/L Cl2"} {
		p := mustCase(t, plant().with("strength", text).withProduct("hypochlorite-12"), NeedDose).Additions[0].Product
		if math.Abs(p.Strength-own.Strength) > 1e-9 || p.StrengthText != own.StrengthText {
			t.Errorf("%s: %v %q, want %v %q", text, p.Strength, p.StrengthText, own.Strength, own.StrengthText)
		}
	}
}

func TestStrengthRefused(t *testing.T) {
	for _, c := range []struct{ product, strength, code, accepted string }{
		{"caustic-25", "0", "below_limit", "above 0 to 100 %"},
		{"caustic-25", "120 %", "above_limit", "above 0 to 100 %"},
		{"caustic-25", "53", "bad_strength", "up to 52 % by weight"},
		{"caustic-50", "100", "bad_strength", "up to 52 % by weight"}, // the same limit, not a nearer one first
		{"lime", "100.5", "above_limit", "above 0 to 100 %"},
		{"lime", "-1", "below_limit", "above 0 to 100 %"},
		{"caustic-25", "250 g/L", "ambiguous_unit", "% by weight"},
		{"caustic-25", "25 % trade", "strength_terms", "% by weight"},
		{"hypochlorite-12", "12 % by weight", "strength_terms", "% trade"},
		{"hypochlorite-12", "60", "bad_strength", "% trade"},
		{"caustic-25", "abc", "not_a_number", "above 0 to 100 %"},
		{"caustic-25", "25\x00", "control_characters", "%"},
	} {
		p := problem(t, plant().with("strength", c.strength).withProduct(c.product), NeedDose)
		if p.Code != c.code || p.Field != "strength" || !strings.Contains(p.Accepted, c.accepted) || strings.Contains(p.Given, "\x00") {
			t.Errorf("%s at %q: %+v, want %s and %q", c.product, c.strength, p, c.code, c.accepted)
		}
	}
}

func TestNearest(t *testing.T) {
	names := []string{"ph", "ph-temperature", "alkalinity", "temperature", "hardness", "target-ph", "target-alkalinity", "target-si", "add"}
	for wanted, want := range map[string]string{
		"alk": "alkalinity", "temp": "temperature", "alkalinty": "alkalinity", "target": "target-ph target-alkalinity target-si",
		"PH": "ph", "target_ph": "target-ph", "ad": "add", "hradness": "hardness",
	} {
		if got := strings.Join(Nearest(wanted, names, 3), " "); got != want {
			t.Errorf("nearest to %q: %q, want %q", wanted, got, want)
		}
	}
	if got := Nearest("xyzzy", names, 3); len(got) == 0 {
		t.Error("nothing is nearest")
	}
	for wanted, want := range map[string]string{"xyzzy": "", "nosuch": "", "temp": "temperature", "alkalinty": "alkalinity", "PH": "ph"} {
		if got := strings.Join(Likely(wanted, names, 3), " "); got != want {
			t.Errorf("likely for %q: %q, want %q", wanted, got, want)
		}
	}
	if got := Nearest("alk", nil, 3); len(got) != 0 {
		t.Errorf("%v is nearest among none", got)
	}
}

func TestDistance(t *testing.T) {
	for _, c := range []struct {
		from, to string
		want     int
	}{
		{"", "", 0}, {"lime", "lime", 0}, {"lime", "", 4}, {"", "lime", 4}, {"limee", "lime", 1}, {"lme", "lime", 1},
		{"line", "lime", 1}, {"ilme", "lime", 1}, {"kitten", "sitting", 3}, // Levenshtein's usual textbook pair
	} {
		if got := distance(c.from, c.to); got != c.want {
			t.Errorf("distance(%q, %q) = %d, want %d", c.from, c.to, got, c.want)
		}
	}
}
