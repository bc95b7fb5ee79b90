package mix

import "beckline/dosing"

// Task is a question: the water as it stands, what may be dosed into it and at
// what price, and what the finished water must keep to.
type Task struct {
	// Base is the water before the mix: readings, sources and fixed additions,
	// with no target and nothing to solve for. Its flow, m3/s, is needed for the
	// cost per year and for pumps.
	Base dosing.Case

	Candidates []Candidate // at most MostCandidates
	Limits     []Limit     // at most one a quantity

	Alternatives int  // how many next best mixes to look for, at most MostAlternatives
	Explain      bool // also find what each limit that binds costs
}

// MostCandidates and MostAlternatives bound the size of a task.
const (
	MostCandidates   = 6
	MostAlternatives = 10
)

// Candidate is a product that may be dosed.
type Candidate struct {
	Product dosing.Product
	Price   float64          // per kg of product as delivered, 0 or more, in any one currency
	Feed    dosing.FeedSetup // tank temperature, pump at 100 %, certified maximum use level

	Turndown float64         // least share of the pump's output at which it feeds, 0 to 1; 0 for any
	Least    dosing.Optional // kg of product per m3 of water below which it is not fed, other than not at all
	Most     dosing.Optional // kg of product per m3 of water, a ceiling besides pump and use level
}

// Limit is a range for a figure of the finished water, bounds included. Either
// bound may be absent; equal bounds ask for one value.
type Limit struct {
	Quantity Quantity
	Low      dosing.Optional // in the unit of the quantity
	High     dosing.Optional
}

// Side is one end of a range.
type Side int

// The two ends.
const (
	Low Side = iota + 1
	High
)

// Bound names one end of one range: of a limit, or of a product's dose.
type Bound struct {
	Quantity  Quantity // 0 where it is a bound of a dose
	Candidate int      // index into Task.Candidates where it is
	Source    Source   // where a bound of a dose comes from
	Side      Side
	Value     float64 // in the unit of the quantity; kg of product per m3 of water for a dose
}

// Source says where a bound of a dose comes from.
type Source int

// The sources.
const (
	FromLimit    Source = iota // not a dose: a limit of the task
	FromCeiling                // Candidate.Most
	FromLeast                  // Candidate.Least
	FromUseLevel               // Feed.MaximumUse
	FromPump                   // the pump's output at 100 %
	FromTurndown               // the pump's least output
	FromHardStop               // the program's own hard stop
)

// Key is the source's name for machines, snake_case.
func (s Source) Key() string {
	return [...]string{"limit", "ceiling", "least_dose", "maximum_use_level", "pump", "pump_turndown", "hard_stop"}[s]
}
