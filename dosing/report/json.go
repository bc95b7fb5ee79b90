package report

import (
	"bytes"
	"encoding/json"
)

// MarshalJSON writes the number with 15 significant digits, or null.
func (n Number) MarshalJSON() ([]byte, error) {
	if !n.Given {
		return []byte("null"), nil
	}
	return []byte(Full(n.Value)), nil
}

// JSON returns the whole answer as one indented object ending in a newline.
// Every key is always there; what can't be had is null.
func (d Document) JSON() ([]byte, error) {
	o := object{}
	o.add("raw", fields(d.Raw))
	if d.Dose == nil {
		o.add("dose", nil)
	} else {
		o.add("dose", fields(d.Dose))
	}
	if solved := d.result.Doses(); len(solved) > 1 { // the first is the dose
		doses := make([]object, len(solved))
		for i, s := range solved {
			doses[i] = fields(Dose(s))
		}
		o.add("doses", doses)
	}
	if d.batch != nil {
		o.add("batch", batchJSON(d.batch))
	}
	o.add("finished", fields(d.Finished))
	o.add("stations", d.stationsJSON())
	o.add("warnings", d.warningsJSON())
	o.add("checks", d.checksJSON())
	d.addTrust(&o)
	return indented(o)
}

func (d Document) stationsJSON() []object {
	stations := make([]object, len(d.Stations))
	for i, s := range d.Stations {
		stations[i].add("kind", s.Kind)
		for _, f := range s.Dose {
			stations[i].addFigure(f)
			if f.Key == "product_mg_l" {
				stations[i].add("solved", s.Solved)
			}
		}
		stations[i].add("water", fields(s.Water))
	}
	return stations
}

func (d Document) warningsJSON() []object {
	warnings := make([]object, len(d.Warnings))
	for i, w := range d.Warnings {
		warnings[i].add("code", w.Code)
		warnings[i].addText("field", w.Field)
		warnings[i].add("message", w.Message)
	}
	return warnings
}

func (d Document) checksJSON() []object {
	checks := make([]object, len(d.Checks))
	for i, c := range d.Checks {
		checks[i].add("name", c.Name)
		checks[i].add("value", c.Value)
		checks[i].add("agrees", c.Agrees)
	}
	return checks
}

// object is a JSON object that keeps its keys in the order of adding.
type object struct {
	keys   []string
	values []any
}

func (o *object) add(key string, value any) {
	o.keys = append(o.keys, key)
	o.values = append(o.values, value)
}

// addText adds words, null where there are none.
func (o *object) addText(key, text string) {
	if text == "" {
		o.add(key, nil)
		return
	}
	o.add(key, text)
}

func (o *object) addFigure(f Figure) {
	if f.truth != nil {
		o.add(f.Key, *f.truth)
		return
	}
	if f.IsText {
		o.addText(f.Key, f.Text)
		return
	}
	o.add(f.Key, f.Value)
}

func fields(figures []Figure) object {
	var o object
	for _, f := range figures {
		o.addFigure(f)
	}
	return o
}

// MarshalJSON writes the keys in order.
func (o object) MarshalJSON() ([]byte, error) {
	var b bytes.Buffer
	b.WriteByte('{')
	for i, key := range o.keys {
		if i > 0 {
			b.WriteByte(',')
		}
		b.Write(plainJSON(key))
		b.WriteByte(':')
		b.Write(plainJSON(o.values[i]))
	}
	b.WriteByte('}')
	return b.Bytes(), nil
}

// plainJSON is json.Marshal without the escapes for HTML, which a person
// reading "<" in a message has no use for. All values here can be marshalled.
func plainJSON(v any) []byte {
	var b bytes.Buffer
	e := json.NewEncoder(&b)
	e.SetEscapeHTML(false)
	if err := e.Encode(v); err != nil {
		return []byte("null")
	}
	return bytes.TrimSpace(b.Bytes())
}

func indented(v any) ([]byte, error) {
	var b bytes.Buffer
	if err := json.Indent(&b, plainJSON(v), "", "  "); err != nil {
		return nil, err
	}
	b.WriteByte('\n')
	return b.Bytes(), nil
}
