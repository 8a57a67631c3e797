package drawing

import (
	"fmt"
	"strings"

	"kilovet/reports/digest"
	"kilovet/rules/exhibit"
)

// CurveWords says what a curve shows, for those who do not see it and where nothing can
// be drawn: what is laid off over what, and from where to where each line goes.
func CurveWords(c exhibit.Curve) string {
	parts := []string{fmt.Sprintf("%s over %s.", sentence(c.Y.What), c.X.What)}
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
		parts = append(parts, fmt.Sprintf("Level %s: %s.", l.Name, amount(l.Value, axis.Unit)))
	}
	for _, m := range c.Marks {
		parts = append(parts, fmt.Sprintf("Mark %s: %s at %s.", m.Name, amount(m.Y, c.Y.Unit), amount(m.X, c.X.Unit)))
	}
	return digest.Clean(strings.Join(parts, " "))
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
	return fmt.Sprintf("Line %s: from %s to %s, between %s at %s and %s at %s.", l.Name, amount(first.X, c.X.Unit), amount(last.X, c.X.Unit),
		amount(low.Y, c.Y.Unit), amount(low.X, c.X.Unit), amount(high.Y, c.Y.Unit), amount(high.X, c.X.Unit))
}

// sentence begins with a capital.
func sentence(text string) string {
	if text == "" {
		return text
	}
	r := []rune(text)
	return strings.ToUpper(string(r[:1])) + string(r[1:])
}
