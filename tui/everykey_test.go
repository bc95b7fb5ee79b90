//go:build linux

package tui

import (
	"fmt"
	"os"
	"os/exec"
	"strings"
	"testing"
)

// keyBytes are what a terminal sends for keys that are no characters.
var keyBytes = map[string]string{
	"up": "\x1b[A", "down": "\x1b[B", "right": "\x1b[C", "left": "\x1b[D", "home": "\x1b[H", "end": "\x1b[F",
	"pgup": "\x1b[5~", "pgdown": "\x1b[6~", "delete": "\x1b[3~", "backspace": "\x7f", "shift+tab": "\x1b[Z",
	"tab": "\t", "enter": "\r", "esc": "\x1b", "ctrl+a": "\x01", "ctrl+c": "\x03", "ctrl+e": "\x05", "ctrl+h": "\x08",
	"ctrl+j": "\n", "ctrl+l": "\x0c", "ctrl+u": "\x15", "ctrl+z": "\x1a",
}

// step is one key in one state, and what must follow: a text on the screen, or
// with a > before it among the bytes sent; "" for any change of the screen.
type step struct {
	in   state
	keys string // names of keys, with blanks between
	see  string
}

// walkAll is every key of the help page in every state. It starts at the demo
// plant with a draft on offer.
var walkAll = []step{
	{walking, "d", "taken up"}, {walking, "u", "DEMO PLANT"}, {walking, "r", "done again"},
	{walking, "right", "[caustic-25]"}, {walking, "left", "[raw water]"}, {walking, "down", "▸alkalinity"}, {walking, "up", "▸pH "},
	{walking, "tab", "▸alkalinity"}, {walking, "shift+tab", "▸pH "}, {walking, "end", "▸TDS"}, {walking, "home", "▸pH "},
	{walking, "pgdown", "▸calcium"}, {walking, "pgup", "▸pH "},
	{walking, "+", "7.05"}, {walking, "-", "7.00"}, {walking, "=", "7.05"}, {walking, "−", "7.00"},
	{walking, "down down down backspace", "DOSE, AS PRODUCT"}, {walking, "u", "SET THE PUMP TO"},
	{walking, "delete", "DOSE, AS PRODUCT"}, {walking, "u", "SET THE PUMP TO"},
	{walking, "g", ""}, {walking, "g", "twitchy"}, {walking, "m", "units US"}, {walking, "m", "units mixed"}, {walking, "m", "units SI"},
	{walking, "y", ">\x1b]52;c;"}, {walking, "ctrl+l", ">\x1b[2J"},

	{walking, "?", "Walking"}, {paging, "down", ""}, {paging, "up", ""}, {paging, "pgdown", ""}, {paging, "pgup", ""},
	{paging, " ", ""}, {paging, "home", ""}, {paging, "end", ""}, {paging, "y", ">\x1b]52;c;"}, {paging, "ctrl+l", ">\x1b[2J"},
	{paging, "esc", "walking"}, {walking, "?", "Walking"}, {paging, "?", "walking"}, {walking, "c", "First aid"}, {paging, "enter", "walking"},
	{walking, "w", "How far to trust it"}, {paging, "ctrl+j", "walking"}, {walking, "v", "warnings  "}, {paging, "esc", "walking"},
	{walking, "s", "worked sheet"}, {paging, "esc", "walking"},

	{walking, "f", "figures of"}, {choosing, "down", ""}, {choosing, "up", ""}, {choosing, "pgdown", ""}, {choosing, "pgup", ""},
	{choosing, "s o d i", ": sodi"}, {choosing, "backspace", ": sod"}, {choosing, "ctrl+h", ": so"}, {choosing, "ctrl+l", ">\x1b[2J"}, {choosing, "esc", "walking"},
	{walking, "t", "target of the finished"}, {choosing, "enter", "[finished]"}, {walking, "t", "target of the finished"}, {choosing, "ctrl+j", "[finished]"},
	{walking, "p l i m e", "hydrated lime"}, {choosing, "tab", "Lime dust"}, {walking, "u", "Caustic soda burns"},
	{walking, "Y", "log line"}, {choosing, "esc", "walking"},

	{walking, "left left left left a", "feed after raw water"}, {choosing, "a l u m enter", "[alum-dry]"},
	{walking, "2", "typing"}, {typing, "2 enter", "22.0"},
	{walking, "A", "feed before alum-dry"}, {choosing, "l i m e enter", "[lime]"}, {walking, "1 enter", "1.00"},
	{walking, "]", "alum-dry"}, {walking, "[", "lime"}, {walking, "x", "taken off"}, {walking, "x", "taken off"},

	{walking, "left left left home down ctrl+j", "typing"}, {typing, "left", ""}, {typing, "right", ""}, {typing, "home", ""}, {typing, "end", ""},
	{typing, "ctrl+a", ""}, {typing, "ctrl+e", ""}, {typing, "backspace", "▸alkalinity     3 "}, {typing, "ctrl+h", "▸alkalinity       "},
	{typing, "4 1 home delete", "▸alkalinity     1 "}, {typing, "ctrl+u", "▸alkalinity       "}, {typing, "ctrl+l", ">\x1b[2J"}, {typing, "esc", "walking"},
	{walking, "4 1", "41"}, {typing, "down", "▸temperature"}, {walking, "9", "9"}, {typing, "up", "▸alkalinity"},
	{walking, "4 2", "42"}, {typing, "tab", "▸temperature"}, {walking, "8", "8"}, {typing, "shift+tab", "▸alkalinity"},
	{walking, "enter", "typing"}, {typing, "ctrl+j", "▸temperature"},

	{walking, "paste", "Enter enters them"}, {pasting, "ctrl+l", ">\x1b[2J"}, {pasting, "esc", "walking"},
	{walking, "paste", "Enter enters them"}, {pasting, "enter", "7.31"}, {walking, "paste", "Enter enters them"}, {pasting, "ctrl+j", "walking"},
	{walking, "n", "emptied"},
}

