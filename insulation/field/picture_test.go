package field

import (
	"math"
	"testing"

	"kilovet/hv/quantity"
)

// Lines between coaxial cylinders stand at r = a (b/a)^(1−u), wherever they are drawn.
func TestPictureOfACoaxialCell(t *testing.T) {
	f := under(t, cell(t), map[string]quantity.Voltage{"pin": 1000, "wall": 0})
	p := f.Picture(Window{*mm([2]float64{0, 0}), *mm([2]float64{12, 20})}, []quantity.Voltage{0, 250, 500, 750, 1000}, []quantity.Field{0, 1e5, 2e5, 1e7})
	seen := map[quantity.Voltage]float64{}
	for _, l := range p.Equipotentials {
		want := 2e-3 * math.Pow(5, 1-float64(l.Level)/1000)
		for i, x := range l.Points {
			if math.Abs(float64(x.R)-want) > 0.05e-3 {
				t.Errorf("%v V at %v, want r = %g mm", float64(l.Level), x, want*1e3)
			}
			if i > 0 {
				seen[l.Level] += float64(x.Distance(l.Points[i-1]))
			}
		}
	}
	for _, level := range []quantity.Voltage{250, 500, 750} {
		if math.Abs(seen[level]-20e-3) > 0.5e-3 {
			t.Errorf("%v V is %g mm long", float64(level), seen[level]*1e3)
		}
	}
	if len(seen) != 3 {
		t.Errorf("lines at %v", seen)
	}
	// The areas where E = V/(r ln(b/a)) lies between the sizes.
	for k, s := range p.Shades {
		area := 0.0
		for _, b := range s.Boxes {
			area += float64(b.To.R-b.From.R) * float64(b.To.Z-b.From.Z)
		}
		radius := func(e float64) float64 { return math.Min(math.Max(1000/math.Log(5)/e, 2e-3), 10e-3) }
		want := (radius(float64(s.Least)+1e-9) - radius(float64(s.Most))) * 20e-3
		if math.Abs(area-want) > 0.3e-3*20e-3 {
			t.Errorf("shade %d covers %g mm², want %g", k, area*1e6, want*1e6)
		}
	}
}

// A picture of every figure lies in its window, is finite, and its lines are not in metal.
func TestPicturesOfTheReferences(t *testing.T) {
	for _, id := range []string{"b1_feedthrough", "c1_annulus0.5", "c3_outer_gap0.1", "d45_frustum", "e_disc_rim1", "f1_gun", "x_sphere_plane_h/r=1.1"} {
		f := reference(t, id).solve(t)
		low, high := f.span2()
		levels := []quantity.Voltage{}
		for k := 1; k < 10; k++ {
			levels = append(levels, quantity.Voltage(low+(high-low)*float64(k)/10))
		}
		w := Window{*mm([2]float64{0, -10}), *mm([2]float64{20, 20})}
		p := f.Picture(w, levels, []quantity.Field{0, 1e5, 1e6, 1e9})
		if len(p.Equipotentials) < 5 {
			t.Errorf("%s: %d lines", id, len(p.Equipotentials))
		}
		for _, l := range p.Equipotentials {
			for _, x := range l.Points {
				if !(x.R >= w.From.R-1e-9 && x.R <= w.To.R+1e-9 && x.Z >= w.From.Z-1e-9 && x.Z <= w.To.Z+1e-9) {
					t.Fatalf("%s: %v lies outside", id, x)
				}
			}
		}
		if n := f.Work().Panels; n == 0 {
			t.Error(n)
		}
	}
}

func (f *Field) span2() (low, high float64) {
	for _, v := range f.volts {
		low, high = math.Min(low, v), math.Max(high, v)
	}
	return low, high
}

func BenchmarkPicture(b *testing.B) {
	for _, id := range []string{"b1_feedthrough", "c1_annulus0.5", "f1_gun"} {
		f := reference(b, id).solve(b)
		b.Run(id, func(b *testing.B) {
			for range b.N {
				f.Picture(Window{*mm([2]float64{0, 0}), *mm([2]float64{20, 20})}, []quantity.Voltage{-500, 500}, []quantity.Field{0, 1e5, 1e6, 1e9})
			}
		})
	}
}
