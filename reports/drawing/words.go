package drawing

import (
	"fmt"
	"strings"

	"kilovet/rules/diagram"
)

// Words says what a schematic shows, for those who do not see it.
func Words(d *diagram.Diagram) string {
	if d == nil {
		return "Nothing is drawn."
	}
	columns := "one coupling column"
	if len(d.Ladder.Columns) > 1 {
		columns = "two coupling columns in antiphase"
	}
	stages := "1 stage"
	if n := len(d.Ladder.Stages); n > 1 {
		stages = fmt.Sprintf("%d stages", n)
	}
	return fmt.Sprintf("A multiplier of %s with %s feeds %s. %s", stages, columns, line(d), marked(d))
}

// line names what lies on the way from the multiplier to its end.
func line(d *diagram.Diagram) string {
	var on []string
	for _, span := range d.Rail {
		if span.Series != nil {
			on = append(on, span.Series.Name)
		}
	}
	end := "the output"
	if d.Gun != nil {
		end = "the cathode"
	}
	if on == nil {
		return end
	}
	return end + " through " + strings.Join(on, ", ")
}

func marked(d *diagram.Diagram) string {
	if len(d.Marks) == 0 {
		return "No part is marked."
	}
	all := make([]string, len(d.Marks))
	for i, m := range d.Marks {
		all[i] = fmt.Sprintf("%s %s", m.Subject, m.Verdict)
	}
	return "Marked: " + strings.Join(all, "; ") + "."
}
