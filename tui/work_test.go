package tui

import (
	"math/rand/v2"
	"os"
	"slices"
	"strings"
	"testing"

	tea "github.com/charmbracelet/bubbletea"
)

// fakeCommands is a table like that of the command line, with answers that a
// test knows: each echoes its arguments.
func fakeCommands() []Command {
	echo := func(args []string) Outcome {
		if !strings.Contains(strings.Join(args, " "), "--sample=") {
			return Outcome{Refusal: "sample is missing; accepted: 0.1 to 5000 mL", Field: "sample", Code: 2}
		}
		return Outcome{Text: "ran " + strings.Join(args, "\n    ") + "\n" + strings.Repeat("another line of it\n", 120),
			Notes: []string{"beckline: from plant.toml, line one: flow 240"}, Gives: []Given{{"alkalinity", "24.3"}}}
	}
	products := func() []Choice {
		return []Choice{{"caustic-25", "caustic soda, 25 %"}, {"lime", "hydrated lime"}, {"sulfuric-93", "sulfuric acid, 93 %"}}
	}
	return []Command{
		{Name: "titrate alkalinity", Purpose: "burette to alkalinity, and to its kinds", Run: echo, Fields: []CommandField{
			{Name: "sample", Unit: "mL", Usage: "volume of the sample"},
			{Name: "normality", Unit: "eq/L", Usage: "strength of the acid"},
			{Name: "json", Usage: "answer, or refusal, as JSON", Switch: true},
		}},
		{Name: "mix", Purpose: "the cheapest products that keep the water within limits", Run: echo, Fields: []CommandField{
			{Name: "file", Unit: "name of a file", Usage: "file of prices", Positional: true},
			{Name: "limit", Unit: "figure=range", Usage: `a range of the finished water: "ph=7.8 to 8.6"; repeat it`, Repeat: true},
			{Name: "price", Unit: "product=price", Usage: "price of a product; repeat it", Repeat: true,
				Choices: func() []Choice { return []Choice{{"lime=", ""}, {"caustic-25=", ""}} }},
			{Name: "sample", Unit: "mL", Usage: "volume of the sample"},
			{Name: "ph", Unit: "number", Usage: "pH", Lent: true},
			{Name: "alkalinity", Unit: "mg/L as CaCO3", Usage: "total alkalinity", Lent: true},
			{Name: "temperature", Unit: "deg C", Usage: "temperature of the water in the process", Lent: true},
			{Name: "flow", Unit: "m3/h", Usage: "flow of water past the feed point", Lent: true},
			{Name: "product", Unit: "name", Usage: "product to be dosed", Lent: true, Repeat: true, Most: 2, Choices: products},
			{Name: "add", Unit: "product=dose", Usage: "a dose that is given; repeat it", Repeat: true, Lent: true},
			{Name: "site", Unit: "file", Usage: "plant file", Lent: true},
			{Name: "line", Unit: "name", Usage: "line of the plant file", Lent: true},
		}},
		{Name: "check", Purpose: "recompute the published comparisons inside the program", Run: func([]string) Outcome {
			return Outcome{Text: strings.Repeat("agrees\n", 100)}
		}},
	}
}

func withWork(t *testing.T) *driver {
	d := demo(t)
	d.m.work.commands = fakeCommands()
	return d
}

// run presses g and waits for the answer.
func (d *driver) run() *driver {
	d.t.Helper()
	_, cmd := d.m.Update(tea.KeyMsg{Type: tea.KeyRunes, Runes: []rune{'g'}})
	if cmd == nil {
		d.t.Fatal("g runs nothing")
	}
	d.m.Update(cmd())
	return d
}

// filled opens the mix on a water of one's own and types into it.
func filled(t *testing.T) *driver {
	return withWork(t).own().keys("o", "mix", "Enter", "Down", "Enter", "ph=7.8 to 8.6", "Enter", "Enter", "alkalinity=min 40", "Enter")
}

func TestWorkScreens(t *testing.T) {
	for name, see := range map[string]func(*testing.T) *driver{
		"list":    func(t *testing.T) *driver { return withWork(t).own().keys("o") },
		"form":    filled,
		"demo":    func(t *testing.T) *driver { return withWork(t).keys("o", "mix", "Enter") },
		"typing":  func(t *testing.T) *driver { return withWork(t).own().keys("o", "titr", "Enter", "5") },
		"refusal": func(t *testing.T) *driver { return filled(t).run() },
		"answer":  func(t *testing.T) *driver { return filled(t).keys("Down", "Down", "100", "Enter").run() },
	} {
		for suffix, l := range map[string]look{"-80x24": fullLook, "-80x24-ascii": plainLook} {
			t.Run(name+suffix, func(t *testing.T) {
				d := see(t)
				d.m.look = l
				d.golden("work-" + name + suffix)
			})
		}
	}
}

