package main

import (
	"errors"
	"fmt"
	"io"
	"os"
	"strings"
	"syscall"

	"github.com/spf13/cobra"

	"beckline/dosing"
	"beckline/dosing/entry"
	"beckline/dosing/reading"
	"beckline/dosing/table"
)

func rowsCommand(c *console) *cobra.Command {
	flags := formFlags{product: typed{most: 2}}
	var plant plantFlags
	var options table.Options
	var trust trustFlags
	var waterOnly, asJSON bool
	cmd := &cobra.Command{
		Use:   "rows [file]",
		Short: "CSV of readings in, the same rows with answers out",
		Long: "Answers every row of a CSV file (or of standard input) and writes the rows in\n" +
			"their order with the answer's columns after them. The first row names the\n" +
			"columns; each name gives the unit. A flag supplies a column that the file lacks.\n" +
			"A raw figure that the file already has as a reading is not repeated.\n" +
			"A semicolon-separated file with decimal commas is answered in kind. A row that\n" +
			"has no answer keeps its place, with the reason in the column problem.",
		Example: "  beckline rows --product caustic-25 --target-ph 8.4 readings.csv > answers.csv\n\n" +
			"Columns that are read\n" + columnNames(),
		Args: flags.first(atMostOneFile),
		ValidArgsFunction: func(*cobra.Command, []string, string) ([]cobra.Completion, cobra.ShellCompDirective) {
			return []cobra.Completion{"csv"}, cobra.ShellCompDirectiveFilterFileExt
		},
		RunE: func(_ *cobra.Command, args []string) error {
			form, err := flags.form()
			if err != nil {
				return err
			}
			options.Form, options.Need = form, entry.NeedDose
			if err := plant.rows(&flags, &options); err != nil {
				return err
			}
			if err := trust.rows(&options); err != nil {
				return err
			}
			if waterOnly {
				options.Need = entry.NeedWater
				if err := noDose(form); err != nil {
					return err
				}
				options.Defaults = entry.Form{}
				options.Form.Adds = form.Adds
			}
			c.note(rowsNote(&options))
			return c.rows(args, options)
		},
	}
	flags.add(cmd, reading.Reading, reading.Target, reading.Setting)
	flags.addFixed(cmd)
	plant.add(cmd)
	trust.addTolerances(cmd)
	cmd.Flags().BoolVar(&waterOnly, "water", false, "the water's figures only, no dose")
	cmd.Flags().BoolVar(&options.Strict, "strict", false, "stop at the first row with a problem")
	cmd.Flags().BoolVar(&asJSON, "json", false, "a refusal as JSON; the rows stay CSV")
	return cmd
}

// noDose refuses flags that a dose would need where only the waters are asked
// for; columns of that kind may be there for other runs.
func noDose(form entry.Form) error {
	const accepted = "--water alone, or a dose without it"
	for _, f := range reading.Fields() {
		if text, given := form.Values[f.Name]; given && f.Group != reading.Reading {
			return badLine("not_with_water", f.Name, text, accepted)
		}
	}
	if form.Product != "" {
		return badLine("not_with_water", "product", form.Product, accepted)
	}
	return nil
}

// columnNames lists the columns for the help text.
func columnNames() string {
	names := []string{}
	for _, f := range reading.Fields() {
		names = append(names, f.Key)
	}
	var b strings.Builder
	line := " "
	for _, name := range append(names, "product") {
		if len(line)+1+len(name) > helpWidth {
			b.WriteString(line + "\n")
			line = " "
		}
		line += " " + name
	}
	return b.String() + line
}

func (c *console) rows(args []string, options table.Options) error {
	in := c.in
	if len(args) == 0 && isTerminal(in) {
		return badLine("no_input", "file", "", "the name of a CSV file, a file piped in, or - to type rows here")
	}
	if len(args) == 1 && args[0] != "-" {
		f, err := openFile(args[0])
		if err != nil {
			return err
		}
		defer f.Close()
		in = f
	}
	if c.progress != nil {
		options.Progress = func(rows int) { fmt.Fprintf(c.progress, "\rbeckline: %d rows", rows) }
		defer fmt.Fprint(c.progress, "\r                              \r")
	}
	sum, err := table.Run(in, c.direct, options)
	if err != nil {
		return err
	}
	if sum.Problems > 0 || sum.Unusual > 0 {
		c.notes = append(c.notes, fmt.Sprintf("beckline: rows read: %d, with a problem: %d, with an unusual reading: %d",
			sum.Rows, sum.Problems, sum.Unusual))
	}
	return nil
}

// openFile opens a file to read. That it is not there is a slip of the command
// line; that it cannot be read is not.
func openFile(name string) (io.ReadCloser, error) {
	bad := func(code string) error {
		return &dosing.Problem{Kind: dosing.BadInput, Code: code, Field: "file", Given: reading.Clean(name),
			Accepted: "a CSV file that can be read, or - for standard input"}
	}
	f, err := os.Open(name)
	switch {
	case errors.Is(err, os.ErrNotExist), errors.Is(err, syscall.ENOTDIR), errors.Is(err, syscall.ENAMETOOLONG),
		strings.ContainsRune(name, 0):
		return nil, bad("no_such_file")
	case errors.Is(err, os.ErrPermission):
		return nil, bad("not_permitted")
	case err != nil:
		return nil, err
	}
	if info, err := f.Stat(); err == nil && info.IsDir() {
		f.Close()
		return nil, bad("is_a_folder")
	}
	return f, nil
}
