package slips

import (
	"math"
	"time"

	"beckline/dosing"
)

const (
	metersWithin = 0.15 // pH between two meters on one sample
	grabWithin   = 0.2  // pH between the probe and a grab sample
	flatFor      = 4 * time.Hour
	flatWithin   = 0.01 // pH that a living probe moves by in that time at least
	flatReadings = 5
)

// meters compares pH readings that should be the same.
func (k *check) meters() []Finding {
	var out []Finding
	x := k.x
	if first := k.c.Readings.PH; first.Given && x.SecondPH.Given && math.Abs(first.Value-x.SecondPH.Value) > metersWithin {
		d := first.Value - x.SecondPH.Value
		side := "high"
		if d < 0 {
			side = "low"
		}
		f := Finding{Code: MetersDisagree, Field: "ph", Value: first, Meant: x.SecondPH, Weight: math.Pow(d/0.05, 2),
			Cause:    "is the first meter " + figures(math.Abs(d), 1) + " " + side + ", or the second off?",
			Evidence: "one sample reads " + pH(first.Value) + " and " + pH(x.SecondPH.Value),
			Do:       "put both into two fresh buffers around the reading, at the sample's temperature"}
		if k.r != nil && k.r.Solved > 0 {
			if w, ok := k.solve(func(c *dosing.Case) { c.Readings.PH = x.SecondPH }, k.last()); ok {
				f.Evidence += "; if the second is right, the dose now found ends at pH " + pH(w.PH)
			}
		}
		out = append(out, f)
	}
	if n := len(x.Online); n > 0 {
		last := x.Online[n-1].Value
		if x.Grab.Given && math.Abs(last-x.Grab.Value) > grabWithin {
			out = append(out, Finding{Code: ProbeAndGrab, Field: "finished-ph", Value: dosing.Some(last), Meant: x.Grab,
				Weight:   math.Pow((last-x.Grab.Value)/0.07, 2),
				Cause:    "a scaled, coated or drifted probe, or a sample line that stands?",
				Evidence: "the probe reads " + pH(last) + " and the grab sample " + pH(x.Grab.Value),
				Do:       "clean the probe, check it in buffers, look at the sample flow; until then go by grab samples"})
		}
		if f, ok := flat(x.Online); ok {
			out = append(out, f)
		}
	}
	return out
}

// flat: a probe that does not move for hours does not measure.
func flat(online []Timed) (Finding, bool) {
	last := online[len(online)-1]
	low, high := last.Value, last.Value
	first, n := last.At, 0
	for i := len(online) - 1; i >= 0; i-- {
		low, high = min(low, online[i].Value), max(high, online[i].Value)
		if high-low > flatWithin {
			break
		}
		first = online[i].At
		n++
	}
	held := last.At.Sub(first)
	if held < flatFor || n < flatReadings {
		return Finding{}, false
	}
	return Finding{Code: ProbeFlat, Field: "finished-ph", Value: dosing.Some(last.Value),
		Cause:    "does the probe see the water? A line this flat is a stopped sample, a scaled probe or a held output",
		Evidence: "it has read " + pH(last.Value) + " without moving for " + figures(held.Hours(), 2) + " h",
		Do:       "take a grab sample now; it would miss a slug"}, true
}
