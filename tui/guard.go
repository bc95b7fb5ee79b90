package tui

import (
	"fmt"
	"os"
	"path/filepath"
	"runtime/debug"
	"time"

	tea "github.com/charmbracelet/bubbletea"
)

// guard stands between the program and the model. A fault of ours must not
// reach a person as a stack trace, nor leave the terminal taken: it is noted,
// the screen ends in order, and one line tells.
type guard struct {
	model   *Model
	session *session
}

// Init is the model's.
func (g *guard) Init() tea.Cmd { return g.model.Init() }

// Update is the model's, with faults caught, in its commands too.
func (g *guard) Update(msg tea.Msg) (model tea.Model, cmd tea.Cmd) {
	defer func() {
		if r := recover(); r != nil {
			g.session.note(r)
			model, cmd = g, tea.Quit
		}
	}()
	_, cmd = g.model.Update(msg)
	return g, g.caught(cmd)
}

// View is the model's, with faults caught.
func (g *guard) View() (view string) {
	defer func() {
		if r := recover(); r != nil {
			g.session.ended(r)
		}
	}()
	return g.model.View()
}

// caught makes a command whose faults end the screen in order; it runs in a
// goroutine of its own.
func (g *guard) caught(cmd tea.Cmd) tea.Cmd {
	if cmd == nil {
		return nil
	}
	return func() (msg tea.Msg) {
		defer func() {
			if r := recover(); r != nil {
				g.session.note(r)
				msg = tea.Quit()
			}
		}()
		msg = cmd()
		if batch, ok := msg.(tea.BatchMsg); ok {
			for i := range batch {
				batch[i] = g.caught(batch[i])
			}
		}
		return msg
	}
}

// note keeps the first fault.
func (s *session) note(fault any) {
	s.mu.Lock()
	defer s.mu.Unlock()
	if s.fault == nil {
		s.fault, s.stack = fault, debug.Stack()
	}
}

// ended notes a fault that came from outside of Update and ends the screen.
func (s *session) ended(fault any) {
	s.note(fault)
	go s.program.Quit()
}

// recovered is deferred in goroutines of ours.
func (s *session) recovered() {
	if r := recover(); r != nil {
		s.ended(r)
	}
}

// tellFault says in one line what happened and where the details are.
func (s *session) tellFault() {
	line := "beckline: a fault in the program ended the screen; what you entered is kept as a draft"
	if dir := s.options.Drafts; dir != "" && dir != "none" {
		path := filepath.Join(filepath.Dir(dir), "fault-"+time.Now().UTC().Format("20060102T150405")+".txt")
		if os.WriteFile(path, fmt.Appendf(nil, "%v\n\n%s", s.fault, s.stack), 0o600) == nil {
			line += "; details in " + path
		}
	}
	fmt.Fprintln(s.options.Err, line)
}
