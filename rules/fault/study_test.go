package fault_test

import (
	"testing"

	"github.com/google/go-cmp/cmp"

	"kilovet/rules/evidence"
	"kilovet/rules/fault"
)

// TestStudiesAtOnceAreThoseOneByOne: several faults are computed at once, and each stands
// in its place with what it gives alone; progress is told for each.
func TestStudiesAtOnceAreThoseOneByOne(t *testing.T) {
	text := stiff(2, metered+"[protection]\nover_voltage = { trip = \"4.3 kV\", senses = \"second divider\", acts_on = \"drive supply\" }\n[access]\ntouchable = [\"divider.tap\"]\n")
	told := 0
	all := fault.StudyAll(evidence.New(read(t, text)).Telling(func(_ string, _, of int) {
		if of > 0 { // states of the circuit are told too, without an end
			told++
		}
	}))
	alone := evidence.New(read(t, text))
	list := fault.Of(alone)
	if len(all) != len(list) || told != len(list) {
		t.Fatalf("%d studied, %d told, %d faults", len(all), told, len(list))
	}
	for i, f := range list {
		one := fault.Study(alone, f)
		if one.Name != all[i].Name || (one.Err == nil) != (all[i].Err == nil) {
			t.Errorf("%s stands where %s belongs", all[i].Name, one.Name)
		}
		if d := cmp.Diff([]any{one.Drive, one.Output, one.Struck, one.Ended, one.Findings, one.Measures}, []any{all[i].Drive, all[i].Output, all[i].Struck, all[i].Ended, all[i].Findings, all[i].Measures}); d != "" {
			t.Errorf("%s: %s", f.Name, d)
		}
	}
}

// TestMeasuresCountOnlyIfIndependent: with regulation, a fault of the divider drives the
// output up; a trip with a sensor of its own sees that, one on the main divider does not.
func TestMeasuresCountOnlyIfIndependent(t *testing.T) {
	const regulated = metered + "[regulation]\nset = \"3.5 kV\"\n"
	for senses, want := range map[string]bool{"second divider": true, "the divider": false, "what the meter reads": false, "the weather": false} {
		e := evidence.New(read(t, stiff(2, regulated+"[protection]\nover_voltage = { trip = \"4.5 kV\", senses = \""+senses+"\", acts_on = \"drive supply\" }\n")))
		for _, f := range fault.Of(e) {
			if f.Name != "divider.upper open" {
				continue
			}
			o := fault.Study(e, f)
			if _, caught := o.Caught(); caught != want || o.Err != nil {
				t.Errorf("%s: caught %v, %v, %+v", senses, caught, o.Err, o.Measures)
			}
		}
	}
	// What a trip switches off counts too.
	e := evidence.New(read(t, stiff(2, regulated+"[protection]\nover_voltage = { trip = \"4.5 kV\", senses = \"second divider\", acts_on = \"a lamp\" }\n")))
	for _, f := range fault.Of(e) {
		if f.Name == "divider.upper open" {
			if _, caught := fault.Study(e, f).Caught(); caught {
				t.Error("a lamp takes nothing away")
			}
		}
	}
}
