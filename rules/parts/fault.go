package parts

import (
	"slices"

	"kilovet/hv/quantity"
	"kilovet/rules/evidence"
	"kilovet/rules/limits"
	"kilovet/rules/rule"
)

// InFault gives what the rules of lasting stress say with a fault: a finding for each
// described part, against its whole rating. Arcs are judged apart.
func InFault(e *evidence.Evidence) []rule.Finding {
	all := Lasting(e)
	for _, r := range []rule.Rule{diodeCurrent, resistorPower} {
		all = append(all, r.Judge(e).Findings...)
	}
	if d := e.Chain().Divider; d != nil && d.Meter != nil {
		all = append(all, meter(e))
	}
	return slices.DeleteFunc(all, func(f rule.Finding) bool { return f.Verdict == "" })
}

// Lasting gives what the rules about lasting voltages say of every described part.
func Lasting(e *evidence.Evidence) []rule.Finding {
	var all []rule.Finding
	for _, r := range []rule.Rule{capacitorVoltage, diodeReverse, resistorVoltage, cableVoltage, feedVoltage} {
		all = append(all, r.Judge(e).Findings...)
	}
	return all
}

// meter is the meter against its rating with a fault.
func meter(e *evidence.Evidence) rule.Finding {
	rated := e.Chain().Divider.Meter.RatedVoltage
	f := rule.Finding{Rule: "divider.meter_voltage", Subject: "divider.meter", Concern: rule.Equipment, Place: rated.Place}
	r := rating[quantity.Voltage]{what: "voltage", rated: rated.V, given: rated.Set(), key: rated.Key,
		derating: limits.InsulationVoltage, conditions: e.Ratings(), stress: (*evidence.Evidence).ElementPeak}
	return r.judge(e, group{subject: "divider.meter", elements: one("divider.meter")}, f)
}

// left are the elements of a group that a fault has left.
func (g group) left(e *evidence.Evidence) []string {
	failed := e.Condition().Fault
	return slices.DeleteFunc(g.names(), func(n string) bool { return failed.Gone && n == failed.Part })
}
