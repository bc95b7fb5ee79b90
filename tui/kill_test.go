//go:build linux || darwin

package tui

import (
	"flag"
	"math/rand/v2"
	"strings"
	"testing"
	"time"
)

var kills = flag.Int("kills", 4, "how often a session is killed in the middle of typing")

// entered is what the screen shows in the fields of the four readings, one
// after the other.
func (p *terminal) entered() string {
	p.mu.Lock()
	defer p.mu.Unlock()
	var all string
	for _, line := range p.screen.Lines() {
		r := []rune(line)
		for _, label := range []string{"pH  ", "alkalinity  ", "temperature  ", "flow  "} {
			if len(r) > valueColumn && strings.HasPrefix(string(r[labelColumn:]), label) && r[valueColumn] != ' ' {
				all += strings.TrimSpace(string(r[valueColumn:min(len(r), unitColumn)]))
			}
		}
	}
	return all
}

// TestKilledSessionLeavesItsDraft kills sessions at random moments of typing.
// The next start offers a draft that is at most one key behind what the screen
// had shown.
func TestKilledSessionLeavesItsDraft(t *testing.T) {
	const keys = "31.5\r9.5\r242\r"
	rnd := rand.New(rand.NewPCG(*randomStart, 1))
	for range *kills {
		state := t.TempDir()
		p := start(t, "none", "XDG_STATE_HOME="+state)
		p.wait("DEMO PLANT")
		p.keys("7.05\r") // a draft without a whole reading is not worth an offer
		p.wait("STILL NEEDED", "7.05")
		for i := range rnd.IntN(len(keys)) {
			p.keys(keys[i : i+1])
			time.Sleep(time.Duration(rnd.IntN(3000)) * time.Microsecond)
		}
		_ = p.cmd.Process.Kill()
		_ = p.cmd.Wait()
		shown := p.entered()

		q := start(t, "none", "XDG_STATE_HOME="+state)
		q.wait("d takes up the draft of")
		q.keys("d")
		q.wait("taken up")
		if kept := q.entered(); len(kept)+1 < len(shown) {
			t.Errorf("the screen showed %q, the draft holds %q", shown, kept)
		}
		q.keys("\x03")
		q.ends(0)
		p.tty.Close()
		p.other.Close()
		q.tty.Close()
		q.other.Close()
	}
}
