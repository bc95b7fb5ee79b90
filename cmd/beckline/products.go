package main

import (
	"encoding/json"
	"fmt"

	"github.com/spf13/cobra"

	"beckline/dosing"
	"beckline/dosing/report"
)

func productsCommand(c *console) *cobra.Command {
	var asJSON bool
	cmd := &cobra.Command{
		Use:   "products",
		Short: "the products that can be dosed",
		Long: "Lists the catalogue: name, chemical, basis of the dose, default strength,\n" +
			"density at 20 C with its source, purpose. Default strengths are common practice,\n" +
			"no source: enter your own with --strength.",
		Example: "  beckline products",
		Args:    noArguments,
		RunE: func(*cobra.Command, []string) error {
			if !asJSON {
				c.out.WriteString(report.ProductsText(dosing.Products()))
				return nil
			}
			text, err := json.MarshalIndent(map[string]any{"products": report.Products(dosing.Products())}, "", "  ")
			fmt.Fprintf(c.out, "%s\n", text)
			return err
		},
	}
	addJSON(cmd, &asJSON)
	return cmd
}
