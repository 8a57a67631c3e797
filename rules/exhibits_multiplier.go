package rules

import (
	"kilovet/rules/evidence"
	"kilovet/rules/exhibit"
)

// waveforms shows one period of the ripple where people look for it.
func waveforms(e *evidence.Evidence) []exhibit.Curve {
	c := exhibit.Curve{
		ID: "multiplier.waveform", Chapter: exhibit.Multiplier, Title: "Ripple over one period of the drive", Basis: evidence.Basis,
		X: exhibit.Axis{What: "time", Unit: "s"}, Y: exhibit.Axis{What: "voltage less its mean", Unit: "V"},
	}
	for _, node := range []string{"multiplier", "output"} {
		wave, err := e.Wave(node)
		mean, err2 := e.Potential(node)
		if first(err, err2) != nil {
			continue
		}
		l := exhibit.Line{Name: node}
		for _, p := range wave {
			l.Points = append(l.Points, exhibit.Point{X: float64(p.Time), Y: float64(p.Voltage - mean)})
		}
		c.Lines = append(c.Lines, l)
	}
	if len(c.Lines) == 0 {
		return nil
	}
	return []exhibit.Curve{c}
}

// losses shows where the power of the drive goes.
func losses(e *evidence.Evidence) []exhibit.Table {
	lost, err := e.Losses()
	if err != nil {
		return nil
	}
	t := exhibit.Table{
		ID: "multiplier.losses", Chapter: exhibit.Multiplier, Title: "Where the power goes", Basis: evidence.Basis,
		Columns: []exhibit.Column{{Head: "part"}, {Head: "mean power", Unit: "W"}},
	}
	for _, l := range lost {
		t.Rows = append(t.Rows, []exhibit.Cell{exhibit.Words(l.Element.Name), exhibit.Number(l.Power)})
	}
	return []exhibit.Table{t}
}
