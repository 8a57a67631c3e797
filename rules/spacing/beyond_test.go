package spacing_test

import (
	"strings"
	"testing"

	"kilovet/rules/rule"
)

// What a law of strength was not measured on is taken for granted and never a clean pass:
// a solid in heat, a vacuum of unknown pressure. The same without it meets.
func TestWhatLawsWereNotMeasuredOn(t *testing.T) {
	const head = "[[spacing]]\nname = \"g\"\nvoltage = \"5 kV\"\ninsulation = \"basic\"\nclearance = \"40 mm\"\n"
	solid := head + "medium = \"solid\"\nmaterial = \"epoxy\"\nshape = { kind = \"plates\" }\n"
	vacuum := head + "medium = \"vacuum\"\nshape = { kind = \"plates\" }\nfinish = \"polished\"\nconditioned = true\nstressed_area = \"100 mm2\"\n"
	for _, c := range []struct{ text, sound, worse, says string }{
		{solid, "temperature = \"20 degC\"\n", "temperature = \"290 degC\"\n", "room temperature"},
		{vacuum, "pressure = \"1e-5 mbar\"\n", "", "pressure is not given"},
	} {
		if f := findings(t, site(0)+c.text+c.sound)["spacing.breakdown | g"]; f.Verdict != rule.Meets {
			t.Errorf("%s: %v", f.Verdict, f.Assumptions)
		}
		f := findings(t, site(0)+c.text+c.worse)["spacing.breakdown | g"]
		if f.Verdict != rule.Marginal || !strings.Contains(strings.Join(f.Assumptions, " "), c.says) {
			t.Errorf("%s: %v", f.Verdict, f.Assumptions)
		}
	}
}

// The strength of air is that at DC and mains frequency; a fast drive leaves it marginal,
// and so the clearance, whichever demand governs, for what IEC 60664-4 asks is from memory.
func TestAFastDriveIsNoCleanPass(t *testing.T) {
	at := func(hertz string) map[string]rule.Finding {
		text := strings.Replace(supplied("negative", "coupling.1", ""), "frequency = \"38 kHz\"", "frequency = \""+hertz+"\"", 1)
		text = strings.Replace(text, "medium = \"air\"", "medium = \"air\"\ninsulation = \"basic\"", 1)
		return findings(t, strings.Replace(text, "kind = \"point-plane\", tip_radius = \"0.5 mm\"", "kind = \"sphere-plane\", radius = \"60 mm\"", 1))
	}
	for _, name := range []string{"spacing.breakdown | g", "spacing.clearance | g"} {
		slow, fast := at("20 kHz")[name], at("100 kHz")[name]
		if slow.Verdict != rule.Meets || fast.Verdict != rule.Marginal {
			t.Errorf("%s: %s %v, at 100 kHz %s %v", name, slow.Verdict, slow.Assumptions, fast.Verdict, fast.Assumptions)
		}
	}
}
