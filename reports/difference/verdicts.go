package difference

import (
	"fmt"
	"kilovet/reports/lines"
	"slices"
	"strings"

	"kilovet/rules/compare"
)

// entry is findings whose verdicts changed alike, told at once.
type entry struct {
	word, rule, from, to string
	subjects             []string
	because              string // of a single one
}

// mostSubjects is how many subjects of an entry are named.
const mostSubjects = 3

// entries joins findings that changed alike, the worse ones first; what is worse, or
// everything if all is wanted, is told one by one with its reason.
func entries(findings []compare.Finding, all bool) []entry {
	var list []entry
	for _, worse := range []bool{true, false} {
		for _, f := range findings {
			if f.Worse != worse {
				continue
			}
			e := entryOf(f)
			i := slices.IndexFunc(list, e.alike)
			if worse || all || i < 0 {
				list = append(list, e)
			} else {
				list[i].subjects = append(list[i].subjects, f.Subject)
			}
		}
	}
	return list
}

func entryOf(f compare.Finding) entry {
	e := entry{word: word(f), rule: f.Rule, from: verdictOf(f.Old), to: verdictOf(f.New)}
	if f.Subject != "" {
		e.subjects = []string{f.Subject}
	}
	if f.New != nil {
		e.because = f.New.Because
	}
	return e
}

func (e entry) alike(other entry) bool {
	return e.word == other.word && e.rule == other.rule && e.from == other.from && e.to == other.to
}

func (e entry) write(w *lines.Writer) {
	name := e.rule
	if n := len(e.subjects); n > mostSubjects {
		name += fmt.Sprintf(": %s and %d more", strings.Join(e.subjects[:mostSubjects], "; "), n-mostSubjects)
	} else if n > 0 {
		name += ": " + strings.Join(e.subjects, "; ")
	}
	w.Hang(e.word, gutter, name+": "+e.from+" → "+e.to)
	if e.because != "" && len(e.subjects) <= 1 {
		w.Hang("", gutter, e.because)
	}
}
