package build

import (
	"fmt"

	"kilovet/hv/chain"
	"kilovet/hv/document"
	"kilovet/hv/lack"
	"kilovet/hv/quantity"
)

// The electrodes of a gun.
const (
	Cathode = "cathode"
	Control = "control electrode"
	Anode   = "anode"
)

// FromGun is what says that an arrangement was built from the geometry of the gun, and
// Setback the name of that dimension.
const (
	FromGun = "gun.geometry"
	Setback = "setback"
)

// GunName is the name of the arrangement of a gun.
const GunName = "gun"

// farGun is how many hole radii away the walls of a gun's model are at least.
const farGun = 12

// Gun is the arrangement of a gun's geometry: cathode on a rod as thick as its tip, or
// flat; control electrode and anode with fully rounded holes.
func Gun(g *chain.GunGeometry) *Arrangement {
	a := &Arrangement{From: FromGun}
	if a.Err = needGun(g); a.Err != nil {
		a.Field = pen{g.Here()}.field(GunName, "vacuum")
		return a
	}
	d := sizesOf(g)
	a = d.arrangement(pen{g.Here()})
	a.Dimensions = d.dimensions(g)
	if !g.PlateThickness.Set() {
		a.Assumed = append(a.Assumed, "the thickness of the control electrode is not given and taken as thin")
	}
	return a
}

func sizesOf(g *chain.GunGeometry) gunSizes {
	return gunSizes{
		hole: g.ApertureRadius.V, plate: g.PlateThickness.V, tip: g.TipRadius.V, setback: g.Setback.V,
		anode: g.AnodeDistance.V, anodeHole: g.AnodeApertureRadius.V, flat: g.Cathode.V == "flat",
	}
}

// SharpGun is Gun at another setback and with sharp edges of the hole in the control
// electrode: no real hole is sharper.
func SharpGun(g *chain.GunGeometry, setback quantity.Length) *Arrangement {
	a := &Arrangement{From: FromGun}
	if a.Err = needGun(g); a.Err != nil {
		return a
	}
	d := sizesOf(g)
	d.sharp, d.setback = true, setback
	return d.arrangement(pen{g.Here()})
}

func needGun(g *chain.GunGeometry) error {
	if err := document.Need(g.ApertureRadius, g.Setback, g.AnodeDistance); err != nil {
		return err
	}
	if g.Cathode.V != "flat" && !g.TipRadius.Set() {
		return lack.Key(g.TipRadius.Key)
	}
	return nil
}

// gunSizes are the sizes a gun is drawn from.
type gunSizes struct {
	hole, plate, tip, setback, anode, anodeHole quantity.Length
	flat                                        bool
	sharp                                       bool // edges of the hole in the control electrode
}

// arrangement draws the gun: back face of the control electrode at z = 0, anode above.
func (d gunSizes) arrangement(p pen) *Arrangement {
	a := &Arrangement{Field: p.field(GunName, "vacuum"), From: FromGun, Err: d.check()}
	if a.Err != nil {
		return a
	}
	wall := farGun*max(d.hole, d.anodeHole) + d.anode/2
	back := -(wall + max(d.setback, 0))
	front := d.plate + d.anode
	a.Electrodes = append(a.Electrodes, d.cathode(p, wall, back), p.at(Control, "control", d.control(wall, back)...))
	a.Electrodes = append(a.Electrodes, d.anodes(p, wall, front)...)
	a.Boundary = append(a.Boundary, p.natural(at(wall, d.plate), at(wall, front)))
	if !d.flat {
		a.Boundary = append(a.Boundary, p.natural(at(d.tip, back), at(wall, back)))
	}
	a.Assumed = []string{fmt.Sprintf("gun: holes fully rounded, the cathode on a rod as thick as its tip, walls at %s", quantity.Text(wall))}
	return a
}

