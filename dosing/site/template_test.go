package site_test

import (
	"math"
	"regexp"
	"strings"
	"testing"

	"beckline/dosing"
	"beckline/dosing/entry"
	"beckline/dosing/reading"
	"beckline/dosing/site"
)

var remark = regexp.MustCompile(`^# [a-z-]+ = `)

func load(t *testing.T, text string) *site.Site {
	t.Helper()
	s, err := site.Parse("plant.toml", []byte(text))
	if err != nil {
		t.Fatal(err)
	}
	return s
}

func template(t *testing.T) *site.Site { return load(t, site.Template()) }

// TestTemplateAnswers: the template loads as it stands and its plan has an
// answer: alum 22 mg/L leaves pH 6.28 and alkalinity 13.0, and 15.85 mg/L of NaOH
// lifts it to pH 8.40 with alkalinity 32.8 and CCPP -3.6 (an independent working
// of the same equations).
func TestTemplateAnswers(t *testing.T) {
	s := template(t)
	line := s.Start
	if line.Name != "upland" || line.Plant != "Kestrel Fold works" || len(s.Notes) != 0 {
		t.Fatalf("%+v %v", line, s.Notes)
	}
	c, err := line.Case(line.Form(), entry.NeedDose)
	if err != nil {
		t.Fatal(err)
	}
	r, err := dosing.Solve(c)
	if err != nil {
		t.Fatal(err)
	}
	settled, fin, st := r.Stations[1].Figures, r.Finished().Figures, r.Dose()
	near := func(name string, got, want, within float64) {
		t.Helper()
		if math.Abs(got-want) > within {
			t.Errorf("%s: %g, want %g", name, got, want)
		}
	}
	near("settled pH", settled.PH, 6.28, 0.005)
	near("settled alkalinity", settled.Alkalinity*50043.5, 13.0, 0.05)
	near("NaOH mg/L", st.Dose*39997, 15.85, 0.003*15.85)
	near("finished alkalinity", fin.Alkalinity*50043.5, 32.8, 0.05)
	near("CCPP", fin.CCPP.Value*100087, -3.6, 0.05)
	if st.Addition.Product.Name != "caustic" || st.Addition.Product.Title != "caustic soda, tank C1" || !st.Feed.HasPump {
		t.Errorf("%+v", st.Addition.Product)
	}
	if broken := line.CheckFinished(r); len(broken) != 0 {
		t.Errorf("the template breaks its own limits: %v", broken)
	}
	if r.Stations[1].Addition.Product.Name != "alum" {
		t.Errorf("the addition is %q", r.Stations[1].Addition.Product.Name)
	}
}

// TestTemplateRemarks: each remark that holds a key must be right too once its
// mark is taken off.
func TestTemplateRemarks(t *testing.T) {
	var b strings.Builder
	uncovered := 0
	for _, l := range strings.Split(site.Template(), "\n") {
		if remark.MatchString(l) {
			l = strings.TrimPrefix(l, "# ")
			uncovered++
		}
		b.WriteString(l + "\n")
	}
	s := load(t, b.String())
	if uncovered < 9 || !s.ProductNamed("caustic").Density.Given || s.Start.Approved == "" {
		t.Errorf("%d remarks uncovered, %+v", uncovered, s.ProductNamed("caustic"))
	}
	if len(s.Notes) != 0 {
		t.Errorf("%v", s.Notes)
	}
}

// TestTemplateNamesEverything: every key that the loader knows in its tables of
// plants stands in the template, so that a reader finds it there.
func TestTemplateNamesEverything(t *testing.T) {
	text := site.Template()
	for _, key := range []string{"format", "start", "currency", "units", "products", "catalogue", "title", "strength", "density", "density-date",
		"temperature", "price", "maximum-use", "pumps", "capacity", "tanks", "kind", "volume", "sources", "lines", "plant", "source", "blend",
		"readings", "add", "product", "pump", "targets", "approved", "contact-volume", "sensor-volume", "limits", "usual", "finished", "change", "tolerances"} {
		if !strings.Contains(text, key+" = ") && !strings.Contains(text, "["+key) && !strings.Contains(text, "."+key+"]") {
			t.Errorf("%s is not in the template", key)
		}
	}
	for _, l := range strings.Split(text, "\n") {
		if len(l) > 80 {
			t.Errorf("%d columns: %s", len(l), l)
		}
	}
	if reading.ASCII(text) != text || strings.ContainsFunc(text, func(r rune) bool { return r > 126 || r < 32 && r != '\n' }) {
		t.Error("the template is not plain ASCII")
	}
}
