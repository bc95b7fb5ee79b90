package main

import (
	"encoding/json"
	"fmt"

	"github.com/spf13/cobra"

	"beckline/dosing/caution"
	"beckline/dosing/entry"
)

func cautionsCommand(c *console) *cobra.Command {
	var asJSON bool
	cmd := &cobra.Command{
		Use:   "cautions product...",
		Short: "handling of a product: hazards, eyewash, storage, freezing",
		Long: "Shows the safety sheet of each product named, and what they must not meet.\n" +
			"Local codes, product labels and the licensed operator come first.",
		Example:           "  beckline cautions caustic-25\n  beckline cautions sulfuric-93 hypochlorite-12",
		ValidArgsFunction: completeProducts,
		RunE: func(cmd *cobra.Command, args []string) error {
			if len(args) == 0 {
				return badLine("missing", "product", "", "one or more names of beckline products, such as caustic-25")
			}
			return c.cautions(args, asJSON)
		},
	}
	addJSON(cmd, &asJSON)
	return cmd
}

func (c *console) cautions(names []string, asJSON bool) error {
	sheets := make([]caution.Sheet, len(names))
	keys := make([]string, len(names))
	for i, name := range names {
		product, err := entry.ProductNamed(name)
		if err != nil {
			return err
		}
		sheets[i], keys[i] = caution.Of(product), product.Caution
	}
	combined := caution.Combined(keys)
	if asJSON {
		type sheet struct {
			Product string   `json:"product"`
			Title   string   `json:"title"`
			Short   []string `json:"short"`
			Text    string   `json:"text"`
		}
		list := make([]sheet, len(sheets))
		for i, s := range sheets {
			list[i] = sheet{names[i], s.Title, s.Short, s.Text()}
		}
		text, err := json.MarshalIndent(map[string]any{"cautions": list, "combined": combined,
			"decides": caution.Deferral}, "", "  ")
		fmt.Fprintf(c.out, "%s\n", text)
		return err
	}
	if len(combined) > 0 {
		c.out.WriteString("Together in one works\n")
		for _, line := range combined {
			fmt.Fprintf(c.out, "  - %s\n", line)
		}
		c.out.WriteByte('\n')
	}
	for i, s := range sheets {
		if i > 0 {
			c.out.WriteByte('\n')
		}
		c.out.WriteString(s.Text())
	}
	return nil
}
