package report

import (
	"fmt"
	"math"
	"slices"
	"strings"

	"beckline/dosing"
	"beckline/dosing/mix"
	"beckline/dosing/reading"
)

// MixLimitField is the reading in whose units a figure of a mix is stated; ok is
// false for a ratio, which has none.
func MixLimitField(q mix.Quantity) (reading.Field, bool) {
	name := q.Field()
	switch q {
	case mix.SaturationIndex, mix.CCPP:
		name = "target-" + name
	case mix.ChlorideSulfate:
		return reading.Field{}, false
	}
	return reading.Lookup(name)
}

var asMoney = rounding{decimals: 2, significant: 4, never0: true}

// mixValue is a value of a figure with its unit.
func mixValue(q mix.Quantity, v float64) string {
	if f, ok := MixLimitField(q); ok {
		return fieldText(f, v)
	}
	return Significant(v, 3)
}

// boundText names one end of a range with a value in place of its own.
func boundText(t *mix.Task, b mix.Bound, value float64) string {
	end := " at most "
	if b.Side == mix.Low {
		end = " at least "
	}
	if b.Source == mix.FromLimit {
		return b.Quantity.Field() + end + mixValue(b.Quantity, value)
	}
	return t.Candidates[b.Candidate].Product.Name + end + asDose.write(value*milli) + " mg/L of product (" +
		strings.ReplaceAll(b.Source.Key(), "_", " ") + ")"
}

// inUnit is a value of a bound in the unit in which it is stated.
func inUnit(b mix.Bound, v float64) float64 {
	if b.Source != mix.FromLimit {
		return v * milli
	}
	if f, ok := MixLimitField(b.Quantity); ok {
		return f.ToBare(v)
	}
	return v
}

// MixProblem turns a task that has no mix into a refusal: which limits conflict
// and by how much each would have to move. Other errors are given back.
func MixProblem(e *mix.Infeasible) *dosing.Problem {
	p := &dosing.Problem{Kind: dosing.NoAnswer, Code: "no_mix", Field: "limit", Accepted: "other products, or wider limits"}
	list, how := e.Alone, "any one of these, moved alone, makes room: "
	if len(list) == 0 {
		list, how = e.Together, "these moved together make room: "
	}
	if len(list) == 0 {
		return p
	}
	p.Given = boundText(&e.Task, list[0].Bound, list[0].Bound.Value)
	var moves []string
	for _, r := range list {
		by := inUnit(r.Bound, r.Needed) - inUnit(r.Bound, r.Bound.Value)
		moves = append(moves, fmt.Sprintf("%s (by %s)", boundText(&e.Task, r.Bound, r.Needed), signedMove(by)))
	}
	p.Accepted = how + strings.Join(moves, ", ")
	return p
}

func signedMove(v float64) string {
	return rounding{decimals: 3, significant: 3, signed: true, never0: true}.write(v)
}

// Mix is the answer about the cheapest mix.
type Mix struct {
	a        *mix.Answer
	d        Document
	currency string
}

// NewMix makes the answer; currency is a word, "" where none is named.
func NewMix(a *mix.Answer, currency string) Mix {
	return Mix{a: a, d: New(a.Best.Result), currency: currency}
}

// Document is the water of the cheapest mix with every addition.
func (m Mix) Document() Document { return m.d }

// stations are the steps of a mix's own doses: the last ones of its water.
func mixStations(x *mix.Mix) []dosing.Station {
	return x.Result.Stations[len(x.Result.Stations)-len(x.Doses):]
}

// money writes an amount with its currency.
func (m Mix) money(v float64) string { return strings.TrimSpace(asMoney.write(v) + " " + m.currency) }

// Text is the answer for people, in plain ASCII at most 78 columns wide.
func (m Mix) Text() string {
	var b strings.Builder
	best := &m.a.Best
	if m.a.NothingNeeded {
		b.WriteString("The water keeps to every limit as it stands: nothing is needed\n\n")
	} else {
		first := "Least cost: " + m.money(best.CostML()) + " a ML (1000 m3)"
		if y := best.CostYear(); y.Given {
			first += fmt.Sprintf(", %s a year at %s", strings.TrimSpace(Fixed(y.Value, 0)+" "+m.currency), flowText(best.Result.Case.Readings.Flow))
		}
		b.WriteString(Wrap(first, textWidth) + "\n")
		for i, s := range mixStations(best) {
			figures := Dose(&s)
			line := fmt.Sprintf("  %s: %s, %s a ML", s.Addition.Product.Name, doseText(figures), m.money(best.Doses[i].CostM3*litresPerM3))
			if feed := mixFeed(&s, figures); feed != "" {
				line += "; feed " + feed
			}
			b.WriteString(Wrap(line, textWidth) + "\n")
		}
		b.WriteByte('\n')
	}
	m.writeBinding(&b)
	m.writeAlternatives(&b)
	m.d.writeWaters(&b)
	m.d.writeWarnings(&b)
	m.d.writeCautions(&b)
	m.d.writeChecks(&b)
	return ASCII(b.String())
}

func mixFeed(s *dosing.Station, figures []Figure) string {
	switch {
	case s.Feed.HasPump:
		return find(figures, "feed_l_h").ShowUnit() + ", pump at " + find(figures, "pump_percent").ShowUnit()
	case s.Feed.HasFlow && s.Feed.HasVolume:
		return find(figures, "feed_l_h").ShowUnit()
	case s.Feed.HasFlow:
		return perHour(figures)
	}
	return ""
}

