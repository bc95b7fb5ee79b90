package tui

// offer is a draft that an earlier session left.
type offer struct {
	said string // when and what, for a person
	load func() (sheet, error)
	done func() // it has been taken up
}

// waitingDraft is the newest draft on offer, while nothing of one's own has
// been entered.
func (m *Model) waitingDraft() (offer, bool) {
	untouched := m.sheet.Demo || m.sheet.plant != nil && len(m.history.past) == 0
	if !untouched || m.hooks.drafts == nil {
		return offer{}, false
	}
	all := m.hooks.drafts()
	if len(all) == 0 {
		return offer{}, false
	}
	return all[0], true
}

// takeDraft takes the draft up.
func (m *Model) takeDraft() {
	o, ok := m.waitingDraft()
	if !ok {
		m.note = "no draft is waiting"
		return
	}
	s, err := o.load()
	if err != nil {
		m.note = "the draft cannot be read: " + err.Error()
		return
	}
	m.change(s)
	o.done()
	m.note = "draft of " + o.said + " taken up; u goes back"
}
