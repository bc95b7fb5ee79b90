package slips

import (
	"slices"
	"strings"

	"beckline/dosing"
)

const (
	enough    = 12.0 // squared deviations by which another meaning must fit better: some three and a half deviations
	plausible = 2.5  // deviations that the other meaning may have in any one comparison
	mostSlips = 4    // more at a time is another plant
)

// readings weighs every reading against what else it may have meant. One slip
// upsets every comparison that its reading takes part in, so the one meaning
// that mends most is found, put in, and the rest is weighed again.
func readings(r dosing.Readings, x *Context) []Finding {
	var out []Finding
	for range mostSlips {
		best, found := strongest(&r, x)
		if !found {
			break
		}
		*r.Named(best.Field) = best.Meant
		out = append(out, best)
	}
	return out
}

func strongest(r *dosing.Readings, x *Context) (best Finding, found bool) {
	before := terms(r, x)
	for _, f := range fields {
		v := value(r, f.Name)
		if !v.Given || confirmed(x, f.Name, v.Value) {
			continue
		}
		for _, m := range meanings(f, v.Value, x.Units[f.Name]) {
			q := *r
			*q.Named(f.Name) = dosing.Some(m.value)
			after := terms(&q, x)
			gain := loss(before) - loss(after) - m.prior
			if gain < enough || found && gain <= best.Weight || !sits(after, f.Name) {
				continue
			}
			best = Finding{
				Code: m.code, Field: f.Name, Cause: m.cause, Do: m.do,
				Value: v, Meant: dosing.Some(m.value), Weight: gain,
				Evidence: evidence(before, f.Name),
			}
			found = true
		}
	}
	return best, found
}

func confirmed(x *Context, field string, v float64) bool {
	f := Finding{Field: field, Value: dosing.Some(v)}
	return slices.ContainsFunc(x.Confirmed, func(c Confirmation) bool { return c.Code == "" && c.covers(&f) })
}

func loss(ts []term) float64 {
	sum := 0.0
	for i := range ts {
		sum += ts[i].loss()
	}
	return sum
}

// sits tells whether a reading is at peace with everything that it takes part in.
func sits(ts []term, field string) bool {
	for i := range ts {
		if slices.Contains(ts[i].fields, field) && (ts[i].z > plausible || ts[i].z < -plausible) {
			return false
		}
	}
	return true
}

// evidence says what speaks against a reading as typed, the strongest first.
func evidence(ts []term, field string) string {
	var against []term
	for _, t := range ts {
		if slices.Contains(t.fields, field) && (t.z > remarkable || t.z < -remarkable) {
			against = append(against, t)
		}
	}
	slices.SortStableFunc(against, func(a, b term) int {
		if a.loss() > b.loss() {
			return -1
		}
		if a.loss() < b.loss() {
			return 1
		}
		return 0
	})
	var texts []string
	for _, t := range against {
		texts = append(texts, t.text)
	}
	return strings.Join(texts, "; ")
}
