package readings

import (
	"fmt"
	"slices"
	"strings"
	"testing"

	"kilovet/hv/circuit"
	"kilovet/hv/quantity"
	"kilovet/rules/evidence"
	"kilovet/rules/plan"
)

// glow is a specimen with a load at a node that takes current only above a voltage: with
// the onset and the conductance of its own above it, found by iteration at every step.
type glow struct {
	specimen
	node    string
	onset   quantity.Voltage
	siemens float64
}

// loaded is the specimen with what the glow takes at one step.
func (g glow) loaded(t testing.TB, e *evidence.Evidence, at evidence.Condition) evidence.Condition {
	t.Helper()
	at.Fault = both(g.built(), at.Fault)
	sound, err := e.Under(at).Reads(g.node, "ground")
	if err != nil {
		t.Fatal(err)
	}
	if sound <= g.onset {
		return at
	}
	volts := sound
	for range 12 {
		i := g.siemens * float64(volts-g.onset)
		with := at
		with.Fault = both(evidence.Fault{Name: fmt.Sprintf("glow of %g", i), Edit: func(c *circuit.Circuit) *circuit.Circuit {
			return c.Bridge("glow", g.node, "ground", quantity.Resistance(float64(volts)/i))
		}}, at.Fault)
		v, err := e.Under(with).Reads(g.node, "ground")
		if err != nil {
			t.Fatal(err)
		}
		if quantity.AtMost(max(v-volts, volts-v), 5) {
			return with
		}
		volts = max((v+volts)/2, g.onset+1)
	}
	t.Fatalf("the glow at %s does not settle", g.node)
	return at
}

// form is what is read of a glowing specimen; some instruments may be left out.
func (g glow) form(w workbench, omitted ...string) *File {
	f := g.read(w, w.e, w.p, 5)
	for i := range f.Steps {
		planned := find(w.p, f.Steps[i].Name.V)
		values, err := plan.Values(w.e, g.loaded(w, w.e, planned.Condition))
		if err != nil {
			w.Fatal(err)
		}
		for j := range f.Steps[i].Readings {
			f.Steps[i].Readings[j].Value.V = fmt.Sprintf("%.3e %s", values[j], planned.Readings[j].Unit)
		}
	}
	for _, o := range omitted {
		f = without(f, o)
	}
	return f
}

// A load that begins above a voltage is named first, with the steps between which it begins:
// by the return current, by the droop of the kilovolts alone, and at the highest step alone.
func TestALoadThatBeginsAboveAVoltage(t *testing.T) {
	ordinary(t)
	w := newWorkbench(t)
	for i, c := range []struct {
		onset   quantity.Voltage
		siemens float64
		between string
		omitted []string
	}{
		{16e3, 5e-9, "begins between 14.", nil},
		{11e3, 5e-9, "begins between 9.", nil},
		{16e3, 50e-9, "begins between 14.", []string{"bench probe", "return ammeter"}},
		{17e3, 60e-9, "begins between 14.", []string{"return ammeter"}},
	} {
		g := glow{specimen{seed: uint64(400 + i)}, "output", c.onset, c.siemens}
		said, err := Of(w.e, w.p, g.form(w, c.omitted...))
		if err != nil {
			t.Fatal(err)
		}
		if said.Sound {
			t.Errorf("from %g V: nothing shows: %+v", c.onset, said.Rows)
			continue
		}
		ok := len(said.Suspects) > 0 && said.Suspects[0].Fits() && slices.ContainsFunc(said.Suspects[0].Names, func(n string) bool {
			return strings.Contains(n, "at output that") && strings.Contains(n, c.between)
		})
		if !ok {
			t.Errorf("from %g V: %s", c.onset, told(said))
		}
	}
}
