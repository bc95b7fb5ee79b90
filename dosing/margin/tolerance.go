package margin

import (
	"math"
	"slices"
	"strconv"
	"strings"

	"beckline/carbonate"
	"beckline/dosing"
)

// Tolerance is the half-width of a 95 % interval of a reading: the larger of an
// absolute one, in the reading's SI unit (pH; K; eq/L; mol/L; m3/s; S/m; kg/m3;
// a strength as a fraction), and a share of the value read. Both 0 or more.
type Tolerance struct {
	Absolute float64
	Relative float64
}

// at is the half-width for a value.
func (t Tolerance) at(value float64) float64 {
	return max(t.Absolute, t.Relative*math.Abs(value))
}

// Tolerances holds a tolerance per reading. The zero value has none; Defaults
// has the usual ones. It is a value: a copy is set apart from the original.
type Tolerances struct {
	list []entry
}

type entry struct {
	index     int // into table
	tolerance Tolerance
	named     bool // set by the caller: the reading must have been measured
}

// Defaults are the tolerances of ordinary plant readings (common practice, no
// source): pH 0.10, alkalinity the larger of 3 % and 1 mg/L as CaCO3, the
// temperatures 0.5 K, flow 3 %, strength 1 %, DIC 3 % where it was measured.
// Readings that a sample lacks are passed over.
func Defaults() Tolerances {
	var t Tolerances
	for _, d := range []struct {
		name string
		Tolerance
	}{
		{"ph", Tolerance{Absolute: 0.10}},
		{"ph-temperature", Tolerance{Absolute: 0.5}},
		{"alkalinity", Tolerance{Absolute: 2e-3 / carbonate.MolarMassCaCO3, Relative: 0.03}},
		{"temperature", Tolerance{Absolute: 0.5}},
		{"flow", Tolerance{Relative: 0.03}},
		{"strength", Tolerance{Relative: 0.01}},
		{"dic", Tolerance{Relative: 0.03}},
	} {
		i, _ := find(d.name)
		t.list = append(t.list, entry{index: i, tolerance: d.Tolerance})
	}
	return t
}

// Of returns the tolerance of a reading, by name; ok is false where it has none.
func (t Tolerances) Of(name string) (tol Tolerance, ok bool) {
	for _, e := range t.list {
		if table[e.index].name == name {
			return e.tolerance, true
		}
	}
	return Tolerance{}, false
}

// Names are the readings that have a tolerance, in the order of the table.
func (t Tolerances) Names() []string {
	var names []string
	for _, e := range t.list {
		names = append(names, table[e.index].name)
	}
	return names
}

// Set gives a reading, by its command-line name, a tolerance that was asked for:
// where the sample lacks the reading, Of refuses. The error is a *dosing.Problem
// of field "tolerance": an unknown name, a share of a pH or a temperature (which
// have no natural zero), a half-width that is not above 0 or too wide for a
// normal error (a share over 50 %, pH 2, 20 K).
func (t *Tolerances) Set(name string, tol Tolerance) error { return t.set(name, tol, true) }

// SetUsual is Set for a plant's own instruments: a sample that lacks the reading
// passes it over, as the defaults do.
func (t *Tolerances) SetUsual(name string, tol Tolerance) error { return t.set(name, tol, false) }

func (t *Tolerances) set(name string, tol Tolerance, named bool) error {
	i, ok := find(name)
	if !ok {
		return refuse("unknown_reading", name, "one of "+strings.Join(Names(), ", "))
	}
	r := &table[i]
	switch {
	case tol.Relative != 0 && !r.relative:
		return refuse("bad_tolerance", name+" in percent", "a half-width in the unit of the reading")
	case !(tol.Relative >= 0 && tol.Relative <= greatestShare):
		return refuse("bad_tolerance", name+" "+number(tol.Relative*100)+" %", "above 0 and at most 50 %")
	case !(tol.Absolute >= 0) || math.IsInf(tol.Absolute, 0) || r.greatest > 0 && tol.Absolute > r.greatest:
		accepted := "above 0"
		if r.greatest > 0 {
			accepted += " and at most " + number(r.greatest)
		}
		return refuse("bad_tolerance", name+" "+number(tol.Absolute), accepted)
	case tol == Tolerance{}:
		return refuse("bad_tolerance", name+" 0", "above 0; leave the reading out to take it as exact")
	}
	list := slices.Clone(t.list)
	at, found := slices.BinarySearchFunc(list, i, func(e entry, i int) int { return e.index - i })
	if found {
		list[at] = entry{i, tol, named}
	} else {
		list = slices.Insert(list, at, entry{i, tol, named})
	}
	t.list = list
	return nil
}

func refuse(code, given, accepted string) *dosing.Problem {
	return &dosing.Problem{Kind: dosing.BadInput, Code: code, Field: "tolerance", Given: given, Accepted: accepted}
}

func number(v float64) string { return strconv.FormatFloat(v, 'g', 6, 64) }