// TestFormIsTheCommandLine checks that what stands in a form is what the command
// is given, the line's readings among it.
func TestFormIsTheCommandLine(t *testing.T) {
	d := filled(t).keys("Down", "Enter", "caustic", "Enter", "0.3 /kg", "Enter", "Down", "100", "Enter")
	want := []string{"mix", "--limit=ph=7.8 to 8.6", "--limit=alkalinity=min 40", "--price=caustic-25=0.3 /kg", "--sample=100",
		"--ph=7.0", "--alkalinity=30", "--temperature=10", "--flow=240", "--product=caustic-25"}
	if got := d.m.work.form.args(); !slices.Equal(got, want) {
		t.Errorf("given %q,\nwant %q", got, want)
	}
	d.keys("Home", "Enter", "-odd.csv", "Enter")
	if got := d.m.work.form.args(); !slices.Equal(got[len(got)-2:], []string{"--", "-odd.csv"}) {
		t.Errorf("given %q, want the file behind --", got)
	}
}

func TestFormsAreKept(t *testing.T) {
	d := filled(t).keys("Esc").shows("walking").keys("o", "titr", "Enter", "50", "Enter", "Esc", "o", "mix", "Enter")
	d.shows("ph=7.8 to 8.6", "alkalinity=min 40")
	d.keys("o", "titr", "Enter").shows("50").keys("n").hides("50")
}

// TestFormFollowsTheLine checks that a field which nobody touched has what the
// line has now, and one that was touched stays.
func TestFormFollowsTheLine(t *testing.T) {
	d := filled(t).keys("Down", "Down", "Down", "7.3", "Enter", "Esc") // pH typed into the form
	d.keys("Home", "6.9", "Enter", "44", "Enter", "o", "mix", "Enter")
	args := strings.Join(d.m.work.form.args(), " ")
	if !strings.Contains(args, "--ph=7.3 ") || !strings.Contains(args, "--alkalinity=44 ") {
		t.Error(args)
	}
	d.keys("Up", "l")
	if args := strings.Join(d.m.work.form.args(), " "); !strings.Contains(args, "--ph=6.9 ") {
		t.Error("l does not follow the line again: ", args)
	}
}

// TestDemoLendsNothing checks that no number of the demo plant reaches a form,
// before or after.
func TestDemoLendsNothing(t *testing.T) {
	d := withWork(t).keys("o", "mix", "Enter").shows("demo plant: none of its numbers")
	if got := d.m.work.form.args(); len(got) != 1 {
		t.Errorf("the demo plant gave %q", got)
	}
	d.keys("Down", "Down", "Down", "Down", "l").shows("lends nothing")
	d.keys("Esc", "7.2", "Enter", "o", "mix", "Enter").hides("demo plant")
	if args := strings.Join(d.m.work.form.args(), " "); !strings.Contains(args, "--ph=7.2") || strings.Contains(args, "alkalinity") {
		t.Error(args)
	}
}

func TestRefusalStandsAtItsField(t *testing.T) {
	d := filled(t).run().shows("sample is missing", "!▸sample")
	d.keys("100", "Enter").hides("sample is missing", "!")
}

func TestFormCautions(t *testing.T) {
	d := filled(t).shows("Caustic soda burns", "Local code")
	d.keys("PgDn", "Up", "Up", "Enter").shows("product:", "sulfuric acid").keys("Esc").shows("mix: ")
	d.keys("Enter", "sulf", "Enter").shows("NEVER TOGETHER")
	if d.keys("c").shows("cautions"); !strings.Contains(d.m.page.text, "Sulfuric acid") {
		t.Error(d.m.page.text)
	}
	d.keys("Esc").shows("mix: ").keys("Esc").hides("NEVER TOGETHER") // on the line there is no acid
}

// TestTakeOver puts a reading of an answer onto the line, and off again.
func TestTakeOver(t *testing.T) {
	d := filled(t).keys("Down", "Down", "100", "Enter").run().keys("t").shows("taken over: alkalinity 24.3", "walking")
	if got := d.m.sheet.Values["alkalinity"]; got != "24.3" {
		t.Errorf("alkalinity %q", got)
	}
	if got := d.keys("u").m.sheet.Values["alkalinity"]; got != "30" {
		t.Errorf("undone, alkalinity %q", got)
	}
	d = withWork(t).keys("o", "titr", "Enter", "100", "Enter").run().keys("t")
	if v := d.m.sheet.Values; d.m.sheet.Demo || v["alkalinity"] != "24.3" || v["ph"] != "" {
		t.Errorf("a reading taken over stands beside the demo plant's: %v", v)
	}
}

func TestAnswerIsCopiedAndWritten(t *testing.T) {
	t.Chdir(t.TempDir())
	d := withWork(t).keys("o", "titr", "Enter", "100", "Enter").run()
	var sent string
	d.m.hooks.send = func(s string) { sent = s }
	d.keys("y").shows("clipboard")
	if !strings.HasPrefix(sent, "\x1b]52;c;") {
		t.Errorf("sent %q", sent)
	}
	d.keys("w").shows("written to beckline-titrate-alkalinity-")
	files, err := os.ReadDir(".")
	if err != nil || len(files) != 1 {
		t.Fatal(files, err)
	}
	if text, err := os.ReadFile(files[0].Name()); err != nil || string(text) != d.m.work.outcome.Text {
		t.Errorf("written %q, %v", text, err)
	}
	d.keys("Esc").shows("titrate alkalinity: ").keys("Esc").shows("walking")
}

