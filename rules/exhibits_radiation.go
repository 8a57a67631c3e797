package rules

import (
	"kilovet/hv/quantity"
	"kilovet/rules/evidence"
	"kilovet/rules/exhibit"
)

// radiationTable shows the estimated rates beyond every shield, at the working and at the
// highest voltage, at 0.1 m and at 50 mm.
func radiationTable(e *evidence.Evidence) []exhibit.Table {
	t := exhibit.Table{
		ID: "radiation.rates", Chapter: exhibit.Energy, Title: "X-rays beyond each wall, estimated", Basis: "thick-target bremsstrahlung through NIST attenuation",
		Columns: []exhibit.Column{{Head: "wall"}, {Head: "voltage is"}, {Head: "voltage", Unit: "V"}, {Head: "from the surface", Unit: "m"},
			{Head: "air kerma rate", Unit: "Gy/s"}, {Head: "upper figure", Unit: "Gy/s"}},
		Note: "An estimate replaces no survey. The upper figure is at least twice the estimate; a gray is at most 1.74 sievert. Limits known: 1 µSv/h at 0.1 m, which judges, and 5 µSv/h at 50 mm, which is shown.",
	}
	if !e.HasSupply() {
		return nil
	}
	highest, err := e.Accelerating()
	working, err2 := e.AcceleratingIn(evidence.Working)
	if first(err, err2) != nil {
		return nil
	}
	for i := range e.Chain().Shields {
		s := &e.Chain().Shields[i]
		for _, v := range []struct {
			name string
			u    quantity.Voltage
		}{{"working", working}, {"the highest", highest.Value}} {
			for _, d := range []quantity.Length{0.1, 0.05} {
				x, err := e.RadiationAt(s, v.u, d)
				row := []exhibit.Cell{exhibit.Words(s.Name.V), exhibit.Words(v.name), exhibit.Number(v.u), exhibit.Number(d)}
				if err != nil {
					t.Rows = append(t.Rows, append(row, exhibit.Words(err.Error()), exhibit.Words("")))
					continue
				}
				t.Rows = append(t.Rows, append(row, exhibit.Number(x.Rate), exhibit.Number(x.Upper)))
			}
		}
	}
	return table(t)
}
