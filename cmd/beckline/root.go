package main

import (
	"os"

	"github.com/spf13/cobra"
	"golang.org/x/term"

	"beckline/dosing/entry"
	"beckline/dosing/report"
	"beckline/tui"
)

func terminal(f *os.File) bool { return term.IsTerminal(int(f.Fd())) }

// rootCommand builds the whole command tree for one run.
func rootCommand(c *console) *cobra.Command {
	var screen tui.Options
	var plant plantFlags
	var asJSON bool
	root := &cobra.Command{
		Use:   "beckline",
		Short: "readings of a water to a caustic or acid dose and a pump setting",
		Long: "Readings of a water in, a caustic or acid dose and a pump setting out.\n" +
			"Without a command it opens the screen.",
		Example:       "  beckline dose --ph 6.28 --alkalinity 13 --temperature 8 \\\n    --flow 240 --target-ph 8.4 --product caustic-25",
		Args:          noSuchCommand,
		SilenceErrors: true,
		SilenceUsage:  true,
		RunE: func(*cobra.Command, []string) error {
			if asJSON {
				return c.answer(entry.Demo(), entry.NeedDose, true)
			}
			line, err := plant.open()
			if err != nil {
				return err
			}
			if c.terminal {
				// The screen, unlike a command line, belongs to its plant: without a
				// word it starts from the plant file in the usual place, if there is one.
				if line == nil {
					if line, err = usualLine(); err != nil {
						return err
					}
				}
				screen.Line = line
				return openScreen(c, screen)
			}
			return printDemo(c)
		},
	}
	plant.add(root)
	root.Flags().BoolVar(&screen.ASCII, "ascii", false, "the screen with plain characters only")
	root.Flags().BoolVar(&screen.Linear, "linear", false, "the screen as lines of text in order, for a screen reader")
	root.Flags().BoolVar(&asJSON, "json", false, "the demo plant's answer, or a refusal, as JSON")
	cobra.EnableCommandSorting = false // the order below is that of use
	root.AddCommand(doseCommand(c), waterCommand(c), rowsCommand(c), blendCommand(c), mixCommand(c), curveCommand(c), feedCommand(c), benchCommand(c), trimCommand(c), titrateCommand(c), siteCommand(c), productsCommand(c), cautionsCommand(c),
		checkCommand(c), versionCommand(c), manCommand(c))
	root.SetFlagErrorFunc(flagProblem)
	root.SetHelpFunc(func(cmd *cobra.Command, _ []string) { writeHelp(c.out, cmd) })
	root.SetHelpCommand(helpCommand(c))
	root.SetOut(c.out) // the completion commands take it as they are made
	root.CompletionOptions.SetDefaultShellCompDirective(cobra.ShellCompDirectiveNoFileComp)
	root.InitDefaultCompletionCmd()
	for _, cmd := range root.Commands() {
		if cmd.Name() == "completion" {
			describeCompletion(cmd)
		}
	}
	return root
}

// describeCompletion gives the library's completion commands words and refusals
// like those of the others.
func describeCompletion(cmd *cobra.Command) {
	load := map[string]string{
		"bash":       "  beckline completion bash > /etc/bash_completion.d/beckline",
		"zsh":        "  beckline completion zsh > \"${fpath[1]}/_beckline\"",
		"fish":       "  beckline completion fish > ~/.config/fish/completions/beckline.fish",
		"powershell": "  beckline completion powershell | Out-String | Invoke-Expression",
	}
	cmd.Short, cmd.Long = "completion script for a shell", "Writes the completion script of a shell: bash, zsh, fish, powershell."
	cmd.Example = load["bash"]
	cmd.Args, cmd.RunE = noSuchCommand, func(cmd *cobra.Command, _ []string) error { return cmd.Help() }
	for _, shell := range cmd.Commands() {
		shell.Short = "completion script for " + shell.Name()
		shell.Long = "Writes the completion script. It takes effect in a shell started afterwards."
		shell.Example = load[shell.Name()]
		shell.Args = noArguments
	}
}

// printDemo shows what an answer looks like and how to get one's own, for a
// first call whose output is not a terminal.
func printDemo(c *console) error {
	demo := job{form: entry.Demo()}
	result, err := solveJob(demo, entry.NeedDose)
	if err != nil {
		return err
	}
	document, err := demo.trust.trusted(report.New(result), &demo, result)
	if err != nil {
		return err
	}
	c.out.WriteString(entry.DemoName + ", an invented plant\n" + document.Slip() + `
Your own readings:
  beckline dose --ph 6.28 --alkalinity 13 --temperature 8 --flow 240 \
    --calcium 7.2 --target-ph 8.4 --product caustic-25 --pump 20
  beckline rows readings.csv > answers.csv
  beckline help
On a terminal, beckline without a command opens the screen.
`)
	return nil
}
