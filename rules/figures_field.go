package rules

import (
	"math"
	"slices"

	"kilovet/hv/profile"
	"kilovet/hv/quantity"
	"kilovet/insulation/field"
	"kilovet/rules/build"
	"kilovet/rules/evidence"
)

const (
	fieldBasis = "insulation.field"
	lineBasis  = "insulation.field, insulation"
)

// computedFields lists what the computed fields of arrangements are.
func computedFields(c *collector, e *evidence.Evidence) {
	for _, f := range e.Arrangements() {
		s, err := e.FieldOf(f)
		if err != nil {
			continue
		}
		for _, name := range s.Electrodes() {
			fieldPeak(c, e, f, name)
			criticalLine(c, e, f, s, name)
		}
		capacitances(c, f, s)
		energy, err := e.FieldEnergy(f)
		add(c, "field.energy", f.Name.V, fieldBasis, energy, err)
		exponents(c, f, s)
		edges(c, e, f, s)
		solids(c, e, f)
		probes(c, e, f)
	}
}

func fieldPeak(c *collector, e *evidence.Evidence, f *build.Arrangement, electrode string) {
	on := evidence.Where{Electrode: electrode}
	p, err := e.FieldPeak(f, on)
	subject := f.Name.V + "/" + electrode
	add(c, "field.peak", subject, fieldBasis, p.Strength, err)
	add(c, "field.peak_error", subject, fieldBasis, p.Error, err)
	add(c, "field.peak_r", subject, fieldBasis, p.At.R, err)
	add(c, "field.peak_z", subject, fieldBasis, p.At.Z, err)
	settled, err := e.SettledPeak(f, on)
	add(c, "field.peak_settled", subject, fieldBasis, settled.Strength, err)
	time, err := e.SettlingTime(f, on)
	add(c, "field.settling_time", subject, fieldBasis, time, err)
}

// criticalLine is what stands along the critical line of an electrode in the medium.
func criticalLine(c *collector, e *evidence.Evidence, f *build.Arrangement, s *field.Solution, electrode string) {
	if !slices.Contains(s.Facing(electrode), field.Medium) {
		return
	}
	line, err := e.Critical(f, e.ClearOfEdges(f, evidence.Where{Electrode: electrode, Body: field.Medium}))
	if err != nil {
		return
	}
	subject := f.Name.V + "/" + electrode
	if line.HasIntegral {
		add(c, "field.streamer", subject, lineBasis, line.Streamer, nil)
	}
	onset, err := line.Strength.Onset.Get()
	add(c, "field.onset", subject, lineBasis, onset, err)
	if line.Traced.Closed {
		return // an insulator stands in the way
	}
	positive, err := line.Positive.Get()
	add(c, "field.breakdown_positive", subject, lineBasis, positive, err)
	negative, err := line.Negative.Get()
	add(c, "field.breakdown_negative", subject, lineBasis, negative, err)
}

// edges are the fields at the distance at which sharp edges and junctions are judged.
func edges(c *collector, e *evidence.Evidence, f *build.Arrangement, s *field.Solution) {
	for _, x := range s.Edges() {
		at, err := e.AtEdge(f, x, evidence.EdgeDistance)
		add(c, "field.edge", f.Name.V+"/"+evidence.EdgeName(x), fieldBasis, at.Strength, err)
	}
}

func solids(c *collector, e *evidence.Evidence, f *build.Arrangement) {
	for _, d := range f.Dielectrics {
		p, err := e.FieldPeak(f, evidence.Where{Body: d.Name.V})
		if !d.Fill.Set() {
			add(c, "field.solid", f.Name.V+"/"+d.Name.V, fieldBasis, p.Strength, err)
		}
	}
}

// capacitances are the Maxwell coefficients of every pair of electrodes.
func capacitances(c *collector, f *build.Arrangement, s *field.Solution) {
	for _, a := range s.Electrodes() {
		for _, b := range s.Electrodes() {
			v, err := s.Capacitance(a, b)
			add(c, "field.capacitance", f.Name.V+"/"+a+"/"+b, fieldBasis, v, err)
		}
	}
}

// exponents are the lowest on each electrode that has an edge or a junction.
func exponents(c *collector, f *build.Arrangement, s *field.Solution) {
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
func probes(c *collector, e *evidence.Evidence, f *build.Arrangement) {
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
