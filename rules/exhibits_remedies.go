package rules

import (
	"fmt"

	"kilovet/hv/quantity"
	"kilovet/rules/evidence"
	"kilovet/rules/exhibit"
)

// remedies says which value of which part would just meet the blur allowance, and what else
// it would do.
func remedies(e *evidence.Evidence) []exhibit.Table {
	b := e.Chain().Beam
	if b == nil || !b.BlurAllowance.Set() || e.Spotless() != nil {
		return nil
	}
	t := exhibit.Table{
		ID: "beam.remedies", Chapter: exhibit.Beam, Title: "What would reach the allowance", Basis: evidence.Basis,
		Columns: []exhibit.Column{{Head: "part"}, {Head: "is"}, {Head: "would be"}, {Head: "disturbance", Unit: "V"}, {Head: "spot", Unit: "m"},
			{Head: "drop to the output", Unit: "V"}, {Head: "drive needed", Unit: "V"}, {Head: "energy stored", Unit: "J"}, {Head: "power taken", Unit: "W"}},
	}
	all, err := e.Remedies()
	if err != nil {
		t.Columns = []exhibit.Column{{Head: "not known, because"}}
		t.Rows = [][]exhibit.Cell{{exhibit.Words(err.Error())}}
		return []exhibit.Table{t}
	}
	for _, r := range all {
		t.Rows = append(t.Rows, remedyRow(r))
	}
	t.Note = remedyNote(e, all)
	return []exhibit.Table{t}
}

func remedyRow(r evidence.Remedy) []exhibit.Cell {
	is := quantity.DimensionOf(r.Unit).Text(r.Now)
	row := []exhibit.Cell{exhibit.Words(r.Part), exhibit.Words(is)}
	if r.Unknown != nil {
		none := exhibit.Words("")
		return append(row, exhibit.Words("not known: "+r.Unknown.Error()), none, none, none, none, none, none)
	}
	return append(row, exhibit.Words(wouldBe(r)), exhibit.Number(r.Disturbance), exhibit.Number(r.Spot), exhibit.Number(r.Drop),
		exhibit.Number(r.DriveNeeded), exhibit.Number(r.Stored), exhibit.Number(r.Input))
}

func wouldBe(r evidence.Remedy) string {
	if !r.Held {
		return reach(r) + ", but the drive does not hold the voltage then"
	}
	return reach(r)
}

func reach(r evidence.Remedy) string {
	value := quantity.DimensionOf(r.Unit).Text(r.Becomes)
	switch {
	case r.Reached:
		return value
	case r.Relaxed:
		return "even " + value + " still meets it"
	}
	return "not even " + value + " reaches it"
}

func remedyNote(e *evidence.Evidence, all []evidence.Remedy) string {
	a, err := e.Allowed()
	if err != nil {
		return ""
	}
	note := fmt.Sprintf("Allowed: %s at the cathode, which goes with %s at the output and %s at the top of the multiplier, peak to peak.", quantity.Text(a.Cathode), quantity.Text(a.Output), quantity.Text(a.Multiplier))
	if len(all) > 0 && all[0].Relaxed {
		note += fmt.Sprintf(" It is met: the disturbance could be %s times what it is, and each part, alone, could be relaxed this far.", quantity.Significant(a.Scale))
	} else {
		note += fmt.Sprintf(" The disturbance must come down to %s of what it is; each part is changed alone.", quantity.Text(quantity.Fraction(a.Scale)))
	}
	if e.Chain().Regulation != nil {
		return note + " Each line is the chain solved anew, its output held as far as the drive goes."
	}
	return note + " Each line is the chain solved anew."
}
