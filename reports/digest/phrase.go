package digest

import (
	"fmt"
	"math"
	"strconv"
	"strings"

	"kilovet/hv/quantity"
	"kilovet/rules"
	"kilovet/rules/rule"
)

// Amount writes an amount for people: four significant digits, usual prefix. Pure
// numbers below one are shown as fractions; what is not finite is said to be no
// number.
func Amount(a rule.Amount) string {
	switch {
	case math.IsNaN(a.Value) || math.IsInf(a.Value, 0):
		return "no number"
	case a.Value == 0:
		a.Value = 0 // a negative nought is a nought
	case a.Unit == "1" && math.Abs(a.Value) >= 1:
		return quantity.Significant(a.Value)
	}
	return a.Text()
}

// Needed says what a finding needs or allows; empty for a rule of presence and where
// nothing was assessed.
func Needed(f rule.Finding) string {
	if f.Needed == nil {
		return ""
	}
	return beside(*f.Needed, f.Provided)
}

// Labels are the words before Needed and Provided: a limit from above is allowed, and
// what there is is found; one from below is needed and provided.
func Labels(f rule.Finding) (needed, provided string) {
	if f.Relation == rule.AtMost {
		return "allowed", "found"
	}
	return "needed", "provided"
}

// Provided says what there is; empty where there is no amount.
func Provided(f rule.Finding) string {
	if f.Provided == nil {
		return ""
	}
	return beside(*f.Provided, f.Needed)
}

// beside writes an amount like the other of its pair: of pure numbers that are counted,
// nought is not a fraction.
func beside(a rule.Amount, other *rule.Amount) string {
	finite := !math.IsNaN(a.Value) && !math.IsInf(a.Value, 0)
	if finite && a.Unit == "1" && other != nil && other.Unit == "1" && math.Abs(other.Value) >= 1 {
		return quantity.Significant(a.Value)
	}
	return Amount(a)
}

// Margin writes a margin in per cent with its sign; empty where there is none.
func Margin(f rule.Finding) string {
	switch {
	case f.Margin == nil || math.IsNaN(*f.Margin):
		return ""
	case *f.Margin >= 9:
		return "tenfold or more"
	case *f.Margin > 0 && !quantity.Equal(1+*f.Margin, 1):
		return "+" + percent(*f.Margin)
	}
	return percent(*f.Margin)
}

// percent keeps the sign of a deficit too small to show, so that a failure never
// reads as nought; what a verdict does not see is none.
func percent(v float64) string {
	if quantity.Equal(1+v, 1) {
		v = 0
	}
	if v != 0 && math.Abs(v) < 0.0005 {
		return fmt.Sprintf("%.1g %%", v*100)
	}
	return strconv.FormatFloat(v*100, 'f', 1, 64) + " %"
}

// Source writes a source with its mark, and whether it judged.
func Source(s rule.Source) string {
	words := []string{string(s.Mark)}
	if s.Mark == "" {
		words[0] = "not marked"
	}
	if s.Governs {
		words = append(words, "governs")
	}
	return s.Text + " (" + strings.Join(words, "; ") + ")"
}

// Counts says how many findings there are of each verdict, the worst first.
func Counts(counts map[rule.Verdict]int) string {
	var parts []string
	for _, v := range rule.Verdicts {
		parts = append(parts, fmt.Sprintf("%s %d", v, counts[v]))
	}
	return strings.Join(parts, ", ")
}

// Place says where in the description the finding's key stands, or that it is
// not given there.
func Place(r *rules.Review, f rule.Finding) string {
	if f.Place.Key == "" || f.Place.Line == 0 {
		return f.Place.Key
	}
	return fmt.Sprintf("%s at %s:%d:%d", f.Place.Key, description(r), f.Place.Line, f.Place.Column)
}

// Line is Place without the file, for where the file is named once for all.
func Line(f rule.Finding) string {
	if f.Place.Key == "" || f.Place.Line == 0 {
		return f.Place.Key
	}
	return fmt.Sprintf("%s, line %d", f.Place.Key, f.Place.Line)
}

func description(r *rules.Review) string {
	for _, in := range r.Inputs {
		if in.Role == "description" {
			return in.Name
		}
	}
	return "description"
}