// check refuses what is not a gun of this form.
func (d gunSizes) check() error {
	depth := d.setback + d.plate
	switch {
	case d.hole <= 0 || d.anode <= 0 || d.plate < 0 || d.anodeHole < 0 || !d.flat && d.tip <= 0:
		return lack.Range("a gun with a size of nothing has no field")
	case d.flat && d.setback <= 0:
		return lack.Range("a flat cathode lies behind the control electrode")
	case !d.flat && d.setback <= d.tip && d.tip >= d.hole:
		return lack.Range("a tip of %s does not go into the hole of %s", quantity.Text(d.tip), quantity.Text(d.hole))
	case -d.setback >= d.plate+d.anode:
		return lack.Range("the tip stands %s before the control electrode, beyond the anode", quantity.Text(-depth))
	}
	return nil
}

// cathode is the tip on its rod, or the flat end.
func (d gunSizes) cathode(p pen, wall, back quantity.Length) chain.Electrode {
	if d.flat {
		return p.at(Cathode, "cathode", at(0, -d.setback), at(wall-d.setback, -d.setback), at(wall-d.setback, back))
	}
	return p.at(Cathode, "cathode", at(d.tip, back), at(d.tip, -d.setback-d.tip), arc(0, -d.setback, 0, -d.setback-d.tip, "left"))
}

// control is the plate with a rounded hole, and the wall behind it.
func (d gunSizes) control(wall, back quantity.Length) []mark {
	end := back
	if d.flat {
		end = 0
	}
	if d.plate == 0 {
		return []mark{at(d.hole, 0), at(wall, 0), at(wall, end)}
	}
	if d.sharp {
		return []mark{at(wall, d.plate), at(d.hole, d.plate), at(d.hole, 0), at(wall, 0), at(wall, end)}
	}
	edge := d.plate / 2
	return []mark{at(wall, d.plate), at(d.hole+edge, d.plate), arc(d.hole+edge, 0, d.hole+edge, edge, "left"), at(wall, 0), at(wall, end)}
}

// anodes is the anode: solid, or with a rounded hole into an earthed space.
func (d gunSizes) anodes(p pen, wall, front quantity.Length) []chain.Electrode {
	if d.anodeHole == 0 {
		return []chain.Electrode{p.at(Anode, "ground", at(0, front), at(wall, front))}
	}
	thick := d.anodeHole
	edge, back := thick/2, front+thick
	end := back + 6*d.anodeHole
	return []chain.Electrode{p.at(Anode, "ground", at(wall, front), at(d.anodeHole+edge, front),
		arc(d.anodeHole+edge, back, d.anodeHole+edge, front+edge, "right"), at(wall, back), at(wall, end), at(0, end))}
}

// dimensions are the sizes by name, each with the gun it would make.
func (d gunSizes) dimensions(g *chain.GunGeometry) []Dimension {
	p := pen{g.Here()}
	one := func(name string, from document.Given[quantity.Length], size func(*gunSizes) *quantity.Length) Dimension {
		return Dimension{Name: name, Key: from.Key, Value: *size(&d), With: func(v quantity.Length) *Arrangement {
			other := d
			*size(&other) = v
			return other.arrangement(p)
		}}
	}
	all := []Dimension{
		one("aperture radius", g.ApertureRadius, func(d *gunSizes) *quantity.Length { return &d.hole }),
		one("plate thickness", g.PlateThickness, func(d *gunSizes) *quantity.Length { return &d.plate }),
		one(Setback, g.Setback, func(d *gunSizes) *quantity.Length { return &d.setback }),
		one("anode distance", g.AnodeDistance, func(d *gunSizes) *quantity.Length { return &d.anode }),
	}
	if !d.flat {
		all = append(all, one("tip radius", g.TipRadius, func(d *gunSizes) *quantity.Length { return &d.tip }))
	}
	if d.anodeHole > 0 {
		all = append(all, one("anode aperture radius", g.AnodeApertureRadius, func(d *gunSizes) *quantity.Length { return &d.anodeHole }))
	}
	return all
}
