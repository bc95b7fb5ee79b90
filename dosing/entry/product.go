package entry

import (
	"errors"
	"strings"

	"beckline/dosing"
	"beckline/dosing/reading"
)

// ProductNamed finds a product of the catalogue. Capitals do not count, and a
// space or an underscore stands for a hyphen. The error is a *dosing.Problem of
// field "product" that offers the nearest names.
func ProductNamed(name string) (dosing.Product, error) {
	p, problem := productNamed(name)
	if problem != nil {
		return dosing.Product{}, problem
	}
	return p, nil
}

func productNamed(name string) (dosing.Product, *dosing.Problem) {
	if strings.TrimSpace(name) == "" {
		return dosing.Product{}, badInput("missing", "product", "", "a product by name, such as caustic-25")
	}
	if p, ok := dosing.ProductByName(hyphened(name)); ok {
		return p, nil
	}
	near := orList(nearestProducts(name))
	if near == "" {
		near = "a product of the catalogue, such as caustic-25 or sulfuric-93"
	}
	return dosing.Product{}, badInput("unknown_product", "product", name, near)
}

var hyphens = strings.NewReplacer(" ", "-", "_", "-", "\u00a0", "-", "\u2010", "-", "\u2011", "-")

// hyphened brings a typed name to the catalogue's spelling.
func hyphened(name string) string {
	return hyphens.Replace(strings.ToLower(strings.TrimSpace(name)))
}

// solved reads the addition whose dose is asked for: product, strength, product
// temperature, pump. It is nil where there is no such product.
func (w *filling) solved() *dosing.Addition {
	product, problem := productNamed(w.form.Product)
	if problem != nil {
		w.problems = append(w.problems, problem)
	}
	a := &dosing.Addition{Product: product, Solve: true}
	for _, field := range fields {
		if field.Group != reading.Setting {
			continue
		}
		v, ok := w.parse(field)
		if !ok {
			continue
		}
		switch field.Name {
		case "strength":
			if problem == nil {
				w.strength(a, v)
			}
		case "product-temperature":
			a.Feed.ProductKelvin = dosing.Some(v.SI)
		case "pump":
			a.Feed.PumpCapacity = dosing.Some(v.SI)
		}
	}
	if problem != nil {
		return nil
	}
	return a
}

// strength sets another strength than the catalogue's.
func (w *filling) strength(a *dosing.Addition, v reading.Value) {
	p := a.Product
	trade := p.Stated == dosing.AsTradePercent
	switch {
	case trade && v.Unit == reading.PercentByWeight:
		w.problem("strength_terms", "strength", v.Given,
			p.Name+" is stated in % trade (grams of chlorine in 100 mL) or g/L as Cl2")
		return
	case !trade && (v.Unit == reading.PercentTrade || v.Unit == reading.GramsChlorine):
		w.problem("strength_terms", "strength", v.Given, p.Name+" is stated in % by weight")
		return
	}
	stronger, err := p.AtStrength(v.SI)
	if err != nil {
		w.problem("bad_strength", "strength", v.Given, acceptedBy(err))
		return
	}
	a.Product = stronger
}

// acceptedBy is what a refusal of the catalogue would accept.
func acceptedBy(err error) string {
	var p *dosing.Problem
	if errors.As(err, &p) {
		return p.Accepted
	}
	return err.Error()
}
