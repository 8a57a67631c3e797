package plan_test

import (
	"testing"

	"kilovet/hv/lack"
)

// A voltmeter on the mains gets no expected reading, with a heater feed and without: that it
// would read nothing of what alternates does not say that there is none.
func TestNoReadingIsExpectedOfTheMains(t *testing.T) {
	const line = "[[instrument]]\nname = \"line\"\nat = \"mains\"\nresistance = \"10 Mohm\"\naccuracy = \"1 %\"\n"
	for _, name := range []string{"column", "positive"} {
		e := described(t, name, line)
		if v, err := e.Reads("mains", "ground"); lack.Of(err) == nil {
			t.Errorf("%s: %v", name, v)
		}
		if v, err := e.Reads("output", "mains"); lack.Of(err) == nil {
			t.Errorf("%s, against the mains: %v", name, v)
		}
		for _, s := range planned(t, e).Steps {
			for _, r := range s.Readings {
				if r.Instrument == "line" {
					t.Errorf("%s: %+v", name, r)
				}
			}
		}
	}
	if v, err := described(t, "column", "").Reads("output", "ground"); err != nil || v < 19e3 {
		t.Errorf("output %v (%v)", v, err)
	}
}