// costWords says what a limit costs.
func (m Mix) costWords(c mix.LimitCost) string {
	text := boundText(&m.a.Task, c.Bound, c.Bound.Value)
	switch {
	case c.SavingM3 == 0:
		return text + ": costs nothing, another limit would hold as much"
	default:
		text += ": without it " + m.money(c.SavingM3*litresPerM3) + " a ML less"
	}
	if c.StepSavingM3 > 0 {
		by := inUnit(c.Bound, c.Step) // no unit of a limit has an offset
		text += fmt.Sprintf("; moved by %s it saves %s", signedMove(by), m.money(c.StepSavingM3*litresPerM3))
	}
	return text
}

// unpriced are the bounds that bind and whose cost was not looked for.
func (m Mix) unpriced() []mix.Bound {
	var out []mix.Bound
	for _, b := range m.a.Best.Binding {
		if !slices.ContainsFunc(m.a.Costs, func(c mix.LimitCost) bool { return c.Bound == b }) {
			out = append(out, b)
		}
	}
	return out
}

func (m Mix) writeBinding(b *strings.Builder) {
	if len(m.a.Best.Binding) == 0 {
		return
	}
	b.WriteString("What binds\n")
	for _, c := range m.a.Costs {
		b.WriteString(Wrap("  - "+m.costWords(c), textWidth) + "\n")
	}
	for _, bound := range m.unpriced() {
		b.WriteString(Wrap("  - "+boundText(&m.a.Task, bound, bound.Value), textWidth) + "\n")
	}
	b.WriteByte('\n')
}

func (m Mix) writeAlternatives(b *strings.Builder) {
	if len(m.a.Alternatives) == 0 {
		return
	}
	b.WriteString("Next best\n")
	for i := range m.a.Alternatives {
		x := &m.a.Alternatives[i]
		var doses []string
		for _, s := range mixStations(x) {
			doses = append(doses, s.Addition.Product.Name+" "+find(Dose(&s), "product_mg_l").ShowUnit())
		}
		b.WriteString(Wrap(fmt.Sprintf("  %d. %s a ML: %s of product", i+1, m.money(x.CostML()), strings.Join(doses, ", ")), textWidth) + "\n")
	}
	b.WriteByte('\n')
}

// JSON is the answer for programs. Costs are in the currency of the prices; a
// bound's value and step are in the unit of its key, doses in mg/L of product.
func (m Mix) JSON() ([]byte, error) {
	var o object
	best := &m.a.Best
	year := best.CostYear()
	o.add("cost_per_ml", Some(best.CostML()))
	o.add("cost_per_year", Number{Value: year.Value, Given: year.Given})
	o.addText("currency", m.currency)
	o.add("nothing_needed", m.a.NothingNeeded)
	o.add("doses", m.mixDoses(best, true))
	binding := []object{}
	for _, c := range m.a.Costs {
		binding = append(binding, m.boundJSON(c.Bound, &c))
	}
	for _, b := range m.unpriced() {
		binding = append(binding, m.boundJSON(b, nil))
	}
	o.add("binding", binding)
	alternatives := make([]object, len(m.a.Alternatives))
	for i := range m.a.Alternatives {
		x := &m.a.Alternatives[i]
		alternatives[i].add("cost_per_ml", Some(x.CostML()))
		alternatives[i].add("doses", m.mixDoses(x, false))
		alternatives[i].add("finished", fields(Water(&x.Result.Finished().Figures)))
	}
	o.add("alternatives", alternatives)
	o.add("raw", fields(m.d.Raw))
	o.add("finished", fields(m.d.Finished))
	o.add("stations", m.d.stationsJSON())
	o.add("warnings", m.d.warningsJSON())
	o.add("checks", m.d.checksJSON())
	return indented(o)
}

func (m Mix) mixDoses(x *mix.Mix, whole bool) []object {
	out := make([]object, len(x.Doses))
	for i, s := range mixStations(x) {
		for _, f := range Dose(&s) {
			if whole || slices.Contains([]string{"product", "chemical", "basis", "dose_mg_l", "product_mg_l"}, f.Key) {
				out[i].addFigure(f)
			}
		}
		out[i].add("price_per_kg", Some(m.a.Task.Candidates[x.Doses[i].Candidate].Price))
		out[i].add("cost_per_ml", Some(x.Doses[i].CostM3*litresPerM3))
	}
	return out
}

func (m Mix) boundJSON(b mix.Bound, c *mix.LimitCost) object {
	var o object
	key, product := "", ""
	if b.Source == mix.FromLimit {
		key = strings.ReplaceAll(b.Quantity.Field(), "-", "_") + "_mass_ratio"
		if f, ok := MixLimitField(b.Quantity); ok {
			key = strings.TrimPrefix(f.Key, "target_")
		}
	} else {
		key, product = "product_mg_l", m.a.Task.Candidates[b.Candidate].Product.Name
	}
	o.add("key", key)
	o.addText("product", product)
	o.add("from", b.Source.Key())
	side := "high"
	if b.Side == mix.Low {
		side = "low"
	}
	o.add("side", side)
	o.add("value", Some(inUnit(b, b.Value)))
	if c == nil {
		o.add("saving_per_ml", nil)
		o.add("step", nil)
		o.add("step_saving_per_ml", nil)
		o.add("message", boundText(&m.a.Task, b, b.Value))
		return o
	}
	o.add("saving_per_ml", Some(math.Max(c.SavingM3, 0)*litresPerM3))
	o.add("step", Some(inUnit(b, c.Step)))
	o.add("step_saving_per_ml", Some(c.StepSavingM3*litresPerM3))
	o.add("message", m.costWords(*c))
	return o
}
