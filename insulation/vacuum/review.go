package vacuum

import (
	"kilovet/hv/quantity"
	"kilovet/insulation/gap"
)

// Care is what a field at an electrode in vacuum asks of its surface.
type Care string

// The steps of care.
const (
	Comfortable Care = "comfortable for clean machined metal"
	Prepared    Care = "needs polish and conditioning"
	Emitting    Care = "cold emission is expected"
)

// The fields between the steps.
const (
	ComfortableField quantity.Field = 5e6
	EmissionField    quantity.Field = 10e6
)

var (
	comfortableSource = gap.Source{Text: "at most 5 kV/mm on unpolished or unconditioned metal; half of where emission begins", Mark: gap.Practice}
	emissionSource    = gap.Source{Text: "measurable emission from apparently smooth surfaces at 10 kV/mm, Electron Emission Preceding Electrical Breakdown in Vacuum, abstract", Mark: gap.Read}
	niobiumSource     = gap.Source{Text: "18.7 kV/mm held with less than 10 pA by the best of eight gas-conditioned niobium electrodes, Phys. Rev. ST Accel. Beams 15 (2012) 083502, abstract", Mark: gap.Read}
)

// Review says what care a peak field at an electrode asks for, and why: comfortable up
// to 5 kV/mm, prepared surfaces up to 10 kV/mm, above it emission. The field is that of
// the electrode, not voltage over distance: a published gun had 1.66 times as much.
func Review(peak quantity.Field) (Care, []gap.Source) {
	switch {
	case quantity.AtMost(peak, ComfortableField):
		return Comfortable, []gap.Source{comfortableSource.Governing(), emissionSource}
	case quantity.AtMost(peak, EmissionField):
		return Prepared, []gap.Source{comfortableSource.Governing(), emissionSource}
	}
	return Emitting, []gap.Source{emissionSource.Governing(), niobiumSource}
}
