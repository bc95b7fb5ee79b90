package tui

import (
	"slices"
	"strings"

	"beckline/dosing"
	"beckline/dosing/reading"
)

// workEntry is one line of a form: a field and what stands in it.
type workEntry struct {
	field int // index into Command.Fields
	text  string
	own   bool // typed or emptied by the person; else it follows the line
}

// workForm is a command's form with everything that was typed into it.
type workForm struct {
	command *Command
	entries []workEntry
	at, top int    // the line walked to; the one behind the last runs it
	refusal string // of the last run
	trouble string // the field that it is about
	unlent  string // what of the line could not be filled in, and why
}

func newWorkForm(c *Command) *workForm {
	f := &workForm{command: c}
	for i := range c.Fields {
		f.entries = append(f.entries, workEntry{field: i})
	}
	return f
}

func (f *workForm) field(e workEntry) *CommandField { return &f.command.Fields[e.field] }

// here is the entry walked to; nil on the line that runs it.
func (f *workForm) here() *workEntry {
	if f.at < 0 || f.at >= len(f.entries) {
		return nil
	}
	return &f.entries[f.at]
}

func (f *workForm) has(name string) bool {
	return slices.ContainsFunc(f.command.Fields, func(c CommandField) bool { return c.Name == name && !c.Positional })
}

// lend fills in what the line has, in every field that nobody has touched. The
// demo plant lends nothing: its numbers are not those of any works.
func (f *workForm) lend(s sheet) {
	f.unlent = ""
	var kept []workEntry
	for i := range f.command.Fields {
		own := false
		for _, e := range f.entries {
			if own = own || e.field == i && e.own; own {
				break
			}
		}
		if own {
			kept = append(kept, f.of(i)...)
			continue
		}
		texts := []string{""}
		if c := &f.command.Fields[i]; c.Lent && !s.Demo {
			if lent := f.lentTo(c, s); len(lent) > 0 {
				texts = lent
			}
		}
		for _, text := range texts {
			kept = append(kept, workEntry{field: i, text: text})
		}
	}
	f.entries = kept
	f.spread()
}

func (f *workForm) of(field int) []workEntry {
	var out []workEntry
	for _, e := range f.entries {
		if e.field == field {
			out = append(out, e)
		}
	}
	return out
}

// lentTo is what the line has for a field.
func (f *workForm) lentTo(c *CommandField, s sheet) []string {
	form := s.form()
	one := func(text string) []string {
		if text == "" {
			return nil
		}
		return []string{text}
	}
	switch c.Name {
	case "site":
		if s.plant != nil {
			return one(s.plant.Site().Path)
		}
		return nil
	case "line":
		if s.plant != nil {
			return one(s.plant.Name)
		}
		return nil
	case "product":
		return one(f.knownProduct(form.Product, s))
	case "add":
		return f.knownSteps(form.Adds, s)
	case "then":
		return f.knownSteps(form.Thens, s)
	case "source":
		return one(lentSource(form.Values))
	}
	return one(form.Values[c.Name])
}

// knownProduct is a product by a name that the command knows: one without a
// plant file knows the catalogue's alone. The plant's strength goes with it in a
// field of its own.
func (f *workForm) knownProduct(name string, s sheet) string {
	if s.plant == nil || f.has("site") {
		return name
	}
	if own := s.plant.Site().ProductNamed(name); own != nil {
		return own.Catalogue
	}
	return name
}

// knownSteps leaves out the steps of products that only the plant file knows,
// where the command takes none: at the catalogue's strength they would be
// something else.
func (f *workForm) knownSteps(steps []string, s sheet) []string {
	if s.plant == nil || f.has("site") {
		return steps
	}
	var known []string
	for _, step := range steps {
		name, _, _ := strings.Cut(step, "=")
		if name = strings.TrimSpace(name); s.plant.Site().ProductNamed(name) != nil {
			f.unlent = "not filled in: " + name + ", a product of the plant file, which this takes no account of"
			continue
		}
		known = append(known, step)
	}
	return known
}

// lentSource is the line's water as the first of a blend.
func lentSource(values map[string]string) string {
	parts := []string{"raw"}
	for _, f := range reading.Fields() {
		text := values[f.Name]
		if f.Group == reading.Reading && text != "" && !strings.ContainsAny(text, ";=") {
			parts = append(parts, f.Name+"="+text)
		}
	}
	if len(parts) == 1 {
		return ""
	}
	return strings.Join(parts, "; ")
}

