package main

import (
	"errors"
	"strings"

	"github.com/spf13/cobra"

	"beckline/dosing"
	"beckline/dosing/bench/trim"
	"beckline/dosing/entry"
	"beckline/dosing/reading"
	"beckline/dosing/report"
)

// trimFlags are a reading of the finished water beside the case that set the
// feed.
type trimFlags struct {
	form               formFlags
	plant              plantFlags
	q                  settings
	set, most          typed // doses
	cause, explanation typed
}

func trimCommand(c *console) *cobra.Command {
	var t trimFlags
	var asJSON bool
	cmd := &cobra.Command{
		Use:   "trim",
		Short: "the finished pH as measured to a corrected dose, in safe steps",
		Long: "Compares the pH of the finished water with what the dose in force should give,\n" +
			"ranks what may be wrong with a two-minute test for each, and plans the way to\n" +
			"the corrected dose: no step over --step-ph or --step-dose, a wait of three to\n" +
			"five volumes after each, and where to stop. It takes what dose takes; the dose\n" +
			"in force is the computed one unless --set says another. The plant's own limits\n" +
			"hold unless --reason states why not.",
		Example: "  beckline trim --ph 6.8 --alkalinity 60 --temperature 10 --flow 240 \\\n" +
			"    --target-ph 8.0 --product caustic-25 --measured 7.55 --volume \"120 m3\"",
		Args: t.form.first(noArguments),
		RunE: func(*cobra.Command, []string) error {
			s, note, err := t.sheet()
			if err != nil {
				return err
			}
			c.note(note)
			return c.show(s, asJSON)
		},
	}
	t.q.add(cmd, "measured", "measured-temperature", "volume", "step-ph", "step-dose", "low-ph", "high-ph")
	text := func(into *typed, name, unit, help string) {
		*into = typed{name: name, unit: unit}
		cmd.Flags().Var(into, name, help)
	}
	text(&t.set, "set", "mg/L", "dose in force, of the chemical (or with its basis: \"60 mg/L product\"), where not the computed one")
	text(&t.most, "most-dose", "mg/L", "plant's own limit: no dose above")
	text(&t.cause, "cause", "name", "cause that the steps go by, as listed; the likeliest where not given")
	text(&t.explanation, "reason", "words", "why a limit of the plant's own may be passed")
	t.form.add(cmd, reading.Reading, reading.Target, reading.Setting)
	t.form.addAdditions(cmd)
	t.plant.add(cmd)
	addJSON(cmd, &asJSON)
	return cmd
}

func (t *trimFlags) sheet() (report.Sheet, string, error) {
	j, err := t.plant.job(&t.form)
	if err != nil {
		return report.Sheet{}, "", err
	}
	measured, err := t.q.need("measured")
	if err != nil {
		return report.Sheet{}, "", err
	}
	more, err := t.q.several("measured-temperature", "volume", "step-ph", "step-dose", "low-ph", "high-ph")
	if err != nil {
		return report.Sheet{}, "", err
	}
	in := trim.Input{Addition: -1, Measured: measured, Kelvin: more["measured-temperature"]}
	out := report.Trim{}
	if err := t.inForce(&j, &in, &out); err != nil {
		return report.Sheet{}, "", err
	}
	in.Tolerances = j.trimTolerances(out.Result, out.At)
	if out.Report, err = trim.Explain(in); err != nil {
		return report.Sheet{}, "", err
	}
	limits, err := t.limits(&j, more, out.Result.Stations[out.At].Addition.Product)
	if err != nil {
		return report.Sheet{}, "", err
	}
	if err := t.plan(&out, limits, t.distance(&j, more["volume"])); err != nil {
		return report.Sheet{}, "", err
	}
	return report.TrimSheet(out), j.note, nil
}

// inForce solves the case with the dose that is set.
func (t *trimFlags) inForce(j *job, in *trim.Input, out *report.Trim) error {
	if p := t.set.check("a dose in mg/L", "; or leave the flag away"); p != nil {
		return p
	}
	solved, err := solveJob(*j, entry.NeedDose)
	if err != nil {
		return err
	}
	in.Result, out.Result, out.At = solved, solved, solved.Solved
	if t.set.times == 0 {
		return nil
	}
	dose, err := entry.DoseOf(solved.Dose().Addition.Product, "set", t.set.text)
	if err != nil {
		return err
	}
	kase := withDose(solved, dose)
	kase.Additions[solved.Solved-1].Feed = solved.Case.Additions[solved.Solved-1].Feed
	if in.Result, err = dosing.Solve(kase); err != nil {
		return err
	}
	in.Addition, in.Target, out.Result = solved.Solved-1, solved.Case.Target, in.Result
	return nil
}

