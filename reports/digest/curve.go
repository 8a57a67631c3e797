package digest

import (
	"fmt"
	"strings"

	"kilovet/hv/quantity"
	"kilovet/rules/exhibit"
	"kilovet/rules/rule"
)

// Value writes a value of an axis in its unit; pure numbers as they are.
func Value(v float64, unit string) string {
	if unit == "1" {
		return quantity.Significant(v)
	}
	return Amount(rule.Amount{Value: v, Unit: unit})
}

// CurveWords says what a curve shows, for those who do not see it and where nothing can
// be drawn: what is laid off over what, and from where to where each line goes.
func CurveWords(c exhibit.Curve) string {
	parts := []string{fmt.Sprintf("%s over %s.", Capital(c.Y.What), c.X.What)}
	for _, l := range c.Lines {
		if len(l.Points) > 0 {
			parts = append(parts, lineWords(c, l))
		}
	}
	for _, l := range c.Levels {
		axis := c.Y
		if l.Along {
			axis = c.X
		}
		parts = append(parts, fmt.Sprintf("Level %s: %s.", l.Name, Value(l.Value, axis.Unit)))
	}
	for _, m := range c.Marks {
		parts = append(parts, fmt.Sprintf("Mark %s: %s at %s.", m.Name, Value(m.Y, c.Y.Unit), Value(m.X, c.X.Unit)))
	}
	return Clean(strings.Join(parts, " "))
}

func lineWords(c exhibit.Curve, l exhibit.Line) string {
	low, high := l.Points[0], l.Points[0]
	for _, p := range l.Points {
		if p.Y < low.Y {
			low = p
		}
		if p.Y > high.Y {
			high = p
		}
	}
	first, last := l.Points[0], l.Points[len(l.Points)-1]
	return fmt.Sprintf("Line %s: from %s to %s, between %s at %s and %s at %s.", l.Name, Value(first.X, c.X.Unit), Value(last.X, c.X.Unit),
		Value(low.Y, c.Y.Unit), Value(low.X, c.X.Unit), Value(high.Y, c.Y.Unit), Value(high.X, c.X.Unit))
}

// Capital begins with a capital.
func Capital(text string) string {
	if text == "" {
		return text
	}
	r := []rune(text)
	return strings.ToUpper(string(r[:1])) + string(r[1:])
}
