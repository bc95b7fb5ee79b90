// Package check recomputes the published comparisons that ship inside the
// binary, so that a plant can prove its own copy right: standard buffers,
// equilibrium constants, stoichiometry, saturation figures, feed arithmetic.
//
// The published values, with their sources, are the CSV files in the folder
// published; each file has its own way of computing:
//
//	buffers.csv        buffers.go        pH of a standard buffer through the whole model
//	constants.csv      constants.go      constants by temperature
//	saturation.csv     saturation.go     saturation pH and its constant
//	stoichiometry.csv  stoichiometry.go  alkalinity per mg of chemical
//	feed.csv           feeds.go          feed arithmetic
//
// A row whose "how" says "from memory" was recalled and not read on a page.
package check

import (
	"embed"
	"encoding/csv"
	"fmt"
	"math"
	"strconv"
)

//go:embed published/*.csv
var published embed.FS

// Outcome is one comparison.
type Outcome struct {
	Group     string  // buffers, constants, saturation, stoichiometry, feed
	Name      string  // what is compared, with its conditions
	Unit      string  // of Value, Published and Tolerance
	Value     float64 // as this program computes it
	Published float64
	Tolerance float64 // largest difference that counts as agreeing
	Note      string  // why the tolerance is what it is, "" where it needs no reason
	Source    string
	How       string // "from memory", or where it was read
	Err       error  // set where the value could not be computed
}

// Difference is Value less Published.
func (o Outcome) Difference() float64 { return o.Value - o.Published }

// Agrees tells whether the difference is within the tolerance. The last part
// forgives the rounding of the decimal fractions themselves.
func (o Outcome) Agrees() bool {
	return o.Err == nil && math.Abs(o.Difference()) <= o.Tolerance*(1+1e-9)
}

// group is one file of published values and how its rows are computed.
type group struct {
	name string
	row  func(fields record) Outcome
}

var groups = []group{
	{"buffers", buffer},
	{"constants", constant},
	{"saturation", saturation},
	{"stoichiometry", stoichiometry},
	{"feed", feedRow},
}

// Groups names the groups of comparisons in their order.
func Groups() []string {
	names := make([]string, len(groups))
	for i, g := range groups {
		names[i] = g.name
	}
	return names
}

// Run computes every comparison, in the order of the files. The error is set
// only where the files inside the binary cannot be read.
func Run() ([]Outcome, error) {
	var all []Outcome
	for _, g := range groups {
		rows, err := read(g.name)
		if err != nil {
			return nil, err
		}
		for _, r := range rows {
			o := g.row(r)
			o.Group, o.Note, o.Source, o.How = g.name, r["note"], r["source"], r["how"]
			all = append(all, o)
		}
	}
	return all, nil
}

// record is one row by column name.
type record map[string]string

// number reads a column; an empty or unreadable one is NaN, which agrees with
// nothing.
func (r record) number(column string) float64 {
	v, err := strconv.ParseFloat(r[column], 64)
	if err != nil {
		return math.NaN()
	}
	return v
}

func (r record) kelvin() float64 { return r.number("temperature_c") + 273.15 }

func read(name string) ([]record, error) {
	f, err := published.Open("published/" + name + ".csv")
	if err != nil {
		return nil, err
	}
	defer f.Close()
	lines, err := csv.NewReader(f).ReadAll()
	if err != nil {
		return nil, fmt.Errorf("check: %s: %w", name, err)
	}
	if len(lines) < 2 {
		return nil, fmt.Errorf("check: %s holds no values", name)
	}
	rows := make([]record, 0, len(lines)-1)
	for _, line := range lines[1:] {
		r := record{}
		for i, column := range lines[0] {
			r[column] = line[i]
		}
		rows = append(rows, r)
	}
	return rows, nil
}
