package bench

import (
	"errors"
	"math"
	"slices"
	"strconv"
	"strings"

	"beckline/carbonate"
	"beckline/dosing"
)

// Reading is one point with what the fitted model says of it.
type Reading struct {
	Point
	Predicted       float64 // what the meter would have shown
	Residual        float64 // read less predicted, pH
	Deviation       float64 // standard deviation that the tolerances give it, pH
	SaturationIndex dosing.Optional
}

// Report is the outcome of a fit.
type Report struct {
	Estimates   []Estimate  // in the order asked for
	Correlation [][]float64 // of the estimates, -1 to 1
	Readings    []Reading   // in the order read
	ChiSquare   float64     // sum of (residual/deviation)^2
	Freedom     int         // readings less unknowns
	Chance      float64     // of so large a chi-square if the model is right and the tolerances are
	Agrees      bool        // the jar and the model differ by no more than the readings allow
	Order       []Slip      // readings that cannot all be right
	Reasons     []Reason    // why the jar and the model part, likeliest first; only where they do not agree

	model   model
	figures figures
}

// Fit finds the unknowns from a titration. Unknowns not asked for stay as the
// sample's readings and the label say. Without unknowns it only compares.
//
// AcidAmount and AcidPK may be asked for apart: the other then is 0 or 7 unless
// FitWith gives it. Errors (*dosing.Problem): fewer readings than unknowns and
// one more, a reading out of range, unknowns that this jar cannot tell apart.
func Fit(t Titration, find ...Unknown) (*Report, error) {
	return FitWith(t, Acid{PK: 7}, find...)
}

// FitWith is Fit with a weak acid known to be in the sample, or to start from.
func FitWith(t Titration, acid Acid, find ...Unknown) (*Report, error) {
	if err := t.check(); err != nil {
		return nil, err
	}
	if err := choice(find); err != nil {
		return nil, err
	}
	if need := len(find) + 1; len(t.Points) < need {
		return nil, &dosing.Problem{Kind: dosing.BadInput, Code: "too_few_points", Field: "points",
			Given: strconv.Itoa(len(t.Points)), Accepted: "at least " + strconv.Itoa(need) + " readings for " + strconv.Itoa(len(find)) + " unknowns"}
	}
	k, err := carbonate.ConstantsAt(t.Water.Kelvin)
	if err != nil {
		return nil, outside("temperature", t.Water.Kelvin, carbonate.MinKelvin, carbonate.MaxKelvin, "0 to 50 °C")
	}
	m := newModel(&t, k, acid.Charge)
	start := asRead(&t.Water)
	start[AcidAmount], start[AcidPK] = acid.Amount, acid.PK
	s, err := m.search(start, find)
	if err != nil {
		return nil, refusal(err)
	}
	r := &Report{model: m, figures: s.figures, ChiSquare: s.chiSquare, Freedom: len(t.Points) - len(find)}
	r.Chance = chance(r.ChiSquare, r.Freedom)
	r.Agrees = r.Chance >= disbelief
	if len(find) > 0 {
		cov, _, weak, ok := s.covariance()
		if !ok {
			return nil, cannotTell(weak)
		}
		r.Estimates = s.estimates(&start, cov, r.Freedom, r.Agrees)
		r.Correlation = correlation(cov)
	}
	if err := r.readings(s); err != nil {
		return nil, refusal(err)
	}
	r.Order = m.order(s)
	if !r.Agrees {
		r.Reasons = m.reasons(s, start)
	}
	return r, nil
}

// choice refuses an unknown named twice.
func choice(find []Unknown) error {
	for i, u := range find {
		if u < 0 || u >= unknowns || slices.Contains(find[:i], u) {
			return &dosing.Problem{Kind: dosing.BadInput, Code: "unknown_twice", Field: "find", Given: u.Name(), Accepted: "each unknown once"}
		}
	}
	return nil
}

// startingPKs and the amounts beside them are where the search for an unknown
// acid starts: the sum of squares has a hollow of its own for each region of the
// curve.
var startingPKs = [...]float64{3.5, 5, 6.5, 8, 9.5}

// search fits from every sensible start and keeps the best.
func (m *model) search(start figures, find []Unknown) (*solution, error) {
	if !slices.Contains(find, AcidPK) {
		if slices.Contains(find, AcidAmount) && start[AcidAmount] == 0 {
			start[AcidAmount] = 0.1 * AcidAmount.scale(&start)
		}
		return m.fit(start, find, fitSteps)
	}
	var best *solution
	var failure error
	for _, pk := range append([]float64{start[AcidPK]}, startingPKs[:]...) {
		from := start
		from[AcidPK] = pk
		if from[AcidAmount] == 0 {
			from[AcidAmount] = 0.1 * AcidAmount.scale(&start)
		}
		s, err := m.fit(from, find, scoutSteps)
		if err != nil {
			failure = err
			continue
		}
		if best == nil || s.chiSquare < best.chiSquare {
			best = s
		}
	}
	if best == nil {
		return nil, failure
	}
	return m.fit(best.figures, find, fitSteps)
}

