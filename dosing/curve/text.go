package curve

import (
	"fmt"
	"strings"
	"unicode/utf8"

	"beckline/dosing"
)

// mostRows is how many rows a text table has; a longer series is thinned evenly.
const (
	mostRows   = 40
	firstWidth = 14 // of the column of what varies
)

// column is one column of the table.
type column struct {
	title string
	width int // right-aligned, but for the one of what varies
	cell  func(*Point) string
}

// columns of a table: what varies, unless that is the dose itself, then the
// answer. The doses are in mg/L.
func (s *Series) columns() []column {
	station := func(p *Point) *dosing.Station { return p.Dose() }
	finished := func(p *Point) *dosing.Figures { return &p.Result.Finished().Figures }
	cols := []column{
		{"dose", 9, func(p *Point) string {
			return fmt.Sprintf("%.2f", station(p).Dose*station(p).Addition.Product.Chemical.MolarMass*1000)
		}},
		{"product", 9, func(p *Point) string { return fmt.Sprintf("%.2f", station(p).Feed.ProductMass*1000) }},
		{"L/h", 8, func(p *Point) string {
			f := &station(p).Feed
			return shown(dosing.Optional{Value: f.VolumePerSecond, Given: f.HasVolume}, 2, 3.6e6)
		}},
		{"pH", 7, func(p *Point) string { return fmt.Sprintf("%.2f", finished(p).PH) }},
		{"alk", 7, func(p *Point) string { return fmt.Sprintf("%.1f", finished(p).Alkalinity*milligramsCaCO3/2) }},
		{"SI", 7, func(p *Point) string { return shown(finished(p).SaturationIndex, 2, 1) }},
		{"CCPP", 7, func(p *Point) string { return shown(finished(p).CCPP, 1, milligramsCaCO3) }},
	}
	if s.Kind == ByDose {
		return cols
	}
	first := column{s.heading(), firstWidth, func(p *Point) string {
		if s.Kind == ByWater {
			return p.Name
		}
		return fmt.Sprintf("%.*f", s.X.Decimals, s.X.In(p.X))
	}}
	return append([]column{first}, cols...)
}

func (s *Series) heading() string {
	if s.X.Unit == "" {
		return s.X.Label
	}
	return s.X.Unit
}

// Text is the series as a table of at most 78 columns, the figures those of the
// finished water. sentence puts a problem into words; nil shows its code.
func (s *Series) Text(sentence func(*dosing.Problem) string) string {
	if sentence == nil {
		sentence = func(p *dosing.Problem) string { return strings.ReplaceAll(p.Code, "_", " ") }
	}
	cols := s.columns()
	var b strings.Builder
	b.WriteString(s.Name + "\n")
	if s.Kind != ByDose {
		b.WriteString("by " + s.X.Title() + "\n")
	}
	fmt.Fprintf(&b, "dose in %s, product in mg/L; the rest is the finished water\n\n", s.basis())
	titles := make([]string, len(cols))
	for i, c := range cols {
		titles[i] = c.title
	}
	writeLine(&b, cols, titles)
	for _, i := range thin(len(s.Points), mostRows) {
		s.writeRow(&b, cols, &s.Points[i], sentence)
	}
	if s.Working != nil {
		b.WriteString("\nas it stands:\n")
		s.writeRow(&b, cols, s.Working, sentence)
	}
	return b.String()
}

func (s *Series) writeRow(b *strings.Builder, cols []column, p *Point, sentence func(*dosing.Problem) string) {
	if p.Result == nil {
		at := s.X.In(p.X)
		first := fmt.Sprintf("%.*f", s.X.Decimals, at)
		if s.Kind == ByWater {
			first = p.Name
		}
		fmt.Fprintf(b, "%-*s  %s\n", firstWidth, cut(first, firstWidth), cut(sentence(p.Problem), 60))
		return
	}
	cells := make([]string, len(cols))
	for i, c := range cols {
		cells[i] = c.cell(p)
	}
	writeLine(b, cols, cells)
}

func writeLine(b *strings.Builder, cols []column, cells []string) {
	for i, c := range cols {
		text := cut(cells[i], c.width)
		pad := strings.Repeat(" ", c.width-utf8.RuneCountInString(text))
		if c.width == firstWidth {
			b.WriteString(text + pad)
		} else {
			b.WriteString(" " + pad + text)
		}
	}
	b.WriteString("\n")
}

// basis is the unit of the doses: that of any point with an answer.
func (s *Series) basis() string {
	for i := range s.Points {
		if d := s.Points[i].Dose(); d != nil {
			return doseAxis(&d.Addition.Product).Unit
		}
	}
	return "mg/L"
}

func shown(v dosing.Optional, decimals int, factor float64) string {
	if !v.Given {
		return "-"
	}
	return fmt.Sprintf("%.*f", decimals, v.Value*factor)
}

func cut(text string, n int) string {
	if utf8.RuneCountInString(text) <= n {
		return text
	}
	return string([]rune(text)[:n-2]) + ".."
}

// thin picks at most n of count indices, evenly, the first and the last among them.
func thin(count, n int) []int {
	var picked []int
	for i := range min(count, n) {
		j := i
		if count > n {
			j = (i*(count-1) + (n-1)/2) / (n - 1)
		}
		picked = append(picked, j)
	}
	return picked
}
