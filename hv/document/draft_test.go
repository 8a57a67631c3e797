package document_test

import (
	"os"
	"strings"

	"kilovet/hv/document"
	"kilovet/hv/quantity"
)

func ExampleDraft() {
	type clamp struct {
		Voltage document.Given[quantity.Voltage] `key:"voltage" range:"> 0 V" needed:"yes" means:"voltage" example:"90 V"`
	}
	type point struct {
		At document.Given[[]quantity.Length] `key:"at" list:"2" means:"r and z" example:"[\"1 mm\", \"2 mm\"]"`
	}
	type meter struct {
		Clamp  *clamp                 `key:"clamp" means:"what protects it"`
		Kind   document.Given[string] `key:"kind" words:"coil | digital" means:"kind" example:"coil"`
		Path   []point                `key:"path" means:"its wire" example:"[{ at = [\"1 mm\", \"2 mm\"] }]"`
		Probes []point                `key:"probe" means:"its probes"`
	}
	type room struct {
		Format document.Given[int] `key:"format" range:">= 1, <= 1" means:"format" example:"1"`
		Meters []meter             `key:"meter" means:"what reads"`
	}
	document.Draft(os.Stdout, &room{}, document.Outline{
		Head: "A room.",
		Off: func(path string) bool {
			return strings.HasSuffix(path, "kind") || strings.HasPrefix(path, "meter.probe")
		},
	})
	// Output:
	// # A room.
	//
	// format = 1                                   # format; 1
	//
	// [[meter]]                                    # what reads
	// # clamp: what protects it
	// clamp.voltage = "90 V"                       # voltage; more than 0 V; needed
	// #kind = "coil"                               # kind; coil | digital
	// path = [{ at = ["1 mm", "2 mm"] }]           # its wire
	// #   at: r and z
	//
	// #[[meter.probe]]                             # its probes
	// #at = ["1 mm", "2 mm"]                       # r and z
}
