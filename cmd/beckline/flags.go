package main

import (
	"fmt"
	"strings"
	"unicode"

	"github.com/spf13/cobra"
	"github.com/spf13/pflag"

	"beckline/dosing"
	"beckline/dosing/entry"
	"beckline/dosing/reading"
)

// typed is a flag that keeps what was typed, to be read by its field: numbers
// are read in one place only, with the same rules everywhere.
type typed struct {
	name, unit string
	text       string
	all        []string // every text given, in order
	times      int
	most       int // how often it may be given; 0 is once
}

func (t *typed) String() string { return t.text }
func (t *typed) Type() string   { return t.unit }
func (t *typed) Set(text string) error {
	t.text = text
	t.all = append(t.all, text)
	t.times++
	return nil
}

// check refuses a flag given twice, and one whose value is blank or another
// flag; what is not to be given is left away.
func (t *typed) check(accepted, blank string) *dosing.Problem {
	if t.most > 1 {
		return t.checkAll(accepted, blank)
	}
	switch {
	case t.times > 1:
		return &dosing.Problem{Kind: dosing.BadInput, Code: "given_twice", Field: t.name, Given: reading.Clean(t.text),
			Accepted: "one value"}
	case t.times == 1 && strings.TrimSpace(t.text) == "":
		return &dosing.Problem{Kind: dosing.BadInput, Code: reading.CodeEmpty, Field: t.name, Accepted: accepted + blank}
	case isFlag(t.text):
		return &dosing.Problem{Kind: dosing.BadInput, Code: "no_value", Field: t.name, Given: reading.Clean(t.text),
			Accepted: accepted}
	}
	return nil
}

// checkAll is check of a flag that may be given several times.
func (t *typed) checkAll(accepted, blank string) *dosing.Problem {
	if t.times > t.most {
		return &dosing.Problem{Kind: dosing.BadInput, Code: "given_too_often", Field: t.name, Given: reading.Clean(t.text),
			Accepted: fmt.Sprintf("at most %d", t.most)}
	}
	for _, text := range t.all {
		one := typed{name: t.name, text: text, times: 1}
		if p := one.check(accepted, blank); p != nil {
			return p
		}
	}
	return nil
}

// isFlag tells a flag from a value: --json, but not --5, which is a number with
// a sign too many.
func isFlag(text string) bool {
	return len(text) > 2 && strings.HasPrefix(text, "--") && unicode.IsLetter(rune(text[2]))
}

// productWanted is what --product accepts.
const productWanted = "a product by name, such as caustic-25"

// formFlags are the flags that fill in a form.
type formFlags struct {
	fields  []*typed
	product typed
	adds    []string
	thens   []string
	after   string
	sources []string
}

// add puts the fields of the given groups, and the product where a dose is
// wanted, on a command.
func (f *formFlags) add(cmd *cobra.Command, groups ...reading.Group) {
	for _, group := range groups {
		for _, field := range reading.Fields() {
			if field.Group != group {
				continue
			}
			t := &typed{name: field.Name, unit: orWord(reading.ASCII(field.Bare), "number")}
			f.fields = append(f.fields, t)
			cmd.Flags().Var(t, field.Name, reading.ASCII(field.Help))
		}
		if group == reading.Target {
			most := f.product.most
			f.product = typed{name: "product", unit: "name", most: most}
			usage := "product to be dosed; see beckline products"
			if most == 2 {
				usage += ". Give two with two targets; strength, temperature and pump are then those of the first"
			}
			cmd.Flags().Var(&f.product, "product", usage)
		}
	}
	cmd.Flags().SortFlags = false
	if cmd.Flags().Lookup("product") != nil {
		// The flag is there, so this cannot fail.
		_ = cmd.RegisterFlagCompletionFunc("product", completeProducts)
	}
}

// completeProducts offers the catalogue's names to a shell.
func completeProducts(*cobra.Command, []string, string) ([]cobra.Completion, cobra.ShellCompDirective) {
	var names []cobra.Completion
	for _, p := range dosing.Products() {
		names = append(names, cobra.CompletionWithDesc(p.Name, p.Title))
	}
	return names, cobra.ShellCompDirectiveNoFileComp
}

// addAdditions offers doses that are given, before the one that is asked for.
func (f *formFlags) addAdditions(cmd *cobra.Command) {
	f.addFixed(cmd)
	f.addSources(cmd)
}

// addFixed offers the doses alone.
func (f *formFlags) addFixed(cmd *cobra.Command) {
	cmd.Flags().StringArrayVar(&f.adds, "add", nil,
		"a dose that is given, as product=dose in mg/L, or aeration=80 %, aeration=pH 7.9, contactor; "+
			"chlorine also as product=residual 0.5 demand 1.2; repeat it in order")
}

// addSources offers the waters of a blend.
func (f *formFlags) addSources(cmd *cobra.Command) {
	cmd.Flags().StringArrayVar(&f.sources, "source", nil,
		"a water of a blend, as \"name; flow=40 L/s; ph=7.15; alkalinity=285; temperature=11.5\"; give two or more")
}

// addBehind offers what comes behind the product whose dose is asked for.
func (f *formFlags) addBehind(cmd *cobra.Command) {
	cmd.Flags().StringArrayVar(&f.thens, "then", nil, "the same as --add, behind the product that is solved for")
	cmd.Flags().StringVar(&f.after, "target-after", "", "name of the addition whose water must meet the target, where not the finished water")
}

// first looks at the flags before the words that belong to none: a flag whose
// value was forgotten takes the next flag as its value and leaves a word over.
func (f *formFlags) first(next cobra.PositionalArgs) cobra.PositionalArgs {
	return func(cmd *cobra.Command, args []string) error {
		if _, err := f.form(); err != nil {
			return err
		}
		return next(cmd, args)
	}
}

// form returns what was typed.
func (f *formFlags) form() (entry.Form, error) {
	form := entry.Form{Values: map[string]string{}, Adds: f.adds, Thens: f.thens, TargetAfter: f.after, Sources: f.sources}
	for _, t := range f.fields {
		field, _ := reading.Lookup(t.name)
		blank := "; or leave the flag away"
		if field.Group == reading.Reading {
			blank = "; leave the flag away where it was not measured"
		}
		if p := t.check(field.Accepted(), blank); p != nil {
			return form, p
		}
		if t.times > 0 {
			form.Values[t.name] = t.text
		}
	}
	if p := f.product.check(productWanted, ""); p != nil {
		return form, p
	}
	if f.product.times > 0 {
		form.Product = f.product.all[0]
	}
	if f.product.times > 1 {
		form.Second = f.product.all[1]
	}
	return form, nil
}

// groupOf sorts a flag for the help text.
func groupOf(flag *pflag.Flag) reading.Group {
	if field, ok := reading.Lookup(flag.Name); ok {
		return field.Group
	}
	if field, ok := reading.Command(flag.Name); ok {
		return field.Group
	}
	if flag.Name == "product" {
		return reading.Setting
	}
	return 0
}

func orWord(s, instead string) string {
	if s == "" {
		return instead
	}
	return s
}
