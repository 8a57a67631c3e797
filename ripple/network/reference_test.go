package network

import (
	"encoding/json"
	"fmt"
	"os"
	"strings"
	"testing"

	"kilovet/hv/chain"
	"kilovet/hv/circuit"
	"kilovet/hv/quantity"
)

// figure is a value of the reference simulation with its uncertainty.
type figure struct{ Value, U float64 }

// figures are values in the order of the parts.
type figures struct{ Value, U []float64 }

type topFigures struct {
	Mean, Min, Max, RippleH1, RippleH2 figure
	Ripple                             figure
}

func (f *topFigures) UnmarshalJSON(b []byte) error {
	var m map[string]figure
	if err := json.Unmarshal(b, &m); err != nil {
		return err
	}
	*f = topFigures{m["mean"], m["min"], m["max"], m["ripple_h1_amplitude"], m["ripple_h2_amplitude"], m["ripple_pp"]}
	return nil
}

// reference is one case of the independent simulation in testdata/cases.json.
type reference struct {
	ID, Title string
	Inputs    struct {
		Topology, Drive   string
		Polarity          int
		N                 int
		F, Vp, Rs, Ls, Vf float64
		ROn               float64 `json:"R_on"`
		GOff              float64 `json:"G_off"`
		Cj                float64
		StrayCols         float64   `json:"C_stray_cols"`
		StrayGnd          float64   `json:"C_stray_gnd"`
		Rf                float64   `json:"R_f"`
		Cf                float64   `json:"C_f"`
		ILoad             float64   `json:"I_load"`
		RLoad             float64   `json:"R_load"`
		Cac               []float64 `json:"C_ac"`
		Cdc               []float64 `json:"C_dc"`
	}
	Results struct {
		Top         topFigures                 `json:"v_top"`
		Load        *topFigures                `json:"v_load"`
		Cap         map[string]json.RawMessage `json:"v_cap_mean"`
		Piv         figures
		PivB        *figures `json:"piv_b"`
		Peak        figures  `json:"i_diode_peak"`
		PeakB       *figures `json:"i_diode_peak_b"`
		Mean        figures  `json:"i_diode_mean"`
		SourceRMS   figure   `json:"i_source_rms"`
		SourcePeak  figure   `json:"i_source_peak"`
		PowerIn     figure   `json:"p_in"`
		PowerOut    figure   `json:"p_out"`
		PowerDiodes figure   `json:"p_diodes"`
		PowerRs     figure   `json:"p_source_resistance"`
		PowerRf     figure   `json:"p_filter_resistance"`
		Rise        figure   `json:"t95_top"`
		StartSource figure   `json:"startup_i_source_peak"`
		StartDiode  figures  `json:"startup_i_diode_peak"`
		StartPiv    figures  `json:"startup_piv"`
	}
}

func references(t testing.TB) []reference {
	t.Helper()
	data, err := os.ReadFile("testdata/cases.json")
	if err != nil {
		t.Fatal(err)
	}
	var all struct{ Cases []reference }
	if err := json.Unmarshal(data, &all); err != nil {
		t.Fatal(err)
	}
	return all.Cases
}

func list(values []float64) string {
	var b strings.Builder
	for i, v := range values {
		if i > 0 {
			b.WriteString(", ")
		}
		fmt.Fprintf(&b, "%q", fmt.Sprintf("%.12g F", v))
	}
	return "[" + b.String() + "]"
}

// describe writes a reference case as a description.
func (r *reference) describe() string {
	in := &r.Inputs
	topology, polarity := "half-wave", "positive"
	if in.Topology == "symmetric" {
		topology = "symmetrical"
	}
	if in.Polarity < 0 {
		polarity = "negative"
	}
	var b strings.Builder
	fmt.Fprintf(&b, "format = 1\n[drive]\nwaveform = %q\nfrequency = \"%.12g Hz\"\npeak = \"%.12g V\"\nresistance = \"%.12g ohm\"\ninductance = \"%.12g H\"\n", in.Drive, in.F, in.Vp, in.Rs, in.Ls)
	fmt.Fprintf(&b, "[multiplier]\ntopology = %q\npolarity = %q\nstages = %d\n", topology, polarity, in.N)
	fmt.Fprintf(&b, "coupling_capacitor = { value = %s }\nsmoothing_capacitor = { value = %s }\n", list(in.Cac), list(in.Cdc))
	fmt.Fprintf(&b, "diode = { forward_drop = \"%.12g V\", resistance = \"%.12g ohm\", capacitance = \"%.12g F\", leakage = \"%.12g A\", rated_voltage = \"1 kV\" }\n", in.Vf, in.ROn, in.Cj, in.GOff*1000)
	fmt.Fprintf(&b, "stray_between_columns = \"%.12g F\"\nstray_to_ground = \"%.12g F\"\npickup_to_output = \"0 F\"\n", in.StrayCols, in.StrayGnd)
	if in.Rf > 0 {
		fmt.Fprintf(&b, "[[filter]]\nresistor = { value = \"%.12g ohm\" }\ncapacitor = { value = \"%.12g F\" }\nbypass_capacitance = \"0 F\"\n", in.Rf, in.Cf)
	}
	switch {
	case in.ILoad > 0:
		fmt.Fprintf(&b, "[[load]]\nname = \"load\"\nat = \"output\"\ncurrent = \"%.12g A\"\n", in.ILoad)
	case in.RLoad > 0:
		fmt.Fprintf(&b, "[[load]]\nname = \"load\"\nat = \"output\"\nresistance = \"%.12g ohm\"\n", in.RLoad)
	}
	return b.String()
}

// build makes the circuit of a description at the peak it gives.
func build(t testing.TB, text string) *circuit.Circuit {
	t.Helper()
	return buildFor(t, text)
}

func buildFor(t interface{ Fatalf(string, ...any) }, text string) *circuit.Circuit {
	c, faults := chain.Read([]byte(text))
	if len(faults) > 0 {
		t.Fatalf("%v\n%s", faults, text)
	}
	var peak quantity.Voltage
	if c.Drive != nil {
		peak = c.Drive.Peak.V
	}
	s := circuit.Setting{Peak: peak}
	if c.Gun != nil {
		s.Emission = c.Gun.Emission.V
	}
	return circuit.Build(c, s)
}
