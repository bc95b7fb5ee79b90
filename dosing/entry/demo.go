package entry

// Demo is the plant that is shown when nothing else is: Kestrel Fold works, an
// invented soft upland water after 22 mg/L of dry alum, to be lifted to pH 8.40
// with 25 % caustic soda. The raw water has 6 mg/L of sulfate; the alum brings
// the other 10.6.
func Demo() Form {
	return Form{
		Values: map[string]string{
			"ph":           "6.28",
			"alkalinity":   "13.0",
			"temperature":  "8.0",
			"flow":         "240",
			"calcium":      "7.2",
			"magnesium":    "1.5",
			"sulfate":      "16.6",
			"chloride":     "8.0",
			"sodium":       "6.0",
			"conductivity": "78",
			"target-ph":    "8.40",
		},
		Product: "caustic-25",
	}
}

// DemoName is the name of that plant.
const DemoName = "Kestrel Fold works"
