package main

import (
	"fmt"
	"strings"

	"github.com/spf13/cobra"

	"beckline/dosing"
	"beckline/dosing/bench"
	"beckline/dosing/entry"
	"beckline/dosing/reading"
	"beckline/dosing/report"
)

// benchFlags are a jar beside the readings of its sample.
type benchFlags struct {
	form     formFlags
	product  productFlags
	points   []string
	unknowns typed
}

const pointForm = "DOSE=PH, such as 5=7.12 (mg/L of the chemical) or \"20 mg/L product=7.12\""

func benchCommand(c *console) *cobra.Command {
	var b benchFlags
	var asJSON bool
	cmd := &cobra.Command{
		Use:   "bench [file]",
		Short: "a jar titration to what the water and the product really are",
		Long: "Fits the pH readings of a jar after known doses: the sample's effective\n" +
			"alkalinity and inorganic carbon, the product's strength, a weak acid that nobody\n" +
			"measured. Says how well each is known, shows what is left over, and where the\n" +
			"jar and the model part by more than the readings allow, the likely reasons.\n" +
			"Points are typed with --point or stand in a CSV file with the columns ph and\n" +
			"one of dose_mg_l (of the chemical), product_mg_l, or added_ml with --stock and\n" +
			"--jar.",
		Example: "  beckline bench --ph 6.28 --alkalinity 13 --temperature 8 \\\n" +
			"    --product caustic-25 --point 0=6.28 --point 4=6.55 --point 8=6.88 \\\n" +
			"    --point 12=7.36 --point 15=8.12 --target-ph 8.4",
		Args: b.form.first(atMostOneFile),
		ValidArgsFunction: func(*cobra.Command, []string, string) ([]cobra.Completion, cobra.ShellCompDirective) {
			return []cobra.Completion{"csv"}, cobra.ShellCompDirectiveFilterFileExt
		},
		RunE: func(_ *cobra.Command, args []string) error {
			s, err := b.sheet(c, args)
			if err != nil {
				return err
			}
			return c.show(s, asJSON)
		},
	}
	b.form.add(cmd, reading.Reading)
	b.product.add(cmd, "strength", "target-ph", "stock", "jar", "ph-tolerance", "dose-tolerance")
	cmd.Flags().StringArrayVar(&b.points, "point", nil, "one reading, as "+pointForm+"; repeat it in order")
	b.unknowns = typed{name: "unknowns", unit: "names"}
	cmd.Flags().Var(&b.unknowns, "unknowns", "what to find, with commas between: "+strings.Join(report.UnknownNames(), ", ")+
		"; alkalinity,carbon where not given; none only compares")
	b.form.addAdditions(cmd)
	addJSON(cmd, &asJSON)
	return cmd
}

func (b *benchFlags) sheet(c *console, args []string) (report.Sheet, error) {
	product, err := b.product.named()
	if err != nil {
		return report.Sheet{}, err
	}
	if product.Name == "" {
		return report.Sheet{}, badLine("missing", "product", "", productWanted)
	}
	form, err := b.form.form()
	if err != nil {
		return report.Sheet{}, err
	}
	result, err := solveJob(job{form: form}, entry.NeedWater)
	if err != nil {
		return report.Sheet{}, err
	}
	find, err := b.find()
	if err != nil {
		return report.Sheet{}, err
	}
	more, err := b.product.several("stock", "jar", "target-ph", "ph-tolerance", "dose-tolerance")
	if err != nil {
		return report.Sheet{}, err
	}
	t := bench.Of(&result.Finished().Figures, product)
	t.Stock, t.PHTolerance, t.DoseTolerance = more["stock"].Value, more["ph-tolerance"].Value, more["dose-tolerance"].Value
	if t.Points, err = b.read(c, args, product, more); err != nil {
		return report.Sheet{}, err
	}
	r, err := bench.Fit(t, find...)
	if err != nil {
		return report.Sheet{}, err
	}
	out := report.Bench{Report: r, Product: product, Find: find, Target: more["target-ph"]}
	if out.Target.Given {
		if out.ByJar, err = r.DoseTo(out.Target.Value); err != nil {
			return report.Sheet{}, err
		}
	}
	return report.BenchSheet(out), nil
}

