package tui

import (
	"strings"

	"beckline/carbonate"
	"beckline/dosing"
)

// feedEntry is one step of the path beside the dose that is solved for: a
// chemical fed at a given dose, air, or limestone.
type feedEntry struct {
	Product string `json:"product"`        // of the catalogue or the plant's own; or one of the processes
	Dose    string `json:"dose,omitempty"` // as typed; what an aeration takes out
	// Chlorine only: what is to be left and what the water uses up, as typed.
	Residual string `json:"residual,omitempty"`
	Demand   string `json:"demand,omitempty"`
	Behind   bool   `json:"behind,omitempty"` // the water meets it after the chemical that is solved for
}

// The processes, by the words that the commands have for them.
const (
	aeration  = "aeration"
	contactor = "contactor"
)

func isProcess(name string) bool { return name == aeration || name == contactor }

// processes are what the list of chemicals offers beside them.
var processes = []choice{
	{name: aeration, detail: "air takes CO2 out: give the share that leaves, or the pH after it"},
	{name: contactor, detail: "limestone bed: takes up calcite to SI 0; needs calcium"},
}

// side sorts what is ahead of the solved chemical before what is behind it.
func (a feedEntry) side() int {
	if a.Behind {
		return 1
	}
	return 0
}

// chlorinates tells whether residual and demand mean something.
func (a feedEntry) chlorinates() bool {
	p, ok := dosing.ProductByName(a.Product)
	return ok && p.Chemical.Adds[carbonate.Chlorine] > 0
}

// missing tells whether the dose is still to come.
func (a feedEntry) missing() bool {
	return a.Product != contactor && strings.TrimSpace(a.Dose) == "" && (!a.chlorinates() || a.Residual == "")
}

// text is the step as the commands take it.
func (a feedEntry) text() string {
	switch {
	case a.Product == contactor:
		return contactor
	case a.Product == aeration:
		amount := strings.TrimSpace(a.Dose)
		if amount != "" && !hasUnit(amount) { // a bare number is a share in per cent
			amount += " %"
		}
		return aeration + "=" + amount
	}
	text := a.Product + "="
	if a.Residual != "" {
		text += "residual " + a.Residual
	} else {
		text += a.Dose
	}
	if a.Demand != "" {
		text += " demand " + a.Demand
	}
	return text
}

// splitAdd takes such a text apart.
func splitAdd(add string, behind bool) feedEntry {
	name, amount, _ := strings.Cut(add, "=")
	a := feedEntry{Product: strings.TrimSpace(name), Dose: strings.TrimSpace(amount), Behind: behind}
	if !a.chlorinates() {
		return a
	}
	if rest, demand, found := cutWord(a.Dose, "demand"); found {
		a.Dose, a.Demand = rest, demand
	}
	if rest, residual, found := cutWord(a.Dose, "residual"); found && rest == "" {
		a.Dose, a.Residual = "", residual
	}
	return a
}

// cutWord splits a text at a word of its own, in any case of letters.
func cutWord(text, word string) (before, after string, found bool) {
	words := strings.Fields(text)
	for i, w := range words {
		if strings.EqualFold(w, word) {
			return strings.Join(words[:i], " "), strings.Join(words[i+1:], " "), true
		}
	}
	return text, "", false
}
