package main

import (
	"github.com/spf13/cobra"

	"beckline/dosing"
	"beckline/dosing/entry"
	"beckline/dosing/reading"
)

func waterCommand(c *console) *cobra.Command {
	var flags formFlags
	var plant plantFlags
	var asJSON bool
	cmd := &cobra.Command{
		Use:   "water",
		Short: "readings to everything about that water",
		Long: "Says what the readings imply: inorganic carbon, free CO2, saturation index,\n" +
			"CCPP, buffer intensity and the rest.\n" +
			"It needs pH (or DIC), alkalinity and temperature.",
		Example: "  beckline water --ph 7.4 --alkalinity \"12 dH\" --temperature \"52 F\" --calcium 80",
		Args:    flags.first(noArguments),
		RunE: func(*cobra.Command, []string) error {
			j, err := plant.job(&flags)
			if err != nil {
				return err
			}
			if len(flags.adds) == 0 {
				j.form.Adds = nil // the water itself, not what the plant does to it
			}
			return c.answerJob(j, entry.NeedWater, asJSON, dosing.None)
		},
	}
	flags.add(cmd, reading.Reading)
	flags.addAdditions(cmd)
	plant.add(cmd)
	addJSON(cmd, &asJSON)
	return cmd
}
