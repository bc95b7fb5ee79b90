//go:build unix

package console

import (
	"os"
	"os/signal"
	"syscall"
	"time"

	"golang.org/x/sys/unix"
)

// pieceGap is how long the rest of a key may take: under a quarter of a second
// even at 300 bits a second, and short enough that Escape feels immediate.
const pieceGap = 35 * time.Millisecond

// prepareOutput does nothing: terminals here understand sequences as they are.
func prepareOutput(*os.File) func() { return nil }

// LineFeedKeepsColumn says that a line feed in raw mode moves straight down.
const LineFeedKeepsColumn = true

// waitInput waits for input, at most d.
func waitInput(f *os.File, d time.Duration) bool {
	fds := []unix.PollFd{{Fd: int32(f.Fd()), Events: unix.POLLIN}}
	limit := time.Now().Add(d)
	for {
		left := time.Until(limit)
		if left < 0 {
			return false
		}
		n, err := unix.Poll(fds, int(left.Milliseconds())+1)
		if err == unix.EINTR {
			continue
		}
		return err == nil && n > 0 && fds[0].Revents&unix.POLLIN != 0
	}
}

// Signals asks for the signals that end the screen, and for those after which
// it must be drawn again.
func Signals(ending, redraw chan<- os.Signal) {
	signal.Notify(ending, syscall.SIGINT, syscall.SIGTERM, syscall.SIGHUP, syscall.SIGQUIT)
	signal.Notify(redraw, syscall.SIGWINCH, syscall.SIGCONT)
}

// IsResize reports whether a redraw signal means a new size only.
func IsResize(s os.Signal) bool { return s == syscall.SIGWINCH }

// Number returns the number of a signal.
func Number(s os.Signal) int {
	if n, ok := s.(syscall.Signal); ok {
		return int(n)
	}
	return 0
}
