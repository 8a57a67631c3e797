package digest

import "strings"

// Ref names a figure, a table or a curve that a finding rests on.
type Ref struct {
	Kind, ID, Subject string // kind is figure, table or curve
}

// rests is what the findings of a rule rest on where their subject does not tell: those
// about the whole chain, and those that a table tells best. A subject after the rule
// narrows it.
var rests = map[string][]string{
	"drive.headroom":          {"figure drive.peak_needed"},
	"multiplier.strays":       {"table multiplier.drop", "figure multiplier.drop_stray"},
	"divider.clamp":           {"figure divider.open_lower_arm", "figure divider.open_lower_arm_clamped"},
	"divider.meter_voltage":   {"figure divider.open_lower_arm_metered", "figure divider.open_lower_arm_clamped"},
	"divider.error":           {"figure divider.error"},
	"heater.hum":              {"figure cathode.hum", "figure cathode.ripple"},
	"beam.blur":               {"table beam.spot", "curve beam.angle", "figure beam.blur_total"},
	"beam.disturbance":        {"figure cathode.disturbance", "figure beam.ripple_allowed", "table beam.remedies"},
	"beam.hum":                {"table beam.paths", "figure beam.banding", "figure cathode.hum"},
	"beam.energy_width":       {"table beam.widths", "curve beam.energies", "figure beam.width_source"},
	"gun.emission_law":        {"curve gun.emission", "figure gun.emission_law", "figure gun.emission"},
	"gun.emission_limit":      {"curve gun.emission", "figure gun.richardson_limit"},
	"gun.regulation":          {"table gun.sensitivities", "figure gun.loop_gain"},
	"gun.cutoff":              {"table gun.cutoffs", "table gun.operating_point", "figure gun.cutoff"},
	"vacuum.permit":           {"curve vacuum.paschen", "table vacuum.pump_down", "figure vacuum.band_from"},
	"spacing.described":       {"table spacing.two_ways"},
	"feed.voltage":            {"figure potential cathode"},
	"feed.test_voltage":       {"figure potential cathode"},
	"gap.strikes":             {"figure bias.voltage", "figure divider.reading"},
	"touch.voltage":           {"table energy.limits", "table energy.nodes"},
	"discharge.waiting_time":  {"curve energy.decay", "table energy.nodes", "figure stored.discharge_time"},
	"discharge.one_open":      {"table energy.one_open"},
	"discharge.residue":       {"figure stored.residue"},
	"discharge.recharge":      {"table energy.recharge"},
	"bleeder.redundancy":      {"table energy.one_open"},
	"rod.there":               {"table energy.nodes"},
	"rod.voltage":             {"table energy.rod"},
	"rod.energy":              {"table energy.rod", "figure stored.energy"},
	"xray.ports":              {"table radiation.rates"},
	"xray.rate":               {"table radiation.rates"},
	"protection.over_voltage": {"figure output.mean"},
	"protection.over_current": {"figure gun.emission", "figure divider.current"},
	"fault.computed":          {"table faults.outcomes"},
	"fault.rating":            {"table faults.outcomes"},
	"fault.spacing":           {"table faults.outcomes", "table spacing.two_ways"},
	"series.arc_power":        {"table chain.arc", "table faults.outcomes"},
	"fault.touch":             {"table faults.outcomes", "table energy.limits"},
}

// Rests is what a finding of a rule about a subject rests on; empty where the subject
// tells.
func Rests(rule, subject string) []Ref {
	texts, narrowed := rests[rule+" "+subject]
	if !narrowed {
		texts = rests[rule]
	}
	var all []Ref
	for _, text := range texts {
		kind, rest, _ := strings.Cut(text, " ")
		id, subject, _ := strings.Cut(rest, " ")
		all = append(all, Ref{kind, id, subject})
	}
	return all
}
