package figure

import "slices"

// Declaration is one entry of the closed list: what an id means, in which unit,
// and whether it is listed for every state.
type Declaration struct {
	ID      string
	Unit    string
	ByState bool
	What    string
	// Of says what the subject is; empty where there is none.
	Of string
}

// Find looks an id up; it panics for an id that is not in the list.
func Find(id string) Declaration {
	i := slices.IndexFunc(List, func(d Declaration) bool { return d.ID == id })
	if i < 0 {
		panic("figure: not in the list: " + id)
	}
	return List[i]
}

// List is the closed list of figures, in the order in which they are printed.
var List = []Declaration{
	{"potential", "V", true, "mean potential to ground over a drive period", "node"},

	{"part.voltage", "V", true, "largest voltage across a part over a drive period", "part"},
	{"part.current", "A", true, "mean current through a resistor or load", "part"},
	{"part.power", "W", true, "mean power in a resistor, all elements", "part"},

	{"multiplier.no_load", "V", true, "2 N (peak − forward drop)", ""},
	{"multiplier.mean", "V", true, "mean at the top of the smoothing column", ""},
	{"multiplier.maximum", "V", true, "largest magnitude at the top of the smoothing column", ""},
	{"multiplier.minimum", "V", true, "smallest magnitude at the top of the smoothing column", ""},
	{"multiplier.drop", "V", true, "no-load voltage less the mean", ""},
	{"multiplier.drop_load", "V", true, "part of the drop due to the load", ""},
	{"multiplier.drop_stray", "V", true, "part of the drop due to strays, junction capacitance and leakage", ""},
	{"multiplier.drop_source", "V", true, "part of the drop due to source resistance, inductance and diode resistance", ""},
	{"multiplier.ripple", "V", true, "ripple at the top of the smoothing column, peak to peak", ""},
	{"multiplier.ripple_fundamental", "V", true, "amplitude of the ripple at the drive frequency", ""},
	{"multiplier.ripple_second", "V", true, "amplitude of the ripple at twice the drive frequency", ""},
	{"multiplier.diode_reverse_peak", "V", true, "largest reverse voltage on any diode position", ""},
	{"multiplier.diode_current_peak", "A", true, "largest peak forward current of any diode", ""},
	{"multiplier.capacitor_peak", "V", true, "largest voltage on any capacitor of the columns", ""},
	{"multiplier.input_power", "W", true, "mean power delivered by the drive sources", ""},
	{"multiplier.rise_time", "s", false, "from discharged at full drive to 95 % of the final mean", ""},
	{"multiplier.drop_estimate", "V", true, "drop of the mean by charge balance, load only", ""},
	{"multiplier.ripple_estimate", "V", true, "ripple by charge balance, peak to peak, load only", ""},
	{"multiplier.stages_for_most_output", "1", true, "stages that would give the most output at this load", ""},

	{"capacitor.mean", "V", true, "mean voltage on a capacitor", "part"},
	{"capacitor.peak", "V", true, "largest voltage on a capacitor over a drive period", "part"},
	{"diode.reverse_peak", "V", true, "largest reverse voltage of a diode position", "part"},
	{"diode.current_mean", "A", true, "mean current of a diode, leakage included", "part"},
	{"diode.current_rms", "A", true, "r.m.s. current of a diode, without that of its junction capacitance", "part"},
	{"diode.current_peak", "A", true, "peak forward current of a diode, without that of its junction capacitance", "part"},
	{"diode.conduction", "1", true, "share of the period in which a diode conducts", "part"},
	{"source.current_rms", "A", true, "r.m.s. current of a drive source", "part"},
	{"source.current_peak", "A", true, "peak current of a drive source", "part"},
	{"loss.power", "W", true, "mean power that a part takes up; without subject, all parts", "part"},
	{"loss.fed_besides", "W", true, "mean power that heater supply and fixed bias feed in beside the drive", ""},

	{"output.mean", "V", true, "mean voltage at the output", ""},
	{"output.ripple", "V", true, "ripple at the output, peak to peak", ""},
	{"output.ripple_fundamental", "V", true, "amplitude of the ripple at the output at the drive frequency", ""},
	{"output.ripple_second", "V", true, "amplitude of the ripple at the output at twice the drive frequency", ""},
	{"cathode.ripple", "V", true, "ripple at the cathode at the drive frequency and its harmonics, peak to peak", ""},
	{"cathode.hum", "V", true, "hum at the cathode at mains frequency, peak to peak", ""},
	{"cathode.disturbance", "V", true, "linear sum of ripple and hum at the cathode, peak to peak", ""},
	{"cathode.ripple_fundamental", "V", true, "amplitude of the ripple at the cathode at the drive frequency", ""},
	{"cathode.ripple_second", "V", true, "amplitude of the ripple at the cathode at twice the drive frequency", ""},
	{"bias.voltage", "V", true, "cathode above control electrode", ""},
	{"bias.ripple", "V", true, "ripple between cathode and control electrode, peak to peak", ""},
	{"bias.ripple_fundamental", "V", true, "amplitude of the ripple across the bias at the drive frequency", ""},
	{"bias.ripple_second", "V", true, "amplitude of the ripple across the bias at twice the drive frequency", ""},
	{"gun.emission", "A", true, "emission of the gun", ""},
	{"gun.emission_law", "A", true, "emission that the stated law gives with the stated bias resistor", ""},
	{"gun.loop_gain", "1", true, "by how much the bias resistor reduces a disturbance of the emission", ""},
	{"gun.cutoff", "V", false, "bias at which emission stops, at the working voltage", ""},
	{"gun.cutoff_ratio", "1", false, "cutoff over the working voltage, to which it is proportional", ""},
	{"gun.cutoff_estimate", "V", false, "cutoff by the tabulated geometries", ""},
	{"gun.cutoff_estimate_low", "V", false, "lower end of its band", ""},
	{"gun.cutoff_estimate_high", "V", false, "upper end of its band", ""},
	{"gun.zero_bias_emission", "A", false, "emission without bias by the law in use", ""},
	{"gun.headroom", "V", false, "cutoff less bias", ""},
	{"gun.resistor_needed", "ohm", false, "bias resistor with which the stated law gives the stated emission", ""},
	{"gun.bias_needed", "V", false, "bias with which the stated law gives the stated emission", ""},
	{"gun.regulates_to", "A", false, "emission above which the bias resistor takes away less than half of a disturbance", ""},
	{"gun.regulates_from_resistor", "ohm", false, "bias resistor below which it takes away less than half of a disturbance", ""},
	{"gun.loop_corner", "Hz", false, "frequency up to which the whole loop gain works, beside the bypass", ""},
	{"gun.loop_end", "Hz", false, "frequency above which the loop does nothing, beside the bypass", ""},
	{"gun.emission_to_voltage", "1", false, "relative change of the emission per relative change of the high voltage", ""},
	{"gun.emission_to_resistor", "1", false, "relative change of the emission per relative change of the bias resistor", ""},
	{"gun.emission_to_temperature", "1", false, "relative change of the emission per relative change of the cathode's temperature", ""},
	{"gun.emission_to_voltage_fixed", "1", false, "relative change of the emission per relative change of the high voltage, at a fixed bias of the same size", ""},
	{"gun.emission_to_bias_fixed", "1", false, "relative change of the emission per relative change of a fixed bias of the same size", ""},
	{"gun.emission_to_temperature_fixed", "1", false, "relative change of the emission per relative change of the temperature, at a fixed bias of the same size", ""},
	{"gun.richardson_limit", "A", false, "most that the emitting area can give at its temperature", ""},
	{"drive.peak_needed", "V", true, "drive, zero to peak, that holds the set voltage", ""},

	{"divider.current", "A", true, "current in the upper arm", ""},
	{"divider.ratio", "1", true, "sensed node over tap, meter connected", ""},
	{"divider.reading", "V", true, "voltage at the meter", ""},
	{"divider.error", "1", true, "error of the divider, worst case, relative", ""},
	{"divider.dissipation", "W", true, "power in both arms", ""},
	{"divider.element_dissipation", "W", true, "largest power in one element", ""},
	{"divider.element_voltage", "V", true, "largest voltage across one element", ""},
	{"divider.open_lower_arm", "V", true, "voltage of the tap, lower arm open, meter unplugged, no clamp", ""},
	{"divider.open_lower_arm_metered", "V", true, "voltage of the tap, lower arm open, meter connected", ""},
	{"divider.open_lower_arm_clamped", "V", true, "voltage of the tap, lower arm open, clamp conducting", ""},

	{"beam.energy", "eV", true, "charge times cathode to final electrode", ""},
	{"beam.wavelength", "m", true, "wavelength of the electrons", ""},
	{"beam.width_source", "eV", true, "energy width of the source, central half", ""},
	{"beam.width_ripple", "eV", true, "energy width of the disturbance, central half", ""},
	{"beam.blur_chromatic", "m", true, "chromatic blur of the source alone, FW50", ""},
	{"beam.blur_ripple", "m", true, "chromatic blur of the disturbance alone, FW50", ""},
	{"beam.blur_spherical", "m", true, "spherical blur, FW50 in the best plane", ""},
	{"beam.blur_diffraction", "m", true, "diffraction blur, FW50", ""},
	{"beam.blur_total", "m", true, "whole spot, FW50, summed after Barth and Kruit", ""},
	{"beam.banding", "1", true, "relative energy swing, peak to peak, too slow to blur: seen as banding", ""},
	{"beam.width_ripple_rms", "eV", false, "energy width of the disturbance, rms", ""},
	{"beam.width_source_rms", "eV", false, "energy width of the source, rms", ""},
	{"beam.width_source_fwhm", "eV", false, "energy width of the source, full width at half maximum", ""},
	{"beam.width_ripple_full", "eV", false, "energy width of the disturbance, from least to greatest", ""},
	{"beam.width_total", "eV", false, "energy width of source and disturbance together, central half", ""},
	{"beam.width_total_rms", "eV", false, "energy width of source and disturbance together, rms", ""},
	{"beam.width_total_fwhm", "eV", false, "energy width of source and disturbance together, full width at half maximum", ""},
	{"beam.blur_chromatic_total", "m", false, "chromatic blur of source and disturbance together, FW50", ""},
	{"beam.blur_without_ripple", "m", false, "whole spot without the disturbance, FW50", ""},
	{"beam.blur_quadrature", "m", false, "the same terms as the whole spot, summed in squares for comparison, FW50", ""},
	{"beam.share", "1", false, "by how much the area of the spot would shrink without this cause", "cause"},
	{"beam.best_angle", "rad", false, "semi-angle that makes the spot smallest, with the disturbance", ""},
	{"beam.best_angle_without_ripple", "rad", false, "semi-angle that makes the spot smallest, without it", ""},
	{"beam.best_blur", "m", false, "whole spot at the best semi-angle, FW50", ""},
	{"beam.banding_focus", "m", false, "movement of the focus by what is too slow to blur within the dwell, peak to peak", ""},
	{"beam.banding_edge", "m", false, "movement of the edge of the scanned field by it, peak to peak", ""},
	{"beam.drift", "1", false, "relative drift of the accelerating voltage within an exposure, peak to peak", ""},
	{"beam.drift_focus", "m", false, "movement of the focus by that drift, peak to peak", ""},
	{"beam.drift_edge", "m", false, "movement of the edge of the scanned field by that drift, peak to peak", ""},
	{"beam.ripple_allowed_output", "V", false, "ripple at the output when the disturbance at the cathode just uses up the allowance, peak to peak", ""},
	{"beam.ripple_allowed_multiplier", "V", false, "ripple at the top of the multiplier when the disturbance at the cathode just uses up the allowance, peak to peak", ""},
	{"cathode.measured", "V", false, "measured ripple at the cathode, peak to peak", ""},
	{"path.frequency", "Hz", false, "frequency of one path to the beam", "path"},
	{"path.voltage", "V", false, "what one path brings between cathode and anode, peak to peak; of noise rms", "path"},
	{"path.bias", "V", false, "what one path brings across the bias, peak to peak; of noise rms", "path"},
	{"path.emission", "1", false, "relative swing of the emission by one path, peak to peak; of noise rms", "path"},
	{"heater.tip_swing", "V", false, "swing of the tip against the cathode node by an AC heater, peak to peak", ""},
	{"heater.power", "W", false, "power of the heater", ""},
	{"beam.ripple_allowed", "V", true, "disturbance at the cathode that would just use up the allowance, peak to peak", ""},

	{"stored.energy", "J", true, "energy stored, whole chain or one part", "part"},
	{"stored.charge", "C", true, "charge that a short delivers", "node"},
	{"stored.energy_released", "J", true, "stored energy that a short sets free", "node"},
	{"stored.discharge_time", "s", true, "from switching off to 60 V through what is permanent", "node"},
	{"stored.left", "V", true, "largest voltage that stays on a node with one part open", "part"},
	{"stored.residue", "V", false, "what an intact ladder keeps: (2 N − 1) forward drops", ""},

	{"step.removed", "V", false, "mean at the output when the emission has stopped and the drive stays where it was", ""},
	{"step.settling", "s", false, "from the end of the emission to 95 % of the way there", ""},
	{"step.applied", "V", false, "mean at the output when the emission has set in and the drive stays where it was without", ""},
	{"regulation.least", "V", false, "least that the sensed node may stand at while its divider reads the set voltage", ""},
	{"regulation.most", "V", false, "most that the sensed node may stand at while its divider reads the set voltage", ""},

	{"start.ramped_rise_time", "s", false, "from discharged, the drive on its ramp, to 95 % of the final mean", ""},
	{"start.part_voltage", "V", false, "largest voltage on a part on the way up, full drive at once", "part"},
	{"start.part_current", "A", false, "largest current of a part on the way up, full drive at once", "part"},

	{"arc.charge", "C", true, "stored charge that passes through an arc to ground, regulation lost", "node"},
	{"arc.energy", "J", true, "stored energy that the arc itself turns into heat", "node"},
	{"arc.ceases", "s", true, "until the current of the arc stays below 1 mA, drive on", "node"},
	{"arc.ceases_undriven", "s", true, "until the current of the arc stays below 1 mA, drive off", "node"},
	{"arc.follow_current", "A", true, "mean current that the drive feeds into an arc that stands", "node"},
	{"arc.part_voltage", "V", true, "largest voltage that an arc at the gun puts across a part", "part"},
	{"arc.part_current", "A", true, "largest current that an arc at the gun drives through a part", "part"},
	{"arc.part_energy", "J", true, "energy that an arc at the gun turns into heat in a part", "part"},

	{"spacing.voltage", "V", false, "highest voltage across the spacing, peak", "spacing"},
	{"spacing.clearance_needed", "m", false, "clearance needed", "spacing"},
	{"spacing.creepage_needed", "m", false, "creepage distance needed", "spacing"},
	{"spacing.breakdown_estimate", "V", false, "voltage at which the gap is expected to break down", "spacing"},
	{"spacing.onset_estimate", "V", false, "voltage at which discharge is expected to begin", "spacing"},
	{"spacing.field_peak", "V/m", false, "largest field on the electrodes", "spacing"},

	{"vacuum.band_from", "Pa", false, "gauge reading from which the highest voltage may break down the longest path", ""},
	{"vacuum.band_to", "Pa", false, "gauge reading up to which it may", ""},

	{"field.peak", "V/m", false, "largest field on the electrode", "field/electrode"},
	{"field.peak_r", "m", false, "distance of the largest field from the axis", "field/electrode"},
	{"field.peak_z", "m", false, "height of the largest field", "field/electrode"},
	{"field.capacitance", "F", false, "Maxwell coefficient of capacitance", "field/electrode/electrode"},
	{"field.exponent", "1", false, "exponent of the field at a sharp edge or junction", "field/electrode"},
	{"field.at", "V/m", false, "field at a probe", "field/probe"},
}
