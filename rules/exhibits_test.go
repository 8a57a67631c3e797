package rules_test

import (
	"testing"
)

// Every exhibit of the built-in descriptions can be drawn, is named once, and belongs
// to something.
func TestExhibitsAreWhole(t *testing.T) {
	for _, name := range []string{"column", "positive", "spacings", "faulty", "plate", "lead"} {
		r := reviewedWhole(t, described(t, name))
		seen := map[[2]string]bool{}
		once := func(id, subject string) {
			if seen[[2]string{id, subject}] {
				t.Errorf("%s: exhibit %s of %q twice", name, id, subject)
			}
			seen[[2]string{id, subject}] = true
		}
		for _, c := range r.Curves {
			once(c.ID, c.Subject)
			if err := c.Check(); err != nil {
				t.Errorf("%s: %v", name, err)
			}
			if c.Title == "" || c.Chapter == "" || c.Basis == "" || c.X.Unit == "" || c.Y.Unit == "" || len(c.Lines) == 0 {
				t.Errorf("%s: curve %s is not whole", name, c.ID)
			}
		}
		for _, table := range r.Tables {
			once(table.ID, table.Subject)
			if err := table.Check(); err != nil {
				t.Errorf("%s: %v", name, err)
			}
			if table.Title == "" || table.Chapter == "" || table.Basis == "" || len(table.Columns) == 0 || len(table.Rows) == 0 {
				t.Errorf("%s: table %s is not whole", name, table.ID)
			}
		}
	}
}
