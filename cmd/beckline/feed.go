package main

import (
	"time"

	"github.com/spf13/cobra"

	"beckline/dosing"
	"beckline/dosing/entry"
	"beckline/dosing/feed"
	"beckline/dosing/reading"
	"beckline/dosing/report"
)

// feedCommand holds one command a piece of the feed equipment.
func feedCommand(c *console) *cobra.Command {
	cmd := &cobra.Command{
		Use:   "feed",
		Short: "pumps, tanks, deliveries and products of the feed",
		Long: "Calibrates a pump from drawdowns and sets it, tells how long a tank lasts,\n" +
			"checks a delivery before the hose goes on, thins a product, tells a strength\n" +
			"from a hydrometer, and weighs the scale that carrier water makes.\n" +
			"Each shows the cautions of the product that is handled.",
		Example: "  beckline feed tank --in-tank \"180 L\" --feed \"7.5 L/h\" --product caustic-25",
		Args:    noSuchCommand,
		RunE:    func(cmd *cobra.Command, _ []string) error { return cmd.Help() },
	}
	cmd.AddCommand(drawdownCommand(c), tankCommand(c), deliveryCommand(c), dilutionCommand(c), strengthCommand(c), carrierCommand(c))
	return cmd
}

// productFlags name the product that is handled and its strength.
type productFlags struct {
	product typed
	settings
}

// settings are quantities of a command together with those that form fields
// hold.
type settings struct{ commandFlags }

func (p *productFlags) add(cmd *cobra.Command, names ...string) {
	p.product = typed{name: "product", unit: "name"}
	cmd.Flags().Var(&p.product, "product", "product that is handled; see beckline products")
	_ = cmd.RegisterFlagCompletionFunc("product", completeProducts) // the flag is there
	p.commandFlags.add(cmd, names...)
}

// text is a flag as typed, "" where it is not given.
func (s *settings) text(name string) string {
	for _, t := range s.flags {
		if t.name == name {
			return t.text
		}
	}
	return ""
}

// named is the product at its strength; the zero product where none is given.
func (p *productFlags) named() (dosing.Product, error) {
	if problem := p.product.check(productWanted, ""); problem != nil {
		return dosing.Product{}, problem
	}
	if p.product.times == 0 {
		return dosing.Product{}, nil
	}
	if _, err := p.get("strength"); err != nil {
		return dosing.Product{}, err
	}
	return entry.ProductAt(p.product.text, p.text("strength"))
}

// liquid is the product, which must be a liquid with a density table.
func (p *productFlags) liquid() (dosing.Product, error) {
	product, err := p.named()
	if err != nil {
		return product, err
	}
	if product.Name == "" {
		return product, badLine("missing", "product", "", productWanted)
	}
	if product.Density == "" {
		return product, badLine("not_a_liquid", "product", product.Name, "a liquid product, such as caustic-50 or sulfuric-93")
	}
	return product, nil
}

// density is the density that a hydrometer told, kg/m3, and the temperature.
func (p *productFlags) density() (kgPerM3, kelvin float64, err error) {
	v, err := p.need("gravity")
	if err != nil {
		return 0, 0, err
	}
	field := quantity("gravity")
	typedValue, err := field.Parse(p.text("gravity"))
	if err != nil {
		return 0, 0, readingProblem(err)
	}
	kgPerM3 = v * 1000 // typed as a density
	if typedValue.Unit == field.Units()[0] {
		against, err := p.against()
		if err != nil {
			return 0, 0, err
		}
		kgPerM3 = v * against
	}
	t, err := p.get("product-temperature")
	return kgPerM3, t.Or(referenceKelvin), err
}

const referenceKelvin = 293.15

// against is the density of the water against which the hydrometer reads.
func (p *productFlags) against() (float64, error) {
	switch text := p.text(gravityAgainst); text {
	case "", "60F", "60/60", "15.6C":
		return feed.WaterAt60F, nil
	case "4C", "20/4":
		return feed.WaterAt4C, nil
	case "20C", "20/20":
		return feed.WaterAt20C, nil
	default:
		return 0, badLine("bad_value", gravityAgainst, text, "60F, 4C or 20C, as on the hydrometer")
	}
}

