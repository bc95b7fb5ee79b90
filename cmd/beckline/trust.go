package main

import (
	"strconv"
	"strings"

	"github.com/spf13/cobra"

	"beckline/dosing"
	"beckline/dosing/entry"
	"beckline/dosing/hand"
	"beckline/dosing/margin"
	"beckline/dosing/reading"
	"beckline/dosing/report"
	"beckline/dosing/slips"
	"beckline/dosing/table"
	"beckline/dosing/working"
)

// trustFlags say how an answer is to be doubted: how far off the readings may
// be, and what of the other ways is shown.
type trustFlags struct {
	tolerances typed
	draws      typed
	ways       bool
	working    bool
}

// addTolerances offers tolerances and draws.
func (t *trustFlags) addTolerances(cmd *cobra.Command) {
	t.tolerances = typed{name: "tolerance", unit: "reading=half-width"}
	t.draws = typed{name: "draws", unit: "number"}
	cmd.Flags().Var(&t.tolerances, "tolerance", "half-width of the 95 % interval of each reading, as ph=0.05,alkalinity=2%,temperature=0.3; only those vary then")
	cmd.Flags().Var(&t.draws, "draws", "carry the tolerances by draws of true readings, so many or as many as are usual: --draws, --draws=20000")
	cmd.Flags().Lookup("draws").NoOptDefVal = usualDraws
}

const usualDraws = "usual"

func (t *trustFlags) add(cmd *cobra.Command) {
	t.addTolerances(cmd)
	cmd.Flags().BoolVar(&t.ways, "ways", false, "the numbers of the hand method and of the titration step by step")
	cmd.Flags().BoolVar(&t.working, "working", false, "the worked sheet: every step with formula, source and numbers")
}

// given reads the tolerances; ok is false where none were typed.
func (t *trustFlags) given() (tol margin.Tolerances, ok bool, err error) {
	if p := t.tolerances.check(toleranceWanted, "; or leave the flag away for the usual ones"); p != nil {
		return tol, false, p
	}
	if t.tolerances.times == 0 {
		return tol, false, nil
	}
	tol, err = entry.Tolerances(t.tolerances.text)
	return tol, true, err
}

const toleranceWanted = "reading=half-width with commas between, such as ph=0.05,alkalinity=2%,temperature=0.3"

// options say whether to draw.
func (t *trustFlags) options() (margin.Options, error) {
	if t.draws.times > 1 {
		return margin.Options{}, badLine("given_twice", "draws", t.draws.text, "one number of draws")
	}
	if t.draws.times == 0 {
		return margin.Options{}, nil
	}
	if t.draws.text == usualDraws {
		return margin.Options{Method: margin.Draws}, nil
	}
	n, err := strconv.Atoi(strings.TrimSpace(t.draws.text))
	if err != nil || n <= 0 {
		return margin.Options{}, badLine("bad_draws", "draws", t.draws.text, "1000 to 1000000, or the flag alone")
	}
	return margin.Options{Method: margin.Draws, Draws: n}, nil
}

// usualOf lays the plant's own tolerances of what was read over the usual ones.
func (j *job) usualOf() (margin.Tolerances, error) {
	tol := margin.Defaults()
	if j.line == nil {
		return tol, nil
	}
	for name, own := range j.line.Tolerances {
		if strings.TrimSpace(j.form.Values[name]) == "" && name != "strength" {
			continue
		}
		if err := tol.Set(name, margin.Tolerance{Absolute: own.Absolute, Relative: own.Relative}); err != nil {
			return tol, err
		}
	}
	return tol, nil
}

// trusted puts what speaks for and against an answer onto its document: slips
// that the numbers betray, the other ways to the dose, the margin. A way that
// parts from the answer without a reason is a failure of the program.
func (t *trustFlags) trusted(d report.Document, j *job, r *dosing.Result) (report.Document, error) {
	d = d.WithSlips(slips.Check(r.Case, r, j.evidence()))
	if r.Dose() == nil {
		return d, nil
	}
	titration, err := hand.Titrate(r)
	if err != nil {
		return d, err
	}
	d = d.WithWays(hand.Of(r), titration, t.ways)
	if !d.Agrees() {
		return d, &dosing.Problem{Kind: dosing.Failed, Code: "checks_disagree"}
	}
	if d, err = t.margin(d, j, r); err != nil {
		return d, err
	}
	if t.working {
		sheet, err := working.Of(r)
		if err != nil {
			return d, err
		}
		d = d.WithWorking(sheet.Text())
	}
	return d, nil
}

func (t *trustFlags) margin(d report.Document, j *job, r *dosing.Result) (report.Document, error) {
	opts, err := t.options()
	if err != nil {
		return d, err
	}
	tol, typed, err := t.given()
	if err != nil {
		return d, err
	}
	if !typed {
		if tol, err = j.usualOf(); err != nil {
			return d, err
		}
	}
	m, err := margin.Of(r, tol, opts)
	if err != nil && !typed && opts.Draws == 0 {
		m, err = margin.Of(r, margin.Defaults(), opts) // a blend's readings have other names than its line's
	}
	switch {
	case err != nil && (typed || opts.Draws != 0):
		return d, err
	case err != nil: // the answer stands without its margin
		return d.WithoutMargin(), nil
	}
	own := j.line != nil && len(j.line.Tolerances) > 0
	return d.WithMargin(m, !typed && !own), nil
}

// evidence is what is known besides the case: the units in which the readings
// were typed, and what the plant's own usually are.
func (j *job) evidence() slips.Context {
	x := slips.Context{Units: j.form.Units()}
	if j.line == nil {
		return x
	}
	x.Capacity = j.line.Capacity
	x.Usual = map[string]slips.Usual{}
	for name, band := range j.line.Usual {
		f, ok := reading.Lookup(name)
		if !ok || !band.Low.Given || !band.High.Given || f.Group != reading.Reading {
			continue
		}
		x.Usual[name] = slips.Usual{Median: (band.Low.Value + band.High.Value) / 2, Low: band.Low.Value, High: band.High.Value}
	}
	return x
}

// rows puts tolerances into the options of a table: only where they are given,
// since a margin costs more than the answer.
func (t *trustFlags) rows(options *table.Options) error {
	tol, typed, err := t.given()
	if err != nil {
		return err
	}
	opts, err := t.options()
	if err != nil {
		return err
	}
	if typed {
		options.Tolerances, options.Margin = &tol, opts
		return nil
	}
	if t.draws.times > 0 {
		return badLine("missing", "tolerance", "", toleranceWanted+"; rows have a margin only with it")
	}
	return nil
}
