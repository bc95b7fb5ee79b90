package main

import (
	"strings"

	"github.com/spf13/cobra"

	"beckline/dosing"
	"beckline/dosing/entry"
	"beckline/dosing/feed"
	"beckline/dosing/reading"
	"beckline/dosing/report"
)

// drawdownFlags are the pump's own quantities beside a water and its dose.
type drawdownFlags struct {
	form  formFlags
	q     settings
	draws []string
}

const drawForm = "volume=250 time=61.5 speed=50 stroke=80, in mL, seconds and %, units allowed"

func drawdownCommand(c *console) *cobra.Command {
	var d drawdownFlags
	var asJSON bool
	cmd := &cobra.Command{
		Use:   "drawdown [file]",
		Short: "a pump's calibration from drawdowns, and its setting",
		Long: "Fits output against stroke x speed from timed draws out of a calibration column,\n" +
			"typed with --draw or in a CSV file with the columns volume_ml, seconds,\n" +
			"speed_percent, stroke_percent. Says how well the draws repeat and how straight\n" +
			"the line is, the range that the pump feeds steadily, and the setting for a feed.\n" +
			"The feed is --feed, or that of a dose whose readings, target and product are\n" +
			"given as for the command dose; then it also says by how much pH one step of the\n" +
			"pump moves the finished water.",
		Example: "  beckline feed drawdown --draw \"volume=100 time=60 speed=50\" \\\n" +
			"    --draw \"volume=201 time=60 speed=100\" --feed \"9 L/h\" \\\n    --product caustic-25",
		Args: d.form.first(atMostOneFile),
		ValidArgsFunction: func(*cobra.Command, []string, string) ([]cobra.Completion, cobra.ShellCompDirective) {
			return []cobra.Completion{"csv"}, cobra.ShellCompDirectiveFilterFileExt
		},
		RunE: func(_ *cobra.Command, args []string) error {
			s, err := d.sheet(c, args)
			if err != nil {
				return report.FeedProblem(err)
			}
			return c.show(s, asJSON)
		},
	}
	cmd.Flags().StringArrayVar(&d.draws, "draw", nil, "one draw, as \""+drawForm+"\"; repeat it")
	d.q.add(cmd, "feed", "stroke", "step")
	d.form.add(cmd, reading.Reading, reading.Target, reading.Setting)
	d.form.addAdditions(cmd)
	addJSON(cmd, &asJSON)
	return cmd
}

func (d *drawdownFlags) sheet(c *console, args []string) (report.Sheet, error) {
	draws, err := d.read(c, args)
	if err != nil {
		return report.Sheet{}, err
	}
	var out report.Drawdown
	if out.Calibration, err = feed.Calibrate(draws); err != nil {
		return report.Sheet{}, err
	}
	more, err := d.q.several("feed", "stroke", "step")
	if err != nil {
		return report.Sheet{}, err
	}
	out.Stroke, out.Step, out.Wanted = more["stroke"].Or(1), more["step"].Or(0.01), more["feed"]
	form, err := d.form.form()
	if err != nil {
		return report.Sheet{}, err
	}
	if err := d.dose(&out, form); err != nil {
		return report.Sheet{}, err
	}
	if out.Wanted.Given {
		if out.Setting, err = out.Calibration.SettingFor(out.Wanted.Value, out.Stroke, out.Step); err != nil {
			return report.Sheet{}, err
		}
		dose, slope := 0.0, 0.0
		if out.Result != nil {
			dose = out.Result.Dose().Dose
			if slope, err = pHPerDose(out.Result); err != nil {
				return report.Sheet{}, err
			}
		}
		if out.Setting.Rounded > 0 {
			if out.Resolution, err = out.Calibration.Resolution(out.Stroke, out.Setting.Rounded, out.Step, dose, slope); err != nil {
				return report.Sheet{}, err
			}
		}
		if out.Result != nil {
			out.PHPerStep = dosing.Some(out.Resolution.PH)
		}
	}
	return report.DrawdownSheet(out)
}

// dose takes the feed from a dose where readings are given, or only the product
// for its cautions.
func (d *drawdownFlags) dose(out *report.Drawdown, form entry.Form) error {
	asked := hasGroup(form, reading.Reading) || hasGroup(form, reading.Target)
	if !asked && form.Product == "" {
		return nil
	}
	if !asked {
		product, err := entry.ProductAt(form.Product, form.Values["strength"])
		out.Product = product
		return err
	}
	delete(form.Values, "pump") // the pump is the one drawn down
	result, err := solveJob(job{form: form}, entry.NeedDose)
	if err != nil {
		return err
	}
	s := result.Dose()
	out.Result, out.Product = result, s.Addition.Product
	if out.Wanted.Given {
		return nil
	}
	if !s.Feed.HasFlow || !s.Feed.HasVolume {
		return badLine("missing", "flow", "", "--flow and a liquid product, or --feed")
	}
	out.Wanted = dosing.Some(s.Feed.VolumePerSecond)
	return nil
}

