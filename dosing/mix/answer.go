package mix

import (
	"fmt"

	"beckline/dosing"
)

// Answer is the mix of least cost and what surrounds it.
type Answer struct {
	Task Task
	Best Mix

	// NothingNeeded says that the water keeps to every limit as it stands; Best
	// then has no doses and costs nothing.
	NothingNeeded bool

	Costs        []LimitCost // with Task.Explain: of every bound that binds, dearest first
	Alternatives []Mix       // next best mixes, each of another set of products, cheapest first
}

// Mix is one set of doses and the water that it makes.
type Mix struct {
	Doses   []Dose // products in use only, in the order of the candidates
	CostM3  float64
	Binding []Bound // the bounds that this mix sits on

	// Result is the finished water solved afresh from the readings, with the feeds,
	// warnings and checks of every addition.
	Result *dosing.Result
}

// Dose is one product of a mix.
type Dose struct {
	Candidate   int     // index into Task.Candidates
	Amount      float64 // mol of the chemical's formula per litre of water
	ProductMass float64 // kg of product per m3 of water
	CostM3      float64 // per m3 of water
}

// CostML is the cost of treating a megalitre.
func (m *Mix) CostML() float64 { return m.CostM3 * 1000 }

// CostYear is the cost of a year of 365 days at the flow of the readings; absent
// without a flow.
func (m *Mix) CostYear() dosing.Optional {
	flow := m.Result.Case.Readings.Flow
	if !flow.Given {
		return dosing.None
	}
	return dosing.Some(m.CostM3 * flow.Value * 365 * 86400)
}

// LimitCost is what one bound costs.
type LimitCost struct {
	Bound    Bound
	SavingM3 float64 // saved per m3 of water if the bound were dropped; 0 or more
	Without  *Mix    // the cheapest mix without it

	// What moving the bound a practical step would save (pH 0.1, SI 0.1, 1 mg/L,
	// ratio 0.05, a tenth of a dose), per m3 of water.
	Step         float64 // signed, in the unit of the bound
	StepSavingM3 float64
}

// Infeasible is the answer where no mix of the candidates keeps to all limits.
type Infeasible struct {
	Task Task

	// Alone lists the bounds of which any one, moved as said, would make room,
	// smallest move first: together they are what conflicts.
	Alone []Relaxation
	// Together is given where no single bound does: what must be moved at once.
	Together []Relaxation
}

// Relaxation is a bound and how far it would have to move.
type Relaxation struct {
	Bound  Bound
	Needed float64 // the value of the bound at which a mix exists
}

// By is how far the bound has to move, signed, in its own unit.
func (r Relaxation) By() float64 { return r.Needed - r.Bound.Value }

// Error gives a short form for logs and tests.
func (e *Infeasible) Error() string {
	return fmt.Sprintf("mix: no mix keeps to all limits; %d bounds would each make room alone, %d together", len(e.Alone), len(e.Together))
}

// Unwrap gives the answer as a *dosing.Problem: no answer, with the bound that
// needs the smallest move.
func (e *Infeasible) Unwrap() error {
	p := &dosing.Problem{Kind: dosing.NoAnswer, Code: "no_mix"}
	list := e.Alone
	if len(list) == 0 {
		list = e.Together
	}
	if len(list) == 0 {
		return p
	}
	r := list[0]
	p.Field, p.Value, p.Nearest = "product", dosing.Some(r.Bound.Value), dosing.Some(r.Needed)
	if r.Bound.Source == FromLimit {
		p.Field = r.Bound.Quantity.Field()
	} else {
		p.Given = e.Task.Candidates[r.Bound.Candidate].Product.Name
	}
	return p
}
