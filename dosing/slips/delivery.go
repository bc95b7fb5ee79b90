package slips

import (
	"math"
	"strings"

	"beckline/dosing"
)

// delivery is the check before the hose goes on.
func (k *check) delivery() []Finding {
	d := k.x.Delivery
	if d == nil {
		return nil
	}
	var out []Finding
	note, known1 := dosing.ProductByName(d.Note)
	tank, known2 := dosing.ProductByName(d.Tank)
	if d.Note != d.Tank {
		f := Finding{Code: WrongProduct, Field: "product",
			Cause:    "the wrong tank? The note says " + d.Note + ", the fill point is that of " + d.Tank,
			Evidence: "two product names that differ",
			Do:       "stop; no hose until note, label, sample and fill point name one product"}
		if known1 && known2 {
			if gas := gasOf(&note, &tank); gas != "" {
				f.Code, f.Cause = Incompatible, f.Cause+"; together they give "+gas
				f.Do = "stop and keep people away from the fill point; " + f.Do
			}
		}
		out = append(out, f)
	}
	if known1 && note.Density != "" && d.Density.Given {
		gate, err := note.Density.CheckDelivery(note.Strength, d.Density.Value, d.Kelvin.Or(293.15))
		if err == nil && !gate.Accept {
			f := Finding{Code: StrengthDensity, Field: "product", Value: d.Density, Meant: dosing.Some(gate.Expected), Weight: math.Pow(gate.Difference/0.005, 2),
				Cause:    "not the product or the strength on the note?",
				Evidence: "the sample has " + whole(d.Density.Value) + " kg/m3, " + note.Title + " has " + whole(gate.Expected),
				Do:       "stop; the load is not taken until a second sample agrees with the note"}
			if gate.HasFound && len(gate.Found.Others) == 0 {
				f.Cause = "is it about " + figures(gate.Found.Strength*100, 2) + " % and not " + figures(note.Strength*100, 3) + " %?"
				if name := otherStrength(&note, gate.Found.Strength); name != "" {
					f.Cause = "is it " + name + " and not " + note.Name + "?"
				}
			}
			out = append(out, f)
		}
	}
	var missing []string
	if !d.Label {
		missing = append(missing, "the label on the vehicle is not read")
	}
	if !d.Present {
		missing = append(missing, "nobody of the plant stands by")
	}
	if known1 && note.Density != "" && !d.Density.Given {
		missing = append(missing, "no sample was weighed")
	}
	if len(missing) > 0 {
		out = append(out, Finding{Code: DeliveryUnchecked, Field: "product", Cause: "the delivery is not checked yet",
			Evidence: strings.Join(missing, "; "), Do: "finish the list before the key of the fill point is handed out"})
	}
	return out
}

// gasOf names what two products give off together. Acids and the acid salts of
// aluminium and iron set chlorine free from hypochlorite; ammonia and hypochlorite
// make chloramines.
func gasOf(a, b *dosing.Product) string {
	for _, pair := range [][2]*dosing.Product{{a, b}, {b, a}} {
		bleach, other := &pair[0].Chemical, &pair[1].Chemical
		if bleach.Formula != "NaOCl" && bleach.Formula != "Ca(OCl)2" {
			continue
		}
		switch {
		case other.Formula == "NH3" || other.Formula == "(NH4)2SO4":
			return "chloramine gas"
		case other.Equivalents < 0 || other.Formula == "CH3COOH" || other.Formula == "HCOOH" || other.Formula == "C6H8O7":
			return "chlorine gas"
		}
	}
	return ""
}
