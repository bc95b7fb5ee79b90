package main

import (
	"bytes"
	"fmt"
	"strings"

	"github.com/spf13/cobra"
	"github.com/spf13/pflag"

	"beckline/dosing/reading"
)

// helpWidth is the widest line of a help text, in columns.
const helpWidth = 79

// flagGroups are the parts in which a command's flags are listed.
var flagGroups = []struct {
	group reading.Group
	title string
}{
	{reading.Reading, "Readings: a bare number has the unit shown, other units are written out"},
	{reading.Target, "Target: one a product"},
	{reading.Setting, "Product and pump"},
	{0, "Other"},
}

// helpCommand is "beckline help [command]".
func helpCommand(c *console) *cobra.Command {
	return &cobra.Command{
		Use:     "help [command]",
		Short:   "help on a command",
		Long:    "Says what a command does, with its flags and an example.",
		Example: "  beckline help dose",
		RunE: func(cmd *cobra.Command, args []string) error {
			root := cmd.Root()
			target, rest, err := root.Find(args)
			if err != nil || target == nil {
				return noSuchCommand(root, args)
			}
			if len(rest) > 0 && target.HasAvailableSubCommands() {
				return noSuchCommand(target, rest)
			}
			if len(rest) > 0 {
				return badLine("stray_word", "help", rest[0], "one command, such as beckline help "+target.Name())
			}
			writeHelp(c.out, target)
			return nil
		},
	}
}

// writeHelp writes the help text of a command.
func writeHelp(b *bytes.Buffer, cmd *cobra.Command) {
	fmt.Fprintf(b, "beckline%s - %s\n\n", strings.TrimPrefix(cmd.CommandPath(), "beckline"), cmd.Short)
	if cmd.Long != "" && cmd.Long != cmd.Short {
		b.WriteString(cmd.Long + "\n\n")
	}
	if cmd.Example != "" {
		b.WriteString("Example\n" + cmd.Example + "\n\n")
	}
	writeCommands(b, cmd)
	for _, g := range flagGroups {
		writeFlags(b, cmd, g.group, g.title)
	}
	if !cmd.HasParent() {
		b.WriteString("More on a command: beckline help dose\n" +
			"Exit codes: 0 answered, 1 the readings are fine and there is no answer,\n" +
			"2 something given cannot be used, 3 the program failed.\n")
	}
	text := bytes.TrimRight(b.Bytes(), "\n")
	b.Truncate(len(text))
	b.WriteByte('\n')
}

func writeCommands(b *bytes.Buffer, cmd *cobra.Command) {
	if !cmd.HasAvailableSubCommands() {
		return
	}
	b.WriteString("Commands\n")
	for _, sub := range cmd.Commands() {
		if sub.IsAvailableCommand() || sub.Name() == "help" {
			fmt.Fprintf(b, "  %-12s %s\n", sub.Name(), sub.Short)
		}
	}
	b.WriteByte('\n')
}

func writeFlags(b *bytes.Buffer, cmd *cobra.Command, group reading.Group, title string) {
	var lines []string
	cmd.Flags().VisitAll(func(f *pflag.Flag) {
		if f.Hidden || f.Name == "help" || groupOf(f) != group {
			return
		}
		lines = append(lines, flagLine(f))
	})
	if len(lines) == 0 {
		return
	}
	b.WriteString(title + "\n" + strings.Join(lines, "\n") + "\n\n")
}

// arrayUnits says what a flag holds that is repeated, where not product=dose.
var arrayUnits = map[string]string{
	"source": "water", "price": "product=price", "limit": "figure=range", "use-level": "product=mg/L", "pump-of": "product=L/h",
	"draw": "volume and time", "point": "dose=pH",
}

// flagLine is one flag: its name and unit, and what it is, broken to the width.
func flagLine(f *pflag.Flag) string {
	const column = 38
	unit := f.Value.Type()
	switch unit {
	case "bool":
		unit = ""
	case "stringArray":
		unit = orWord(arrayUnits[f.Name], "product=dose")
	}
	head := strings.TrimRight(fmt.Sprintf("  --%s  %s", f.Name, unit), " ")
	if len(head) > column-2 {
		head += "\n" + strings.Repeat(" ", column)
	} else {
		head += strings.Repeat(" ", column-len(head))
	}
	used := column
	var text strings.Builder
	for i, word := range strings.Fields(f.Usage) {
		switch {
		case i == 0:
		case used+1+len(word) > helpWidth:
			text.WriteString("\n" + strings.Repeat(" ", column))
			used = column
		default:
			text.WriteByte(' ')
			used++
		}
		text.WriteString(word)
		used += len(word)
	}
	return head + text.String()
}
