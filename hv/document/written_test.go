package document_test

import (
	"fmt"
	"testing"

	"kilovet/hv/document"
)

func ExampleList() {
	for _, w := range document.List([]byte(`
title = 'Bench'          # a comment
coupling.value = [ "1 nF",
  "2 nF", # the upper one
]
[[filter]]
resistor = { value = "1 Mohm", count = 4 }
[[filter]]
resistor.value = "2 Mohm"
[[spacing]]
name = "lid"
also = []
shape = { kind = "plates" }
[[spacing]]
clearance = "3 mm"
[[spacing]]
name = "lid"
layers = [{ name = "foil" }, { thickness = 3 }]
`)) {
		fmt.Printf("%2d:%-2d %-26s %s\n", w.Line, w.Column, w.At, w.Text)
	}
	// Output:
	//  2:9  title                      'Bench'
	//  3:18 coupling.value             ["1 nF", "2 nF"]
	//  7:22 filter.1.resistor.value    "1 Mohm"
	//  7:40 filter.1.resistor.count    4
	//  9:18 filter.2.resistor.value    "2 Mohm"
	// 11:8  spacing "lid".name         "lid"
	// 12:8  spacing "lid".also         []
	// 13:18 spacing "lid".shape.kind   "plates"
	// 15:13 spacing.2.clearance        "3 mm"
	// 17:8  spacing "lid" 2.name       "lid"
	// 18:20 spacing "lid" 2.layers "foil".name "foil"
	// 18:44 spacing "lid" 2.layers.2.thickness 3
}

func TestListBearsKeysWithoutNames(t *testing.T) {
	got := document.List([]byte("[[spacing]]\nname = 'lid'\nshape.kind = 'plates'\n"))
	if len(got) != 2 || got[1].Key != "spacing.shape.kind" {
		t.Errorf("%+v", got)
	}
}

func TestListOfWhatCannotBeRead(t *testing.T) {
	if got := document.List([]byte("a = \xff")); got != nil {
		t.Errorf("%v", got)
	}
	if got := document.List([]byte("a = 1\nb = three\nc = [1, x]\nd = [{ e = 1 }, 3]\n[f")); len(got) != 2 || got[0].At != "a" || got[1].At != "d.1.e" {
		t.Errorf("%v", got)
	}
}
