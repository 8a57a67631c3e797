package rules_test

import (
	"slices"
	"strings"
	"testing"

	"kilovet/rules"
	"kilovet/rules/figure"
)

// without cuts tables out of a description, from their heads to the next.
func without(text string, heads ...string) string {
	for _, head := range heads {
		at := strings.Index(text, "\n"+head+"\n") + 1
		end := at + len(head) + strings.Index(text[at+len(head):], "\n[") + 1
		text = text[:at] + text[end:]
	}
	return text
}

// kinds of chains other than a gun with a probe: what stays, what is not said of them, and
// what the review says that it left out.
var others = []struct {
	name, chain   string
	make          func(string) string
	stays, absent []string
	leftOut       []string
	passedOver    map[string]string
}{
	{"a gun not yet fitted", "column", func(c string) string { return strings.Replace(c, "fitted              = true", "fitted = false", 1) },
		[]string{"output.ripple", "cathode.ripple", "cathode.hum", "stored.energy"}, []string{"path.emission", "gun.emission_law", "beam.energy", "beam.blur_total"},
		[]string{"emission, operating point, beam and spot", "energy widths, blur and what would reach an allowance"},
		map[string]string{"beam.blur": "without a gun there is no beam", "gun.regulation": "the gun is not fitted", "gun.emission_limit": "the gun is not fitted", "beam.hum": "without a gun there is no beam"}},
	{"a detector", "column", func(c string) string {
		c = without(c, "[bias]", "[gun]", "[heater]", "[beam]")
		c = c[:strings.Index(c, "[[spacing]]\nname       = \"control electrode to cathode leads\"")]
		c = strings.NewReplacer("also       = [\"cathode\"]\n", "", `from       = "control"`, `from = "output"`).Replace(c)
		return strings.Replace(c, "[cable]", "[[load]]\nname = \"detector\"\nat = \"output\"\ncurrent = \"5 uA\"\n\n[cable]", 1)
	},
		[]string{"output.ripple", "stored.energy", "spacing.clearance_needed"}, []string{"cathode.ripple", "beam.energy", "path.voltage", "gun.emission"},
		[]string{"emission, bias and operating point", "paths of ripple, hum, drift and noise to the beam", "energy widths, blur and what would reach an allowance"},
		map[string]string{"beam.blur": "no beam is described", "gun.regulation": "no gun is described"}},
	{"an X-ray tube", "column", func(c string) string {
		c = without(c, "[bias]")
		c = c[:strings.Index(c, "[[spacing]]\nname       = \"control electrode to cathode leads\"")]
		c = strings.NewReplacer("also       = [\"cathode\"]\n", "", `from       = "control"`, `from = "cathode"`, `cutoff              = "420 V"`, "", `particle             = "electron"`, `purpose = "x-ray tube"`).Replace(c)
		return c
	},
		[]string{"beam.energy", "cathode.ripple", "cathode.hum", "gun.emission", "gun.emission_to_voltage"}, []string{"beam.blur_total", "path.bias", "bias.voltage"},
		[]string{"energy widths, blur and what would reach an allowance", "focal spot, dose and spectrum"},
		map[string]string{"beam.blur": "the beam is for an X-ray tube, not a probe: no spot is reckoned", "bias.adjustment": "there is no bias to adjust"}},
	{"an ion source", "positive", func(c string) string {
		return c + "\n[beam]\nparticle = \"ion\"\nmass_number = 40\nenergy_width = \"5 eV\"\nchromatic_aberration = \"40 mm\"\nspherical_aberration = \"100 mm\"\nhalf_angle = \"3 mrad\"\nsource_image = \"1 um\"\ndwell = \"1 ms\"\n"
	},
		[]string{"beam.energy", "beam.wavelength", "beam.blur_total", "path.voltage", "output.ripple"}, []string{"path.bias", "path.emission", "gun.emission", "cathode.ripple"},
		[]string{"emission, bias and heater", "space charge, neutralisation and the plasma's own spread"},
		map[string]string{"gun.emission_limit": "no gun is described", "beam.disturbance": "no blur allowance is stated"}},
}

func TestWhatAppliesStays(t *testing.T) {
	for _, o := range others {
		t.Run(o.name, func(t *testing.T) {
			r := reviewed(t, []byte(o.make(string(described(t, o.chain)))))
			for _, id := range o.stays {
				if !listed(r, id) {
					t.Errorf("%s is gone", id)
				}
			}
			for _, id := range o.absent {
				if listed(r, id) {
					t.Errorf("%s is listed", id)
				}
			}
			for _, what := range o.leftOut {
				if row := rowOf(r, "beam.left_out", what); len(row) < 2 || row[1].Text == "" {
					t.Errorf("it is not said that %s was left out", what)
				}
			}
			for _, p := range r.PassedOver {
				if want, known := o.passedOver[p.Rule]; known && p.Because != want {
					t.Errorf("%s passed over because %q, not %q", p.Rule, p.Because, want)
				}
				delete(o.passedOver, p.Rule)
			}
			for id := range o.passedOver {
				t.Errorf("%s is not passed over", id)
			}
			i := slices.IndexFunc(r.Summary, func(l rules.Line) bool { return l.Label == "Ripple" })
			if i < 0 || !strings.Contains(r.Summary[i].Text, "peak to peak") {
				t.Error("the summary says nothing of the ripple")
			}
		})
	}
}

func listed(r *rules.Review, id string) bool {
	return slices.ContainsFunc(r.Figures, func(f figure.Figure) bool { return f.ID == id })
}
