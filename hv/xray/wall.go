package xray

import (
	"math"

	"kilovet/hv/lack"
	"kilovet/hv/quantity"
)

// Layer of a wall; its thickness is that along the way of the rays.
type Layer struct {
	Material  Material
	Thickness quantity.Length
}

// Wall is what stands between the stop and a point, and how far the point is from
// the stop. Air on the way counts where it is given as a layer.
type Wall struct {
	Layers   []Layer
	Distance quantity.Length
}

// check says why nothing can be said of a wall. Without a layer the rays are not
// filtered, and the continuum below 10 keV, which the target itself holds back, is not
// the model's.
func (w Wall) check() error {
	if len(w.Layers) == 0 {
		return lack.Because("the estimate holds for filtered rays and needs a wall", "shield.layers")
	}
	for _, l := range w.Layers {
		if len(l.Material.parts) == 0 || !positive(l.Thickness) {
			return lack.Range("a layer needs a known material and a thickness above zero, not %s", quantity.Text(l.Thickness))
		}
	}
	if !positive(w.Distance) {
		return lack.Range("a kerma rate needs a distance above zero, not %s", quantity.Text(w.Distance))
	}
	return nil
}

// with is the wall and one more layer.
func (w Wall) with(m Material, thickness quantity.Length) Wall {
	layers := make([]Layer, 0, len(w.Layers)+1)
	w.Layers = append(append(layers, w.Layers...), Layer{m, thickness})
	return w
}

// last is the material of the last layer, the outermost where they are given in order.
func (w Wall) last() Material { return w.Layers[len(w.Layers)-1].Material }

// screen is one part of one layer: the logarithm of its areal density in g/cm², and
// the column that weakens the rays.
type screen struct {
	table table
	areal float64
	of    column
}

// screens lists the parts of all layers. For a wide beam the light ones absorb only:
// what they scatter reaches the point by other ways.
func (w Wall) screens(wide bool) []screen {
	var all []screen
	for _, l := range w.Layers {
		of := attenuation
		if wide && l.Material.light {
			of = absorption
		}
		for _, p := range l.Material.parts {
			areal := float64(l.Thickness) * 100 * l.Material.density * p.share
			all = append(all, screen{p.table, math.Log(areal), of})
		}
	}
	return all
}

// isLight reports whether any layer scatters more than it absorbs.
func (w Wall) isLight() bool {
	for _, l := range w.Layers {
		if l.Material.light {
			return true
		}
	}
	return false
}

func positive[Q ~float64](q Q) bool { return q > 0 && !math.IsInf(float64(q), 1) }
