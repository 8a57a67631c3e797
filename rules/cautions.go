package rules

import (
	"kilovet/hv/chain"
	"kilovet/rules/rule"
)

// cautions are the usual warnings, in plain words, as far as they concern the chain.
func cautions(c *chain.Chain) []rule.Caution {
	all := []rule.Caution{
		{Subject: "people", Text: "Two people, one of them outside the reach of the voltage and able to switch off. Nobody with a pacemaker near it."},
		{Subject: "stored charge", Text: "Capacitors and cables stay charged when all is switched off, and charge themselves again after a discharge. Wait the computed time, discharge every node with the resistor rod, then short and earth it, and leave the earth on."},
		{Subject: "meters", Text: "Never trust a meter alone: prove it before and after, and earth what it calls dead."},
		{Subject: "interlocks", Text: "An interlock is the last line, not the switch. Test each one before every run."},
		{Subject: "ozone", Text: "A discharge in air makes ozone and nitrogen oxides. A smell or a hiss means corona: switch off and find it."},
	}
	if c.Gun != nil || len(c.Targets) > 0 || c.Vacuum != nil {
		all = append(all,
			rule.Caution{Subject: "x-rays", Text: "Above 5 kV anything that electrons strike in vacuum may give X-rays. A survey with a meter that answers down to 10 keV, at the highest voltage and current, replaces every estimate."},
			rule.Caution{Subject: "vacuum", Text: "No high voltage while the vessel pumps through the glow range, and none with helium for leak testing. Glass under vacuum can implode: guard it."})
	}
	if c.Heater != nil {
		all = append(all, rule.Caution{Subject: "heater", Text: "The heater supply floats at the full voltage: knobs, leads and batteries of it are live. Do not vent over a hot filament."})
	}
	return append(append(all, media(c)...), otherMedium(c)...)
}

// media are the warnings about what insulates the parts.
func media(c *chain.Chain) []rule.Caution {
	used := map[string]bool{}
	if c.Multiplier != nil {
		used[c.Multiplier.Medium.V] = true
	}
	for _, s := range c.Spacings {
		used[s.Medium.V] = true
		used[s.Gas.V] = true
	}
	var all []rule.Caution
	if used["oil"] {
		all = append(all, rule.Caution{Subject: "oil", Text: "Oil burns and spreads; air bubbles and water ruin it after every refill. Let it rest before switching on."})
	}
	if used["sulphur hexafluoride"] {
		all = append(all, rule.Caution{Subject: "sulphur hexafluoride", Text: "The gas suffocates in low places, leaves poisonous products after arcs, and harms the climate: recover it."})
	}
	if used["gas"] {
		all = append(all, rule.Caution{Subject: "pressure", Text: "A vessel under pressure needs a relief device and is never opened before it is vented."})
	}
	return all
}
