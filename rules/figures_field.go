package rules

import (
	"math"
	"slices"

	"kilovet/hv/chain"
	"kilovet/hv/profile"
	"kilovet/hv/quantity"
	"kilovet/insulation/field"
	"kilovet/rules/evidence"
)

const fieldBasis = "insulation.field"

// fields lists what the computed fields of arrangements are.
func fields(c *collector, e *evidence.Evidence) {
	for i := range e.Chain().Fields {
		f := &e.Chain().Fields[i]
		s, err := e.FieldOf(f)
		if err != nil {
			continue
		}
		for _, name := range s.Electrodes() {
			fieldPeak(c, e, f, name)
		}
		capacitances(c, f, s)
		exponents(c, f, s)
		probes(c, e, f)
	}
}

func fieldPeak(c *collector, e *evidence.Evidence, f *chain.Field, electrode string) {
	p, _, err := e.FieldPeak(f, electrode)
	subject := f.Name.V + "/" + electrode
	add(c, "field.peak", subject, fieldBasis, p.Strength, err)
	add(c, "field.peak_r", subject, fieldBasis, p.At.R, err)
	add(c, "field.peak_z", subject, fieldBasis, p.At.Z, err)
}

// capacitances are the Maxwell coefficients of every pair of electrodes.
func capacitances(c *collector, f *chain.Field, s *field.Solution) {
	for _, a := range s.Electrodes() {
		for _, b := range s.Electrodes() {
			v, err := s.Capacitance(a, b)
			add(c, "field.capacitance", f.Name.V+"/"+a+"/"+b, fieldBasis, v, err)
		}
	}
}

// exponents are the lowest on each electrode that has an edge or a junction.
func exponents(c *collector, f *chain.Field, s *field.Solution) {
	for _, name := range s.Electrodes() {
		lowest := math.Inf(1)
		for _, edge := range s.Edges() {
			if slices.Contains(edge.Electrodes, name) {
				lowest = math.Min(lowest, edge.Exponent)
			}
		}
		if !math.IsInf(lowest, 1) {
			c.number("field.exponent", f.Name.V+"/"+name, fieldBasis, lowest)
		}
	}
}

// probes are the fields at stated points, the largest over the conditions of ratings; on
// a surface the larger of both sides, and each side by the body it lies in.
func probes(c *collector, e *evidence.Evidence, f *chain.Field) {
	for _, p := range f.Probes {
		most := map[string]quantity.Field{}
		var bodies []string
		for _, r := range e.FieldReadings(f, profile.Point{R: p.At.V[0], Z: p.At.V[1]}) {
			if _, known := most[r.Body]; !known {
				bodies = append(bodies, r.Body)
			}
			most[r.Body] = max(most[r.Body], r.Strength())
		}
		subject := f.Name.V + "/" + p.Name.V
		var largest quantity.Field
		for _, body := range bodies {
			largest = max(largest, most[body])
			if len(bodies) > 1 {
				add(c, "field.at", subject+"/"+body, fieldBasis, most[body], nil)
			}
		}
		if bodies != nil {
			add(c, "field.at", subject, fieldBasis, largest, nil)
		}
	}
}