// spread gives every field that may be given several times one empty line more,
// behind those that are filled.
func (f *workForm) spread() {
	field, nth := -1, 0 // of the entry walked to
	if e := f.here(); e != nil {
		field = e.field
		for i := f.at - 1; i >= 0 && f.entries[i].field == field; i-- {
			if f.entries[i].text != "" {
				nth++
			}
		}
	}
	atEnd := f.at >= len(f.entries)
	var out []workEntry
	for i := range f.command.Fields {
		c, lines := &f.command.Fields[i], f.of(i)
		start := len(out)
		own := slices.ContainsFunc(lines, func(e workEntry) bool { return e.own })
		for _, e := range lines {
			if e.text != "" || !c.Repeat {
				e.own = own
				out = append(out, e)
			}
		}
		if n := len(out) - start; c.Repeat && (c.Most == 0 || n < c.Most) || n == 0 {
			out = append(out, workEntry{field: i, own: own})
		}
		if i == field {
			f.at = min(start+nth, len(out)-1)
		}
	}
	f.entries = out
	if atEnd {
		f.at = len(out)
	}
}

// put puts text into the line walked to.
func (f *workForm) put(text string) {
	e := f.here()
	if e == nil || e.text == text {
		return
	}
	e.text, e.own = text, true
	for i := range f.entries { // a field follows the line as a whole or not at all
		if f.entries[i].field == e.field {
			f.entries[i].own = true
		}
	}
	if f.field(*e).Name == f.trouble {
		f.refusal, f.trouble = "", ""
	}
	f.spread()
}

// refuse keeps a refusal and walks to the field that it is about.
func (f *workForm) refuse(line, field string) {
	f.refusal, f.trouble = line, field
	for i, e := range f.entries {
		c := f.field(e)
		if c.Name != field {
			continue
		}
		f.at = i
		if e.text != "" || !c.Repeat || i+1 == len(f.entries) || f.entries[i+1].field != e.field {
			return
		}
	}
}

const yes = "yes"

// args is the form as the command line takes it.
func (f *workForm) args() []string {
	args := strings.Fields(f.command.Name)
	var words []string
	for _, e := range f.entries {
		c, text := f.field(e), strings.TrimSpace(e.text)
		switch {
		case text == "":
		case c.Positional:
			words = append(words, text)
		case c.Switch:
			args = append(args, "--"+c.Name)
		default:
			args = append(args, "--"+c.Name+"="+text)
		}
	}
	if len(words) > 0 {
		args = append(append(args, "--"), words...)
	}
	return args
}

// suffix is that of a file of the answer.
func (f *workForm) suffix() string {
	for _, e := range f.entries {
		if c := f.field(e); c.Switch && e.text == yes && (c.Name == "json" || c.Name == "csv") && f.command.Name != "rows" {
			return c.Name
		}
	}
	if f.command.Name == "rows" {
		return "csv"
	}
	return "txt"
}

// quantity is the reading or quantity that a field holds.
func (c *CommandField) quantity() (reading.Field, bool) {
	if c.Positional || c.Switch || c.Repeat {
		return reading.Field{}, false
	}
	if f, ok := reading.Command(c.Name); ok {
		return f, true
	}
	return reading.Lookup(c.Name)
}

// wrong says why a text cannot stand in a field, odd why it is unusual.
func (c *CommandField) wrong(text string) (wrong, odd string) {
	q, ok := c.quantity()
	if !ok || text == "" {
		return "", ""
	}
	v, err := q.Parse(text)
	if err != nil {
		return err.Error(), ""
	}
	return "", v.UnusualWhy
}

// chemicals are the products whose cautions are shown: those of the form that is
// open, then those of the line.
func (m *Model) chemicals() []dosing.Product {
	line := m.sheet.products()
	f := m.openForm()
	if f == nil {
		return line
	}
	var out []dosing.Product
	add := func(p dosing.Product) {
		if !slices.ContainsFunc(out, func(o dosing.Product) bool { return o.Caution == p.Caution }) {
			out = append(out, p)
		}
	}
	for _, e := range f.entries {
		name, _, _ := strings.Cut(e.text, "=")
		if p, ok := m.sheet.productNamed(strings.TrimSpace(name)); ok {
			add(p)
		}
	}
	for _, p := range line {
		add(p)
	}
	return out
}
