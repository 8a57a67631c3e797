// Package procedure writes the plan of a first power-up, the form for its readings,
// and what the readings say.
package procedure

import (
	"fmt"

	"kilovet/hv/quantity"
	"kilovet/reports/lines"
	"kilovet/rules/plan"
)

// Options say how wide the lines are and what stands first.
type Options struct {
	Width int    // 80 where zero
	Title string // of the chain
	Note  string // to stand before everything
}

const deference = "This plan is computed from a description and is no permission to switch on. Local electrical codes and the judgement of licensed persons come first; where they ask for more, they govern."

// Text writes the plan with boxes to fill in.
func Text(p *plan.Plan, o Options) []byte {
	w := lines.New(o.Width)
	if o.Note != "" {
		w.Hang("", 0, o.Note)
	}
	w.Hang("", 0, "First power-up: "+o.Title)
	w.Line("")
	w.Hang("", 0, deference)
	cold(w, p.Cold)
	list(w, "Before the first voltage", p.Before)
	list(w, "Switch off at once at", p.Stops)
	w.Section("Steps", len(p.Steps))
	for i := range p.Steps {
		step(w, i+1, &p.Steps[i])
	}
	survey(w, p.Survey)
	trips(w, p.Trips)
	list(w, "After every step and at the end", p.After)
	list(w, "Taken for granted", p.Takes)
	list(w, "Not planned", p.Open)
	return w.Bytes()
}

// box is where a reading or a mark is written in.
const box = "[__________]"

func list(w *lines.Writer, title string, texts []string) {
	w.Section(title, len(texts))
	for _, t := range texts {
		w.Hang("[ ] ", 4, t)
	}
}

func cold(w *lines.Writer, checks []plan.Check) {
	w.Section("Cold checks: all off, unplugged, earthed first", len(checks))
	for _, c := range checks {
		w.Hang("[ ] ", 4, c.What+", "+c.Across)
		w.Hang("", 6, c.With+": "+expected(c)+"  "+box)
	}
}

func expected(c plan.Check) string {
	if c.Words != "" {
		return c.Words
	}
	return c.Expected.Text()
}

func step(w *lines.Writer, number int, s *plan.Step) {
	w.Hang(fmt.Sprintf("%2d  ", number), 4, s.Name)
	for _, first := range s.First {
		w.Hang("    [ ] ", 8, first)
	}
	w.Hang("    ", 4, fmt.Sprintf("set the drive to %s, hold for %s; output %s%s, drive power %s",
		quantity.Text(s.Peak), quantity.Text(s.Dwell), quantity.Text(s.Output), ripple(s), quantity.Text(s.Power)))
	if s.Within.Unit != "" {
		w.Hang("    ", 4, "return of the multiplier: "+s.Within.Text()+" and the error of the ammeter; what is more is leakage or corona  "+box)
	}
	if s.Polarity != "" {
		w.Hang("    ", 4, "polarity of the output to ground: "+s.Polarity+"  "+box)
	}
	for _, r := range s.Readings {
		w.Hang("    ", 4, r.Instrument+": "+r.Text()+"  "+box)
	}
	w.Hang("    ", 4, "after switching off: "+fall(s))
	w.Line("")
}

func ripple(s *plan.Step) string {
	if s.Ripple == nil {
		return ""
	}
	return ", ripple " + quantity.Text(*s.Ripple) + " peak to peak"
}

func fall(s *plan.Step) string {
	d := s.Discharge
	if d.Never {
		return fmt.Sprintf("%s stays at %s until the rod is on it", d.Node, quantity.Text(d.Left))
	}
	return fmt.Sprintf("below 60 V everywhere after %s (%s is last)", quantity.Text(d.Time), d.Node)
}

func survey(w *lines.Writer, points []plan.Survey) {
	w.Section("Radiation survey", len(points))
	for _, s := range points {
		text := "no estimate: " + s.Open
		if s.Open == "" {
			text = "estimated at most " + quantity.Text(s.Highest) + " at 0.1 m; an estimate replaces no survey"
		}
		w.Hang("[ ] ", 4, s.Shield+", "+s.Step+": "+text+"  "+box)
	}
}

func trips(w *lines.Writer, all []plan.Trip) {
	w.Section("Trips to prove at a low level", len(all))
	for _, t := range all {
		w.Hang("[ ] ", 4, fmt.Sprintf("%s: set to %s; working brings up to %s", t.What, t.Set, t.Working))
	}
}