// find reads what is to be found.
func (b *benchFlags) find() ([]bench.Unknown, error) {
	accepted := strings.Join(report.UnknownNames(), ", ") + " with commas between, or none"
	if problem := b.unknowns.check(accepted, ""); problem != nil {
		return nil, problem
	}
	switch {
	case b.unknowns.times == 0:
		return []bench.Unknown{bench.Alkalinity, bench.Carbon}, nil
	case b.unknowns.text == "none":
		return nil, nil
	}
	var out []bench.Unknown
	for _, name := range strings.Split(b.unknowns.text, ",") {
		u, ok := report.UnknownNamed(strings.ToLower(strings.TrimSpace(name)))
		if !ok {
			return nil, badLine("unknown_unknown", "unknowns", name, nearest("", name, report.UnknownNames(), accepted))
		}
		out = append(out, u)
	}
	return out, nil
}

// read collects the points that were typed and those of a file.
func (b *benchFlags) read(c *console, args []string, product dosing.Product, more map[string]dosing.Optional) ([]bench.Point, error) {
	var points []bench.Point
	for _, text := range b.points {
		p, err := typedPoint(text, product)
		if err != nil {
			return nil, err
		}
		points = append(points, p)
	}
	if len(args) == 0 && (len(points) > 0 || isTerminal(c.in)) {
		if len(points) == 0 {
			return nil, badLine("missing", "point", "", pointForm+"; or the name of a CSV file")
		}
		return points, nil
	}
	t, err := c.openTable(args, "dose_mg_l,ph")
	if err != nil {
		return nil, err
	}
	err = b.rows(t, product, more, &points)
	return points, err
}

func (b *benchFlags) rows(t *smallTable, product dosing.Product, more map[string]dosing.Optional, points *[]bench.Point) error {
	dose := func(basis string) func(string) (float64, error) {
		return func(text string) (float64, error) {
			if _, err := reading.Number(text); err != nil {
				return 0, err
			}
			return entry.DoseOf(product, "dose", text+" mg/L"+basis)
		}
	}
	const amount = "a number, 0 or more"
	columns := []tableColumn{column(quantity("ph"), true)}
	factor := 1.0
	switch {
	case t.has("dose_mg_l"):
		columns = append(columns, tableColumn{"dose_mg_l", true, dose(""), amount})
	case t.has("product_mg_l"):
		columns = append(columns, tableColumn{"product_mg_l", true, dose(" product"), amount})
	case t.has("added_ml"):
		if !more["stock"].Given || !more["jar"].Given {
			return badLine("missing", "stock", "", "--stock and --jar with the column added_ml")
		}
		columns = append(columns, column(quantity("added"), true))
		factor = more["stock"].Value / more["jar"].Value
	default:
		return badLine("column_missing", "dose_mg_l", "", "a column dose_mg_l, product_mg_l or added_ml beside ph")
	}
	rows, err := t.numbers(columns)
	if err != nil {
		return err
	}
	for _, row := range rows {
		*points = append(*points, bench.Point{PH: row[0].Value, Dose: row[1].Value * factor})
	}
	return nil
}

// typedPoint reads DOSE=PH.
func typedPoint(text string, product dosing.Product) (bench.Point, error) {
	at := strings.LastIndex(text, "=")
	if at <= 0 {
		return bench.Point{}, badLine("point_form", "point", text, pointForm)
	}
	dose, err := entry.DoseOf(product, "point", strings.TrimSpace(text[:at]))
	if err != nil {
		return bench.Point{}, err
	}
	v, err := quantity("ph").Parse(text[at+1:])
	if err != nil {
		problem := readingProblem(err).(*dosing.Problem)
		problem.Field, problem.Given = "point", reading.Clean(text)
		problem.Accepted = fmt.Sprintf("%s; pH 0 to 14", pointForm)
		return bench.Point{}, problem
	}
	return bench.Point{Dose: dose, PH: v.SI}, nil
}
