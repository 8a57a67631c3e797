package readings

import (
	"fmt"
	"testing"
)

// What a current passes the computed one by is named where the reading is worth it, and not
// below its last digits.
func TestSurplus(t *testing.T) {
	w := newWorkbench(t)
	for factor, named := range map[float64]bool{0.9: false, 1: false, 1.001: false, 1.03: true, 1.8: true} {
		s := w.p.Steps[0]
		f := &File{}
		step := Step{}
		step.Name.V, step.Drive.V = s.Name, s.Peak
		for i, r := range s.Readings {
			if r.Unit != "A" {
				continue
			}
			read := Reading{}
			read.Instrument.V, read.Value.V, read.Value.Line = r.Instrument, fmt.Sprintf("%.6e A", factor*s.Readings[i].Value), 1
			step.Readings = append(step.Readings, read)
		}
		f.Steps = append(f.Steps, step)
		c, err := Held(w.e, w.p, f)
		if err != nil {
			t.Fatal(err)
		}
		if got := c.Rows[0].Surplus > 0; got != named {
			t.Errorf("%g times: surplus %g", factor, c.Rows[0].Surplus)
		}
	}
}
