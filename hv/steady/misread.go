package steady

import (
	"kilovet/hv/lack"
	"kilovet/hv/quantity"
)

// Misread are the least and the most a voltage may be that a divider with a relative error
// reads as a set voltage: the reading is the voltage times 1 ± error. A lack where the
// error is not below 100 %.
func Misread(set quantity.Voltage, wrong quantity.Fraction) (least, most quantity.Voltage, err error) {
	if !(wrong >= 0 && wrong < 1) {
		return 0, 0, lack.Range("a divider whose error is %s tells nothing", quantity.Text(wrong))
	}
	return set / quantity.Voltage(1+wrong), set / quantity.Voltage(1-wrong), nil
}
