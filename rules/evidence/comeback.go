package evidence

import (
	"fmt"
	"strings"

	"kilovet/hv/quantity"
	"kilovet/hv/touch"
)

// Return is what comes back at the top of a column of capacitors after it was discharged for
// a short time.
type Return struct {
	Column  string
	Parts   int // capacitors in it
	Voltage quantity.Voltage
	Assumed []string // dielectrics of which nothing is published
}

// MostComesBack is the column at which most comes back: what its capacitors get back by
// themselves, one above the other.
func (e *Evidence) MostComesBack() (Return, error) {
	all, err := e.Comebacks()
	if err != nil {
		return Return{}, err
	}
	var columns []Return
	at := map[string]int{}
	for _, b := range all {
		name := columnOf(b.Part)
		i, known := at[name]
		if !known {
			i = len(columns)
			at[name] = i
			columns = append(columns, Return{Column: name})
		}
		v, assumed := bounded(b)
		columns[i].Voltage += v
		columns[i].Parts++
		if assumed != "" && len(columns[i].Assumed) == 0 {
			columns[i].Assumed = []string{assumed}
		}
	}
	var most Return
	for _, c := range columns {
		if c.Voltage > most.Voltage {
			most = c
		}
	}
	return most, nil
}

// columnOf is the name of a capacitor without its number in a column.
func columnOf(part string) string {
	if i := strings.LastIndex(part, "."); i >= 0 && strings.Trim(part[i+1:], "0123456789") == "" {
		return part[:i]
	}
	return part
}

// bounded is what comes back on a capacitor; where nothing is published of its dielectric,
// the largest share that is of any.
func bounded(b Comeback) (quantity.Voltage, string) {
	if b.Err == nil {
		return b.Back.Voltage, ""
	}
	bound := touch.LargestAbsorption()
	return b.Voltage * quantity.Voltage(bound.Most), fmt.Sprintf("the dielectric of %s gives back no more than the largest share published here, %s of %s", columnOf(b.Part), quantity.Text(bound.Most), bound.Dielectric)
}
