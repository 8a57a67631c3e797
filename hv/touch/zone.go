package touch

import "kilovet/hv/quantity"

// ZoneSource says where the zones come from and what they are for.
const ZoneSource = "IEC 60479-1 figure 22, upward direct current that lasts, its corners alone and from memory: DC-2 above 2 mA, DC-3 above 25 mA, DC-4 above 150 mA"

// Corners of the zones of direct current through a body for longer than a heart period:
// IEC 60479-1 figure 22 and table 13, from memory. Impulses of capacitors have curves of
// their own in IEC 60479-2, which were not seen.
const (
	zone2 quantity.Current = 2e-3
	zone3 quantity.Current = 25e-3
	zone4 quantity.Current = 150e-3
)

// ZoneOfDC names the zone of a direct current through a body that lasts longer than a heart
// period. It is information: no zone permits anything.
func ZoneOfDC(i quantity.Current) string {
	switch {
	case !(i >= 0):
		return "not known"
	case !quantity.AtMost(i, zone4):
		return "DC-4: fibrillation, arrest, burns"
	case !quantity.AtMost(i, zone3):
		return "DC-3: cramps, heart disturbed"
	case !quantity.AtMost(i, zone2):
		return "DC-2: felt, jolts on making and breaking"
	}
	return "DC-1: barely felt"
}
