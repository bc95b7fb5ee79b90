package tui

import (
	"slices"
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
		sh = sh.whole()
		sh.plant = s.options.Line
		if slices.ContainsFunc(s.offers, func(o offer) bool { return o.sheet.equal(sh) }) {
			saved.Remove() // a newer draft holds the very same
			continue
		}
		s.offers = append(s.offers, offer{
			said:  when(saved.When.Local(), time.Now()) + ", " + plural(sh.readings(), "reading"),
			sheet: sh,
			done:  saved.Remove,
		})
	}
	s.offers = fullestFirst(s.offers)
	m.hooks.drafts = func() []offer { return s.offers }
}

// enough is how many readings a dose needs: pH or DIC, alkalinity, temperature.
const enough = 3

// fullestFirst puts the drafts with enough for a dose first, then the fuller
// ones; among equals the newest stays first. A stray digit of a later session
// then hides nothing.
func fullestFirst(offers []offer) []offer {
	full := func(o offer) int { return min(o.sheet.readings(), enough) }
	slices.SortStableFunc(offers, func(a, b offer) int { return full(b) - full(a) })
	return offers
}

// dropTaken removes the draft that was taken up, once the session has been left
// and its own draft holds as much.
func (s *session) dropTaken(m *Model) {
	if o := m.taken; o != nil && !m.sheet.Demo && m.sheet.readings() >= o.sheet.readings() && !s.store.Failing() {
		o.done()
	}
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
