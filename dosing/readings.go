package dosing

// Named finds a reading by its command-line name ("calcium-hardness"), nil where
// no reading has that name.
func (r *Readings) Named(name string) *Optional {
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
