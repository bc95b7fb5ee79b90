package tui

import (
	"strconv"

	"beckline/dosing"
	"beckline/dosing/reading"
)

// stationKind sorts the stations of the line.
type stationKind int

const (
	rawStation      stationKind = iota
	fixedStation                // a step that is given: a chemical at a dose, air, limestone
	solvedStation               // the chemical whose dose is asked for
	finishedStation             // the water that leaves, and what is wanted of it
)

// station is one step of the water's path as it stands on the line.
type station struct {
	kind   stationKind
	title  string
	add    int // index into sheet.Adds, for a fixed station
	index  int // of the Result's station whose water it shows
	places []place
}

// placeKind sorts what can be entered at a place.
type placeKind int

const (
	numberPlace placeKind = iota
	productPlace
	targetPlace
)

// dosePart sorts the numbers of a step that is given.
type dosePart int

const (
	wholeDose dosePart = iota
	residualPart
	demandPart
)

// place is one line of a station's list: something to type or to choose.
type place struct {
	kind  placeKind
	name  string // field name; for a fixed station's dose "dose-1" and so on
	label string
	unit  string // of a bare number
	help  string
	field reading.Field // of a numberPlace, zero for a dose
	add   int           // index into sheet.Adds, -1 where it belongs to none
	part  dosePart      // of that step
	blank string        // what holds where nothing is entered, "" where that is plain
}

// firstReadings are the readings that every answer needs, in the order in which
// an operator takes them; the others follow in the order of the field table.
var firstReadings = []string{"ph", "alkalinity", "temperature", "flow"}

// rawPlaces are the places of the raw water, the same for every sheet.
var rawPlaces = func() []place {
	var places []place
	first := map[string]bool{}
	for _, name := range firstReadings {
		if f, ok := reading.Lookup(name); ok {
			places, first[name] = append(places, numberAt(f)), true
		}
	}
	for _, f := range reading.Fields() {
		if f.Group == reading.Reading && !first[f.Name] {
			places = append(places, numberAt(f))
		}
	}
	return places
}()

func numberAt(f reading.Field) place {
	return place{kind: numberPlace, name: f.Name, label: f.Label, unit: f.Bare, help: f.Help, field: f, add: -1}
}

// lookupPlace makes the place of a field by its name.
func lookupPlace(name string) place {
	f, _ := reading.Lookup(name)
	return numberAt(f)
}

// stations lays out the line for a sheet.
func (s sheet) stations() []station {
	line := []station{{kind: rawStation, title: "raw water", places: rawPlaces}}
	ahead := s.ahead()
	for i := range ahead {
		line = append(line, s.fixed(i, len(line)))
	}
	title := s.Product
	if title == "" {
		title = "no product"
	}
	line = append(line, station{
		kind: solvedStation, title: title, index: len(line),
		places: []place{
			{kind: productPlace, name: "product", label: "product", add: -1, help: "chemical whose dose is asked for; Enter lists what there is"},
			s.strength(), lookupPlace("product-temperature").otherwise("20 °C"), lookupPlace("pump"), s.useLevel(),
		},
	})
	for i := ahead; i < len(s.Adds); i++ {
		line = append(line, s.fixed(i, len(line)))
	}
	return append(line, station{
		kind: finishedStation, title: "finished", index: len(s.Adds) + 1,
		places: append([]place{
			{kind: targetPlace, name: "target", label: "target is", add: -1, help: "figure of the finished water that is asked for; Enter lists them"},
			s.targetValue(),
		}, s.finishedLimits()...),
	})
}

// ahead is how many of the given steps the water meets before the solved one.
func (s sheet) ahead() int {
	n := 0
	for n < len(s.Adds) && !s.Adds[n].Behind {
		n++
	}
	return n
}

// fixed is the station of a given step.
func (s sheet) fixed(i, index int) station {
	a, number := s.Adds[i], "-"+strconv.Itoa(i+1)
	st := station{kind: fixedStation, title: a.Product, add: i, index: index, places: []place{
		{kind: productPlace, name: "product" + number, label: "product", add: i, help: "what is done here; Enter lists what there is"},
	}}
	dose := place{kind: numberPlace, name: "dose" + number, label: "dose", unit: "mg/L", add: i,
		help: "dose as the chemical's own formula, or with its basis written out"}
	switch {
	case a.Product == contactor:
		return st
	case a.Product == aeration:
		dose.label, dose.unit = "CO2 out", "%"
		dose.help = "share of the excess CO2 that leaves, or the pH that was measured after it, as in pH 7.9"
	case a.chlorinates():
		if a.Residual != "" {
			dose.blank = "from below"
		}
		st.places = append(st.places, dose,
			place{kind: numberPlace, name: "residual" + number, label: "residual", unit: "mg/L Cl2", add: i, part: residualPart, blank: "by dose",
				help: "free chlorine that is to be left, in place of a dose"},
			place{kind: numberPlace, name: "demand" + number, label: "demand", unit: "mg/L Cl2", add: i, part: demandPart, blank: "none",
				help: "free chlorine that the water uses up at once"})
		return st
	}
	st.places = append(st.places, dose)
	return st
}

// otherwise says what holds where nothing is entered.
func (p place) otherwise(text string) place {
	p.blank = text
	return p
}

// strength is the place of the product's strength; where none is entered, the
// catalogue's holds.
func (s sheet) strength() place {
	p := lookupPlace("strength")
	if product, ok := dosing.ProductByName(s.Product); ok {
		return p.otherwise(product.StrengthText)
	}
	return p
}

// targetValue is the place of the target's number.
func (s sheet) targetValue() place { return lookupPlace(s.Target) }

// text is what stands at a place.
func (s sheet) text(p place) string {
	switch {
	case p.kind == targetPlace:
		return targetNames[s.Target]
	case p.kind == productPlace && p.add >= 0:
		return s.Adds[p.add].Product
	case p.kind == productPlace:
		return s.Product
	case p.add >= 0:
		return *s.Adds[p.add].number(p.part)
	case isLimit(p.name):
		return s.Limits[p.name]
	}
	return s.Values[p.name]
}

// set puts text at a number's place; an empty text means not measured.
func (s *sheet) set(p place, text string) {
	switch {
	case p.add >= 0 && p.kind == productPlace:
		s.Adds[p.add].Product = text
	case p.add >= 0:
		a := &s.Adds[p.add]
		*a.number(p.part) = text
		switch { // a dose and a residual say the same thing twice
		case text != "" && p.part == wholeDose:
			a.Residual = ""
		case text != "" && p.part == residualPart:
			a.Dose = ""
		}
	case isLimit(p.name) && text == "":
		delete(s.Limits, p.name)
	case isLimit(p.name):
		s.Limits[p.name] = text
	case p.kind == productPlace:
		s.Product = text
	case text == "":
		delete(s.Values, p.name)
	default:
		s.Values[p.name] = text
	}
}

// targetNames says a kind of target in words.
var targetNames = map[string]string{
	"target-ph": "pH", "target-alkalinity": "alkalinity", "target-si": "saturation index", "target-ccpp": "CCPP",
}

// number is the text of a part of the step.
func (a *feedEntry) number(part dosePart) *string {
	switch part {
	case residualPart:
		return &a.Residual
	case demandPart:
		return &a.Demand
	}
	return &a.Dose
}
