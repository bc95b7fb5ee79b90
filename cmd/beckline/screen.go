package main

import (
	"bytes"
	"errors"
	"io"
	"slices"
	"strings"

	"github.com/spf13/cobra"
	"github.com/spf13/pflag"

	"beckline/dosing/reading"
	"beckline/tui"
)

// openScreen runs the screen until it is left. Its exit code is 0, or 128 and
// the number of the signal that ended it.
func openScreen(c *console, options tui.Options) error {
	options.Commands = screenCommands()
	c.code = tui.Run(options)
	return nil
}

// notOnScreen are the commands about the program itself, which a screen has no
// use for.
var notOnScreen = []string{"completion", "help", "man", "version"}

// screenCommands is the command tree as forms of the screen: the same flags, the
// same words, and the same code behind them.
func screenCommands() []tui.Command {
	return formsOf(rootCommand(&console{out: &bytes.Buffer{}}), "")
}

// formsOf makes the forms of what stands below a command.
func formsOf(parent *cobra.Command, before string) []tui.Command {
	var out []tui.Command
	for _, cmd := range parent.Commands() {
		name := before + cmd.Name()
		switch {
		case slices.Contains(notOnScreen, name):
		case cmd.HasSubCommands():
			out = append(out, formsOf(cmd, name+" ")...)
		default:
			out = append(out, tui.Command{Name: name, Purpose: cmd.Short, Fields: fieldsOf(cmd), Run: runForScreen})
		}
	}
	return out
}

// fieldsOf makes fields of a command's words and flags, in the order of its help;
// the form for programs, which few want on a screen, stands last.
func fieldsOf(cmd *cobra.Command) []tui.CommandField {
	var out []tui.CommandField
	if words, ok := wordsOf(cmd); ok {
		out = append(out, words)
	}
	cmd.Flags().VisitAll(func(flag *pflag.Flag) {
		if flag.Hidden || flag.Name == "help" {
			return
		}
		f := tui.CommandField{Name: flag.Name, Unit: unitOf(flag), Usage: flag.Usage, Lent: lent(cmd, flag.Name)}
		switch t, own := flag.Value.(*typed); {
		case own:
			f.Repeat, f.Most = t.most > 1, t.most
		case flag.Value.Type() == "stringArray":
			f.Repeat = true
		case flag.Value.Type() == "bool":
			f.Switch = true
		}
		if complete, ok := cmd.GetFlagCompletionFunc(flag.Name); ok && flag.Name != "line" { // whose names hang on another flag
			f.Choices = choicesOf(cmd, complete)
		}
		out = append(out, f)
	})
	for i, f := range out {
		if f.Name == "json" {
			return append(slices.Delete(out, i, i+1), f)
		}
	}
	return out
}

// wordsOf is the field of the words that belong to no flag, as the usage line
// names them: "rows [file]", "cautions product...".
func wordsOf(cmd *cobra.Command) (tui.CommandField, bool) {
	_, words, found := strings.Cut(cmd.Use, " ")
	if !found {
		return tui.CommandField{}, false
	}
	f := tui.CommandField{Positional: true, Repeat: strings.HasSuffix(words, "..."), Name: strings.Trim(words, "[].")}
	switch f.Name {
	case "product":
		f.Usage, f.Lent = "product by name; see the list", true
	default:
		f.Unit, f.Usage = "name of a file", "file, where the program was started or with its folder"
		if strings.HasPrefix(words, "[") {
			f.Usage += "; it may be left empty where the fields below say the same"
		}
	}
	if complete := cmd.ValidArgsFunction; complete != nil {
		if _, about := complete(cmd, nil, ""); about&cobra.ShellCompDirectiveFilterFileExt == 0 {
			f.Choices = choicesOf(cmd, complete)
		}
	}
	return f, true
}

// unitOf is what a flag takes, "" where it takes nothing.
func unitOf(flag *pflag.Flag) string {
	switch unit := flag.Value.Type(); unit {
	case "bool":
		return ""
	case "stringArray":
		return orWord(arrayUnits[flag.Name], "product=dose")
	default:
		return unit
	}
}

// choicesOf offers what a shell would complete.
func choicesOf(cmd *cobra.Command, complete cobra.CompletionFunc) func() []tui.Choice {
	return func() []tui.Choice {
		var out []tui.Choice
		names, _ := complete(cmd, nil, "")
		for _, text := range names {
			name, detail, _ := strings.Cut(text, "\t")
			out = append(out, tui.Choice{Name: name, Detail: detail})
		}
		return out
	}
}

// lent says whether a flag asks for what the screen's line has under that name.
// Readings are lent only to a command that takes a whole water: a burette or a
// meter is read on a sample, and a table's empty cell was not measured.
func lent(cmd *cobra.Command, name string) bool {
	has := func(flag string) bool { return cmd.Flags().Lookup(flag) != nil }
	switch name {
	case "site", "line", "product", "then":
		return true
	case "add":
		return cmd.Name() != "water"
	case "source":
		return !has("ph")
	}
	f, ok := reading.Lookup(name)
	if _, other := reading.Command(name); other || !ok {
		return false
	}
	switch f.Group {
	case reading.Reading:
		return has("dic") && cmd.Name() != "rows"
	case reading.Target:
		return has("product")
	}
	return true
}

// nobody stands where input would be typed: there is none behind a form.
type nobody struct{ io.Reader }

// mostAnswer bounds an answer on the screen, bytes.
const mostAnswer = 32 << 20

var errTooLong = errors.New("the answer is over 32 MiB: run the command line, with its output into a file")

// bounded keeps an answer up to mostAnswer.
type bounded struct{ text bytes.Buffer }

func (b *bounded) Write(p []byte) (int, error) {
	if b.text.Len()+len(p) > mostAnswer {
		return 0, errTooLong
	}
	return b.text.Write(p)
}

// runForScreen runs the program as the command line would, inside the screen.
func runForScreen(args []string) tui.Outcome {
	var out bounded
	c, err := perform(args, nobody{strings.NewReader("")}, &out, io.Discard)
	if err != nil {
		p, line := refusalLine(err)
		return tui.Outcome{Refusal: line, Field: p.Field, Code: exitCode(p.Kind)}
	}
	return tui.Outcome{Text: out.text.String(), Notes: c.notes, Code: c.code, Gives: c.gives}
}
