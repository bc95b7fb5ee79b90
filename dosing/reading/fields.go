package reading

import "slices"

// table lists every field once; flags, columns, the screen and refusals follow
// it. A new reading is a line in one of the parts.
var table = build(waterFields, ionFields, minorFields, bulkFields, targetFields, settingFields)

var byName, byKey = indexFields()

func build(parts ...[]Field) []Field {
	all := slices.Concat(parts...)
	for i := range all {
		f := &all[i]
		f.find = index(f.units, refusedUnits[f.Name])
		if name := f.units[0].name; name != "pH" && name != "SI" {
			f.Bare = name
		}
	}
	return all
}

func indexFields() (names, keys map[string]int) {
	names, keys = map[string]int{}, map[string]int{}
	for i, f := range table {
		names[f.Name], keys[f.Key] = i, i
	}
	return names, keys
}

// refusedUnits are the spellings with two readings, by field.
var refusedUnits = map[string][]unclear{
	"ph-temperature":      temperatureUnclear,
	"temperature":         temperatureUnclear,
	"product-temperature": temperatureUnclear,
	"alkalinity":          alkalinityUnclear,
	"target-alkalinity":   alkalinityUnclear,
	"hardness":            degreeUnclear,
	"calcium-hardness":    degreeUnclear,
	"dic":                 carbonUnclear,
	"target-dic":          carbonUnclear,
	"flow":                flowUnclear,
	"pump":                pumpUnclear,
	"strength":            strengthUnclear,
}
