package html

import (
	"fmt"
	"strings"

	"kilovet/hv/document"
)

// faulty is the page of a description with faults.
type faulty struct {
	shell
	Faults []document.Fault
	Lines  []sourceLine
}

type sourceLine struct {
	Number int
	Text   string
	Faults []document.Fault
}

func faultsPage(name string, description []byte, faults document.Faults, o Options) *faulty {
	title := fmt.Sprintf("%d faults in %s", len(faults), clean(name))
	if len(faults) == 1 {
		title = "1 fault in " + clean(name)
	}
	p := &faulty{shell: newShell(title, "The description cannot be reviewed", o)}
	at := map[int][]document.Fault{}
	for _, f := range faults {
		f.Key, f.What, f.Remedy = clean(f.Key), clean(f.What), clean(f.Remedy)
		p.Faults = append(p.Faults, f)
		at[f.Line] = append(at[f.Line], f)
	}
	for i, line := range strings.Split(strings.TrimSuffix(string(description), "\n"), "\n") {
		p.Lines = append(p.Lines, sourceLine{i + 1, clean(strings.TrimSuffix(line, "\r")), at[i+1]})
	}
	return p
}
