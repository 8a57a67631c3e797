package exhibit

import (
	"fmt"
	"math"
)

// Check says what is wrong with a curve: nothing where it can be drawn.
func (c Curve) Check() error {
	for _, l := range c.Lines {
		for _, p := range l.Points {
			if !c.X.holds(p.X) || !c.Y.holds(p.Y) {
				return fmt.Errorf("exhibit: curve %s of %q: line %q has a point (%g, %g) that its axes cannot show", c.ID, c.Subject, l.Name, p.X, p.Y)
			}
		}
	}
	for _, a := range c.Areas {
		for _, b := range a.Boxes {
			if !c.X.holds(b[0].X) || !c.X.holds(b[1].X) || !c.Y.holds(b[0].Y) || !c.Y.holds(b[1].Y) || !(a.Share >= 0 && a.Share <= 1) {
				return fmt.Errorf("exhibit: curve %s of %q: area %q cannot be shown", c.ID, c.Subject, a.Name)
			}
		}
	}
	for _, m := range c.Marks {
		if !c.X.holds(m.X) || !c.Y.holds(m.Y) {
			return fmt.Errorf("exhibit: curve %s of %q: mark %q at (%g, %g) cannot be shown", c.ID, c.Subject, m.Name, m.X, m.Y)
		}
	}
	for _, l := range c.Levels {
		axis := c.Y
		if l.Along {
			axis = c.X
		}
		if !axis.holds(l.Value) {
			return fmt.Errorf("exhibit: curve %s of %q: level %q at %g cannot be shown", c.ID, c.Subject, l.Name, l.Value)
		}
	}
	return nil
}

// holds reports whether an axis can show a value.
func (a Axis) holds(v float64) bool {
	return !math.IsNaN(v) && !math.IsInf(v, 0) && (!a.Log || v > 0)
}

// Check says what is wrong with a table: nothing where it can be set.
func (t Table) Check() error {
	for i, row := range t.Rows {
		if len(row) != len(t.Columns) {
			return fmt.Errorf("exhibit: table %s of %q: row %d has %d cells for %d columns", t.ID, t.Subject, i, len(row), len(t.Columns))
		}
		for _, c := range row {
			if c.Value != nil && (math.IsNaN(*c.Value) || math.IsInf(*c.Value, 0)) {
				return fmt.Errorf("exhibit: table %s of %q: row %d holds a number that is not finite", t.ID, t.Subject, i)
			}
		}
	}
	return nil
}
