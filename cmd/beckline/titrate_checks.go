package main

import (
	"fmt"

	"github.com/spf13/cobra"

	"beckline/dosing"
	"beckline/dosing/entry"
	"beckline/dosing/reading"
	"beckline/dosing/titration"
)

func titrateIonsCommand(c *console) *cobra.Command {
	var flags formFlags
	var plant plantFlags
	var asJSON bool
	cmd := &cobra.Command{
		Use:   "ions",
		Short: "titrated alkalinity against the balance of the ions",
		Long: "A water has no charge, so its other ions say what its alkalinity must be. This\n" +
			"compares that with the titrated figure and, where they part by more than the\n" +
			"readings allow, names what would explain it. It needs pH, alkalinity,\n" +
			"temperature and the major ions.",
		Example: "  beckline titrate ions --ph 7.15 --alkalinity 285 --temperature 11.5 \\\n" +
			"    --calcium 106 --magnesium 14 --sodium 10.5 --chloride 22 --sulfate 28",
		Args: flags.first(noArguments),
		RunE: func(*cobra.Command, []string) error {
			j, err := plant.job(&flags)
			if err != nil {
				return err
			}
			j.form.Adds = nil
			o, err := checkIons(&j)
			if err != nil {
				return benchProblem(err)
			}
			c.note(j.note)
			return c.write(o, asJSON)
		},
	}
	flags.add(cmd, reading.Reading)
	plant.add(cmd)
	addJSON(cmd, &asJSON)
	return cmd
}

func checkIons(j *job) (outcome, error) {
	o := outcome{method: "ions"}
	kase, err := j.kase(entry.NeedWater)
	if err != nil {
		return o, err
	}
	result, err := dosing.Solve(kase)
	if err != nil {
		return o, err
	}
	check, err := titration.CheckIons(result.Raw().Figures.Water)
	if err != nil {
		return o, err
	}
	for _, f := range []struct {
		key, label string
		eq         float64
	}{
		{"alkalinity_mg_l_caco3", "alkalinity as titrated", check.Titrated},
		{"from_ions_mg_l_caco3", "alkalinity by the ions", check.FromIons},
		{"difference_mg_l_caco3", "  difference", check.Difference},
		{"allowed_mg_l_caco3", "  that the readings allow", check.Allowed},
	} {
		figure := reads("alkalinity", f.label, f.eq, false)
		figure.key = f.key
		o.figures = append(o.figures, figure)
	}
	if check.Agrees {
		o.working = "they agree"
		return o, nil
	}
	o.working = "they part by more than the readings allow"
	text := check.Likely
	if text == "" {
		text = "no usual slip explains it; an ion may be missing"
	}
	o.notes = append(o.notes, titration.Note{Code: "ions_disagree", Field: "alkalinity", Text: text})
	return o, nil
}

func titrateMeterCommand(c *console) *cobra.Command {
	var q *commandFlags
	cmd, flags := c.method("meter", "pH of a meter without temperature compensation",
		"A pH meter without automatic compensation, set to one temperature in a sample at\n"+
			"another, reads wrong by the ratio of the two (Nernst). This corrects the\n"+
			"electrode; the pH is still that of the sample at its own temperature.",
		"  beckline titrate meter --ph 9.33 --meter-set 25 --sample-temperature 5",
		func([]string) (outcome, error) { return compensated(q) })
	flags.add(cmd, "ph", "meter-set", "sample-temperature")
	q = flags
	return cmd
}

func compensated(q *commandFlags) (outcome, error) {
	o := outcome{method: "meter"}
	var v [3]float64
	for i, name := range []string{"ph", "meter-set", "sample-temperature"} {
		var err error
		if v[i], err = q.need(name); err != nil {
			return o, err
		}
	}
	pH, err := titration.Compensated(v[0], v[1], v[2])
	if err != nil {
		return o, err
	}
	o.figures = append(o.figures, reads("ph", "pH of the sample", pH, true))
	o.working = fmt.Sprintf("7 + (%.2f - 7) x %.2f K / %.2f K = %.2f", v[0], v[1], v[2], pH)
	return o, nil
}
