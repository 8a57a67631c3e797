package rules

import (
	"kilovet/hv/chain"
	"kilovet/hv/quantity"
	"kilovet/rules/rule"
)

// cautions are the usual warnings, in plain words, as far as they concern the chain.
func cautions(c *chain.Chain) []rule.Caution {
	all := []rule.Caution{{Subject: "people", Text: "Two people, one of them outside the reach of the voltage and able to switch off. Nobody with a pacemaker near it. After a shock through the chest see a doctor, however well you feel."}}
	if c.Multiplier != nil {
		all = append(all, ofSupply...)
	}
	in := surroundings(c)
	for _, w := range warnings {
		if w.holds(c, in) {
			all = append(all, w.caution)
		}
	}
	return append(all, otherMedium(c)...)
}

// ofSupply are the warnings about whatever makes and holds high voltage.
var ofSupply = []rule.Caution{
	{Subject: "stored charge", Text: "Capacitors and cables stay charged when all is switched off, and charge themselves again after a discharge. Wait the computed time, discharge every node with the resistor rod, then short and earth it, and leave the earth on."},
	{Subject: "earthing rod", Text: "Look at the rod, its resistor and its lead before each use. Clip its lead to earth first, hold it by the handle only, and take it away last."},
	{Subject: "meters", Text: "Never trust a meter alone: prove it before and after, and earth what it calls dead."},
	{Subject: "interlocks", Text: "An interlock is the last line, not the switch. Test each one before every run."},
}

// warning is a caution and when it concerns a chain.
type warning struct {
	holds   func(*chain.Chain, map[string]bool) bool
	caution rule.Caution
}

var warnings = []warning{
	{func(c *chain.Chain, in map[string]bool) bool { return c.Multiplier != nil || in["air"] },
		rule.Caution{Subject: "ozone", Text: "A discharge in air makes ozone and nitrogen oxides. A smell or a hiss means corona: switch off and find it."}},
	{func(c *chain.Chain, in map[string]bool) bool { return evacuated(c, in) || len(c.Targets) > 0 },
		rule.Caution{Subject: "x-rays", Text: "Above 5 kV anything that electrons strike in vacuum may give X-rays. A survey with a meter that answers down to 10 keV, at the highest voltage and current, replaces every estimate."}},
	{evacuated,
		rule.Caution{Subject: "vacuum", Text: "No high voltage while the vessel pumps through the glow range, and none with helium for leak testing. Glass under vacuum can implode: guard it."}},
	{func(c *chain.Chain, _ map[string]bool) bool { return c.Heater != nil },
		rule.Caution{Subject: "heater", Text: "The heater supply floats at the full voltage: knobs, leads and batteries of it are live."}},
	{func(c *chain.Chain, _ map[string]bool) bool { return c.Heater != nil || c.Gun != nil },
		rule.Caution{Subject: "filament", Text: "Do not vent over a hot filament: let it cool first. It glows, and sends electrons, as long as the heater is on."}},
	{func(c *chain.Chain, _ map[string]bool) bool {
		return c.Divider != nil && c.Divider.Upper != nil && c.Divider.Upper.Total() > leaky
	},
		rule.Caution{Subject: "divider", Text: "Beside a divider of more than 10 GΩ what leaks over its surface, its board and its lead counts too, and dirt and damp change it: it reads wrong without anything having failed. Keep it clean and dry or cast in, guard its low end, and prove it against another meter."}},
	{func(_ *chain.Chain, in map[string]bool) bool { return in["oil"] },
		rule.Caution{Subject: "oil", Text: "Oil burns and spreads; air bubbles and water ruin it after every refill. Let it rest before switching on."}},
	{func(_ *chain.Chain, in map[string]bool) bool { return in["sulphur hexafluoride"] },
		rule.Caution{Subject: "sulphur hexafluoride", Text: "The gas suffocates in low places, leaves poisonous products after arcs, and harms the climate: recover it."}},
	{func(_ *chain.Chain, in map[string]bool) bool { return in["gas"] },
		rule.Caution{Subject: "pressure", Text: "A vessel under pressure needs a relief device and is never opened before it is vented."}},
	{func(_ *chain.Chain, in map[string]bool) bool { return in["beryllium"] },
		rule.Caution{Subject: "beryllium", Text: "Dust of a beryllium window is poisonous: never scratch, sand or sweep it."}},
}

// leaky is the divider beside which leakage over surfaces counts: common practice, no
// source.
const leaky quantity.Resistance = 10e9

// evacuated reports whether something of the chain stands in vacuum.
func evacuated(c *chain.Chain, in map[string]bool) bool {
	return c.Gun != nil || c.Vacuum != nil || len(c.Feedthroughs) > 0 || in["vacuum"]
}

// surroundings are the media, gases and window materials of a chain.
func surroundings(c *chain.Chain) map[string]bool {
	in := map[string]bool{}
	if c.Multiplier != nil {
		in[c.Multiplier.Medium.V] = true
	}
	for _, s := range c.Spacings {
		in[s.Medium.V], in[s.Gas.V] = true, true
		in["air"] = in["air"] || s.Medium.V == "printed board"
	}
	for _, f := range c.Fields {
		in[f.Medium.V] = true
	}
	in["air"] = in["air"] || len(c.Feedthroughs) > 0
	for _, s := range c.Shields {
		for _, l := range s.Layers {
			in[l.Material.V] = true
		}
	}
	return in
}
