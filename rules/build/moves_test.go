package build_test

import (
	"fmt"
	"math"
	"slices"
	"strings"
	"testing"

	"kilovet/hv/chain"
	"kilovet/hv/quantity"
	"kilovet/rules/build"
)

// drawn reads a description of fields.
func drawn(t *testing.T, text string) *chain.Field {
	t.Helper()
	c, faults := chain.Read([]byte("format = 1\n" + text))
	if len(faults) > 0 {
		t.Fatal(faults)
	}
	return &c.Fields[0]
}

func outline(kind, name, voltage, profile string) string {
	text := "[[field." + kind + "]]\n"
	switch kind {
	case "boundary":
		text += "kind = \"natural\"\n"
	case "electrodes":
		text += fmt.Sprintf("name = %q\nvoltage = %q\n", name, voltage)
	default:
		text += fmt.Sprintf("name = %q\npermittivity = 4\n", name)
	}
	return text + "profile = [" + profile + "]\n"
}

// rodGap is a rod with a half ball at its end over the floor of a can.
var rodGap = "[[field]]\nname = \"gap\"\nmedium = \"air\"\n" +
	outline("electrodes", "rod", "10 kV", `{ from = ["0 mm", "15 mm"] }, { to = ["5 mm", "20 mm"], centre = ["0 mm", "20 mm"], turn = "left" }, { to = ["5 mm", "170 mm"] }`) +
	outline("electrodes", "can", "0 V", `{ from = ["0 mm", "0 mm"] }, { to = ["150 mm", "0 mm"] }, { to = ["150 mm", "170 mm"] }`) +
	outline("boundary", "", "", `{ from = ["5 mm", "170 mm"] }, { to = ["150 mm", "170 mm"] }`)

// sleeved is a pin with a sleeve on it in the rounded hole of a plate, half of it.
var sleeved = "[[field]]\nname = \"lead\"\nmedium = \"vacuum\"\n" +
	outline("electrodes", "pin", "10 kV", `{ from = ["3 mm", "0 mm"] }, { to = ["3 mm", "80 mm"] }`) +
	outline("electrodes", "plate", "0 V", `{ from = ["10 mm", "0 mm"] }, { to = ["13 mm", "3 mm"], centre = ["13 mm", "0 mm"], turn = "right" }, { to = ["60 mm", "3 mm"] }, { to = ["60 mm", "80 mm"] }`) +
	outline("dielectrics", "sleeve", "", `{ from = ["3 mm", "0 mm"] }, { to = ["7 mm", "0 mm"] }, { to = ["7 mm", "20 mm"] }, { to = ["3 mm", "20 mm"] }, { to = ["3 mm", "0 mm"] }`) +
	outline("boundary", "", "", `{ from = ["3 mm", "0 mm"] }, { to = ["10 mm", "0 mm"] }`) +
	outline("boundary", "", "", `{ from = ["3 mm", "80 mm"] }, { to = ["60 mm", "80 mm"] }`)

// frustum is a spacer with a sloped side between two plates.
var frustum = "[[field]]\nname = \"spacer\"\nmedium = \"vacuum\"\n" +
	outline("electrodes", "cathode", "-10 kV", `{ from = ["0 mm", "0 mm"] }, { to = ["40 mm", "0 mm"] }`) +
	outline("electrodes", "anode", "0 V", `{ from = ["0 mm", "10 mm"] }, { to = ["40 mm", "10 mm"] }`) +
	outline("dielectrics", "spacer", "", `{ from = ["0 mm", "0 mm"] }, { to = ["15 mm", "0 mm"] }, { to = ["20 mm", "10 mm"] }, { to = ["0 mm", "10 mm"] }, { to = ["0 mm", "0 mm"] }`) +
	outline("boundary", "", "", `{ from = ["40 mm", "0 mm"] }, { to = ["40 mm", "10 mm"] }`)

