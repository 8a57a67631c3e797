package evidence

import "kilovet/hv/quantity"

// TipBeyondNominal is by how much more, peak to peak, an AC heater swings the tip with its
// centre resistors at the worst ends of their tolerance than with them as stated, and what
// that takes for granted; nothing for a DC heater and where one leg is the return.
func (e *Evidence) TipBeyondNominal() (quantity.Voltage, []string, error) {
	h := e.chain.Heater
	if !e.alternatingHeater() || h.CentreResistors == nil {
		return 0, nil, nil
	}
	nominal, err := e.TipSwing()
	if err != nil {
		return 0, nil, err
	}
	if !h.CentreResistors.Tolerance.Set() {
		return 0, []string{"the heater's centre resistors are exactly as stated: no tolerance is"}, nil
	}
	worst, err := e.TipSwingAtWorst()
	return 2 * (worst - nominal), nil, err
}

// HumAtWorst is the hum at the cathode, peak to peak, with the heater's centre resistors at
// the worst ends of their tolerance, and what that takes for granted.
func (e *Evidence) HumAtWorst() (quantity.Voltage, []string, error) {
	hum, err := e.CathodeHum()
	if err != nil || e.condition.Corner != Nominal {
		return hum, nil, err
	}
	more, assumed, err := e.TipBeyondNominal()
	return hum + more, assumed, err
}

// tipInCorner is the swing of the tip as stated, or at worst in a corner of the tolerances.
func (e *Evidence) tipInCorner() (quantity.Voltage, error) {
	tip, err := e.TipSwing()
	if err != nil || e.condition.Corner == Nominal {
		return tip, err
	}
	more, _, err := e.TipBeyondNominal()
	return tip + more/2, err
}
