package rules

import (
	"fmt"

	"kilovet/hv/quantity"
	"kilovet/ripple/cascade"
	"kilovet/rules/evidence"
	"kilovet/rules/exhibit"
)

// closedForm sets the closed form beside the network, like with like, and says what
// stands between them.
func closedForm(e *evidence.Evidence) []exhibit.Table {
	if !e.HasSupply() {
		return nil
	}
	mean, err := e.MultiplierMean()
	drop, err2 := e.Drop()
	ripple, err3 := e.Swing("multiplier", "ground")
	if first(err, err2, err3) != nil {
		return nil
	}
	t := exhibit.Table{
		ID: "multiplier.closed_form", Chapter: exhibit.Multiplier, Title: "Closed form against network", Basis: "ripple.cascade and " + evidence.Basis,
		Columns: []exhibit.Column{{Head: "quantity"}, {Head: "closed form", Unit: "V"}, {Head: "network", Unit: "V"}, {Head: "network over closed form", Unit: "1"}},
		Note:    gapInWords(e, drop),
	}
	row := func(name string, closed quantity.Voltage, err error, network quantity.Voltage, err2 error) {
		ratio := exhibit.Words("")
		if first(err, err2) == nil && closed > 0 {
			ratio = exhibit.Number(network / closed)
		}
		t.Rows = append(t.Rows, []exhibit.Cell{exhibit.Words(name), exhibit.OrWords(closed, err), exhibit.OrWords(network, err2), ratio})
	}
	estimate, none := e.DropEstimate()
	noLoad, _ := e.NoLoad()
	row("mean", noLoad-estimate, none, mean, nil)
	row("drop", estimate, none, drop.Total, nil)
	row("drop, load alone", estimate, none, drop.Load, first(drop.Split, drop.Rest))
	swing, none := e.RippleEstimate()
	row("ripple, peak to peak", swing, none, ripple, nil)
	row("ripple, load alone", swing, none, drop.RippleIdeal, drop.Split)
	return []exhibit.Table{t}
}

// gapInWords explains what the closed form leaves out and what that amounts to.
func gapInWords(e *evidence.Evidence, drop evidence.Drop) string {
	text := "working state; the closed form takes a stiff source, charging in an instant and no strays"
	if c, err := e.Cascade(); err == nil {
		text += fmt.Sprintf("; here R f C is %s (stiff is up to %g)", quantity.Significant(c.Stiffness()), cascade.StiffBelow)
	}
	if d, err := e.LongestConduction(); err == nil {
		text += fmt.Sprintf(", a diode conducts for up to %s of the period", quantity.Text(d))
	}
	estimate, err := e.DropEstimate()
	if first(err, drop.Split, drop.Rest) != nil {
		return text
	}
	text += fmt.Sprintf("; of the %s between the two drops, pulses of finite length make %s, strays, junctions and leakage %s, source and diode resistance %s",
		quantity.Text(drop.Total-estimate), quantity.Text(drop.Load-estimate), quantity.Text(drop.Stray), quantity.Text(drop.Source))
	if carried := drop.RippleStiff - drop.RippleIdeal; carried > drop.RippleIdeal/20 {
		text += "; strays carry " + quantity.Text(carried) + " of the drive's swing on to the top of the smoothing column"
	}
	return text
}

// dropByCause shows why the mean lies below the voltage without load.
func dropByCause(e *evidence.Evidence) []exhibit.Table {
	if !e.HasSupply() {
		return nil
	}
	d, err := e.Drop()
	if first(err, d.Split, d.Rest) != nil {
		return nil
	}
	t := exhibit.Table{
		ID: "multiplier.drop", Chapter: exhibit.Multiplier, Title: "Why the output drops", Basis: evidence.Basis,
		Columns: []exhibit.Column{{Head: "cause"}, {Head: "drop of the mean", Unit: "V"}, {Head: "share", Unit: "1"}},
		Note:    "working state; each by solving the network again without it, a negative one raises the output",
	}
	for _, c := range []struct {
		cause string
		drop  quantity.Voltage
	}{
		{"load", d.Load}, {"strays, junction capacitance and leakage", d.Stray}, {"source and diode resistance, leakage inductance", d.Source}, {"all", d.Total},
	} {
		share := exhibit.Words("")
		if d.Total > 0 {
			share = exhibit.Number(c.drop / d.Total)
		}
		t.Rows = append(t.Rows, []exhibit.Cell{exhibit.Words(c.cause), exhibit.Number(c.drop), share})
	}
	return []exhibit.Table{t}
}
