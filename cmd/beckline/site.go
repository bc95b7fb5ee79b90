package main

import (
	"encoding/json"
	"fmt"
	"strings"

	"github.com/spf13/cobra"

	"beckline/dosing/site"
)

func siteCommand(c *console) *cobra.Command {
	cmd := &cobra.Command{
		Use:   "site",
		Short: "the plant file: write one, show what it says",
		Long: "The plant file (TOML) says what a works has and wants: products with their own\n" +
			"strength, density and price, pumps, tanks, sources, treatment lines, limits.\n" +
			"Its usual place is " + shortPlace() + ".",
		Example: "  beckline site new\n  beckline site show",
		Args:    noSuchCommand,
		RunE:    func(cmd *cobra.Command, _ []string) error { return cmd.Help() },
	}
	cmd.AddCommand(siteNewCommand(c), siteShowCommand(c))
	return cmd
}

// shortPlace names the usual place without the home folder of whoever asks, so
// that help and manual are the same everywhere.
func shortPlace() string { return "beckline/site.toml in the settings folder ($XDG_CONFIG_HOME)" }

func siteNewCommand(c *console) *cobra.Command {
	var asJSON bool
	cmd := &cobra.Command{
		Use:   "new [file]",
		Short: "writes a commented plant file to start from",
		Long: "Writes a commented plant file of an invented works, in its usual place or in the\n" +
			"file named. It never replaces a file.",
		Example: "  beckline site new upland.toml",
		Args:    atMostOneFile,
		ValidArgsFunction: func(*cobra.Command, []string, string) ([]cobra.Completion, cobra.ShellCompDirective) {
			return []cobra.Completion{"toml"}, cobra.ShellCompDirectiveFilterFileExt
		},
		RunE: func(_ *cobra.Command, args []string) error {
			name := ""
			if len(args) == 1 {
				name = args[0]
			}
			path, err := site.Create(name)
			if err != nil {
				return siteProblem(err)
			}
			if asJSON {
				return c.writeJSON(map[string]string{"written": path})
			}
			fmt.Fprintf(c.out, "written: %s\nChange what is not so at your works, then: %s\n", path, strings.TrimSpace("beckline site show "+name))
			return nil
		},
	}
	addJSON(cmd, &asJSON)
	return cmd
}

func siteShowCommand(c *console) *cobra.Command {
	var plant typed
	var asJSON bool
	cmd := &cobra.Command{
		Use:   "show [file]",
		Short: "every value that holds, and where it comes from",
		Long: "Reads a plant file, the one in its usual place or the one named, and lists every\n" +
			"value that holds with the line that it comes from, then those that are built in.",
		Example: "  beckline site show upland.toml",
		Args:    atMostOneFile,
		ValidArgsFunction: func(*cobra.Command, []string, string) ([]cobra.Completion, cobra.ShellCompDirective) {
			return []cobra.Completion{"toml"}, cobra.ShellCompDirectiveFilterFileExt
		},
		RunE: func(_ *cobra.Command, args []string) error {
			if p := plant.check("the name of a plant file", ""); p != nil {
				return p
			}
			name := plant.text
			if len(args) == 1 {
				if plant.times > 0 {
					return badLine("given_twice", "site", args[0], "one plant file")
				}
				name = args[0]
			}
			s, err := openSite(name)
			if err != nil {
				return err
			}
			if !asJSON {
				fmt.Fprintf(c.out, "%s\n%s", s.Path, s.Table())
				return nil
			}
			type note struct {
				Line int    `json:"line"`
				Key  string `json:"key"`
				Text string `json:"text"`
			}
			notes := []note{}
			for _, n := range s.Notes {
				notes = append(notes, note(n))
			}
			return c.writeJSON(map[string]any{"file": s.Path, "values": s.Show(), "notes": notes})
		},
	}
	plant = typed{name: "site", unit: "file"}
	cmd.Flags().Var(&plant, "site", "plant file; the same as naming it without a flag")
	_ = cmd.MarkFlagFilename("site", "toml") // the flag is there, so this cannot fail
	addJSON(cmd, &asJSON)
	return cmd
}

// writeJSON writes a value as indented JSON.
func (c *console) writeJSON(v any) error {
	e := json.NewEncoder(c.out)
	e.SetEscapeHTML(false)
	e.SetIndent("", "  ")
	return e.Encode(v)
}
