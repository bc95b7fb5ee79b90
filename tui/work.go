package tui

import (
	"os"
	"strings"

	tea "github.com/charmbracelet/bubbletea"

	"beckline/dosing/reading"
)

// Command is one command of the command line as the screen offers it: a form to
// fill in and something that runs it.
type Command struct {
	Name    string // as it is typed behind the program's name, "feed drawdown"
	Purpose string // one line
	Fields  []CommandField
	// Run runs it with its arguments, the name's words first, as the command line
	// would. It writes to no terminal and never ends the program. It is called
	// away from the screen's own loop, never twice at once by one screen.
	Run func(args []string) Outcome
}

// CommandField is one flag of a command, or the words that belong to no flag.
type CommandField struct {
	Name       string // of the flag without dashes, or of the words: "file"
	Unit       string // of a bare number, or what is to be typed; "" where plain
	Usage      string // one line or more, without a full stop
	Repeat     bool   // may be given several times
	Most       int    // how often, 0 for any number
	Switch     bool   // yes or no, without a value
	Positional bool   // words that belong to no flag
	Lent       bool   // what the line has of that name is filled in
	// Choices lists what may be taken from a list; nil where there is none. A name
	// that ends in "=" is the start of what is typed.
	Choices func() []Choice
}

// Choice is one entry of a list.
type Choice struct{ Name, Detail string }

// Outcome is what a command gives.
type Outcome struct {
	Text    string   // the answer, "" for a refusal
	Notes   []string // lines about the answer that are not part of it
	Refusal string   // one line for the operator, "" where there is an answer
	Field   string   // that the refusal is about, "" where it is about none
	Code    int      // exit code of the command line
	Gives   []Given  // readings that the answer found
}

// Given is one reading that an answer found, as it would be typed.
type Given struct{ Name, Text string }

// work is what is done on the screen beside the line: the commands, the forms
// that were opened, and the last answer.
type work struct {
	commands []Command
	forms    map[string]*workForm // kept while the program runs
	form     *workForm            // the one that is open, or was last
	turn     int                  // counts runs, to know an answer that nobody waits for
	running  bool
	outcome  Outcome
	page     page // of the answer
}

// workDone says that run number turn has ended.
type workDone struct {
	turn    int
	outcome Outcome
}

// ofWork tells whether a state belongs to the forms.
func ofWork(s state) bool { return s == filling || s == entering || s == answering }

// openForm is the form that is open, also below a list or a page; nil where the
// line is.
func (m *Model) openForm() *workForm {
	s := m.state
	switch s {
	case choosing:
		s = m.list.back
	case paging:
		s = m.page.back
	}
	if !ofWork(s) {
		return nil
	}
	return m.work.form
}

// chooseWork opens the list of the commands.
func (m *Model) chooseWork() {
	if len(m.work.commands) == 0 {
		m.note = "no other work is offered here"
		return
	}
	l := list{title: "other work", pick: (*Model).openWork}
	for _, c := range m.work.commands {
		l.all = append(l.all, choice{name: c.Name, detail: c.Purpose})
	}
	present := ""
	if m.work.form != nil {
		present = m.work.form.command.Name
	}
	m.openList(l, present)
}

// openWork opens the form of a command, as it was left, with what the line has
// now.
func (m *Model) openWork(name string) {
	f := m.work.forms[name]
	if f == nil {
		for i := range m.work.commands {
			if m.work.commands[i].Name == name {
				f = newWorkForm(&m.work.commands[i])
			}
		}
		if f == nil {
			return
		}
		if m.work.forms == nil {
			m.work.forms = map[string]*workForm{}
		}
		m.work.forms[name] = f
	}
	f.lend(m.sheet)
	m.work.form, m.state = f, filling
}

// runWork runs the form that is open.
func (m *Model) runWork() tea.Cmd {
	f := m.work.form
	if f == nil || m.work.running {
		return nil
	}
	m.work.turn++
	m.work.running = true
	f.refusal, f.trouble = "", ""
	turn, args, run := m.work.turn, f.args(), f.command.Run
	return func() tea.Msg { return workDone{turn, run(args)} }
}

// worked takes the end of a run. Whoever went back meanwhile is left in peace.
func (m *Model) worked(d workDone) {
	if d.turn != m.work.turn || !m.work.running {
		return
	}
	m.work.running = false
	f := m.work.form
	if d.outcome.Refusal != "" {
		f.refuse(d.outcome.Refusal, d.outcome.Field)
		if m.state == entering {
			m.state = filling
		}
		return
	}
	m.work.outcome = d.outcome
	var b strings.Builder
	for _, note := range d.outcome.Notes {
		b.WriteString(sentence(strings.TrimPrefix(note, "beckline: ")) + "\n\n")
	}
	text := strings.TrimRight(d.outcome.Text, "\n")
	if text == "" {
		text = "Done. It has nothing to show."
	}
	b.WriteString(shortened(text))
	m.work.page = page{title: "answer: " + f.command.Name, text: b.String()}
	m.state = answering
}

// mostShown is how many lines of an answer the screen shows.
const mostShown = 3000

// shortened cuts an answer that nobody reads on a screen.
func shortened(text string) string {
	n := 0
	for i, r := range text {
		if r != '\n' {
			continue
		}
		if n++; n == mostShown {
			return text[:i+1] + "\nThere are " + plural(strings.Count(text[i+1:], "\n")+1, "more line") + "; w writes them all to a file."
		}
	}
	return text
}

// leaveWork goes from the answer to the form, from the form to the line.
func (m *Model) leaveWork() {
	if m.work.running { // nobody waits for it any more
		m.work.running = false
		m.work.turn++
		m.note = "not waited for"
	}
	if m.state == answering {
		m.state = filling
		return
	}
	m.state = walking
}

// mostCopied is how many bytes terminals take into their clipboards.
const mostCopied = 70000

// copyWork sends the answer to the clipboard of the terminal.
func (m *Model) copyWork() {
	text := m.work.outcome.Text
	if len(text) > mostCopied {
		m.note = "too long for a clipboard; w writes it to a file"
		return
	}
	if m.hooks.send != nil {
		m.hooks.send(clipboardSequence(text, os.Getenv))
	}
	m.note = "answer sent to your terminal's clipboard; w writes it to a file"
}

// fileWork writes the answer to a new file.
func (m *Model) fileWork() {
	if f := m.work.form; f != nil {
		m.save(f.command.Name, f.suffix(), m.work.outcome.Text)
	}
}

// takeOver puts the readings that the answer found onto the line. What the demo
// plant had goes: no number of it stands beside a real one.
func (m *Model) takeOver() {
	var taken []string
	s := m.sheet.clone()
	if s.Demo {
		s = s.own()
	}
	for _, g := range m.work.outcome.Gives {
		if _, ok := reading.Lookup(g.Name); ok {
			s.set(lookupPlace(g.Name), g.Text)
			delete(s.Accepted, g.Name)
			taken = append(taken, lookupPlace(g.Name).label+" "+g.Text)
		}
	}
	if len(taken) == 0 {
		m.note = "this answer holds no reading for the line"
		return
	}
	m.state = walking
	m.change(s)
	m.at = 0
	for i, p := range m.line[0].places {
		if p.name == m.work.outcome.Gives[0].Name {
			m.row[0] = i
		}
	}
	m.note = "taken over: " + strings.Join(taken, ", ") + "; u takes it back"
}
