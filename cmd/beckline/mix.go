package main

import (
	"errors"
	"fmt"
	"slices"
	"strings"

	"github.com/spf13/cobra"

	"beckline/dosing"
	"beckline/dosing/entry"
	"beckline/dosing/mix"
	"beckline/dosing/reading"
	"beckline/dosing/report"
	"beckline/dosing/site"
)

// mixFlags are what may be dosed at what price, and what the water must keep to.
type mixFlags struct {
	products     []string
	prices       []string
	limits       []string
	useLevels    []string
	pumps        []string
	alternatives typed
	currency     typed
}

func mixCommand(c *console) *cobra.Command {
	var flags formFlags
	var plant plantFlags
	var want mixFlags
	var asJSON bool
	cmd := &cobra.Command{
		Use:   "mix",
		Short: "the cheapest products that keep the water within limits",
		Long: "Finds the doses of up to six products that keep the finished water within all\n" +
			"limits at the least cost: cost per ML and year, which limits bind and what each\n" +
			"costs, the next best mixes. Where no mix does it, it says which limits conflict\n" +
			"and by how much. Prices and limits come from flags, a plant file, or both; a\n" +
			"limit of the plant is only narrowed.",
		Example: "  beckline mix --ph 6.9 --alkalinity 24 --temperature 8 --calcium 7.2 \\\n    --flow 240 " +
			"--limit \"ph=7.8 to 8.6\" --limit \"alkalinity=min 40\" \\\n" +
			"    --price caustic-25=0.35 --price lime=0.30 --price carbon-dioxide=0.40\n\n" +
			"Figures that a limit may be of\n" + report.Wrap("  "+strings.Join(mixFigures(), " "), helpWidth),
		Args: flags.first(noArguments),
		RunE: func(*cobra.Command, []string) error {
			j, err := plant.job(&flags)
			if err != nil {
				return err
			}
			return c.mix(j, &want, asJSON)
		},
	}
	want.add(cmd)
	flags.add(cmd, reading.Reading)
	flags.addAdditions(cmd)
	plant.add(cmd)
	addJSON(cmd, &asJSON)
	return cmd
}

func (w *mixFlags) add(cmd *cobra.Command) {
	f := cmd.Flags()
	f.StringArrayVar(&w.limits, "limit", nil, `a range of the finished water: "ph=7.8 to 8.6", "alkalinity=min 40", "sodium=max 20"; repeat it`)
	f.StringArrayVar(&w.prices, "price", nil, `price of a product as delivered: per kg, or "caustic-25=310 /t"; repeat it`)
	f.StringArrayVar(&w.products, "choose", nil, "only these of the products that have a price; repeat it")
	f.StringArrayVar(&w.useLevels, "use-level", nil, "certified maximum use level of a product, mg/L of product; repeat it")
	f.StringArrayVar(&w.pumps, "pump-of", nil, "output of a product's pump at 100 %, which needs --flow; repeat it")
	w.alternatives = typed{name: "alternatives", unit: "number"}
	f.Var(&w.alternatives, "alternatives", "how many next best mixes, 0 to 10; 3 where not given")
	w.currency = typed{name: "currency", unit: "word"}
	f.Var(&w.currency, "currency", "word behind the costs")
	f.SortFlags = false
	// The flags are there, so these cannot fail.
	_ = cmd.RegisterFlagCompletionFunc("choose", completeProducts)
	for _, name := range []string{"price", "use-level", "pump-of"} {
		_ = cmd.RegisterFlagCompletionFunc(name, completeAssignment(productNames()))
	}
	_ = cmd.RegisterFlagCompletionFunc("limit", completeAssignment(mixFigures()))
}

// completeAssignment offers NAME= to a shell.
func completeAssignment(names []string) cobra.CompletionFunc {
	return func(*cobra.Command, []string, string) ([]cobra.Completion, cobra.ShellCompDirective) {
		var out []cobra.Completion
		for _, name := range names {
			out = append(out, name+"=")
		}
		return out, cobra.ShellCompDirectiveNoFileComp | cobra.ShellCompDirectiveNoSpace
	}
}

func productNames() []string {
	var names []string
	for _, p := range dosing.Products() {
		names = append(names, p.Name)
	}
	return names
}

func mixFigures() []string {
	var names []string
	for _, q := range mix.Quantities() {
		names = append(names, q.Field())
	}
	return names
}

const usualAlternatives = 3

