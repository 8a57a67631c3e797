package diagram

import (
	"fmt"
	"strings"

	"kilovet/hv/chain"
	"kilovet/hv/circuit"
	"kilovet/hv/document"
	"kilovet/hv/quantity"
)

// kind is what an element is drawn as.
func (b *builder) kind(el *circuit.Element) Kind {
	switch el.Kind {
	case circuit.Resistor:
		if el.Name == "divider.meter" || el.LoosePart != nil && el.LoosePart.Kind.V == "meter" {
			return Meter
		}
		return Resistor
	case circuit.Capacitor:
		return b.capacitor(el.Name)
	case circuit.Inductor:
		return Inductor
	case circuit.Diode:
		return Diode
	case circuit.Sink:
		return Drain
	case circuit.Source:
		return b.source(el)
	}
	return b.limiter(el)
}

func (b *builder) capacitor(name string) Kind {
	switch name {
	case "cable":
		return Cable
	case "heater.feed":
		return Transformer
	}
	return Capacitor
}

func (b *builder) source(el *circuit.Element) Kind {
	switch {
	case el.Wave.Form != circuit.Direct:
		return Alternating
	case el.Name == "heater.supply" && b.chain.Heater.Feed != nil && b.chain.Heater.Feed.Kind.V == "battery":
		return Battery
	}
	return Direct
}

// limiter is the kind of a clamp or gap; one of no stated kind is drawn as a spark gap.
func (b *builder) limiter(el *circuit.Element) Kind {
	var stated string
	switch {
	case el.LoosePart != nil:
		stated = el.LoosePart.Kind.V
	case el.Name == "divider.clamp":
		stated = b.chain.Divider.Clamp.Kind.V
	case el.Name == "bias.clamp":
		stated = b.chain.Bias.Clamp.Kind.V
	}
	for _, k := range []Kind{GasTube, Varistor, Zener} {
		if stated == string(k) {
			return k
		}
	}
	return SparkGap
}

// value is what stands beside an element.
func (b *builder) value(el *circuit.Element) string {
	switch {
	case el.Name == "cable":
		return strings.Join(given(shown(b.chain.Cable.Length), capacitance(el)), ", ")
	case strings.HasPrefix(el.Name, "drive.source"):
		return fmt.Sprintf("%s peak, %s", quantity.Text(b.chain.Drive.Peak.V), quantity.Text(b.chain.Drive.Frequency.V))
	case el.Name == "heater.supply":
		return strings.Join(given(shown(b.chain.Heater.Voltage), shown(b.chain.Heater.Current)), ", ")
	case el.Name == "heater.feed":
		return feed(b.chain.Heater.Feed)
	case el.Name == "mains":
		return shown(b.chain.Heater.Feed.CommonMode)
	case el.Name == "gun":
		return b.emission()
	case el.ResistorPart != nil:
		return elements(el.ResistorPart)
	}
	return plain(el)
}

func plain(el *circuit.Element) string {
	switch el.Kind {
	case circuit.Resistor:
		return quantity.Text(el.Resistance)
	case circuit.Capacitor:
		return capacitance(el)
	case circuit.Inductor:
		return quantity.Text(el.Inductance)
	case circuit.Sink:
		return quantity.Text(el.Current)
	case circuit.Source:
		return quantity.Text(max(el.Wave.Amplitude, -el.Wave.Amplitude))
	case circuit.Gap:
		return quantity.Text(el.Strikes)
	}
	return ""
}

// capacitance is that of an element; empty where it is not known.
func capacitance(el *circuit.Element) string {
	if el.Doubt != nil && el.Capacitance == 0 {
		return ""
	}
	return quantity.Text(el.Capacitance)
}

// elements says how a resistor is made up: "4 × 500 MΩ, 2 strings".
func elements(r *chain.Resistor) string {
	count, strings := r.Elements()
	value := quantity.Text(r.Value.V)
	if count > 1 {
		value = fmt.Sprintf("%d × %s", count, value)
	}
	if strings > 1 {
		value += fmt.Sprintf(", %d strings", strings)
	}
	return value
}

func feed(f *chain.Feed) string {
	value := shown(f.Capacitance)
	if f.Screen.V {
		value = strings.Join(given(value, "screened"), ", ")
	}
	return value
}

// emission is the gun's current in the working state; empty where it is not known.
func (b *builder) emission() string {
	i, err := b.e.Emission()
	if err != nil {
		return ""
	}
	return quantity.Text(i)
}

func shown[Q quantity.Number](g document.Given[Q]) string {
	if !g.Set() {
		return ""
	}
	return quantity.Text(g.V)
}

// given keeps the texts that are there.
func given(texts ...string) []string {
	var kept []string
	for _, t := range texts {
		if t != "" {
			kept = append(kept, t)
		}
	}
	return kept
}
