package caution

import (
	"encoding/csv"
	"os"
	"path/filepath"
	"regexp"
	"slices"
	"strconv"
	"strings"
	"testing"
)

// keysOf maps the names of the published facts to sheets.
var keysOf = map[string][]string{
	"NaOH": {"caustic"}, "H2SO4": {"sulfuric-acid"}, "HCl": {"hydrochloric-acid"}, "HCl solution": {"hydrochloric-acid"},
	"Cl2": {"chlorine"}, "NH3": {"ammonia"}, "NH3, anhydrous": {"ammonia"}, "CO2": {"carbon-dioxide"}, "CO2, liquefied": {"carbon-dioxide"},
	"CaO (quicklime)": {"quicklime"}, "H2SiF6": {"fluorosilicic-acid"}, "FeCl3": {"ferric-chloride"}, "alum": {"alum-dry", "alum-liquid"},
	"Ca(OH)2 (hydrated lime)": {"lime"}, "Na2CO3": {"soda-ash"},
	"NaOCl solution": {"hypochlorite"}, "NaOCl solution, 10 % chlorine and more": {"hypochlorite"}, "NaOCl solution under 10 %": {"hypochlorite"},
}

// said holds, for each other published fact, words of ours that carry it; they
// must stand in SAFETY.md.
var said = map[string]string{
	"Cl2|EPA RMP threshold":                   "2500 lb or more need a risk management plan",
	"NH3|lower explosive limit":               "burns from 15 % by volume",
	"CO2|asphyxiation":                        "70,000 ppm takes consciousness",
	"acid + NaOCl|incompatibility":            "gets into hypochlorite, or the reverse, sets chlorine gas free",
	"acid + NaOCl|incident":                   "more than 140 people",
	"acid + NaOCl|incident cause":             "18 inches apart",
	"NH3 + chlorine/NaOCl|incompatibility":    "explosive nitrogen trichloride. Store them in separate sealed rooms",
	"H2SO4|dilution":                          "gives much heat and reacts vigorously",
	"acids|dilution":                          "Acid into the water, slowly and stirred; never water into the acid",
	"NaOH|dilution":                           "The heat can make it boil and spatter",
	"NaOH|incompatibility":                    "Attacks aluminium, zinc and galvanised parts and sets hydrogen free",
	"CaO (quicklime)|incompatibility":         "Quicklime slakes with water with much heat",
	"CaO + alum (dry)|incompatibility":        "The water in dry alum slakes quicklime",
	"Ca(OH)2 (hydrated lime)|incompatibility": "apart from acids, with which it reacts violently",
	"Na2CO3|incompatibility":                  "apart from acids, which make it foam with carbon dioxide",
	"H2SiF6|incompatibility":                  "harm to the lungs may come late",
	"H2SiF6|materials":                        "fumes may hold hydrogen fluoride",
	"NaOCl solution|storage":                  "no longer than about 45 days",
	"FeCl3|materials":                         "Acid, stains, and attacks most metals",
	"corrosives|29 CFR 1910.151(c)":           "means in the work area to drench and flush them quickly",
	"corrosives|eyewash flow":                 "Eyewash at least 0.4 US gal/min",
	"corrosives|shower flow":                  "shower 20 US gal/min",
	"corrosives|time to reach":                "within 10 seconds",
	"corrosives|flush time":                   "flushed for at least 15 minutes",
	"corrosives|water temperature, low end":   "16 to 38 C",
	"corrosives|water temperature, high end":  "16 to 38 C",
	"corrosives|OSHA view":                    "only where contact is very unlikely",
	"NaOH|first aid, eyes":                    "for at least 30 minutes",
}

var hazardCode = regexp.MustCompile(`(EU)?H\d{3}`)

// Every public fact of the file is told: exposure limits with their number and
// unit, hazard codes by sheet, the rest in words of our own.
func TestPublishedFacts(t *testing.T) {
	f, err := os.Open(filepath.Join("..", "..", "testdata", "cautions.csv"))
	if err != nil {
		t.Fatal(err)
	}
	defer f.Close()
	rows, err := csv.NewReader(f).ReadAll()
	if err != nil {
		t.Fatal(err)
	}
	page := Markdown()
	unused := map[string]bool{}
	for key := range said {
		unused[key] = true
	}
	for _, r := range rows[1:] {
		name, topic, fact, value, unit, source, how := r[0], r[1], r[2], r[3], r[4], r[5], r[6]
		where := name + ", " + topic + ", " + fact + " [" + source + "; " + how + "]"
		switch topic {
		case "NIOSH REL", "NIOSH STEL", "OSHA PEL", "NIOSH IDLH":
			number, err := strconv.ParseFloat(value, 64)
			if err != nil {
				t.Fatal(err)
			}
			for _, key := range keysOf[name] {
				i := slices.IndexFunc(For(key).Limits, func(l Limit) bool { return l.Name == topic && l.Value == number && l.Unit == unit })
				if i < 0 {
					t.Errorf("%s: no limit of %g %s on the sheet %s", where, number, unit, key)
				} else if how == "from memory" && !strings.Contains(For(key).Limits[i].Source, "from memory") {
					t.Errorf("%s: the sheet does not say that it comes from memory", where)
				}
			}
		case "GHS":
			for _, key := range keysOf[name] {
				g := For(key).GHS
				told := g.Words() + g.Source
				for _, code := range hazardCode.FindAllString(fact, -1) {
					if !strings.Contains(told, strings.TrimPrefix(code, "EU")) {
						t.Errorf("%s: %s is not on the sheet %s: %s", where, code, key, told)
					}
				}
				if !strings.Contains(told, value) {
					t.Errorf("%s: signal word %s is not on the sheet %s: %s", where, value, key, told)
				}
			}
		default:
			words, ok := said[name+"|"+topic]
			delete(unused, name+"|"+topic)
			if !ok || !strings.Contains(page, words) {
				t.Errorf("%s: not told (%q)", where, words)
			}
			continue
		}
		if len(keysOf[name]) == 0 {
			t.Errorf("%s: no sheet for %s", where, name)
		}
	}
	for key := range unused {
		t.Errorf("%s: no such published fact", key)
	}
}
