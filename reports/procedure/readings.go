package procedure

import (
	"fmt"
	"strings"

	"kilovet/hv/quantity"
	"kilovet/reports/lines"
	"kilovet/rules/readings"
)

const readingsDeference = "What readings point to is a place to look first, with everything off and earthed. It is no proof, and a reading within its bounds is no permission to go on: local electrical codes and licensed judgement come first."

// Readings writes what the readings of a form say.
func Readings(c *readings.Comparison, o Options) []byte {
	w := lines.New(o.Width)
	if o.Note != "" {
		w.Hang("", 0, o.Note)
	}
	w.Hang("", 0, "Readings: "+o.Title)
	polarities(w, c.Polarities)
	rows(w, c.Rows)
	w.Line("")
	switch {
	case c.Sign == readings.Reversed:
		reversed(w, c)
	case len(c.Rows) == 0 && c.Sign == readings.Proved:
		w.Hang("", 0, "Nothing but the polarity was read: nothing else is known.")
	case len(c.Rows) == 0:
		w.Hang("", 0, "Nothing was read: nothing is known.")
	case c.Sound:
		w.Hang("", 0, sound(c))
	default:
		suspects(w, c)
	}
	if c.Sign == readings.Untaken && len(c.Rows) > 0 {
		w.Line("")
		w.Hang("", 0, "The polarity was not taken. Readings are magnitudes: a chain whose whole ladder is reversed may show the same ones.")
	}
	w.Line("")
	w.Hang("", 0, readingsDeference)
	return w.Bytes()
}

// sound says what readings within their bounds come to, and how much of the plan they are.
func sound(c *readings.Comparison) string {
	if len(c.Rows) == c.Planned {
		return fmt.Sprintf("Every reading of the plan (%d) was taken and lies within its bounds; nothing points to a fault that these readings could show.", c.Planned)
	}
	return fmt.Sprintf("Every reading taken (%d of the %d of the plan) lies within its bounds; nothing points to a fault that these could show. Nothing is known of what was not read.", len(c.Rows), c.Planned)
}

func polarities(w *lines.Writer, all []readings.Polarity) {
	for i, p := range all {
		if i == 0 {
			w.Line("")
		}
		word := "right   "
		if !p.Within() {
			word = "WRONG   "
		}
		w.Hang("  "+word, 10, fmt.Sprintf("polarity of the output: %s, expected %s (%s)", p.Read, p.Expected, p.Step))
	}
}

// reversed says what a wrong polarity points to, and nothing else.
func reversed(w *lines.Writer, c *readings.Comparison) {
	w.Hang("", 0, "Switch off. The polarity is the wrong one; a reversed multiplier destroys what hangs on it. What the other readings point to was not looked for: prove the polarity first.")
	w.Section("What it points to, the likeliest first", len(c.Suspects))
	for i, s := range c.Suspects {
		w.Hang(fmt.Sprintf("%d  ", i+1), 3, strings.Join(s.Names, "; or "))
	}
}

func rows(w *lines.Writer, all []readings.Row) {
	step := ""
	for _, r := range all {
		if r.Step != step {
			w.Line("")
			w.Hang("", 0, r.Step)
			step = r.Step
		}
		word := "within  "
		if !r.Within {
			word = "OUTSIDE "
		}
		w.Hang("  "+word, 10, fmt.Sprintf("%s: %s, expected %s%s", r.Instrument, quantity.DimensionOf(r.Expected.Unit).Text(r.Read), r.Expected.Text(), surplus(r)))
	}
}

// surplus names what a current above the computed one is.
func surplus(r readings.Row) string {
	if r.Surplus <= 0 {
		return ""
	}
	return fmt.Sprintf("; %s more than computed: leakage or corona, unless parts, drive or instrument are off", quantity.Text(quantity.Current(r.Surplus)))
}

func suspects(w *lines.Writer, c *readings.Comparison) {
	what := "Readings lie outside their bounds"
	if c.Bent {
		what = "Every reading lies within its bounds, and yet they do not agree with each other"
	}
	w.Hang("", 0, fmt.Sprintf("Switch off. "+what+"; from a healthy chain they are %s standard errors away (rms). Of %d things that may be wrong, %d would not show in these readings.",
		quantity.Significant(c.Healthy), c.Tried, c.Unseen))
	if len(c.Suspects) == 0 {
		w.Line("")
		w.Hang("", 0, "Nothing that was tried explains them better than a healthy chain does whose parts, drive or instruments are at the ends of their tolerances."+hidden(c.Hidden))
	}
	w.Section("What they point to, the best first", len(c.Suspects))
	for i, s := range c.Suspects {
		text := strings.Join(shortened(s.Names, 8), "; or ")
		text += fmt.Sprintf(" (%s standard errors", quantity.Significant(s.Fit))
		if !s.Fits() {
			text += ": explains only part of it"
		}
		w.Hang(fmt.Sprintf("%d  ", i+1), 3, text+")")
	}
	apart(w, c)
	w.Section("What could not be computed", len(c.Open))
	for _, o := range c.Open {
		w.Hang("- ", 2, o)
	}
}

// hidden names what cannot be told from a healthy chain.
func hidden(names []string) string {
	if len(names) == 0 {
		return ""
	}
	return " As likely is what does not show in these readings: " + strings.Join(shortened(names, 8), "; or ") + "."
}

// apart says which further readings would separate what is left standing.
func apart(w *lines.Writer, c *readings.Comparison) {
	if c.Standing < 2 {
		return
	}
	w.Section("What would tell them apart", 1)
	if len(c.Apart) == 0 {
		w.Hang("", 0, fmt.Sprintf("The readings leave %d things standing. Neither what the plan reads nor the voltage of any node to ground or the return current would tell them apart: look at each with everything off and earthed.", c.Standing))
	}
	for _, a := range c.Apart {
		text := "a further instrument, which the plan does not have: " + a.What
		if a.Planned {
			text = a.What + ", which was not read"
		}
		var values []string
		for _, e := range a.Expected {
			values = append(values, rangeOf(e, a.Unit)+" if it is "+strings.Join(shortened(e.Names, 4), "; or "))
		}
		w.Hang("- ", 2, fmt.Sprintf("%s, in the step %q: %s", text, a.Step, strings.Join(values, "; ")))
	}
}

func rangeOf(e readings.Expectation, unit string) string {
	d := quantity.DimensionOf(unit)
	if low, high := d.Text(e.Low), d.Text(e.High); low != high {
		return low + " to " + high
	}
	return d.Text(e.High)
}

// shortened keeps a list of what looks alike readable.
func shortened(names []string, most int) []string {
	if len(names) <= most {
		return names
	}
	return append(names[:most:most], fmt.Sprintf("%d more that read alike", len(names)-most))
}
