package slips

import (
	"math"
	"time"

	"beckline/dosing"
)

const (
	readWithin  = 15 * time.Minute
	staleAfter  = 24 * time.Hour
	reusedAfter = 12 * time.Hour
	leastReused = 4
	airCO2      = 2e-5 // mol/L, 0.9 mg/L: what air leaves in cold water, rounded up
	richInCO2   = 3.0  // times that: an open sample loses it
	blendWithin = 0.03 // pH between the typed value and a mean
	blendClear  = 0.1  // pH between the mean and the true mixture
)

// sample: a raw sample that stood open before its pH was read.
func (k *check) sample() []Finding {
	s := &k.x.Sample
	if s.Taken.IsZero() || s.Read.IsZero() || s.Read.Sub(s.Taken) <= readWithin {
		return nil
	}
	f := Finding{Code: SampleStood, Field: "ph", Value: k.c.Readings.PH,
		Cause:    "did the sample stand open? It loses or takes up CO2, and the pH goes with it",
		Evidence: "it was read " + whole(s.Read.Sub(s.Taken).Minutes()) + " minutes after it was taken",
		Do:       "fill a bottle to the brim, close it, read within 15 minutes"}
	if k.r == nil {
		return []Finding{f}
	}
	co2 := k.r.Raw().Figures.FreeCO2
	switch {
	case co2 > richInCO2*airCO2:
		f.Evidence += "; this water holds " + figures(co2*44.009e3, 2) + " mg/L of CO2, so the true pH is lower"
	case co2 < airCO2/richInCO2:
		f.Evidence += "; this water holds less CO2 than the air gives it, so the true pH is higher"
	default:
		return nil // near the air's own: standing does nothing to it
	}
	return []Finding{f}
}

// age: readings of another day.
func (k *check) age() []Finding {
	var out []Finding
	if !k.x.Now.IsZero() {
		for _, field := range fields {
			at, ok := k.x.ReadAt[field.Name]
			v := value(&k.c.Readings, field.Name)
			if !ok || !v.Given {
				continue
			}
			switch old := k.x.Now.Sub(at); {
			case old > staleAfter:
				out = append(out, Finding{Code: ReadingOld, Field: field.Name, Value: v,
					Cause: "yesterday's " + field.Label + "?", Evidence: "it was read " + figures(old.Hours(), 3) + " h ago", Do: "read it again"})
			case old < -time.Minute:
				out = append(out, Finding{Code: ReadingInFuture, Field: field.Name, Value: v,
					Cause: "a wrong date or clock?", Evidence: "it is dated " + at.Format("2 Jan 2006 15:04") + ", after now", Do: "correct the time"})
			}
		}
	}
	if f, ok := k.reused(); ok {
		out = append(out, f)
	}
	return out
}

// reused: every reading is that of the last case, to the last digit.
func (k *check) reused() (Finding, bool) {
	x := k.x
	if x.Last == nil || x.Now.IsZero() || x.LastAt.IsZero() || x.Now.Sub(x.LastAt) < reusedAfter {
		return Finding{}, false
	}
	same := 0
	for _, field := range fields {
		now, last := value(&k.c.Readings, field.Name), value(&x.Last.Readings, field.Name)
		if !now.Given {
			continue
		}
		// Meters that move all day decide; ions of a yearly analysis do not.
		if now != last {
			return Finding{}, false
		}
		same++
	}
	if same < leastReused {
		return Finding{}, false
	}
	return Finding{Code: CaseReused, Cause: "is this the last case, not today's readings?",
		Evidence: "all " + whole(float64(same)) + " readings are those of " + x.LastAt.Format("2 Jan 2006 15:04"),
		Do:       "read at least pH, alkalinity, temperature and flow again"}, true
}

// blend: the raw pH is the mean of the sources' pH, which no mixture has.
func (k *check) blend() []Finding {
	if len(k.x.Sources) < 2 || !k.c.Readings.PH.Given {
		return nil
	}
	r, err := dosing.Solve(dosing.Case{Sources: k.x.Sources})
	if err != nil {
		return nil
	}
	mean, sum := 0.0, 0.0
	for _, s := range k.x.Sources {
		if !s.Readings.PH.Given || !s.Flow.Given {
			return nil
		}
		mean += s.Flow.Value * s.Readings.PH.Value
		sum += s.Flow.Value
	}
	mean /= sum
	typed, mixed := k.c.Readings.PH.Value, r.Raw().Figures.PH
	if math.Abs(typed-mean) > blendWithin || math.Abs(mean-mixed) < blendClear {
		return nil
	}
	return []Finding{{Code: BlendAveraged, Field: "ph", Value: k.c.Readings.PH, Meant: dosing.Some(mixed), Weight: math.Pow((typed-mixed)/0.05, 2),
		Cause:    "was the pH of the blend averaged? The mean is " + pH(mean) + ", the mixture " + pH(mixed),
		Evidence: "the typed pH is the mean of the sources' by flow",
		Do:       "read the mixture, or enter the sources and let them be mixed"}}
}
