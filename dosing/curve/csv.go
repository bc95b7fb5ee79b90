package curve

import (
	"encoding/csv"
	"io"
	"math"
	"strconv"
	"strings"

	"beckline/carbonate"
	"beckline/dosing"
)

// Header lists the columns of Rows: those of the water and dose tables elsewhere,
// in the same units.
func Header() []string {
	return []string{
		"series", "water", "temperature_c", "raw_ph", "raw_alkalinity_mg_l_caco3", "product", "basis", "dose_mg_l", "product_mg_l",
		"feed_l_h", "pump_percent", "finished_ph", "finished_alkalinity_mg_l_caco3", "finished_dic_mmol_l",
		"finished_saturation_index", "finished_ccpp_mg_l_caco3", "warnings", "problem",
	}
}

// Rows gives one row a point in full precision. What cannot be had is empty,
// never 0; a point without an answer says why in its last column.
func (s *Series) Rows() [][]string {
	rows := make([][]string, len(s.Points))
	for i := range s.Points {
		rows[i] = s.row(&s.Points[i])
	}
	return rows
}

// WriteCSV writes the header and the rows of every series.
func WriteCSV(w io.Writer, series ...Series) error {
	out := csv.NewWriter(w)
	if err := out.Write(Header()); err != nil {
		return err
	}
	for i := range series {
		if err := out.WriteAll(series[i].Rows()); err != nil {
			return err
		}
	}
	out.Flush()
	return out.Error()
}

func (s *Series) row(p *Point) []string {
	row := map[string]string{"series": s.Name, "water": p.Name}
	put := func(key string, v float64) { row[key] = number(v) }
	optional := func(key string, v dosing.Optional, factor float64) {
		if v.Given {
			put(key, v.Value*factor)
		}
	}
	switch s.Kind {
	case ByTemperature:
		put("temperature_c", celsius(p.X))
	case ByAlkalinity:
		put("raw_alkalinity_mg_l_caco3", p.X*milligramsCaCO3/2)
	}
	if p.Problem != nil {
		row["problem"] = p.Problem.Code
	}
	if r := p.Result; r != nil {
		raw, fin, st := &r.Raw().Figures, &r.Finished().Figures, p.Dose()
		chem := &st.Addition.Product.Chemical
		row["product"], row["basis"] = st.Addition.Product.Name, chem.Formula
		put("temperature_c", celsius(raw.Water.Kelvin))
		put("raw_ph", raw.PH)
		put("raw_alkalinity_mg_l_caco3", raw.Alkalinity*milligramsCaCO3/2)
		put("dose_mg_l", st.Dose*chem.MolarMass*1000)
		put("product_mg_l", st.Feed.ProductMass*1000)
		if st.Feed.HasVolume {
			put("feed_l_h", st.Feed.VolumePerSecond*3.6e6)
		}
		if st.Feed.HasPump {
			put("pump_percent", st.Feed.PumpFraction*100)
		}
		put("finished_ph", fin.PH)
		put("finished_alkalinity_mg_l_caco3", fin.Alkalinity*milligramsCaCO3/2)
		put("finished_dic_mmol_l", fin.Water.Totals[carbonate.Carbon]*1000)
		optional("finished_saturation_index", fin.SaturationIndex, 1)
		optional("finished_ccpp_mg_l_caco3", fin.CCPP, milligramsCaCO3)
		row["warnings"] = strings.Join(codes(r.Warnings), ";")
	}
	out := make([]string, 0, len(Header()))
	for _, key := range Header() {
		out = append(out, row[key])
	}
	return out
}

// celsius without the rounding of the subtraction: 281.15 K is 8, not
// 8.000000000000057.
func celsius(kelvin float64) float64 { return math.Round((kelvin-273.15)*1e9) / 1e9 }

func codes(warnings []dosing.Warning) []string {
	var list []string
	for _, w := range warnings {
		if len(list) == 0 || list[len(list)-1] != w.Code { // sorted by code
			list = append(list, w.Code)
		}
	}
	return list
}

// number writes 15 digits, so that 6.5 mg/L that went through mol/L and back is
// 6.5 and not 6.500000000000001.
func number(v float64) string { return strconv.FormatFloat(v, 'g', 15, 64) }
