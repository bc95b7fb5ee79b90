package main

import (
	"errors"
	"fmt"
	"strings"

	"github.com/spf13/cobra"

	"beckline/dosing"
	"beckline/dosing/reading"
	"beckline/dosing/report"
	"beckline/dosing/titration"
	"beckline/tui"
)

// titrateCommand holds one command a method of the bench. Each writes the
// reading that comes of it, the sum written out, and the flag to copy.
func titrateCommand(c *console) *cobra.Command {
	cmd := &cobra.Command{
		Use:   "titrate",
		Short: "what was read on the bench to a reading",
		Long: "Turns burettes, titration curves and meters into the readings that the other\n" +
			"commands take, with the sum written out for the log.\n" +
			"Titrants are acids and indicators may stain or poison: eye protection, the\n" +
			"reagent's label and the laboratory's own rules come first.",
		Example: "  beckline titrate alkalinity --sample 100 --normality 0.02 --end 12.4",
		Args:    noSuchCommand,
		RunE:    func(cmd *cobra.Command, _ []string) error { return cmd.Help() },
	}
	cmd.AddCommand(titrateAlkalinityCommand(c), titrateHardnessCommand(c), titrateGranCommand(c),
		titrateConductivityCommand(c), titrateCarbonCommand(c), titrateIonsCommand(c), titrateMeterCommand(c))
	return cmd
}

// outcome is what a method gives.
type outcome struct {
	method  string
	figures []benchFigure
	working string
	notes   []titration.Note
}

// benchFigure is one figure of an outcome. copyable ones are flags of the other
// commands.
type benchFigure struct {
	key, label string
	value      float64 // in the unit of the key
	shown      string  // with its unit
	flag       string  // "--alkalinity 24.3", "" where there is none
}

// reads makes the figure of a reading from its SI value.
func reads(name, label string, si float64, copyable bool) benchFigure {
	f := quantity(name)
	shown := f.Show(si)
	b := benchFigure{key: f.Key, label: label, value: f.ToBare(si), shown: strings.TrimSpace(shown + " " + reading.ASCII(f.Bare))}
	if copyable {
		b.flag = "--" + name + " " + shown
	}
	return b
}

// write writes an outcome.
func (c *console) write(o outcome, asJSON bool) error {
	if asJSON {
		return c.writeOutcomeJSON(o)
	}
	var flags []string
	for _, f := range o.figures {
		fmt.Fprintf(c.out, "%-28s %s\n", f.label, f.shown)
		if f.flag != "" {
			flags = append(flags, f.flag)
			name, text, _ := strings.Cut(strings.TrimPrefix(f.flag, "--"), " ")
			c.gives = append(c.gives, tui.Given{Name: name, Text: text})
		}
	}
	if o.working != "" {
		fmt.Fprintf(c.out, "\nworking  %s\n", o.working)
	}
	if len(flags) > 0 {
		fmt.Fprintf(c.out, "copy     %s\n", strings.Join(flags, " "))
	}
	for _, n := range o.notes {
		c.out.WriteString(report.Wrap("  - "+n.Field+": "+report.ASCII(n.Text), 78) + "\n")
	}
	return nil
}

func (c *console) writeOutcomeJSON(o outcome) error {
	type warning struct {
		Code    string `json:"code"`
		Field   string `json:"field"`
		Message string `json:"message"`
	}
	object := map[string]any{"method": o.method, "working": o.working}
	for _, f := range o.figures {
		object[f.key] = report.Some(f.value)
	}
	warnings := []warning{}
	for _, n := range o.notes {
		warnings = append(warnings, warning{n.Code, n.Field, n.Text})
	}
	object["warnings"] = warnings
	return c.writeJSON(object)
}

// benchProblem carries over a refusal of the bench.
func benchProblem(err error) error {
	var e *titration.Error
	if errors.As(err, &e) {
		kind := dosing.BadInput
		if e.Code == "solver_failed" {
			kind = dosing.Failed
		}
		return &dosing.Problem{Kind: kind, Code: e.Code, Field: e.Field, Given: reading.Clean(e.Given), Accepted: e.Accepted}
	}
	return err
}

const mL = 1e6 // in a m3

// burette reads what most methods share: sample, start and end or the volume used.
func burette(q *commandFlags) (sampleML float64, titre titration.Titre, err error) {
	sample, err := q.need("sample")
	if err != nil {
		return 0, titre, err
	}
	start, err := q.get("start")
	if err != nil {
		return 0, titre, err
	}
	end, err := q.get("end")
	if err != nil {
		return 0, titre, err
	}
	used, err := q.get("used")
	if err != nil {
		return 0, titre, err
	}
	switch {
	case used.Given && (end.Given || start.Given):
		return 0, titre, badLine("given_twice", "used", "", "either start and end, or used")
	case used.Given:
		titre = titration.Used(used.Value * mL)
	case end.Given:
		titre = titration.Titre{StartML: start.Or(0) * mL, EndML: end.Value * mL}
	default:
		return 0, titre, badLine("missing", "end", "", reading.ASCII(quantity("end").Accepted())+"; or --used")
	}
	return sample * mL, titre, nil
}
