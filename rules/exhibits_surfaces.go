package rules

import (
	"slices"

	"kilovet/insulation/field"
	"kilovet/rules/build"
	"kilovet/rules/evidence"
	"kilovet/rules/exhibit"
)

// surfaceCurves show the field along the free surfaces of every insulator, both sides,
// where the arrangement is weakest.
func surfaceCurves(e *evidence.Evidence) (all []exhibit.Curve) {
	for _, f := range e.Arrangements() {
		weak, err := e.Weakest(f)
		if err != nil || weak.Field == nil {
			continue
		}
		for _, d := range f.Dielectrics {
			if d.Fill.Set() {
				continue
			}
			runs, err := weak.Field.Along(d.Name.V)
			if err == nil && len(runs) > 0 {
				all = append(all, surfaceCurve(f, d.Name.V, clearOfEdges(e, f, weak.Field.Solution, runs), weak))
			}
		}
	}
	return all
}

func surfaceCurve(f *build.Arrangement, body string, runs [][]field.Surface, weak evidence.Weak) exhibit.Curve {
	c := exhibit.Curve{
		ID: "field.surface", Subject: f.Name.V + "/" + body, Chapter: exhibit.Spacings, Title: "Field along the surface of " + body, Basis: fieldBasis, Detail: true,
		X: exhibit.Axis{What: "distance along the surface", Unit: "m"}, Y: exhibit.Axis{What: "field", Unit: "V/m"},
		Note: "Pieces between corners one after the other, under " + weak.Text() + "; towards sharp edges it rises without bound, and is shown as far as it is judged.",
	}
	inside, outside, along := exhibit.Line{Name: "inside"}, exhibit.Line{Name: "outside"}, exhibit.Line{Name: "along the surface"}
	start := 0.0
	for _, run := range runs {
		last := start
		for _, p := range run {
			last = start + float64(p.Along)
			inside.Points = append(inside.Points, exhibit.Point{X: last, Y: float64(p.Inside.Strength())})
			outside.Points = append(outside.Points, exhibit.Point{X: last, Y: float64(p.Outside.Strength())})
			along.Points = append(along.Points, exhibit.Point{X: last, Y: float64(p.Tangential())})
		}
		start = last
	}
	c.Lines = []exhibit.Line{inside, outside, along}
	return c
}

// clearOfEdges leaves out what lies nearer to a sharp edge than the field is judged there.
func clearOfEdges(e *evidence.Evidence, f *build.Arrangement, s *field.Solution, runs [][]field.Surface) [][]field.Surface {
	clear := make([][]field.Surface, len(runs))
	edges := s.Edges()
	for i, run := range runs {
		for _, p := range run {
			if !slices.ContainsFunc(edges, func(x field.Edge) bool {
				judged, err := e.JudgedAt(f, x)
				return err == nil && x.Sharp && p.Inside.At.Distance(x.At) < judged
			}) {
				clear[i] = append(clear[i], p)
			}
		}
	}
	return clear
}
