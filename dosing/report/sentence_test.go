package report

import (
	"encoding/json"
	"go/ast"
	"go/parser"
	"go/token"
	"os"
	"path/filepath"
	"slices"
	"strconv"
	"strings"
	"testing"

	"beckline/dosing"
	"beckline/dosing/reading"
)

// codesInSource collects the codes that the rooms below write into warnings and
// problems: every string of snake case that stands as the Code of a composite
// literal, or first in a call of one of their makers.
func codesInSource(t *testing.T) (warnings, problems []string) {
	t.Helper()
	makers := map[string]bool{"badInput": true, "problem": true, "rowProblem": true, "fileProblem": true, "badLine": true}
	for _, folder := range []string{"..", "../entry", "../table", "../curve", "../mix", "../site", "../../cmd/beckline"} {
		files, err := filepath.Glob(filepath.Join(folder, "*.go"))
		if err != nil {
			t.Fatal(err)
		}
		for _, name := range files {
			if strings.HasSuffix(name, "_test.go") {
				continue
			}
			file, err := parser.ParseFile(token.NewFileSet(), name, nil, 0)
			if err != nil {
				t.Fatal(err)
			}
			ast.Inspect(file, func(n ast.Node) bool {
				switch n := n.(type) {
				case *ast.CompositeLit:
					code, ok := codeField(n)
					if !ok {
						break
					}
					if typeName(n) == "Problem" {
						problems = append(problems, code)
					} else {
						warnings = append(warnings, code)
					}
				case *ast.CallExpr:
					if makers[callName(n)] && len(n.Args) > 0 {
						if code, ok := text(n.Args[0]); ok {
							problems = append(problems, code)
						}
					}
				}
				return true
			})
		}
	}
	slices.Sort(warnings)
	slices.Sort(problems)
	return slices.Compact(warnings), slices.Compact(problems)
}

func codeField(n *ast.CompositeLit) (string, bool) {
	for _, e := range n.Elts {
		if kv, ok := e.(*ast.KeyValueExpr); ok {
			if key, ok := kv.Key.(*ast.Ident); ok && key.Name == "Code" {
				return text(kv.Value)
			}
		}
	}
	return "", false
}

func typeName(n *ast.CompositeLit) string {
	switch t := n.Type.(type) {
	case *ast.Ident:
		return t.Name
	case *ast.SelectorExpr:
		return t.Sel.Name
	}
	return ""
}

func callName(n *ast.CallExpr) string {
	switch f := n.Fun.(type) {
	case *ast.Ident:
		return f.Name
	case *ast.SelectorExpr:
		return f.Sel.Name
	}
	return ""
}

func text(e ast.Expr) (string, bool) {
	lit, ok := e.(*ast.BasicLit)
	if !ok || lit.Kind != token.STRING {
		return "", false
	}
	s, err := strconv.Unquote(lit.Value)
	return s, err == nil
}

func TestEveryWarningHasASentence(t *testing.T) {
	warnings, _ := codesInSource(t)
	if len(warnings) < 12 {
		t.Fatalf("only %d codes found: %v", len(warnings), warnings)
	}
	// Codes that reach warnings by other ways than a literal.
	warnings = append(warnings, "purity_assumed", "density_at_20c", "density_beyond_table", "product_may_freeze",
		"pump_below_turndown")
	for _, code := range warnings {
		if !slices.Contains(sentenceCodes(), code) && !strings.HasPrefix(code, "unusual_") {
			t.Errorf("%s has no sentence", code)
		}
	}
	for _, code := range sentenceCodes() {
		s := Sentence(dosing.Warning{Code: code, Field: "caustic-25", Value: 0.01, Limit: 0.02})
		if len(s) < 20 || ASCII(s) != s || strings.Contains(s, "_") || strings.HasSuffix(s, ".") {
			t.Errorf("%s: %q is no plain sentence", code, s)
		}
	}
}

func TestEveryProblemHasWords(t *testing.T) {
	_, problems := codesInSource(t)
	if len(problems) < 30 {
		t.Fatalf("only %d codes found: %v", len(problems), problems)
	}
	for _, code := range problems {
		if !slices.Contains(reasonCodes(), code) && reading.Reason(code) == unknownReason {
			t.Errorf("%s has no words", code)
		}
	}
}

func TestUnusualNamesTheEndOfTheBand(t *testing.T) {
	kelvin := si(t, "temperature", 41).Value
	w := dosing.Warning{Code: "unusual_temperature", Field: "temperature", Given: "41", Value: kelvin,
		Limit: si(t, "temperature", 30).Value}
	if got, want := Sentence(w), "temperature 41 is unusual: usually 1 to 30 C; 41 F would be 5.0 C; check the value and its unit"; got != want {
		t.Errorf("%q, want %q", got, want)
	}
	w.Value, w.Limit = si(t, "temperature", 0.5).Value, si(t, "temperature", 1).Value
	w.Given = "0.5"
	if got, want := Sentence(w), "temperature 0.5 is unusual: usually 1 to 30 C; check the value and its unit"; got != want {
		t.Errorf("%q, want %q", got, want)
	}
	w.Given = "" // nothing typed is at hand
	if got, want := Sentence(w), "temperature is unusual: under 1.0 C; check the value and its unit"; got != want {
		t.Errorf("%q, want %q", got, want)
	}
}

