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
	fixedStation                // a chemical at a dose that is given
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

// place is one line of a station's list: something to type or to choose.
type place struct {
	kind  placeKind
	name  string // field name; for a fixed station's dose "dose-1" and so on
	label string
	unit  string // of a bare number
	help  string
	field reading.Field // of a numberPlace, zero for a dose
	add   int           // index into sheet.Adds, -1 where it belongs to none
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
	for i, a := range s.Adds {
		line = append(line, station{
			kind: fixedStation, title: a.Product, add: i, index: i + 1,
			places: []place{
				{kind: productPlace, name: "product-" + strconv.Itoa(i+1), label: "product", add: i, help: "chemical fed here; Enter lists what there is"},
				{kind: numberPlace, name: "dose-" + strconv.Itoa(i+1), label: "dose", unit: "mg/L", add: i,
					help: "dose as the chemical's own formula, or with its basis written out"},
			},
		})
	}
	title := s.Product
	if title == "" {
		title = "no product"
	}
	last := len(s.Adds) + 1
	line = append(line, station{
		kind: solvedStation, title: title, index: last,
		places: []place{
			{kind: productPlace, name: "product", label: "product", add: -1, help: "chemical whose dose is asked for; Enter lists what there is"},
			s.strength(), lookupPlace("product-temperature").otherwise("20 °C"), lookupPlace("pump"),
		},
	}, station{
		kind: finishedStation, title: "finished", index: last,
		places: []place{
			{kind: targetPlace, name: "target", label: "target is", add: -1, help: "figure of the finished water that is asked for; Enter lists them"},
			s.targetValue(),
		},
	})
	return line
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
		return s.Adds[p.add].Dose
	}
	return s.Values[p.name]
}

// set puts text at a number's place; an empty text means not measured.
func (s *sheet) set(p place, text string) {
	switch {
	case p.add >= 0 && p.kind == productPlace:
		s.Adds[p.add].Product = text
	case p.add >= 0:
		s.Adds[p.add].Dose = text
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
