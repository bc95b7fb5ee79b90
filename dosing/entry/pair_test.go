package entry

import (
	"math"
	"testing"

	"beckline/dosing"
)

func (f Form) withSecond(name string) Form { f.Second = name; return f }

// Two products take two targets, in the order of the fields, and stand one
// behind the other between what is ahead of them and what is behind.
func TestTwoProductsTakeTwoTargets(t *testing.T) {
	f := plant().with("target-alkalinity", "45", "pump", "20", "strength", "48").withAdds("alum-dry=10").withSecond("bicarbonate")
	f.Thens = []string{"hypochlorite-12=1 mg/L Cl2"}
	c := mustCase(t, f, NeedDose)
	if c.Target != (dosing.Target{Kind: dosing.TargetPH, Value: 8.5}) || c.Second.Kind != dosing.TargetAlkalinity ||
		math.Abs(c.Second.Value-45/50.0435e3) > 1e-12 {
		t.Errorf("targets %+v and %+v", c.Target, c.Second)
	}
	var names []string
	for _, a := range c.Additions {
		names = append(names, a.Product.Name)
	}
	if len(names) != 4 || names[1] != "caustic-50" || names[2] != "bicarbonate" || !c.Additions[1].Solve || !c.Additions[2].Solve ||
		c.Additions[0].Solve || c.Additions[3].Solve {
		t.Fatalf("additions %v", names)
	}
	// The settings are the first one's.
	if first, second := c.Additions[1], c.Additions[2]; first.Product.Strength != 0.48 || !first.Feed.PumpCapacity.Given ||
		second.Feed.PumpCapacity.Given || second.Product.Strength != 1 {
		t.Errorf("settings of %+v and %+v", first, second)
	}
}

func TestPairsThatDoNotMatch(t *testing.T) {
	two := plant().with("target-alkalinity", "45")
	for code, f := range map[string]Form{
		"two_targets":     two,
		"two_and_two":     plant().withSecond("bicarbonate"),
		"same_product":    two.withSecond("Caustic 50"),
		"unknown_product": two.withSecond("no such thing"),
		"missing":         plant().with("target-ph", "").withSecond("bicarbonate"),
	} {
		if p := problem(t, f, NeedDose); p.Code != code {
			t.Errorf("%s: %+v", code, p)
		}
	}
	if p := problem(t, two.with("target-si", "0").withSecond("bicarbonate"), NeedDose); p.Code != "two_targets" || p.Field != "target-si" {
		t.Errorf("three targets: %+v", p)
	}
}

func TestTargetAlone(t *testing.T) {
	target, err := Form{Values: map[string]string{"target-dic": "1.2"}}.Target()
	if err != nil || target.Kind != dosing.TargetDIC || math.Abs(target.Value-1.2e-3) > 1e-15 {
		t.Errorf("%+v, %v", target, err)
	}
	if target, err := (Form{}).Target(); err != nil || target.Kind != dosing.NoTarget {
		t.Errorf("%+v, %v from nothing", target, err)
	}
	for _, values := range []map[string]string{{"target-ph": "abc"}, {"target-ph": "8", "target-si": "0"}} {
		if target, err := (Form{Values: values}).Target(); err == nil {
			t.Errorf("%v was taken as %+v", values, target)
		}
	}
}