// leaving are the keys that end or suspend the program, by state; each needs a
// session of its own.
var leaving = []string{"ctrl+c", "ctrl+z"}

// wayTo opens a state from walking.
var wayTo = [states]string{walking: "", typing: "7", choosing: "p", paging: "?", pasting: "\x1b[200~7.3 31 9\x1b[201~",
	filling: "o\r", entering: "o\r5", answering: "o\r5\rg"}

// TestScriptPressesEveryKey fails for a key of the help page that the script
// presses in none of its states.
func TestScriptPressesEveryKey(t *testing.T) {
	pressed := map[string]bool{}
	for _, s := range walkAll {
		for _, key := range splitKeys(s.keys) {
			pressed[fmt.Sprint(s.in, key)] = true
		}
	}
	for s := range states {
		for _, b := range bindings[s] {
			for _, key := range b.keys {
				left := key == leaving[0] || key == leaving[1] // TestLeavingFromEveryState
				if !left && !pressed[fmt.Sprint(s, key)] {
					t.Errorf("%s: nothing presses %q (%s)", stateNames[s], key, b.help)
				}
			}
		}
	}
}

func splitKeys(keys string) []string {
	if keys == " " {
		return []string{" "}
	}
	return strings.Fields(keys)
}

func (p *terminal) press(keys string) {
	p.t.Helper()
	for _, key := range splitKeys(keys) {
		switch bytes, special := keyBytes[key]; {
		case key == "paste":
			p.keys("\x1b[200~7.31 31 9.5 250\x1b[201~")
		case special:
			p.keys(bytes)
		default:
			p.keys(key)
		}
	}
}

// TestEveryKeyOfTheHelpPage presses every key of the help page on a real
// terminal and through sshd.
func TestEveryKeyOfTheHelpPage(t *testing.T) {
	everySetup(t, func(t *testing.T, s setup, p *terminal) {
		// A session that ends leaves the draft that the next one offers; here the
		// same state folder serves both.
		p.wait("DEMO PLANT")
		p.keys("7.0\r30\r10\r240\r")
		p.wait("84.6 mL/min")
		again := p.again()
		p.keys("\x03")
		p.ends(0)
		p = launch(t, s.columns, s.rows, again, p.cmd.Env)
		p.wait("DEMO PLANT", "d takes up")
		for i, st := range walkAll {
			p.mu.Lock()
			before, sent := p.screen.String(), p.all.Len()
			p.mu.Unlock()
			p.press(st.keys)
			what := fmt.Sprintf("step %d, %s %s, to give %q", i, stateNames[st.in], st.keys, st.see)
			p.until(what, func() bool {
				now := p.screen.String()
				if raw, isRaw := strings.CutPrefix(st.see, ">"); isRaw {
					return strings.Contains(p.all.String()[sent:], raw)
				}
				x, y := p.screen.X, p.screen.Y
				changed := now != before || x+y >= 0 && p.all.Len() > sent
				return changed && strings.Contains(now, s.seen(st.see))
			})
		}
		p.clean(s)
		p.keys("\x03")
		p.ends(0)
	})
}

// again is the same command once more.
func (p *terminal) again() *exec.Cmd {
	c := exec.Command(p.cmd.Path, p.cmd.Args[1:]...)
	c.Dir = p.cmd.Dir
	return c
}

// TestLeavingFromEveryState leaves and suspends from each state.
func TestLeavingFromEveryState(t *testing.T) {
	for s := range states {
		t.Run(stateNames[s], func(t *testing.T) {
			t.Parallel()
			// A shell with job control stands where a person's shell does.
			shell := exec.Command("sh", "-c", `set -m; "$0"; echo put aside; fg >/dev/null`, os.Args[0])
			p := launch(t, 80, 24, shell, []string{childVariable + "=none"})
			p.wait("DEMO PLANT")
			p.keys(wayTo[s])
			p.wait(stateNames[s])
			p.keys("\x1a")
			p.until("the shell", func() bool { return strings.Contains(p.all.String(), "put aside") })
			p.wait(stateNames[s], "Local code")
			p.keys("\x03")
			p.until("the terminal to be given back", func() bool { return !p.screen.Modes["1049"] && p.screen.Visible })
			if err := p.cmd.Wait(); err != nil {
				t.Error(err)
			}
			if p.settings() != p.found {
				t.Error("the terminal's settings are not as they were found")
			}
		})
	}
}
