package readings

import (
	"testing"

	"kilovet/hv/chain"
	"kilovet/rules/evidence"
	"kilovet/rules/plan"
)

// Readings of a meter that should show nothing are compared and diagnosed as any others: a
// few millivolts of its own are within bounds, 60 V are not.
func TestAMeterThatShouldShowNothing(t *testing.T) {
	c := column(t)
	added, faults := chain.Read([]byte("format = 1\n[[instrument]]\nname = \"bias voltmeter\"\nat = \"cathode\"\nto = \"control\"\nresistance = \"1 Gohm\"\naccuracy = \"3 %\"\n[[part]]\nname = \"x\"\nkind = \"resistor\"\nfrom = \"cathode\"\nto = \"control\"\nvalue = \"1 ohm\"\n"))
	if added == nil || len(added.Instruments) != 1 {
		t.Fatal(faults)
	}
	c.Instruments = added.Instruments
	e := evidence.New(c)
	p, err := plan.Of(e)
	if err != nil {
		t.Fatal(err)
	}
	for read, within := range map[string]bool{"3 mV": true, "60 V": false} {
		f := &File{}
		for _, planned := range p.Steps[:2] {
			s := Step{}
			s.Name.V, s.Drive.V = planned.Name, planned.Peak
			r := Reading{}
			r.Instrument.V, r.Value.V, r.Value.Line = "bias voltmeter", read, 1
			s.Readings = append(s.Readings, r)
			f.Steps = append(f.Steps, s)
		}
		said, err := Of(e, p, f)
		if err != nil {
			t.Fatal(err)
		}
		if said.Sound != within {
			t.Errorf("%s: sound %t, want %t", read, said.Sound, within)
		}
	}
}
