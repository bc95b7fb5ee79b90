package tui

import (
	"flag"
	"math/rand/v2"
	"testing"

	tea "github.com/charmbracelet/bubbletea"
)

var (
	randomKeys  = flag.Int("randomkeys", 4000, "how many random keys, pastes and resizes")
	randomStart = flag.Uint64("randomstart", 1, "where they start")
)

// TestRandomKeys presses keys, pastes and resizes at random. Nothing may panic,
// and every frame must fit the terminal.
func TestRandomKeys(t *testing.T) {
	t.Chdir(t.TempDir()) // some of them write files
	rnd := rand.New(rand.NewPCG(*randomStart, 0))
	special := []tea.KeyType{tea.KeyEnter, tea.KeyEnter, tea.KeyTab, tea.KeyShiftTab, tea.KeyEsc, tea.KeyUp, tea.KeyDown, tea.KeyLeft,
		tea.KeyRight, tea.KeyHome, tea.KeyEnd, tea.KeyPgUp, tea.KeyPgDown, tea.KeyBackspace, tea.KeyDelete, tea.KeyCtrlU, tea.KeyCtrlL,
		tea.KeyF1, tea.KeyCtrlA, tea.KeyCtrlJ, tea.KeySpace, tea.KeyInsert}
	characters := []rune("0123456789012345678901234567890.,-+eE %/mgLnptycvwfurdaxAsgmY[]qi?&üéж漢\u0301\u200b\u202e\x00")
	pastes := []string{"7.05", "7.05 31 9.5 240", "7,05;31;9,5", "a\tb\tc", "", "\x1b[31m8.1", "1\n2\n3\n4\n5\n6\n7\n8\n9\n1\n2\n3\n4\n5\n6\n7\n8\n9\n1\n2\n3\n4\n5\n6\n7\n8\n9",
		"1e999", "120 mg/L CaCO3", "\t\t7\t", "NaN NaN", string(make([]byte, 3000))}
	sizes := [][2]int{{80, 24}, {80, 24}, {81, 25}, {132, 43}, {300, 100}, {79, 24}, {80, 23}, {40, 10}, {20, 5}, {1, 1}, {200, 24}, {80, 60}, {0, 0}}
	d := demo(t)
	for i := range *randomKeys {
		var msg tea.Msg
		switch n := rnd.IntN(100); {
		case n < 55:
			msg = tea.KeyMsg{Type: tea.KeyRunes, Runes: []rune{characters[rnd.IntN(len(characters))]}}
		case n < 90:
			msg = tea.KeyMsg{Type: special[rnd.IntN(len(special))]}
		case n < 93:
			msg = tea.KeyMsg{Type: tea.KeyRunes, Runes: []rune(pastes[rnd.IntN(len(pastes))]), Paste: true}
		case n < 95:
			size := sizes[rnd.IntN(len(sizes))]
			msg = tea.WindowSizeMsg{Width: size[0], Height: size[1]}
		default:
			msg = pausedMsg{d.m.seq}
		}
		d.m.Update(msg)
		screen := d.screen()
		d.fits(screen)
		for _, r := range screen {
			if r < ' ' && r != '\n' || r == 0x7f || r == 0x202e {
				t.Fatalf("a control character %q on the screen:\n%s", r, screen)
			}
		}
		if d.m.good.solved && d.m.good.result == nil || d.m.at >= len(d.m.line) || d.m.row[d.m.at] >= len(d.m.station().places) {
			t.Fatalf("nonsense after key %d, %v", i, msg)
		}
		if t.Failed() {
			t.Fatalf("after key %d of start %d: %v", i, *randomStart, msg)
		}
	}
}
