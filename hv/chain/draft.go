package chain

import (
	"io"
	"slices"
	"strings"

	"kilovet/hv/document"
)

const draftHead = `A description for kilovet: every key there is, with an example.

Replace every value by your own and delete what your chain has not got: an
absent key is reported as missing where a rule needs it, a wrong one is
believed. Take away the # before a key or header to use it, with all that your
chain has of its table. Every quantity is text with its unit; counts and pure
numbers stand without quotes.`

// Draft writes a description to start from. It reads without faults as it stands:
// a half-wave multiplier with a load and a spacing; everything else is switched off.
func Draft(w io.Writer) error {
	return document.Draft(w, &Chain{}, document.Outline{Head: draftHead, Off: draftOff, Instead: draftValue})
}

// draftOn are the tables of a draft that are switched on.
var draftOn = []string{"format", "title", "site", "drive", "multiplier", "load", "spacing"}

// draftOther are the keys that contradict others of the draft: the other choice.
var draftOther = []string{
	"drive.unbalance", "load.resistance", "bias.voltage", "bias.lowest", "bias.highest", "beam.mass_number", "beam.charge_number", "heater.ripple", "heater.ripple_frequency",
	"spacing.voltage", "field.electrodes.voltage",
	"spacing.shape.radius", "spacing.shape.tip_radius", "spacing.shape.edge_radius", "spacing.shape.earthed", "spacing.shape.body_radius", "spacing.shape.wall_radius",
	"vacuum.gauge_factor", "spacing.board", "spacing.finish", "spacing.conditioned", "spacing.stressed_area", "spacing.junction_angle", "spacing.shielded",
	"spacing.strength", "spacing.tested_thickness", "spacing.oil_test",
	"feedthrough.voltage", "feedthrough.sleeve.joint_width",
	"feedthrough.air_side.shape.radius", "feedthrough.air_side.shape.tip_radius", "feedthrough.air_side.shape.edge_radius", "feedthrough.air_side.shape.earthed", "feedthrough.air_side.shape.body_radius", "feedthrough.air_side.shape.wall_radius",
	"feedthrough.vacuum_side.shape.radius", "feedthrough.vacuum_side.shape.tip_radius", "feedthrough.vacuum_side.shape.edge_radius", "feedthrough.vacuum_side.shape.earthed", "feedthrough.vacuum_side.shape.body_radius", "feedthrough.vacuum_side.shape.wall_radius",
	"part.resistance", "part.forward_drop", "part.capacitance", "part.leakage",
}

// draftRare are keys that a first description can do without, or that would give
// credit for what is not there.
var draftRare = []string{
	"load.permanent",
	"multiplier.coupling_capacitor.value_at_voltage", "multiplier.smoothing_capacitor.value_at_voltage",
	"spacing.also", "spacing.cti", "spacing.gas", "spacing.pressure", "spacing.temperature", "spacing.humidity", "spacing.gauge_factor", "spacing.impulse_tested", "spacing.mains_transients",
	"spacing.ribs", "spacing.ribs.count", "spacing.ribs.depth", "spacing.ribs.width", "spacing.electrode_surface", "spacing.tested_voltage", "spacing.tested_length",
}

func draftOff(path string) bool {
	table, _, _ := strings.Cut(path, ".")
	return !slices.Contains(draftOn, table) || slices.Contains(draftOther, path) || slices.Contains(draftRare, path)
}

// draftValue keeps a draft from passing for a real chain.
func draftValue(path string) string {
	if path == "title" {
		return `"Draft: replace every value"`
	}
	return ""
}
