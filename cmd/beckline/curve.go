package main

import (
	"bytes"
	"errors"
	"fmt"
	"io/fs"
	"maps"
	"os"
	"path/filepath"
	"slices"
	"strings"

	"github.com/spf13/cobra"

	"beckline/dosing"
	"beckline/dosing/curve"
	"beckline/dosing/entry"
	"beckline/dosing/reading"
	"beckline/dosing/report"
)

// curveFlags say what varies and what is written.
type curveFlags struct {
	over, from, to, steps typed
	waters, picture       typed
	holdPH, asCSV, asJSON bool
}

func curveCommand(c *console) *cobra.Command {
	flags := formFlags{product: typed{most: mostCurves}}
	var plant plantFlags
	var want curveFlags
	cmd := &cobra.Command{
		Use:   "curve",
		Short: "a dose across temperatures or waters, or a titration curve",
		Long: "Answers one plan many times over: the dose against the temperature of the water\n" +
			"or its raw alkalinity, for each of a table of waters such as the months of a\n" +
			"year, or the figure of the target against the dose. It prints a table, with\n" +
			"--csv or --json the points, and with --picture it draws them. Two products or\n" +
			"more are drawn side by side.",
		Example: "  beckline curve --over temperature --from 1 --to 25 --ph 6.28 --alkalinity 13 \\\n" +
			"    --temperature 8 --target-ph 8.4 --product caustic-25 --picture seasons.svg\n" +
			"  beckline curve --over waters --waters months.csv \\\n    --target-ph 8.4 --product lime",
		Args: flags.first(noArguments),
		RunE: func(*cobra.Command, []string) error {
			j, err := plant.job(&flags)
			if err != nil {
				return err
			}
			return c.curve(j, flags.product.all, &want)
		},
	}
	want.add(cmd)
	flags.add(cmd, reading.Reading, reading.Target, reading.Setting)
	cmd.Flags().Lookup("product").Usage = "product to be dosed; repeat it to compare, strength, temperature and pump are then those of the first"
	flags.addAdditions(cmd)
	flags.addBehind(cmd)
	plant.add(cmd)
	addJSON(cmd, &want.asJSON)
	return cmd
}

const (
	mostCurves = 6 // that can be told apart in grey
	usualSteps = 13
	mostSteps  = 2000
)

var overWords = []string{"temperature", "alkalinity", "dose", "waters"}

func (w *curveFlags) add(cmd *cobra.Command) {
	for _, f := range []struct {
		to                *typed
		name, unit, usage string
	}{
		{&w.over, "over", "word", "what varies: temperature, alkalinity, dose or waters"},
		{&w.from, "from", "value", "where it starts; 1 C, half the alkalinity given"},
		{&w.to, "to", "value", "where it ends; 25 C, twice the alkalinity given, for a dose half as much again as reaches the target"},
		{&w.steps, "points", "number", "how many points; 13 where not given"},
		{&w.waters, "waters", "file", "CSV of waters: a column name, and readings as in rows; what a row lacks comes from the flags"},
		{&w.picture, "picture", "file", "draws into this file, named .svg or .png"},
	} {
		*f.to = typed{name: f.name, unit: f.unit}
		cmd.Flags().Var(f.to, f.name, f.usage)
	}
	cmd.Flags().BoolVar(&w.holdPH, "same-ph", false, "over temperature: the same pH is read at each, instead of one water whose pH follows")
	cmd.Flags().BoolVar(&w.asCSV, "csv", false, "the points as CSV")
	// The flags are there, so these cannot fail.
	_ = cmd.MarkFlagFilename("picture", "svg", "png")
	_ = cmd.MarkFlagFilename("waters", "csv")
	_ = cmd.RegisterFlagCompletionFunc("over", cobra.FixedCompletions(overWords, cobra.ShellCompDirectiveNoFileComp))
}

