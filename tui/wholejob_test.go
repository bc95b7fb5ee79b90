//go:build linux

package tui

import (
	"os"
	"os/exec"
	"strings"
	"testing"

	"beckline/dosing"
	"beckline/dosing/entry"
	"beckline/dosing/report"
	"beckline/tui/canvas"
)

// setup is one kind of terminal at the end of one kind of line.
type setup struct {
	name          string
	columns, rows int
	env           []string
	ascii, mono   bool
}

var setups = []setup{
	{"80x24", 80, 24, []string{"LANG=C.UTF-8"}, false, false},
	{"80x24 NO_COLOR", 80, 24, []string{"LANG=C.UTF-8", "NO_COLOR=1"}, false, true},
	{"132x43 ASCII", 132, 43, []string{"LANG=C"}, true, false},
	{"132x43 ASCII NO_COLOR", 132, 43, []string{"LANG=C", "NO_COLOR=1"}, true, true},
}

// everySetup drives the screen on a local terminal and through sshd, in every
// setup.
func everySetup(t *testing.T, drive func(t *testing.T, s setup, p *terminal)) {
	for _, s := range setups {
		t.Run("local "+s.name, func(t *testing.T) {
			t.Parallel() // they mostly wait
			cmd := exec.Command(self(t))
			cmd.Dir = t.TempDir() // where files are written
			drive(t, s, launch(t, s.columns, s.rows, cmd, append([]string{childVariable + "=none"}, s.env...)))
		})
	}
	t.Run("sshd", func(t *testing.T) {
		t.Parallel()
		server := startSSHD(t)
		for _, s := range setups {
			t.Run(s.name, func(t *testing.T) {
				t.Parallel()
				env := append([]string{childVariable + "=none", "TERM=xterm", "XDG_STATE_HOME=" + t.TempDir(), "GOCOVERDIR=" + t.TempDir(), "LC_ALL="}, s.env...)
				drive(t, s, launch(t, s.columns, s.rows, server.command(t.TempDir(), env, self(t)), nil))
			})
		}
	})
}

// self is the test binary, which plays the program.
func self(t *testing.T) string {
	path, err := os.Executable()
	if err != nil {
		t.Fatal(err)
	}
	return path
}

// seen is a text as the setup's terminal shows it.
func (s setup) seen(text string) string {
	if s.ascii {
		return strings.Map(canvas.ASCII, text)
	}
	return text
}

// clean fails if colours or characters were sent that the setup has not.
func (p *terminal) clean(s setup) {
	p.t.Helper()
	p.mu.Lock()
	defer p.mu.Unlock()
	for i, part := range strings.Split(p.all.String(), "\x1b[") {
		end := strings.IndexFunc(part, func(r rune) bool { return r >= '@' && r <= '~' })
		if i == 0 || end < 0 || part[end] != 'm' {
			continue
		}
		for _, a := range strings.Split(part[:end], ";") {
			if s.mono && a != "" && a[0] > '0' && a != "1" && a != "7" {
				p.t.Errorf("the attribute %q without colour", part[:end+1])
			}
		}
	}
	for _, r := range p.all.String() {
		if s.ascii && r > '~' {
			p.t.Fatalf("%q on an ASCII terminal", r)
		}
	}
}

// fed is the pump setting that the solver gives for a form, as the screen writes it.
func fed(t *testing.T, f entry.Form) string {
	t.Helper()
	c, err := f.Case(entry.NeedDose)
	if err != nil {
		t.Fatal(err)
	}
	r, err := dosing.Solve(c)
	if err != nil {
		t.Fatal(err)
	}
	return figure(report.Dose(r.Dose()), "feed_ml_min").ShowUnit()
}

// TestWholeJobByKeys does three jobs by keys alone: raises a pH with caustic,
// lowers one with acid after a wrong entry, and puts a coagulant ahead. The
// settings on the screen are those that the solver gives for the same forms.
func TestWholeJobByKeys(t *testing.T) {
	form := func(product, target string, adds ...string) entry.Form {
		return entry.Form{Product: product, Adds: adds,
			Values: map[string]string{"ph": "7.05", "alkalinity": "31", "temperature": "9.5", "flow": "250", "target-ph": target}}
	}
	everySetup(t, func(t *testing.T, s setup, p *terminal) {
		p.wait("DEMO PLANT", "SET THE PUMP TO")
		p.keys("7.05\r31\r9.5\r250\r")
		p.wait(fed(t, form("caustic-25", "8.40")))
		p.keys("psulfuric-93\r") // the wrong way, until the target is lower
		p.wait("WRONG WAY")
		p.keys("\x1b[C\x1b[C\x1b[A\x1b[B66\r") // 66 for 6.6
		p.wait("ENTRIES BEFORE", "accepted")
		p.keys("\x1b[A6.6\r")
		p.wait(fed(t, form("sulfuric-93", "6.6")), "for pH 6.60")
		p.keys("u")
		p.wait("accepted: 4 to 11.5")
		p.keys("u")
		p.wait("WRONG WAY")
		p.keys("u")
		p.wait(fed(t, form("caustic-25", "8.40")))
		p.keys("\x1b[D\x1b[D\x1b[Daalum-dry\r22\r")
		p.wait(fed(t, form("caustic-25", "8.40", "alum-dry=22")), s.seen("alum-dry"), "Alum dust")
		p.keys("y")
		p.wait("sent to your terminal's clipboard")
		p.clean(s)
		p.keys("\x03")
		p.ends(0)
	})
}
