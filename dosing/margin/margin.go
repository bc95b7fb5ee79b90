package margin

import (
	"math"

	"beckline/dosing"
)

// Method is the way by which a range was found.
type Method string

// The methods.
const (
	FirstOrder Method = "first-order"
	Draws      Method = "draws"
)

// Reason says why first order is not good enough; "" where it is.
type Reason string

// The reasons.
const (
	NoReason     Reason = ""
	PHTolerance  Reason = "ph_tolerance" // a pH good to 0.1 or worse: the carbon goes with its antilogarithm
	LowBuffer    Reason = "low_buffer"   // the finished pH answers the dose in a curve
	Skewed       Reason = "skewed"       // the dose answers a reading in a curve
	NearLimit    Reason = "near_limit"   // inside the tolerance there are waters that need no dose, or that no dose brings there
	DefaultDraws        = 10000
	WalkedDraws         = 2000 // default where the train must be walked: aeration, a contactor, chlorine demand
	leastDraws          = 1000
	mostDraws           = 1000000
)

// Options choose the way. The zero value takes first order where it is good
// enough and 10,000 draws elsewhere.
type Options struct {
	Method Method // "" chooses; FirstOrder never draws (and says where it should have); Draws always does
	Draws  int    // how many; 0 for DefaultDraws or WalkedDraws, else 1,000 to 1,000,000
}

// Range is a 95 % range. High is +Inf where over one in forty of the true
// waters within the tolerances cannot be brought to the target at all.
type Range struct{ Low, High float64 }

// Share is a reading's part of a variance, 0 to 1.
type Share struct {
	Reading  string // command-line name, after the source's name in a blend or the product's of two: "well ph"
	Fraction float64
}

// Feed is what is said of one product that was solved for. Ranges of product,
// mass and volume are of the product as delivered.
type Feed struct {
	Dose          Range   // mol/L of the chemical's formula
	DoseDeviation float64 // mol/L, standard deviation
	Product       Range   // kg/m3 of product per volume of water
	Mass          Range   // kg/s of product; with HasFlow
	Volume        Range   // m3/s of product; with HasVolume
	HasFlow       bool
	HasVolume     bool

	// Parts of the variance by reading, in the order of the readings, each list
	// summing to 1: of the dose, and of the feed (mass rate, or product per volume
	// without a flow). A list is empty where nothing moves.
	DoseShares, FeedShares []Share
}

// Estimate is one way's answer. The embedded feed is that of the product solved
// for (the first of two).
type Estimate struct {
	Feed
	Second     *Feed   // of the second product, where two were solved for
	FinishedPH Range   // the feeds set as computed, the readings wrong
	PHShares   []Share // parts of its variance, as those of a feed
}

func (e *Estimate) set(n int, f Feed) {
	if n == 0 {
		e.Feed = f
		return
	}
	e.Second = &f
}

func (e *Estimate) feed(n int) *Feed {
	if n == 0 {
		return &e.Feed
	}
	return e.Second
}

// Margin says how far off the answer may be. The embedded estimate is the one
// to show, by Method.
type Margin struct {
	Estimate
	Method Method
	Reason Reason // why first order is not good enough; set also where it was asked for
	Solved bool   // a dose was solved for; without it only FinishedPH and PHShares are given

	// Shares are the parts of the variance that matter most to the answer: of the
	// dose; of the feed where only flow or strength vary; of the pH where no dose
	// was solved for. They sum to 1.
	Shares []Share
	// Repeat is the reading with the largest share among those that can be read
	// again ("" where there is none): the one to repeat first.
	Repeat string

	FirstOrder Estimate // always made
	Drawn      int      // draws made; 0 for first order
	Refused    int      // of them, waters that contradict themselves (alkalinity below what the pH implies)
	NoDose     int      // of them, waters at or past the target already: counted as dose 0
	Unreached  int      // of them, waters that no dose brings to the target: counted as +Inf
}

// Of carries tolerances through a result. The flow and the strength move the
// feed; they move the finished pH too, since a feed set for a flow or a strength
// that is not so doses the water wrongly. The error is a *dosing.Problem: a
// tolerance was set for a reading that was not measured, or none is left to vary.
func Of(r *dosing.Result, tol Tolerances, opts Options) (Margin, error) {
	if n := opts.Draws; n != 0 && (n < leastDraws || n > mostDraws) {
		return Margin{}, &dosing.Problem{Kind: dosing.BadInput, Code: "bad_draws", Field: "draws",
			Given: number(float64(opts.Draws)), Accepted: "1000 to 1000000"}
	}
	m, err := newModel(r, tol)
	if err != nil {
		return Margin{}, err
	}
	first := m.firstOrder()
	out := Margin{
		Estimate: first.Estimate, Method: FirstOrder, FirstOrder: first.Estimate, Reason: first.reason,
		Solved: len(m.feeds) > 0,
	}
	if opts.Method == Draws || opts.Method == "" && first.reason != NoReason {
		out.Method = Draws
		n := opts.Draws
		if n == 0 {
			n = DefaultDraws
			if !m.plainEnd || !m.plainTo {
				n = WalkedDraws
			}
		}
		m.draw(n, &out)
	}
	out.Shares = out.DoseShares
	if len(out.Shares) == 0 {
		out.Shares = out.FeedShares
	}
	if len(out.Shares) == 0 {
		out.Shares = out.PHShares
	}
	out.Repeat = m.repeat(out.Shares)
	return out, nil
}

func (m *model) repeat(shares []Share) string {
	name, most := "", 0.0
	for i, s := range shares {
		if m.varied[i].rereadable() && s.Fraction > most {
			name, most = s.Reading, s.Fraction
		}
	}
	return name
}

// Reached tells whether the range has an upper end.
func (r Range) Reached() bool { return !math.IsInf(r.High, 1) }
