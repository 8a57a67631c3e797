package profile

import (
	"testing"

	"pgregory.net/rapid"

	"kilovet/hv/chance"
)

func made(t *testing.T, name string, strokes ...Stroke) Profile {
	t.Helper()
	p, err := New(name, strokes)
	if err != nil {
		t.Fatal(err)
	}
	return p
}

func rectangle(t *testing.T, name string, r0, z0, r1, z1 float64) Profile {
	t.Helper()
	return made(t, name, start(r0, z0), line(r1, z0), line(r1, z1), line(r0, z1), line(r0, z0))
}

func TestFaces(t *testing.T) {
	ball := made(t, "ball", start(0, -2), arc(0, 2, 0, 0, Left))
	for _, c := range []struct {
		name     string
		profiles []Profile
		faces    int
		inside   map[Point][]bool // of each profile, closed ones
	}{
		{"a ball", []Profile{ball}, 2, map[Point][]bool{*mm(1, 0): {true}, *mm(3, 0): {false}, *mm(0.001, 1.9): {true}}},
		{"a ring in open space", []Profile{rectangle(t, "ring", 3, 0, 4, 1)}, 2,
			map[Point][]bool{*mm(3.5, 0.5): {true}, *mm(1, 0.5): {false}}},
		{"a ring inside a ring", []Profile{rectangle(t, "outer", 3, 0, 9, 6), rectangle(t, "inner", 5, 2, 7, 4)}, 3,
			map[Point][]bool{*mm(6, 3): {true, true}, *mm(4, 3): {true, false}, *mm(1, 3): {false, false}}},
		{"two that share an edge", []Profile{rectangle(t, "a", 3, 0, 5, 6), rectangle(t, "b", 5, 1, 7, 4)}, 3,
			map[Point][]bool{*mm(4, 3): {true, false}, *mm(6, 3): {false, true}, *mm(6, 5): {false, false}}},
		{"two that overlap", []Profile{rectangle(t, "a", 3, 0, 5, 6), rectangle(t, "b", 4, 1, 7, 4)}, 4,
			map[Point][]bool{*mm(4.5, 3): {true, true}, *mm(6, 3): {false, true}, *mm(3.5, 3): {true, false}}},
		{"a circle", []Profile{made(t, "circle", start(12, 0), arc(12, 0, 10, 0, Left))}, 2,
			map[Point][]bool{*mm(10, 1.9): {true}, *mm(10, 2.1): {false}}},
		{"circles that touch", []Profile{made(t, "a", start(12, 0), arc(12, 0, 10, 0, Left)), made(t, "b", start(16, 0), arc(16, 0, 14, 0, Right))}, 3,
			map[Point][]bool{*mm(10, 1): {true, false}, *mm(14, 1): {false, true}, *mm(12, 1): {false, false}}},
		{"a rod that ends on the axis twice", []Profile{made(t, "rod", start(0, 0), line(3, 0), line(3, 9), line(0, 9))}, 2, nil},
	} {
		p := NewPlane(c.profiles)
		if p.Faces != c.faces {
			t.Errorf("%s: %d faces, want %d", c.name, p.Faces, c.faces)
		}
		for at, want := range c.inside {
			for i, in := range want {
				if got := p.Inside(i)[p.FaceAt(at)]; got != in {
					t.Errorf("%s: %v inside %s is %v", c.name, at, c.profiles[i].Name, got)
				}
			}
		}
	}
}

// Euler: nodes − edges + faces = 1 + parts that hang together.
func TestEuler(t *testing.T) {
	chance.Check(t, func(rt *rapid.T) {
		var profiles []Profile
		for range rapid.IntRange(1, 5).Draw(rt, "rings") {
			grid := rapid.IntRange(1, 9)
			r, z := float64(grid.Draw(rt, "r")), float64(grid.Draw(rt, "z"))
			w, h := float64(grid.Draw(rt, "w")), float64(grid.Draw(rt, "h"))
			profiles = append(profiles, rectangle(t, "ring", r, z, r+w, z+h))
		}
		p := NewPlane(profiles)
		part := make([]int, len(p.Nodes))
		for i := range part {
			part[i] = i
		}
		for range p.Nodes {
			for _, e := range p.Edges {
				low := min(part[e.Start], part[e.End])
				part[e.Start], part[e.End] = low, low
			}
		}
		parts := 0
		for i, r := range part {
			if i == r {
				parts++
			}
		}
		if len(p.Nodes)-len(p.Edges)+p.Faces != 1+parts {
			rt.Fatalf("%d nodes, %d edges, %d faces, %d parts", len(p.Nodes), len(p.Edges), p.Faces, parts)
		}
	})
}

// A point lies in a rectangle or not, however many others are drawn over it.
func TestInsideAgreesWithCoordinates(t *testing.T) {
	chance.Check(t, func(rt *rapid.T) {
		type box struct{ r, z, w, h float64 }
		var boxes []box
		var profiles []Profile
		for range rapid.IntRange(1, 4).Draw(rt, "rings") {
			grid := rapid.IntRange(1, 6)
			b := box{float64(grid.Draw(rt, "r")), float64(grid.Draw(rt, "z")), float64(grid.Draw(rt, "w")), float64(grid.Draw(rt, "h"))}
			boxes = append(boxes, b)
			profiles = append(profiles, rectangle(t, "ring", b.r, b.z, b.r+b.w, b.z+b.h))
		}
		p := NewPlane(profiles)
		r, z := float64(rapid.IntRange(0, 12).Draw(rt, "at r"))+0.5, float64(rapid.IntRange(0, 12).Draw(rt, "at z"))+0.5
		face := p.FaceAt(*mm(r, z))
		for i, b := range boxes {
			want := r > b.r && r < b.r+b.w && z > b.z && z < b.z+b.h
			if got := p.Inside(i)[face]; got != want {
				rt.Fatalf("(%v, %v) in %v: %v", r, z, b, got)
			}
		}
	})
}
