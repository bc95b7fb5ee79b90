package slips

import (
	"math"

	"beckline/dosing"
	"beckline/dosing/reading"
)

const (
	usualBurette     = 50.0 // mL
	duplicatesWithin = 0.05
	sameTitre        = 0.01 // of an alkalinity worked out of the burette
)

// normalities are the titrants that are sold for alkalinity, eq/L.
var normalities = []float64{0.02, 0.1, 0.16, 1.6}

// burette looks at the titration behind the alkalinity.
func (k *check) burette() []Finding {
	b := k.x.Burette
	if b == nil {
		return nil
	}
	var out []Finding
	f, _ := reading.Lookup("alkalinity")
	if n := b.EqPerLitre; n.Given && !listed(n.Value) {
		out = append(out, Finding{Code: TitrantStrength, Field: "alkalinity", Value: n,
			Cause:    "titrant of " + figures(n.Value, 3) + " eq/L? Sold are 0.02, 0.1, 0.16 and 1.6",
			Evidence: "the strength typed is none of them", Do: "read the label of the titrant and titrate a standard"})
	}
	if n := len(b.Duplicates); n > 1 {
		low, high := b.Duplicates[0], b.Duplicates[0]
		for _, v := range b.Duplicates {
			low, high = min(low, v), max(high, v)
		}
		if high > low*(1+duplicatesWithin) && f.ToBare(high)-f.ToBare(low) > 1 {
			out = append(out, Finding{Code: DuplicatesApart, Field: "alkalinity", Value: dosing.Some(high),
				Cause:    "a misread burette or a wrong end point in one of them?",
				Evidence: "duplicates give " + f.Show(low) + " and " + f.Show(high) + unit(f), Do: "titrate a third"})
		}
	}
	return append(out, k.ends(b, f)...)
}

func listed(n float64) bool {
	for _, v := range normalities {
		if math.Abs(n/v-1) < 0.02 {
			return true
		}
	}
	return false
}

// ends: start and end of the burette against the alkalinity typed.
func (k *check) ends(b *Burette, f reading.Field) []Finding {
	if !b.Start.Given || !b.End.Given {
		return nil
	}
	start, end := b.Start.Value, b.End.Value
	capacity := b.Capacity
	if capacity <= 0 {
		capacity = usualBurette
	}
	typed := k.c.Readings.Alkalinity
	meant := dosing.None
	if b.PerML > 0 {
		meant = dosing.Some(math.Abs(end-start) * b.PerML)
	}
	finding := Finding{Field: "alkalinity", Value: typed, Meant: meant, Do: "write start and end, both from the top, and let the difference be taken"}
	if end < start {
		finding.Code = BuretteWrongEnd
		finding.Cause = "read from the wrong end, or start and end changed places?"
		finding.Evidence = "start " + figures(start, 3) + " mL, end " + figures(end, 3) + " mL: a burette reads downwards"
		return []Finding{finding}
	}
	if !typed.Given || !meant.Given || near(typed.Value, meant.Value) {
		return nil
	}
	switch {
	case start > 0 && near(typed.Value, end*b.PerML):
		finding.Code = BuretteNotZeroed
		finding.Cause = "was the burette not at zero? " + f.Show(typed.Value) + unit(f) + " takes the end reading for the titre"
		finding.Evidence = "start " + figures(start, 3) + " mL, end " + figures(end, 3) + " mL are " + f.Show(meant.Value) + unit(f)
	case near(typed.Value, (capacity-end)*b.PerML):
		finding.Code = BuretteWrongEnd
		finding.Cause = "was what is left in the burette taken for what was used?"
		finding.Evidence = "start " + figures(start, 3) + " mL, end " + figures(end, 3) + " mL of " + figures(capacity, 3) + " are " + f.Show(meant.Value) + unit(f)
	default:
		return nil
	}
	return []Finding{finding}
}

func near(a, b float64) bool { return math.Abs(a-b) <= sameTitre*max(math.Abs(a), math.Abs(b)) }
