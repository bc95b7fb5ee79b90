//go:build linux || darwin

package tui

import (
	"bytes"
	"fmt"
	"os"
	"os/exec"
	"path/filepath"
	"strings"
	"sync"
	"syscall"
	"testing"
	"time"

	"github.com/creack/pty"
	"golang.org/x/sys/unix"

	"beckline/tui/vt"
)

// terminal is the program on a real pseudo-terminal, seen by a small terminal.
type terminal struct {
	t     *testing.T
	cmd   *exec.Cmd
	tty   *os.File // our end
	other *os.File // the program's end, kept open to see what it leaves behind
	found unix.Termios

	mu     sync.Mutex
	screen *vt.Screen
	all    bytes.Buffer
	news   chan struct{}
	errs   bytes.Buffer
}

// start opens the screen in a terminal of 80 × 24 that answers no query.
func start(t *testing.T, fault string, env ...string) *terminal {
	t.Helper()
	return launch(t, 80, 24, exec.Command(os.Args[0]), append([]string{childVariable + "=" + fault}, env...))
}

// launch runs a command in a terminal of a size.
func launch(t *testing.T, columns, rows int, cmd *exec.Cmd, env []string) *terminal {
	t.Helper()
	ours, theirs, err := pty.Open()
	if err != nil {
		t.Skip("no pseudo-terminal here: ", err)
	}
	if err := pty.Setsize(ours, &pty.Winsize{Rows: uint16(rows), Cols: uint16(columns)}); err != nil {
		t.Fatal(err)
	}
	p := &terminal{t: t, tty: ours, other: theirs, screen: vt.New(columns, rows), news: make(chan struct{}, 1)}
	p.found = p.settings()
	p.cmd = cmd
	p.cmd.Stdin, p.cmd.Stdout, p.cmd.Stderr = theirs, theirs, &p.errs
	p.cmd.SysProcAttr = &syscall.SysProcAttr{Setsid: true, Setctty: true}
	p.cmd.Env = append([]string{"TERM=xterm", "LANG=C.UTF-8", "XDG_STATE_HOME=" + t.TempDir(), "GOCOVERDIR=" + t.TempDir(),
		"HOME=" + t.TempDir(), "PATH=" + os.Getenv("PATH")}, env...)
	if err := p.cmd.Start(); err != nil {
		t.Fatal(err)
	}
	t.Cleanup(func() {
		_ = p.cmd.Process.Kill()
		ours.Close()
		theirs.Close()
	})
	go p.read()
	return p
}

func (p *terminal) settings() unix.Termios {
	s, err := unix.IoctlGetTermios(int(p.other.Fd()), ioctlGetTermios)
	if err != nil {
		p.t.Fatal(err)
	}
	return *s
}

func (p *terminal) read() {
	b := make([]byte, 4096)
	for {
		n, err := p.tty.Read(b)
		if err != nil {
			return
		}
		p.mu.Lock()
		p.all.Write(b[:n])
		_, _ = p.screen.Write(b[:n])
		p.mu.Unlock()
		select {
		case p.news <- struct{}{}:
		default:
		}
	}
}

// keys sends bytes as a keyboard would.
func (p *terminal) keys(s string) {
	p.t.Helper()
	if _, err := p.tty.WriteString(s); err != nil {
		p.t.Fatal(err)
	}
}

// wait waits until the screen holds every text.
func (p *terminal) wait(texts ...string) {
	p.t.Helper()
	p.until(fmt.Sprintf("the screen to show %q", texts), func() bool {
		s := p.screen.String()
		for _, text := range texts {
			if !strings.Contains(s, text) {
				return false
			}
		}
		return true
	})
}

// until waits for something of the screen, which is locked meanwhile.
func (p *terminal) until(what string, done func() bool) {
	p.t.Helper()
	limit := time.After(10 * time.Second)
	for {
		p.mu.Lock()
		ok, shown := done(), p.screen.String()
		p.mu.Unlock()
		if ok {
			return
		}
		select {
		case <-p.news:
		case <-limit:
			p.t.Fatalf("waited in vain for %s; the screen:\n%s\nerrors: %s", what, shown, p.errs.String())
		}
	}
}

// ends waits for the end and checks the exit code and that the terminal is as
// it was found.
func (p *terminal) ends(code int) {
	p.t.Helper()
	done := make(chan error, 1)
	go func() { done <- p.cmd.Wait() }()
	select {
	case <-done:
	case <-time.After(10 * time.Second):
		p.t.Fatal("it does not end")
	}
	if got := p.cmd.ProcessState.ExitCode(); got != code {
		p.t.Errorf("exit code %d, want %d; errors: %s", got, code, p.errs.String())
	}
	if p.settings() != p.found {
		p.t.Error("the terminal's settings are not as they were found")
	}
	p.until("the terminal to be given back", func() bool {
		return !p.screen.Modes["1049"] && !p.screen.Modes["2004"] && p.screen.Visible
	})
	p.mu.Lock()
	defer p.mu.Unlock()
	if s := p.screen.String(); strings.TrimSpace(s) != "" {
		p.t.Errorf("something was left on the screen:\n%s", s)
	}
	if len(p.screen.Unknown) > 0 {
		p.t.Errorf("sequences beyond a VT100, or queries: %q", p.screen.Unknown)
	}
	if strings.Contains(p.errs.String(), "goroutine ") {
		p.t.Errorf("a stack trace reached the person:\n%s", p.errs.String())
	}
}