// chamfered is a pin in a hole whose edge is a chamfer, half of it.
var chamfered = "[[field]]\nname = \"lead\"\nmedium = \"vacuum\"\n" +
	outline("electrodes", "pin", "10 kV", `{ from = ["3 mm", "0 mm"] }, { to = ["3 mm", "80 mm"] }`) +
	outline("electrodes", "plate", "0 V", `{ from = ["10 mm", "0 mm"] }, { to = ["10 mm", "4 mm"] }, { to = ["12 mm", "6 mm"] }, { to = ["60 mm", "6 mm"] }, { to = ["60 mm", "80 mm"] }`) +
	outline("boundary", "", "", `{ from = ["3 mm", "0 mm"] }, { to = ["10 mm", "0 mm"] }`) +
	outline("boundary", "", "", `{ from = ["3 mm", "80 mm"] }, { to = ["60 mm", "80 mm"] }`)

// cone is one of 30 degrees to the axis with a ball of 2 mm as its tip over the floor of a
// can.
var cone = "[[field]]\nname = \"tip\"\nmedium = \"air\"\n" +
	outline("electrodes", "cone", "10 kV", `{ from = ["0 mm", "10 mm"] }, { to = ["1.7320508 mm", "11 mm"], centre = ["0 mm", "12 mm"], turn = "left" }, { to = ["30.0222138 mm", "60 mm"] }`) +
	outline("electrodes", "can", "0 V", `{ from = ["0 mm", "0 mm"] }, { to = ["90 mm", "0 mm"] }, { to = ["90 mm", "60 mm"] }`) +
	outline("boundary", "", "", `{ from = ["30.0222138 mm", "60 mm"] }, { to = ["90 mm", "60 mm"] }`)

// places are all points of an arrangement in millimetres, in the order of the drawing.
func places(f *chain.Field) (list []string) {
	add := func(strokes []chain.Stroke) {
		for _, s := range strokes {
			for _, p := range [][]quantity.Length{s.From.V, s.To.V, s.Centre.V} {
				if len(p) == 2 {
					list = append(list, mmPoint(p))
				}
			}
		}
	}
	for _, el := range f.Electrodes {
		add(el.Profile)
	}
	for _, d := range f.Dielectrics {
		add(d.Profile)
	}
	for _, b := range f.Boundary {
		add(b.Profile)
	}
	return list
}

func mmPoint(p []quantity.Length) string {
	return fmt.Sprintf("%.4g,%.4g", float64(p[0])*1e3, float64(p[1])*1e3)
}

// A dimension changed moves what hangs together and leaves the rest where it was.
func TestMovesOfADrawing(t *testing.T) {
	for _, c := range []struct {
		text, name string
		now, then  float64           // mm
		moved      map[string]string // points, from and to
	}{
		{rodGap, "distance of rod from can", 15, 18, map[string]string{"0,15": "0,18", "5,20": "5,23", "0,20": "0,23"}},
		{rodGap, "radius of rod, its end kept", 5, 6, map[string]string{"5,20": "6,21", "0,20": "0,21", "5,170": "6,170"}},
		{rodGap, "radius of can", 150, 200, map[string]string{"150,0": "200,0", "150,170": "200,170"}},
		{sleeved, "radius of sleeve", 7, 8, map[string]string{"7,0": "8,0", "7,20": "8,20"}},
		{sleeved, "radius of plate", 10, 12, map[string]string{"10,0": "12,0", "13,3": "15,3", "13,0": "15,0"}},
		{sleeved, "height of sleeve, moved at r 5 mm, z 20 mm", 20, 25, map[string]string{"7,20": "7,25", "3,20": "3,25"}},
		{sleeved, "radius of pin", 3, 2, map[string]string{"3,0": "2,0", "3,20": "2,20", "3,80": "2,80"}},
		{frustum, "distance of cathode from anode", 10, 12, map[string]string{"0,0": "0,-2", "40,0": "40,-2", "15,0": "15,-2"}},
		{frustum, "radius of spacer at z 0 m", 15, 12, map[string]string{"15,0": "12,0"}},
		{frustum, "radius of spacer at z 10 mm", 20, 18, map[string]string{"20,10": "18,10"}},
		{frustum, "radius of spacer", 15, 16, map[string]string{"15,0": "16,0", "20,10": "21,10"}},
		{chamfered, "radius of plate", 10, 11, map[string]string{"10,0": "11,0", "10,4": "11,4", "12,6": "13,6"}},
		{chamfered, "radius of plate at z 6 mm", 12, 11, map[string]string{"12,6": "11,6"}},
		{cone, "distance of cone from can", 10, 13, map[string]string{"0,10": "0,13", "1.732,11": "1.732,14", "0,12": "0,15", "30.02,60": "30.02,63", "90,60": "90,63"}},
		{cone, "tip radius of cone, its end kept", 2, 3, map[string]string{"1.732,11": "2.598,11.5", "0,12": "0,13", "30.02,60": "30.6,60"}},
	} {
		f := drawn(t, c.text)
		all := build.Described(f).Dimensions
		i := slices.IndexFunc(all, func(d build.Dimension) bool {
			return d.Name == c.name && math.Abs(float64(d.Value)*1e3-c.now) < 1e-6
		})
		if i < 0 {
			t.Errorf("no %s of %g mm", c.name, c.now)
			for _, d := range all {
				t.Logf("%s, %s", d.Name, quantity.Text(d.Value))
			}
			continue
		}
		a := all[i].With(quantity.Length(c.then * 1e-3))
		if a.Err != nil {
			t.Error(c.name, a.Err)
		}
		was, is := places(f), places(&a.Field)
		for k := range was {
			want, moves := c.moved[was[k]]
			if !moves {
				want = was[k]
			}
			if is[k] != want {
				t.Errorf("%s: %s goes to %s, want %s", c.name, was[k], is[k], want)
			}
		}
	}
}