// check refuses flags that cannot be used together.
func (w *curveFlags) check() error {
	for _, t := range []*typed{&w.over, &w.from, &w.to, &w.steps, &w.waters, &w.picture} {
		if p := t.check("a value", ""); p != nil {
			return p
		}
	}
	if w.over.times == 0 {
		return badLine("missing", "over", "", strings.Join(overWords, ", "))
	}
	if !slices.Contains(overWords, w.over.text) {
		return badLine("unknown_word", "over", w.over.text, strings.Join(overWords, ", "))
	}
	if byWaters := w.over.text == "waters"; byWaters != (w.waters.times > 0) {
		return badLine("missing", "waters", w.waters.text, "--over waters and --waters FILE together")
	}
	if w.asCSV && w.asJSON {
		return badLine("given_twice", "csv", "", "--csv or --json, not both")
	}
	if w.picture.times > 0 && w.extension() == "" {
		return badLine("unknown_word", "picture", w.picture.text, "a file named .svg or .png")
	}
	return nil
}

func (w *curveFlags) extension() string {
	if e := strings.ToLower(filepath.Ext(w.picture.text)); e == ".svg" || e == ".png" {
		return e
	}
	return ""
}

// points reads how many.
func (w *curveFlags) points() (int, error) {
	if w.steps.times == 0 {
		return usualSteps, nil
	}
	v, err := reading.Number(w.steps.text)
	if err != nil || v != float64(int(v)) || v < 2 || v > mostSteps {
		return 0, badLine("curve_points", "points", w.steps.text, fmt.Sprintf("2 to %d", mostSteps))
	}
	return int(v), nil
}

// span reads both ends in the units of a field; an end that is not given is that
// of usual.
func (w *curveFlags) span(field string, low, high float64) ([]float64, error) {
	f := quantity(field)
	for _, end := range []struct {
		t  *typed
		to *float64
	}{{&w.from, &low}, {&w.to, &high}} {
		if end.t.times == 0 {
			continue
		}
		v, err := f.Parse(end.t.text)
		if err != nil {
			err = readingProblem(err)
			if p, ok := err.(*dosing.Problem); ok {
				p.Field = end.t.name
			}
			return nil, err
		}
		*end.to = v.SI
	}
	if !(low < high) {
		return nil, badLine("limit_crossed", "from", w.from.text, "less than --to")
	}
	n, err := w.points()
	return curve.Span(low, high, n), err
}

// curve answers for each product and writes what is asked for.
func (c *console) curve(j job, products []string, w *curveFlags) error {
	if err := w.check(); err != nil {
		return err
	}
	if len(products) == 0 {
		products = []string{j.form.Product}
	}
	j.form.Second = ""
	var all []curve.Series
	for i, product := range products {
		one := j
		if i > 0 {
			one.form.Product = product
			one.form.Values = withoutSettings(j.form.Values)
			if j.line != nil {
				j.line.Choose(&one.form, product)
			}
		}
		s, err := c.series(one, w)
		if err != nil {
			return err
		}
		all = append(all, s)
	}
	if w.picture.times > 0 {
		if err := w.draw(all); err != nil {
			return err
		}
		c.note("beckline: drawn into " + reading.Clean(w.picture.text))
	}
	c.note(j.note)
	return c.writeCurve(all, w)
}

func withoutSettings(values map[string]string) map[string]string {
	kept := map[string]string{}
	for name, text := range values {
		if f, ok := reading.Lookup(name); !ok || f.Group != reading.Setting {
			kept[name] = text
		}
	}
	return kept
}

// series answers for one product.
func (c *console) series(j job, w *curveFlags) (curve.Series, error) {
	if w.over.text == "waters" {
		return c.overWaters(j, w)
	}
	kase, err := j.kase(entry.NeedDose)
	if err != nil {
		return curve.Series{}, err
	}
	switch w.over.text {
	case "temperature":
		kelvins, err := w.span("temperature", 274.15, 298.15)
		if err != nil {
			return curve.Series{}, err
		}
		hold := curve.HoldWater
		if w.holdPH {
			hold = curve.HoldReadings
		}
		return curve.OverTemperature(kase, kelvins, hold)
	case "alkalinity":
		at := kase.Readings.Alkalinity.Value
		range_, err := w.span("alkalinity", at/2, at*2)
		if err != nil {
			return curve.Series{}, err
		}
		return curve.OverAlkalinity(kase, range_)
	}
	most, err := w.mostDose(&kase)
	if err != nil {
		return curve.Series{}, err
	}
	return curve.Titration(kase, most)
}

