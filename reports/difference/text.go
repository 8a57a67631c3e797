package difference

import (
	"bytes"
	"fmt"
	"math"
	"slices"
	"strings"

	"kilovet/hv/quantity"
	"kilovet/reports/digest"
	"kilovet/reports/lines"
	"kilovet/rules/compare"
	"kilovet/rules/rule"
)

// Options say how to write text.
type Options struct {
	All   bool // every verdict and every figure by itself, not only the most of a kind
	Width int  // columns; 0 means 80, below 40 counts as 40
}

// gutter is the column that words about a change stand in.
const gutter = 10

// Text writes the difference for a terminal.
func Text(r *Report, o Options) []byte {
	w := lines.New(o.Width)
	w.Hang("old", gutter, side(r.Old, r.Was))
	w.Hang("new", gutter, side(r.New, r.Is))
	if r.Local.Name != "" {
		w.Hang("under", gutter, "the local limits of "+r.Local.Name)
	}
	w.Line("")
	w.Hang("", 0, sentence(r))
	w.Section("Changed inputs", len(r.Inputs))
	for _, in := range r.Inputs {
		w.Hang("", 0, in.At)
		w.Hang("", 4, given(in.Old)+" → "+given(in.New)+remark(in))
	}
	w.Section("Changed verdicts", len(r.Findings))
	for _, e := range entries(r.Findings, o.All) {
		e.write(w)
	}
	w.Section("Moved figures", len(r.Figures))
	for _, g := range groups(r.Figures) {
		g.write(w, o.All)
	}
	return bytes.Clone(w.Bytes())
}

func side(s Side, v rule.Verdict) string {
	text := s.Name + ": " + strings.ToUpper(string(v))
	if s.Title != "" {
		text += " (" + s.Title + ")"
	}
	return text
}

// sentence says in one sentence how the new side stands to the old.
func sentence(r *Report) string {
	worse, lost := 0, 0
	for _, f := range r.Findings {
		switch {
		case f.Worse && f.New == nil:
			lost++
		case f.Worse:
			worse++
		}
	}
	switch {
	case worse+lost > 0:
		return strings.Join(slices.Concat(counted(worse, "is worse", "are worse"), counted(lost, "that was met is judged no longer", "that were met are judged no longer")), "; ") + "."
	case r.Worse:
		return "The whole is worse."
	case r.Nothing():
		return "Nothing differs."
	}
	return "No verdict is worse."
}

// counted says of how many findings something holds; of none, nothing.
func counted(n int, of1, ofMore string) []string {
	switch n {
	case 0:
		return nil
	case 1:
		return []string{"1 finding " + of1}
	}
	return []string{fmt.Sprintf("%d findings %s", n, ofMore)}
}

// remark says what a changed text leaves as it was.
func remark(in compare.Input) string {
	switch {
	case in.Rewritten:
		return " (the same value)"
	case in.Renamed:
		return " (renamed, the rest is the same)"
	}
	return ""
}

// group is the figures of one id that moved.
type group struct {
	id, what string
	figures  []compare.Figure
}

func groups(figures []compare.Figure) []*group {
	var all []*group
	byID := map[string]*group{}
	for _, f := range figures {
		g := byID[f.ID]
		if g == nil {
			g = &group{id: f.ID, what: f.What}
			byID[f.ID] = g
			all = append(all, g)
		}
		g.figures = append(g.figures, f)
	}
	return all
}

// write shows the figures of a group, all or the one that moved most.
func (g *group) write(w *lines.Writer, all bool) {
	w.Hang("", 0, g.id+": "+g.what)
	if all || len(g.figures) == 1 {
		for _, f := range g.figures {
			w.Hang("", 4, moved(f))
		}
		return
	}
	w.Hang("", 4, fmt.Sprintf("%d moved, most: %s", len(g.figures), moved(g.most())))
}

// most is the figure with the largest relative change; one that came or went counts
// as the largest.
func (g *group) most() compare.Figure {
	best := g.figures[0]
	for _, f := range g.figures[1:] {
		if size(f) > size(best) {
			best = f
		}
	}
	return best
}

func size(f compare.Figure) float64 {
	if f.Change == nil {
		return math.Inf(1)
	}
	return math.Abs(*f.Change)
}

func moved(f compare.Figure) string {
	var where []string
	for _, s := range []string{f.Subject, f.State} {
		if s != "" {
			where = append(where, s)
		}
	}
	text := amountOf(f.Old, f.Unit) + " → " + amountOf(f.New, f.Unit)
	if where != nil {
		text = strings.Join(where, ", ") + ": " + text
	}
	if f.Change != nil {
		text += fmt.Sprintf(" (%s)", signed(*f.Change))
	}
	return text
}

// signed writes a relative change with its sign.
func signed(share float64) string {
	text := digest.Clean(quantity.Text(quantity.Fraction(share)))
	if share > 0 {
		return "+" + text
	}
	return text
}
