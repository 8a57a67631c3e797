package text

import (
	"strings"

	"kilovet/reports/digest"
	"kilovet/rules"
	"kilovet/rules/rule"
)

// everything is what follows the first screen.
func everything(w *writer, r *rules.Review) {
	if len(r.Findings) > 0 {
		w.head("Findings")
		for _, f := range digest.Sorted(r.Findings) {
			finding(w, r, f)
		}
	}
	figures(w, r)
	exhibits(w, r)
	pairs(w, "Cautions", r.Cautions, func(c rule.Caution) (string, string) { return c.Subject, c.Text })
	pairs(w, "Passed over", digest.PassedOver(r.PassedOver), func(p digest.Passed) (string, string) { return p.Rules(), p.Because })
	pairs(w, "Assumptions", r.Assumptions, func(a string) (string, string) { return "", a })
	provenance(w, r)
}

func (w *writer) head(title string) {
	w.blank()
	w.line(strings.ToUpper(title))
	w.blank()
}

// finding writes all that one finding holds.
func finding(w *writer, r *rules.Review, f rule.Finding) {
	title := f.Rule
	if f.Subject != "" {
		title += ": " + f.Subject
	}
	w.verdict(string(f.Verdict), f.Verdict, title+" ("+string(f.Concern)+")")
	w.detail("", amounts(f))
	w.detail("", f.Because)
	w.detail("remedy", f.Remedy)
	w.detail("missing", digest.Lacking(f))
	for _, a := range f.Assumptions {
		w.detail("assumed", a)
	}
	for _, s := range f.Sources {
		w.detail("source", digest.Source(s))
	}
	w.detail("where", digest.Place(r, f))
	w.blank()
}

func (w *writer) detail(label, s string) {
	switch {
	case s == "":
	case label == "":
		w.hang("", gutter, s)
	default:
		w.hang(pad("", gutter)+label, gutter+9, s)
	}
}

// amounts puts what is needed or allowed, what there is, margin and condition into one line.
func amounts(f rule.Finding) string {
	var parts []string
	needed, provided := digest.Labels(f)
	for _, p := range []struct{ label, text string }{
		{needed + " ", digest.Needed(f)}, {provided + " ", digest.Provided(f)}, {"margin ", digest.Margin(f)}, {"under ", f.Under},
	} {
		if p.text != "" {
			parts = append(parts, p.label+p.text)
		}
	}
	return strings.Join(parts, ", ")
}

// pairs writes a list of labelled texts; nothing where the list is empty.
func pairs[T any](w *writer, title string, list []T, split func(T) (label, text string)) {
	if len(list) == 0 {
		return
	}
	w.head(title)
	for _, item := range list {
		label, text := split(item)
		if label != "" {
			text = label + ": " + text
		}
		w.hang("-", 2, text)
	}
}

// provenance says what was read and what made the review.
func provenance(w *writer, r *rules.Review) {
	w.head("Made from")
	for _, in := range r.Inputs {
		w.hang("-", 2, in.Role+": "+in.Name)
		w.hang("", 2, "SHA-256 "+in.SHA256)
	}
	w.hang("-", 2, "by "+r.Program.Name+" "+r.Program.Version)
}