// The present value of every dimension is the drawing as it is, and no other one is.
func TestDimensionsAreThoseOfTheDrawing(t *testing.T) {
	for _, text := range []string{rodGap, sleeved, frustum, chamfered, cone} {
		f := drawn(t, text)
		was := strings.Join(places(f), " ")
		for _, d := range build.Described(f).Dimensions {
			a, other := d.With(d.Value), d.With(d.Value*0.9)
			if d.Value == 0 { // a sharp edge
				other = d.With(0.1e-3)
			}
			if got := strings.Join(places(&a.Field), " "); a.Err != nil || got != was {
				t.Errorf("%s: %v: %s, was %s", d.Name, a.Err, got, was)
			}
			if strings.Join(places(&other.Field), " ") == was {
				t.Errorf("%s changes nothing", d.Name)
			}
		}
	}
}

// A sharp edge is rounded by an arc that touches both straight pieces, to the side to which
// the outline turns.
func TestASharpEdgeIsRounded(t *testing.T) {
	for _, c := range []struct {
		edge string
		want []string // end of the first piece, end and centre of the arc, in mm, and its turn
	}{
		{"edge radius of can at r 150 mm, z 0 m", []string{"148,0", "150,2", "148,2", "left"}},
		{"edge radius of plate at r 10 mm, z 4 mm", []string{"10,3.172", "10.59,4.586", "12,3.172", "right"}},
	} {
		text := rodGap
		if strings.Contains(c.edge, "plate") {
			text = chamfered
		}
		all := build.Described(drawn(t, text)).Dimensions
		i := slices.IndexFunc(all, func(d build.Dimension) bool { return d.Name == c.edge })
		if i < 0 {
			t.Errorf("no %s", c.edge)
			continue
		}
		a := all[i].With(2e-3)
		found := false
		for _, el := range a.Electrodes {
			for k, s := range el.Profile {
				if s.Centre.Set() && k > 1 {
					got := []string{mmPoint(el.Profile[k-1].To.V), mmPoint(s.To.V), mmPoint(s.Centre.V), s.Turn.V}
					found = found || slices.Equal(got, c.want)
				}
			}
		}
		if !found || a.Err != nil {
			t.Errorf("%s: no arc %v (%v): %v", c.edge, c.want, a.Err, places(&a.Field))
		}
		if all[i].With(1).Err == nil {
			t.Errorf("%s of a metre", c.edge)
		}
	}
}

// What has no room says so.
func TestMoveWithoutRoom(t *testing.T) {
	for _, d := range build.Described(drawn(t, sleeved)).Dimensions {
		if d.Name == "radius of pin" && d.With(8e-3).Err == nil {
			t.Error("a pin of 8 mm in a sleeve of 7 mm")
		}
	}
}
