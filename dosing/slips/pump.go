package slips

import (
	"math"

	"beckline/dosing"
)

const (
	drawnWithin = 0.10 // a drawdown off the setting by more is a fault
	sameKnob    = 0.005
	nearFrozen  = 2.0 // K above the point at which crystals begin
)

// pump looks at the equipment of the addition that is solved for.
func (k *check) pump() []Finding {
	p := &k.x.Pump
	var out []Finding
	if p.Running && p.FlowNow.Given && p.FlowNow.Value == 0 {
		out = append(out, Finding{
			Code: PumpWithoutFlow, Field: "pump", Value: p.FlowNow,
			Cause:    "pump running, flow 0: is the chemical standing in the main?",
			Evidence: "the feed pump runs and no water flows",
			Do:       "stop the pump; treat what was fed as a slug: isolate, sample, flush before the water moves again, tell the operator in charge",
		})
	}
	if p.Manual {
		out = append(out, Finding{
			Code: PumpInManual, Field: "pump",
			Cause:    "left in manual?",
			Evidence: "the pump is not paced by the flow and does not stop with it",
			Do:       "set it back to automatic, or write 'left in manual' with time and name into the handover",
		})
	}
	return append(append(out, k.knobs()...), k.drawdown()...)
}

// knobs: output is the product of stroke and speed.
func (k *check) knobs() []Finding {
	p := &k.x.Pump
	moved := func(now, last dosing.Optional) bool {
		return now.Given && last.Given && math.Abs(now.Value-last.Value) > sameKnob
	}
	f := Finding{Code: StrokeAndSpeed, Field: "pump", Do: "draw the pump down at the new setting before trusting it"}
	if moved(p.Stroke, p.LastStroke) && moved(p.Speed, p.LastSpeed) {
		before, after := p.LastStroke.Value*p.LastSpeed.Value, p.Stroke.Value*p.Speed.Value
		f.Cause = "were stroke and speed both changed? Output is their product"
		f.Evidence = "stroke " + percent(p.LastStroke.Value) + " to " + percent(p.Stroke.Value) + ", speed " + percent(p.LastSpeed.Value) + " to " + percent(p.Speed.Value)
		if before > 0 {
			f.Evidence += ": " + figures(after/before, 3) + " times the output"
		}
		return []Finding{f}
	}
	if moved(p.Stroke, p.CalibratedStroke) {
		f.Cause = "a stroke that the last drawdown was not made at?"
		f.Evidence = "stroke " + percent(p.Stroke.Value) + ", calibrated at " + percent(p.CalibratedStroke.Value)
		return []Finding{f}
	}
	return nil
}

// drawdown: what the pump gives against what it is set to give.
func (k *check) drawdown() []Finding {
	p := &k.x.Pump
	if !p.Drawn.Given || !p.Set.Given || !(p.Set.Value > 0) {
		return nil
	}
	share := p.Drawn.Value / p.Set.Value
	if share <= 0.02 {
		f := Finding{Code: NoDelivery, Field: "pump", Value: p.Drawn, Meant: p.Set,
			Cause:    "no delivery: closed valve, air lock, empty tank, blocked line?",
			Evidence: "the pump is set and nothing is drawn",
			Do:       "look at the suction first; after it returns go to the full dose in steps"}
		if at := k.station(); at > 0 {
			a := &k.c.Additions[at-1]
			freezing := a.Product.Density.Freezing(a.Product.Strength)
			if t := a.Feed.ProductKelvin; t.Given && freezing.Known && t.Value < freezing.Kelvin+nearFrozen {
				f.Code, f.Cause = LineFrozen, "frozen or crystallised line?"
				f.Evidence += "; the product is at " + whole(t.Value-273.15) + " °C and crystals begin near " + whole(freezing.Kelvin-273.15) + " °C"
				f.Do = "warm the line slowly and keep the pump off: a thaw brings a surge; then go up in steps"
			}
		}
		return []Finding{f}
	}
	if math.Abs(share-1) > drawnWithin {
		return []Finding{{Code: DeliveryOff, Field: "pump", Value: p.Drawn, Meant: p.Set, Weight: math.Pow((share-1)/0.03, 2),
			Cause:    "air lock, worn valve, scale or crystals; or the setting is not what was keyed?",
			Evidence: "the drawdown gives " + percent(share) + " of what the pump is set to",
			Do:       "repeat the drawdown for 60 s, read the setting from the pump itself"}}
	}
	return nil
}