// TestNobodyWaits checks that an answer that comes after Esc moves nothing.
func TestNobodyWaits(t *testing.T) {
	d := withWork(t).keys("o", "titr", "Enter", "100", "Enter")
	_, cmd := d.m.Update(tea.KeyMsg{Type: tea.KeyRunes, Runes: []rune{'g'}})
	d.shows("working").keys("Esc").shows("walking")
	d.m.Update(cmd())
	d.shows("walking")
}

func TestWorkOnSmallAndLinearScreens(t *testing.T) {
	d := filled(t).run()
	said := strings.Join(d.m.speak().Statements, "\n")
	if !strings.Contains(said, "sample is missing") || !strings.Contains(said, "Local code") || !strings.HasPrefix(d.m.speak().Prompt, "sample: empty") {
		t.Errorf("%s\n%s", said, d.m.speak().Prompt)
	}
	d.size(60, 15).shows("form sample:").size(80, 24)
	d.keys("100", "Enter").run()
	if l := d.m.speak(); !strings.Contains(strings.Join(l.Statements, "\n"), "--sample=100") || !strings.Contains(l.Prompt, "Esc") {
		t.Errorf("%+v", l)
	}
}

// TestPlantFileInForms checks what a line of a plant file lends to commands with
// and without one.
func TestPlantFileInForms(t *testing.T) {
	d := plant(t, "one")
	d.m.work.commands = fakeCommands()
	d.keys("o", "mix", "Enter")
	args := strings.Join(d.m.work.form.args(), " ")
	for _, want := range []string{"--site=plant.toml", "--line=one", "--product=lye", "--add=alum=40 mg/L product"} {
		if !strings.Contains(args, want) {
			t.Errorf("no %s in %s", want, args)
		}
	}
	c := &d.m.work.commands[1]
	c.Fields = c.Fields[:len(c.Fields)-2]
	d.m.work.forms = nil
	d.keys("o", "mix", "Enter").shows("not filled in: alum")
	if args := strings.Join(d.m.work.form.args(), " "); !strings.Contains(args, "--product=caustic-50") || strings.Contains(args, "alum") {
		t.Error(args)
	}
}

// TestHelpHasTheForms checks that the keys of the forms are on the help page.
func TestHelpHasTheForms(t *testing.T) {
	d := filled(t).keys("?")
	for _, s := range []state{walking, filling, entering, answering} {
		for _, b := range bindings[s] {
			if b.help != "" && !strings.Contains(d.m.page.text, pad(b.shown, 10)+b.help) {
				t.Errorf("help lacks %s of %s", b.shown, stateNames[s])
			}
		}
	}
	d.keys("Esc").shows("mix: ")
}

// TestRandomKeysInForms presses keys at random in lists, forms and answers, of
// any size of terminal. Nothing may panic, and every frame must fit.
func TestRandomKeysInForms(t *testing.T) {
	t.Chdir(t.TempDir()) // w writes files
	rnd := rand.New(rand.NewPCG(*randomStart, 1))
	keys := []string{"o", "o", "Enter", "Enter", "Enter", "Down", "Down", "Up", "Esc", "BS", "Del", "PgDn", "PgUp", "Home", "End", "Tab", "S-Tab",
		"g", "l", "n", "c", "?", "t", "y", "w", "u", "Left", "Right", "C-u", "5", "7.", "lime=2", "caustic-25", "+", "-", "Space", "\x00", "\u202e"}
	sizes := [][2]int{{80, 24}, {132, 43}, {60, 15}, {80, 24}, {1, 1}, {200, 60}}
	d := withWork(t)
	d.m.hooks.send = func(string) {}
	been := map[state]int{}
	for range 3000 {
		key := keys[rnd.IntN(len(keys))]
		switch n := rnd.IntN(60); {
		case n == 0:
			size := sizes[rnd.IntN(len(sizes))]
			d.size(size[0], size[1])
		case n == 1:
			d.paste("7.1 \t100\n3")
		case n == 2: // by chance alone few forms are ever complete
			if d.keys("Esc", "Esc", "Esc", "o", "check", "Enter"); d.m.state == filling {
				d.run()
			}
		case n == 3:
			d.keys("Esc", "Esc", "Esc", "o", "titr", "Enter", "Home", "1")
		case key == "g" && d.m.state == filling:
			if _, cmd := d.m.Update(tea.KeyMsg{Type: tea.KeyRunes, Runes: []rune("g")}); cmd != nil && n%4 > 0 {
				d.m.Update(cmd())
			}
		default:
			d.keys(key)
		}
		been[d.m.state]++
		screen := d.screen()
		d.fits(screen)
		d.m.speak()
		if strings.ContainsAny(screen, "\x00\u202e") {
			t.Fatalf("a control character on the screen:\n%s", screen)
		}
		if t.Failed() {
			t.Fatalf("after %s of start %d", key, *randomStart)
		}
	}
	for _, s := range []state{filling, entering, answering} {
		if been[s] == 0 {
			t.Errorf("never %s: %v", stateNames[s], been)
		}
	}
}
