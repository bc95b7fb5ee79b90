package tui

import "testing"

// TestPasteByName: names go before the order of the values, then units.
func TestPasteByName(t *testing.T) {
	for text, want := range map[string]map[string]string{
		"pH 7.2, alk 120 mg/L, 12 °C, 240 m3/h":                          {"ph": "7.2", "alkalinity": "120 mg/L", "temperature": "12 °C", "flow": "240 m3/h"},
		"pH: 7.2\nAlkalinity: 120":                                       {"ph": "7.2", "alkalinity": "120", "temperature": ""},
		"Alkalinity = 120; temp 12; pH 7.2":                              {"ph": "7.2", "alkalinity": "120", "temperature": "12"},
		"temp 12 pH 7.2 alk 120 Ca 30 mg/L Ca":                           {"ph": "7.2", "alkalinity": "120", "temperature": "12", "calcium": "30 mg/L Ca"},
		"pH\t7.2\r\nTemperature\t12\r\n":                                 {"ph": "7.2", "temperature": "12", "alkalinity": ""},
		"temperature\tpH\tAlkalinity (mg/L)\n12\t7.2\t120\n13\t7.3\t121": {"ph": "7.2", "temperature": "12", "alkalinity": "120 mg/L"},
		"7.2\t120\t12\t240\n7.3\t121\t13\t241":                           {"ph": "7.2", "alkalinity": "120", "temperature": "12", "flow": "240"},
		"7.2, 12 °C, 240 m3/h":                                           {"ph": "7.2", "temperature": "12 °C", "flow": "240 m3/h", "alkalinity": ""},
		"7.2\n120\n12":                                                   {"ph": "7.2", "alkalinity": "120", "temperature": "12"},
		"pH 7.2, alk 120\npH 7.3, alk 121":                               {"ph": "7.2", "alkalinity": "120"},
	} {
		d := demo(t).paste(text)
		d.shows("Pasted").hides("cannot be used").keys("Enter")
		for name, value := range want {
			if got := d.m.sheet.Values[name]; got != value {
				t.Errorf("%q: %s is %q, want %q", text, name, got, value)
			}
		}
	}
	demo(t).paste("7.2\t120\t12\n7.3\t121\t13").shows("the first row only")
	demo(t).paste("pH 7.2, alk 120\npH 7.3, alk 121").shows("the first row only")
	demo(t).paste("7.2\t120\t12").hides("first row")
}
