package report

import (
	"fmt"
	"time"

	"beckline/dosing"
	"beckline/dosing/feed"
)

// clockForm is how a clock time is written and read.
const clockForm = "2006-01-02 15:04"

// Store is what is said of a tank that a pump draws from.
type Store struct {
	Tank    feed.Tank
	Rate    float64 // m3/s
	Supply  feed.Supply
	Now     time.Time
	Storage *feed.Storage // nil where no delivery is asked about
	Load    feed.Room
	HasLoad bool
	Product dosing.Product // zero where not known
}

// StoreSheet is the answer of a tank: hours, when to fill it, what fits.
func StoreSheet(in Store) Sheet {
	s := Sheet{Name: "tank"}
	at := func(seconds float64) time.Time { return in.Now.Add(time.Duration(seconds * float64(time.Second))) }
	empty, refill := at(in.Supply.Seconds), at(in.Supply.Refill)
	s.Head = []string{fmt.Sprintf("Fill the tank from %s; it runs empty at %s (in %s h)", refill.Format(clockForm),
		empty.Format(clockForm), Significant(in.Supply.Seconds/secondsPerHour, 3))}
	s.Figures = []Figure{
		number("in_tank_l", "in the tank", "L", litres(in.Tank.Volume), asVolume),
		number("usable_l", "of it usable", "L", litres(in.Supply.Usable), asVolume),
		number("feed_l_h", "feed", "L/h", perHourLitres(in.Rate), asRate),
		number("hours", "lasts", "h", Some(in.Supply.Seconds/secondsPerHour), asTime),
		worded("refill_at", "begin filling", refill.Format(clockForm)),
		worded("empty_at", "empty", empty.Format(clockForm)),
	}
	s.Warn("tank", in.Supply.Codes...)
	days := func(seconds float64, there bool) Number { return onlyIf(there, seconds/secondsPerDay) }
	stored := in.Storage != nil
	var storage feed.Storage
	if stored {
		storage = *in.Storage
		s.Warn("tank", storage.Codes...)
	}
	s.Figures = append(s.Figures,
		number("days", "which is", "d", days(in.Supply.Seconds, true), asTime),
		number("full_days", "a full tank lasts", "d", days(storage.FullSeconds, stored && in.Tank.Full > 0), asTime),
		number("loads", "the tank holds", "deliveries", onlyIf(storage.Loads > 0, storage.Loads), asShare),
		number("order_in_days", "order within", "d", days(storage.OrderIn, stored), asTime),
	)
	if stored && storage.OrderIn < 0 {
		s.Warnings = append(s.Warnings, Notice{"order_late", "lead", "an order placed now comes after the tank is empty"})
	}
	roomFigures(&s, in.Load, in.HasLoad)
	s.Handle(in.Product.Caution)
	return s
}

func roomFigures(s *Sheet, r feed.Room, there bool) {
	s.Figures = append(s.Figures,
		number("load_l", "the load", "L", onlyIf(there, r.Volume*litresPerM3), asVolume),
		number("space_l", "space below the fill mark", "L", onlyIf(there, r.Space*litresPerM3), asVolume),
		number("after_l", "in the tank after it", "L", onlyIf(there, r.After*litresPerM3), asVolume),
		number("over_l", "does not fit", "L", onlyIf(there, r.Over*litresPerM3), asVolume),
	)
	if there {
		s.Warn("load", r.Codes...)
	}
}

// Delivery is a load at the gate.
type Delivery struct {
	Product  dosing.Product // as on the note
	Measured float64        // kg/m3 of the sample
	Kelvin   float64
	Gate     feed.Gate
	Load     feed.Room
	HasLoad  bool
}

// DeliverySheet is the answer of the check before the hose goes on.
func DeliverySheet(in Delivery) Sheet {
	s := Sheet{Name: "delivery"}
	verdict, accept := "The density agrees with the note", in.Gate.Accept
	if in.HasLoad && in.Load.Over > 0 {
		accept = false
	}
	if !in.Gate.Accept {
		verdict = "STOP: the density is not that of the note: do not unload"
	} else if !accept {
		verdict = "STOP: the load does not fit"
	}
	s.Head = []string{verdict,
		"Read the vehicle's own label and the label of the fill point, stand by, and take the sample with face shield and gloves."}
	s.Figures = []Figure{
		worded("product", "product on the note", in.Product.Name),
		worded("strength", "strength on the note", in.Product.StrengthText),
		number("measured_kg_m3", "density of the sample", "kg/m3", Some(in.Measured), rounding{decimals: 1}),
		number("temperature_c", "at", "C", Some(celsius(in.Kelvin)), asDegrees),
		number("expected_kg_m3", "the note's strength has", "kg/m3", Some(in.Gate.Expected), rounding{decimals: 1}),
		number("difference_percent", "difference", "%", Some(in.Gate.Difference*100), rounding{decimals: 2, signed: true}),
		number("found_strength_percent", "the density tells a strength of", "%", onlyIf(in.Gate.HasFound, in.Gate.Found.Strength*100), asShare),
		truth("accept", "may be unloaded, by these figures", accept),
	}
	s.Warn("gravity", in.Gate.Codes...)
	roomFigures(&s, in.Load, in.HasLoad)
	s.Handle(in.Product.Caution)
	return s
}
