package main

import (
	"bytes"
	"errors"
	"fmt"
	"io"
	"io/fs"
	"os"
	"strconv"
	"strings"

	"beckline/dosing"
	"beckline/dosing/report"
	"beckline/dosing/table"
	"beckline/tui"
)

// Exit codes.
const (
	exitFine     = 0
	exitNoAnswer = 1 // the readings are fine and there is no answer
	exitBadInput = 2
	exitFailed   = 3 // the machine or the program failed
)

// console is what a command reads from and writes to. What is written to out
// reaches a person only if the command succeeds; direct is for rows alone,
// which streams.
type console struct {
	in       io.Reader
	out      *bytes.Buffer
	direct   io.Writer
	notes    []string    // lines for stderr at exit 0
	terminal bool        // both ends are a terminal
	progress io.Writer   // where a long run says how far it is; nil where nobody watches
	code     int         // exit code of the screen
	gives    []tui.Given // readings that the answer found, for the screen to take over
}

// run is one run of the program: arguments without the program's name. It
// returns the exit code. Whatever is not exit 0 leaves stdout empty and one
// line, or with --json one object, on stderr.
func run(args []string, stdin io.Reader, stdout, stderr io.Writer) (code int) {
	c, err := perform(args, stdin, stdout, stderr)
	if err != nil {
		return refuse(stderr, wantsJSON(args), err)
	}
	for _, note := range c.notes {
		fmt.Fprintln(stderr, note)
	}
	return c.code
}

// perform runs the program without a word about what it refuses, which is the
// error; a fault of the program is one too.
func perform(args []string, stdin io.Reader, stdout, stderr io.Writer) (c *console, err error) {
	defer func() {
		if r := recover(); r != nil {
			err = &dosing.Problem{Kind: dosing.Failed, Code: "failed",
				Given: fmt.Sprint(r), Accepted: "please report this with the command line that led to it"}
		}
	}()
	c = &console{in: stdin, out: &bytes.Buffer{}, direct: output{stdout}, terminal: isTerminal(stdin) && isTerminal(stdout)}
	if isTerminal(stderr) && !isTerminal(stdout) {
		c.progress = stderr
	}
	root := rootCommand(c)
	root.SetArgs(args)
	if len(args) > 0 {
		root.Annotations = map[string]string{firstWord: args[0]}
	}
	root.SetIn(stdin)
	root.SetErr(io.Discard)
	if err := root.Execute(); err != nil {
		return c, err
	}
	_, err = c.direct.Write(c.out.Bytes())
	return c, err
}

// output tells a failure to write from one to read.
type output struct{ to io.Writer }

func (o output) Write(p []byte) (int, error) {
	n, err := o.to.Write(p)
	if err == nil {
		return n, nil
	}
	var path *fs.PathError
	if errors.As(err, &path) {
		err = path.Err // the name of standard output says nothing to a person
	}
	return n, &dosing.Problem{Kind: dosing.Failed, Code: "not_written", Field: "output", Given: clean(err.Error())}
}

// wantsJSON looks for --json before the flags are parsed, since a refusal may
// come of parsing them.
func wantsJSON(args []string) (wants bool) {
	for _, a := range args {
		if a == "--" {
			break
		}
		if a == "--json" {
			wants = true
		}
		if text, ok := strings.CutPrefix(a, "--json="); ok {
			wants, _ = strconv.ParseBool(text)
		}
	}
	return wants
}

// refuse writes the one line, or the object, and returns the exit code.
func refuse(stderr io.Writer, asJSON bool, err error) int {
	p, line := refusalLine(err)
	if asJSON {
		_, _ = stderr.Write(report.ProblemJSON(p)) // nowhere is left to say that it failed
		return exitCode(p.Kind)
	}
	fmt.Fprintln(stderr, "beckline: "+line)
	return exitCode(p.Kind)
}

// refusalLine is an error as a problem and as one line for a person.
func refusalLine(err error) (*dosing.Problem, string) {
	p, row := asProblem(err)
	line := report.ProblemLine(p)
	if row > 0 {
		line = fmt.Sprintf("row %d: %s", row, line)
	}
	return p, line
}

func exitCode(k dosing.ProblemKind) int {
	switch k {
	case dosing.NoAnswer:
		return exitNoAnswer
	case dosing.BadInput:
		return exitBadInput
	}
	return exitFailed
}

// asProblem turns any error into a problem, and the row it is about.
func asProblem(err error) (p *dosing.Problem, row int) {
	var inRow *table.RowError
	if errors.As(err, &inRow) {
		return withHint(inRow.Problem), inRow.Row
	}
	if errors.As(err, &p) {
		return withHint(p), 0
	}
	return &dosing.Problem{Kind: dosing.Failed, Code: "failed", Given: clean(err.Error())}, 0
}

// withHint adds the command that would help.
func withHint(p *dosing.Problem) *dosing.Problem {
	if p.Code != "unknown_product" {
		return p
	}
	hinted := *p
	hinted.Accepted += "; see beckline products"
	return &hinted
}

func isTerminal(stream any) bool {
	if _, ok := stream.(nobody); ok {
		return true
	}
	f, ok := stream.(*os.File)
	return ok && terminal(f)
}

// clean keeps a message to one plain line.
func clean(s string) string { return strings.Join(strings.Fields(s), " ") }
