package entry

import (
	"slices"
	"strconv"
	"strings"

	"beckline/dosing"
)

// nearestProducts offers up to three names for an unknown one: products that
// have it as their formula or at the start of a word of their name, title or
// chemical, else those whose names differ by the fewest letters.
func nearestProducts(name string) []string {
	wanted := hyphened(name)
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
	return nearest(wanted, names, 3)
}

// nearest returns up to n names in the order of how few letters have to change
// to make them of the wanted one; the first always, the others only if they are
// within one letter of it.
func nearest(wanted string, names []string, n int) []string {
	sorted := slices.Clone(names)
	slices.SortStableFunc(sorted, func(a, b string) int { return distance(wanted, a) - distance(wanted, b) })
	var near []string
	for _, name := range sorted {
		if len(near) == n || len(near) > 0 && distance(wanted, name) > distance(wanted, near[0])+1 {
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
