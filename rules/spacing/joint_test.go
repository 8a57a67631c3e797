package spacing_test

import (
	"fmt"
	"regexp"
	"slices"
	"strings"
	"testing"

	"pgregory.net/rapid"

	"kilovet/hv/chain"
	"kilovet/hv/chance"
	"kilovet/rules/rule"
	"kilovet/rules/spacing"
)

var roundTo = regexp.MustCompile(`round the sharper electrode to ([0-9.]+ [µm]?m)`)

// metAfter is what two rules say of a spacing with the size that a remedy names; none where
// it names no single one.
func metAfter(t *testing.T, text, remedy, radius string) map[string]rule.Finding {
	t.Helper()
	if resize.MatchString(remedy) {
		return findings(t, applied(t, text, remedy))
	}
	if m := roundTo.FindStringSubmatch(remedy); m != nil {
		return findings(t, regexp.MustCompile(radius+` = "[^"]*"`).ReplaceAllString(text, radius+` = "`+m[1]+`"`))
	}
	return nil
}

// shapedGap is a description with one spacing in oil, vacuum or a solid.
func shapedGap(medium, kind string, volts, clearance, radius float64) (text, sizeKey string) {
	sizeKey = map[string]string{"rounded edge": "edge_radius"}[kind]
	if sizeKey == "" {
		sizeKey = "radius"
	}
	text = site(310) + fmt.Sprintf("[[spacing]]\nname = \"g\"\nvoltage = \"%.6g kV\"\nmedium = %q\nclearance = %s\nshape = { kind = %q, %s = %s }\n",
		volts, medium, mm(clearance), kind, sizeKey, mm(radius))
	switch medium {
	case "solid":
		text += "material = \"alumina\"\n"
	case "vacuum":
		text += "finish = \"polished\"\nconditioned = true\nstressed_area = \"80 mm2\"\n"
	}
	return text, sizeKey
}

// served counts the remedies of clearance and breakdown that name one size, each of which
// has to serve both rules; a remedy that names none has to say so.
func served(t *testing.T, fatalf func(string, ...any), text, sizeKey string) (sizes int) {
	t.Helper()
	before, both := findings(t, text), []string{"spacing.clearance | g", "spacing.breakdown | g"}
	for _, of := range both {
		f := before[of]
		if f.Verdict != rule.Fails || strings.Contains(f.Remedy, "no one size") {
			continue
		}
		after := metAfter(t, text, f.Remedy, sizeKey)
		if after == nil {
			fatalf("%s: neither a size nor why there is none: %s\n%s", of, f.Remedy, text)
		}
		sizes++
		for _, other := range both {
			if is := after[other]; is.Margin == nil || *is.Margin < is.Stated-1e-6 {
				fatalf("%s says %q; after it %s: %s, %v, %s\n%s", of, f.Remedy, other, is.Verdict, is.Margin, is.Because, text)
			}
		}
	}
	return sizes
}

// One size that a remedy of clearance or breakdown names serves both rules, in oil, vacuum
// and solids, where the working stress asks for the distance; where none does, that is said.
func TestOneSizeServesBothRules(t *testing.T) {
	chance.Check(t, func(rt *rapid.T) {
		text, sizeKey := shapedGap(
			rapid.SampledFrom([]string{"oil", "vacuum", "solid"}).Draw(rt, "medium"),
			rapid.SampledFrom([]string{"rounded edge", "sphere-plane", "cylinder-plane"}).Draw(rt, "shape"),
			rapid.Float64Range(2, 60).Draw(rt, "voltage"),
			rapid.Float64Range(0.5, 40).Draw(rt, "clearance"),
			rapid.Float64Range(0.1, 20).Draw(rt, "radius"))
		served(t, rt.Fatalf, text, sizeKey)
	})
}

// In each of the three media there are sizes that serve.
func TestASizeThatServesIsNamed(t *testing.T) {
	for medium, volts := range map[string]float64{"oil": 10, "vacuum": 40, "solid": 5} {
		text, sizeKey := shapedGap(medium, "sphere-plane", volts, 1, 20)
		if served(t, t.Fatalf, text, sizeKey) == 0 {
			t.Errorf("no remedy in %s named a size", medium)
		}
	}
}

// A part that fails outright is the weakest of those that fail; what cannot be judged has a
// word of its own, also beside what fails.
func TestTheWeakestIsTheOneThatFailsOutright(t *testing.T) {
	c, faults := chain.Read([]byte(site(310) + "[[feedthrough]]\nname = \"lead\"\nvoltage = \"20 kV\"\npin = { radius = \"3 mm\" }\nhole = { radius = \"22 mm\" }\nair_side = { length = \"60 mm\" }\n"))
	if faults != nil {
		t.Fatal(faults)
	}
	of := func(subject string, v rule.Verdict, margin ...float64) rule.Finding {
		f := rule.Finding{Rule: "spacing.breakdown", Subject: "lead: " + subject, Verdict: v, Because: subject + " says why"}
		if margin != nil {
			f.Margin = &margin[0]
		}
		return f
	}
	weakest := func(parts ...rule.Finding) rule.Finding {
		all := append(slices.Clone(parts), rule.Finding{Rule: "feedthrough.weakest", Subject: "lead"})
		return spacing.WeakestAgain(c, all)[len(parts)]
	}
	annulus, sleeve, open := of("annulus", rule.Fails, -0.9), of("sleeve", rule.Fails), of("strip", rule.Unassessed)
	surface, gap := of("surface", rule.Marginal, 0.02), of("gap", rule.Marginal)
	for name, c := range map[string]struct {
		is   rule.Finding
		want []string
	}{
		"outright":         {weakest(surface, annulus, open, sleeve), []string{"sleeve says why", "weakest that can be judged", "1 more cannot"}},
		"least in hand":    {weakest(of("a", rule.Fails, -0.1), annulus), []string{"annulus says why", "-90 %"}},
		"unassessed":       {weakest(surface, open, of("other", rule.Unassessed)), []string{"2 cannot be judged", "strip says why"}},
		"a pass by margin": {weakest(gap, surface), []string{"surface says why"}},
	} {
		for _, text := range c.want {
			if !strings.Contains(c.is.Because, text) {
				t.Errorf("%s: no %q in %q", name, text, c.is.Because)
			}
		}
	}
}
