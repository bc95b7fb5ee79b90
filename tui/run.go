package tui

import (
	"fmt"
	"io"
	"os"
	"os/signal"
	"runtime/debug"
	"sync"
	"time"

	tea "github.com/charmbracelet/bubbletea"

	"beckline/dosing"
	"beckline/dosing/entry"
	"beckline/dosing/site"
	"beckline/tui/console"
	"beckline/tui/draft"
	"beckline/tui/painter"
	_ "beckline/tui/quiet" // no question to the terminal; see there
)

// Options is how the screen is started. The zero value is the usual way.
type Options struct {
	In, Out *os.File // the terminal; default standard input and output
	Err     io.Writer
	Form    *entry.Form // readings to start with; nil: the line's, or the demo plant
	Line    *site.Line  // line of a plant file: its products, pump, limits, tolerances; nil without
	Solve   Solver      // default dosing.Solve
	// Commands are offered as forms, beside the line; none without.
	Commands []Command
	Env      func(string) string
	Linear   bool   // lines of text in order and no boxes, for a screen reader
	ASCII    bool   // plain characters only
	Drafts   string // folder of the drafts; default by XDG, "none": keep none
}

// Exit codes of the screen beside 0 and 128 + the number of a signal.
const (
	exitMachine = 3 // the terminal or the program failed
)

func (o Options) withDefaults() Options {
	if o.In == nil {
		o.In = os.Stdin
	}
	if o.Out == nil {
		o.Out = os.Stdout
	}
	if o.Err == nil {
		o.Err = os.Stderr
	}
	if o.Solve == nil {
		o.Solve = dosing.Solve
	}
	if o.Env == nil {
		o.Env = os.Getenv
	}
	if o.Drafts == "" {
		o.Drafts = draft.Dir(o.Env)
	}
	return o
}

// Run opens the screen and returns the exit code: 0 after leaving, 128 + n
// after signal n, 3 where the terminal or the program failed. The terminal is
// given back as it was found in every case.
func Run(o Options) int {
	o = o.withDefaults()
	// The screen's garbage is small and short-lived: collecting it often costs
	// no visible time and keeps the program small beside others on an old box.
	defer debug.SetGCPercent(debug.SetGCPercent(30))
	term := console.Open(o.In, o.Out)
	if !term.IsTerminal() {
		fmt.Fprintln(o.Err, "beckline: the screen needs a terminal for input and output; beckline dose --help says how to do without")
		return exitMachine
	}
	if err := term.Raw(); err != nil {
		fmt.Fprintln(o.Err, "beckline: the terminal cannot be used:", err)
		return exitMachine
	}
	s := &session{options: o, term: term, signalled: make(chan struct{})}
	return s.run()
}

// output lets tests stand between the painter and the terminal.
var output = func(f *os.File) io.Writer { return f }

// session is one run of the screen on a terminal.
type session struct {
	options Options
	term    *console.Console
	paint   *painter.Painter
	program *tea.Program
	store   *draft.Store
	offers  []offer

	restoring sync.Once
	signalled chan struct{} // closed by the first signal
	mu        sync.Mutex
	signal    os.Signal
	fault     any
	stack     []byte
}

func (s *session) run() (code int) {
	o := s.options
	l := lookOf(o.Env)
	if o.ASCII {
		l.glyphs = asciiGlyphs
	}
	l.linear = l.linear || o.Linear
	if l.linear {
		s.paint = painter.NewLinear(output(o.Out), s.ended)
	} else {
		s.paint = painter.New(output(o.Out), s.ended, painter.NewDiffer(l.attributesOf(), console.LineFeedKeepsColumn))
	}
	defer s.restore()
	s.paint.Enter()

	m := s.model(l)
	s.openDrafts(m)
	s.program = tea.NewProgram(&guard{m, s},
		tea.WithInput(s.term.Keys()), tea.WithOutput(io.Discard), tea.WithoutRenderer(),
		tea.WithoutSignalHandler(), tea.WithoutCatchPanics(), tea.WithFilter(s.filter))
	stop := s.watch()
	defer stop()
	err := s.loop()
	s.restore()
	s.store.Close()
	if code = s.exit(err); code == 0 {
		s.dropTaken(m)
	}
	return code
}

