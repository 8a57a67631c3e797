package digest

import (
	"slices"
	"strings"

	"kilovet/rules"
	"kilovet/rules/exhibit"
	"kilovet/rules/figure"
	"kilovet/rules/optics"
	"kilovet/rules/parts"
	"kilovet/rules/people"
	"kilovet/rules/radiation"
	"kilovet/rules/rule"
	"kilovet/rules/spacing"
	"kilovet/rules/supply"
	"kilovet/rules/vessel"
)

// Chapter is a part of a review with all that belongs to it.
type Chapter struct {
	Of       exhibit.Chapter
	Title    string
	Curves   []exhibit.Curve
	Tables   []exhibit.Table
	Figures  []figure.Figure
	Findings []rule.Finding // the worst first
}

// Empty reports whether nothing belongs to the chapter.
func (c Chapter) Empty() bool {
	return len(c.Curves)+len(c.Tables)+len(c.Figures)+len(c.Findings) == 0
}

var titles = map[exhibit.Chapter]string{
	exhibit.Chain:      "Chain and potentials",
	exhibit.Multiplier: "Multiplier and supply",
	exhibit.Beam:       "Gun and beam",
	exhibit.Spacings:   "Spacings and vessel",
	exhibit.Parts:      "Parts and margins",
	exhibit.Energy:     "Stored energy, access and X-rays",
	exhibit.Faults:     "Faults",
	exhibit.Plan:       "Plan for first power-up",
}

// Chapters takes a review apart by what its pieces are about, in the order of print;
// chapters to which nothing belongs are among them. What belongs nowhere stands in the
// first.
func Chapters(r *rules.Review) []Chapter {
	all := make([]Chapter, len(exhibit.Chapters))
	for i, of := range exhibit.Chapters {
		all[i] = Chapter{Of: of, Title: titles[of]}
	}
	in := func(of exhibit.Chapter) *Chapter { return &all[max(0, slices.Index(exhibit.Chapters, of))] }
	for _, c := range r.Curves {
		in(c.Chapter).Curves = append(in(c.Chapter).Curves, c)
	}
	for _, t := range r.Tables {
		in(t.Chapter).Tables = append(in(t.Chapter).Tables, t)
	}
	for _, f := range r.Figures {
		of := in(chapterOf(f.ID))
		of.Figures = append(of.Figures, f)
	}
	home := homes()
	for _, f := range Sorted(r.Findings) {
		of := home[f.Rule]
		if of == "" {
			of = chapterOf(f.Rule)
		}
		in(of).Findings = append(in(of).Findings, f)
	}
	return all
}

// homes is the chapter of each rule that its family tells.
func homes() map[string]exhibit.Chapter {
	all := map[string]exhibit.Chapter{}
	for _, f := range []struct {
		rules []rule.Rule
		of    exhibit.Chapter
	}{
		{people.Rules(), exhibit.Energy}, {radiation.Rules(), exhibit.Energy}, {spacing.Rules(), exhibit.Spacings}, {vessel.Rules(), exhibit.Spacings},
		{parts.Rules(), exhibit.Parts}, {supply.Rules(), exhibit.Multiplier}, {optics.Rules(), exhibit.Beam},
	} {
		for _, r := range f.rules {
			all[r.ID] = f.of
		}
	}
	return all
}

// chapterOf tells the chapter from the first word of an id.
func chapterOf(id string) exhibit.Chapter {
	first, _, _ := strings.Cut(id, ".")
	switch first {
	case "multiplier", "output", "drive", "supply", "regulation", "filter", "source", "loss":
		return exhibit.Multiplier
	case "cathode", "bias", "gun", "beam", "heater", "path":
		return exhibit.Beam
	case "spacing", "vacuum", "field", "gap", "gas", "feedthrough":
		return exhibit.Spacings
	case "part", "divider", "rating", "cable", "feed", "resistor", "capacitor", "diode", "series", "arc", "start":
		return exhibit.Parts
	case "stored", "access", "touch", "discharge", "rod", "xray", "bleeder", "protection":
		return exhibit.Energy
	case "fault":
		return exhibit.Faults
	case "plan", "step", "reading":
		return exhibit.Plan
	}
	return exhibit.Chain
}
