package digest_test

import (
	"strings"
	"testing"

	"kilovet/reports/digest"
	"kilovet/reports/internal/sample"
	"kilovet/rules/exhibit"
)

func TestCurveWords(t *testing.T) {
	got := digest.CurveWords(sample.Curves()[0])
	want := "Voltage less its mean over time. Line multiplier: from 0 s to 40 µs, between -600 mV at 30 µs and 600 mV at 10 µs."
	if !strings.HasPrefix(got, want) || !strings.HasSuffix(got, "Level allowed: 700 mV. Level diode stops conducting: 11 µs.") {
		t.Errorf("got %s", got)
	}
}

// Every piece of a review stands in one chapter.
func TestChaptersHoldEverythingOnce(t *testing.T) {
	r := sample.Hard()
	curves, tables, figures, findings := 0, 0, 0, 0
	for _, c := range digest.Chapters(r) {
		curves, tables, figures, findings = curves+len(c.Curves), tables+len(c.Tables), figures+len(c.Figures), findings+len(c.Findings)
		if c.Title == "" {
			t.Errorf("chapter %s has no title", c.Of)
		}
	}
	if curves != len(r.Curves) || tables != len(r.Tables) || figures != len(r.Figures) || findings != len(r.Findings) {
		t.Errorf("%d curves, %d tables, %d figures, %d findings", curves, tables, figures, findings)
	}
}

func TestChapterOfRulesAndFigures(t *testing.T) {
	r := sample.Failing()
	r.Findings[3].Rule = "access.enclosure"
	for _, c := range digest.Chapters(r) {
		for _, f := range c.Findings {
			want := map[string]exhibit.Chapter{"spacing.creepage": exhibit.Spacings, "access.enclosure": exhibit.Energy, "beam.blur": exhibit.Beam, "rating.cable": exhibit.Parts, "rating.diode_reverse": exhibit.Parts}[f.Rule]
			if c.Of != want {
				t.Errorf("%s stands in %s, want %s", f.Rule, c.Of, want)
			}
		}
	}
}

func TestSourcesAreNumberedOnce(t *testing.T) {
	r := sample.Hard()
	all := digest.Sources(r)
	for i, s := range all {
		if got := digest.SourceNumber(all, s); got != i+1 {
			t.Errorf("source %d has the number %d", i+1, got)
		}
	}
	for _, f := range r.Findings {
		for _, s := range f.Sources {
			if n := digest.SourceNumber(all, s); n == 0 || all[n-1].Text != s.Text || all[n-1].Governs {
				t.Errorf("%q has the number %d", s.Text, n)
			}
		}
	}
}

func TestCell(t *testing.T) {
	v := 0.0125
	if got := digest.Cell("m", &v, ""); got != "12.5 mm" {
		t.Errorf("got %s", got)
	}
	if got := digest.Cell("m", nil, "no gap"); got != "no gap" {
		t.Errorf("got %s", got)
	}
	if got := digest.Cell("1", &v, "0.0125"); got != "0.0125" {
		t.Errorf("got %s", got)
	}
}
