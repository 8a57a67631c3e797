package trace

import (
	"strings"
)

// Units that a record may be in.
var (
	timeUnits    = map[string]float64{"s": 1, "ms": 1e-3, "us": 1e-6, "µs": 1e-6, "μs": 1e-6, "ns": 1e-9, "ps": 1e-12}
	voltageUnits = map[string]float64{"kV": 1e3, "V": 1, "mV": 1e-3, "uV": 1e-6, "µV": 1e-6, "μV": 1e-6}
	unitWords    = map[string]string{"Second": "s", "second": "s", "seconds": "s", "Seconds": "s", "Sec": "s", "sec": "s", "S": "s", "Volt": "V", "volt": "V", "volts": "V", "Volts": "V"}
)

// units settles what the columns are in: as told, else as headed, else seconds and volts.
func (p *parser) units(line int) error {
	var err error
	if p.second, err = p.unit(line, 0, p.TimeUnit, "s", timeUnits, "time_unit"); err != nil {
		return err
	}
	p.volt, err = p.unit(line, 1, p.VoltageUnit, "V", voltageUnits, "voltage_unit")
	return err
}

func (p *parser) unit(line, column int, told, usual string, known map[string]float64, key string) (float64, error) {
	if told != "" {
		return known[told], nil
	}
	for i := len(p.header) - 1; i >= 0; i-- {
		fields := strings.Split(p.header[i], "\x00")
		if column >= len(fields) {
			continue
		}
		name, there := headedUnit(fields[column])
		if !there {
			continue
		}
		if scale, ok := known[name]; ok {
			return scale, nil
		}
		if strings.ContainsAny(fields[column], "([") {
			return 0, &Fault{line, "the header gives the unit " + name + ", which is not known here", "state " + key}
		}
	}
	return known[usual], nil
}

// headedUnit is the unit that a heading names: in brackets at its end, or alone.
func headedUnit(heading string) (string, bool) {
	text := strings.Trim(strings.TrimSpace(heading), `"`)
	if open := strings.LastIndexAny(text, "(["); open >= 0 {
		text = strings.TrimRight(strings.TrimSpace(text[open+1:]), ")] ")
	} else if strings.ContainsAny(text, " _") {
		return "", false
	}
	if word, ok := unitWords[text]; ok {
		return word, true
	}
	return text, text != ""
}
