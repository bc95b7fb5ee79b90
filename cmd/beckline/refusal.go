package main

import (
	"errors"
	"slices"
	"strings"

	"github.com/spf13/cobra"
	"github.com/spf13/pflag"

	"beckline/dosing"
	"beckline/dosing/entry"
	"beckline/dosing/reading"
)

func badLine(code, field, given, accepted string) error {
	return &dosing.Problem{Kind: dosing.BadInput, Code: code, Field: field, Given: reading.Clean(given), Accepted: accepted}
}

// noSuchCommand refuses a word where a command would stand.
func noSuchCommand(cmd *cobra.Command, args []string) error {
	if len(args) == 0 {
		return nil
	}
	names := commandNames(cmd)
	if strings.TrimSpace(args[0]) == "" {
		return badLine(reading.CodeEmpty, "command", "", strings.Join(names, ", "))
	}
	return badLine("unknown_command", "command", args[0], nearest("", args[0], names, strings.Join(names, ", "))+"; see "+helpOf(cmd))
}

func commandNames(cmd *cobra.Command) []string {
	var names []string
	for _, sub := range cmd.Commands() {
		if sub.IsAvailableCommand() || sub.Name() == "help" {
			names = append(names, sub.Name())
		}
	}
	return names
}

// noArguments refuses words that belong to no flag.
func noArguments(cmd *cobra.Command, args []string) error {
	if len(args) == 0 {
		return nil
	}
	accepted := "no words after " + strings.TrimPrefix(cmd.CommandPath(), "beckline ")
	if cmd.Flags().Lookup("flow") != nil {
		accepted = "flags only; a value with a space is quoted: --flow \"1 MGD\""
	}
	return badLine("stray_word", cmd.Name(), args[0], accepted+"; see "+helpOf(cmd))
}

func atMostOneFile(cmd *cobra.Command, args []string) error {
	if len(args) <= 1 {
		return nil
	}
	return badLine("stray_word", cmd.Name(), args[1], "one file, or - for standard input")
}

// flagProblem rewrites what the flag library says.
func flagProblem(cmd *cobra.Command, err error) error {
	var unknown *pflag.NotExistError
	var valueless *pflag.ValueRequiredError
	var invalid *pflag.InvalidValueError
	switch {
	case errors.Is(err, pflag.ErrHelp):
		return err
	case errors.As(err, &unknown):
		if words := leading(cmd); !cmd.HasParent() && words != "" {
			return noSuchCommand(cmd, []string{words})
		}
		given := strings.Repeat("-", min(2, len(unknown.GetSpecifiedName()))) + unknown.GetSpecifiedName()
		if shorts := unknown.GetSpecifiedShortnames(); shorts != "" {
			given = "-" + shorts
		}
		name := strings.TrimLeft(given, "-")
		if !cmd.HasParent() && slices.Contains(commandNames(cmd), name) {
			return badLine("unknown_flag", "flag", given, "the command beckline "+name)
		}
		return badLine("unknown_flag", "flag", given, nearest("--", name, flagNames(cmd), "flags as listed")+"; see "+helpOf(cmd))
	case errors.As(err, &valueless):
		return badLine("no_value", valueless.GetFlag().Name, "", wantedBy(valueless.GetFlag()))
	case errors.As(err, &invalid):
		return badLine("bad_value", invalid.GetFlag().Name, invalid.GetValue(), "true or false, or the flag alone")
	}
	return badLine("bad_flag", "flag", clean(err.Error()), "flags as in "+helpOf(cmd))
}

// wantedBy is what a flag with a value accepts.
func wantedBy(flag *pflag.Flag) string {
	if field, ok := reading.Lookup(flag.Name); ok {
		return field.Accepted()
	}
	if field, ok := reading.Command(flag.Name); ok {
		return field.Accepted()
	}
	switch flag.Name {
	case reading.DoseField, "then":
		return reading.DoseForm
	case "product", "choose":
		return productWanted
	}
	return flag.Usage
}

// leading is the word in a command's place, where the command line starts with
// one that is no command: its flags are then nobody's.
func leading(root *cobra.Command) string {
	if first := root.Annotations[firstWord]; !strings.HasPrefix(first, "-") {
		return first
	}
	return ""
}

// firstWord is the annotation of the root that holds the first argument.
const firstWord = "first"

func helpOf(cmd *cobra.Command) string {
	if !cmd.HasParent() {
		return "beckline help"
	}
	return "beckline help " + strings.TrimPrefix(cmd.CommandPath(), "beckline ")
}

func flagNames(cmd *cobra.Command) []string {
	var names []string
	cmd.Flags().VisitAll(func(f *pflag.Flag) {
		if !f.Hidden {
			names = append(names, f.Name)
		}
	})
	return names
}

// nearest offers the names that come next to a word that is none of them, or
// something else where none comes near.
func nearest(prefix, wanted string, names []string, instead string) string {
	near := entry.Likely(wanted, names, 3)
	if len(near) == 0 {
		return instead
	}
	for i := range near {
		near[i] = prefix + near[i]
	}
	return "nearest is " + strings.Join(near, " or ")
}
