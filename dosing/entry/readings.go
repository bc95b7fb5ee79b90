package entry

import (
	"beckline/dosing"
	"beckline/dosing/reading"
)

// slot finds where in the readings a field's value goes, nil for a field that
// is no reading.
func slot(r *dosing.Readings, name string) *dosing.Optional {
	switch name {
	case "ph":
		return &r.PH
	case "ph-temperature":
		return &r.PHKelvin
	case "alkalinity":
		return &r.Alkalinity
	case "temperature":
		return &r.Kelvin
	case "flow":
		return &r.Flow
	case "calcium":
		return &r.Calcium
	case "magnesium":
		return &r.Magnesium
	case "calcium-hardness":
		return &r.CalciumHardness
	case "hardness":
		return &r.Hardness
	case "sulfate":
		return &r.Sulfate
	case "chloride":
		return &r.Chloride
	case "sodium":
		return &r.Sodium
	case "potassium":
		return &r.Potassium
	case "nitrate":
		return &r.Nitrate
	case "ammonia":
		return &r.Ammonia
	case "phosphate":
		return &r.Phosphate
	case "silica":
		return &r.Silica
	case "boron":
		return &r.Boron
	case "fluoride":
		return &r.Fluoride
	case "free-chlorine":
		return &r.FreeChlorine
	case "acetate":
		return &r.Acetate
	case "formate":
		return &r.Formate
	case "citrate":
		return &r.Citrate
	case "dic":
		return &r.DIC
	case "conductivity":
		return &r.Conductivity
	case "tds":
		return &r.TDS
	}
	return nil
}

// readings fills in the sample and names what is missing. A temperature is
// never assumed; a measured DIC stands in for the pH.
func (w *filling) readings() {
	for _, field := range fields {
		if field.Group != reading.Reading {
			continue
		}
		if v, ok := w.parse(field); ok {
			if place := slot(&w.result.Readings, field.Name); place != nil {
				*place = dosing.Some(v.SI)
			}
			continue
		}
		if !w.form.blank(field.Name) {
			continue // its problem is noted
		}
		switch field.Name {
		case "ph":
			if w.form.blank("dic") {
				w.problem("missing", field.Name, "", field.Accepted()+"; or a measured dic")
			}
		case "alkalinity", "temperature":
			w.problem("missing", field.Name, "", field.Accepted())
		}
	}
}
