package xray

import (
	"math"
	"sort"
)

// row of a table: energy in keV, µ/ρ and µen/ρ in cm²/g as printed.
type row struct{ energy, attenuation, absorption float64 }

// table of mass coefficients; a doubled energy is an edge.
type table []row

// Ends of every table, and so of the model, in keV.
const (
	lowestEnergy  = 1.0
	highestEnergy = 150.0
)

// column picks a coefficient of a row.
type column func(row) float64

func attenuation(r row) float64 { return r.attenuation }
func absorption(r row) float64  { return r.absorption }

// law is a coefficient between two rows: the straight line through them in the
// logarithms of energy and coefficient.
type law struct{ start, value, slope float64 }

// ln is the logarithm of the coefficient at that of an energy.
func (l law) ln(x float64) float64 { return l.value + l.slope*(x-l.start) }

// at finds the law that holds at an energy. An edge belongs to the side above it; no
// law reaches across one, because its two rows bear the same energy.
func (t table) at(energy float64, of column) law {
	i := sort.Search(len(t), func(i int) bool { return t[i].energy > energy })
	i = min(max(i, 1), len(t)-1)
	for t[i].energy == t[i-1].energy {
		i--
	}
	low, high := t[i-1], t[i]
	start, value := math.Log(low.energy), math.Log(of(low))
	return law{start, value, (math.Log(of(high)) - value) / (math.Log(high.energy) - start)}
}
