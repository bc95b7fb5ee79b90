package main

import (
	"github.com/spf13/cobra"

	"beckline/dosing"
	"beckline/dosing/titration"
)

// method makes one command of titrate.
func (c *console) method(use, short, long, example string, run func(args []string) (outcome, error)) (*cobra.Command, *commandFlags) {
	var q commandFlags
	var asJSON bool
	cmd := &cobra.Command{
		Use: use, Short: short, Long: long, Example: example, Args: noArguments,
		RunE: func(_ *cobra.Command, args []string) error {
			o, err := run(args)
			if err != nil {
				return benchProblem(err)
			}
			return c.write(o, asJSON)
		},
	}
	addJSON(cmd, &asJSON)
	return cmd, &q
}

func titrateAlkalinityCommand(c *console) *cobra.Command {
	var q *commandFlags
	cmd, flags := c.method("alkalinity", "burette to alkalinity, and to its kinds",
		"Alkalinity from an acid titration: mL x normality / mL of sample (Standard\n"+
			"Methods 2320). Read the burette before and after, or give the volume used. With\n"+
			"--low-end it takes the method of two end points, which waters under 20 mg/L\n"+
			"need. With --phenolphthalein-end it splits hydroxide, carbonate and bicarbonate.",
		"  beckline titrate alkalinity --sample 100 --normality 0.02 --end 12.6\n"+
			"  beckline titrate alkalinity --sample 200 --normality 0.02 \\\n    --end 2.9 --low-end 3.6",
		func([]string) (outcome, error) { return titrateAlkalinity(q) })
	flags.add(cmd, "sample", "normality", "start", "end", "used", "low-end", "end-ph", "low-end-ph", "phenolphthalein-end", "ph")
	q = flags
	return cmd
}

func titrateAlkalinity(q *commandFlags) (outcome, error) {
	o := outcome{method: "alkalinity"}
	sample, titre, err := burette(q)
	if err != nil {
		return o, err
	}
	normality, err := q.need("normality")
	if err != nil {
		return o, err
	}
	low, err := q.get("low-end")
	if err != nil {
		return o, err
	}
	var total float64
	if low.Given {
		total, err = lowAlkalinity(q, &o, sample, normality, titre, low.Value*mL)
	} else {
		b := titration.Burette{SampleML: sample, Normality: normality, Titre: titre}
		total, o.notes, err = b.Alkalinity()
		o.working = b.Working()
	}
	if err != nil {
		return o, err
	}
	o.figures = append(o.figures, reads("alkalinity", "alkalinity", total, true))
	return o, split(q, &o, sample, normality, titre, total)
}

// lowAlkalinity is the method of two end points.
func lowAlkalinity(q *commandFlags, o *outcome, sample, normality float64, first titration.Titre, second float64) (float64, error) {
	o.method = "alkalinity_two_end_points"
	l := titration.LowAlkalinity{SampleML: sample, Normality: normality, First: first,
		Second: titration.Titre{StartML: first.StartML, EndML: second}}
	for name, to := range map[string]*float64{"end-ph": &l.FirstPH, "low-end-ph": &l.SecondPH} {
		v, err := q.get(name)
		if err != nil {
			return 0, err
		}
		*to = v.Or(0)
	}
	total, notes, err := l.Solve()
	o.working, o.notes = l.Working(), notes
	return total, err
}

// split adds phenolphthalein alkalinity and the three kinds, where it was read.
func split(q *commandFlags, o *outcome, sample, normality float64, titre titration.Titre, total float64) error {
	end, err := q.get("phenolphthalein-end")
	if err != nil || !end.Given {
		return err
	}
	ph, err := q.get("ph")
	if err != nil {
		return err
	}
	at := titration.Titre{StartML: titre.StartML, EndML: end.Value * mL}
	if at.EndML < at.StartML {
		return badLine("readings_out_of_order", "phenolphthalein-end", quantity("start").Show(at.EndML/mL)+" mL", "a reading not below the start")
	}
	p := at.ML() * normality / sample
	parts, notes, err := titration.Split(p, total, ph.Or(0))
	if err != nil {
		return err
	}
	o.notes = append(o.notes, notes...)
	for _, f := range []struct {
		key, label string
		eq         float64
	}{
		{"p_alkalinity_mg_l_caco3", "phenolphthalein alkalinity", p},
		{"hydroxide_mg_l_caco3", "  as hydroxide", parts.Hydroxide},
		{"carbonate_mg_l_caco3", "  as carbonate", parts.Carbonate},
		{"bicarbonate_mg_l_caco3", "  as bicarbonate", parts.Bicarbonate},
	} {
		figure := reads("alkalinity", f.label, f.eq, false)
		figure.key = f.key
		o.figures = append(o.figures, figure)
	}
	return nil
}