// mostDose is where a titration curve ends, mol/L; 0 where not given.
func (w *curveFlags) mostDose(c *dosing.Case) (float64, error) {
	if w.from.times+w.steps.times > 0 {
		return 0, badLine("not_with_dose", "from", w.from.text, "--to alone: a titration curve starts without a dose and takes its own points")
	}
	if w.to.times == 0 {
		return 0, nil
	}
	d, err := reading.ParseDose("dose=" + w.to.text)
	if err != nil || d.Basis != "" || d.MgPerLitre == 0 {
		return 0, badLine("not_a_number", "to", w.to.text, "the largest dose, mg/L of the pure chemical, above 0 to 10000")
	}
	for i := range c.Additions {
		if c.Additions[i].Solve {
			return d.MgPerLitre / 1000 / c.Additions[i].Product.Chemical.MolarMass, nil
		}
	}
	return 0, nil
}

// overWaters reads the table of waters. What a row does not have comes from the
// flags or the plant file.
func (c *console) overWaters(j job, w *curveFlags) (curve.Series, error) {
	f, err := openFile(w.waters.text)
	if err != nil {
		return curve.Series{}, err
	}
	defer f.Close()
	rows, err := readTable(f, "name,ph,alkalinity_mg_l_caco3,temperature_c")
	if err != nil {
		return curve.Series{}, err
	}
	var waters []curve.Water
	var plan dosing.Case
	for i, row := range rows {
		one := j
		one.form.Values = maps.Clone(j.form.Values)
		for column, text := range row {
			f, ok := reading.LookupKey(column)
			if !ok || text == "" || f.Group != reading.Reading {
				continue
			}
			if _, err := reading.Number(text); err != nil {
				return curve.Series{}, badLine(reading.CodeNotANumber, column, fmt.Sprintf("row %d: %s", i+1, text), f.AcceptedBare())
			}
			one.form.Values[f.Name] = text
		}
		kase, err := one.kase(entry.NeedDose)
		if err != nil {
			return curve.Series{}, inRow(err, i+1)
		}
		plan = kase
		waters = append(waters, curve.Water{Name: orWord(reading.Clean(row["name"]), fmt.Sprint(i+1)), Readings: kase.Readings})
	}
	return curve.OverWaters(plan, waters)
}

func inRow(err error, row int) error {
	var p *dosing.Problem
	if !errors.As(err, &p) {
		return err
	}
	q := *p
	q.Given = strings.TrimSuffix(fmt.Sprintf("row %d: %s", row, q.Given), ": ")
	return &q
}

// draw writes the picture into its file, whole or not at all.
func (w *curveFlags) draw(all []curve.Series) error {
	p := curve.Picture{Title: all[0].Name, Series: all, Footer: "beckline " + programVersion()}
	if len(all) > 1 {
		p.Title = all[0].Y.Label + " by " + all[0].X.Label
		if all[0].Y.Title() != all[1].Y.Title() {
			p.Title = ""
		}
	}
	var b bytes.Buffer
	write := p.SVG
	if w.extension() == ".png" {
		write = p.PNG
	}
	if err := write(&b); err != nil {
		if errors.Is(err, curve.ErrDifferentAxes) {
			return badLine("different_axes", "product", "", "products of one chemical in one picture: their doses share an axis")
		}
		return badLine("cannot_be_drawn", "picture", w.picture.text, err.Error())
	}
	if err := os.WriteFile(w.picture.text, b.Bytes(), 0o644); err != nil {
		var path *fs.PathError
		if errors.As(err, &path) {
			err = path.Err
		}
		return &dosing.Problem{Kind: dosing.Failed, Code: "not_written", Field: "picture", Given: clean(err.Error())}
	}
	return nil
}

func (c *console) writeCurve(all []curve.Series, w *curveFlags) error {
	switch {
	case w.asCSV:
		return curve.WriteCSV(c.out, all...)
	case w.asJSON:
		return c.writeCurveJSON(all)
	}
	for i := range all {
		if i > 0 {
			c.out.WriteByte('\n')
		}
		c.out.WriteString(report.ASCII(all[i].Text(report.ProblemLine)))
	}
	return nil
}

func (c *console) writeCurveJSON(all []curve.Series) error {
	text, err := report.CurveJSON(all)
	c.out.Write(text)
	return err
}
