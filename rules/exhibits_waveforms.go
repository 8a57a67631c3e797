package rules

import (
	"strings"

	"kilovet/hv/quantity"
	"kilovet/rules/evidence"
	"kilovet/rules/exhibit"
)

// waveforms shows one period of the ripple where people look for it.
func waveforms(e *evidence.Evidence) []exhibit.Curve {
	c := ripplesOf(e, []string{"multiplier", "output"}, usualPoints)
	c.ID, c.Title = "multiplier.waveform", "Ripple over one period of the drive"
	return drawn(c)
}

// Points of a line: as many as a picture shows, fewer where a long ladder has many lines.
const (
	usualPoints = 120
	allPoints   = 6000
	leastPoints = 24
)

// nodeWaveforms shows one period at every node: the columns that swing, those that hold,
// and what hangs on them.
func nodeWaveforms(e *evidence.Evidence) []exhibit.Curve {
	var swing, hold, rest []string
	for _, node := range e.Nodes() {
		switch {
		case strings.HasPrefix(node, "coupling.") || strings.HasPrefix(node, "drive"):
			swing = append(swing, node)
		case strings.HasPrefix(node, "stage."):
			hold = append(hold, node)
		default:
			rest = append(rest, node)
		}
	}
	var all []exhibit.Curve
	for _, g := range []struct {
		id, title string
		nodes     []string
	}{
		{"multiplier.swinging_waveforms", "Drive and coupling column over one period", swing},
		{"multiplier.holding_waveforms", "Smoothing column over one period", hold},
		{"chain.waveforms", "All other nodes over one period", rest},
	} {
		c := ripplesOf(e, g.nodes, perLine(len(e.Nodes())))
		c.ID, c.Title, c.Detail = g.id, g.title, true
		all = append(all, drawn(c)...)
	}
	return all
}

// perLine shares the points out among the lines.
func perLine(lines int) int {
	return min(usualPoints, max(leastPoints, allPoints/max(1, lines)))
}

// drawn is a curve that has lines, or nothing.
func drawn(c exhibit.Curve) []exhibit.Curve {
	if len(c.Lines) == 0 {
		return nil
	}
	return []exhibit.Curve{c}
}

// ripplesOf is the potential of each node less its mean.
func ripplesOf(e *evidence.Evidence, nodes []string, points int) exhibit.Curve {
	c := exhibit.Curve{
		Chapter: exhibit.Multiplier, Basis: evidence.Basis, Note: "working state; beside each line the mean it is drawn about",
		X: exhibit.Axis{What: "time", Unit: "s"}, Y: exhibit.Axis{What: "voltage less its mean", Unit: "V"},
	}
	for _, node := range nodes {
		wave, err := e.Wave(node)
		mean, err2 := e.Potential(node)
		if first(err, err2) != nil {
			continue
		}
		l := exhibit.Line{Name: node + " (" + quantity.Text(settled(mean)) + ")"}
		for _, p := range wave {
			l.Points = append(l.Points, exhibit.Point{X: float64(p.Time), Y: float64(p.Voltage - mean)})
		}
		l.Points = exhibit.Thin(l.Points, points)
		c.Lines = append(c.Lines, l)
	}
	return c
}

// settled leaves out a mean that is nothing but rounding.
func settled(mean quantity.Voltage) quantity.Voltage {
	if max(mean, -mean) < 1e-6 {
		return 0
	}
	return mean
}

// diodeWaveforms shows one period of the current of every diode.
func diodeWaveforms(e *evidence.Evidence) []exhibit.Curve {
	c := exhibit.Curve{
		ID: "multiplier.diode_currents", Title: "Diode currents over one period", Detail: true,
		Chapter: exhibit.Multiplier, Basis: evidence.Basis, Note: "working state; without the current of the junction capacitance",
		X: exhibit.Axis{What: "time", Unit: "s"}, Y: exhibit.Axis{What: "current", Unit: "A"},
	}
	names := e.Diodes()
	for _, name := range names {
		wave, err := e.Current(name)
		if err != nil {
			continue
		}
		l := exhibit.Line{Name: name}
		for _, p := range wave {
			l.Points = append(l.Points, exhibit.Point{X: float64(p.Time), Y: float64(p.Current)})
		}
		l.Points = exhibit.Thin(l.Points, perLine(len(names)))
		c.Lines = append(c.Lines, l)
	}
	return drawn(c)
}