func TestUnknownCodesAreNotLost(t *testing.T) {
	if got, want := Sentence(dosing.Warning{Code: "some_new_code", Field: "raw"}), "raw water: some new code"; got != want {
		t.Errorf("%q, want %q", got, want)
	}
	p := &dosing.Problem{Code: "some_new_code", Field: "ph", Given: "7", Accepted: "8"}
	if got, want := ProblemLine(p), `ph "7" some new code; accepted: 8`; got != want {
		t.Errorf("%q, want %q", got, want)
	}
}

func TestProblemLines(t *testing.T) {
	for name, c := range map[string]struct {
		p    dosing.Problem
		want string
	}{
		"typed": {dosing.Problem{Code: "not_a_number", Field: "ph", Given: "abc", Accepted: "a number, 0 to 14"},
			`ph "abc" is not a number; accepted: a number, 0 to 14`},
		"range in the field's unit": {dosing.Problem{Code: "outside_range", Field: "temperature", Value: dosing.Some(353.15),
			Low: dosing.Some(273.15), High: dosing.Some(323.15)},
			`temperature "80.0 C" is outside what is accepted; accepted: 0.0 C to 50.0 C`},
		"out of reach": {dosing.Problem{Kind: dosing.NoAnswer, Code: "out_of_reach", Field: "target-ph",
			Target:  dosing.Target{Kind: dosing.TargetPH, Value: 9},
			Nearest: dosing.Some(8.234), CouldReach: []string{"lime", "caustic-25"}},
			`target-ph "9.00" cannot be reached with this product; nearest reachable: pH 8.23; could reach it: lime, caustic-25`},
		"nearest in its unit": {dosing.Problem{Kind: dosing.NoAnswer, Code: "wrong_side", Field: "target-alkalinity",
			Target: dosing.Target{Kind: dosing.TargetAlkalinity, Value: 1e-3}, Nearest: dosing.Some(2e-3)},
			`target-alkalinity "50.0 mg/L as CaCO3" is on the other side: no dose of this product leads towards it; ` +
				`nearest reachable: alkalinity 100 mg/L as CaCO3`},
		"pump": {dosing.Problem{Kind: dosing.NoAnswer, Code: "pump_too_small", Field: "pump", Value: dosing.Some(2.5),
			Target: dosing.Target{Kind: dosing.TargetPH, Value: 9}, Nearest: dosing.Some(8)},
			`pump is too small: it would have to run at 250 % of its output; ` +
				`accepted: a larger pump, a stronger product or a nearer target; nearest reachable: pH 8.00`},
		"the end of a range itself": {dosing.Problem{Code: "outside_range", Field: "ph", Value: dosing.Some(4.5),
			Low: dosing.Some(4.5), High: dosing.Some(14)},
			`ph "4.50" is outside what is accepted; accepted: above 4.50 to 14.00`},
		"no field of its own": {dosing.Problem{Kind: dosing.NoAnswer, Code: "ionic_strength", Value: dosing.Some(1.2), High: dosing.Some(0.5)},
			`ionic strength "1.20 mol/L" is above 0.5 mol/L, where the activity equation ends; ` +
				`accepted: up to 0.5 mol/L; check conductivity, TDS, the ions and their units`},
		"a dose that is too much": {dosing.Problem{Kind: dosing.NoAnswer, Code: "ionic_strength", Value: dosing.Some(0.6), High: dosing.Some(0.5),
			Target: dosing.Target{Kind: dosing.TargetPH, Value: 11}, Nearest: dosing.Some(10)},
			`ionic strength "0.600 mol/L" is above 0.5 mol/L, where the activity equation ends; accepted: a nearer target; nearest reachable: pH 10.00`},
		"pH leaves the scale": {dosing.Problem{Kind: dosing.NoAnswer, Code: "ph_outside_scale", Value: dosing.Some(14.2),
			Low: dosing.Some(0), High: dosing.Some(14)}, `pH "14.2" leaves the scale of 0 to 14; accepted: 0 to 14.0`},
		"two that do not go together": {dosing.Problem{Code: "chlorine_with_ammonia", Field: "free-chlorine"},
			`free-chlorine and ammonia stand on one water: they form chloramine at once, which is not computed here; ` +
				`accepted: one of free-chlorine and ammonia`},
		"the program": {dosing.Problem{Kind: dosing.Failed, Code: "solver_failed", Given: "no convergence"},
			`the solver failed: no convergence`},
		"the machine": {dosing.Problem{Kind: dosing.Failed, Code: "not_written", Field: "output", Given: "no space left on device"},
			`output could not be written: no space left on device`},
	} {
		if got := ProblemLine(&c.p); got != c.want {
			t.Errorf("%s:\n%s\nwant\n%s", name, got, c.want)
		}
	}
}

