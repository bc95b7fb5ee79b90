package caution

import (
	"strings"
	"testing"

	"beckline/dosing"
)

func productKeys(t *testing.T, names ...string) []string {
	t.Helper()
	var keys []string
	for _, name := range names {
		p, ok := dosing.ProductByName(name)
		if !ok {
			t.Fatalf("no product %s", name)
		}
		keys = append(keys, p.Caution)
	}
	return keys
}

func TestCombined(t *testing.T) {
	const (
		chlorineGas = "chlorine gas."
		explosive   = "explosive."
		spatter     = "heat, spatter."
		bins        = "burst bins."
	)
	acidReactingProducts := []string{
		"sulfuric-93", "sulfuric-98", "hydrochloric-32", "hydrochloric-37", "nitric-60", "phosphoric-75", "acetic-80", "formic-85", "citric-50",
		"alum-dry", "alum-liquid", "ferric-chloride-40", "ferric-sulfate-43", "pacl-10", "hydrofluorosilicic-23", "carbon-dioxide",
	}
	type pair struct{ a, b, want string }
	var pairs []pair
	for _, a := range acidReactingProducts {
		pairs = append(pairs, pair{a, "hypochlorite-12", chlorineGas}, pair{a, "calcium-hypochlorite-65", chlorineGas})
	}
	for _, a := range []string{"ammonia-19", "ammonium-sulfate-40"} {
		for _, b := range []string{"chlorine-gas", "hypochlorite-12", "calcium-hypochlorite-65"} {
			pairs = append(pairs, pair{a, b, explosive})
		}
	}
	for _, a := range []string{"caustic-25", "caustic-50", "potassium-hydroxide-45", "lime", "quicklime"} {
		for _, b := range []string{"sulfuric-93", "hydrochloric-32", "nitric-60", "hydrofluorosilicic-23", "ferric-chloride-40"} {
			pairs = append(pairs, pair{a, b, spatter})
		}
		pairs = append(pairs, pair{a, "ammonium-sulfate-40", "ammonia gas."})
	}
	pairs = append(pairs,
		pair{"quicklime", "alum-dry", bins},
		pair{"soda-ash-10", "sulfuric-93", "foam throws acid out."},
		pair{"sodium-fluoride", "hydrochloric-37", "hydrogen fluoride."},
		pair{"formic-85", "sulfuric-98", "carbon monoxide."},
		pair{"nitric-60", "acetic-80", "bursting."},
	)
	for _, p := range pairs {
		for _, names := range [][]string{{p.a, p.b}, {p.b, p.a}, {p.b, "bicarbonate", p.a}} {
			if got := strings.Join(Combined(productKeys(t, names...)), "\n"); !strings.Contains(got, p.want) {
				t.Errorf("%v: %q lacks %q", names, got, p.want)
			}
		}
	}
}

func TestCombinedStaysQuiet(t *testing.T) {
	for _, c := range []struct {
		names []string
		count int
	}{
		{nil, 0},
		{[]string{"alum-liquid"}, 0},
		{[]string{"hypochlorite-12", "soda-ash-10"}, 0},
		{[]string{"alum-liquid", "alum-dry"}, 0},
		{[]string{"lime", "alum-dry"}, 0}, // hydrated lime has taken up its water
		{[]string{"sulfuric-93", "sulfuric-98"}, 0},
		{[]string{"quicklime"}, 1},
		{[]string{"caustic-25", "caustic-50"}, 1},
	} {
		if got := Combined(productKeys(t, c.names...)); len(got) != c.count {
			t.Errorf("%v: %q", c.names, got)
		}
	}
}

func TestCombinedProducts(t *testing.T) {
	alum, _ := dosing.ProductByName("alum-liquid")
	bleach, _ := dosing.ProductByName("hypochlorite-12")
	got := CombinedProducts([]dosing.Product{alum, bleach})
	if len(got) != 1 || !strings.HasPrefix(got[0], "NEVER TOGETHER: acid or coagulant with hypochlorite") {
		t.Errorf("%q", got)
	}
}
