package slips

import (
	"math"
	"slices"

	"beckline/dosing"
	"beckline/dosing/reading"
)

// term is one comparison of readings with one another, with the plant's own
// past, or with what can be.
type term struct {
	fields []string // readings that it hangs on
	z      float64  // standard deviations by which it fails
	text   string   // how it failed, for an operator
}

// remarkable is the deviation from which a comparison is told as evidence.
const remarkable = 2

// loss counts a term: the square, but beyond three deviations straight on, since
// far out the errors are no longer normal.
func (t *term) loss() float64 {
	z := math.Abs(t.z)
	if z <= 3 {
		return z * z
	}
	return 6*z - 9
}

// Standard deviations of readings, as shares, when nothing is wrong (half of a
// 95 % interval of 4 to 5 %: common practice, no source).
const (
	ionShare     = 0.025
	balanceShare = 0.03 // of the sum, for what is not measured: potassium, nitrate, organic anions
	balanceWhole = 0.01 // the same where potassium and nitrate are
	balanceLeast = 1e-5 // eq/L
	conductShare = 0.07 // between a measured conductivity and one summed from ions
)

// ions are the readings in equivalents with their limiting conductivities,
// uS/cm per meq/L at 25 C (Standard Methods 2510 A, from memory).
var ions = []struct {
	field  string
	charge float64 // of the formula
	lambda float64
	needed bool // for a balance
}{
	{"calcium", 2, 59.5, true}, {"magnesium", 2, 53.1, true}, {"sodium", 1, 50.1, true}, {"potassium", 1, 73.5, false},
	{"alkalinity", -1, 44.5, true}, {"chloride", -1, 76.4, true}, {"sulfate", -2, 80.0, true}, {"nitrate", -1, 71.4, false},
}

// terms compares a set of readings with everything that is known.
func terms(r *dosing.Readings, x *Context) []term {
	var out []term
	out = append(out, hardnessTerms(r)...)
	out = append(out, ionTerms(r)...)
	for _, f := range fields {
		v := value(r, f.Name)
		if !v.Given {
			continue
		}
		if t, ok := pastTerm(f, v.Value, x); ok {
			out = append(out, t)
		} else if t, ok := bandTerm(f, v.Value); ok {
			out = append(out, t)
		}
	}
	if t, ok := capacityTerm(r, x); ok {
		out = append(out, t)
	}
	return out
}

// hardnessTerms holds the forms of hardness against one another.
func hardnessTerms(r *dosing.Readings) []term {
	var out []term
	calcium := r.Calcium
	if r.CalciumHardness.Given {
		if calcium.Given {
			out = append(out, term{fields: []string{"calcium", "calcium-hardness"}, z: math.Log(ratio(calcium.Value, r.CalciumHardness.Value)) / ionShare,
				text: "calcium and calcium hardness differ"})
		} else {
			calcium = r.CalciumHardness
		}
	}
	if !r.Hardness.Given || !calcium.Given {
		return out
	}
	on := []string{"calcium", "calcium-hardness", "hardness"}
	if r.Magnesium.Given {
		on = append(on, "magnesium")
		return append(out, term{fields: on, z: math.Log(ratio(calcium.Value+r.Magnesium.Value, r.Hardness.Value)) / ionShare,
			text: "calcium and magnesium together are not the total hardness"})
	}
	if calcium.Value > r.Hardness.Value {
		return append(out, term{fields: on, z: math.Log(ratio(calcium.Value, r.Hardness.Value)) / ionShare, text: "there is more calcium than total hardness"})
	}
	return out
}

// ratio of two readings, bounded where one is nothing.
func ratio(a, b float64) float64 { return min(max(a, 1e-12)/max(b, 1e-12), 1e12) }

// ionTerms are the balance of charges and the conductivity that the ions need.
func ionTerms(r *dosing.Readings) []term {
	q := *r
	fillHardness(&q)
	var out []term
	var cations, anions, square, conductance, ionic float64
	complete := true
	var on []string
	for _, ion := range ions {
		v := value(&q, ion.field)
		if !v.Given {
			complete = complete && !ion.needed
			continue
		}
		on = append(on, ion.field)
		eq := v.Value * math.Abs(ion.charge)
		if ion.charge > 0 {
			cations += eq
		} else {
			anions += eq
		}
		square += ionShare * ionShare * eq * eq
		conductance += ion.lambda * eq * 1000
		ionic += 0.5 * math.Abs(ion.charge) * eq
	}
	on = append(on, "hardness", "calcium-hardness")
	if complete {
		share := balanceShare
		if q.Potassium.Given && q.Nitrate.Given {
			share = balanceWhole
		}
		sigma := math.Sqrt(square + math.Pow(share*(cations+anions)/2, 2) + balanceLeast*balanceLeast)
		out = append(out, term{fields: on, z: (cations - anions) / sigma,
			text: "positive and negative ions differ by " + percent(math.Abs(cations-anions)/(cations+anions)*2)})
	}
	if !r.Conductivity.Given || !(r.Conductivity.Value > 0) {
		return out
	}
	on = append(slices.Clone(on), "conductivity")
	measured := r.Conductivity.Value * 1e4 // uS/cm
	if complete {
		need := conductance * yield(ionic)
		return append(out, term{fields: on, z: math.Log(measured/need) / conductShare,
			text: "the ions make about " + whole(need) + " µS/cm"})
	}
	// With some ions only: at least what the larger of alkalinity and hardness
	// makes with the lightest partner.
	least := 0.0
	if v := q.Alkalinity; v.Given {
		least = v.Value * (44.5 + 50)
	}
	if v := q.Hardness; v.Given {
		least = max(least, 2*v.Value*(53.1+44.5))
	}
	if v := q.Calcium; v.Given {
		least = max(least, 2*(v.Value+q.Magnesium.Or(0))*(53.1+44.5))
	}
	if least *= 1000 * yield(least/100); least > measured {
		out = append(out, term{fields: on, z: math.Log(least/measured) / conductShare,
			text: "alkalinity and hardness alone make some " + whole(least) + " µS/cm"})
	}
	return out
}