func (r *Report) readings(s *solution) error {
	for i, p := range r.model.t.Points {
		state, err := r.model.state(&s.figures, p.Dose, r.model.progress(i))
		if err != nil {
			return err
		}
		reading := Reading{Point: p, Predicted: s.predicted[i], Residual: p.PH - s.predicted[i], Deviation: s.sigma[i]}
		if calcite, _, ok := state.SaturationIndex(); ok {
			reading.SaturationIndex = dosing.Some(calcite)
		}
		r.Readings = append(r.Readings, reading)
	}
	return nil
}

// Estimate returns the outcome for one unknown; ok is false where it was not
// asked for.
func (r *Report) Estimate(u Unknown) (e Estimate, ok bool) {
	for _, e := range r.Estimates {
		if e.Unknown == u {
			return e, true
		}
	}
	return Estimate{}, false
}

// PH is the true pH of the sample as fitted after a dose by the label, mol/L,
// before anything was lost or had come out with time.
func (r *Report) PH(dose float64) (float64, error) {
	if !(dose >= 0) || math.IsInf(dose, 0) {
		return 0, outside("dose", dose, 0, math.Inf(1), "0 or more")
	}
	s, err := r.model.state(&r.figures, dose, 0)
	if err != nil {
		return 0, refusal(err)
	}
	return s.PH, nil
}

const halvings = 200

// DoseTo is the least dose by the label, mol/L, at which the sample as fitted
// has a pH. It looks up to ten times the largest dose of the jar and no
// further: code out_of_reach.
func (r *Report) DoseTo(pH float64) (float64, error) {
	if !(pH >= 0 && pH <= 14) {
		return 0, outside("target-ph", pH, 0, 14, "pH 0 to 14")
	}
	now, err := r.PH(0)
	if err != nil {
		return 0, err
	}
	side := pH - now
	most := 0.0
	for _, p := range r.model.t.Points {
		most = max(most, 10*p.Dose)
	}
	const pieces = 400
	lo, nearest := 0.0, now
	for i := 1; i <= pieces; i++ {
		hi := most * float64(i) / pieces
		v, err := r.PH(hi)
		if err != nil {
			break
		}
		if (pH-v)*side <= 0 {
			return r.close(lo, hi, pH, side), nil
		}
		if math.Abs(pH-v) < math.Abs(pH-nearest) {
			nearest = v
		}
		lo = hi
	}
	return 0, &dosing.Problem{Kind: dosing.NoAnswer, Code: "out_of_reach", Field: "target-ph",
		Target: dosing.Target{Kind: dosing.TargetPH, Value: pH}, Nearest: dosing.Some(nearest)}
}

func (r *Report) close(lo, hi, pH, side float64) float64 {
	for range halvings {
		mid := 0.5 * (lo + hi)
		if mid <= lo || mid >= hi {
			break
		}
		if v, err := r.PH(mid); err == nil && (pH-v)*side > 0 {
			lo = mid
		} else {
			hi = mid
		}
	}
	return hi
}

// Water is the sample as fitted, the unknown acid apart.
func (r *Report) Water() (carbonate.Water, Acid) {
	w := r.model.t.Water
	w.Alkalinity = r.figures[Alkalinity]
	w.Totals[carbonate.Carbon] = r.figures[Carbon]
	return w, Acid{Amount: r.figures[AcidAmount], PK: r.figures[AcidPK], Charge: r.model.charge}
}

func cannotTell(weak []Unknown) error {
	var names []string
	for _, u := range weak {
		names = append(names, u.Name())
	}
	return &dosing.Problem{Kind: dosing.NoAnswer, Code: "cannot_tell_apart", Field: "find", Given: strings.Join(names, " and "),
		Accepted: "one of them held at its own reading, or readings over more of the curve"}
}

func refusal(err error) error {
	var out *carbonate.RangeError
	if errors.As(err, &out) {
		return &dosing.Problem{Kind: dosing.NoAnswer, Code: "outside_model", Field: "points", Given: out.Quantity,
			Value: dosing.Some(out.Value), Low: dosing.Some(out.Low), High: dosing.Some(out.High)}
	}
	if errors.Is(err, carbonate.ErrChlorineWithAmmonia) {
		return &dosing.Problem{Kind: dosing.BadInput, Code: "chlorine_with_ammonia", Field: "free-chlorine"}
	}
	return &dosing.Problem{Kind: dosing.Failed, Code: "solver_failed", Given: err.Error()}
}
