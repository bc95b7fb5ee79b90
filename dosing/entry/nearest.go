package entry

import (
	"slices"
	"strconv"
	"strings"

	"beckline/dosing"
	"beckline/dosing/reading"
)

// nearestProducts offers up to three names for an unknown one: products that
// have it as their formula or at the start of a word of their name, title or
// chemical, else those whose names differ by the fewest letters, the strength
// at their end or not; none where that would be over half of the letters.
func nearestProducts(name string) []string {
	wanted := hyphened(reading.Clean(name))
	var holds, names []string
	for _, p := range dosing.Products() {
		names = append(names, p.Name)
		words := "-" + hyphened(p.Name+" "+p.Title+" "+p.Chemical.Name)
		formula := squashed(p.Chemical.Formula)
		if squashed(wanted) == formula || len(wanted) > 2 && strings.Contains(words, "-"+wanted) {
			holds = append(holds, p.Name)
		}
	}
	if len(holds) > 0 {
		return holds[:min(3, len(holds))]
	}
	apart := func(name string) int {
		stem := strings.TrimRight(strings.TrimRight(name, "0123456789"), "-")
		return min(distance(wanted, name), distance(wanted, stem))
	}
	return likely(wanted, closest(names, 3, 0, apart), apart) // a slack would offer an acid beside a caustic
}

// Nearest returns up to n names for one that is not among them: those that
// start with it, else those that need the fewest letters changed, at least one.
func Nearest(wanted string, names []string, n int) []string {
	wanted = strings.ToLower(reading.Clean(wanted))
	var starts []string
	for _, name := range names {
		if name == wanted { // but for capitals
			return []string{name}
		}
		if len(wanted) > 1 && strings.HasPrefix(name, wanted) {
			starts = append(starts, name)
		}
	}
	if len(starts) > 0 {
		return starts[:min(n, len(starts))]
	}
	return closest(names, n, 1, func(name string) int { return distance(wanted, name) })
}

// Likely is Nearest without names that the wanted one cannot have been meant
// for, so that it may be empty.
func Likely(wanted string, names []string, n int) []string {
	wanted = strings.ToLower(reading.Clean(wanted))
	near := Nearest(wanted, names, n)
	if len(wanted) > 1 && len(near) > 0 && strings.HasPrefix(near[0], wanted) {
		return near
	}
	return likely(wanted, near, func(name string) int { return distance(wanted, name) })
}

// likely drops the names that over half of the wanted one's letters would have
// to change for; one letter may always.
func likely(wanted string, near []string, apart func(name string) int) []string {
	most := max(1, len([]rune(wanted))/2)
	return slices.DeleteFunc(near, func(name string) bool { return apart(name) > most })
}

// closest returns up to n names in the order of how far they are apart; the
// first always, the others only if they are within slack letters of it.
func closest(names []string, n, slack int, apart func(name string) int) []string {
	sorted := slices.Clone(names)
	slices.SortStableFunc(sorted, func(a, b string) int { return apart(a) - apart(b) })
	var near []string
	for _, name := range sorted {
		if len(near) == n || len(near) > 0 && apart(name) > apart(near[0])+slack {
			break
		}
		near = append(near, name)
	}
	return near
}

// distance counts the letters to add, drop, change or swap with their neighbour
// to turn one text into the other (optimal string alignment; Damerau 1964).
func distance(from, to string) int {
	a, b := []rune(from), []rune(to)
	a = a[:min(len(a), 64)] // longer ones are near nothing
	before, last, row := make([]int, len(b)+1), make([]int, len(b)+1), make([]int, len(b)+1)
	for j := range last {
		last[j] = j
	}
	for i := 1; i <= len(a); i++ {
		row[0] = i
		for j := 1; j <= len(b); j++ {
			change := 1
			if a[i-1] == b[j-1] {
				change = 0
			}
			row[j] = min(last[j]+1, row[j-1]+1, last[j-1]+change)
			if i > 1 && j > 1 && a[i-1] == b[j-2] && a[i-2] == b[j-1] {
				row[j] = min(row[j], before[j-2]+1)
			}
		}
		before, last, row = last, row, before
	}
	return last[len(b)]
}

func trimmed(x float64) string { return strconv.FormatFloat(x, 'g', 6, 64) }
