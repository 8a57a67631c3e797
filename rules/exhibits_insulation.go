package rules

import (
	"kilovet/hv/chain"
	"kilovet/hv/quantity"
	"kilovet/insulation/gap"
	"kilovet/rules/evidence"
	"kilovet/rules/exhibit"
)

const insulationBasis = "insulation"

// twoWays shows every spacing by the tables of the standards and by physics.
func twoWays(e *evidence.Evidence) []exhibit.Table {
	t := exhibit.Table{
		ID: "spacing.two_ways", Chapter: exhibit.Spacings, Title: "Spacings by the tables and by physics", Basis: insulationBasis,
		Columns: []exhibit.Column{
			{Head: "spacing"}, {Head: "peak", Unit: "V"},
			{Head: "clearance", Unit: "m"}, {Head: "needed", Unit: "m"}, {Head: "by"},
			{Head: "creepage", Unit: "m"}, {Head: "needed", Unit: "m"}, {Head: "by"},
			{Head: "discharge from", Unit: "V"}, {Head: "breaks down at", Unit: "V"}, {Head: "by"},
		},
		Note: "What the tables ask for and what a gap will stand are two questions; both are judged. Onset and breakdown are two answers: a discharge that starts need not cross.",
	}
	for _, s := range e.Spacings() {
		if x, err := e.Spacing(s); err == nil {
			t.Rows = append(t.Rows, twoWaysRow(s, x))
		}
	}
	if len(t.Rows) == 0 {
		return nil
	}
	return []exhibit.Table{t}
}

func twoWaysRow(s *chain.Spacing, x evidence.Spacing) []exhibit.Cell {
	a := x.Assessment
	return []exhibit.Cell{
		exhibit.Words(s.Name.V), exhibit.Number(x.Voltages.Peak),
		provided(s.Clearance.V), valueOf(a.ClearanceNeeded, s.Clearance.Set()), by(a.ClearanceNeeded, s.Clearance.Set()),
		provided(s.Creepage.V), valueOf(a.CreepageNeeded, s.Creepage.Set()), by(a.CreepageNeeded, s.Creepage.Set()),
		valueOf(a.Onset, true), valueOf(a.Breakdown, true), by(a.Breakdown, true),
	}
}

func provided(l quantity.Length) exhibit.Cell {
	if l <= 0 {
		return exhibit.Words("")
	}
	return exhibit.Number(l)
}

// valueOf is the number of an answer; nothing where it is not asked for or not known.
func valueOf[Q quantity.Number](r gap.Result[Q], asked bool) exhibit.Cell {
	if r.Lack != nil || !asked {
		return exhibit.Words("")
	}
	return exhibit.Number(r.Value)
}

// by is the source that governs an answer, or why there is none.
func by[Q quantity.Number](r gap.Result[Q], asked bool) exhibit.Cell {
	switch {
	case !asked:
		return exhibit.Words("")
	case r.Lack != nil:
		return exhibit.Words("not known: " + r.Lack.Error())
	case len(r.Sources) == 0:
		return exhibit.Words("")
	}
	return exhibit.Words(r.Sources[0].Text)
}

// layersTable shows how the voltage divides in feedthroughs with an annulus.
func layersTable(e *evidence.Evidence) []exhibit.Table {
	t := exhibit.Table{
		ID: "feedthrough.annuli", Chapter: exhibit.Spacings, Title: "Annuli beside the sleeves of feedthroughs", Basis: "insulation.solid",
		Columns: []exhibit.Column{{Head: "annulus"}, {Head: "filled with"}, {Head: "width", Unit: "m"}, {Head: "share just after switching", Unit: "1"},
			{Head: "share once DC has settled", Unit: "1"}, {Head: "time constant", Unit: "s"}, {Head: "starts at", Unit: "V"}},
		Note: "An annulus takes more than its part of the distance: its permittivity is 1, and no sleeve insulates as dry gas or vacuum does.",
	}
	for i := range e.Chain().Feedthroughs {
		for _, a := range e.Annuli(&e.Chain().Feedthroughs[i]) {
			t.Rows = append(t.Rows, []exhibit.Cell{
				exhibit.Words(a.Name), exhibit.Words(string(a.Medium)), exhibit.Number(a.Gap.Clearance), share(a.Switched),
				share(a.Settled), valueOf(a.Settling, true), valueOf(a.Starts, true),
			})
		}
	}
	if len(t.Rows) == 0 {
		return nil
	}
	return []exhibit.Table{t}
}

func share(f quantity.Fraction) exhibit.Cell {
	if f <= 0 {
		return exhibit.Words("not known")
	}
	return exhibit.Number(f)
}

// sphereGaps shows at which distance measuring spheres spark at the highest voltage.
func sphereGaps(e *evidence.Evidence) []exhibit.Table {
	gaps, v := e.SphereGaps()
	if len(gaps) == 0 {
		return nil
	}
	t := exhibit.Table{
		ID: "spacing.sphere_gap", Chapter: exhibit.Spacings, Title: "Spark of two spheres at " + quantity.Text(v), Basis: "insulation.gas",
		Columns: []exhibit.Column{{Head: "diameter", Unit: "m"}, {Head: "distance", Unit: "m"}, {Head: "source"}},
		Note:    "One sphere earthed, clean, in the air of the site, within 3 % up to half the diameter: a reference on the bench, no protection.",
	}
	for _, g := range gaps {
		t.Rows = append(t.Rows, []exhibit.Cell{exhibit.Number(g.Diameter), exhibit.Number(g.Distance), exhibit.Words(g.Source.Text + " (" + string(g.Source.Mark) + ")")})
	}
	return []exhibit.Table{t}
}