// trimTolerances are the plant's own where it has them.
func (j *job) trimTolerances(r *dosing.Result, at int) trim.Tolerances {
	var out trim.Tolerances
	if j.line == nil {
		return out
	}
	share := func(name string, value dosing.Optional) float64 {
		own, ok := j.line.Tolerances[name]
		if !ok || !value.Given || value.Value <= 0 {
			return 0 // the usual one
		}
		return own.Of(value.Value) / value.Value
	}
	read := &r.Case.Readings
	out.RawPH = j.line.Tolerances["ph"].Absolute
	out.FinishedPH = out.RawPH
	out.Alkalinity, out.Flow = share("alkalinity", read.Alkalinity), share("flow", read.Flow)
	out.Strength = share("strength", dosing.Some(r.Stations[at].Addition.Product.Strength))
	return out
}

// limits are the plant's own: those of its file, and over them what was typed.
func (t *trimFlags) limits(j *job, more map[string]dosing.Optional, product dosing.Product) (trim.Limits, error) {
	var l trim.Limits
	if j.line != nil {
		l.StepPH, l.StepDose = j.line.Change.PH, j.line.Change.Dose
		band := j.line.Finished["ph"]
		l.LowPH, l.HighPH = band.Low, band.High
	}
	l.StepPH, l.StepDose = more["step-ph"].Or(l.StepPH), more["step-dose"].Or(l.StepDose)
	for name, place := range map[string]*dosing.Optional{"low-ph": &l.LowPH, "high-ph": &l.HighPH} {
		if more[name].Given {
			*place = more[name]
		}
	}
	if p := t.most.check("a dose in mg/L", "; or leave the flag away"); p != nil {
		return l, p
	}
	if t.most.times > 0 {
		dose, err := entry.DoseOf(product, "most-dose", t.most.text)
		if err != nil {
			return l, err
		}
		l.MostDose = dosing.Some(dose)
	}
	return l, nil
}

// distance is the water between the feed point and the meter.
func (t *trimFlags) distance(j *job, typed dosing.Optional) float64 {
	if !typed.Given && j.line != nil {
		return j.line.Sensor.Value
	}
	return typed.Value
}

// plan chooses the cause to go by and plans its steps; nothing is planned where
// the readings allow the difference and no cause was named, or where the likely
// cause asks for no other setting.
func (t *trimFlags) plan(out *report.Trim, limits trim.Limits, volume float64) error {
	r := out.Report
	reason, err := t.chosen(r)
	if err != nil || reason == nil {
		return err
	}
	from := out.Result.Stations[out.At].Dose
	if reason.Dose.Value == from {
		return nil
	}
	if p := t.explanation.check("a reason in words", "; or leave the flag away"); p != nil {
		return p
	}
	plan, err := trim.Steps(trim.Move{Case: reason.Case, Addition: out.At - 1, From: from, To: reason.Dose.Value,
		Delivered: reason.Delivered, Offset: reason.Offset, Volume: volume, Limits: limits, Reason: reading.Clean(t.explanation.text)})
	if err != nil {
		return inMilligrams(err, out.Result.Stations[out.At].Addition.Product)
	}
	out.For, out.Plan = reason, plan
	return nil
}

// inMilligrams writes the dose that a limit refused as people do.
func inMilligrams(err error, product dosing.Product) error {
	var p *dosing.Problem
	if errors.As(err, &p) && p.Field == "most-dose" && p.Value.Given {
		p.Given = report.Significant(p.Value.Value*product.Chemical.MolarMass*1000, 3) + " mg/L"
	}
	return err
}

// chosen is the cause to go by, nil for none.
func (t *trimFlags) chosen(r *trim.Report) (*trim.Reason, error) {
	var names []string
	for _, reason := range r.Reasons {
		names = append(names, string(reason.Cause))
	}
	wanted := strings.ReplaceAll(strings.ToLower(strings.TrimSpace(t.cause.text)), "-", "_")
	if p := t.cause.check(strings.Join(names, ", "), ""); p != nil {
		return nil, p
	}
	if t.cause.times == 0 && r.Within {
		return nil, nil
	}
	for i := range r.Reasons {
		reason := &r.Reasons[i]
		switch {
		case wanted != "" && string(reason.Cause) != wanted:
			continue
		case reason.Dose.Given:
			return reason, nil
		case wanted != "":
			return nil, &dosing.Problem{Kind: dosing.NoAnswer, Code: "cause_out_of_reach", Field: "cause", Given: wanted, Accepted: "another cause of: " + strings.Join(names, ", ")}
		}
	}
	if wanted != "" {
		return nil, badLine("unknown_cause", "cause", t.cause.text, strings.Join(names, ", "))
	}
	return nil, nil
}
