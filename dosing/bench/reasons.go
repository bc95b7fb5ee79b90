package bench

import (
	"cmp"
	"math"
	"slices"

	"beckline/carbonate"
)

// ReasonCode names why a jar and the model part.
type ReasonCode string

// The reasons that are tried.
const (
	LostCO2       ReasonCode = "carbon_dioxide_lost"   // an open beaker: the pH drifts up
	TookUpCO2     ReasonCode = "carbon_dioxide_gained" // a high pH in an open beaker: the pH drifts down
	Precipitation ReasonCode = "precipitation"         // calcium carbonate comes out and the pH stays below the model's
	Organics      ReasonCode = "organic_acids"         // a weak acid that the readings do not name
	WrongStrength ReasonCode = "strength"              // every dose is off by one factor
	WrongMeter    ReasonCode = "meter_offset"          // every pH is off by the same amount
	WrongSample   ReasonCode = "sample_readings"       // the sample's own alkalinity or carbon is not as read
)

// Reason is one explanation, fitted with the unknowns that were asked for.
type Reason struct {
	Code      ReasonCode
	Estimates []Estimate // of what the reason adds
	ChiSquare float64
	Freedom   int
	Chance    float64 // as Report.Chance, with the reason in the model
	Explains  bool    // the jar then agrees with the model
}

// meaningless is the least improvement of the chi-square a reason must bring:
// twice what a figure without meaning brings on average, after Akaike 1974.
const meaningless = 4

// weight is the chi-square with two for each figure that the reason adds
// (Akaike's criterion); the least is the likeliest.
func (r *Reason) weight() float64 { return r.ChiSquare + 2*float64(len(r.Estimates)) }

// reasons tries what commonly parts a jar from the model, each by itself.
func (m *model) reasons(s *solution, start figures) []Reason {
	var out []Reason
	try := func(code func(f *figures) ReasonCode, add ...Unknown) {
		for _, u := range add {
			if slices.Contains(s.find, u) {
				return
			}
		}
		if r, ok := m.reason(s, start, code, add); ok {
			out = append(out, r)
		}
	}
	always := func(code ReasonCode) func(*figures) ReasonCode { return func(*figures) ReasonCode { return code } }
	try(func(f *figures) ReasonCode {
		if f[CarbonLost] < 0 {
			return TookUpCO2
		}
		return LostCO2
	}, CarbonLost)
	if m.oversaturated(s) {
		try(always(Precipitation), Precipitated)
	}
	try(always(WrongStrength), Strength)
	try(always(WrongMeter), MeterOffset)
	try(always(Organics), AcidAmount, AcidPK)
	try(always(WrongSample), Alkalinity)
	try(always(WrongSample), Carbon)
	slices.SortStableFunc(out, func(a, b Reason) int {
		if a.Explains != b.Explains {
			if a.Explains {
				return -1
			}
			return 1
		}
		return cmp.Compare(a.weight(), b.weight())
	})
	return out
}

func (m *model) reason(s *solution, start figures, code func(*figures) ReasonCode, add []Unknown) (Reason, bool) {
	find := append(slices.Clone(s.find), add...)
	freedom := len(m.t.Points) - len(find)
	if freedom < 1 {
		return Reason{}, false
	}
	again, err := m.search(s.figures, find)
	if err != nil || s.chiSquare-again.chiSquare < meaningless*float64(len(add)) {
		return Reason{}, false
	}
	cov, _, _, ok := again.covariance()
	if !ok || !m.possible(again) {
		return Reason{}, false
	}
	r := Reason{Code: code(&again.figures), ChiSquare: again.chiSquare, Freedom: freedom}
	r.Chance = chance(r.ChiSquare, freedom)
	r.Explains = r.Chance >= disbelief
	r.Estimates = again.estimates(&start, cov, freedom, r.Explains)[len(s.find):]
	return r, true
}

// mostOffset is the largest meter offset, pH, that is offered as a reason: more
// than that shows in the buffers at once (common practice, no source).
const mostOffset = 0.6

// possible refuses what cannot be: more CO2 lost than there was carbon, CO2 lost
// by a water that has less than the air would leave it, and the other way round;
// a meter further off than anyone would overlook.
func (m *model) possible(s *solution) bool {
	if math.Abs(s.figures[MeterOffset]) > mostOffset {
		return false
	}
	lost := s.figures[CarbonLost]
	if lost == 0 {
		return true
	}
	air := m.k.Henry * carbonate.AirCO2
	for i, p := range m.t.Points {
		state, err := m.state(&s.figures, p.Dose, m.progress(i))
		if err != nil {
			return false
		}
		if (state.FreeCO2()-air)*lost > 0 {
			return math.Abs(lost) < s.figures[Carbon] || lost < 0
		}
	}
	return false
}

// oversaturated tells whether calcium carbonate could come out anywhere.
func (m *model) oversaturated(s *solution) bool {
	for i, p := range m.t.Points {
		state, err := m.state(&s.figures, p.Dose, m.progress(i))
		if err != nil {
			continue
		}
		if index, _, ok := state.SaturationIndex(); ok && index > 0 {
			return true
		}
	}
	return false
}
