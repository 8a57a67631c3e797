package gun

import "kilovet/hv/lack"

// CutoffOf is the cutoff over the anode voltage at which the field at the cathode's apex
// vanishes, from the fields there for one volt on the control electrode and on the
// anode: control × bias = anode × voltage, since fields add up. Both must point the same
// way.
func CutoffOf(control, anode float64) (float64, error) {
	if control*anode <= 0 {
		return 0, lack.Failed("the fields of control electrode and anode at the cathode do not oppose each other: no bias stops the emission")
	}
	return anode / control, nil
}
