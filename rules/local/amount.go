package local

import (
	"fmt"
	"strconv"

	"kilovet/hv/quantity"
	"kilovet/rules/rule"
)

// amountFor is a written value as a limit of a finding: in its unit, or as a share of
// what its own limit is a share of. The error says what the finding asks for.
func amountFor(text string, f rule.Finding) (rule.Amount, error) {
	if f.Needed.Unit == "1" {
		return pureFor(text, f)
	}
	d := quantity.DimensionOf(f.Needed.Unit)
	if d == nil {
		return rule.Amount{}, fmt.Errorf("%s of %s is judged in %s, which cannot be written", f.Rule, f.Subject, f.Needed.Unit)
	}
	if v, err := d.Parse(text); err == nil {
		return rule.Amount{Value: v, Unit: f.Needed.Unit}, nil
	}
	share, err := quantity.Fraction(0).Dimension().Parse(text)
	switch {
	case err == nil && f.Whole != nil:
		return rule.Amount{Value: share * f.Whole.Value, Unit: f.Whole.Unit}, nil
	case f.Whole != nil:
		return rule.Amount{}, fmt.Errorf("%s of %s is judged by %s or by a share in %%, not by %s", f.Rule, f.Subject, d.Noun(), text)
	}
	return rule.Amount{}, fmt.Errorf("%s of %s is judged by %s, not by %s", f.Rule, f.Subject, d.Noun(), text)
}

// pureFor reads a limit without unit: a count for what is counted, else a fraction.
func pureFor(text string, f rule.Finding) (rule.Amount, error) {
	if counted(f) {
		n, err := strconv.Atoi(text)
		if err != nil {
			return rule.Amount{}, fmt.Errorf("%s of %s is judged by a count, not by %s", f.Rule, f.Subject, text)
		}
		return rule.Amount{Value: float64(n), Unit: "1"}, nil
	}
	v, err := quantity.Fraction(0).Dimension().Parse(text)
	if err != nil {
		return rule.Amount{}, fmt.Errorf("%s of %s is judged by a fraction in %%, not by %s", f.Rule, f.Subject, text)
	}
	return rule.Amount{Value: v, Unit: "1"}, nil
}

// counted reports whether a pure number is one of things: those are one at least.
func counted(f rule.Finding) bool { return f.Needed.Value >= 1 }

// stricter reports whether a limit asks more of a finding than its own.
func stricter(f rule.Finding, than rule.Amount) bool {
	if f.Relation == rule.AtLeast {
		return !quantity.AtMost(pure(than.Value), pure(f.Needed.Value))
	}
	return !quantity.AtLeast(pure(than.Value), pure(f.Needed.Value))
}

// laxer reports whether a limit asks less of a finding than its own.
func laxer(f rule.Finding, than rule.Amount) bool {
	return !stricter(f, than) && !quantity.Equal(pure(than.Value), pure(f.Needed.Value))
}

// pastWhole reports whether a limit lies past the rating or estimate itself.
func pastWhole(f rule.Finding, limit rule.Amount) bool {
	if f.Whole == nil {
		return false
	}
	if f.Relation == rule.AtLeast {
		return !quantity.AtLeast(pure(limit.Value), pure(f.Whole.Value))
	}
	return !quantity.AtMost(pure(limit.Value), pure(f.Whole.Value))
}

type pure float64

// bound is a limit in words: "at least 80 mm".
func bound(f rule.Finding, limit rule.Amount) string {
	text := limit.Text()
	if limit.Unit == "1" && counted(f) {
		text = quantity.Significant(limit.Value)
	}
	if f.Relation == rule.AtLeast {
		return "at least " + text
	}
	return "at most " + text
}

// judged judges a finding anew by another limit.
func judged(f rule.Finding, limit rule.Amount) rule.Finding {
	if f.Relation == rule.AtLeast {
		return f.Least(*f.Provided, limit, f.Stated)
	}
	return f.Most(*f.Provided, limit, f.Stated)
}

// underSource is a finding whose limit now comes from a source of its own.
func underSource(f rule.Finding, s rule.Source) rule.Finding {
	all := []rule.Source{s}
	for _, own := range f.Sources {
		own.Governs = false
		all = append(all, own)
	}
	f.Sources = all
	return f
}