// yield is the conductance of ions at an ionic strength over that at infinite
// dilution, y^2 with log y = -0.5 (sqrt I/(1 + sqrt I) - 0.3 I) (Standard Methods
// 2510 A, from memory).
func yield(ionic float64) float64 {
	ionic = min(ionic, 0.5)
	root := math.Sqrt(ionic)
	return math.Pow(10, -(root/(1+root) - 0.3*ionic))
}

// fillHardness sets calcium and magnesium from whichever forms are given.
func fillHardness(r *dosing.Readings) {
	if !r.Calcium.Given {
		r.Calcium = r.CalciumHardness
	}
	if r.Hardness.Given {
		switch {
		case r.Calcium.Given && !r.Magnesium.Given:
			r.Magnesium = dosing.Some(max(r.Hardness.Value-r.Calcium.Value, 0))
		case r.Magnesium.Given && !r.Calcium.Given:
			r.Calcium = dosing.Some(max(r.Hardness.Value-r.Magnesium.Value, 0))
		case !r.Calcium.Given:
			// Of unknown kind: as calcium, which conducts almost as magnesium does.
			r.Calcium, r.Magnesium = r.Hardness, dosing.Some(0)
		}
	}
}

// straight fields are compared by difference, the others by ratio.
var straight = map[string]bool{"ph": true, "temperature": true, "ph-temperature": true}

// pastSpread is the standard deviation against the last accepted value alone,
// and leastSpread the least that a band of the plant's own is taken for: pH, K,
// or shares.
func pastSpread(field string) float64 {
	switch field {
	case "ph":
		return 0.3
	case "temperature", "ph-temperature":
		return 2.5
	case "flow":
		return 0.4
	}
	return 0.15
}

func leastSpread(field string) float64 {
	switch field {
	case "ph":
		return 0.1
	case "temperature", "ph-temperature":
		return 1
	case "flow":
		return 0.1
	}
	return 0.04
}

// pastTerm holds a reading against the plant's own band, or against the last
// accepted case where there is no band.
func pastTerm(f reading.Field, v float64, x *Context) (term, bool) {
	if u, ok := x.Usual[f.Name]; ok && u.High > u.Low {
		z := 0.0
		if straight[f.Name] {
			z = (v - u.Median) / max((u.High-u.Low)/3.92, leastSpread(f.Name))
		} else if u.Low > 0 && v > 0 {
			z = math.Log(v/u.Median) / max(math.Log(u.High/u.Low)/3.92, leastSpread(f.Name))
		}
		return pastOf(f, z, func() string { return "here it is usually " + f.Show(u.Low) + " to " + f.Show(u.High) + unit(f) }), true
	}
	if x.Last == nil {
		return term{}, false
	}
	last := value(&x.Last.Readings, f.Name)
	if !last.Given {
		return term{}, false
	}
	z := 0.0
	if straight[f.Name] {
		z = (v - last.Value) / pastSpread(f.Name)
	} else if last.Value > 0 && v > 0 {
		z = math.Log(v/last.Value) / pastSpread(f.Name)
	}
	return pastOf(f, z, func() string { return "last time it was " + f.Show(last.Value) + unit(f) }), true
}

// pastOf makes a term, and its words only where they may be needed.
func pastOf(f reading.Field, z float64, say func() string) term {
	t := term{fields: []string{f.Name}, z: z}
	if math.Abs(z) > remarkable {
		t.text = say()
	}
	return t
}

// bandZ is how a temperature counts that lies outside of what is usual anywhere.
const bandZ = 4

// bandTerm holds a temperature against what is usual anywhere. Other readings
// that are merely rare are no evidence of a slip.
func bandTerm(f reading.Field, v float64) (term, bool) {
	low, high := f.Usual()
	if v >= low && v <= high || f.Name != "temperature" && f.Name != "ph-temperature" {
		return term{}, false
	}
	return term{fields: []string{f.Name}, z: bandZ, text: f.Show(v) + unit(f) + " is rare anywhere"}, true
}

// capacityTerm holds the flow against what the plant can treat.
func capacityTerm(r *dosing.Readings, x *Context) (term, bool) {
	if !r.Flow.Given || !x.Capacity.Given || !(x.Capacity.Value > 0) {
		return term{}, false
	}
	share := r.Flow.Value / x.Capacity.Value
	f, _ := reading.Lookup("flow")
	switch {
	case share > 1.05:
		return term{fields: []string{"flow"}, z: math.Log(share) / 0.05, text: "the plant can treat " + f.Show(x.Capacity.Value) + unit(f)}, true
	case share < 0.05:
		return term{fields: []string{"flow"}, z: 3, text: "that is under a twentieth of what the plant can treat"}, true
	}
	return term{}, false
}
