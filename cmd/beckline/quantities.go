package main

import (
	"errors"

	"github.com/spf13/cobra"

	"beckline/dosing"
	"beckline/dosing/reading"
)

// commandFlags are quantities that one command asks for and no form has.
type commandFlags struct {
	flags []*typed
}

// add puts quantities of reading.Command on a command, or readings of the water
// where there is no such quantity.
func (q *commandFlags) add(cmd *cobra.Command, names ...string) {
	for _, name := range names {
		field := quantity(name)
		t := &typed{name: name, unit: orWord(reading.ASCII(field.Bare), "number")}
		q.flags = append(q.flags, t)
		cmd.Flags().Var(t, name, reading.ASCII(field.Help))
	}
	cmd.Flags().SortFlags = false
}

// quantity finds a quantity or a reading by name.
func quantity(name string) reading.Field {
	if f, ok := reading.Command(name); ok {
		return f
	}
	f, _ := reading.Lookup(name)
	return f
}

// get reads one, SI; none where it is not given.
func (q *commandFlags) get(name string) (dosing.Optional, error) {
	field := quantity(name)
	for _, t := range q.flags {
		if t.name != name {
			continue
		}
		if p := t.check(field.Accepted(), "; or leave the flag away"); p != nil {
			return dosing.None, p
		}
		if t.times == 0 {
			return dosing.None, nil
		}
		v, err := field.Parse(t.text)
		if err != nil {
			return dosing.None, readingProblem(err)
		}
		return dosing.Some(v.SI), nil
	}
	return dosing.None, nil
}

// need is get of one that must be there.
func (q *commandFlags) need(name string) (float64, error) {
	v, err := q.get(name)
	if err == nil && !v.Given {
		err = badLine("missing", name, "", reading.ASCII(quantity(name).Accepted()))
	}
	return v.Value, err
}

// readingProblem carries over a refusal of reading.
func readingProblem(err error) error {
	var e *reading.Error
	if errors.As(err, &e) {
		return &dosing.Problem{Kind: dosing.BadInput, Code: e.Code, Field: e.Field, Given: e.Given, Accepted: e.Accepted}
	}
	return err
}
