package rules_test

import (
	"encoding/json"
	"fmt"
	"math"
	"os"
	"strings"
	"testing"

	"kilovet/rules"
)

// networkCase is a ladder solved by an independent brute-force simulation in time.
type networkCase struct {
	ID     string
	Inputs struct {
		Topology, Drive string
		Polarity, N     int
		Rs, Ls, Vf      float64
		ROn             float64 `json:"R_on"`
		GOff            float64 `json:"G_off"`
		Cj              float64
		StrayCols       float64 `json:"C_stray_cols"`
		StrayGnd        float64 `json:"C_stray_gnd"`
		Rf              float64 `json:"R_f"`
		Cf              float64 `json:"C_f"`
		ILoad           float64 `json:"I_load"`
		RLoad           float64 `json:"R_load"`
		F               float64 `json:"f"`
		Vp              float64
		CAC             []float64 `json:"C_ac"`
		CDC             []float64 `json:"C_dc"`
	}
	Results struct {
		Top  levels  `json:"v_top"`
		Load *levels `json:"v_load"`
		PIV  list    `json:"piv"`
		Peak list    `json:"i_diode_peak"`
		PIn  scalar  `json:"p_in"`
		T95  scalar  `json:"t95_top"`
	}
}

type scalar struct{ Value float64 }

type list struct{ Value []float64 }

type levels struct {
	Mean, Min, Max scalar
	Ripple         scalar `json:"ripple_pp"`
	First          scalar `json:"ripple_h1_amplitude"`
	Second         scalar `json:"ripple_h2_amplitude"`
}

// description writes the case as a person would describe it.
func (c networkCase) description() string {
	in := c.Inputs
	var b strings.Builder
	put := func(format string, args ...any) { fmt.Fprintf(&b, format+"\n", args...) }
	put("format = 1\n[drive]\nwaveform = %q\nfrequency = \"%g Hz\"\npeak = \"%g V\"\nresistance = \"%g ohm\"\ninductance = \"%g H\"", in.Drive, in.F, in.Vp, in.Rs, in.Ls)
	topology := map[string]string{"half": "half-wave", "symmetric": "symmetrical"}[in.Topology]
	if topology == "symmetrical" {
		put("unbalance = \"0 %%\"")
	}
	put("[multiplier]\ntopology = %q\npolarity = %q\nstages = %d", topology, map[int]string{1: "positive", -1: "negative"}[in.Polarity], in.N)
	put("coupling_capacitor = { value = [%s] }\nsmoothing_capacitor = { value = [%s] }", farads(in.CAC), farads(in.CDC))
	put("diode = { rated_voltage = \"1 kV\", forward_drop = \"%g V\", resistance = \"%g ohm\", capacitance = \"%g F\", leakage = \"%g A\" }", in.Vf, in.ROn, in.Cj, 1000*in.GOff)
	put("stray_between_columns = \"%g F\"\nstray_to_ground = \"%g F\"\npickup_to_output = \"0 F\"", in.StrayCols, in.StrayGnd)
	if in.Rf > 0 {
		put("[[filter]]\nresistor = { value = \"%g ohm\" }\ncapacitor = { value = \"%g F\" }\nbypass_capacitance = \"0 F\"", in.Rf, in.Cf)
	}
	put("[[load]]\nname = \"load\"\nat = \"output\"")
	if in.RLoad > 0 {
		put("resistance = \"%g ohm\"", in.RLoad)
	} else {
		put("current = \"%g A\"", in.ILoad)
	}
	return b.String()
}

func farads(values []float64) string {
	words := make([]string, len(values))
	for i, v := range values {
		words[i] = fmt.Sprintf("\"%g F\"", v)
	}
	return strings.Join(words, ", ")
}

func networkCases(t *testing.T) []networkCase {
	t.Helper()
	data, err := os.ReadFile("../ripple/network/testdata/cases.json")
	if err != nil {
		t.Fatal(err)
	}
	var all struct{ Cases []networkCase }
	if err := json.Unmarshal(data, &all); err != nil {
		t.Fatal(err)
	}
	return all.Cases
}

// TestLaddersThroughTheWholeTool describes each reference ladder, reviews it, and
// wants the figures of the simulation within the stated bounds.
func TestLaddersThroughTheWholeTool(t *testing.T) {
	if testing.Short() {
		t.Skip("start-up of long ladders; the ordinary run has them")
	}
	for _, c := range networkCases(t) {
		t.Run(c.ID, func(t *testing.T) {
			r := reviewed(t, []byte(c.description()))
			top, in := c.Results.Top, c.Inputs
			mean := math.Abs(top.Mean.Value)
			ideal := 2 * float64(in.N) * (in.Vp - in.Vf)
			near(t, r, "multiplier.mean", mean, 1e-3)
			near(t, r, "multiplier.maximum", math.Max(math.Abs(top.Max.Value), math.Abs(top.Min.Value)), 1e-3)
			near(t, r, "multiplier.minimum", math.Min(math.Abs(top.Max.Value), math.Abs(top.Min.Value)), 1e-3)
			near(t, r, "multiplier.drop", ideal-mean, 5e-3)
			near(t, r, "multiplier.ripple", top.Ripple.Value, 1e-2)
			if top.First.Value > 1e-6*mean { // a balanced symmetrical cascade has none
				near(t, r, "multiplier.ripple_fundamental", top.First.Value, 1e-2)
			}
			near(t, r, "multiplier.ripple_second", top.Second.Value, 1e-2)
			near(t, r, "multiplier.diode_reverse_peak", largest(c.Results.PIV.Value), 5e-3)
			near(t, r, "multiplier.diode_current_peak", largest(c.Results.Peak.Value), 3e-2)
			near(t, r, "multiplier.input_power", c.Results.PIn.Value, 5e-3)
			near(t, r, "multiplier.rise_time", c.Results.T95.Value, math.Max(1e-2, 1/in.F/c.Results.T95.Value))
			if c.Results.Load != nil {
				near(t, r, "output.mean", math.Abs(c.Results.Load.Mean.Value), 1e-3)
				near(t, r, "output.ripple", c.Results.Load.Ripple.Value, 1e-2)
			}
		})
	}
}

func largest(values []float64) float64 {
	most := 0.0
	for _, v := range values {
		most = math.Max(most, v)
	}
	return most
}

// near wants a figure of the working state within a relative bound.
func near(t *testing.T, r *rules.Review, id string, want, within float64) {
	t.Helper()
	for _, f := range r.Figures {
		if f.ID == id && f.Subject == "" && (f.State == "working" || f.State == "") {
			if math.Abs(f.Value-want) > within*math.Abs(want) {
				t.Errorf("%s = %.6g, want %.6g within %g", id, f.Value, want, within)
			}
			return
		}
	}
	t.Errorf("%s is not listed", id)
}
