package tui

import "strconv"

// offer is a draft that an earlier session left.
type offer struct {
	said  string // when and what, for a person
	sheet sheet
	done  func() // removes it
}

// offered are the drafts that can be taken up, the first one first.
func (m *Model) offered() []offer {
	if m.hooks.drafts == nil {
		return nil
	}
	return m.hooks.drafts()
}

// waitingDraft is the first draft on offer, while nothing of one's own has been
// entered.
func (m *Model) waitingDraft() (offer, bool) {
	all := m.offered()
	untouched := m.sheet.Demo || m.sheet.plant != nil && len(m.history.past) == 0
	if !untouched || len(all) == 0 {
		return offer{}, false
	}
	return all[0], true
}

// takeDraft takes a draft up: the first one, and pressed again the next. It
// stays on the disk until the session is left. Over entries of one's own it
// does nothing.
func (m *Model) takeDraft() {
	all := m.offered()
	if len(all) == 0 {
		m.note = "no draft is waiting"
		return
	}
	next := 0
	_, untouched := m.waitingDraft()
	switch at := m.takenAt(all); {
	case at >= 0 && len(all) == 1:
		m.note = "this is the only draft, of " + all[0].said
		return
	case at >= 0:
		next = (at + 1) % len(all)
	case !untouched && m.sheet.readings() > 0:
		m.note = plural(len(all), "draft") + " kept: n empties the line, then d takes one up"
		return
	}
	o := all[next]
	m.taken = &o
	m.change(o.sheet)
	m.note = "draft of " + o.said + " taken up; u goes back"
	if len(all) > 1 {
		m.note = "draft " + strconv.Itoa(next+1) + " of " + strconv.Itoa(len(all)) + ", of " + o.said + ", taken up; d the next, u goes back"
	}
}

// takenAt tells which of the drafts stands unchanged on the screen, -1 for none.
func (m *Model) takenAt(all []offer) int {
	if m.taken == nil {
		return -1
	}
	for i, o := range all {
		if o.sheet.equal(m.sheet) {
			return i
		}
	}
	return -1
}
