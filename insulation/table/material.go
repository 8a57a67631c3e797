package table

import (
	"strings"

	"kilovet/hv/lack"
	"kilovet/hv/quantity"
	"kilovet/insulation/gap"
)

// Group is a material group of IEC 60664-1, by comparative tracking index.
type Group int

// The material groups, from best to worst.
const (
	NonTracking Group = iota // glass, ceramics and other inorganic materials
	GroupI
	GroupII
	GroupIIIa
	GroupIIIb
)

// String is the group in words.
func (g Group) String() string {
	return [...]string{"no tracking", "material group I", "material group II", "material group IIIa", "material group IIIb"}[g]
}

// column is the place of the group among the three columns of Table F.5.
func (g Group) column() int { return int(min(g, GroupIIIa)) - 1 }

// GroupByCTI is the material group of a comparative tracking index (IEC 60112): I
// from 600, II from 400, IIIa from 175, IIIb from 100 V. Below 100 V there is a lack.
func GroupByCTI(cti quantity.Voltage) (Group, gap.Source, error) {
	source := gap.Source{Text: "IEC 60664-1 material groups by CTI (IEC 60112)", Mark: gap.Read}
	floors := [...]quantity.Voltage{600, 400, 175, 100}
	for i, floor := range floors {
		if quantity.AtLeast(cti, floor) {
			return GroupI + Group(i), source, nil
		}
	}
	return 0, source, lack.Range("a tracking index of %s is below the last material group, which begins at 100 V", quantity.Text(cti))
}

// materials are the groups of materials named without an index. Of a polymer it is
// the worst group among its usual grades.
var materials = map[string]Group{
	"alumina": NonTracking, "aluminium oxide": NonTracking, "aluminium nitride": NonTracking,
	"ceramic": NonTracking, "porcelain": NonTracking, "steatite": NonTracking, "zirconia": NonTracking,
	"beryllia": NonTracking, "silicon nitride": NonTracking, "sapphire": NonTracking,
	"glass": NonTracking, "borosilicate glass": NonTracking, "borosilicate": NonTracking,
	"quartz": NonTracking, "fused silica": NonTracking, "mica": NonTracking,
	"glass ceramic": NonTracking, "machinable glass ceramic": NonTracking,

	"ptfe": GroupI, "fep": GroupI, "pfa": GroupI, "etfe": GroupI,
	"polyethylene": GroupI, "pe": GroupI, "polypropylene": GroupI, "pp": GroupI,
	"silicone": GroupI, "silicone rubber": GroupI, "acrylic": GroupI, "pmma": GroupI,
	"polyamide": GroupII, "nylon": GroupII, "pom": GroupII, "acetal": GroupII,
	"fr 4": GroupIIIa, "fr4": GroupIIIa, "g10": GroupIIIa, "epoxy": GroupIIIa, "epoxy glass": GroupIIIa,
	"polycarbonate": GroupIIIa, "pc": GroupIIIa, "pet": GroupIIIa, "polyester": GroupIIIa,
	"pvc": GroupIIIa, "polystyrene": GroupIIIa, "abs": GroupIIIa,
	"peek": GroupIIIb, "polyimide": GroupIIIb, "pps": GroupIIIb, "phenolic paper": GroupIIIb, "bakelite": GroupIIIb,
}

// GroupByName is the material group of a named material, upper or lower case, with
// spaces or hyphens. A name that is not known is a lack: its CTI is needed.
func GroupByName(material string) (Group, gap.Source, error) {
	source := gap.Source{Text: "material group of usual grades of " + material, Mark: gap.Memory}
	name := strings.Join(strings.FieldsFunc(strings.ToLower(material), isGap), " ")
	g, known := materials[name]
	switch {
	case material == "":
		return 0, source, lack.Key("spacing.material", "spacing.cti")
	case !known:
		return 0, source, lack.Because("the material group of "+material+" is not known here; give its cti", "spacing.cti")
	case g == NonTracking:
		source.Text = "IEC 60664-1: " + material + " does not track"
	}
	return g, source, nil
}

func isGap(r rune) bool { return r == ' ' || r == '-' || r == '_' }