// pHPerDose is how the finished pH goes with the dose, per mol/L, from the same
// case with a little more and a little less of it.
func pHPerDose(r *dosing.Result) (float64, error) {
	const part = 1e-3
	var ends [2]float64
	for i, by := range []float64{1 - part, 1 + part} {
		c := withDose(r, r.Dose().Dose*by)
		moved, err := dosing.Solve(c)
		if err != nil {
			return 0, err
		}
		ends[i] = moved.Finished().Figures.PH
	}
	return (ends[1] - ends[0]) / (2 * part * r.Dose().Dose), nil
}

// withDose is a case with every dose as it was found, that of the solved product
// apart.
func withDose(r *dosing.Result, dose float64) dosing.Case {
	c := r.Case
	c.Additions = append([]dosing.Addition(nil), c.Additions...)
	c.Target, c.Second, c.TargetAt, c.Notes = dosing.Target{}, dosing.Target{}, 0, nil
	for i := range c.Additions {
		a := &c.Additions[i]
		if a.Process != dosing.ChemicalFeed {
			continue
		}
		a.Feed.PumpCapacity = dosing.None
		if i+1 == r.Solved {
			a.Dose, a.Solve = dosing.Some(dose), false
		} else if a.Solve || a.Residual.Given {
			a.Dose, a.Solve, a.Residual = dosing.Some(r.Stations[i+1].Dose), false, dosing.None
		}
	}
	return c
}

// drawKeys are the words of a draw and the quantities that they are.
var drawKeys = map[string]string{"volume": "draw-volume", "time": "draw-time", "speed": "speed", "stroke": "stroke"}

// read collects the draws that were typed and those of a file.
func (d *drawdownFlags) read(c *console, args []string) ([]feed.Drawdown, error) {
	var draws []feed.Drawdown
	for _, text := range d.draws {
		draw, err := typedDraw(text)
		if err != nil {
			return nil, err
		}
		draws = append(draws, draw)
	}
	if len(args) == 0 && len(draws) > 0 {
		return draws, nil
	}
	if len(args) == 0 && isTerminal(c.in) {
		return nil, badLine("missing", "draw", "", drawForm+"; or the name of a CSV file")
	}
	t, err := c.openTable(args, "volume_ml,seconds,speed_percent")
	if err != nil {
		return nil, err
	}
	rows, err := t.numbers([]tableColumn{column(quantity("draw-volume"), true), column(quantity("draw-time"), true),
		column(quantity("speed"), false), column(quantity("stroke"), false)})
	if err != nil {
		return nil, err
	}
	for _, row := range rows {
		draws = append(draws, feed.Drawdown{Volume: row[0].Value, Seconds: row[1].Value, Speed: row[2].Or(1), Stroke: row[3].Or(1)})
	}
	return draws, nil
}

// typedDraw reads one draw: words with an equals sign, a value up to the next.
func typedDraw(text string) (feed.Drawdown, error) {
	d := feed.Drawdown{Stroke: 1, Speed: 1}
	places := map[string]*float64{"volume": &d.Volume, "time": &d.Seconds, "speed": &d.Speed, "stroke": &d.Stroke}
	given := map[string]string{}
	name := ""
	for _, word := range strings.FieldsFunc(text, func(r rune) bool { return r == ' ' || r == ';' }) {
		if key, value, found := strings.Cut(word, "="); found {
			name = strings.ToLower(key)
			if _, known := drawKeys[name]; !known {
				return d, badLine("draw_form", "draw", text, drawForm)
			}
			if _, twice := given[name]; twice {
				return d, badLine("given_twice", "draw", text, drawForm)
			}
			given[name] = value
			continue
		}
		if name == "" {
			return d, badLine("draw_form", "draw", text, drawForm)
		}
		given[name] += " " + word
	}
	for name, value := range given {
		v, err := quantity(drawKeys[name]).Parse(value)
		if err != nil {
			return d, readingProblem(err)
		}
		*places[name] = v.SI
	}
	if d.Volume == 0 || d.Seconds == 0 {
		return d, badLine("draw_form", "draw", text, drawForm)
	}
	return d, nil
}
