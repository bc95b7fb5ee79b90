package main

import (
	"bytes"
	"strings"

	"github.com/spf13/cobra"
	"github.com/spf13/pflag"

	"beckline/dosing/reading"
)

// manCommand writes the manual page from the same table as the help texts. The
// command library's own generator is not used: it would bring a Markdown
// library into the binary for one page.
func manCommand(c *console) *cobra.Command {
	return &cobra.Command{
		Use:     "man",
		Short:   "the manual page, for man(1)",
		Long:    "Writes the manual page in roff.",
		Example: "  beckline man > /usr/local/share/man/man1/beckline.1",
		Args:    noArguments,
		RunE: func(cmd *cobra.Command, _ []string) error {
			writeManual(c.out, cmd.Root())
			return nil
		},
	}
}

func writeManual(b *bytes.Buffer, root *cobra.Command) {
	b.WriteString(".TH BECKLINE 1\n.SH NAME\nbeckline \\- " + roff(root.Short) + "\n")
	b.WriteString(".SH SYNOPSIS\n.B beckline\n.RI [ command ]\n.RI [ flags ]\n")
	b.WriteString(".SH DESCRIPTION\n" + roff(root.Long) + "\n")
	b.WriteString(".SH COMMANDS\n")
	for _, cmd := range root.Commands() {
		if !cmd.IsAvailableCommand() {
			continue
		}
		writeManualCommand(b, cmd)
		if cmd.Name() == "completion" {
			continue // its shells say no more than it does
		}
		for _, sub := range cmd.Commands() {
			writeManualCommand(b, sub)
		}
	}
	b.WriteString(".SH READINGS, TARGETS AND SETTINGS\n" +
		"A flag takes a value with or without its unit; a CSV column is in the unit of its name.\n")
	for _, f := range reading.Fields() {
		b.WriteString(".TP\n.BI \\-\\-" + roff(f.Name) + " \" " + roff(orWord(reading.ASCII(f.Bare), "number")) + "\"\n" +
			roff(reading.ASCII(f.Help)) + ". Column " + roff(f.Key) + ". Accepted: " + roff(reading.ASCII(f.Accepted())) + ".\n")
	}
	b.WriteString(`.SH EXIT STATUS
.TP
.B 0
answered
.TP
.B 1
the readings are fine and there is no answer: out of reach, target met or on the wrong side, pump too small
.TP
.B 2
something given cannot be used: unreadable, missing, outside its limits, unknown, or contradicting another reading
.TP
.B 3
the program failed
.PP
Other than 0, standard output is empty (rows keeps the rows it has written) and standard error has one line, or with
.B \-\-json
one object.
.SH SAFETY
The figures are for the licensed operator to judge.
Local codes, product labels and certified maximum use levels come first.
See
.B beckline cautions
for each product.
`)
}

func writeManualCommand(b *bytes.Buffer, cmd *cobra.Command) {
	use := cmd.Use
	if parent := cmd.Parent(); parent != nil && parent.HasParent() {
		use = parent.Name() + " " + use
	}
	b.WriteString(".SS beckline " + roff(use) + "\n" + roff(cmd.Long) + "\n")
	writeManualFlags(b, cmd)
	if cmd.Example != "" {
		b.WriteString(".PP\n.nf\n" + roff(cmd.Example) + "\n.fi\n")
	}
}

// writeManualFlags lists the flags of a command that are not readings.
func writeManualFlags(b *bytes.Buffer, cmd *cobra.Command) {
	fields := false
	cmd.Flags().VisitAll(func(f *pflag.Flag) {
		if _, ok := reading.Lookup(f.Name); ok {
			fields = true
			return
		}
		if f.Name != "help" && !f.Hidden {
			b.WriteString(".TP\n.B \\-\\-" + roff(f.Name) + "\n" + roff(f.Usage) + "\n")
		}
	})
	if fields {
		b.WriteString(".PP\nThe flags of readings, targets and settings are listed below.\n")
	}
}

// roff makes text safe for the manual: backslashes, hyphens, and lines that
// start with a control character.
func roff(s string) string {
	s = strings.NewReplacer(`\`, `\e`, "-", `\-`).Replace(s)
	lines := strings.Split(s, "\n")
	for i, line := range lines {
		if strings.HasPrefix(line, ".") || strings.HasPrefix(line, "'") {
			lines[i] = `\&` + line
		}
	}
	return strings.Join(lines, "\n")
}
