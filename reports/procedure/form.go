package procedure

import (
	"bytes"
	"fmt"
	"slices"
	"strings"

	"kilovet/hv/quantity"
	"kilovet/reports/digest"
	"kilovet/rules/plan"
)

// Heading says which description a form belongs to.
type Heading struct{ Document, Revision, SHA256 string }

// Form writes the steps of a plan as a TOML form: what is read goes into it.
func Form(p *plan.Plan, h Heading) []byte {
	var out bytes.Buffer
	fmt.Fprintln(&out, `# Readings of a first power-up. Take away the # before a value and write what was
# read, with its unit; leave what was not read as it is. The drive of a step is the
# peak (zero to peak) that was really set. Readings are magnitudes: the sign of the
# output is the polarity, positive or negative.`)
	fmt.Fprintln(&out, "format      = 1")
	for _, key := range [...]struct{ key, value string }{{"document   ", h.Document}, {"revision   ", h.Revision}, {"description", h.SHA256}} {
		if key.value != "" {
			fmt.Fprintf(&out, "%s = %s\n", key.key, quoted(key.value))
		}
	}
	if slices.ContainsFunc(p.Steps, func(s plan.Step) bool { return s.Within.Unit != "" }) {
		fmt.Fprintln(&out, "# The return current is not among the readings: no [[instrument]] that reads it is\n# described, so its error is not known. Describe one (reads = \"return current\").")
	}
	for i := range p.Steps {
		formStep(&out, &p.Steps[i])
	}
	return out.Bytes()
}

func formStep(out *bytes.Buffer, s *plan.Step) {
	fmt.Fprintf(out, "\n[[step]]\nname  = %s\ndrive = %s\n", quoted(s.Name), quoted(quantity.Text(s.Peak)))
	if s.Polarity != "" {
		fmt.Fprintf(out, "# polarity = \"…\" # expected %s\n", s.Polarity)
	}
	for _, r := range s.Readings {
		fmt.Fprintf(out, "[[step.reading]]\ninstrument = %s\n# value = %s # expected %s\n", quoted(r.Instrument), quoted("… "+quantity.DimensionOf(r.Unit).SI), r.Text())
	}
}

// quoted writes a text as a TOML string.
func quoted(s string) string {
	return `"` + strings.NewReplacer(`\`, `\\`, `"`, `\"`).Replace(digest.Clean(s)) + `"`
}
