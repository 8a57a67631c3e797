package vacuum

import (
	"fmt"
	"math"
	"strings"

	"kilovet/hv/lack"
	"kilovet/hv/quantity"
	"kilovet/insulation/gap"
)

// Reference is a voltage that the surface of an insulator in vacuum stands at one
// length: a test of one's own, or practice. Flashover grows with the root of the length
// from there.
type Reference struct {
	Voltage  quantity.Voltage
	Length   quantity.Length
	Steepest quantity.Field // mean gradient never to be passed, 0: none
	Material string         // the one material it holds for, "": that of the gap
	gap.Source
}

// AluminaPractice is the usual review limit of alumina, 1 kV/mm, taken as a pair at 10
// mm. No table of flashover by material and length was found that could be read. It is
// consistent with two figures: 3 to 4 kV/mm over a millimetre (derived from a trade
// text), and 0.69 kV/mm of a 290 mm ring with shields (memory), over which the root
// law gives a fourth of that.
var AluminaPractice = Reference{
	Voltage: 10e3, Length: 10e-3, Steepest: 1e6, Material: "alumina",
	Source: gap.Source{Text: "alumina in vacuum, DC, 1 kV/mm", Mark: gap.Practice},
}

// ReferenceOf is the tested pair of a gap where one was given, else practice.
func ReferenceOf(g gap.Gap) Reference {
	if g.Tested.Voltage <= 0 || g.Tested.Length <= 0 {
		return AluminaPractice
	}
	return Reference{Voltage: g.Tested.Voltage, Length: g.Tested.Length, Source: gap.Source{
		Text: "tested: " + quantity.Text(g.Tested.Voltage) + " over " + quantity.Text(g.Tested.Length) + ", as the description says", Mark: gap.Read}}
}

var rootSource = gap.Source{Text: "flashover grows with the root of the length, Pillai and Hackam, Surface flashover of solid dielectric in vacuum, abstract", Mark: gap.Read}

// Lengths between samples of a millimetre and the longest single insulator known here.
const (
	shortestSurface quantity.Length = 1e-3
	longestSurface  quantity.Length = 300e-3
)

// At is the flashover voltage at a length, V ~ √L, and not above the steepest mean
// gradient. Lengths under 1 mm and above 300 mm are a lack.
func (r Reference) At(l quantity.Length) (quantity.Voltage, error) {
	if err := r.complete(); err != nil {
		return 0, err
	}
	if !quantity.AtLeast(l, shortestSurface) || !quantity.AtMost(l, longestSurface) {
		return 0, lack.Range("flashover in vacuum is known from 1 mm to 300 mm of one insulator, asked for %s", quantity.Text(l))
	}
	v := r.Voltage * quantity.Voltage(math.Sqrt(float64(l/r.Length))) // Pillai and Hackam
	if r.Steepest > 0 {
		v = min(v, quantity.Voltage(float64(r.Steepest)*float64(l)))
	}
	return v, nil
}

// LengthFor is the length whose flashover is at a voltage. Voltages that 1 mm exceeds or
// 300 mm does not reach are a lack: longer insulators are divided into stages.
func (r Reference) LengthFor(v quantity.Voltage) (quantity.Length, error) {
	if err := r.complete(); err != nil {
		return 0, err
	}
	l := r.Length * quantity.Length(math.Pow(float64(v/r.Voltage), 2))
	if r.Steepest > 0 {
		l = max(l, quantity.Length(float64(v)/float64(r.Steepest)))
	}
	if !quantity.AtLeast(l, shortestSurface) || !quantity.AtMost(l, longestSurface) {
		return 0, lack.Range("flashover in vacuum is known from 1 mm to 300 mm of one insulator; %s asks for %s", quantity.Text(v), quantity.Text(l))
	}
	return l, nil
}

func (r Reference) complete() error {
	if r.Voltage <= 0 || r.Length <= 0 {
		return lack.Because("the voltage and length of a tested insulator are not both given")
	}
	return nil
}

// Flashover is the voltage at which the surface of an insulator across a vacuum gap
// flashes over, along its creepage. The surface stands less than the open gap beside it
// (Hawley 1968), so a bridged gap stands the lower of the two. Alumina has a figure of
// practice; other materials are a lack until a tested pair is given.
func Flashover(g gap.Gap, r Reference) (gap.Answer[quantity.Voltage], error) {
	if err := r.suits(g); err != nil {
		return gap.Answer[quantity.Voltage]{}, err
	}
	if g.Creepage <= 0 {
		return gap.Answer[quantity.Voltage]{}, lack.Key("spacing.creepage")
	}
	v, err := r.At(g.Creepage)
	if err != nil {
		return gap.Answer[quantity.Voltage]{}, err
	}
	return gap.Answer[quantity.Voltage]{
		Value: v, Because: fmt.Sprintf("flashover along %s in vacuum, from %s at %s", quantity.Text(g.Creepage), quantity.Text(r.Voltage), quantity.Text(r.Length)),
		Sources: r.sources(), Assumptions: r.assumed(),
	}, nil
}

// CreepageNeeded is the length of surface in vacuum whose flashover is at the peak
// voltage, and never under the shortest that is known. It is the peak that counts:
// nothing tracks in vacuum.
func CreepageNeeded(g gap.Gap, v gap.Voltages, r Reference) (gap.Answer[quantity.Length], error) {
	none := gap.Answer[quantity.Length]{}
	if err := r.suits(g); err != nil {
		return none, err
	}
	least, err := r.At(shortestSurface)
	if err != nil {
		return none, err
	}
	l, err := r.LengthFor(max(v.Peak, least))
	if err != nil {
		return none, err
	}
	return gap.Answer[quantity.Length]{
		Value: l, Because: fmt.Sprintf("%s peak along a surface in vacuum, from %s at %s", quantity.Text(v.Peak), quantity.Text(r.Voltage), quantity.Text(r.Length)),
		Sources: r.sources(), Assumptions: r.assumed(),
	}, nil
}

func (r Reference) sources() []gap.Source {
	return []gap.Source{r.Governing(), rootSource}
}

func (r Reference) assumed() []string {
	if r.Mark == gap.Read {
		return nil
	}
	return []string{"the flashover figure is " + string(r.Mark) + "; the first flashovers come lower than later ones"}
}

// suits refuses a material that the reference does not hold for.
func (r Reference) suits(g gap.Gap) error {
	switch {
	case r.Material == "":
		return nil
	case g.Material == "":
		return lack.Key("spacing.material")
	case !sameMaterial(g.Material, r.Material):
		return lack.Because(fmt.Sprintf("flashover in vacuum has a figure for %s only, not for %s: give the flashover of a tested one", r.Material, g.Material), "spacing.tested_voltage", "spacing.tested_length")
	}
	return nil
}

func sameMaterial(given, known string) bool {
	given = strings.ToLower(strings.TrimSpace(given))
	return given == known || known == "alumina" && (given == "aluminium oxide" || given == "aluminum oxide")
}
