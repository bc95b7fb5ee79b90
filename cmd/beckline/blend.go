package main

import (
	"errors"
	"strings"

	"github.com/spf13/cobra"

	"beckline/dosing"
	"beckline/dosing/entry"
	"beckline/dosing/reading"
	"beckline/dosing/report"
)

func blendCommand(c *console) *cobra.Command {
	var flags formFlags
	var plant plantFlags
	var asJSON bool
	cmd := &cobra.Command{
		Use:   "blend",
		Short: "waters to their blend, or to the share that meets a target",
		Long: "Mixes waters by flow. Alkalinity, carbon and ions add up; the pH is solved from\n" +
			"them and is not a mean. With two waters and a target it finds the share of the\n" +
			"first one with which the blend meets it; their flows may then be left away.\n" +
			"With a plant file the waters are those of a line's blend.",
		Example: "  beckline blend \\\n    --source \"well; flow=200; ph=7.15; alkalinity=285; temperature=11.5\" \\\n" +
			"    --source \"softened; flow=300; ph=9.95; alkalinity=62; temperature=11.5\"",
		Args: flags.first(noArguments),
		RunE: func(*cobra.Command, []string) error {
			j, err := plant.job(&flags)
			if err != nil {
				return err
			}
			return c.blend(j, asJSON)
		},
	}
	flags.addTargets(cmd)
	flags.addSources(cmd)
	plant.add(cmd)
	addJSON(cmd, &asJSON)
	return cmd
}

func (c *console) blend(j job, asJSON bool) error {
	if len(j.form.Sources) < 2 && (j.line == nil || len(j.line.Shares) < 2) {
		return badLine("two_sources_needed", "source", strings.Join(j.form.Sources, ""), "two or more --source, or a line of a plant file that blends")
	}
	target, err := j.form.Target()
	if err != nil {
		return err
	}
	j.form.Adds = nil
	byShare := target.Kind != dosing.NoTarget
	flowless := byShare && len(j.form.Sources) == 2 && anyWithoutFlow(j.form.Sources)
	if flowless {
		for i, text := range j.form.Sources { // any two that are not zero: the share is what is asked for
			j.form.Sources[i] = withoutFlow(text) + "; flow=1"
		}
	}
	kase, err := j.kase(entry.NeedWater)
	if err != nil {
		return err
	}
	if byShare && len(kase.Sources) != 2 {
		return badLine("two_sources_needed", target.Kind.Field(), "", "exactly two sources, so that there is one share to find")
	}
	var mixed, meets *dosing.Result
	if !flowless {
		if mixed, err = dosing.Solve(kase); err != nil {
			return err
		}
	}
	share := 0.0
	if byShare {
		kase.Target = target
		if share, err = dosing.ShareToMeet(kase); err != nil {
			return ofBlend(err)
		}
		kase.Target = dosing.Target{}
		kase.Sources = append([]dosing.Source(nil), kase.Sources...)
		kase.Sources[0].Flow, kase.Sources[1].Flow = dosing.Some(share), dosing.Some(1-share)
		if meets, err = dosing.Solve(kase); err != nil {
			return err
		}
	}
	answer := report.NewBlend(mixed, meets, target, share)
	if !answer.Agrees() {
		return &dosing.Problem{Kind: dosing.Failed, Code: "checks_disagree"}
	}
	c.note(j.note)
	if !asJSON {
		c.out.WriteString(answer.Text())
		return nil
	}
	text, err := answer.JSON()
	c.out.Write(text)
	return err
}

// ofBlend says of a target out of reach that it is the share, not a product,
// that does not reach it.
func ofBlend(err error) error {
	var p *dosing.Problem
	if errors.As(err, &p) && p.Code == "out_of_reach" {
		q := *p
		q.Code = "blend_out_of_reach"
		return &q
	}
	return err
}

func anyWithoutFlow(sources []string) bool {
	for _, text := range sources {
		if withoutFlow(text) == text {
			return true
		}
	}
	return false
}

// withoutFlow leaves out the part of a source that is its flow.
func withoutFlow(text string) string {
	parts := strings.Split(text, ";")
	kept := parts[:0:0]
	for _, part := range parts {
		if name, _, _ := strings.Cut(part, "="); !strings.EqualFold(strings.TrimSpace(name), "flow") {
			kept = append(kept, part)
		}
	}
	return strings.Join(kept, ";")
}

// addTargets offers targets without a product.
func (f *formFlags) addTargets(cmd *cobra.Command) {
	for _, field := range reading.Fields() {
		if field.Group == reading.Target {
			t := &typed{name: field.Name, unit: orWord(reading.ASCII(field.Bare), "number")}
			f.fields = append(f.fields, t)
			cmd.Flags().Var(t, field.Name, reading.ASCII(field.Help))
		}
	}
	cmd.Flags().SortFlags = false
}
