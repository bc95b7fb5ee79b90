// Package caution holds what to mind when a chemical is handled: one sheet a
// chemical, what must never meet what, and the sentence that leaves the last
// word to local code, label and operator. The screen, the commands and SAFETY.md
// all draw from here.
//
//	sheet.go         Sheet, For, Of, Sheets
//	bases.go, acids.go, coagulants.go, disinfectants.go, others.go   the sheets
//	common.go        lines that several sheets share, and the general rules
//	hazard.go        hazard statements in short words of our own
//	limit.go         exposure limits
//	combination.go   what must never meet: Combined
//	freeze.go        freezing points by product
//	text.go, markdown.go   a sheet as plain text, all of them as SAFETY.md
//
// Every line names where it comes from, or says "common practice, no source".
package caution

import (
	"slices"
	"sync"

	"beckline/dosing"
)

// Deferral is the sentence that goes with every caution: at most 76 columns.
const Deferral = "Local code, label, certified maximum use level, licensed operator decide."

// Line is one caution and where it comes from.
type Line struct {
	Text   string
	Source string
}

// Sheet is everything to mind about one chemical as it is handled in a works.
type Sheet struct {
	Key        string   // Product.Caution
	Title      string   // plain name
	Short      []string // for a panel, most important first; plain ASCII, at most 76 columns
	GHS        GHS
	Hazards    []Line // what it does to people, apart from GHS
	Protection []Line // what to wear
	FirstAid   []Line
	Handling   []Line
	Dilution   []Line
	Storage    []Line // and what it must be kept apart from
	Freezing   []Line // by product
	Limits     []Limit
}

// sheets builds all sheets once: a screen asks for them at every key.
var sheets = sync.OnceValue(func() []Sheet {
	out := slices.Concat(bases(), acids(), coagulants(), disinfectants(), fluorides(), otherSheets())
	for i := range out {
		out[i].Freezing = freezing(out[i].Key)
	}
	return out
})

// Sheets returns all sheets, grouped by kind: bases, acids, coagulants,
// disinfectants, fluorides, the rest. Their lines are shared: not to be changed.
func Sheets() []Sheet { return slices.Clone(sheets()) }

// For returns the sheet of a key (dosing.Product.Caution). A key without sheet
// gives one that says so and asks for the supplier's own, never an empty one.
func For(key string) Sheet {
	for _, s := range sheets() {
		if s.Key == key {
			return s
		}
	}
	return Sheet{
		Key: key, Title: key,
		Short:   []string{"No sheet here for this chemical: read the supplier's before handling it."},
		Hazards: []Line{{"No sheet is held for this chemical. Treat it as corrosive and poisonous until the supplier's sheet says otherwise.", cp}},
	}
}

// strongCaustic is the mass fraction of NaOH from which the line on going solid
// in a cool room belongs on the panel; weaker caustic freezes far below 0 C.
const strongCaustic = 0.4

// Of returns the sheet of a product, its freezing point and its short lines
// being those of the product at its own strength.
func Of(p dosing.Product) Sheet {
	s := For(p.Caution)
	s.Freezing = freezingOf(p)
	if p.Chemical.Formula == "NaOH" && p.Strength < strongCaustic {
		s.Short = slices.DeleteFunc(slices.Clone(s.Short), func(line string) bool { return line == solidCaustic })
	}
	return s
}
