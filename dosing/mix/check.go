package mix

import (
	"math"
	"strconv"

	"beckline/carbonate"
	"beckline/dosing"
)

// check refuses a task that cannot be read as a question. The code and field say
// what is wrong; Given names the product where it is about one.
func (t *Task) check() *dosing.Problem {
	bad := func(code, field, given string) *dosing.Problem {
		return &dosing.Problem{Kind: dosing.BadInput, Code: code, Field: field, Given: given}
	}
	for _, target := range []dosing.Target{t.Base.Target, t.Base.Second} {
		if target.Kind != dosing.NoTarget {
			return bad("target_beside_limits", target.Kind.Field(), "")
		}
	}
	for i := range t.Base.Additions {
		if t.Base.Additions[i].Solve {
			return bad("fixed_dose_needed", "add", t.Base.Additions[i].Product.Name)
		}
	}
	if n := len(t.Candidates); n == 0 {
		return bad("missing", "product", "")
	} else if n > MostCandidates {
		p := bad("too_many_products", "product", strconv.Itoa(n))
		p.Value, p.Low, p.High = dosing.Some(float64(n)), dosing.Some(1), dosing.Some(MostCandidates)
		return p
	}
	if len(t.Limits) == 0 {
		return bad("missing", "limit", "")
	}
	if t.Alternatives < 0 || t.Alternatives > MostAlternatives {
		return outside("alternatives", "", float64(t.Alternatives), 0, MostAlternatives)
	}
	for i := range t.Limits {
		if p := t.checkLimit(i); p != nil {
			return p
		}
	}
	for i := range t.Candidates {
		if p := t.checkCandidate(i); p != nil {
			return p
		}
	}
	return nil
}

func (t *Task) checkLimit(i int) *dosing.Problem {
	l := &t.Limits[i]
	field := l.Quantity.Field()
	if field == "" {
		return &dosing.Problem{Kind: dosing.BadInput, Code: "unknown_quantity", Field: "limit"}
	}
	for j := range i {
		if t.Limits[j].Quantity == l.Quantity {
			return &dosing.Problem{Kind: dosing.BadInput, Code: "limit_twice", Field: field}
		}
	}
	if !l.Low.Given && !l.High.Given {
		return &dosing.Problem{Kind: dosing.BadInput, Code: "missing", Field: field}
	}
	least, most := l.Quantity.span()
	for _, end := range []dosing.Optional{l.Low, l.High} {
		if end.Given && !(end.Value >= least && end.Value <= most) {
			return outside(field, "", end.Value, least, most)
		}
	}
	if l.Low.Given && l.High.Given && l.Low.Value > l.High.Value {
		return &dosing.Problem{Kind: dosing.BadInput, Code: "limit_crossed", Field: field,
			Value: l.Low, High: l.High}
	}
	return nil
}

// span is what a limit of the quantity may be, in its unit. Beyond these no
// water of this model lies.
func (q Quantity) span() (low, high float64) {
	switch q {
	case PH:
		return 0, 14
	case SaturationIndex:
		return -10, 6
	case CCPP:
		return -1, 1
	case ChlorideSulfate:
		return 0, 1e4
	}
	return 0, 1
}

func (t *Task) checkCandidate(i int) *dosing.Problem {
	c := &t.Candidates[i]
	name := c.Product.Name
	for j := range i {
		if t.Candidates[j].Product.Name == name {
			return &dosing.Problem{Kind: dosing.BadInput, Code: "product_twice", Field: "product", Given: name}
		}
	}
	if !(c.Product.Strength > 0 && c.Product.Strength <= 1) || !(c.Product.Chemical.MolarMass > 0) {
		return outside("strength", name, c.Product.Strength, 0, 1)
	}
	if !(c.Price >= 0) || math.IsInf(c.Price, 0) {
		return outside("price", name, c.Price, 0, math.Inf(1))
	}
	if !(c.Turndown >= 0 && c.Turndown < 1) {
		return outside("turndown", name, c.Turndown, 0, 1)
	}
	for _, v := range []struct {
		field string
		value dosing.Optional
	}{{"least", c.Least}, {"most", c.Most}, {"maximum-use", c.Feed.MaximumUse}, {"pump", c.Feed.PumpCapacity}} {
		if v.value.Given && (!(v.value.Value >= 0) || math.IsInf(v.value.Value, 0)) {
			return outside(v.field, name, v.value.Value, 0, math.Inf(1))
		}
	}
	return nil
}

// known refuses limits on figures that the readings do not give: a total that
// was not measured is not zero.
func (t *Task) known(f *dosing.Figures) *dosing.Problem {
	missing := func(field string) *dosing.Problem {
		return &dosing.Problem{Kind: dosing.BadInput, Code: "missing", Field: field}
	}
	for i := range t.Limits {
		switch q := t.Limits[i].Quantity; q {
		case SaturationIndex, CCPP, Calcium:
			if !f.Calcium.Given {
				return &dosing.Problem{Kind: dosing.BadInput, Code: "calcium_needed", Field: "calcium"}
			}
		case Sodium:
			if !f.Sodium.Given {
				return missing("sodium")
			}
		case Magnesium:
			if !f.Magnesium.Given {
				return missing("magnesium")
			}
		case Chloride, ChlorideSulfate:
			if !f.Chloride.Given {
				return missing("chloride")
			}
			if q == ChlorideSulfate && !f.Sulfate.Given {
				return missing("sulfate")
			}
		case Sulfate:
			if !f.Sulfate.Given {
				return missing("sulfate")
			}
		}
	}
	chlorine := f.Water.Totals[carbonate.Chlorine] > 0
	ammonia := f.Water.Totals[carbonate.Ammonia] > 0
	for i := range t.Candidates {
		a := &t.Candidates[i].Product.Chemical.Adds
		chlorine = chlorine || a[carbonate.Chlorine] > 0
		ammonia = ammonia || a[carbonate.Ammonia] > 0
		if chlorine && ammonia {
			return &dosing.Problem{Kind: dosing.BadInput, Code: "chlorine_with_ammonia", Field: "product",
				Given: t.Candidates[i].Product.Name}
		}
	}
	return nil
}

func outside(field, given string, v, low, high float64) *dosing.Problem {
	p := &dosing.Problem{Kind: dosing.BadInput, Code: "outside_range", Field: field, Given: given,
		Value: dosing.Some(v), Low: dosing.Some(low)}
	if !math.IsInf(high, 0) {
		p.High = dosing.Some(high)
	}
	return p
}
