package digest

import (
	"slices"
	"strconv"
	"strings"

	"kilovet/rules/rule"
)

// Entry is the findings of one rule that share a verdict, told once.
type Entry struct {
	First    rule.Finding // the first of them in the order given
	Subjects []string     // of all of them; empty subjects are left out
	Count    int
}

// Entries joins the findings that share rule, concern and verdict, at the place
// of the first.
func Entries(findings []rule.Finding) []Entry {
	var entries []Entry
	for _, f := range findings {
		i := slices.IndexFunc(entries, func(e Entry) bool { return alike(e.First, f) })
		if i < 0 {
			i = len(entries)
			entries = append(entries, Entry{First: f})
		}
		entries[i].add(f)
	}
	return entries
}

func alike(a, b rule.Finding) bool {
	return a.Rule == b.Rule && a.Concern == b.Concern && a.Verdict == b.Verdict
}

func (e *Entry) add(f rule.Finding) {
	e.Count++
	if f.Subject != "" {
		e.Subjects = append(e.Subjects, f.Subject)
	}
}

// Text names the rule and its subjects, at most the given number of them.
func (e Entry) Text(most int) string {
	if len(e.Subjects) == 0 {
		return e.First.Rule
	}
	return e.First.Rule + ": " + e.Names(most)
}

// Names lists the subjects, at most the given number of them.
func (e Entry) Names(most int) string { return some(e.Subjects, most, "; ") }

// some joins the first of the words and counts the rest.
func some(words []string, most int, between string) string {
	if len(words) <= most {
		return strings.Join(words, between)
	}
	return strings.Join(words[:most], between) + " and " + strconv.Itoa(len(words)-most) + " more"
}
