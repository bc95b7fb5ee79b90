package console

import (
	"os"
	"os/signal"
	"syscall"
	"time"

	"golang.org/x/sys/windows"
)

const pieceGap = 35 * time.Millisecond

// LineFeedKeepsColumn says that a line feed on this console also returns to
// the first column.
const LineFeedKeepsColumn = false

// prepareOutput has the console understand sequences, and returns what undoes
// that.
func prepareOutput(out *os.File) func() {
	h := windows.Handle(out.Fd())
	var mode uint32
	if windows.GetConsoleMode(h, &mode) != nil {
		return nil
	}
	if windows.SetConsoleMode(h, mode|windows.ENABLE_VIRTUAL_TERMINAL_PROCESSING) != nil {
		return nil
	}
	return func() { _ = windows.SetConsoleMode(h, mode) }
}

// waitInput never waits: this console delivers whole keys.
func waitInput(*os.File, time.Duration) bool { return false }

// Signals asks for the signals that end the screen. There is none for a resize:
// the key reader reports it.
func Signals(ending, redraw chan<- os.Signal) {
	signal.Notify(ending, os.Interrupt, syscall.SIGTERM)
}

// IsResize reports whether a redraw signal means a new size only.
func IsResize(os.Signal) bool { return true }

// Number returns the number of a signal.
func Number(s os.Signal) int {
	if n, ok := s.(syscall.Signal); ok {
		return int(n)
	}
	return 0
}
