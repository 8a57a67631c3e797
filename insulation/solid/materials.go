package solid

import (
	"kilovet/hv/quantity"
	"kilovet/insulation/gap"
)

const kVmm quantity.Field = 1e6

func read(text string) gap.Source     { return gap.Source{Text: text, Mark: gap.Read} }
func remember(text string) gap.Source { return gap.Source{Text: text, Mark: gap.Memory} }

// strength and other give fields in kV/mm.
func strength(least, most quantity.Field, source gap.Source) Span[quantity.Field] {
	return Span[quantity.Field]{least * kVmm, most * kVmm, source}
}

func other(e quantity.Field, source gap.Source) gap.Beside[quantity.Field] {
	return gap.Beside[quantity.Field]{Value: e * kVmm, Source: source}
}

func span(least, most float64, source gap.Source) Span[float64] {
	return Span[float64]{least, most, source}
}

// resistivity is a lower bound or an order of magnitude.
func resistivity(r quantity.Resistivity, source gap.Source) Span[quantity.Resistivity] {
	return Span[quantity.Resistivity]{r, r, source}
}

var (
	callister    = read("Callister, Materials Science and Engineering, 8th ed., Table 18.5")
	general      = read("general table of dielectric strengths (encyclopaedia)")
	database     = read("materials database (MakeItFrom)")
	constants    = read("reference table of dielectric constants")
	ceramicMaker = read("ceramics maker, typical DC strength on test coupons at room temperature")
	cables       = read("cable-insulation table")

	// polymers: 0.30 from 70.9 kV/mm at 0.025 mm and 16.7 at 3.2 mm of epoxy, 0.29 from
	// films to sheets of acrylic over four decades.
	polymers = span(0.3, 0.3, gap.Source{Text: "E ~ t^-0.3 from pairs of epoxy and acrylic; the law: Zhao and Liu, Nanomaterials 10 (2020) 2473", Mark: gap.Derived})
	// ceramics: 8.3 kV/mm at 6.35 mm to 22.8 at 0.25 mm of alumina.
	ceramics = span(0.32, 0.32, remember("E ~ t^-0.32 from a ceramic maker's chart of alumina, 0.25 to 6.35 mm"))
)

