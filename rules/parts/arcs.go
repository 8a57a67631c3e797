package parts

import (
	"fmt"

	"kilovet/hv/circuit"
	"kilovet/hv/quantity"
	"kilovet/rules/evidence"
	"kilovet/rules/limits"
	"kilovet/rules/rule"
)

var arcVoltage = rule.Rule{
	ID: "series.arc_voltage", Title: "Series resistors in an arc: voltage",
	Demands: "Each series resistor between stored charge and gun stands what an arc at output or cathode puts across it, as a single pulse.",
	Applies: "Filter, gun-end and bias resistors and loose ones in the lead, regulation lost; the arc is followed in time. A clamp across the bias resistor limits it.",
	Margin:  limits.SinglePulse.Comfort("the single-pulse rating"),
	Concern: rule.Equipment,
	Fault:   true,
	Sources: []rule.Source{limits.ArcSource, limits.SinglePulse.Source},
	Example: rule.Example{
		Swaps:   []rule.Swap{{Was: `rated_pulse_voltage = "25 kV"`, Becomes: `rated_pulse_voltage = "10 kV"`}},
		Changes: []rule.Change{{Rule: "series.arc_voltage", Subject: "cable.gun_end_resistor", Verdict: rule.Fails}},
	},
	Judge: func(e *evidence.Evidence) rule.Judgement {
		return each(groups(e, isSeries), "no series resistor is described", func(g group) rule.Finding { return judgeArcVoltage(e, g) })
	},
}

func isSeries(el circuit.Element) bool { return isResistor(el) && el.Role == circuit.Series }

func judgeArcVoltage(e *evidence.Evidence, g group) rule.Finding {
	part := ratingsOf(g.elements[0])
	rated, pulse := part.pulseVoltage, true
	if !rated.Set() {
		rated, pulse = part.voltage, false
	}
	f := about("series.arc_voltage", rule.Equipment, g, rated.Place)
	across := func(e *evidence.Evidence, name string) (quantity.Voltage, error) {
		v, err := e.ArcVoltage(name)
		return v / quantity.Voltage(part.count), err
	}
	r := rating[quantity.Voltage]{what: "arc voltage of each element", rated: rated.V, given: rated.Set(), key: part.pulseVoltage.Key,
		derating: limits.SinglePulse, conditions: evidence.LostCorners(), stress: across}
	f = r.judge(e, g, f)
	f.Sources = append(f.Sources, limits.ArcSource)
	if f.Provided != nil {
		f.Because += atMost(e, g, "; the full voltage would be ", quantity.Voltage(part.count), (*evidence.Evidence).ArcFullVoltage)
	}
	if !pulse && rated.Set() {
		f.Because += fmt.Sprintf(" (no %s given: the continuous rating judges)", part.pulseVoltage.Key)
	}
	return f
}

var arcEnergy = rule.Rule{
	ID: "series.arc_energy", Title: "Series resistors in an arc: energy",
	Demands: "Each series resistor between stored charge and gun takes what an arc at output or cathode turns into heat in it.",
	Applies: "Filter and gun-end resistors, loose ones in the lead, and a bias resistor without a clamp, regulation lost: the larger of what the stored charge alone leaves in it and what an arc does with the drive on, over 20 periods. What the drive goes on feeding in while an arc stands is shown apart, as a power.",
	Margin:  limits.SinglePulse.Comfort("the single-pulse rating"),
	Concern: rule.Equipment,
	Fault:   true,
	Sources: []rule.Source{limits.ArcSource, limits.SinglePulse.Source},
	Example: rule.Example{
		Swaps:   []rule.Swap{{Was: `rated_energy = "2.5 J"`, Becomes: `rated_energy = "0.05 J"`}},
		Changes: []rule.Change{{Rule: "series.arc_energy", Subject: "cable.gun_end_resistor", Verdict: rule.Fails}},
	},
	Judge: func(e *evidence.Evidence) rule.Judgement {
		return each(groups(e, isDamping(e)), "no filter or gun-end resistor is described", func(g group) rule.Finding { return judgeArcEnergy(e, g) })
	},
}

// isDamping keeps the resistors that the stored charge passes in an arc; a clamp across
// the bias resistor takes it past it.
func isDamping(e *evidence.Evidence) func(circuit.Element) bool {
	b := e.Chain().Bias
	return func(el circuit.Element) bool {
		return isSeries(el) && (el.Name != "bias.resistor" || b.Clamp == nil)
	}
}

func judgeArcEnergy(e *evidence.Evidence, g group) rule.Finding {
	part := ratingsOf(g.elements[0])
	f := about("series.arc_energy", rule.Equipment, g, part.energy.Place)
	released := func(e *evidence.Evidence, name string) (quantity.Energy, error) {
		w, err := e.ArcEnergy(name)
		return w / quantity.Energy(part.count*part.strings), err
	}
	r := rating[quantity.Energy]{what: "arc energy of each element", rated: part.energy.V, given: part.energy.Set(), key: part.energy.Key,
		derating: limits.SinglePulse, conditions: evidence.LostCorners(), stress: released}
	f = r.judge(e, g, f)
	f.Sources = append(f.Sources, limits.ArcSource)
	if f.Provided != nil {
		f.Because += atMost(e, g, "; all that is stored would be ", quantity.Energy(part.count*part.strings), (*evidence.Evidence).ArcFullEnergy) + standing(e, g)
	}
	return f
}

// atMost says what no arc can pass, of each element, for comparison.
func atMost[Q quantity.Number](e *evidence.Evidence, g group, words string, elements Q, bound func(*evidence.Evidence, string) (Q, error)) string {
	most, err := evidence.Largest(e, evidence.LostCorners(), g.names(), bound)
	if err != nil {
		return ""
	}
	return words + quantity.Text(most.Value/elements)
}

// standing says what the drive feeds into a resistor while an arc stands.
func standing(e *evidence.Evidence, g group) string {
	p, err := e.Under(evidence.Condition{State: evidence.Lost}).StandingPower(g.elements[0].Name)
	if err != nil {
		return ""
	}
	return "; while the arc stands the drive adds " + quantity.Text(p) + " until something switches it off"
}
