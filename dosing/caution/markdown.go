package caution

import (
	"strings"

	"beckline/dosing"
)

// Markdown returns SAFETY.md whole.
func Markdown() string {
	var b strings.Builder
	b.WriteString(`# Safety

<!-- Made from the cautions in dosing/caution; change them there, then run: go test ./dosing/caution -update -->

beckline works out doses of chemicals that burn, blind, poison and explode. It hands over figures, not permission.

**` + Deferral + `**

Where this page and a local code, a product's label or safety data sheet, its certified
maximum use level, or the licensed operator in charge differ, they are right and this page is not.
In an emergency leave, warn others, and call the local emergency number.

Each line names its source. "Common practice, no source" means just that; "from memory" means that the source was not
opened when the line was written. Hazard codes are those of the globally harmonised system, told here in short words;
the official wording stands on the label.

## What beckline cannot know

`)
	list(&b, Unknowable())
	b.WriteString("\n## For every corrosive chemical\n\n")
	list(&b, General())
	b.WriteString("\n## Never together\n\nIn store, bund, drain, fill point and pump room; and with the tool or line that held the other.\n\n")
	for _, c := range Combinations() {
		item(&b, Line{"**" + c.Short + "** " + c.Text, c.Source})
	}
	b.WriteString("\n## Chemicals\n")
	for _, s := range Sheets() {
		b.WriteString("\n### " + s.Title + "\n\n")
		if names := productsOf(s.Key); len(names) > 0 {
			b.WriteString("Products: " + strings.Join(names, ", ") + ".\n\n")
		}
		for _, short := range s.Short {
			b.WriteString("> " + short + "  \n")
		}
		for _, p := range s.parts() {
			b.WriteString("\n" + p.heading + ":\n\n")
			list(&b, p.lines)
		}
	}
	b.WriteString("\n" + Deferral + "\n")
	return b.String()
}

func list(b *strings.Builder, lines []Line) {
	for _, l := range lines {
		item(b, l)
	}
}

func item(b *strings.Builder, l Line) { b.WriteString("- " + l.Text + " (" + l.Source + ")\n") }

// productsOf lists the names of the products of a sheet.
func productsOf(key string) []string {
	var names []string
	for _, p := range dosing.Products() {
		if p.Caution == key {
			names = append(names, "`"+p.Name+"`")
		}
	}
	return names
}