func (c *console) mix(j job, w *mixFlags, asJSON bool) error {
	task, currency, err := w.task(&j)
	if err != nil {
		return err
	}
	answer, err := mix.Solve(task)
	var conflict *mix.Infeasible
	if errors.As(err, &conflict) {
		return report.MixProblem(conflict)
	}
	if err != nil {
		return err
	}
	if err := j.withinLimits(answer.Best.Result); err != nil {
		return err // a limit of the plant that no mix is sought under, such as the Larson ratio
	}
	shown := report.NewMix(answer, currency)
	if !shown.Document().Agrees() {
		return &dosing.Problem{Kind: dosing.Failed, Code: "checks_disagree"}
	}
	c.note(j.note)
	c.noteUnusual(shown.Document())
	if !asJSON {
		c.out.WriteString(shown.Text())
		return nil
	}
	text, err := shown.JSON()
	c.out.Write(text)
	return err
}

// task puts the question together.
func (w *mixFlags) task(j *job) (t mix.Task, currency string, err error) {
	for _, f := range []*typed{&w.alternatives, &w.currency} {
		if p := f.check("a value", ""); p != nil {
			return t, "", p
		}
	}
	t.Explain, t.Alternatives = true, usualAlternatives
	if w.alternatives.times > 0 {
		v, err := reading.Number(w.alternatives.text)
		if err != nil || v != float64(int(v)) || v < 0 || v > mix.MostAlternatives {
			return t, "", badLine("not_a_number", "alternatives", w.alternatives.text, fmt.Sprintf("0 to %d", mix.MostAlternatives))
		}
		t.Alternatives = int(v)
	}
	if t.Candidates, err = w.candidates(j); err != nil {
		return t, "", err
	}
	if t.Limits, err = w.ranges(j); err != nil {
		return t, "", err
	}
	if len(t.Limits) == 0 {
		return t, "", badLine("missing", "limit", "", limitForm)
	}
	currency = reading.Clean(w.currency.text)
	if j.line != nil && currency == "" {
		currency = j.line.Site().Currency
	}
	dropGroup(j.form, reading.Target) // a target is not a limit
	t.Base, err = j.kase(entry.NeedWater)
	return t, currency, err
}

// candidates are the products with a price: those of the plant, then those typed.
func (w *mixFlags) candidates(j *job) ([]mix.Candidate, error) {
	var all []mix.Candidate
	if j.line != nil {
		for _, p := range j.line.Site().Products {
			if p.Price.Given {
				all = append(all, mix.Candidate{Product: p.Dosing(), Price: p.Price.Value, Feed: j.line.Equipment(p)})
			}
		}
	}
	for _, text := range w.prices {
		at, value, err := assigned(j, &all, "price", text, true)
		if err != nil {
			return nil, err
		}
		perKg, accepted, ok := site.ParsePrice(value)
		if !ok {
			return nil, badLine("not_a_number", "price", text, "PRODUCT=PRICE, "+accepted)
		}
		all[at].Price = perKg
	}
	for _, text := range w.useLevels {
		at, value, err := assigned(j, &all, "use-level", text, false)
		if err != nil {
			return nil, err
		}
		level, accepted, ok := site.ParseUseLevel(value)
		if !ok {
			return nil, badLine("not_a_number", "use-level", text, "PRODUCT=LEVEL, "+accepted)
		}
		if old := all[at].Feed.MaximumUse; !old.Given || level < old.Value {
			all[at].Feed.MaximumUse = dosing.Some(level)
		}
	}
	for _, text := range w.pumps {
		at, value, err := assigned(j, &all, "pump-of", text, false)
		if err != nil {
			return nil, err
		}
		v, err := quantity("pump").Parse(value)
		if err != nil {
			return nil, badLine("not_a_number", "pump-of", text, "PRODUCT=OUTPUT, "+quantity("pump").Accepted())
		}
		all[at].Feed.PumpCapacity = dosing.Some(v.SI)
	}
	return w.chosen(j, all)
}

// chosen keeps those of --choose.
func (w *mixFlags) chosen(j *job, all []mix.Candidate) ([]mix.Candidate, error) {
	var kept []mix.Candidate
	for _, name := range w.products {
		at, _, err := assigned(j, &all, "choose", name+"=", false)
		if err != nil {
			return nil, err
		}
		kept = append(kept, all[at])
	}
	if len(w.products) > 0 {
		all = kept
	}
	switch {
	case len(all) == 0:
		return nil, badLine("missing", "price", "", "PRODUCT=PRICE for each product that may be dosed, or a plant file with prices")
	case len(all) > mix.MostCandidates:
		return nil, badLine("too_many_products", "choose", fmt.Sprint(len(all)), fmt.Sprintf("up to %d products; name them with --choose", mix.MostCandidates))
	}
	return all, nil
}

