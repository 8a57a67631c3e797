package vacuum

import (
	"kilovet/hv/quantity"
	"kilovet/insulation/gap"
)

// Gain is by which factor a treatment raised what a gap or surface held.
type Gain struct {
	Treatment  string
	Least      float64
	Most       float64
	Conditions string
	gap.Source
}

// Gains are the treatments read, none of them counted in Breakdown. They do not
// multiply: each was measured alone.
func Gains() []Gain {
	pulsed := gap.Source{Text: "Fowler, Ives, Savage, Stygar, Sandia LDRD 28771 (2003), abstract", Mark: gap.Read}
	return []Gain{
		{"conditioning", 1, 2, "DC to 6 MHz, 0.38 mm, the most seen", gap.Source{Text: "Electrical breakdown in vacuum, IEEE T-ED 1965, abstract", Mark: gap.Read}},
		{"conditioning, large electrodes", 1.3, 1.3, "pulsed", pulsed},
		{"solvent cleaning in filtered air", 1.3, 1.3, "pulsed", pulsed},
		{"anodised aluminium", 1, 2, "pulsed; lost where arcs damage it", pulsed},
		{"chromium oxide on stainless steel", 1.2, 1.4, "pulsed; the lower after many arcs", pulsed},
		{"mirror polish against turning", 1, 1.4, "pulsed, 25 mm; nothing on clean aluminium between 0.08 and 3.2 µm", gap.Source{Text: "Investigation of explosive electron emission sites on surface of polished cathodes in vacuum, abstract", Mark: gap.Read}},
		{"screened triple junction", 1.25, 1.25, "DC, inverted insulator of a gun, 300 to more than 375 kV", gap.Source{Text: "Hernandez-Garcia, Poelker, Hansknecht, inverted-geometry insulators for a 350 kV gun, abstract", Mark: gap.Read}},
		{"plasma-deposited coating of polypropylene", 1.355, 1.355, "flashover", gap.Source{Text: "Zhang et al., Surf. Coat. Technol., abstract", Mark: gap.Read}},
	}
}

// processing are the ratios of the voltage reached in processing and the working one,
// of guns at 100, 130 and 500 kV: 120/100, 150/130, 550/500.
const (
	mostProcessing  quantity.Voltage = 1.2
	leastProcessing quantity.Voltage = 1.1
)

// ConditioningVoltage is what supply, divider, cable, feedthrough and air side must
// stand so that electrodes can be conditioned for a working voltage: 1.2 times it, 1.1
// times beside it.
func ConditioningVoltage(working quantity.Voltage) gap.Answer[quantity.Voltage] {
	source := gap.Source{Text: "guns processed at 120, 150 and 550 kV to work at 100, 130 and 500 kV (Jefferson Lab SOP 2003; Suleiman et al.; Nagai et al., IPAC'10)", Mark: gap.Derived}
	return gap.Answer[quantity.Voltage]{
		Value:   mostProcessing * working,
		Because: "electrodes are conditioned above their working voltage",
		Sources: []gap.Source{source.Governing()},
		Shown:   []gap.Beside[quantity.Voltage]{{Value: leastProcessing * working, Source: source}},
	}
}
