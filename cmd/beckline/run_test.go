package main

import (
	"bytes"
	"encoding/csv"
	"encoding/json"
	"errors"
	"flag"
	"io/fs"
	"math"
	"os"
	"os/exec"
	"slices"
	"strconv"
	"strings"
	"testing"

	"github.com/rogpeppe/go-internal/testscript"

	"beckline/dosing"
	"beckline/dosing/check"
	"beckline/dosing/report"
)

var update = flag.Bool("update", false, "write the expected outputs of the scripts anew")

// TestMain makes beckline a command of the scripts without building it.
func TestMain(m *testing.M) {
	testscript.Main(m, map[string]func(){"beckline": main})
}

// TestScripts runs one script a behaviour.
func TestScripts(t *testing.T) {
	testscript.Run(t, testscript.Params{
		Dir:                 "testdata/script",
		UpdateScripts:       *update,
		RequireExplicitExec: true,
		RequireUniqueNames:  true,
		Cmds: map[string]func(*testscript.TestScript, bool, []string){
			"fails":    fails,
			"number":   number,
			"unescape": unescape,
			"columns":  columns,
		},
	})
}

// fails CODE command...: the command ends with the exit code, nothing on stdout
// and one line on stderr.
func fails(ts *testscript.TestScript, neg bool, args []string) {
	if neg || len(args) < 2 {
		ts.Fatalf("usage: fails code command args...")
	}
	err := ts.Exec(args[1], args[2:]...)
	var exit *exec.ExitError
	if !errors.As(err, &exit) {
		ts.Fatalf("%v: exit code 0, want %s (%v)", args[1:], args[0], err)
	}
	if got := strconv.Itoa(exit.ExitCode()); got != args[0] {
		ts.Fatalf("%v: exit code %s, want %s", args[1:], got, args[0])
	}
	if out := ts.ReadFile("stdout"); out != "" {
		ts.Fatalf("%v: stdout is not empty: %q", args[1:], out)
	}
	if line := ts.ReadFile("stderr"); strings.Count(line, "\n") != 1 || !strings.HasSuffix(line, "\n") || len(line) < 12 {
		ts.Fatalf("%v: stderr is not one line: %q", args[1:], line)
	}
}

// number path value tolerance: the JSON on stdout has the number at the dotted
// path, within the relative tolerance. "null" stands for null.
func number(ts *testscript.TestScript, neg bool, args []string) {
	if neg || len(args) < 2 {
		ts.Fatalf("usage: number path value [tolerance]")
	}
	var v any
	ts.Check(json.Unmarshal([]byte(ts.ReadFile("stdout")), &v))
	for _, key := range strings.Split(args[0], ".") {
		switch inner := v.(type) {
		case map[string]any:
			var there bool
			if v, there = inner[key]; !there {
				ts.Fatalf("%s: no key %s", args[0], key)
			}
		case []any:
			i, err := strconv.Atoi(key)
			ts.Check(err)
			v = inner[i]
		default:
			ts.Fatalf("%s: nothing below %s", args[0], key)
		}
	}
	if args[1] == "null" {
		if v != nil {
			ts.Fatalf("%s is %v, want null", args[0], v)
		}
		return
	}
	got, isNumber := v.(float64)
	want, err := strconv.ParseFloat(args[1], 64)
	ts.Check(err)
	tolerance := 0.0
	if len(args) > 2 {
		tolerance, err = strconv.ParseFloat(args[2], 64)
		ts.Check(err)
	}
	if !isNumber || math.Abs(got-want) > tolerance*math.Abs(want) {
		ts.Fatalf("%s is %v, want %v within %v", args[0], v, want, tolerance)
	}
}

// unescape file...: writes \r, \0, \m (a byte-order mark) and \c (no final
// newline) of the file as the bytes they stand for.
func unescape(ts *testscript.TestScript, neg bool, args []string) {
	bytesOf := strings.NewReplacer(`\r`, "\r", `\0`, "\x00", `\m`, "\ufeff", "\\c\n", "")
	for _, name := range args {
		text := bytesOf.Replace(ts.ReadFile(name))
		ts.Check(os.WriteFile(ts.MkAbs(name), []byte(text), 0o600))
	}
}

// columns separator row name=value...: the CSV on stdout has these values in
// the row (1 is the first after the header); name~value compares numbers to nine
// digits, since the last ones differ between processors.
func columns(ts *testscript.TestScript, neg bool, args []string) {
	if len(args) < 3 {
		ts.Fatalf("usage: columns separator row name=value...")
	}
	r := csv.NewReader(strings.NewReader(strings.TrimPrefix(ts.ReadFile("stdout"), "\ufeff")))
	r.Comma = rune(args[0][0])
	lines, err := r.ReadAll()
	ts.Check(err)
	row, err := strconv.Atoi(args[1])
	ts.Check(err)
	if row >= len(lines) {
		ts.Fatalf("%d rows, no row %d", len(lines)-1, row)
	}
	for _, arg := range args[2:] {
		at := strings.IndexAny(arg, "=~")
		name, want := arg[:at], arg[at+1:]
		i := slices.Index(lines[0], name)
		if i < 0 {
			ts.Fatalf("no column %s", name)
		}
		got := lines[row][i]
		same := got == want
		if arg[at] == '~' {
			same = near(got, want, args[0] == ";")
		}
		if same == neg {
			ts.Fatalf("row %d: %s is %q, want %q (not: %v)", row, name, got, want, neg)
		}
	}
}

