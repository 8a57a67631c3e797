package steady

import (
	"kilovet/hv/chain"
	"kilovet/hv/lack"
	"kilovet/hv/quantity"
)

// Residue is what an intact ladder keeps at most when its top is discharged: its
// 2N diodes need their forward drops to pass the last charge on, all but the first
// stand between the lowest coupling node and the top, (2N − 1) × forward drop. The
// lack names the drop where it is not given.
func Residue(m *chain.Multiplier) (quantity.Voltage, error) {
	if m == nil {
		return 0, lack.Key("multiplier")
	}
	if m.Diode == nil {
		return 0, lack.Key("multiplier.diode.forward_drop")
	}
	drop, err := m.Diode.ForwardDrop.Need()
	return drop * quantity.Voltage(2*m.Stages.V-1), err
}
