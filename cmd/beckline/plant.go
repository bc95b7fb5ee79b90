package main

import (
	"errors"
	"fmt"
	"maps"
	"slices"
	"strings"

	"github.com/spf13/cobra"

	"beckline/dosing"
	"beckline/dosing/entry"
	"beckline/dosing/reading"
	"beckline/dosing/site"
	"beckline/dosing/table"
)

// plantFlags say which plant file and which of its lines a command starts from.
// Without either of them no plant file is looked at: the same command line gives
// the same answer on every machine.
type plantFlags struct {
	file, line typed
}

func (p *plantFlags) add(cmd *cobra.Command) {
	p.file = typed{name: "site", unit: "file"}
	p.line = typed{name: "line", unit: "name"}
	cmd.Flags().Var(&p.file, "site", "plant file to start from; what is typed takes the place of what it says, its limits hold")
	cmd.Flags().Var(&p.line, "line", "treatment line of the plant file (of the one in its usual place without --site)")
	// The flags are there, so these cannot fail.
	_ = cmd.MarkFlagFilename("site", "toml")
	_ = cmd.RegisterFlagCompletionFunc("line", func(*cobra.Command, []string, string) ([]cobra.Completion, cobra.ShellCompDirective) {
		var names []cobra.Completion
		if s, err := site.Open(p.file.text); err == nil && s != nil {
			for _, l := range s.Lines {
				names = append(names, cobra.CompletionWithDesc(l.Name, l.Title))
			}
		}
		return names, cobra.ShellCompDirectiveNoFileComp
	})
}

func (p *plantFlags) given() bool { return p.file.times+p.line.times > 0 }

// open loads the file and finds the line; nil where no plant is asked for.
func (p *plantFlags) open() (*site.Line, error) {
	if problem := p.file.check("the name of a plant file", ""); problem != nil {
		return nil, problem
	}
	if problem := p.line.check("the name of a line", ""); problem != nil {
		return nil, problem
	}
	if !p.given() {
		return nil, nil
	}
	s, err := openSite(p.file.text)
	if err != nil {
		return nil, err
	}
	if p.line.times == 0 {
		return s.Start, nil
	}
	if l := s.LineNamed(p.line.text); l != nil {
		return l, nil
	}
	var names []string
	for _, l := range s.Lines {
		names = append(names, l.Name)
	}
	return nil, badLine("unknown_line", "line", p.line.text, strings.Join(names, ", "))
}

// usualLine is the line that the plant file in its usual place starts with, nil
// where there is no such file.
func usualLine() (*site.Line, error) {
	s, err := site.Open("")
	if err != nil {
		return nil, siteProblem(err)
	}
	if s == nil {
		return nil, nil
	}
	return s.Start, nil
}

// openSite loads a plant file by its name, or the one in its usual place.
func openSite(file string) (*site.Site, error) {
	s, err := site.Open(file)
	if err != nil {
		return nil, siteProblem(err)
	}
	if s == nil {
		return nil, badLine("no_plant_file", "site", "", "--site FILE, or a plant file at "+site.DefaultPath()+"; beckline site new writes one")
	}
	return s, nil
}

// siteProblem is the first mistake of a plant file and how many more there are.
func siteProblem(err error) error {
	var all site.Errors
	if !errors.As(err, &all) || len(all) == 0 {
		return err
	}
	p := all[0].Problem()
	if more := len(all) - 1; more > 0 {
		p.Accepted = strings.TrimPrefix(fmt.Sprintf("%s; and %s", p.Accepted, counted(more, "more mistake")), "; ")
	}
	return p
}

func counted(n int, what string) string {
	if n == 1 {
		return "1 " + what
	}
	return fmt.Sprintf("%d %ss", n, what)
}

// job is a form with the line that it belongs to.
type job struct {
	form entry.Form
	line *site.Line // nil where no plant file is used
	note string     // which readings the plant file supplied

	trust trustFlags
}

// kase reads the form, with what the plant has and what it limits.
func (j *job) kase(need entry.Need) (dosing.Case, error) {
	if j.line == nil {
		return j.form.Case(need)
	}
	return j.line.Case(j.form, need)
}