// assigned finds the candidate of PRODUCT=VALUE; one that is not there yet is
// added where that is allowed.
func assigned(j *job, all *[]mix.Candidate, flag, text string, add bool) (at int, value string, err error) {
	name, value, found := strings.Cut(text, "=")
	if !found {
		return 0, "", badLine("no_value", flag, text, "PRODUCT=VALUE, such as caustic-25=0.35")
	}
	name = strings.TrimSpace(name)
	find := func(name string) int {
		return slices.IndexFunc(*all, func(c mix.Candidate) bool { return c.Product.Name == name })
	}
	if at := find(name); at >= 0 {
		return at, value, nil
	}
	if j.line != nil {
		if own := j.line.Site().ProductNamed(name); own != nil && add {
			*all = append(*all, mix.Candidate{Product: own.Dosing(), Feed: j.line.Equipment(own)})
			return len(*all) - 1, value, nil
		}
	}
	product, err := entry.ProductNamed(name)
	if err != nil {
		return 0, "", err
	}
	if at := find(product.Name); at >= 0 {
		return at, value, nil
	}
	if !add {
		return 0, "", badLine("no_price", flag, name, "a product that has a price: --price "+product.Name+"=PRICE")
	}
	*all = append(*all, mix.Candidate{Product: product})
	return len(*all) - 1, value, nil
}

const limitForm = `FIGURE=RANGE, such as "ph=7.8 to 8.6", "alkalinity=min 40" or "sodium=max 20"`

// ranges are the limits of the plant's finished water, narrowed by those typed.
func (w *mixFlags) ranges(j *job) ([]mix.Limit, error) {
	var all []mix.Limit
	if j.line != nil {
		for _, q := range mix.Quantities() {
			if band, ok := j.line.Finished[q.Field()]; ok {
				all = append(all, mix.Limit{Quantity: q, Low: band.Low, High: band.High})
			}
		}
	}
	typed := map[mix.Quantity]bool{}
	for _, text := range w.limits {
		l, err := parseLimit(text)
		if err != nil {
			return nil, err
		}
		if typed[l.Quantity] {
			return nil, badLine("given_twice", "limit", text, "one range a figure")
		}
		typed[l.Quantity] = true
		at := slices.IndexFunc(all, func(o mix.Limit) bool { return o.Quantity == l.Quantity })
		if at < 0 {
			all = append(all, l)
			continue
		}
		if old := all[at].Low; old.Given && (!l.Low.Given || l.Low.Value < old.Value) {
			l.Low = old
		}
		if old := all[at].High; old.Given && (!l.High.Given || l.High.Value > old.Value) {
			l.High = old
		}
		all[at] = l
	}
	return all, nil
}

// parseLimit reads FIGURE=RANGE.
func parseLimit(text string) (mix.Limit, error) {
	name, value, found := strings.Cut(text, "=")
	name = strings.ToLower(strings.TrimSpace(name))
	quantities := mix.Quantities()
	at := slices.IndexFunc(quantities, func(q mix.Quantity) bool { return q.Field() == name })
	if !found || at < 0 {
		return mix.Limit{}, badLine("bad_limit", "limit", text, limitForm+"; figures: "+strings.Join(mixFigures(), ", "))
	}
	l := mix.Limit{Quantity: quantities[at]}
	value = strings.TrimSpace(value)
	low, high, between := strings.Cut(value, " to ")
	ends := map[*dosing.Optional]string{}
	switch word, rest, _ := strings.Cut(value, " "); {
	case between:
		ends[&l.Low], ends[&l.High] = low, high
	case strings.EqualFold(word, "min"):
		ends[&l.Low] = rest
	case strings.EqualFold(word, "max"):
		ends[&l.High] = rest
	default:
		return mix.Limit{}, badLine("bad_limit", "limit", text, limitForm)
	}
	for to, end := range ends {
		v, accepted, ok := limitValue(l.Quantity, end)
		if !ok {
			return mix.Limit{}, badLine("bad_limit", "limit", text, accepted)
		}
		*to = dosing.Some(v)
	}
	if l.Low.Given && l.High.Given && l.Low.Value > l.High.Value {
		return mix.Limit{}, badLine("limit_crossed", "limit", text, "the low end first")
	}
	return l, nil
}

func limitValue(q mix.Quantity, text string) (v float64, accepted string, ok bool) {
	f, isField := report.MixLimitField(q)
	if !isField {
		return site.ParseRatio(text)
	}
	value, err := f.Parse(text)
	return value.SI, f.Accepted(), err == nil
}