// materials as printed; the low end of the most cautious source judges, what the others
// say stands beside it.
var materials = []Material{
	{
		Name: "PTFE", also: []string{"polytetrafluoroethylene"},
		Strength: strength(15.7, 19.7, callister), Exponent: polymers,
		Permittivity: span(2.1, 2.1, callister),
		Resistivity:  resistivity(1e16, read("Springer Handbook of Condensed Matter and Materials Data, Table 3.3-12, more than")),
		Others: []gap.Beside[quantity.Field]{
			other(48, read("Springer Handbook of Condensed Matter and Materials Data, Table 3.3-12, a thin specimen")),
			other(59, read("Kuphaldt, Lessons in Electric Circuits")),
		},
	},
	{
		Name: "polyethylene", also: []string{"pe", "hdpe", "ldpe"},
		Strength: strength(17.7, 19.7, callister), Exponent: polymers,
		Permittivity: span(2.3, 2.3, callister),
		Others:       []gap.Beside[quantity.Field]{other(18.9, general), other(40, read("Russian table of dielectrics, a thin specimen"))},
	},
	{
		Name:     "PEEK",
		Strength: strength(20, 20, read("polymer supplier")), Exponent: polymers,
		Permittivity: span(3.2, 3.3, read("polymer supplier, 1 MHz")),
		Resistivity:  resistivity(1e14, read("polymer supplier")),
	},
	{
		Name: "acrylic", also: []string{"pmma", "polymethyl methacrylate"},
		Strength: strength(17.7, 20.9, read("Shackelford, Materials Science and Engineering Handbook, Table 296, cast sheet, ASTM D149 short time")), Exponent: polymers,
		Permittivity: span(2.6, 3.5, constants),
		Others:       []gap.Beside[quantity.Field]{other(18, read("Russian table of dielectrics"))},
	},
	{
		Name: "polycarbonate", also: []string{"pc"},
		Strength: strength(20, 20, read("plastics data sheet, ASTM D149")), Exponent: polymers,
		Permittivity: span(2.9, 2.9, read("plastics data sheet, ASTM D150, 1 MHz")),
		Resistivity:  resistivity(2.1e14, read("plastics data sheet")),
	},
	{
		Name:     "epoxy",
		Strength: strength(16.7, 16.7, read("question-and-answer page on epoxy, 425 V/mil at 1/8 inch")), Tested: 3.175e-3, Thinnest: 0.0254e-3,
		Exponent:     span(0.299, 0.299, gap.Source{Text: "the same page, 1800 V/mil at 0.001 inch", Mark: gap.Derived}),
		Permittivity: span(3.4, 3.7, constants),
	},
	{
		Name: "silicone", also: []string{"silicone rubber"},
		Strength: strength(15, 25, remember("typical potting data, about 500 V/mil")), Tested: 1e-3, Exponent: polymers,
		Permittivity: span(3.1, 3.1, cables),
		Caveats:      []string{"silicone potting adheres poorly unless primed and can trap air"},
	},
	{
		Name: "alumina", also: []string{"aluminium oxide", "aluminum oxide"},
		Strength: strength(12, 12, read("materials database (MakeItFrom), 93 to 95 %, IEC 60672 type C-786")), Exponent: ceramics,
		Permittivity: span(8.7, 9, database),
		Resistivity:  resistivity(1e13, read("materials database (MakeItFrom), order of magnitude")),
		Others: []gap.Beside[quantity.Field]{
			other(13.4, general), other(17, ceramicMaker),
			other(10, read("substrate maker, 99.6 %, AC, at least; 96 % 15: the purer is not the stronger")),
		},
	},
	{
		Name: "aluminium nitride", also: []string{"aluminum nitride", "aln"},
		Strength: strength(16, 20, ceramicMaker), Exponent: ceramics,
	},
	{
		Name:     "silicon nitride",
		Strength: strength(15, 15, ceramicMaker), Exponent: ceramics,
	},
	{
		Name: "aluminium silicate", also: []string{"aluminum silicate"},
		Strength: strength(3.9, 17, ceramicMaker), Exponent: ceramics,
	},
	{
		Name: "machinable glass ceramic", also: []string{"glass ceramic"},
		Strength: strength(27, 27, read("materials database (MakeItFrom) citing the CRC Materials Science and Engineering Handbook")), Exponent: ceramics,
		Permittivity: span(6, 6.4, database),
		Resistivity:  resistivity(1e14, read("materials database (MakeItFrom), order of magnitude")),
		Others: []gap.Beside[quantity.Field]{
			other(39, ceramicMaker), other(45, remember("maker data sheet, AC, 0.3 mm")), other(129, remember("maker data sheet, DC, 0.3 mm")),
		},
	},
	{
		Name: "glass bonded mica", also: []string{"mica glass"},
		Strength: strength(20, 20, database), Exponent: ceramics,
	},
	{
		Name: "borosilicate", also: []string{"borosilicate glass"},
		Strength: strength(35, 35, database), Exponent: ceramics,
		Permittivity: span(4.6, 5.5, database),
		Resistivity:  resistivity(1e12, read("materials database (MakeItFrom), order of magnitude")),
		Caveats:      []string{"tables of glasses differ three- to fourfold, by the thickness of the specimen; one was read"},
	},
	{
		Name: "soda lime glass", also: []string{"glass", "window glass"},
		Strength: strength(9.8, 13.8, general), Exponent: ceramics,
		Permittivity: span(6.9, 6.9, callister),
		Others:       []gap.Beside[quantity.Field]{other(9.8, callister)},
	},
	{
		Name: "fused silica", also: []string{"quartz", "fused quartz"},
		Strength: strength(9.8, 9.8, callister), Exponent: ceramics,
		Permittivity: span(3.8, 3.8, database),
		Resistivity:  resistivity(1e14, read("materials database (MakeItFrom), order of magnitude")),
		Others:       []gap.Beside[quantity.Field]{other(25, general), other(30, database), other(40, ceramicMaker)},
	},
	{
		Name:     "porcelain",
		Strength: strength(1.6, 15.7, callister), Exponent: ceramics,
	},
	{
		Name:     "steatite",
		Strength: strength(7.9, 13.8, callister), Exponent: ceramics,
		Permittivity: span(5.5, 7.5, callister),
	},
	{
		Name: "polyimide film", also: []string{"polyimide"},
		Strength: strength(303, 303, remember("film maker data sheet, 25 µm; 154 kV/mm at 125 µm")), Tested: 25e-6, Thickest: 125e-6,
		Exponent:     span(0.42, 0.42, remember("E ~ t^-0.42 from the film maker's four thicknesses")),
		Permittivity: span(3.4, 3.5, constants),
		Caveats:      []string{"films only; parts of millimetres have a small part of their strength"},
	},
	{
		Name: "FR 4", also: []string{"fr4", "epoxy glass", "g10"},
		Strength: strength(20, 20, read("material note on FR-4, through the thickness, short time, ASTM D149")), Tested: 1.6e-3, Exponent: polymers,
		Permittivity: span(4.2, 4.8, remember("typical laminate data")),
		Others: []gap.Beside[quantity.Field]{
			other(11.8, read("material note on FR-4, along the sheet: this holds from hole to hole and track to track")),
			other(31.5, read("thin laminates only, IPC-4101 /24 as quoted")),
		},
		Caveats: []string{"dry and at room temperature, through the sheet; moisture and heat take 20 to 40 %"},
	},
	{
		Name: "FR 4 edgewise", also: []string{"fr4 edgewise"},
		Strength: strength(11.8, 15.7, read("material note on FR-4, along the sheet")), Exponent: polymers,
		Permittivity: span(4.2, 4.8, remember("typical laminate data")),
		Caveats:      []string{"dry and at room temperature; moisture and heat take 20 to 40 %"},
	},
	{
		Name:     "glass cloth laminate",
		Strength: strength(6, 10, read("Russian table of dielectrics, two grades")), Exponent: polymers,
	},
	{Name: "PVC", also: []string{"polyvinyl chloride"}, Permittivity: span(5, 5, cables)},
	{Name: "polyurethane", also: []string{"pu", "pur"}, Permittivity: span(6.5, 6.5, cables)},
}