func titrateHardnessCommand(c *console) *cobra.Command {
	var q *commandFlags
	cmd, flags := c.method("hardness", "EDTA to hardness, calcium and magnesium",
		"Hardness from an EDTA titration at pH 10 (Standard Methods 2340 C), and with\n"+
			"--calcium-used, titrated at pH 12 on as much sample, calcium and magnesium.",
		"  beckline titrate hardness --sample 50 --molarity 0.01 --used 7.4 \\\n    --calcium-used 5.1",
		func([]string) (outcome, error) { return titrateHardness(q) })
	flags.add(cmd, "sample", "molarity", "start", "end", "used", "calcium-used")
	q = flags
	return cmd
}

func titrateHardness(q *commandFlags) (outcome, error) {
	o := outcome{method: "hardness"}
	sample, titre, err := burette(q)
	if err != nil {
		return o, err
	}
	molarity, err := q.need("molarity")
	if err != nil {
		return o, err
	}
	total, notes, err := titration.EDTA{SampleML: sample, Molarity: molarity, Titre: titre}.Hardness()
	if err != nil {
		return o, err
	}
	o.notes = notes
	o.working = edtaWorking(titre, molarity, sample, total)
	o.figures = append(o.figures, reads("hardness", "hardness", total, true))
	used, err := q.get("calcium-used")
	if err != nil || !used.Given {
		return o, err
	}
	calcium, notes, err := titration.EDTA{SampleML: sample, Molarity: molarity, Titre: titration.Used(used.Value * mL)}.Hardness()
	if err != nil {
		return o, err
	}
	magnesium, err := titration.Magnesium(total, calcium)
	if err != nil {
		return o, err
	}
	o.notes = append(o.notes, notes...)
	o.figures = append(o.figures, reads("calcium-hardness", "calcium hardness", calcium, true),
		reads("calcium", "calcium", calcium, false), reads("magnesium", "magnesium", magnesium, false))
	return o, nil
}

func titrateConductivityCommand(c *console) *cobra.Command {
	var q *commandFlags
	cmd, flags := c.method("conductivity", "conductivity of a cold sample to that at 25 C",
		"For a meter without temperature compensation: the conductivity at 25 C, linear\n"+
			"in the temperature (Standard Methods 2510). A meter that compensates needs none\n"+
			"of this.",
		"  beckline titrate conductivity --conductivity 52 --temperature 8",
		func([]string) (outcome, error) { return conductivityAt25(q) })
	flags.add(cmd, "conductivity", "temperature", "coefficient")
	q = flags
	return cmd
}

func conductivityAt25(q *commandFlags) (outcome, error) {
	o := outcome{method: "conductivity"}
	read, err := q.need("conductivity")
	if err != nil {
		return o, err
	}
	kelvin, err := q.need("temperature")
	if err != nil {
		return o, err
	}
	coefficient, err := q.get("coefficient")
	if err != nil {
		return o, err
	}
	at25, err := titration.ConductivityAt25(read, kelvin, coefficient.Or(0))
	if err != nil {
		return o, err
	}
	o.working = conductivityWorking(read, kelvin, coefficient, at25)
	o.figures = append(o.figures, reads("conductivity", "conductivity at 25 C", at25, true))
	return o, nil
}

// used by the working of the conductivity where no coefficient was typed.
func coefficientOr(v dosing.Optional) float64 { return v.Or(titration.StandardCoefficient) }
