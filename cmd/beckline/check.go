package main

import (
	"fmt"

	"github.com/spf13/cobra"

	"beckline/dosing"
	"beckline/dosing/check"
)

func checkCommand(c *console) *cobra.Command {
	var asJSON bool
	cmd := &cobra.Command{
		Use:   "check",
		Short: "recompute the published comparisons inside the program",
		Long: "Recomputes standard buffers, constants, saturation figures, stoichiometry and\n" +
			"feed arithmetic, and compares each with its published value, so that a plant can\n" +
			"prove its own copy right. The exit code is 0 only if all agree, else 3.\n" +
			"\"from memory\" marks a value that was recalled, not read on a page.",
		Example: "  beckline check",
		Args:    noArguments,
		RunE: func(*cobra.Command, []string) error {
			outcomes, err := check.Run()
			if err != nil {
				return err
			}
			if err := disagreement(outcomes); err != nil {
				return err
			}
			if asJSON {
				text, err := check.JSON(outcomes)
				c.out.Write(text)
				return err
			}
			c.out.WriteString(check.Text(outcomes))
			return nil
		},
	}
	addJSON(cmd, &asJSON)
	return cmd
}

// disagreement is the refusal where a value does not agree: the copy is not to
// be trusted.
func disagreement(outcomes []check.Outcome) error {
	var bad []check.Outcome
	for _, o := range outcomes {
		if !o.Agrees() {
			bad = append(bad, o)
		}
	}
	if len(bad) == 0 {
		return nil
	}
	first := bad[0]
	return &dosing.Problem{Kind: dosing.Failed, Code: "published_values_disagree", Field: "check",
		Given: fmt.Sprintf("%s: %.6g", first.Name, first.Value),
		Accepted: fmt.Sprintf("%.6g within %.2g; %d of %d comparisons do not agree", first.Published, first.Tolerance,
			len(bad), len(outcomes))}
}
