package mix

import (
	"fmt"
	"math"

	"beckline/carbonate"
	"beckline/dosing"
)

// Goal is a value that a figure of the finished water must have, in the unit of
// its quantity.
type Goal struct {
	Quantity Quantity
	Value    float64
}

// GoalOf turns a target into a goal; ok is false for no target.
func GoalOf(t dosing.Target) (g Goal, ok bool) {
	g.Value = t.Value
	switch t.Kind {
	case dosing.TargetPH:
		g.Quantity = PH
	case dosing.TargetAlkalinity:
		g.Quantity = Alkalinity
	case dosing.TargetSaturationIndex:
		g.Quantity = SaturationIndex
	case dosing.TargetCCPP:
		g.Quantity = CCPP
	case dosing.TargetDIC:
		g.Quantity = DIC
	default:
		return g, false
	}
	return g, true
}

// Both is the pair of doses that meets two goals.
type Both struct {
	Doses   [2]float64      // mol of each product's formula per litre of water, 0 or more
	State   carbonate.State // the finished water, solved afresh
	Closure [2]float64      // of each goal: figure less value, in the unit of the quantity
}

// Apart is the answer where no pair of doses meets both goals.
type Apart struct {
	Products [2]dosing.Product
	Goals    [2]Goal
	// Nearest is, for each goal, the nearest that its figure comes with the other
	// goal met; absent where the other cannot be met at all.
	Nearest [2]dosing.Optional
	// Doses are the doses there, mol/L: the one that is 0 would have to be negative.
	Doses [2][2]float64
	// Binding is the product whose dose holds there: at 0, or at its hard stop.
	// -1 where neither does.
	Binding [2]int
}

// Error gives a short form for logs and tests.
func (e *Apart) Error() string {
	return fmt.Sprintf("mix: %s and %s do not meet both goals: nearest %v and %v",
		e.Products[0].Name, e.Products[1].Name, e.Nearest[0], e.Nearest[1])
}

// Unwrap gives the answer as a *dosing.Problem of no answer, about the second
// goal where the first can be met, with the product whose dose would have to be
// negative in Given.
func (e *Apart) Unwrap() error {
	p := &dosing.Problem{Kind: dosing.NoAnswer, Code: "pair_out_of_reach"}
	i := 1
	if !e.Nearest[1].Given {
		i = 0
	}
	p.Field = "target-" + e.Goals[i].Quantity.Field()
	p.Value, p.Nearest = dosing.Some(e.Goals[i].Value), e.Nearest[i]
	if b := e.Binding[i]; b >= 0 && e.Nearest[i].Given {
		p.Given, p.NearestAt = e.Products[b].Name, dosing.Some(e.Doses[i][b])
	}
	return p
}

// Pair finds the doses of two products that bring a water to two goals at once,
// such as a pH and an alkalinity. The finished water is solved afresh and must
// close within 1e-6 on both: pH, index and ratio as they are, amounts relative
// to the water's own alkalinity or carbon. A goal of alkalinity is the titrated
// one where the base holds organic acids.
//
// At a known pH both conditions are nearly linear in the doses, so the steps are
// Newton's; where saturation makes them bend, the search starts from several pH.
//
// The error is a *dosing.Problem for what cannot be read or is outside the
// model, or an *Apart (which unwraps to one).
func Pair(base carbonate.State, products [2]dosing.Product, goals [2]Goal) (*Both, error) {
	if p := checkPair(&base, products, goals); p != nil {
		return nil, p
	}
	t := &base.Water.Totals
	s := &setting{k: base.Constants(), base: base.Water, products: products[:],
		titrated: t[carbonate.Acetate] > 0 || t[carbonate.Formate] > 0 || t[carbonate.Citrate] > 0}
	limits := []Limit{goals[0].limit(), goals[1].limit()}
	s.size = scale(&base.Water, limits)
	for i := range products {
		s.hardStops = append(s.hardStops, hardStop(&products[i]))
		s.perMol = append(s.perMol, products[i].Chemical.MolarMass)
	}
	p := s.build(limits, s.hardStops)
	at, ok := p.minimum(vector{})
	if !ok || at.missed > met {
		return nil, s.apart(products, goals)
	}
	at = p.tidy(at)
	b := &Both{}
	for i := range b.Doses {
		b.Doses[i] = at.x[i] * p.unit[i]
	}
	w := base.Water.Add(reagent(&products[0]), b.Doses[0]).Add(reagent(&products[1]), b.Doses[1])
	var err error
	if b.State, err = s.k.Solve(w); err != nil {
		return nil, problem(err)
	}
	for i, g := range goals {
		v, ok := quantityOf(&b.State, g.Quantity, s.titrated)
		b.Closure[i] = v - g.Value
		if !ok || !(math.Abs(b.Closure[i]) <= closure*g.unit(s.size)) {
			return nil, &dosing.Problem{Kind: dosing.Failed, Code: "checks_disagree", Field: "target-" + g.Quantity.Field(), Value: dosing.Some(b.Closure[i])}
		}
	}
	return b, nil
}

