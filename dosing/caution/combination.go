package caution

import (
	"slices"

	"beckline/dosing"
)

// Combination is two kinds of chemical that must not meet, or one and what it
// must not meet in any works.
type Combination struct {
	Short  string // plain ASCII, at most 76 columns
	Text   string
	Source string

	first, second []string // sheet keys; second empty: the first alone is enough
}

// Kinds of chemical, by sheet key.
var (
	acidKeys     = []string{"sulfuric-acid", "hydrochloric-acid", "nitric-acid", "phosphoric-acid", "acetic-acid", "formic-acid", "citric-acid", "fluorosilicic-acid"}
	acidReacting = slices.Concat(acidKeys, []string{"alum-dry", "alum-liquid", "ferric-chloride", "ferric-sulfate", "polyaluminium-chloride", "carbon-dioxide", "sodium-fluorosilicate"})
	ironSalts    = []string{"ferric-chloride", "ferric-sulfate"}
	bleaches     = []string{"hypochlorite", "calcium-hypochlorite"}
	chlorines    = slices.Concat(bleaches, []string{"chlorine"})
	ammonias     = []string{"ammonia", "ammonium-sulfate"}
	caustics     = []string{"caustic", "potassium-hydroxide"}
	limes        = []string{"lime", "quicklime"}
	carbonates   = []string{"soda-ash", "bicarbonate", "limestone"}
	organicAcids = []string{"acetic-acid", "formic-acid", "citric-acid"}
)

// Combinations returns every rule, the deadliest first.
func Combinations() []Combination {
	return []Combination{
		{"NEVER TOGETHER: acid or coagulant with hypochlorite - chlorine gas.",
			"Any acid or acid-reacting chemical (mineral and organic acids, alum, iron salts, polyaluminium chloride, hydrofluorosilicic acid, carbon dioxide) that gets into hypochlorite, or the reverse, sets chlorine gas free.",
			csb, acidReacting, bleaches},
		{"NEVER TOGETHER: ammonia or ammonium with chlorine - poison, explosive.",
			"Strong ammonia or ammonium solutions or gas with chlorine or any hypochlorite give poisonous chloramines and, with chlorine in excess, explosive nitrogen trichloride. Store them in separate sealed rooms. In dilute water, in the right ratio, the same two are dosed on purpose.",
			florida, ammonias, chlorines},
		{"NEVER TOGETHER: fluoride salts with acid - hydrogen fluoride.",
			"Sodium fluoride and sodium fluorosilicate with a strong acid set hydrogen fluoride free.",
			textbook, []string{"sodium-fluoride", "sodium-fluorosilicate"}, acidKeys},
		{"NEVER TOGETHER: nitric acid with organic acids - fire, bursting.",
			"Nitric acid oxidises organic acids and other organic matter, with heat, brown fumes and sometimes fire or bursting.",
			textbook, []string{"nitric-acid"}, organicAcids},
		{"NEVER TOGETHER: formic with strong sulfuric acid - carbon monoxide.",
			"Strong sulfuric acid splits formic acid into carbon monoxide and water.",
			textbook, []string{"formic-acid"}, []string{"sulfuric-acid"}},
		{"NEVER TOGETHER: calcium hypochlorite with other products - fire, gas.",
			"Calcium hypochlorite with organic acids, sodium hypochlorite, other disinfectants or soiled tools can heat, burn or burst. One scoop, one drum, one feeder.",
			cp, []string{"calcium-hypochlorite"}, []string{"hypochlorite", "chlorine"}},
		{"NEVER TOGETHER: strong caustic or lime with strong acid - heat, spatter.",
			"Concentrated caustic, lime or ammonia and a concentrated acid or iron salt boil and throw each other out. Separate bunds and drains; never neutralise a spill of one with the other at strength.",
			"ILO/WHO ICSC 0408 (lime, violent with acids); the rest textbook, from memory", slices.Concat(caustics, limes, []string{"ammonia"}), slices.Concat(acidKeys, ironSalts)},
		{"NEVER TOGETHER: caustic or lime with ammonium sulfate - ammonia gas.",
			"Strong bases drive ammonia gas out of ammonium salts.",
			textbook, slices.Concat(caustics, limes), []string{"ammonium-sulfate"}},
		{"NEVER TOGETHER: dry alum with quicklime - heat and hydrogen burst bins.",
			"The water in dry alum slakes quicklime. Never use one conveyor, bin or dust collector for both: heat and hydrogen can burst it.",
			"Recommended Standards for Water Works / AWWA operator texts, from memory", []string{"quicklime"}, []string{"alum-dry"}},
		{"KEEP APART: carbonates and acid - foam throws acid out.",
			"Soda ash, bicarbonate and limestone foam with carbon dioxide when acid meets them; in a closed vessel or a low room the gas itself is the danger.",
			textbook, carbonates, slices.Concat(acidKeys, ironSalts)},
		{"KEEP APART: polyaluminium chloride and alum - gel blocks the line.",
			"Polyaluminium chloride and alum in one tank or line make a gel that blocks it.",
			cp, []string{"polyaluminium-chloride"}, []string{"alum-dry", "alum-liquid"}},
		{"KEEP APART: silicate and acid - gel blocks the line.",
			"Sodium silicate sets to a gel with acids and acid coagulants.",
			cp, []string{"sodium-silicate"}, acidReacting},
		{"KEEP APART: quicklime and water, outside the slaker - it boils.",
			"Quicklime slakes with water with much heat: leaks, washdown and rain must not reach it.",
			pocket, []string{"quicklime"}, nil},
		{"KEEP APART: caustic and aluminium, zinc or galvanised parts - hydrogen.",
			"Caustic attacks aluminium, zinc and galvanised parts and sets hydrogen free, which burns.",
			"NIOSH Pocket Guide / CRC Handbook, from memory", caustics, nil},
	}
}

// Combined returns the short lines of what the chemicals of these sheet keys
// must not meet among themselves or in any works, the deadliest first; none for
// an empty list. It counts what stands in a works together, not what meets in
// the water, where a dilute dose is another matter.
func Combined(keys []string) []string {
	var out []string
	for _, c := range CombinationsOf(keys) {
		out = append(out, c.Short)
	}
	return out
}

// CombinationsOf returns the same rules whole.
func CombinationsOf(keys []string) []Combination {
	has := func(kind []string) bool {
		return slices.ContainsFunc(keys, func(k string) bool { return slices.Contains(kind, k) })
	}
	var out []Combination
	for _, c := range Combinations() {
		if has(c.first) && (c.second == nil || has(c.second)) {
			out = append(out, c)
		}
	}
	return out
}

// CombinedProducts is Combined for products.
func CombinedProducts(products []dosing.Product) []string {
	keys := make([]string, len(products))
	for i, p := range products {
		keys[i] = p.Caution
	}
	return Combined(keys)
}
