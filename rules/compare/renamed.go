package compare

import (
	"slices"
	"strconv"
	"strings"

	"kilovet/hv/document"
)

// entry is one of several tables of a kind that bears a name, with what it holds beside.
type entry struct {
	at, kind, name string            // at is where it stands, told apart by its name
	holds          map[string]string // texts by their place within the table
}

// rename is an entry that bears another name than before and holds the same.
type rename struct{ old, new entry }

// renames finds the entries of the old description that the new one holds under another
// name. Where several would do, the first stands for the first.
func renames(old, new []document.Written) []rename {
	was, is := entries(old), entries(new)
	came := slices.DeleteFunc(slices.Clone(is), func(e entry) bool { return stands(was, e) })
	var all []rename
	for _, o := range was {
		if stands(is, o) {
			continue
		}
		if i := slices.IndexFunc(came, o.holdsAsMuchAs); i >= 0 {
			all = append(all, rename{o, came[i]})
			came = slices.Delete(came, i, i+1)
		}
	}
	return all
}

// stands reports whether an entry of that name is among others.
func stands(among []entry, e entry) bool {
	return slices.ContainsFunc(among, func(o entry) bool { return o.at == e.at })
}

// holdsAsMuchAs reports whether two entries of a kind hold the same beside their name; one
// that holds nothing is like no other.
func (e entry) holdsAsMuchAs(o entry) bool {
	if e.kind != o.kind || len(e.holds) == 0 || len(e.holds) != len(o.holds) {
		return false
	}
	for place, text := range e.holds {
		if o.holds[place] != text {
			return false
		}
	}
	return true
}

// entries lists the named tables of a description, in its order.
func entries(written []document.Written) []entry {
	var all []entry
	for _, w := range written {
		at, named := strings.CutSuffix(w.At, ".name")
		kind := strings.TrimSuffix(w.Key, ".name")
		label, several := strings.CutPrefix(at, kind+" ")
		if !named || !several {
			continue
		}
		if name, err := strconv.QuotedPrefix(label); err == nil {
			name, _ = strconv.Unquote(name)
			all = append(all, entry{at, kind, name, within(written, at)})
		}
	}
	return all
}

// within is what a table holds beside its name.
func within(written []document.Written, at string) map[string]string {
	holds := map[string]string{}
	for _, w := range written {
		if place, inside := strings.CutPrefix(w.At, at+"."); inside && place != "name" {
			holds[place] = w.Text
		}
	}
	return holds
}

// under is a side with its renamed entries under their new names, and so is what figures
// and findings say of them.
func (s Side) under(renamed []rename, lead map[string]string) Side {
	s.Inputs, s.Figures, s.Findings = slices.Clone(s.Inputs), slices.Clone(s.Figures), slices.Clone(s.Findings)
	for i, w := range s.Inputs {
		for _, r := range renamed {
			if place, inside := strings.CutPrefix(w.At, r.old.at+"."); inside {
				s.Inputs[i].At = r.new.at + "." + place
			}
		}
	}
	for i, f := range s.Figures {
		s.Figures[i].Subject = led(lead, f.Subject)
	}
	for i, f := range s.Findings {
		s.Findings[i].Subject = led(lead, f.Subject)
	}
	return s
}

// led is a subject under its new name; what belongs to an entry stands after a stroke.
func led(lead map[string]string, subject string) string {
	of, part, parted := strings.Cut(subject, "/")
	switch to, renamed := lead[of], lead[subject]; {
	case renamed != "":
		return renamed
	case to != "" && parted:
		return to + "/" + part
	}
	return subject
}

// leads leads from the names of renamed entries to their new ones. A name that another
// entry bears on either side leads nowhere, for it may be that one which is spoken of.
func leads(old, new []document.Written, renamed []rename) map[string]string {
	bearers := map[string]int{}
	for _, e := range slices.Concat(entries(old), entries(new)) {
		bearers[e.name]++
	}
	lead := map[string]string{}
	for _, r := range renamed {
		if bearers[r.old.name] == 1 && bearers[r.new.name] == 1 {
			lead[r.old.name] = r.new.name
		}
	}
	return lead
}
