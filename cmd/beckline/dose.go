package main

import (
	"strings"

	"github.com/spf13/cobra"

	"beckline/dosing"
	"beckline/dosing/batch"
	"beckline/dosing/entry"
	"beckline/dosing/reading"
	"beckline/dosing/report"
)

func doseCommand(c *console) *cobra.Command {
	flags := formFlags{product: typed{most: 2}}
	var plant plantFlags
	var tank commandFlags
	var trust trustFlags
	var asJSON bool
	cmd := &cobra.Command{
		Use:   "dose",
		Short: "readings, a target and a product to the dose and the feed",
		Long: "Finds the dose of a product that brings the water to a target pH, alkalinity,\n" +
			"saturation index, CCPP or inorganic carbon, and its feed and pump setting.\n" +
			"It needs pH (or DIC), alkalinity, temperature, one target and a product; two\n" +
			"products reach two targets together. With --tank it plans the treatment of a\n" +
			"tank in stages. A plant file supplies what is not typed, and its limits hold.\n" +
			"Lime softening (precipitation as treatment) is out of its scope.",
		Example: "  beckline dose --ph 7.0 --alkalinity 30 --temperature 10 --calcium 12 \\\n" +
			"    --flow \"1 MGD\" --target-ph 8.5 --product caustic-50 --pump 15\n" +
			"  beckline dose --ph 6.8 --alkalinity 20 --temperature 8 --flow 240 \\\n" +
			"    --target-ph 8.3 --target-alkalinity 45 \\\n    --product soda-ash --product carbon-dioxide\n" +
			"  beckline dose --ph 11.9 --alkalinity 900 --temperature 18 --target-ph 8.5 \\\n" +
			"    --product sulfuric-93 --tank \"60 m3\"",
		Args: flags.first(noArguments),
		RunE: func(*cobra.Command, []string) error {
			j, err := plant.job(&flags)
			if err != nil {
				return err
			}
			j.trust = trust
			volume, err := tank.get("tank")
			if err != nil {
				return err
			}
			return c.answerJob(j, entry.NeedDose, asJSON, volume)
		},
	}
	flags.add(cmd, reading.Reading, reading.Target, reading.Setting)
	tank.add(cmd, "tank")
	trust.add(cmd)
	flags.addAdditions(cmd)
	flags.addBehind(cmd)
	plant.add(cmd)
	addJSON(cmd, &asJSON)
	return cmd
}

func addJSON(cmd *cobra.Command, asJSON *bool) {
	cmd.Flags().BoolVar(asJSON, "json", false, "answer, or refusal, as JSON")
}

// answer solves a form and writes the answer.
func (c *console) answer(form entry.Form, need entry.Need, asJSON bool) error {
	return c.answerJob(job{form: form}, need, asJSON, dosing.None)
}

// answerJob solves a form on its line and writes the answer; tank, m3, asks for
// the plan of a tank as well.
func (c *console) answerJob(j job, need entry.Need, asJSON bool, tank dosing.Optional) error {
	result, err := solveJob(j, need)
	if err != nil {
		return err
	}
	document, err := planned(result, tank)
	if err != nil {
		return err
	}
	if document, err = j.trust.trusted(document, &j, result); err != nil {
		return err
	}
	c.note(j.note)
	c.noteUnusual(document)
	if !asJSON {
		c.out.WriteString(document.Text())
		return nil
	}
	text, err := document.JSON()
	c.out.Write(text)
	return err
}

// note keeps a line for stderr.
func (c *console) note(line string) {
	if line != "" {
		c.notes = append(c.notes, line)
	}
}

// planned is the document, with the plan of a tank where one is given.
func planned(result *dosing.Result, tank dosing.Optional) (report.Document, error) {
	document := report.New(result)
	if !tank.Given {
		return document, nil
	}
	if len(result.Doses()) != 1 {
		return document, badLine("tank_of_two", "tank", "", "--tank with one product and one target")
	}
	plan, err := batch.Of(result, tank.Value)
	if err != nil {
		return document, err
	}
	return document.WithBatch(plan), nil
}

// solveJob takes a form through to the result. A result whose own checks
// disagree is a failure of the program, never an answer.
func solveJob(j job, need entry.Need) (*dosing.Result, error) {
	kase, err := j.kase(need)
	if err != nil {
		return nil, err
	}
	result, err := dosing.Solve(kase)
	if err != nil {
		return nil, err
	}
	if !report.New(result).Agrees() {
		return nil, &dosing.Problem{Kind: dosing.Failed, Code: "checks_disagree"}
	}
	if need == entry.NeedDose {
		if err := j.withinLimits(result); err != nil {
			return nil, err
		}
	}
	return result, nil
}

// noteUnusual gives the unusual readings a line on stderr: the answer stands,
// but a slip of unit should be seen even where the output is piped away.
func (c *console) noteUnusual(d report.Document) {
	var messages []string
	for _, w := range d.Warnings {
		if strings.HasPrefix(w.Code, "unusual_") {
			messages = append(messages, w.Message)
		}
	}
	if len(messages) > 0 {
		c.note("beckline: " + strings.Join(messages, "; "))
	}
}
