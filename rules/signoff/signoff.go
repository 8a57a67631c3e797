// Package signoff decides whether a sheet to sign may be issued: every point that fails
// or is unassessed among the required concerns has a disposition, and what concerns life
// has more than that. It makes the short code by which a sheet is told from others.
package signoff

import (
	"fmt"
	"slices"

	"kilovet/hv/chain"
	"kilovet/rules/rule"
)

// Point is a finding that does not meet its rule.
type Point struct {
	Finding     rule.Finding
	Disposition *Disposition // nil where there is none
	Required    bool         // among the concerns that the sheet requires
	Against     string       // why no sheet is issued with it; empty where one is
}

// Idle is a disposition without effect, and why.
type Idle struct {
	Disposition
	Because string
}

// Decision is whether a sheet is issued.
type Decision struct {
	Required []rule.Concern
	Points   []Point // every finding that does not meet, the gravest first
	Idle     []Idle
	Against  []string // why none is issued beside the points; empty where one may be
}

// Issued reports whether a sheet may be issued.
func (d Decision) Issued() bool {
	return len(d.Against) == 0 && !slices.ContainsFunc(d.Points, func(p Point) bool { return p.Against != "" })
}

// Decide holds the findings of a whole chain against the dispositions.
func Decide(c *chain.Chain, findings []rule.Finding, required []rule.Concern) Decision {
	d := Decision{Required: required}
	if c.Multiplier == nil || c.Drive == nil {
		d.Against = append(d.Against, "no supply is described: a sheet to sign is for a whole chain, not for spacings or fields alone")
	}
	if !slices.Contains(required, rule.Life) {
		d.Against = append(d.Against, "what concerns life is not required: every sheet requires it")
	}
	dispositions := Dispositions(c)
	used := make([]bool, len(dispositions))
	for _, f := range graver(findings) {
		p := Point{Finding: f, Required: slices.Contains(required, f.Concern)}
		for i := range dispositions {
			if about(dispositions[i], f, findings) {
				p.Disposition, used[i] = &dispositions[i], true
			}
		}
		if p.Required {
			p.Against = against(p)
		}
		d.Points = append(d.Points, p)
	}
	for i, a := range dispositions {
		if !used[i] {
			d.Idle = append(d.Idle, Idle{a, idle(a, findings)})
		}
	}
	return d
}

// graver is the findings that do not meet, those about life first and, within a concern,
// the worst verdict first.
func graver(findings []rule.Finding) []rule.Finding {
	var open []rule.Finding
	for _, concern := range rule.Concerns {
		for _, verdict := range rule.Verdicts {
			for _, f := range findings {
				if f.Concern == concern && f.Verdict == verdict && verdict != rule.Meets {
					open = append(open, f)
				}
			}
		}
	}
	return open
}

// against says why a point of a required concern stands against a sheet.
func against(p Point) string {
	life, d := p.Finding.Concern == rule.Life, p.Disposition
	switch {
	case p.Finding.Verdict == rule.Marginal:
		return ""
	case p.Finding.Verdict == rule.Fails && life:
		return "it fails and concerns life: no disposition lets a sheet be issued"
	case d == nil && life:
		return "it is unassessed and concerns life: only a recorded measurement answers it, in an [[accepted]] with disposition \"measured\""
	case d == nil:
		return fmt.Sprintf("it %s, and no [[accepted]] says what is to become of it", verb(p.Finding.Verdict))
	case life && d.Word != "measured":
		return fmt.Sprintf("it is unassessed and concerns life: %q is not enough, only a recorded measurement is", d.Word)
	case d.Word == "measured" && (d.Record == "" || d.Measurement == ""):
		return "the measurement is not recorded"
	case d.Word == "measured":
		return unrecorded(*d)
	}
	return ""
}

func verb(v rule.Verdict) string {
	if v == rule.Fails {
		return "fails"
	}
	return "is " + string(v)
}
