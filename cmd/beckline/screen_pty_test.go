//go:build linux

package main

import (
	"os"
	"os/exec"
	"strings"
	"sync"
	"testing"
	"time"

	"github.com/creack/pty"

	"beckline/tui/vt"
)

// TestScreenRunsCommandsByKeys opens the program on a terminal, types four
// readings, fills two forms in by keys and reads the answers that the command
// line gives.
func TestScreenRunsCommandsByKeys(t *testing.T) {
	state := t.TempDir()
	cmd := &exec.Cmd{Path: os.Args[0], Args: []string{"beckline"}, Env: []string{"TERM=xterm", "LANG=C.UTF-8", "HOME=" + state,
		"XDG_STATE_HOME=" + state, "XDG_CONFIG_HOME=" + state, "GOCOVERDIR=" + state}}
	tty, err := pty.StartWithSize(cmd, &pty.Winsize{Rows: 24, Cols: 80})
	if err != nil {
		t.Skip("no pseudo-terminal here: ", err)
	}
	defer tty.Close()
	defer cmd.Process.Kill() //nolint:errcheck // it has ended, if all went well
	var mu sync.Mutex
	screen, news := vt.New(80, 24), make(chan struct{}, 1)
	go func() {
		b := make([]byte, 4096)
		for {
			n, err := tty.Read(b)
			if err != nil {
				return
			}
			mu.Lock()
			_, _ = screen.Write(b[:n])
			mu.Unlock()
			select {
			case news <- struct{}{}:
			default:
			}
		}
	}()
	limit := time.After(20 * time.Second)
	press := func(keys string, wanted ...string) {
		t.Helper()
		if _, err := tty.WriteString(keys); err != nil {
			t.Fatal(err)
		}
		for {
			mu.Lock()
			shown := screen.String()
			mu.Unlock()
			missing := ""
			for _, text := range wanted {
				if !strings.Contains(shown, text) {
					missing = text
				}
			}
			if missing == "" {
				return
			}
			select {
			case <-news:
			case <-limit:
				t.Fatalf("after %q waited in vain for %q; the screen:\n%s", keys, missing, shown)
			}
		}
	}
	press("", "DEMO PLANT")
	press("7.0\r30\r10\r240\r", "84.6 mL/min")
	press("o", "other work", "blend")
	press("titrate alk\r", "titrate alkalinity: burette", "normality")
	press("100\r", "▸normality")
	press("0.02\r", "▸start")
	press("g", "!▸end", "end is missing")
	press("12.6\r", "▸used")
	press("g", "answer: titrate alkalinity", "126", "t takes over to the line: alkalinity 126")
	press("t", "taken over: alkalinity 126", "walking")
	press("o", "other work")
	press("trim\r", "trim: the finished pH", "▸measured")
	press("8.1\r", "▸measured-temperature")
	press("g", "answer: trim", "Local code")
	press("\x1b", "trim: the finished pH", "8.1")
	press("o", "other work")
	press("check\r", "check: recompute")
	press("g", "answer: check", "1-18 of")
	press("\x1b", "check: recompute")
	press("\x1b", "walking")
	if _, err := tty.WriteString("\x03"); err != nil {
		t.Fatal(err)
	}
	if err := cmd.Wait(); err != nil {
		t.Error(err)
	}
}
