package main

import (
	"bytes"
	"io"
	"os"
	"path/filepath"
	"slices"
	"strings"
	"testing"

	"github.com/spf13/cobra"
	"github.com/spf13/pflag"

	"beckline/tui"
)

// TestScreenOffersEveryCommand checks that each command with something behind it
// is a form with all its flags, in the same words.
func TestScreenOffersEveryCommand(t *testing.T) {
	offered := map[string]tui.Command{}
	for _, c := range screenCommands() {
		if c.Purpose == "" || c.Run == nil {
			t.Errorf("%s: %+v", c.Name, c)
		}
		offered[c.Name] = c
	}
	seen := 0
	var walk func(*cobra.Command)
	walk = func(cmd *cobra.Command) {
		name := strings.TrimPrefix(strings.TrimPrefix(cmd.CommandPath(), "beckline"), " ")
		switch {
		case slices.Contains([]string{"completion", "help", "man", "version"}, name):
			return
		case cmd.HasSubCommands():
			for _, sub := range cmd.Commands() {
				walk(sub)
			}
			return
		}
		c, ok := offered[name]
		if !ok {
			t.Errorf("%s is not offered on the screen", name)
			return
		}
		seen++
		cmd.Flags().VisitAll(func(f *pflag.Flag) {
			has := func(field tui.CommandField) bool {
				return field.Name == f.Name && field.Usage == f.Usage && !field.Positional && field.Switch == (f.Value.Type() == "bool")
			}
			if f.Name != "help" && !slices.ContainsFunc(c.Fields, has) {
				t.Errorf("%s lacks --%s", name, f.Name)
			}
		})
		positional := slices.ContainsFunc(c.Fields, func(f tui.CommandField) bool { return f.Positional })
		if positional != strings.Contains(cmd.Use, " ") {
			t.Errorf("%s: words %v, usage %q", name, positional, cmd.Use)
		}
	}
	walk(rootCommand(&console{out: &bytes.Buffer{}}))
	if seen != len(offered) || seen < 20 {
		t.Errorf("%d commands, %d offered", seen, len(offered))
	}
}

// TestScreenAnswersLikeTheCommandLine fills forms in and compares what they give
// with what the command line prints, refusals among it.
func TestScreenAnswersLikeTheCommandLine(t *testing.T) {
	water := []string{"--ph=6.9", "--alkalinity=24", "--temperature=8", "--calcium=7.2", "--flow=240"}
	with := func(name string, more ...string) []string {
		return slices.Concat(strings.Fields(name), water, more)
	}
	rows := filepath.Join(t.TempDir(), "-rows.csv")
	if err := os.WriteFile(rows, []byte("ph,alkalinity_mg_l_caco3,temperature_c\n7,30,10\n"), 0o600); err != nil {
		t.Fatal(err)
	}
	for _, args := range [][]string{
		{"titrate", "alkalinity", "--sample=100", "--normality=0.02", "--end=12.6"},
		{"blend", "--source=well; flow=200; ph=7.15; alkalinity=285; temperature=11.5", "--source=softened; flow=300; ph=9.95; alkalinity=62; temperature=11.5"},
		with("mix", "--limit=ph=7.8 to 8.6", "--limit=alkalinity=min 40", "--price=caustic-25=0.35", "--price=lime=0.30", "--price=carbon-dioxide=0.40"),
		{"feed", "drawdown", "--draw=volume=100 time=60 speed=50", "--draw=volume=201 time=60 speed=100", "--feed=9 L/h", "--product=caustic-25"},
		with("bench", "--product=caustic-25", "--point=0=6.28", "--point=4=6.55", "--point=8=6.88", "--point=12=7.36", "--point=15=8.12", "--target-ph=8.4"),
		with("trim", "--target-ph=8", "--product=caustic-25", "--measured=7.55", "--volume=120 m3"),
		with("dose", "--target-ph=8.4", "--product=caustic-25", "--working"),
		with("dose", "--target-ph=8.4", "--product=caustic-25", "--tank=60 m3"),
		with("curve", "--over=temperature", "--target-ph=8.4", "--product=caustic-25"),
		{"rows", "--target-ph=8.4", "--product=caustic-25", "--", rows},
		{"rows", "--target-ph=8.4", "--product=caustic-25", "--", "/nowhere.csv"},
		{"cautions", "--", "caustic-25", "hypochlorite-12"},
		{"check"}, {"products"},
		{"titrate", "alkalinity", "--sample=100", "--normality=0.02"},
		with("dose", "--target-ph=8.4", "--product=nothing"),
		with("dose", "--target-ph=6", "--product=caustic-25"),
	} {
		var out, refused bytes.Buffer
		code := run(args, strings.NewReader(""), &out, &refused)
		got := runForScreen(args)
		if got.Code != code || got.Text != out.String() || code == 0 && got.Text == "" {
			t.Errorf("%q: code %d and on the screen %d; text\n%s\non the screen\n%s", args, code, got.Code, out.String(), got.Text)
		}
		line := strings.TrimSpace(strings.TrimPrefix(refused.String(), "beckline: "))
		if code != 0 && (got.Refusal != line || got.Refusal == "" || got.Field == "") {
			t.Errorf("%q: refused with\n%s\non the screen %q of the field %q", args, line, got.Refusal, got.Field)
		}
	}
}

