package main

import (
	"fmt"

	"github.com/spf13/cobra"

	"beckline/dosing"
	"beckline/dosing/entry"
	"beckline/dosing/reading"
	"beckline/dosing/report"
	"beckline/dosing/titration"
)

func edtaWorking(t titration.Titre, molarity, sampleML, moles float64) string {
	return fmt.Sprintf("(%.5g - %.5g) mL x %.5g mol/L x %.6g / %.5g mL = %.1f mg/L as CaCO3", t.EndML, t.StartML, molarity,
		2*titration.AsCaCO3(1), sampleML, 2*titration.AsCaCO3(moles))
}

func conductivityWorking(read, kelvin float64, coefficient dosing.Optional, at25 float64) string {
	f := quantity("conductivity")
	t := quantity("temperature")
	return fmt.Sprintf("%s uS/cm / (1 + %.4g x (%s - 25)) = %s uS/cm", f.Show(read), coefficientOr(coefficient), t.Show(kelvin), f.Show(at25))
}

func titrateGranCommand(c *console) *cobra.Command {
	var q commandFlags
	var asJSON bool
	cmd := &cobra.Command{
		Use:   "gran file",
		Short: "a whole titration curve to alkalinity, by Gran's fit",
		Long: "Reads a CSV file with the columns ml (acid added since the start) and ph, fits\n" +
			"Gran's line from pH 4 to 3 and takes the end point where it is zero. It needs\n" +
			"no end-point pH and no standardised electrode. - reads standard input.",
		Example: "  beckline titrate gran curve.csv --sample 100 --normality 0.02 --temperature 18",
		Args: func(_ *cobra.Command, args []string) error {
			if len(args) == 0 {
				return badLine("no_input", "file", "", "the name of a CSV file with the columns ml and ph, or - for standard input")
			}
			return atMostOneFile(named("gran"), args)
		},
		ValidArgsFunction: func(*cobra.Command, []string, string) ([]cobra.Completion, cobra.ShellCompDirective) {
			return []cobra.Completion{"csv"}, cobra.ShellCompDirectiveFilterFileExt
		},
		RunE: func(_ *cobra.Command, args []string) error {
			o, err := c.gran(&q, args[0])
			if err != nil {
				return benchProblem(err)
			}
			return c.write(o, asJSON)
		},
	}
	q.add(cmd, "sample", "normality", "temperature")
	addJSON(cmd, &asJSON)
	return cmd
}

// named is a bare command for refusals that only name it.
func named(name string) *cobra.Command { return &cobra.Command{Use: name} }

func (c *console) gran(q *commandFlags, file string) (outcome, error) {
	o := outcome{method: "gran"}
	sample, err := q.need("sample")
	if err != nil {
		return o, err
	}
	normality, err := q.need("normality")
	if err != nil {
		return o, err
	}
	kelvin, err := q.get("temperature")
	if err != nil {
		return o, err
	}
	points, err := c.titrationPoints(file)
	if err != nil {
		return o, err
	}
	fit, err := titration.Gran(titration.GranCurve{SampleML: sample * mL, Normality: normality, Points: points, Kelvin: kelvin.Or(0)})
	if err != nil {
		return o, err
	}
	o.notes = fit.Notes
	o.figures = append(o.figures, reads("alkalinity", "alkalinity", fit.Alkalinity, true))
	within := reads("alkalinity", "  within, by the points alone", fit.Within, false)
	within.key = "within_mg_l_caco3"
	o.figures = append(o.figures, within,
		benchFigure{key: "end_point_ml", label: "end point", value: fit.EndPointML, shown: fmt.Sprintf("%.3f mL", fit.EndPointML)},
		benchFigure{key: "slope", label: "slope of the electrode", value: fit.Slope, shown: fmt.Sprintf("%.3f", fit.Slope)},
		benchFigure{key: "r_squared", label: "R squared", value: fit.RSquared, shown: fmt.Sprintf("%.5f", fit.RSquared)},
		benchFigure{key: "points_used", label: "points used", value: float64(fit.Used), shown: fmt.Sprint(fit.Used)})
	o.working = fmt.Sprintf("%.3f mL x %.5g eq/L x 50043.5 / %.5g mL = %.1f mg/L as CaCO3", fit.EndPointML, normality, sample*mL,
		titration.AsCaCO3(fit.Alkalinity))
	return o, nil
}

// titrationPoints reads the columns ml and ph.
func (c *console) titrationPoints(file string) ([]titration.CurvePoint, error) {
	t, err := c.openTable([]string{file}, "ml,ph")
	if err != nil {
		return nil, err
	}
	rows, err := t.numbers([]tableColumn{column(quantity("ml"), true), column(quantity("ph"), true)})
	if err != nil {
		return nil, err
	}
	points := make([]titration.CurvePoint, len(rows))
	for i, row := range rows {
		points[i] = titration.CurvePoint{ML: row[0].Value * mL, PH: row[1].Value}
	}
	return points, nil
}

func titrateCarbonCommand(c *console) *cobra.Command {
	var flags formFlags
	var q commandFlags
	var plant plantFlags
	var asJSON bool
	cmd := &cobra.Command{
		Use:   "carbon",
		Short: "P-alkalinity to inorganic carbon, above pH 10.5",
		Long: "Above pH 10.5 the carbon found from pH and alkalinity hangs on the last digit of\n" +
			"the pH. This finds it from the phenolphthalein and the total alkalinity instead,\n" +
			"and says what pH goes with it. It needs pH, alkalinity, temperature and the\n" +
			"phenolphthalein alkalinity; the other readings make it better.",
		Example: "  beckline titrate carbon --ph 11.2 --alkalinity 140 --p-alkalinity 105 \\\n    --temperature 15 --calcium 30",
		Args:    flags.first(noArguments),
		RunE: func(*cobra.Command, []string) error {
			j, err := plant.job(&flags)
			if err != nil {
				return err
			}
			j.form.Adds = nil
			o, err := carbonFromP(&j, &q)
			if err != nil {
				return benchProblem(err)
			}
			c.note(j.note)
			return c.write(o, asJSON)
		},
	}
	q.add(cmd, "p-alkalinity")
	flags.add(cmd, reading.Reading)
	plant.add(cmd)
	addJSON(cmd, &asJSON)
	return cmd
}

func carbonFromP(j *job, q *commandFlags) (outcome, error) {
	o := outcome{method: "carbon"}
	p, err := q.need("p-alkalinity")
	if err != nil {
		return o, err
	}
	kase, err := j.kase(entry.NeedWater)
	if err != nil {
		return o, err
	}
	result, err := dosing.Solve(kase)
	if err != nil {
		return o, err
	}
	raw := &result.Raw().Figures
	found, err := titration.CarbonFromP(raw.Water, p, kase.Readings.PH.Or(0))
	if err != nil {
		return o, err
	}
	o.notes = found.Notes
	o.figures = append(o.figures, reads("dic", "inorganic carbon", found.DIC, true),
		benchFigure{key: "ph", label: "pH that goes with it", value: found.PH, shown: report.Fixed(found.PH, 2)})
	by := reads("dic", "  from the pH alone", raw.DIC, false)
	by.key = "dic_from_ph_mmol_l"
	o.figures = append(o.figures, by)
	o.working = fmt.Sprintf("to pH 8.3 with %s, from %s in all", reads("alkalinity", "", p, false).shown, reads("alkalinity", "", raw.Alkalinity, false).shown)
	return o, nil
}
