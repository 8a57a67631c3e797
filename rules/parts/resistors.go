package parts

import (
	"fmt"

	"kilovet/hv/circuit"
	"kilovet/hv/lack"
	"kilovet/hv/quantity"
	"kilovet/rules/evidence"
	"kilovet/rules/limits"
	"kilovet/rules/rule"
)

func isResistor(el circuit.Element) bool { return isA(circuit.Resistor, el) }

var resistorVoltage = rule.Rule{
	ID: "resistor.voltage", Title: "Resistor voltage",
	Demands: "The voltage across each resistor element stays at or below 90 % of its rating.",
	Applies: "Every resistor that the description gives as a part, in every state; arcs are judged apart.",
	Margin:  "marginal above 80 % of the rating",
	Concern: rule.Equipment,
	Sources: []rule.Source{limits.ResistorVoltage.Source},
	Example: rule.Example{
		Swaps:   []rule.Swap{{Was: `rated_voltage = "5 kV", rated_power = "500 mW"`, Becomes: `rated_voltage = "2.2 kV", rated_power = "500 mW"`}},
		Changes: []rule.Change{{Rule: "resistor.voltage", Subject: "divider.upper", Verdict: rule.Fails}},
	},
	Judge: func(e *evidence.Evidence) rule.Judgement {
		return each(groups(e, isResistor), "no resistor is described", func(g group) rule.Finding {
			part := ratingsOf(g.elements[0])
			perElement := func(e *evidence.Evidence, name string) (quantity.Voltage, error) {
				v, err := e.ElementPeak(name)
				return v / quantity.Voltage(part.count), err
			}
			r := rating[quantity.Voltage]{what: "voltage of each element", rated: part.voltage.V, given: part.voltage.Set(), key: part.voltage.Key,
				derating: limits.ResistorVoltage, conditions: evidence.Ratings(), stress: perElement, tolerance: &part.tolerance}
			return r.judge(e, g, about("resistor.voltage", rule.Equipment, g, part.voltage.Place))
		})
	},
}

var resistorPower = rule.Rule{
	ID: "resistor.power", Title: "Resistor power",
	Demands: "The power in each resistor element stays at or below 70 % of its rating at the air temperature of the site.",
	Applies: "Every resistor that the description gives as a part.",
	Margin:  "marginal above 50 % of the rating",
	Concern: rule.Equipment,
	Sources: []rule.Source{limits.ResistorPower.Source},
	Example: rule.Example{
		Swaps:   []rule.Swap{{Was: `rated_voltage = "5 kV", rated_power = "500 mW"`, Becomes: `rated_voltage = "5 kV", rated_power = "20 mW"`}},
		Changes: []rule.Change{{Rule: "resistor.power", Subject: "divider.upper", Verdict: rule.Fails}},
	},
	Judge: func(e *evidence.Evidence) rule.Judgement {
		return each(groups(e, isResistor), "no resistor is described", func(g group) rule.Finding { return judgePower(e, g) })
	},
}

func judgePower(e *evidence.Evidence, g group) rule.Finding {
	part := ratingsOf(g.elements[0])
	f := about("resistor.power", rule.Equipment, g, part.power.Place)
	share, err := ambientShare(e)
	if err != nil {
		f.Relation = rule.AtMost
		return f.Lacking(err)
	}
	perElement := func(e *evidence.Evidence, name string) (quantity.Power, error) {
		p, err := e.ElementPower(name)
		return p / quantity.Power(part.count*part.strings), err
	}
	r := rating[quantity.Power]{what: "power of each element", rated: part.power.V * quantity.Power(share), given: part.power.Set(), key: part.power.Key,
		derating: limits.ResistorPower, conditions: evidence.Ratings(), stress: perElement, tolerance: &part.tolerance}
	return r.judge(e, g, f)
}

// ambientShare is the part of a resistor's power rating left at the site's air
// temperature: all of it to 70 °C, none above 155 °C (common practice, no source).
func ambientShare(e *evidence.Evidence) (float64, error) {
	site := e.Chain().Site
	if site == nil || !site.AirTemperature.Set() {
		return 0, lack.Key("site.air_temperature")
	}
	t := site.AirTemperature.V
	if quantity.AtLeast(t, limits.NoPowerAbove) {
		return 0, lack.Range("air at %s leaves a film resistor no power", quantity.Text(t))
	}
	share := float64((limits.NoPowerAbove - t) / (limits.NoPowerAbove - limits.FullPowerTo))
	return min(1, share), nil
}

var arcVoltage = rule.Rule{
	ID: "series.arc_voltage", Title: "Series resistors in an arc: voltage",
	Demands: "Each series resistor between stored charge and gun stands the full voltage of the chain as a single pulse.",
	Applies: "Filter, gun-end and bias resistors; an arc at the gun puts the full voltage across them. A clamp across the bias resistor limits it.",
	Margin:  "marginal above 80 % of the single-pulse rating",
	Concern: rule.Equipment,
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
	full := func(e *evidence.Evidence, name string) (quantity.Voltage, error) {
		v, err := e.ArcVoltage(name)
		return v / quantity.Voltage(part.count), err
	}
	r := rating[quantity.Voltage]{what: "arc voltage of each element", rated: rated.V, given: rated.Set(), key: part.pulseVoltage.Key,
		derating: limits.SinglePulse, conditions: evidence.Ratings(), stress: full}
	f = r.judge(e, g, f)
	f.Sources = append(f.Sources, limits.ArcSource)
	if !pulse && rated.Set() {
		f.Because += fmt.Sprintf(" (no %s given: the continuous rating judges)", part.pulseVoltage.Key)
	}
	return f
}

var arcEnergy = rule.Rule{
	ID: "series.arc_energy", Title: "Series resistors in an arc: energy",
	Demands: "Each series resistor between stored charge and gun takes the energy that an arc releases.",
	Applies: "Filter and gun-end resistors; each is judged as if it took all of it.",
	Margin:  "marginal above 80 % of the single-pulse rating",
	Concern: rule.Equipment,
	Sources: []rule.Source{limits.ArcSource, limits.SinglePulse.Source},
	Example: rule.Example{
		Swaps:   []rule.Swap{{Was: `rated_energy = "2.5 J"`, Becomes: `rated_energy = "0.1 J"`}},
		Changes: []rule.Change{{Rule: "series.arc_energy", Subject: "cable.gun_end_resistor", Verdict: rule.Fails}},
	},
	Judge: func(e *evidence.Evidence) rule.Judgement {
		return each(groups(e, isDamping), "no filter or gun-end resistor is described", func(g group) rule.Finding { return judgeArcEnergy(e, g) })
	},
}

// isDamping keeps the resistors that the charge of filter and cable passes in an
// arc; the bias resistor sees what its bypass holds only.
func isDamping(el circuit.Element) bool { return isSeries(el) && el.Name != "bias.resistor" }

func judgeArcEnergy(e *evidence.Evidence, g group) rule.Finding {
	part := ratingsOf(g.elements[0])
	f := about("series.arc_energy", rule.Equipment, g, part.energy.Place)
	released := func(e *evidence.Evidence, name string) (quantity.Energy, error) {
		w, err := e.ArcEnergy(name)
		return w / quantity.Energy(part.count*part.strings), err
	}
	r := rating[quantity.Energy]{what: "arc energy of each element", rated: part.energy.V, given: part.energy.Set(), key: part.energy.Key,
		derating: limits.SinglePulse, conditions: evidence.Ratings(), stress: released}
	f = r.judge(e, g, f)
	f.Sources = append(f.Sources, limits.ArcSource)
	return f
}
