package main

import (
	"bytes"
	"os"
	"path/filepath"
	"strings"
	"testing"
)

// example is one command of a page and the output that stands below it.
type example struct {
	line    int
	command string
	output  string
}

// TestReadmeIsTrue runs every "$ beckline ..." of the console blocks of the
// pages and compares what it prints. A command whose block shows no output is
// run all the same and must succeed; a line "..." stands for any number of
// lines.
func TestReadmeIsTrue(t *testing.T) {
	for _, page := range []string{"README.md", "DEVELOPERS.md", "SAFETY.md"} {
		text, err := os.ReadFile(filepath.Join("..", "..", page))
		if os.IsNotExist(err) {
			t.Logf("%s is not written yet", page)
			continue
		}
		if err != nil {
			t.Fatal(err)
		}
		for _, e := range examples(string(text)) {
			args, ok := words(e.command)
			if !ok || len(args) == 0 || args[0] != "beckline" {
				continue // not ours to run: go, git
			}
			var out, errs bytes.Buffer
			run(args[1:], strings.NewReader(""), &out, &errs)
			if got := out.String() + errs.String(); e.output != "" && !matches(got, e.output) {
				t.Errorf("%s:%d: $ %s\nprints\n%s\nthe page says\n%s", page, e.line, e.command, got, e.output)
			} else if e.output == "" && errs.Len() > 0 {
				t.Errorf("%s:%d: $ %s\nfails: %s", page, e.line, e.command, &errs)
			}
		}
	}
}

// examples cuts the console blocks of a page into commands and outputs. A
// command goes on after a backslash at the end of a line.
func examples(page string) []example {
	var all []example
	inside, continued := false, false
	for i, line := range strings.Split(page, "\n") {
		switch {
		case strings.HasPrefix(line, "```"):
			inside, continued = line == "```console", false
		case !inside:
		case continued:
			last := &all[len(all)-1]
			last.command += " " + strings.TrimSuffix(strings.TrimSpace(line), "\\")
			continued = strings.HasSuffix(line, "\\")
		case strings.HasPrefix(line, "$ "):
			all = append(all, example{line: i + 1, command: strings.TrimSuffix(line[2:], "\\")})
			continued = strings.HasSuffix(line, "\\")
		case len(all) > 0:
			all[len(all)-1].output += line + "\n"
		}
	}
	return all
}

// words splits a command line as a shell would for plain words and quotes; ok is
// false for lines with pipes or redirections, which are for reading only.
func words(line string) (args []string, ok bool) {
	var word strings.Builder
	open, quote := false, rune(0)
	for _, c := range line {
		switch {
		case quote != 0 && c == quote:
			quote = 0
		case quote != 0:
			word.WriteRune(c)
		case c == '"' || c == '\'':
			quote, open = c, true
		case strings.ContainsRune("|<>&;$", c):
			return nil, false
		case c == ' ':
			if open || word.Len() > 0 {
				args = append(args, word.String())
			}
			word.Reset()
			open = false
		default:
			word.WriteRune(c)
		}
	}
	if open || word.Len() > 0 {
		args = append(args, word.String())
	}
	return args, quote == 0
}

// matches compares line by line; "..." in the page stands for any lines.
func matches(got, page string) bool {
	g, p := lines(got), lines(page)
	for len(p) > 0 {
		if p[0] == "..." {
			for skip := 0; skip <= len(g); skip++ {
				if matches(strings.Join(g[skip:], "\n"), strings.Join(p[1:], "\n")) {
					return true
				}
			}
			return false
		}
		if len(g) == 0 || g[0] != p[0] {
			return false
		}
		g, p = g[1:], p[1:]
	}
	return len(g) == 0
}

func lines(text string) []string {
	text = strings.TrimRight(text, "\n")
	if text == "" {
		return nil
	}
	all := strings.Split(text, "\n")
	for i := range all {
		all[i] = strings.TrimRight(all[i], " ")
	}
	return all
}

func TestExamplesAreFound(t *testing.T) {
	page := "text\n```console\n$ beckline dose --flow \"1 MGD\" \\\n    --json\n{\n...\n}\n$ beckline version\n```\n$ not this\n"
	all := examples(page)
	if len(all) != 2 || all[0].output != "{\n...\n}\n" || all[1].command != "beckline version" {
		t.Fatalf("found %+v", all)
	}
	args, ok := words(all[0].command)
	if !ok || strings.Join(args, "|") != "beckline|dose|--flow|1 MGD|--json" {
		t.Errorf("words are %q", args)
	}
	if _, ok := words("beckline rows a.csv > b.csv"); ok {
		t.Error("a redirection is taken for words")
	}
	if !matches("{\na\nb\n}\n", all[0].output) || matches("{\na\nb\n", all[0].output) {
		t.Error("the dots do not stand for any lines")
	}
}
