package report

import (
	"fmt"
	"strings"

	"beckline/dosing"
)

// Blend is the answer about waters that are mixed.
type Blend struct {
	mixed  *dosing.Result // at the flows given; nil where none are
	sample *dosing.Result // a blend of the same sources, for their own waters
	meets  *dosing.Result // at the share that meets the target; nil where none is asked for
	target dosing.Target
	share  float64 // of the first source
}

// NewBlend makes the answer from a blend at given flows, which may be nil, and
// the blend that meets a target at a share of the first source, nil where no
// target is asked for. One of the two must be there.
func NewBlend(mixed, meets *dosing.Result, target dosing.Target, share float64) Blend {
	b := Blend{mixed: mixed, sample: mixed, meets: meets, target: target, share: share}
	if b.sample == nil {
		b.sample = meets
	}
	return b
}

// Agrees tells whether the internal comparisons of both blends agree.
func (b Blend) Agrees() bool {
	for _, r := range []*dosing.Result{b.mixed, b.meets} {
		if r != nil && !New(r).Agrees() {
			return false
		}
	}
	return true
}

// Warnings are those of the blend at the given flows, else at the share found.
func (b Blend) Warnings() []Notice { return New(b.sample).Warnings }

// shares are the parts of the flow, 0 to 1.
func shares(r *dosing.Result) []float64 {
	var total float64
	out := make([]float64, len(r.Case.Sources))
	for i, s := range r.Case.Sources {
		out[i] = s.Flow.Value
		total += s.Flow.Value
	}
	for i := range out {
		out[i] /= total
	}
	return out
}

// meanPH is the mean of the sources' pH by flow, which the blend's pH is not.
func meanPH(r *dosing.Result) float64 {
	mean := 0.0
	for i, share := range shares(r) {
		mean += share * r.Sources[i].PH
	}
	return mean
}

// JSON is the answer for programs: sources, blend (null without flows),
// share_to_meet (null without a target), warnings.
func (b Blend) JSON() ([]byte, error) {
	var o object
	sources := make([]object, len(b.sample.Sources))
	var parts []float64
	if b.mixed != nil {
		parts = shares(b.mixed)
	}
	for i := range b.sample.Sources {
		sources[i].add("name", b.sample.Case.Sources[i].Name)
		if parts == nil {
			sources[i].add("share_percent", nil)
		} else {
			sources[i].add("share_percent", Some(parts[i]*100))
		}
		sources[i].add("water", fields(Water(&b.sample.Sources[i])))
	}
	o.add("sources", sources)
	if b.mixed == nil {
		o.add("blend", nil)
		o.add("mean_of_ph", nil)
	} else {
		o.add("blend", fields(Water(&b.mixed.Raw().Figures)))
		o.add("mean_of_ph", Some(meanPH(b.mixed)))
	}
	if b.meets == nil {
		o.add("share_to_meet", nil)
	} else {
		var m object
		m.add("target", b.target.Kind.Field())
		m.add("source", b.meets.Case.Sources[0].Name)
		m.add("share_percent", Some(b.share*100))
		m.add("water", fields(Water(&b.meets.Raw().Figures)))
		o.add("share_to_meet", m)
	}
	o.add("warnings", New(b.sample).warningsJSON())
	return indented(o)
}

// Text is the answer for people, in plain ASCII at most 78 columns wide where
// there are up to four sources.
func (b Blend) Text() string {
	var t strings.Builder
	if b.meets != nil {
		fmt.Fprintf(&t, "%s %% of %s and %s %% of %s make %s\n", Significant(b.share*100, 3), b.meets.Case.Sources[0].Name,
			Significant(100-b.share*100, 3), b.meets.Case.Sources[1].Name, TargetText(b.target))
		if at := shares(b.meets); b.mixed != nil {
			fmt.Fprintf(&t, "  as given it is %s %% of %s\n", Significant(shares(b.mixed)[0]*100, 3), b.meets.Case.Sources[0].Name)
		} else if len(at) == 2 {
			fmt.Fprintf(&t, "  %s parts to 1\n", Significant(at[0]/at[1], 3))
		}
		t.WriteByte('\n')
	}
	columns := b.columns()
	t.WriteString(fmt.Sprintf("%-22s", "Water"))
	for _, c := range columns {
		fmt.Fprintf(&t, " %10s", cutTo(c.name, 10))
	}
	t.WriteByte('\n')
	for i, f := range columns[0].water {
		line, shown := fmt.Sprintf("  %-20s", f.Label), false
		for _, c := range columns {
			line += fmt.Sprintf(" %10s", c.water[i].Show())
			shown = shown || c.water[i].Show() != "-"
		}
		if f.IsText || !shown {
			continue
		}
		t.WriteString(strings.TrimRight(line+"  "+f.Unit, " ") + "\n")
	}
	if b.mixed != nil {
		t.WriteString("\n" + Wrap(fmt.Sprintf("The mean of the pH readings would be %s, which the blend is not: its pH follows from alkalinity and carbon, which do add up.",
			asPH.write(meanPH(b.mixed))), textWidth) + "\n")
	}
	if notices := b.Warnings(); len(notices) > 0 {
		t.WriteString("\nWarnings\n")
		for _, w := range notices {
			t.WriteString(Wrap("  - "+w.Message, textWidth) + "\n")
		}
	}
	return ASCII(t.String())
}

type blendColumn struct {
	name  string
	water []Figure
}

func (b Blend) columns() []blendColumn {
	var out []blendColumn
	for i := range b.sample.Sources {
		out = append(out, blendColumn{b.sample.Case.Sources[i].Name, Water(&b.sample.Sources[i])})
	}
	if b.mixed != nil {
		out = append(out, blendColumn{"blend", Water(&b.mixed.Raw().Figures)})
	}
	if b.meets != nil {
		out = append(out, blendColumn{"to target", Water(&b.meets.Raw().Figures)})
	}
	return out
}

func cutTo(s string, n int) string {
	if r := []rune(s); len(r) > n {
		return string(r[:n-2]) + ".."
	}
	return s
}