// loop runs the program; a fault in its own loop is noted like one of ours.
func (s *session) loop() (err error) {
	defer func() {
		if r := recover(); r != nil {
			s.note(r)
		}
	}()
	_, err = s.program.Run()
	return err
}

// model makes the model and ties it to the terminal.
func (s *session) model(l look) *Model {
	sheet := newSheet(entry.Demo(), true)
	if s.options.Line != nil {
		sheet = newPlantSheet(s.options.Line)
	}
	if s.options.Form != nil {
		sheet = newSheet(*s.options.Form, false)
		sheet.plant = s.options.Line
	}
	m := newModel(sheet, s.options.Solve, l)
	m.work.commands = s.options.Commands
	m.width, m.height = s.term.Size()
	m.hooks = hooks{
		frame:   s.paint.Show,
		lines:   s.paint.ShowLines,
		send:    s.paint.Send,
		repaint: s.paint.Repaint,
		stop:    func() tea.Cmd { return tea.Suspend },
	}
	return m
}

// restore gives the terminal back. It is called from wherever the end comes
// from, and works once.
func (s *session) restore() {
	s.restoring.Do(func() {
		s.paint.Leave(patience)
		_ = s.term.Restore()
		s.paint.Close()
	})
}

// patience is how long the last bytes may take before the terminal is given
// back without them.
const patience = 700 * time.Millisecond

// filter stands before the model: around a suspension the terminal is given
// back and taken again.
func (s *session) filter(_ tea.Model, msg tea.Msg) tea.Msg {
	switch msg.(type) {
	case tea.SuspendMsg:
		s.paint.Leave(patience)
		_ = s.term.Restore()
	case tea.ResumeMsg:
		_ = s.term.Raw()
		s.paint.Enter()
		width, height := s.term.Size()
		return tea.WindowSizeMsg{Width: width, Height: height}
	}
	return msg
}

// watch handles the signals: those that end the screen, a new size, and a
// return from a stop that somebody else ordered.
func (s *session) watch() (stop func()) {
	ending, redraw, done := make(chan os.Signal, 4), make(chan os.Signal, 4), make(chan struct{})
	console.Signals(ending, redraw)
	go func() {
		defer s.recovered()
		for {
			select {
			case <-done:
				return
			case sig := <-ending:
				s.end(sig)
			case sig := <-redraw:
				if !console.IsResize(sig) {
					_ = s.term.Again()
					s.paint.Again()
				}
				width, height := s.term.Size()
				s.program.Send(tea.WindowSizeMsg{Width: width, Height: height})
			}
		}
	}()
	return func() {
		signal.Stop(ending)
		signal.Stop(redraw)
		close(done)
	}
}

// end ends the screen because of a signal. The program gets a moment to leave
// in order; then the terminal is given back without it.
func (s *session) end(sig os.Signal) {
	s.mu.Lock()
	if s.signal == nil {
		s.signal = sig
		close(s.signalled)
	}
	s.mu.Unlock()
	go s.program.Quit()
	time.AfterFunc(2*time.Second, func() {
		s.restore()
		os.Exit(128 + console.Number(sig))
	})
}

// exit says how it ended, where that is not plain, and gives the code.
func (s *session) exit(err error) int {
	if err != nil { // a line that hangs up fails first and signals then
		select {
		case <-s.signalled:
		case <-time.After(300 * time.Millisecond):
		}
	}
	s.mu.Lock()
	defer s.mu.Unlock()
	switch {
	case s.fault != nil:
		s.tellFault()
		return exitMachine
	case s.signal != nil:
		return 128 + console.Number(s.signal)
	case err != nil:
		fmt.Fprintln(s.options.Err, "beckline: the terminal cannot be read any more:", err)
		return exitMachine
	}
	return 0
}