const gravityAgainst = "against"

// addGravity offers the hydrometer.
func (p *productFlags) addGravity(cmd *cobra.Command) {
	p.commandFlags.add(cmd, "gravity")
	t := &typed{name: gravityAgainst, unit: "temperature"}
	p.flags = append(p.flags, t)
	cmd.Flags().Var(t, gravityAgainst, "temperature of the water that the hydrometer's scale is against: 60F (where not given), 4C or 20C")
}

// show writes a sheet.
func (c *console) show(s report.Sheet, asJSON bool) error {
	if !asJSON {
		c.out.WriteString(s.Text())
		return nil
	}
	text, err := s.JSON()
	c.out.Write(text)
	return err
}

func tankCommand(c *console) *cobra.Command {
	var p productFlags
	var from typed
	var asJSON bool
	cmd := &cobra.Command{
		Use:   "tank",
		Short: "how long a day tank or a store lasts, and when to fill it",
		Long: "Says for how many hours the product in a tank lasts at a feed, at what time of\n" +
			"day filling must begin, and for a store when to order and whether a load fits.",
		Example: "  beckline feed tank --in-tank \"180 L\" --heel \"10 L\" --full \"240 L\" \\\n    --feed \"7.5 L/h\" --from \"2026-03-04 21:30\" --product caustic-25",
		Args:    noArguments,
		RunE: func(*cobra.Command, []string) error {
			s, err := p.store(from)
			if err != nil {
				return report.FeedProblem(err)
			}
			return c.show(s, asJSON)
		},
	}
	p.add(cmd, "strength", "product-temperature", "in-tank", "heel", "full", "feed", "margin", "lead", "load", "load-mass")
	from = typed{name: "from", unit: "date-time"}
	cmd.Flags().Var(&from, "from", "time at which that is in the tank, as 2026-03-04 21:30; now where not given")
	addJSON(cmd, &asJSON)
	return cmd
}

const usualMargin = 2 * 3600 // s before a tank runs empty (common practice, no source)

func (p *productFlags) store(from typed) (report.Sheet, error) {
	var s report.Store
	var err error
	if s.Product, err = p.named(); err != nil {
		return report.Sheet{}, err
	}
	if s.Tank.Volume, err = p.need("in-tank"); err != nil {
		return report.Sheet{}, err
	}
	if s.Rate, err = p.need("feed"); err != nil {
		return report.Sheet{}, err
	}
	more, err := p.several("heel", "full", "margin", "lead", "load", "load-mass")
	if err != nil {
		return report.Sheet{}, err
	}
	s.Tank.Heel, s.Tank.Full = more["heel"].Value, more["full"].Value
	if s.Now, err = clock(from); err != nil {
		return report.Sheet{}, err
	}
	if s.Supply, err = s.Tank.Lasts(s.Rate, more["margin"].Or(usualMargin)); err != nil {
		return report.Sheet{}, err
	}
	load, err := p.load(s.Product, more)
	if err != nil {
		return report.Sheet{}, err
	}
	if more["lead"].Given || load.Volume > 0 {
		kept, err := s.Tank.Keeps(s.Rate, more["lead"].Value, load.Volume)
		if err != nil {
			return report.Sheet{}, err
		}
		s.Storage = &kept
	}
	if load.Volume > 0 && s.Tank.Full > 0 {
		if s.Load, err = s.Tank.Takes(load); err != nil {
			return report.Sheet{}, err
		}
		s.HasLoad = true
	}
	return report.StoreSheet(s), nil
}

// several reads quantities that may be absent.
func (s *settings) several(names ...string) (map[string]dosing.Optional, error) {
	out := map[string]dosing.Optional{}
	for _, name := range names {
		v, err := s.get(name)
		if err != nil {
			return nil, err
		}
		out[name] = v
	}
	return out, nil
}

