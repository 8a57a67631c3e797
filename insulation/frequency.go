package insulation

import (
	"fmt"

	"kilovet/hv/lack"
	"kilovet/hv/quantity"
	"kilovet/insulation/gap"
	"kilovet/insulation/table"
)

// The rules of IEC 60664-4 are from memory; none of its tables could be read.
const (
	lowestHighFrequency  quantity.Frequency = 30e3 // its scope, read: 30 kHz to 10 MHz
	highestHighFrequency quantity.Frequency = 10e6
	fullEffect           quantity.Frequency = 3e6          // f_min: the whole quarter is added
	criticalProduct                         = 0.2e6 * 1e-3 // f_crit times the clearance, Hz m
	smallAlternating     quantity.Voltage   = 500
)

// Fast reports whether the fast part of the voltage decides: above 30 kHz, more than
// 500 V and more than a fifth of the peak (common practice of this project).
func Fast(v gap.Voltages) bool {
	return v.Frequency > lowestHighFrequency && v.Alternating > smallAlternating && v.Alternating > v.Peak/5
}

// frequencyFactor multiplies a clearance above 30 kHz in a nearly homogeneous field, a
// radius of a fifth of the clearance or more (IEC 60664-4, memory): 1 up to f_crit = 0.2
// MHz/d (mm), 1.25 from 3 MHz on, linear between. Sharper electrodes have a table of their
// own that was not read, a lack; so are frequencies above 10 MHz.
func frequencyFactor(g gap.Gap, v gap.Voltages, needed quantity.Length) (table.Reading[quantity.Fraction], error) {
	none := table.Reading[quantity.Fraction]{Value: 1}
	if !Fast(v) {
		return none, nil
	}
	if v.Frequency > highestHighFrequency {
		return none, lack.Range("IEC 60664-4 ends at 10 MHz, asked for %s", quantity.Text(v.Frequency))
	}
	critical := quantity.Frequency(criticalProduct / float64(needed))
	part := 0.0
	switch {
	case v.Frequency <= critical:
	case v.Frequency >= fullEffect:
		part = 1
	default:
		part = float64((v.Frequency - critical) / (fullEffect - critical))
	}
	return table.Reading[quantity.Fraction]{
		Value:  quantity.Fraction(1 + 0.25*part),
		Rows:   fmt.Sprintf("%s, critical %s", quantity.Text(v.Frequency), quantity.Text(critical)),
		Source: gap.Source{Text: "IEC 60664-4, clearance above the critical frequency", Mark: gap.Memory},
	}, nil
}

// bluntEnough refuses, where the frequency counts, electrodes sharper than a fifth of the
// clearance that is needed; the one there is may be wider.
func bluntEnough(g gap.Gap, v gap.Voltages, needed quantity.Length) error {
	switch {
	case !Fast(v):
		return nil
	case g.Shape == nil:
		return lack.Because("above 30 kHz the clearance of sharp electrodes follows IEC 60664-4 Table 1, which was not read; a shape with rounded electrodes is needed", "spacing.shape")
	case g.Shape.Kind == gap.Plates, quantity.AtLeast(g.Shape.Sharpest(), needed/5):
		return nil
	}
	return lack.Range("above 30 kHz a radius of %s is too sharp for a clearance of %s, which is needed: IEC 60664-4 Table 1 was not read", quantity.Text(g.Shape.Sharpest()), quantity.Text(needed))
}

// slowCreepage says that Table 2 of IEC 60664-4 was not read.
func slowCreepage(v gap.Voltages) []string {
	if !Fast(v) {
		return nil
	}
	return []string{fmt.Sprintf("the creepage at %s is taken as at low frequency: IEC 60664-4 Table 2 was not read", quantity.Text(v.Frequency))}
}
