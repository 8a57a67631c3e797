package rules_test

import (
	"math"
	"slices"
	"strings"
	"testing"

	"kilovet/rules"
	"kilovet/rules/rule"
)

// A spacing from the mains is judged by the mains of the site where no heater feed joins the
// mains to the chain too: 230 V of overvoltage category 2 have an impulse of 2.5 kV, for which
// IEC 60664-1:2020 Tables F.1 and F.2 ask 1.5 mm in case A at pollution degree 2.
func TestASpacingFromTheMainsNeedsNoHeaterFeed(t *testing.T) {
	r := review(t, []byte(mainsChain), "faults")
	asMains(t, r)
	for _, f := range r.Figures {
		if f.ID == "potential" && f.Subject == "mains" {
			t.Errorf("the mains is no node of the circuit and has a potential of %g V", f.Value)
		}
	}
}

// siteAlone is a site and a spacing of its mains, and nothing else; mainsChain has a supply
// without a heater feed besides.
const (
	siteAlone  = atMains + mainsTerminal
	mainsChain = atMains + oneStage + mainsTerminal
)

const atMains = `
format = 1
title  = "mains terminal"

[site]
altitude             = "0 m"
air_temperature      = "25 degC"
pollution_degree     = 2
mains                = "230 V"
mains_frequency      = "50 Hz"
overvoltage_category = 2
`

const oneStage = `
[drive]
waveform   = "sine"
frequency  = "20 kHz"
peak       = "1 kV"
resistance = "10 ohm"

[multiplier]
topology            = "half-wave"
polarity            = "negative"
stages              = 1
coupling_capacitor  = { value = "1 nF" }
smoothing_capacitor = { value = "1 nF" }
diode               = { forward_drop = "1 V" }

[[load]]
name    = "monitor"
at      = "output"
current = "10 uA"
`

const mainsTerminal = `
[[spacing]]
name       = "mains terminal"
from       = "mains"
to         = "ground"
medium     = "air"
insulation = "basic"
clearance  = "3 mm"
creepage   = "5 mm"
cti        = "200 V"
`

// asMains demands what the mains of the site asks of the terminal: 1.5 mm across, of 325.3 V
// peak; and along, IEC 60664-1 Table F.5, group III at pollution degree 2: 2 mm at 200 V,
// 2.5 mm at 250 V, 2.3 mm at 230 V.
func asMains(t *testing.T, r *rules.Review) {
	t.Helper()
	for id, needed := range map[string]float64{"spacing.clearance": 1.5e-3, "spacing.creepage": 2.3e-3} {
		f := found(t, r, id, "mains terminal")
		if f.Verdict != rule.Meets || f.Needed == nil || math.Abs(f.Needed.Value-needed) > 1e-8 {
			t.Errorf("%s: %s, needed %v: %s", id, f.Verdict, f.Needed, f.Because)
		}
	}
	if f := found(t, r, "spacing.clearance", "mains terminal"); !strings.Contains(f.Because, "325.3 V peak, 230 V lasting") {
		t.Error(f.Because)
	}
}

// A site and a spacing are a whole description, from the mains to ground as well.
func TestASpacingFromTheMainsNeedsNoSupply(t *testing.T) {
	asMains(t, review(t, []byte(siteAlone)))
	asMains(t, review(t, []byte(strings.NewReplacer(`"mains"`+"\n", `"ground"`+"\n", `"ground"`+"\n", `"mains"`+"\n").Replace(siteAlone))))
	for _, c := range []struct{ key, missing string }{{`mains                = "230 V"`, "site.mains"}, {"overvoltage_category = 2", "site.overvoltage_category"}} {
		r := review(t, []byte(strings.Replace(siteAlone, c.key+"\n", "", 1)))
		if f := found(t, r, "spacing.clearance", "mains terminal"); f.Verdict != rule.Unassessed || !slices.Contains(f.Missing, c.missing) {
			t.Errorf("without %s: %s, missing %v: %s", c.missing, f.Verdict, f.Missing, f.Because)
		}
	}
	small := review(t, []byte(strings.Replace(siteAlone, `"3 mm"`, `"1 mm"`, 1)))
	if f := found(t, small, "spacing.clearance", "mains terminal"); f.Verdict != rule.Fails {
		t.Errorf("1 mm: %s: %s", f.Verdict, f.Because)
	}
}

// A field with an electrode on the mains is judged at the peak of its live conductor: plates
// of 325.3 V over 5 mm have 65.05 kV/m between them.
func TestAnElectrodeOnTheMainsHasItsPeak(t *testing.T) {
	const plates = `
[[field]]
name       = "plates"
medium     = "air"
electrodes = [
  { name = "live", node = "mains", profile = [{ from = ["0 mm", "5 mm"] }, { to = ["20 mm", "5 mm"] }] },
  { name = "plate", node = "ground", profile = [{ from = ["0 mm", "0 mm"] }, { to = ["20 mm", "0 mm"] }] },
]
boundary = [{ kind = "natural", profile = [{ from = ["20 mm", "0 mm"] }, { to = ["20 mm", "5 mm"] }] }]
`
	r := review(t, []byte(mainsChain+plates), "faults")
	for _, f := range r.Figures {
		if f.ID == "field.peak" && f.Subject == "plates/live" {
			if math.Abs(f.Value/(230*math.Sqrt2/5e-3)-1) > 1e-3 {
				t.Errorf("field %g V/m", f.Value)
			}
			return
		}
	}
	t.Error("no figure of the field")
}