// load is one delivery by volume, from its mass where that is what was given.
func (p *productFlags) load(product dosing.Product, given map[string]dosing.Optional) (feed.Load, error) {
	volume, mass := given["load"], given["load-mass"]
	switch {
	case volume.Given && mass.Given:
		return feed.Load{}, badLine("one_of_two", "load", p.text("load")+" and "+p.text("load-mass"), "--load or --load-mass")
	case volume.Given:
		return feed.Load{Volume: volume.Value, KgPerM3: 1000}, nil // its density plays no part
	case !mass.Given:
		return feed.Load{}, nil
	case product.Density == "":
		return feed.Load{}, badLine("missing", "product", "", "the product, for the density of a load given by mass")
	}
	found, err := product.Density.At(product.Strength, referenceKelvin)
	if err != nil {
		return feed.Load{}, err
	}
	return feed.Load{Volume: mass.Value / found.KgPerM3, KgPerM3: found.KgPerM3}, nil
}

// clock reads a date and time in the machine's zone, or looks at the clock.
func clock(t typed) (time.Time, error) {
	const form = "2006-01-02 15:04"
	if problem := t.check("a date and time such as 2026-03-04 21:30", "; or leave the flag away for now"); problem != nil {
		return time.Time{}, problem
	}
	if t.times == 0 {
		return time.Now(), nil
	}
	at, err := time.ParseInLocation(form, t.text, time.Local)
	if err != nil {
		return at, badLine("date_form", t.name, reading.Clean(t.text), "a date and time such as 2026-03-04 21:30")
	}
	return at, nil
}

func deliveryCommand(c *console) *cobra.Command {
	var p productFlags
	var asJSON bool
	cmd := &cobra.Command{
		Use:   "delivery",
		Short: "is it the product on the note, and does it fit",
		Long: "Compares the density of a sample with the product and strength on the delivery\n" +
			"note before the hose goes on, and the load with the space in the tank.",
		Example: "  beckline feed delivery --product caustic-50 --gravity 1.53 \\\n    --product-temperature 16 --load-mass \"12 t\" --in-tank \"3 m3\" --full \"15 m3\"",
		Args:    noArguments,
		RunE: func(*cobra.Command, []string) error {
			s, err := p.delivery()
			if err != nil {
				return report.FeedProblem(err)
			}
			return c.show(s, asJSON)
		},
	}
	p.add(cmd, "strength", "product-temperature", "load", "load-mass", "in-tank", "heel", "full")
	p.addGravity(cmd)
	addJSON(cmd, &asJSON)
	return cmd
}

func (p *productFlags) delivery() (report.Sheet, error) {
	product, err := p.liquid()
	if err != nil {
		return report.Sheet{}, err
	}
	d := report.Delivery{Product: product}
	if d.Measured, d.Kelvin, err = p.density(); err != nil {
		return report.Sheet{}, err
	}
	if d.Gate, err = product.Density.CheckDelivery(product.Strength, d.Measured, d.Kelvin); err != nil {
		return report.Sheet{}, err
	}
	more, err := p.several("load", "load-mass", "in-tank", "heel", "full")
	if err != nil {
		return report.Sheet{}, err
	}
	load, err := p.load(product, more)
	if err != nil {
		return report.Sheet{}, err
	}
	if load.Volume > 0 && (!more["full"].Given || !more["in-tank"].Given) {
		return report.Sheet{}, badLine("missing", "full", "", "--full and --in-tank, to see whether the load fits")
	}
	if load.Volume > 0 {
		tank := feed.Tank{Volume: more["in-tank"].Value, Heel: more["heel"].Value, Full: more["full"].Value}
		if d.Load, err = tank.Takes(load); err != nil {
			return report.Sheet{}, err
		}
		d.HasLoad = true
	}
	return report.DeliverySheet(d), nil
}
