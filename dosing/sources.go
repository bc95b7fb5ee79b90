package dosing

import (
	"math"
	"strings"

	"beckline/carbonate"
)

// start finds the raw water: one sample, or a blend of several.
func (r *run) start() error {
	if len(r.c.Sources) == 0 {
		s, kn, warnings, err := raw(&r.c.Readings)
		r.base, r.known, r.warnings = s, kn, warnings
		return err
	}
	return r.blend()
}

// blend mixes the sources by flow. Alkalinity, totals and heat are conserved and
// the pH is solved; it is never averaged. A figure is known of the blend only
// where it is known of every source.
func (r *run) blend() error {
	streams := make([]carbonate.Stream, len(r.c.Sources))
	for i := range r.c.Sources {
		src := &r.c.Sources[i]
		s, kn, warnings, err := raw(&src.Readings)
		if err != nil {
			return ofSource(problem(err), src.Name)
		}
		f, err := figures(&s, kn)
		if err != nil {
			return ofSource(problem(err), src.Name)
		}
		r.res.Sources = append(r.res.Sources, f)
		for _, w := range warnings {
			w.Field = strings.TrimSpace(src.Name + " " + w.Field)
			r.warnings = append(r.warnings, w)
		}
		if !src.Flow.Given || !(src.Flow.Value >= 0) {
			return &Problem{Kind: BadInput, Code: "missing", Field: "blend", Given: src.Name}
		}
		streams[i] = carbonate.Stream{Water: s.Water, Flow: src.Flow.Value}
		if i == 0 {
			r.known = kn
		} else {
			r.known = r.known.and(kn)
		}
	}
	w, err := carbonate.Blend(streams...)
	if err != nil {
		return &Problem{Kind: BadInput, Code: "no_flow", Field: "blend", Given: err.Error()}
	}
	first := &r.c.Sources[0].Readings
	blended, p := react(w, &Addition{})
	if p != nil {
		return p
	}
	if r.base, err = carbonate.Solve(blended); err != nil {
		return refusal(err, first, r.base.Constants(), w)
	}
	return nil
}

// and keeps what is known of both waters.
func (k known) and(o known) known {
	k.calcium = k.calcium && o.calcium
	k.magnesium = k.magnesium && o.magnesium
	k.sodium = k.sodium && o.sodium
	k.chloride = k.chloride && o.chloride
	k.sulfate = k.sulfate && o.sulfate
	k.organics = k.organics || o.organics
	if k.route != o.route {
		k.route = FromIons
	}
	return k
}

func ofSource(p *Problem, name string) *Problem {
	q := *p
	q.Given = strings.TrimSpace(name + " " + q.Given)
	return &q
}

// ShareToMeet finds the share of the first of two sources, 0 to 1, with which
// their blend meets the case's target before any addition. The error is a
// *Problem; out of reach, its Nearest is the figure of the nearer source.
func ShareToMeet(c Case) (float64, error) {
	if len(c.Sources) != 2 {
		return 0, &Problem{Kind: BadInput, Code: "two_sources_needed", Field: "blend"}
	}
	if c.Target.Kind == NoTarget {
		return 0, &Problem{Kind: BadInput, Code: "missing", Field: "target-ph"}
	}
	target := c.Target
	c.Target, c.Additions = Target{}, nil
	c.Sources = append([]Source(nil), c.Sources...)
	miss := func(share float64) (float64, float64, error) {
		c.Sources[0].Flow, c.Sources[1].Flow = Some(share), Some(1-share)
		r, err := Solve(c)
		if err != nil {
			return 0, 0, err
		}
		f, ok := figureOf(&r.Raw().Figures, target.Kind)
		if !ok {
			return 0, 0, &Problem{Kind: BadInput, Code: "calcium_needed", Field: "calcium", Target: target}
		}
		return f - target.Value, f, nil
	}
	// The figure of a blend need not be monotone in the share: step along it.
	const steps = 50
	best, bestShare := 0.0, -1.0
	last := 0.0
	for i := range steps + 1 {
		share := float64(i) / steps
		d, f, err := miss(share)
		if err != nil {
			return 0, err
		}
		if d == 0 {
			return share, nil
		}
		if i > 0 && d*last < 0 {
			lo, hi, atLo := share-1.0/steps, share, last
			for range 60 {
				mid := (lo + hi) / 2
				d, _, err := miss(mid)
				if err != nil {
					return 0, err
				}
				if d*atLo > 0 {
					lo = mid
				} else {
					hi = mid
				}
			}
			return (lo + hi) / 2, nil
		}
		if bestShare < 0 || math.Abs(d) < math.Abs(best-target.Value) {
			best, bestShare = f, share
		}
		last = d
	}
	return 0, &Problem{Kind: NoAnswer, Code: "out_of_reach", Field: target.Kind.Field(), Target: target, Nearest: Some(best)}
}

// figureOf is a target's figure of a shown water.
func figureOf(f *Figures, kind TargetKind) (float64, bool) {
	switch kind {
	case TargetPH:
		return f.PH, true
	case TargetAlkalinity:
		return f.Alkalinity, true
	case TargetSaturationIndex:
		return f.SaturationIndex.Value, f.SaturationIndex.Given
	case TargetCCPP:
		return f.CCPP.Value, f.CCPP.Given
	case TargetDIC:
		return f.DIC, true
	}
	return 0, false
}
