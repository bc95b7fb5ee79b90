package tui

import (
	"time"

	tea "github.com/charmbracelet/bubbletea"

	"beckline/tui/canvas"
	"beckline/tui/painter"
)

// state says who gets the keys.
type state int

const (
	walking   state = iota // arrows move, letters are commands
	typing                 // printable keys go to the field
	choosing               // printable keys search a list
	paging                 // a page covers the middle of the screen
	pasting                // several pasted values wait for a yes
	filling                // a command's form: arrows move, letters are commands
	entering               // printable keys go to a field of the form
	answering              // the answer of a form
	states
)

// stateNames stand at the start of the bottom line.
var stateNames = [states]string{"walking", "typing", "searching", "reading", "pasting", "form", "entering", "answer"}

// pause is how long after the last key the figures follow. A 1 on the way to
// 121 is not a reading, and alarms must not flash on it.
const pause = 250 * time.Millisecond

// pausedMsg says that a pause has passed since key number seq.
type pausedMsg struct{ seq int }

// resumedMsg says that the terminal is ours again and shows we know not what.
type resumedMsg struct{}

// Model is the screen. It holds what was entered and where the person is, and
// hands each key to the part that deals with it.
type Model struct {
	solve  Solver
	look   look
	width  int
	height int

	sheet   sheet
	history history
	now     evaluation // of the sheet, or of what is being typed after a pause
	good    evaluation // the last one with figures
	old     bool       // the figures shown are older than what stands in the fields

	line []station // of the sheet
	at   int       // the station walked to
	row  []int     // the place in each station
	top  []int     // the first place shown in each station

	state  state
	edit   lineEdit
	before sheet // as it was when typing started
	asked  bool  // the question about an unusual value has been put
	paused bool  // the figures have followed what is being typed

	list  list
	page  page
	panel panel
	work  work
	paste []pasted

	pasteMore bool // the paste held more rows than the first, which is asked about

	taken *offer // the draft that was taken up last; nil without

	profile bool // the second view: figures along the line in place of the curve

	note string // one message, until the next key
	seq  int    // counts keys, to know a pause

	hooks hooks
}

// hooks are the ways out of the model. Any may be nil.
type hooks struct {
	frame   func(*canvas.Canvas)  // takes each frame
	lines   func(painter.Lines)   // takes each frame as lines in order
	send    func(sequence string) // passes a sequence to the terminal
	repaint func()                // paints everything again
	keep    func(sheet)           // keeps the draft, with what is being typed in it
	stop    func() tea.Cmd        // suspends the program
	drafts  func() []offer        // drafts that earlier sessions left
}

// newModel makes the screen for a sheet.
func newModel(s sheet, solve Solver, l look) *Model {
	m := &Model{solve: solve, look: l, width: 80, height: 24, sheet: s}
	m.relay()
	m.take(evaluate(m.sheet, m.solve))
	return m
}

// Init starts nothing: the screen acts on keys alone.
func (m *Model) Init() tea.Cmd { return nil }

// Update hands a message to the part that deals with it.
func (m *Model) Update(msg tea.Msg) (tea.Model, tea.Cmd) {
	switch msg := msg.(type) {
	case tea.WindowSizeMsg:
		m.width, m.height = max(msg.Width, 1), max(msg.Height, 1)
	case tea.KeyMsg:
		return m, m.key(msg)
	case workDone:
		m.worked(msg)
	case pausedMsg:
		m.follow(msg.seq)
	case resumedMsg:
		if m.hooks.repaint != nil {
			m.hooks.repaint()
		}
	}
	return m, nil
}

// View draws the screen. Where a painter takes the frames, nothing is left for
// anybody else to show.
func (m *Model) View() string {
	if m.look.linear && m.hooks.lines != nil {
		m.hooks.lines(m.speak().Wrapped(max(m.width-1, leastLinear)))
		return ""
	}
	c := m.draw()
	if m.hooks.frame != nil {
		m.hooks.frame(c)
		return ""
	}
	return c.String()
}

// key takes one key message. Keys that were typed ahead come together and are
// taken one by one.
func (m *Model) key(k tea.KeyMsg) tea.Cmd {
	m.seq++
	m.note = ""
	var cmd tea.Cmd
	switch {
	case k.Paste:
		m.pasteText(string(k.Runes))
	case k.Type == tea.KeyRunes && !k.Alt:
		for _, r := range k.Runes {
			if c := m.press(string(r)); c != nil {
				cmd = c
			}
			m.keepDraft() // each of them is a key
		}
	case k.Alt:
		// No key of ours is spelled with Alt. It also marks an Escape that
		// came together with the next key, which must not be taken for both.
	default:
		cmd = m.press(k.String())
	}
	m.keepDraft()
	if m.state == typing {
		seq := m.seq
		return tea.Batch(cmd, tea.Tick(pause, func(time.Time) tea.Msg { return pausedMsg{seq} }))
	}
	return cmd
}

// press does what a key means in the present state.
func (m *Model) press(key string) tea.Cmd {
	if b, ok := bindingFor(m.state, key); ok {
		return b.do(m)
	}
	r := []rune(key)
	if len(r) != 1 {
		return nil
	}
	switch m.state {
	case walking:
		m.startWith(r[0])
	case typing:
		m.typeRune(r[0])
	case choosing:
		m.list.search(r[0])
	case filling:
		m.startEntry(r[0])
	case entering:
		m.edit.insert(r[0])
	}
	return nil
}

// take puts an evaluation on the screen. One without figures leaves the last
// good ones, marked as old.
func (m *Model) take(e evaluation) {
	m.now = e
	if e.result != nil {
		m.good, m.old = e, false
		return
	}
	m.old = m.good.result != nil
}

// relay lays the line out again after the sheet has changed, and keeps the
// person in place.
func (m *Model) relay() {
	m.line = m.sheet.stations()
	for len(m.row) < len(m.line) {
		m.row, m.top = append(m.row, 0), append(m.top, 0)
	}
	m.at = min(m.at, len(m.line)-1)
	for i := range m.line {
		m.row[i] = min(m.row[i], len(m.line[i].places)-1)
	}
}

// station is the one walked to.
func (m *Model) station() station { return m.line[m.at] }

// place is the one walked to.
func (m *Model) place() place { return m.line[m.at].places[m.row[m.at]] }

// change replaces the sheet by an edited one and remembers the one before.
func (m *Model) change(s sheet) {
	if s.equal(m.sheet) {
		return
	}
	m.history.keep(m.sheet)
	m.use(s)
}

// use replaces the sheet and computes it.
func (m *Model) use(s sheet) {
	if s.Demo != m.sheet.Demo {
		m.good = evaluation{} // figures of the demo plant never stand beside real readings
	}
	m.sheet = s
	m.relay()
	m.take(evaluate(s, m.solve))
}

func (m *Model) keepDraft() {
	if m.hooks.keep == nil || m.sheet.Demo {
		return
	}
	s := m.sheet
	if m.state == typing {
		s = m.typed()
	}
	m.hooks.keep(s)
}
