package text

import (
	"bytes"
	"slices"
	"strings"

	"kilovet/hv/document"
	"kilovet/reports/digest"
	"kilovet/rules"
	"kilovet/rules/exhibit"
	"kilovet/rules/rule"
)

// asked are the rules that hold a gap against what is asked of it; the others say what
// it stands.
var asked = []string{"spacing.clearance", "spacing.creepage"}

// Gap writes the review of a description that is one spacing: what is asked, what it
// stands, the distances that would do, and the block of the description.
func Gap(r *rules.Review, block string, o Options) []byte {
	w := newWriter(o)
	w.verdict(strings.ToUpper(string(r.Verdict)), r.Verdict, digest.Sentence(r))
	w.short("", gutter, digest.Counts(r.Counts), 1)
	gapFindings(w, r, "What is asked: tables of the standards, working stress", true)
	gapFindings(w, r, "What it stands: physics", false)
	for _, t := range r.Tables {
		if t.Chapter == exhibit.Spacings || t.ID == "local.limits" {
			gapTable(w, t)
		}
	}
	figures(w, r)
	pairs(w, "Passed over", digest.PassedOver(gapPassed(r)), func(p digest.Passed) (string, string) { return p.Rules(), p.Because })
	w.head("To paste into a description")
	for line := range strings.Lines(block) {
		w.line(digest.Clean(strings.TrimRight(line, "\n")))
	}
	w.blank()
	w.wrap(r.Deference)
	return bytes.Clone(w.out.Bytes())
}

func gapFindings(w *writer, r *rules.Review, title string, tables bool) {
	of := slices.DeleteFunc(slices.Clone(r.Findings), func(f rule.Finding) bool { return slices.Contains(asked, f.Rule) != tables })
	if len(of) == 0 {
		return
	}
	w.head(title)
	for _, f := range of {
		f.Place = document.Place{} // the flags have no lines
		finding(w, r, f)
	}
}

// gapPassed are the rules about spacings that did not apply; of a lone gap, all others
// do not.
func gapPassed(r *rules.Review) []rule.PassedOver {
	return slices.DeleteFunc(slices.Clone(r.PassedOver), func(p rule.PassedOver) bool {
		return !strings.HasPrefix(p.Rule, "spacing.") || p.Rule == "spacing.described"
	})
}

// gapTable writes a table one row a paragraph, the heads before its cells.
func gapTable(w *writer, t exhibit.Table) {
	w.head(t.Title)
	for _, row := range t.Rows {
		var parts []string
		for i, c := range row[1:] {
			if s := cellText(c, t.Columns[i+1]); s != "" {
				parts = append(parts, strings.TrimPrefix(t.Columns[i+1].Head+" "+s, "why "))
			}
		}
		w.line(w.fit(cellText(row[0], t.Columns[0]), w.width))
		w.hang("", gutter, strings.Join(parts, "; "))
	}
	if t.Note != "" {
		w.blank()
		w.wrap(t.Note)
	}
}

func cellText(c exhibit.Cell, of exhibit.Column) string {
	if c.Value == nil {
		return c.Text
	}
	return digest.Amount(rule.Amount{Value: *c.Value, Unit: of.Unit})
}