// near compares two numbers to nine digits.
func near(got, want string, comma bool) bool {
	read := func(s string) float64 {
		if comma {
			if strings.Contains(s, ".") {
				return math.NaN()
			}
			s = strings.Replace(s, ",", ".", 1)
		}
		v, err := strconv.ParseFloat(s, 64)
		if err != nil {
			return math.NaN()
		}
		return v
	}
	return math.Abs(read(got)-read(want)) <= 1e-9*math.Abs(read(want))
}

// brokenWriter stands for a full disk or a closed pipe.
type brokenWriter struct{}

func (brokenWriter) Write([]byte) (int, error) {
	return 0, &fs.PathError{Op: "write", Path: "/dev/stdout", Err: errors.New("no space left on device")}
}

func TestOutputThatCannotBeWrittenIsAFailure(t *testing.T) {
	for _, args := range [][]string{{"version"}, {"products"}, {"completion", "zsh"}, {"rows", "--product", "caustic-25", "--target-ph", "8.4"}} {
		var stderr bytes.Buffer
		in := strings.NewReader("ph,alkalinity_mg_l_caco3,temperature_c\n7,30,10\n")
		code := run(args, in, brokenWriter{}, &stderr)
		if code != exitFailed {
			t.Errorf("%v: exit code %d, want %d", args, code, exitFailed)
		}
		if got, want := stderr.String(), "beckline: output could not be written: no space left on device\n"; got != want {
			t.Errorf("%v: stderr %q, want %q", args, got, want)
		}
	}
}

// panicReader stands for a fault anywhere below.
type panicReader struct{}

func (panicReader) Read([]byte) (int, error) { panic("a fault below") }

func TestFaultReachesAPersonAsOneLine(t *testing.T) {
	for _, args := range [][]string{{"rows"}, {"rows", "--json"}} {
		var stdout, stderr bytes.Buffer
		code := run(args, panicReader{}, &stdout, &stderr)
		if code != exitFailed || stdout.Len() != 0 {
			t.Errorf("%v: exit code %d, stdout %q; want %d and nothing", args, code, &stdout, exitFailed)
		}
		if got := stderr.String(); strings.Count(got, "\n") != 1 || strings.Contains(got, "goroutine") {
			t.Errorf("%v: stderr %q, want one line without a stack", args, got)
		}
	}
}

func TestExitCodes(t *testing.T) {
	for kind, want := range map[dosing.ProblemKind]int{
		dosing.NoAnswer: 1, dosing.BadInput: 2, dosing.Failed: 3, 0: 3,
	} {
		if got := exitCode(kind); got != want {
			t.Errorf("kind %d: exit code %d, want %d", kind, got, want)
		}
	}
}

func TestJSONRefusalIsWantedBeforeFlagsAreRead(t *testing.T) {
	for line, want := range map[string]bool{
		"dose --json":                true,
		"dose --json --nonsense":     true,
		"dose --ph 7":                false,
		"rows -- --json":             false,
		"dose --json=true --ph left": true,
		"dose --json=1":              true,
		"dose --json=false":          false,
		"dose --json --json=false":   false,
	} {
		if got := wantsJSON(strings.Fields(line)); got != want {
			t.Errorf("%q: %v, want %v", line, got, want)
		}
	}
}

// The help texts read well on a terminal of 80 columns.
func TestHelpFits80Columns(t *testing.T) {
	c := &console{out: &bytes.Buffer{}}
	root := rootCommand(c)
	commands := append(root.Commands(), root)
	for _, cmd := range root.Commands() {
		commands = append(commands, cmd.Commands()...) // the shells of completion
	}
	for _, cmd := range commands {
		var b bytes.Buffer
		writeHelp(&b, cmd)
		for _, line := range strings.Split(b.String(), "\n") {
			if len(line) > 80 {
				t.Errorf("help of %s has a line of %d columns: %s", cmd.Name(), len(line), line)
			}
			if report.ASCII(line) != line {
				t.Errorf("help of %s is not plain: %s", cmd.Name(), line)
			}
		}
		if cmd.Short == "" || cmd.Long == "" || cmd.Example == "" && cmd.Name() != "completion" {
			t.Errorf("%s lacks a short text, a long text or an example", cmd.Name())
		}
	}
}

func TestNearestName(t *testing.T) {
	names := []string{"dose", "water", "rows", "products"}
	for wanted, want := range map[string]string{"dsoe": "--dose", "row": "--rows", "prod": "--products", "watr": "--water"} {
		if got := nearest("--", wanted, names, "all"); got != "nearest is "+want {
			t.Errorf("nearest to %q is %q, want %q", wanted, got, want)
		}
	}
	if got := nearest("--", "xyzzy", names, "all"); got != "all" {
		t.Errorf("%q is offered for a word that is near nothing", got)
	}
}

func TestFolderIsNoFile(t *testing.T) {
	var stdout, stderr bytes.Buffer
	if code := run([]string{"rows", os.TempDir()}, strings.NewReader(""), &stdout, &stderr); code != exitBadInput {
		t.Errorf("exit code %d, want %d (%s)", code, exitBadInput, &stderr)
	}
}

// A copy whose figures are off says so and fails.
func TestDisagreeingCheckIsAFailure(t *testing.T) {
	good := check.Outcome{Name: "buffer", Value: 10.01, Published: 10.012, Tolerance: 0.015}
	bad := check.Outcome{Name: "constant", Value: 6.4, Published: 6.352, Tolerance: 0.0015}
	if err := disagreement([]check.Outcome{good}); err != nil {
		t.Errorf("an agreeing value fails: %v", err)
	}
	var stderr bytes.Buffer
	code := refuse(&stderr, false, disagreement([]check.Outcome{good, bad}))
	if code != exitFailed || !strings.Contains(stderr.String(), "constant") || strings.Count(stderr.String(), "\n") != 1 {
		t.Errorf("exit code %d, %q", code, &stderr)
	}
}
