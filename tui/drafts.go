package tui

import (
	"fmt"
	"time"

	"beckline/tui/draft"
)

// openDrafts ties the model to the drafts on disk. Where none can be kept the
// screen works all the same and says so once.
func (s *session) openDrafts(m *Model) {
	if s.options.Drafts == "none" {
		return
	}
	store, err := draft.Open(s.options.Drafts, time.Now())
	if err != nil {
		m.note = "no draft is kept: " + err.Error()
		return
	}
	s.store = store
	m.hooks.keep = func(sh sheet) { store.Keep(sh) }
	for _, saved := range store.Offers() {
		var sh sheet
		if saved.Load(&sh) != nil || sh.readings() == 0 {
			continue
		}
		s.offers = append(s.offers, offer{
			said: fmt.Sprintf("%s, %d readings", when(saved.When.Local(), time.Now()), sh.readings()),
			load: func() (sheet, error) {
				sh = sh.whole()
				sh.plant = s.options.Line
				return sh, nil
			},
			done: func() {
				saved.Remove()
				s.offers = s.offers[1:]
			},
		})
	}
	m.hooks.drafts = func() []offer { return s.offers }
}

// when says a time as a person would, with the day where it is not today.
func when(t, now time.Time) string {
	if t.Format("20060102") == now.Format("20060102") {
		return t.Format("15:04") + " today"
	}
	if t.Year() == now.Year() {
		return t.Format("15:04 on 2 Jan")
	}
	return t.Format("15:04 on 2 Jan 2006")
}
