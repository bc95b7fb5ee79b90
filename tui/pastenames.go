package tui

import (
	"strings"
	"unicode"
)

// shortNames are short forms and formulas that operators write for readings,
// beside the fields' own names, labels and keys. Common practice, no source.
var shortNames = map[string]string{
	"alk": "alkalinity", "talk": "alkalinity", "totalalkalinity": "alkalinity", "t": "temperature", "temp": "temperature",
	"watertemp": "temperature", "q": "flow", "flowrate": "flow", "ca": "calcium", "mg": "magnesium", "cahard": "calcium-hardness",
	"hard": "hardness", "totalhardness": "hardness", "so4": "sulfate", "sulphate": "sulfate", "cl": "chloride", "na": "sodium",
	"no3": "nitrate", "nh3": "ammonia", "nh4": "ammonia", "po4": "phosphate", "sio2": "silica", "cond": "conductivity", "ec": "conductivity",
}

// placesByName finds the place of a reading by any of its names, squeezed.
var placesByName = func() map[string]place {
	out := map[string]place{}
	for _, p := range rawPlaces {
		for _, name := range []string{p.name, p.label, p.field.Key} {
			out[squeezed(name)] = p
		}
	}
	for short, name := range shortNames {
		if p, ok := out[squeezed(name)]; ok {
			if _, taken := out[short]; !taken {
				out[short] = p
			}
		}
	}
	return out
}()

// squeezed is a name in small letters and digits alone.
func squeezed(name string) string {
	return strings.Map(func(r rune) rune {
		if unicode.IsLetter(r) || unicode.IsDigit(r) {
			return unicode.ToLower(r)
		}
		return -1
	}, name)
}

// namedValue is a piece of a paste: a value, and its reading where the paste
// names it.
type namedValue struct {
	place place
	named bool
	text  string
}

// mostNameWords is of how many words a name is at most.
const mostNameWords = 4

// nameAt reads a name at the start of the words, the longest there is.
func nameAt(words []string) (p place, used int, ok bool) {
	for k := min(mostNameWords, len(words)); k > 0; k-- {
		if p, ok = placesByName[squeezed(strings.Join(words[:k], ""))]; ok {
			return p, k, true
		}
	}
	return place{}, 0, false
}

// readNames takes a piece of a paste apart at the names in it. A word is a name
// only before a number, so that the Ca of mg/L Ca is none.
func readNames(piece string) []namedValue {
	words := strings.Fields(strings.NewReplacer(":", " ", "=", " ").Replace(piece))
	var out []namedValue
	now := namedValue{}
	for i := 0; i < len(words); {
		p, used, ok := nameAt(words[i:])
		if ok && i+used < len(words) && startsNumber(words[i+used]) {
			if now.text != "" {
				out = append(out, now)
			}
			now = namedValue{place: p, named: true, text: words[i+used]}
			i += used + 1
			continue
		}
		now.text = strings.TrimSpace(now.text + " " + words[i])
		i++
	}
	if now.text != "" {
		out = append(out, now)
	}
	return out
}

// namedPaste reads a paste in which readings are named or are told by their
// units. ok is false where none is: the values then go by their order. again
// says that more rows or values of the same readings were left out.
func namedPaste(text string) (values []namedValue, again bool, ok bool) {
	if values, again, ok = headedPaste(text); ok {
		return values, again, true
	}
	seen := map[string]bool{}
	add := func(v namedValue) {
		if seen[v.place.name] {
			again = true
			return
		}
		seen[v.place.name] = true
		values = append(values, v)
	}
	var loose []string
	for _, piece := range pieces(text) {
		for _, v := range readNames(piece) {
			switch {
			case v.named:
				add(v)
				ok = true
			case startsNumber(v.text):
				loose = append(loose, v.text)
			}
		}
	}
	for _, text := range loose {
		if p, sure := placeByUnit(text); ok && sure {
			add(namedValue{place: p, text: text})
		}
	}
	return values, again, ok
}

// pieces cuts a paste at line ends, tabs, semicolons, bars, and commas that a
// blank follows; a cell that is a name alone goes with the next.
func pieces(text string) []string {
	cut := strings.NewReplacer("\r", "\n", "\t", "\n", ";", "\n", "|", "\n", ", ", "\n")
	var out []string
	name := ""
	for _, piece := range strings.Split(cut.Replace(text), "\n") {
		if piece = strings.TrimSpace(piece); piece == "" {
			continue
		}
		words := strings.Fields(strings.NewReplacer(":", " ", "=", " ").Replace(piece))
		if _, used, ok := nameAt(words); ok && used == len(words) {
			name = piece + " "
			continue
		}
		out, name = append(out, name+piece), ""
	}
	return out
}

// headedPaste reads rows of a table below a row of names; the first row of
// values is taken.
func headedPaste(text string) (values []namedValue, again bool, ok bool) {
	rows := rowsOf(text)
	if len(rows) < 2 {
		return nil, false, false
	}
	heads, cells := rowCells(rows[0]), rowCells(rows[1])
	if len(heads) < 2 || len(numbers(heads)) > 0 || len(heads) < len(cells) || len(numbers(cells)) == 0 {
		return nil, false, false
	}
	for i, cell := range cells {
		head, unit, _ := strings.Cut(heads[i], "(")
		p, used, known := nameAt(strings.Fields(head))
		if !known || used != len(strings.Fields(head)) {
			continue
		}
		ok = true
		if unit = strings.TrimSpace(strings.TrimSuffix(strings.TrimSpace(unit), ")")); unit != "" && cell != "" && !hasUnit(cell) {
			cell += " " + unit
		}
		if cell != "" {
			values = append(values, namedValue{place: p, named: true, text: cell})
		}
	}
	return values, len(rows) > 2, ok && len(values) > 0
}

// rowsOf are the rows of a paste that are not empty.
func rowsOf(text string) []string {
	var rows []string
	for _, row := range strings.FieldsFunc(text, func(r rune) bool { return r == '\n' || r == '\r' }) {
		if strings.TrimSpace(row) != "" {
			rows = append(rows, row)
		}
	}
	return rows
}

// rowCells are the cells of a row, the empty ones too.
func rowCells(row string) []string {
	separator := ""
	for _, s := range []string{"\t", ";", "|", ", ", ","} {
		if strings.Contains(row, s) {
			separator = s
			break
		}
	}
	parts := strings.Fields(row)
	if separator != "" {
		parts = strings.Split(row, separator)
	}
	for i := range parts {
		parts[i] = strings.TrimSpace(parts[i])
	}
	return parts
}

// placeByUnit tells whose value a number with a unit is, among the readings
// that every answer needs.
func placeByUnit(text string) (place, bool) {
	if !hasUnit(text) {
		return place{}, false
	}
	var found place
	n := 0
	for _, p := range rawPlaces[:len(firstReadings)] {
		if _, err := p.field.Parse(text); err == nil {
			found = p
			n++
		}
	}
	return found, n == 1
}

// firstRow is the first of several rows of values, and whether there are more.
// Values one below the other are one row.
func firstRow(text string) (row string, more bool) {
	rows := rowsOf(text)
	if len(rows) < 2 {
		return text, false
	}
	for _, r := range rows {
		if len(splitPaste(r)) < 2 {
			return text, false
		}
	}
	return rows[0], true
}