func checkPair(base *carbonate.State, products [2]dosing.Product, goals [2]Goal) *dosing.Problem {
	if base.Constants() == nil {
		return &dosing.Problem{Kind: dosing.Failed, Code: "solver_failed", Given: "a water that was not solved"}
	}
	if products[0].Name == products[1].Name {
		return &dosing.Problem{Kind: dosing.BadInput, Code: "product_twice", Field: "product", Given: products[1].Name}
	}
	if goals[0].Quantity == goals[1].Quantity {
		return &dosing.Problem{Kind: dosing.BadInput, Code: "target_twice", Field: "target-" + goals[1].Quantity.Field()}
	}
	for _, g := range goals {
		if g.Quantity.Field() == "" {
			return &dosing.Problem{Kind: dosing.BadInput, Code: "missing", Field: "target-ph"}
		}
		if low, high := g.Quantity.span(); !(g.Value >= low && g.Value <= high) {
			return outside("target-"+g.Quantity.Field(), "", g.Value, low, high)
		}
	}
	chlorine, ammonia := base.Water.Totals[carbonate.Chlorine], base.Water.Totals[carbonate.Ammonia]
	for i := range products {
		chlorine += products[i].Chemical.Adds[carbonate.Chlorine]
		ammonia += products[i].Chemical.Adds[carbonate.Ammonia]
	}
	if chlorine > 0 && ammonia > 0 {
		return &dosing.Problem{Kind: dosing.BadInput, Code: "chlorine_with_ammonia", Field: "product", Given: products[1].Name}
	}
	return nil
}

// limit is the goal as a range of no width.
func (g Goal) limit() Limit {
	return Limit{g.Quantity, dosing.Some(g.Value), dosing.Some(g.Value)}
}

// unit is what counts as 1 of the goal's quantity in its closure.
func (g Goal) unit(size float64) float64 {
	switch g.Quantity {
	case PH, SaturationIndex:
		return 1
	case ChlorideSulfate:
		return 1 + math.Abs(g.Value)
	}
	return size
}

// apart finds how near each goal comes with the other met.
func (s *setting) apart(products [2]dosing.Product, goals [2]Goal) *Apart {
	e := &Apart{Products: products, Goals: goals, Binding: [2]int{-1, -1}}
	for i := range goals {
		p := s.build([]Limit{goals[1-i].limit(), goals[i].limit()}, s.hardStops)
		for r := range p.rows {
			if p.rows[r].limit == 1 {
				p.rows[r].give = 1
			}
		}
		for j := range p.n {
			p.cost[j] = thrift
		}
		at, ok := p.minimum(vector{})
		if !ok || at.missed > met {
			continue
		}
		state, err := s.k.Solve(p.at(&at.x))
		if err != nil {
			continue
		}
		if v, ok := quantityOf(&state, goals[i].Quantity, s.titrated); ok {
			e.Nearest[i] = dosing.Some(v)
		}
		for j := range products {
			e.Doses[i][j] = at.x[j] * p.unit[j]
			if at.x[j] <= tiny || at.x[j] >= p.high[j]-tiny {
				e.Binding[i] = j
			}
		}
	}
	return e
}

func reagent(p *dosing.Product) carbonate.Reagent {
	return carbonate.Reagent{Adds: p.Chemical.Adds, Equivalents: p.Chemical.Equivalents}
}
