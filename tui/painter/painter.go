package painter

import (
	"io"
	"sync"
	"time"

	"beckline/tui/canvas"
)

// gather is how long a frame waits after the one before it, so that a burst of
// keys makes one frame. The first frame after a pause goes out at once.
const gather = 8 * time.Millisecond

// Painter owns the terminal's output. All methods may be called from any
// goroutine.
type Painter struct {
	out    io.Writer
	fault  func(any)
	wake   chan struct{}
	done   chan struct{}
	closed sync.Once

	mu     sync.Mutex
	differ *Differ
	next   *canvas.Canvas
	lines  *Lines
	linear *linear // not nil: lines in order instead of a screen
	raw    []byte  // sequences to send ahead of the next frame
	open   bool    // the terminal is ours

	writing chan struct{} // holds a token while bytes are on their way
}

// New makes a painter that writes to out. It starts left: Enter takes the
// terminal. fault is told of a fault in the painter's own goroutine, which then
// paints no more; Leave still works.
func New(out io.Writer, fault func(any), d *Differ) *Painter {
	p := &Painter{
		out: out, fault: fault, differ: d,
		wake: make(chan struct{}, 1), done: make(chan struct{}),
		writing: make(chan struct{}, 1),
	}
	go p.run()
	return p
}

// NewLinear makes a painter of lines in order: it takes ShowLines, not Show.
func NewLinear(out io.Writer, fault func(any)) *Painter {
	p := New(out, fault, NewDiffer(Attributes{}, false))
	p.linear = &linear{}
	return p
}

// Sequences that take and give back the terminal. A terminal without a second
// screen ignores that part; clearing it leaves nothing behind there either.
const (
	enter = "\x1b[?1049h\x1b[?2004h"
	leave = "\x1b[m\x1b[H\x1b[2J\x1b[?25h\x1b[?2004l\x1b[?1049l"
)

// Enter takes the terminal: second screen, marked pastes. The next frame is a
// full one.
func (p *Painter) Enter() {
	p.mu.Lock()
	defer p.mu.Unlock()
	if p.open {
		return
	}
	p.open = true
	p.again()
}

// again has the next frame be a full one, after what takes the terminal.
func (p *Painter) again() {
	p.differ.Forget()
	if p.linear != nil {
		p.linear = &linear{}
		return
	}
	p.raw = append(p.raw, enter...)
}

// Again takes the terminal once more after somebody else had it, without
// having been left: after a stop that we were not told of.
func (p *Painter) Again() {
	p.mu.Lock()
	defer p.mu.Unlock()
	if !p.open {
		return
	}
	p.again()
	p.nudge()
}

// Leave gives the terminal back. It waits for bytes that are on their way, but
// no longer than patience: a line that is stopped must not keep us.
func (p *Painter) Leave(patience time.Duration) {
	limit := time.After(patience)
	select {
	case p.writing <- struct{}{}:
	case <-limit:
		return
	}
	p.mu.Lock()
	was := p.open
	p.open, p.next, p.lines, p.raw = false, nil, nil, nil
	p.differ.Forget()
	p.mu.Unlock()
	if !was {
		<-p.writing
		return
	}
	sent := make(chan struct{})
	go func() {
		defer close(sent)
		if p.linear != nil {
			io.WriteString(p.out, "\r\n")
		} else {
			io.WriteString(p.out, leave)
		}
		<-p.writing
	}()
	select {
	case <-sent:
	case <-limit:
	}
}

// Show makes c the frame to be shown. Only the newest is ever sent. The caller
// must not draw on c afterwards.
func (p *Painter) Show(c *canvas.Canvas) {
	p.mu.Lock()
	defer p.mu.Unlock()
	if !p.open {
		return
	}
	p.next = c
	p.nudge()
}

// ShowLines is Show for a painter of lines.
func (p *Painter) ShowLines(l Lines) {
	p.mu.Lock()
	defer p.mu.Unlock()
	if !p.open {
		return
	}
	p.lines = &l
	p.nudge()
}

// Repaint makes the next frame a full one.
func (p *Painter) Repaint() {
	p.mu.Lock()
	defer p.mu.Unlock()
	p.differ.Forget()
	if p.linear != nil {
		p.linear = &linear{prompt: " "}
	}
}

// Send passes a sequence that does not move the cursor, e.g. a clipboard text.
func (p *Painter) Send(sequence string) {
	p.mu.Lock()
	defer p.mu.Unlock()
	if !p.open {
		return
	}
	p.raw = append(p.raw, sequence...)
	p.nudge()
}

// Close ends the painter's goroutine.
func (p *Painter) Close() { p.closed.Do(func() { close(p.done) }) }

func (p *Painter) nudge() {
	select {
	case p.wake <- struct{}{}:
	default:
	}
}

// run sends what there is to send, one frame at a time.
func (p *Painter) run() {
	defer func() {
		if r := recover(); r != nil {
			p.fault(r)
		}
	}()
	for {
		select {
		case <-p.done:
			return
		case <-p.wake:
		}
		started := time.Now()
		p.flush()
		if rest := gather - time.Since(started); rest > 0 {
			select {
			case <-p.done:
				return
			case <-time.After(rest):
			}
		}
	}
}

func (p *Painter) flush() {
	p.writing <- struct{}{}
	defer func() { <-p.writing }()
	bytes := p.due()
	if len(bytes) == 0 {
		return
	}
	// One write, so that the frame arrives whole where the line allows it. An
	// error means that the terminal has gone: the hang-up signal tells.
	_, _ = p.out.Write(bytes)
}

// due takes what is to be sent.
func (p *Painter) due() []byte {
	p.mu.Lock()
	defer p.mu.Unlock()
	next, lines, raw := p.next, p.lines, p.raw
	p.next, p.lines, p.raw = nil, nil, nil
	if !p.open {
		return nil
	}
	if lines != nil && p.linear != nil {
		raw = append(raw, p.linear.frame(*lines)...)
	}
	if next != nil {
		raw = append(raw, p.differ.Frame(next)...)
	}
	return raw
}
