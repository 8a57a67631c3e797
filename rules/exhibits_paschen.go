package rules

import (
	"cmp"
	"fmt"
	"slices"

	"kilovet/hv/quantity"
	"kilovet/insulation/vacuum"
	"kilovet/rules/evidence"
	"kilovet/rules/exhibit"
)

// paschen shows the breakdown of the vessel's gas over pressure times path, with the
// longest path at its permit and the gaps in gas where they lie on it.
func paschen(e *evidence.Evidence) []exhibit.Curve {
	p, err := e.Paschen()
	if err != nil {
		return nil
	}
	c := exhibit.Curve{
		ID: "vacuum.paschen", Chapter: exhibit.Spacings, Title: "Breakdown between plates over pressure times path", Basis: "insulation.gas",
		X:    exhibit.Axis{What: "pressure times path", Unit: "Pa m", Log: true},
		Y:    exhibit.Axis{What: "breakdown voltage", Unit: "V", Log: true},
		Note: "Left of the lowest voltage the branch is steep and uncertain: from 0.001 Torr cm on no voltage above it is trusted. The longest path breaks down first.",
		Levels: []exhibit.Level{
			{Name: "electrons cross freely, 0.001 Torr cm", Value: float64(vacuum.Free), Along: true},
			{Name: "no high voltage, 0.01 Torr cm", Value: float64(vacuum.Crowded), Along: true},
			{Name: "lowest breakdown voltage of " + string(p.Gas), Value: float64(p.Lowest.Voltage)},
		},
	}
	line := exhibit.Line{Name: string(p.Gas)}
	for _, q := range p.Law {
		line.Points = append(line.Points, exhibit.Point{X: float64(q.Product), Y: float64(q.Voltage)})
	}
	taken := exhibit.Line{Name: "taken left of the lowest", Points: []exhibit.Point{
		{X: float64(vacuum.Free), Y: float64(p.Lowest.Voltage)}, {X: float64(p.Lowest.Product), Y: float64(p.Lowest.Voltage)}}}
	c.Lines = []exhibit.Line{line, taken}
	shown := nearestPaths(p.Paths)
	if rest := len(p.Paths) - len(shown); rest > 0 {
		c.Note += fmt.Sprintf(" Of the paths the %d nearest to the curve are marked, %d more are not.", len(shown), rest)
	}
	for _, m := range shown {
		c.Marks = append(c.Marks, exhibit.Mark{Name: m.Name, Point: exhibit.Point{X: float64(m.Product), Y: float64(m.Voltage)}})
	}
	return []exhibit.Curve{c}
}

// mostPaths is how many paths a curve can name before nothing of it can be read.
const mostPaths = 12

// nearestPaths are those nearest to the curve, or above it, in the order of the chain.
func nearestPaths(all []evidence.PaschenPoint) []evidence.PaschenPoint {
	if len(all) <= mostPaths {
		return all
	}
	ranked := slices.Clone(all)
	slices.SortStableFunc(ranked, func(a, b evidence.PaschenPoint) int { return cmp.Compare(b.Share, a.Share) })
	least := ranked[mostPaths-1].Share
	var near []evidence.PaschenPoint
	for _, q := range all {
		if q.Share >= least && len(near) < mostPaths {
			near = append(near, q)
		}
	}
	return near
}

// pumpDown shows the pressures that matter while the vessel is pumped, in its gas and in
// helium, which leak testing brings.
func pumpDown(e *evidence.Evidence) []exhibit.Table {
	rows, err := e.PumpDown()
	if err != nil {
		return nil
	}
	t := exhibit.Table{
		ID: "vacuum.pump_down", Chapter: exhibit.Spacings, Title: "Pressures while the vessel is pumped", Basis: "insulation.vacuum",
		Columns: []exhibit.Column{{Head: "gas"}, {Head: "free of discharge up to", Unit: "Pa"}, {Head: "no high voltage above", Unit: "Pa"},
			{Head: "weakest at", Unit: "Pa"}, {Head: "may break down from", Unit: "Pa"}, {Head: "to", Unit: "Pa"}},
		Note: "Readings of the gauge, over the longest path, at the highest voltage. " + pumpDownWords(),
	}
	for _, r := range rows {
		t.Rows = append(t.Rows, []exhibit.Cell{exhibit.Words(string(r.Gas)), exhibit.Number(r.Permit.Free.Value), exhibit.Number(r.Permit.Crowded.Value),
			exhibit.OrWords(r.Worst.Get()), bandEnd(r.Band.From, r.BandLack), bandEnd(r.Band.To, r.BandLack)})
	}
	return []exhibit.Table{t}
}

func bandEnd(p quantity.Pressure, err error) exhibit.Cell {
	switch {
	case err != nil:
		return exhibit.Words("not known")
	case p == 0:
		return exhibit.Words("at none")
	}
	return exhibit.Number(p)
}

// pumpDownWords are the warnings that a pressure alone does not show.
func pumpDownWords() string {
	text := ""
	for _, c := range vacuum.PumpDownCautions() {
		switch c.Subject {
		case "helium", "leak", "trapped gas", "ion gauge":
			text += c.Text + " "
		}
	}
	return text[:len(text)-1]
}