// TestFourReadings types four readings, sees the dose, and leaves.
func TestFourReadings(t *testing.T) {
	p := start(t, "none")
	p.wait("DEMO PLANT", "SET THE PUMP TO")
	p.keys("7.0\r30\r10\r240\r")
	p.wait("product and target are the starting ones", "L/h", "6.73")
	p.keys("\x03")
	p.ends(0)
	if p.errs.Len() > 0 {
		t.Errorf("something on standard error: %s", p.errs.String())
	}
}

// TestMuteTerminal checks that the terminal is asked nothing before the first
// frame: one that does not answer would hold the program up for 5 s, in every
// command, and swallow what is typed meanwhile. It guards the order of
// initialisation that package quiet depends on.
func TestMuteTerminal(t *testing.T) {
	p := start(t, "none")
	p.wait("DEMO PLANT")
	p.mu.Lock()
	for _, query := range []string{"\x05", "\x1b]10;", "\x1b]11;", "\x1b[6n", "\x1b[c", "\x1b[>", "\x1b[?u"} {
		if strings.Contains(p.all.String(), query) {
			t.Errorf("the terminal was asked %q", query)
		}
	}
	p.mu.Unlock()
	p.keys("\x03")
	p.ends(0)
}

// TestSignals checks the exit codes and the terminal after each signal.
func TestSignals(t *testing.T) {
	for _, sig := range []syscall.Signal{syscall.SIGINT, syscall.SIGTERM, syscall.SIGHUP, syscall.SIGQUIT} {
		t.Run(sig.String(), func(t *testing.T) {
			p := start(t, "none")
			p.wait("DEMO PLANT")
			p.keys("7.1") // in the middle of typing
			p.wait("7.1")
			if err := p.cmd.Process.Signal(sig); err != nil {
				t.Fatal(err)
			}
			p.ends(128 + int(sig))
		})
	}
}

// TestSignalWhileStuck checks that a signal ends a program whose own loop
// hangs.
func TestSignalWhileStuck(t *testing.T) {
	state := t.TempDir()
	p := start(t, "stuck", "XDG_STATE_HOME="+state)
	p.wait("DEMO PLANT")
	p.keys("6.66\r30\r10\r")
	for limit := time.Now().Add(10 * time.Second); ; time.Sleep(5 * time.Millisecond) {
		if _, err := os.Stat(filepath.Join(state, "stuck")); err == nil {
			break
		} else if time.Now().After(limit) {
			t.Fatal("it does not hang")
		}
	}
	if err := p.cmd.Process.Signal(syscall.SIGTERM); err != nil {
		t.Fatal(err)
	}
	p.ends(128 + int(syscall.SIGTERM))
}

// TestFaults checks that a fault of ours, in the loop or in a goroutine, leaves
// the terminal as it was and one line for the person.
func TestFaults(t *testing.T) {
	for fault, keys := range map[string][2]string{"solver": {"6.66\r30\r", "10\r"}, "painter": {"7", "6"}} {
		t.Run(fault, func(t *testing.T) {
			p := start(t, fault)
			p.wait("DEMO PLANT")
			p.keys(keys[0])
			p.wait("STILL NEEDED")
			p.keys(keys[1])
			p.ends(exitMachine)
			if s := strings.TrimSpace(p.errs.String()); !strings.HasPrefix(s, "beckline: a fault") || strings.Contains(s, "\n") {
				t.Errorf("errors: %q, want one line", s)
			}
		})
	}
}

// resize gives the terminal another size.
func (p *terminal) resize(columns, rows int) {
	p.t.Helper()
	p.mu.Lock()
	modes := p.screen.Modes
	p.screen = vt.New(columns, rows)
	p.screen.Modes = modes
	p.mu.Unlock()
	if err := pty.Setsize(p.tty, &pty.Winsize{Rows: uint16(rows), Cols: uint16(columns)}); err != nil {
		p.t.Fatal(err)
	}
}

// TestResize checks that a new size is drawn for.
func TestResize(t *testing.T) {
	p := start(t, "none")
	p.wait("DEMO PLANT")
	p.resize(50, 12)
	p.wait("needs 80 x 24")
	p.resize(100, 30)
	p.wait("DEMO PLANT", "walking")
	p.keys("\x03")
	p.ends(0)
}

// TestTornKeys sends an arrow key in pieces, as a slow line does.
func TestTornKeys(t *testing.T) {
	p := start(t, "none")
	p.wait("[raw water]")
	p.keys("\x1b")
	time.Sleep(5 * time.Millisecond)
	p.keys("[")
	time.Sleep(5 * time.Millisecond)
	p.keys("C")
	p.wait("[caustic-25]")
	p.keys("\x03")
	p.ends(0)
}

// TestDumbTerminal types four readings on a terminal that can only go on.
func TestDumbTerminal(t *testing.T) {
	p := start(t, "none", "TERM=dumb")
	p.wait("Demo plant")
	p.keys("7.0\r30\r10\r240\r")
	p.until("the answer", func() bool { return strings.Contains(p.all.String(), "et the pump to 5.07 L/h") })
	p.mu.Lock()
	if strings.Contains(p.all.String(), "\x1b") {
		t.Errorf("escape sequences on a dumb terminal: %q", p.all.String())
	}
	p.screen = vt.New(80, 24)
	p.mu.Unlock()
	p.keys("\x03")
	p.ends(0)
}
