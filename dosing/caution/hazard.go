package caution

import "strings"

// GHS is the classification in the globally harmonised system: signal word and
// codes, and where it stands. Codes empty means not classified.
type GHS struct {
	Signal string // Danger, Warning or ""
	Codes  []string
	Note   string // what the codes hold for, e.g. "from 25 %"
	Source string
}

// hazardWords says each code in short words of our own; the official wording
// stands on the label.
var hazardWords = map[string]string{
	"H221": "burns in air", "H270": "makes fires fiercer", "H272": "makes fires fiercer", "H280": "under pressure",
	"H281": "cold burns", "H290": "eats metals", "H301": "poisonous if swallowed", "H302": "harmful if swallowed",
	"H311": "poisonous through skin", "H314": "burns skin and eyes", "H315": "irritates skin", "H318": "can blind",
	"H319": "irritates eyes", "H330": "deadly to breathe", "H331": "poisonous to breathe", "H335": "irritates airways",
	"H400": "kills water life", "H410": "kills water life for long",
	"EUH031": "poison gas with acid", "EUH032": "very poisonous gas with acid", "EUH071": "eats airways",
}

// Words gives the signal word and each code with its meaning; "Not classified"
// where there are none.
func (g GHS) Words() string {
	if len(g.Codes) == 0 {
		return "Not classified as dangerous."
	}
	parts := make([]string, len(g.Codes))
	for i, c := range g.Codes {
		parts[i] = c + " " + hazardWords[c]
	}
	text := g.Signal + ": " + strings.Join(parts, ", ")
	if g.Note != "" {
		text += " (" + g.Note + ")"
	}
	return text + "."
}

// Line is the classification as a line of a sheet.
func (g GHS) Line() Line { return Line{g.Words(), g.Source} }

func danger(source, note string, codes ...string) GHS {
	return GHS{Signal: "Danger", Codes: codes, Note: note, Source: source}
}

func warning(source, note string, codes ...string) GHS {
	return GHS{Signal: "Warning", Codes: codes, Note: note, Source: source}
}
