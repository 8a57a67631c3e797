package text

import (
	"bytes"
	"slices"
	"strings"

	"kilovet/reports/digest"
	"kilovet/rules/rule"
)

// Rules lists the rules, one a line, under their concerns.
func Rules(all []rule.Rule, o Options) []byte {
	w := newWriter(o)
	for _, c := range rule.Concerns {
		of := slices.DeleteFunc(slices.Clone(all), func(r rule.Rule) bool { return r.Concern != c })
		if len(of) == 0 {
			continue
		}
		w.head(string(c))
		for _, r := range of {
			w.hang(r.ID, 30, r.Title)
		}
	}
	return bytes.Clone(w.out.Bytes())
}

// Rule is the page of one rule: what it demands, when, and what it rests on.
func Rule(r rule.Rule, o Options) []byte {
	w := newWriter(o)
	w.hang("", 0, r.ID+": "+r.Title)
	w.blank()
	for _, p := range []struct{ label, text string }{
		{"demands", r.Demands}, {"applies", r.Applies}, {"margin", r.Margin}, {"concerns", string(r.Concern)},
	} {
		if p.text != "" {
			w.hang(p.label, gutter, p.text)
		}
	}
	for _, s := range r.Sources {
		w.hang("source", gutter, digest.Source(s))
	}
	example(w, r.Example)
	return bytes.Clone(w.out.Bytes())
}

// example shows the rule at work on the built-in description.
func example(w *writer, e rule.Example) {
	if len(e.Swaps) == 0 {
		return
	}
	w.blank()
	w.wrap("For example, in " + description(e.Of))
	for _, s := range e.Swaps {
		w.hang("  was", gutter, oneLine(s.Was))
		w.hang("  becomes", gutter, oneLine(s.Becomes))
	}
	w.wrap("changes")
	for _, c := range e.Changes {
		w.hang("", 2, change(c))
	}
}

// description names the one that an example changes; the empty name is that of the
// one that is built in.
func description(name string) string {
	if name == "" {
		return "the built-in description, column.toml"
	}
	return "the description testdata/chains/" + name + ".toml"
}

func change(c rule.Change) string {
	name := c.Rule
	if c.Subject != "" {
		name += ", " + c.Subject
	}
	if c.Verdict == "" {
		return name + ": no longer judged"
	}
	return name + ": " + string(c.Verdict)
}

// oneLine shows a text cut from a file; an empty one is said to be nothing.
func oneLine(s string) string {
	if s = strings.Join(strings.Fields(s), " "); s == "" {
		return "(nothing)"
	}
	return s
}
