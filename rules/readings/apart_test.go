package readings

import (
	"slices"
	"strings"
	"testing"

	"kilovet/hv/circuit"
	"kilovet/rules/evidence"
)

// without is a form in which one instrument was not read.
func without(f *File, instrument string) *File {
	for i := range f.Steps {
		f.Steps[i].Readings = slices.DeleteFunc(f.Steps[i].Readings, func(r Reading) bool { return r.Instrument.V == instrument })
	}
	return f
}

// What was read is never asked for again, under whatever name, and only what the readings
// leave standing is told apart. What is asked for has, of the specimen as it really is, a
// value that is expected of the part that is wrong with it.
func TestFurtherReadings(t *testing.T) {
	ordinary(t)
	w := newWorkbench(t)
	asked := 0
	for i, c := range []struct {
		part  string
		wrong func(*circuit.Circuit) *circuit.Circuit
	}{
		{"multiplier.diode.4", conducting("multiplier.diode.4", 1/35e3)},
		{"multiplier.smoothing_capacitor.2", capacitance("multiplier.smoothing_capacitor.2", 0.02)},
		{"bleeder.1", resistance("bleeder.1", 0.42)},
		{"divider.upper", resistance("divider.upper", 0.45)},
	} {
		s := specimen{evidence.Fault{Edit: c.wrong}, uint64(300 + i)}
		for _, omitted := range []string{"", "return ammeter"} {
			said, err := Of(w.e, w.p, without(s.read(w, w.e, w.p, 4), omitted))
			if err != nil {
				t.Fatal(err)
			}
			standing := names(left(said.Suspects))
			for _, a := range said.Apart {
				asked++
				for _, read := range []string{"divider meter", "divider.tap ", "bench probe", "of multiplier ", "stage.6 ", "in the return", "return ammeter"} {
					if strings.Contains(a.What+" ", read) && a.What != omitted {
						t.Errorf("%s: %s was read already", c.part, a.What)
					}
				}
				w.holds(s, c.part, a, standing)
			}
		}
	}
	if asked == 0 {
		t.Error("nothing was asked for")
	}
}

func names(trials []*trial) (all []string) {
	for _, t := range trials {
		all = append(all, t.name)
	}
	return all
}

// holds holds one further reading of a specimen against what is expected of its part.
func (w workbench) holds(s specimen, part string, a Apart, standing []string) {
	w.Helper()
	truth := w.reads(s, a)
	for _, e := range a.Expected {
		mine := false
		for _, name := range e.Names {
			mine = mine || strings.HasPrefix(name, part)
			if !slices.Contains(standing, name) {
				w.Errorf("%s: %s does not stand any more", a.What, name)
			}
		}
		if mine && truth > 0.85*e.Low && truth < 1.15*e.High {
			return
		}
	}
	w.Errorf("%s: %s in %s is %g in truth, expected %+v", part, a.What, a.Step, truth, a.Expected)
}

// reads is what a further reading would show of a specimen.
func (w workbench) reads(s specimen, a Apart) float64 {
	w.Helper()
	step := find(w.p, a.Step)
	at := step.Condition
	at.Fault = both(s.built(), at.Fault)
	b := &bench{e: w.e}
	for _, u := range b.open(taken{step: step, at: at}) {
		if u.what != a.What {
			continue
		}
		v, err := u.of(w.e.Under(at))
		if err != nil {
			w.Fatal(err)
		}
		return v
	}
	w.Fatalf("%s is nothing that can be read", a.What)
	return 0
}
