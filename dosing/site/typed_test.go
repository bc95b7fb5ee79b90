package site

import (
	"math"
	"testing"

	"beckline/dosing"
	"beckline/dosing/entry"
)

func TestPricesAndLevelsAsTyped(t *testing.T) {
	for text, want := range map[string]float64{"0.35": 0.35, "310 /t": 0.31, "0.18 per lb": 0.18 / 0.45359237, "0": 0} {
		if got, _, ok := ParsePrice(text); !ok || math.Abs(got-want) > 1e-12 {
			t.Errorf("price %q is %v, want %v", text, got, want)
		}
	}
	for _, text := range []string{"", "cheap", "-1", "3 per barrel"} {
		if got, accepted, ok := ParsePrice(text); ok || accepted == "" {
			t.Errorf("price %q was taken as %v", text, got)
		}
	}
	if got, _, ok := ParseUseLevel("50"); !ok || got != 0.05 {
		t.Errorf("use level 50 is %v", got)
	}
	if _, _, ok := ParseUseLevel("0"); ok {
		t.Error("a use level of 0 was taken")
	}
	if got, _, ok := ParseRatio("0.6"); !ok || got != 0.6 {
		t.Errorf("ratio 0.6 is %v", got)
	}
}

const twoFeeds = `format = 1
[products.slaked]
catalogue = "lime"
maximum-use = 50
[products.gas]
catalogue = "carbon-dioxide"
[products.caustic]
catalogue = "caustic-25"
strength = 24
density = 1262
temperature = 15
[pumps.P1]
capacity = 20
product = "caustic"
[lines.a]
readings = { ph = 6.8, alkalinity = 20, temperature = 8, flow = 240 }
`

// The second product and what stands behind the solved ones are the plant's own
// too.
func TestOwnProductsInEveryPlace(t *testing.T) {
	s, err := Parse("two.toml", []byte(twoFeeds))
	if err != nil {
		t.Fatal(err)
	}
	l := s.Start
	f := l.Form()
	l.Choose(&f, "slaked")
	f.Second, f.Thens = "caustic", []string{"gas=2"}
	f.Values["target-ph"], f.Values["target-alkalinity"] = "8.3", "45"
	if problems := l.Problems(f, entry.NeedDose); len(problems) != 0 {
		t.Fatalf("problems %v", problems)
	}
	c, err := l.Case(f, entry.NeedDose)
	if err != nil {
		t.Fatal(err)
	}
	if len(c.Additions) != 3 {
		t.Fatalf("%d additions", len(c.Additions))
	}
	first, second, behind := c.Additions[0], c.Additions[1], c.Additions[2]
	if first.Product.Name != "slaked" || first.Feed.MaximumUse != dosing.Some(0.05) || first.Feed.PumpCapacity.Given {
		t.Errorf("first %+v", first)
	}
	if second.Product.Name != "caustic" || second.Product.Strength != 0.24 || second.Feed.Density != dosing.Some(1262) ||
		!second.Feed.PumpCapacity.Given || second.Feed.ProductKelvin != dosing.Some(288.15) {
		t.Errorf("second %+v", second)
	}
	if behind.Product.Name != "gas" || behind.Solve {
		t.Errorf("behind %+v", behind)
	}
	if e := l.Equipment(s.ProductNamed("caustic")); e.Density != dosing.Some(1262) || math.Abs(e.PumpCapacity.Value-20e-3/3600) > 1e-15 {
		t.Errorf("equipment %+v", e)
	}
}
