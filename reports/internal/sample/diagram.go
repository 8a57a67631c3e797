package sample

import (
	"fmt"

	"kilovet/rules/diagram"
	"kilovet/rules/rule"
)

// Diagram is a ladder of so many stages with a flag on its output.
func Diagram(stages int) *diagram.Diagram {
	part := func(kind diagram.Kind, name, from, to string) diagram.Part {
		return diagram.Part{Name: name, Kind: kind, Value: "2.2 nF", From: from, To: to}
	}
	c := diagram.Column{Source: part(diagram.Alternating, "drive.source", "drive.source", "foot"), Drive: diagram.Node{Name: "drive", Potential: "1 kV"}}
	l := diagram.Ladder{Foot: diagram.Node{Name: "foot"}}
	below, under := "foot", "drive"
	for k := range stages {
		own, stage := fmt.Sprintf("coupling.%d", k+1), fmt.Sprintf("stage.%d", k+1)
		c.Coupling = append(c.Coupling, part(diagram.Capacitor, fmt.Sprintf("multiplier.coupling_capacitor.%d", k+1), own, under))
		c.Nodes = append(c.Nodes, diagram.Node{Name: own, Potential: fmt.Sprintf("-%d kV", 2*k+1)})
		c.Lower = append(c.Lower, part(diagram.Diode, fmt.Sprintf("multiplier.diode.%d", 2*k+1), own, below))
		c.Upper = append(c.Upper, part(diagram.Diode, fmt.Sprintf("multiplier.diode.%d", 2*k+2), stage, own))
		l.Smoothing = append(l.Smoothing, part(diagram.Capacitor, fmt.Sprintf("multiplier.smoothing_capacitor.%d", k+1), stage, below))
		l.Stages = append(l.Stages, diagram.Node{Name: stage, Potential: fmt.Sprintf("-%d kV", 2*k+2)})
		below, under = stage, own
	}
	l.Columns = []diagram.Column{c}
	cable := part(diagram.Cable, "cable", "multiplier", "output")
	return &diagram.Diagram{
		Ladder: l,
		Rail:   []diagram.Span{{Node: diagram.Node{Name: "multiplier", Potential: "-120 kV"}}, {Series: &cable, Node: diagram.Node{Name: "output", Potential: "-120 kV", Mark: 1}}},
		Marks:  []diagram.Mark{{Number: 1, Verdict: rule.Fails, Subject: LongName, Rules: []string{LongName + ".0", LongName + ".1", "rating.cable"}}},
	}
}