// withinLimits refuses a finished water that the line's limits do not allow.
func (j *job) withinLimits(r *dosing.Result) error {
	if j.line == nil {
		return nil
	}
	if broken := j.line.CheckFinished(r); len(broken) > 0 {
		return broken[0]
	}
	return nil
}

// job lays what was typed over what the plant file says.
func (p *plantFlags) job(flags *formFlags) (job, error) {
	typed, err := flags.form()
	if err != nil {
		return job{}, err
	}
	line, err := p.open()
	if err != nil || line == nil {
		return job{form: typed}, err
	}
	form := line.Form()
	if typed.Product != "" {
		line.Choose(&form, typed.Product)
	}
	form.Second = typed.Second
	if len(typed.Adds) > 0 {
		form.Adds = typed.Adds
	}
	form.Thens, form.TargetAfter, form.Sources = typed.Thens, typed.TargetAfter, typed.Sources
	if hasGroup(typed, reading.Target) {
		dropGroup(form, reading.Target)
	}
	if len(typed.Sources) > 0 {
		dropGroup(form, reading.Reading)
	}
	for name := range typed.Values {
		for _, same := range sameThing[name] {
			delete(form.Values, same)
		}
	}
	supplied := suppliedBy(form, typed)
	maps.Copy(form.Values, typed.Values)
	j := job{form: form, line: line}
	if len(supplied) > 0 {
		j.note = fmt.Sprintf("beckline: from %s, line %s: %s", line.Site().Path, line.Name, strings.Join(supplied, ", "))
	}
	return j, nil
}

// sameThing lists the readings of the plant file that a typed one takes the
// place of, since the two would contradict each other.
var sameThing = map[string][]string{
	"ph":               {"ph-temperature", "dic"},
	"dic":              {"ph", "ph-temperature"},
	"calcium":          {"calcium-hardness", "hardness"},
	"calcium-hardness": {"calcium", "hardness"},
	"magnesium":        {"hardness"},
	"hardness":         {"magnesium"},
	"conductivity":     {"tds"},
	"tds":              {"conductivity"},
}

func hasGroup(form entry.Form, group reading.Group) bool {
	for name := range form.Values {
		if f, ok := reading.Lookup(name); ok && f.Group == group {
			return true
		}
	}
	return false
}

func dropGroup(form entry.Form, group reading.Group) {
	maps.DeleteFunc(form.Values, func(name, _ string) bool {
		f, ok := reading.Lookup(name)
		return ok && f.Group == group
	})
}

// suppliedBy lists what of the plant file stands in for readings and doses that
// were not typed, as a person would type it.
func suppliedBy(form, typed entry.Form) []string {
	var out []string
	for _, f := range reading.Fields() {
		text, there := form.Values[f.Name]
		if _, own := typed.Values[f.Name]; there && !own {
			out = append(out, f.Name+" "+text)
		}
	}
	if len(typed.Adds) == 0 {
		for _, add := range form.Adds {
			out = append(out, "add "+add)
		}
	}
	return slices.Clip(out)
}

// rows lets a plant's products, settings, target and additions stand in where
// neither the table nor a flag has them. Its readings do not: an empty cell was
// not measured, whatever the plant file says of another day.
func (p *plantFlags) rows(flags *formFlags, o *table.Options) error {
	j, err := p.job(flags)
	if err != nil || j.line == nil {
		return err
	}
	dropGroup(j.form, reading.Reading)
	for name := range o.Form.Values {
		delete(j.form.Values, name)
	}
	o.Plant = j.line
	o.Form.Adds = j.form.Adds
	o.Defaults = entry.Form{Values: j.form.Values, Product: j.form.Product}
	return nil
}

// rowsNote says what the plant supplies to a table.
func rowsNote(o *table.Options) string {
	line, ok := o.Plant.(*site.Line)
	if !ok {
		return ""
	}
	var supplied []string
	if o.Form.Product == "" && o.Defaults.Product != "" {
		supplied = append(supplied, "product "+o.Defaults.Product)
	}
	supplied = append(supplied, suppliedBy(o.Defaults, o.Form)...)
	for _, add := range o.Form.Adds {
		supplied = append(supplied, "add "+add)
	}
	if len(supplied) == 0 {
		return ""
	}
	return fmt.Sprintf("beckline: from %s, line %s, where the table has no column: %s", line.Site().Path, line.Name, strings.Join(supplied, ", "))
}
