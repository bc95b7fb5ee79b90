package margin

import (
	"errors"
	"math"

	"beckline/carbonate"
	"beckline/dosing"
)

// route is the way from a raw water to its dose.
type route int

const (
	nowhere    route = iota // nothing is solved for
	byBalance               // to a pH: the balance at the target
	byDivision              // to an alkalinity
	bySearch                // one dose, anything else
	byPair                  // two doses
)

// chooseRoute takes the short way where it gives the answer that stands.
func (m *model) chooseRoute() {
	switch len(m.feeds) {
	case 0:
		m.route = nowhere
		return
	case 2:
		m.route = byPair
		return
	}
	m.route = bySearch
	if !m.plainTo {
		return
	}
	w, f := m.raw.Add(m.fixedTo, 1), &m.feeds[0]
	switch m.targets[0].Kind {
	case dosing.TargetPH:
		if d, _, err := m.k.DoseToPH(w, f.reagent, m.targets[0].Value); err == nil && near(d, f.dose) {
			m.route = byBalance
		}
	case dosing.TargetAlkalinity:
		if e := f.reagent.Equivalents; e != 0 && near((m.targets[0].Value-w.Alkalinity)/e, f.dose) {
			m.route = byDivision
		}
	}
}

func near(a, b float64) bool { return math.Abs(a-b) <= 1e-6*math.Abs(b) }

// needed are the doses that bring a raw water to the target, mol/L: 0 where it
// is there or past it, +Inf where none does it. guess is where a search starts.
func (m *model) needed(k *carbonate.Constants, raw carbonate.Water, guess doses) doses {
	switch m.route {
	case byBalance:
		d, _, err := k.DoseToPH(raw.Add(m.fixedTo, 1), m.feeds[0].reagent, m.targets[0].Value)
		if err == nil {
			return doses{max(d, 0)}
		}
		if errors.Is(err, carbonate.ErrOutOfReach) && m.past(k, raw) {
			return doses{}
		}
		return doses{math.Inf(1)}
	case byDivision:
		w := raw.Add(m.fixedTo, 1)
		return doses{max((m.targets[0].Value-w.Alkalinity)/m.feeds[0].reagent.Equivalents, 0)}
	case bySearch:
		return doses{m.search(k, raw, guess[0])}
	case byPair:
		return m.searchPair(k, raw, guess)
	}
	return doses{}
}