func TestProblemJSON(t *testing.T) {
	p := &dosing.Problem{Kind: dosing.NoAnswer, Code: "wrong_side", Field: "target-ccpp",
		Target: dosing.Target{Kind: dosing.TargetCCPP, Value: 1e-5}, Nearest: dosing.Some(2e-5), CouldReach: []string{"lime"}}
	text := ProblemJSON(p)
	if strings.Count(string(text), "\n") != 1 {
		t.Errorf("%s is not one line", text)
	}
	var object struct {
		Problem map[string]any `json:"problem"`
	}
	if err := json.Unmarshal(text, &object); err != nil {
		t.Fatal(err)
	}
	for _, key := range []string{"code", "field", "given", "accepted", "nearest", "could_reach"} {
		if _, there := object.Problem[key]; !there {
			t.Errorf("no %s in %s", key, text)
		}
	}
	if len(object.Problem) != 6 || object.Problem["nearest"] != 2.00174 {
		t.Errorf("%s", text)
	}
	if text := string(ProblemJSON(&dosing.Problem{Code: "missing", Field: "ph"})); !strings.Contains(text, `"nearest":null`) ||
		!strings.Contains(text, `"could_reach":[]`) {
		t.Errorf("%s", text)
	}
}

// A warning names the product, the figure and its basis, and what to check.
func TestSentencesSayWhatToDo(t *testing.T) {
	for _, c := range []struct {
		w    dosing.Warning
		want string
	}{
		{dosing.Warning{Code: "unusual_dose", Field: "soda-ash", Value: 0.7126, Limit: 0.1},
			"soda-ash: a dose of 713 mg/L as Na2CO3 is unusual: over 100 mg/L; check the readings, the target and their units"},
		{dosing.Warning{Code: "unusual_dose", Field: "alum-dry", Given: "alum-dry=150", Value: 0.15, Limit: 0.1},
			"alum-dry: a dose of 150 mg/L as Al2(SO4)3.14.3H2O is unusual: over 100 mg/L; check the dose and its basis"},
		{dosing.Warning{Code: "basis_assumed", Field: "hypochlorite-12", Given: "1.2"},
			"hypochlorite-12 1.2: the bare dose was taken as NaOCl; the trade states it as Cl2, so write out which: 1.2 mg/L Cl2 or 1.2 mg/L NaOCl"},
		{dosing.Warning{Code: "basis_assumed", Field: "hydrofluorosilicic-23", Given: "0.7 ppm"},
			"hydrofluorosilicic-23 0.7 ppm: the bare dose was taken as H2SiF6; the trade states it as F, so write out which: 0.7 ppm F or 0.7 ppm H2SiF6"},
		// 100 mg/L may be no certified level at all, only where to look one up.
		{dosing.Warning{Code: "over_use_level", Field: "caustic-25", Value: 5, Limit: 0.1},
			"caustic-25: 5000 mg/L is over 100 mg/L; look up the product's certified maximum use level"},
		{dosing.Warning{Code: "may_scale", Field: "caustic-25"},
			"after caustic-25: calcium carbonate may precipitate, pH then lower than shown"},
		{dosing.Warning{Code: "low_alkalinity_for_coagulation", Field: "alum-dry", Value: 5e-5, Limit: 1e-4},
			"alum-dry: only 2.5 mg/L of alkalinity (as CaCO3) is left after the coagulant, under 5; add alkalinity before it"},
		{dosing.Warning{Code: "low_alkalinity_for_coagulation", Field: "alum-dry", Value: -1e-4, Limit: 1e-4},
			"alum-dry: no alkalinity is left after the coagulant, only free acid; add alkalinity before it"},
		{dosing.Warning{Code: "may_scale", Field: "raw"},
			"raw water: calcium carbonate may precipitate, pH then lower than shown"},
	} {
		if got := Sentence(c.w); got != c.want {
			t.Errorf("%s: %q, want %q", c.w.Code, got, c.want)
		}
	}
}

// The goldens of this room are made from the program; what they hold is checked
// against sources elsewhere. They keep the layout from changing unnoticed.
func TestGoldenText(t *testing.T) {
	d := solved(t, soft(t), "caustic-25", si(t, "pump", 20))
	for name, got := range map[string]string{"soft.text": d.Text(), "soft.slip": d.Slip()} {
		file := filepath.Join("testdata", name)
		if *update {
			if err := os.WriteFile(file, []byte(got), 0o600); err != nil {
				t.Fatal(err)
			}
		}
		want, err := os.ReadFile(file)
		if err != nil {
			t.Fatal(err)
		}
		if got != string(want) {
			t.Errorf("%s:\n%s\nwant\n%s", name, got, want)
		}
	}
}