// TestScreenTakesNoInput checks that a form which names no file neither waits
// for one to be typed nor takes an empty one.
func TestScreenTakesNoInput(t *testing.T) {
	for _, c := range []struct{ args, field string }{{"rows --target-ph=8.4 --product=lime", "file"}, {"feed drawdown", "draw"}} {
		if got := runForScreen(strings.Fields(c.args)); got.Field != c.field || got.Code != exitBadInput {
			t.Errorf("%s: %+v", c.args, got)
		}
	}
}

// TestTitrationsGiveReadings checks what the screen can take over.
func TestTitrationsGiveReadings(t *testing.T) {
	got := runForScreen([]string{"titrate", "alkalinity", "--sample=100", "--normality=0.02", "--end=12.6"})
	if len(got.Gives) != 1 || got.Gives[0].Name != "alkalinity" || !strings.Contains(got.Text, "--alkalinity "+got.Gives[0].Text) {
		t.Errorf("%+v of\n%s", got.Gives, got.Text)
	}
}

// TestLentFields checks which fields of which commands follow the screen's line.
func TestLentFields(t *testing.T) {
	lentTo := map[string]map[string]bool{}
	for _, c := range screenCommands() {
		lentTo[c.Name] = map[string]bool{}
		for _, f := range c.Fields {
			lentTo[c.Name][f.Name] = f.Lent
		}
	}
	for _, c := range []struct {
		command, field string
		want           bool
	}{
		{"dose", "ph", true}, {"dose", "flow", true}, {"dose", "target-ph", true}, {"dose", "product", true}, {"dose", "add", true},
		{"dose", "source", false}, {"blend", "source", true}, {"blend", "target-ph", false}, {"mix", "alkalinity", true},
		{"trim", "product", true}, {"trim", "measured", false}, {"bench", "alkalinity", true}, {"water", "add", false},
		{"rows", "ph", false}, {"rows", "target-ph", true}, {"rows", "product", true}, // an empty cell was not measured
		{"titrate conductivity", "conductivity", false}, // the line's is at 25 C, the meter's is not
		{"titrate alkalinity", "ph", false}, {"titrate carbon", "ph", true}, {"feed tank", "product", true}, {"feed carrier", "hardness", false},
	} {
		got, there := lentTo[c.command][c.field]
		if !there || got != c.want {
			t.Errorf("%s --%s: lent %v, there %v", c.command, c.field, got, there)
		}
	}
}

// TestChoicesOfForms checks that lists are those which a shell completes from.
func TestChoicesOfForms(t *testing.T) {
	for _, c := range []struct{ command, field, choice string }{
		{"dose", "product", "caustic-25"}, {"curve", "over", "temperature"}, {"mix", "price", "lime="}, {"cautions", "product", "lime"},
	} {
		found := false
		for _, command := range screenCommands() {
			for _, f := range command.Fields {
				if command.Name == c.command && f.Name == c.field && f.Choices != nil {
					found = slices.ContainsFunc(f.Choices(), func(o tui.Choice) bool { return o.Name == c.choice })
				}
			}
		}
		if !found {
			t.Errorf("%s: %s is not offered for %s", c.command, c.choice, c.field)
		}
	}
}

// TestScreenAnswersAreBounded checks that an endless answer is refused.
func TestScreenAnswersAreBounded(t *testing.T) {
	var b bounded
	if n, err := b.Write(make([]byte, mostAnswer)); n != mostAnswer || err != nil {
		t.Fatal(n, err)
	}
	if _, err := io.WriteString(&b, "x"); err == nil {
		t.Error("no end")
	}
}
