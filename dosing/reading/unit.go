package reading

import (
	"strings"
	"unicode"
)

// unit is one way to state a quantity: SI = (x + offset) * factor.
type unit struct {
	name   string   // as shown, and accepted
	also   []string // other accepted spellings
	factor float64
	offset float64
}

func (u unit) toSI(x float64) float64   { return (x + u.offset) * u.factor }
func (u unit) fromSI(v float64) float64 { return v/u.factor - u.offset }

// unclear is a spelling that is refused because it has two readings, or
// because a wrong letter would change the value a thousandfold.
type unclear struct {
	spellings []string
	instead   string // what to write
}

// spellings finds units by what was typed.
type spellings struct {
	exact   map[string]int    // normalised -> index of the unit
	folded  map[string]int    // and without regard to case
	unclear map[string]string // normalised -> what to write instead
}

func index(units []unit, refused []unclear) spellings {
	s := spellings{map[string]int{}, map[string]int{}, map[string]string{}}
	for i, u := range units {
		for _, text := range append([]string{u.name}, u.also...) {
			key := normalise(text)
			s.exact[key] = i
			s.folded[fold(key)] = i
		}
	}
	for _, r := range refused {
		for _, text := range r.spellings {
			s.unclear[normalise(text)] = r.instead
		}
	}
	return s
}

// find returns the index of a typed unit. Case counts only where it must: a
// leading M is mega, a leading m is milli.
func (s spellings) find(text string) (i int, ok bool) {
	key := normalise(text)
	if i, ok = s.exact[key]; ok {
		return i, true
	}
	if _, refused := s.unclear[key]; refused {
		return 0, false
	}
	i, ok = s.folded[fold(key)]
	return i, ok
}

// instead returns what to write for a spelling with two readings, "" for others.
func (s spellings) instead(text string) string { return s.unclear[normalise(text)] }

// characters that mean the same in a unit.
var sameCharacter = strings.NewReplacer(
	"\u00b5", "u", "\u03bc", "u", // micro sign, Greek mu
	"\u00ba", "°", "\u02da", "°", // ordinal sign, ring above
	"\u2103", "°C", "\u2109", "°F", "\u212a", "K",
	"\u2113", "L", // script l
	"\u2212", "-", "\u207b", "-", "\u207a", "+",
	"\u00b9", "1", "\u00b2", "2", "\u00b3", "3",
	"\u2081", "1", "\u2082", "2", "\u2083", "3", "\u2084", "4",
	"\u00b7", " ", "\u22c5", " ", // mg·L⁻¹
	"^", "", ".", "", "(", " ", ")", " ",
)

// words for what stands below the line.
var sameWord = strings.NewReplacer(
	"/hours", "/h", "/hour", "/h", "/hrs", "/h", "/hr", "/h",
	"/days", "/d", "/day", "/d",
	"/seconds", "/s", "/second", "/s", "/sec", "/s",
	"/minutes", "/min", "/minute", "/min",
	"/litres", "/L", "/litre", "/L", "/liters", "/L", "/liter", "/L", "/l", "/L",
)

// normalise brings spellings of one unit together: spaces and the word "as" do
// not count, "per" is a stroke, "deg" is the degree sign, L-1 is /L.
func normalise(text string) string {
	var b strings.Builder
	for _, word := range strings.FieldsFunc(sameCharacter.Replace(text), isSpace) {
		lower := strings.ToLower(word)
		switch {
		case lower == "as":
			continue
		case lower == "per":
			word = "/"
		case strings.HasPrefix(lower, "degrees"):
			word = "°" + word[len("degrees"):]
		case strings.HasPrefix(lower, "degree"):
			word = "°" + word[len("degree"):]
		case strings.HasPrefix(lower, "deg"):
			word = "°" + word[len("deg"):]
		case len(word) > 2 && strings.HasSuffix(word, "-1") && b.Len() > 0:
			word = "/" + word[:len(word)-2]
		}
		b.WriteString(word)
	}
	return sameWord.Replace(b.String())
}

// fold drops the difference of case, but for a leading m or M: milli and mega.
func fold(key string) string {
	first := true
	return sameWord.Replace(strings.Map(func(r rune) rune {
		keep := first && r == 'M'
		first = false
		if keep {
			return r
		}
		return unicode.ToLower(r)
	}, key))
}
