package profile

import (
	"errors"
	"fmt"
	"math"
	"strings"
	"testing"

	"kilovet/hv/quantity"
)

func mm(r, z float64) *Point {
	return &Point{quantity.Length(r / 1000), quantity.Length(z / 1000)}
}

func line(r, z float64) Stroke { return Stroke{To: mm(r, z)} }

func arc(r, z, cr, cz float64, t Turn) Stroke {
	return Stroke{To: mm(r, z), Centre: mm(cr, cz), Turn: t}
}

func start(r, z float64) Stroke { return Stroke{From: mm(r, z)} }

func TestAccepted(t *testing.T) {
	for _, c := range []struct {
		name    string
		strokes []Stroke
		closed  bool
		length  float64 // mm
	}{
		{"pin with a rounded end", []Stroke{start(3, 20), line(3, 3), arc(0, 0, 0, 3, Right)}, false, 17 + 1.5*math.Pi},
		{"sleeve", []Stroke{start(3, 0), line(7, 0), line(7, 20), line(3, 20), line(3, 0)}, true, 48},
		{"ring", []Stroke{start(12, 0), arc(12, 0, 10, 0, Left)}, true, 4 * math.Pi},
		{"arc rounded to a micrometre", []Stroke{start(10, 0), arc(10.707, 0.293, 10, 1, Left)}, false, 0.25 * math.Pi},
		{"start alone as first line", []Stroke{start(1, 1), line(2, 2)}, false, math.Sqrt2},
	} {
		p, err := New(c.name, c.strokes)
		if err != nil {
			t.Errorf("%s: %v", c.name, err)
			continue
		}
		sum := 0.0
		for _, s := range p.Segments {
			sum += float64(s.Length()) * 1000
		}
		if p.Closed() != c.closed || !near1(sum, c.length, 3e-3*c.length) {
			t.Errorf("%s: closed %v, length %v, want %v, %v", c.name, p.Closed(), sum, c.closed, c.length)
		}
	}
}

func TestRefused(t *testing.T) {
	for _, c := range []struct {
		strokes []Stroke
		stroke  int // of the first fault, from 0
		says    string
	}{
		{nil, 0, "no line and no arc"},
		{[]Stroke{start(1, 1)}, 0, "no line and no arc"},
		{[]Stroke{line(1, 1), line(2, 2)}, 0, "begins with `from` alone"},
		{[]Stroke{start(1, 1), start(2, 2)}, 1, "every stroke has `to`"},
		{[]Stroke{start(1, 1), {To: mm(2, 2), Centre: mm(1, 2)}}, 1, "both `centre` and `turn`"},
		{[]Stroke{start(1, 1), {To: mm(2, 2), Turn: Left}}, 1, "both `centre` and `turn`"},
		{[]Stroke{start(1, 1), line(1, 1)}, 1, "no length"},
		{[]Stroke{start(1, 1), arc(3, 1, 1.5, 1, Left)}, 1, "0.5 mm and 1.5 mm from its centre"},
		{[]Stroke{start(1, 1), line(-1, 1)}, 1, "beyond the axis"},
		{[]Stroke{start(1, 0), arc(1, 2, 1, 1, Right), arc(1, 6, 1, 4, Right)}, 2, "beyond the axis"},
		{[]Stroke{start(1, 0), line(4, 0), line(4, 2), line(2, -2)}, 3, "crosses or touches its own stroke 2"},
		{[]Stroke{start(1, 0), line(4, 0), line(2, 0)}, 2, "back along its own stroke 2"},
		{[]Stroke{start(1, 0), line(4, 0), line(4, 3), line(2, 0), line(1, 3)}, 3, "crosses or touches its own stroke 2"},
		{[]Stroke{start(1, 0), {To: &Point{quantity.Length(math.NaN()), 0}}}, 1, "not a number"},
		{[]Stroke{start(1, 0), line(100, 0), line(100, 0.00001)}, 2, "shorter than a millionth"},
	} {
		_, err := New("part", c.strokes)
		var f Faults
		if !errors.As(err, &f) || f[0].Stroke != c.stroke || !strings.Contains(f[0].What, c.says) {
			t.Errorf("%v: got %v, want stroke %d, %q", c.strokes, err, c.stroke, c.says)
		}
	}
}

func TestClosedByAxis(t *testing.T) {
	ball, err := New("ball", []Stroke{start(0, -2), arc(0, 2, 0, 0, Left)})
	if err != nil {
		t.Fatal(err)
	}
	closed, err := ball.ClosedByAxis()
	if err != nil || !closed.Closed() || len(ball.Segments) != 1 {
		t.Errorf("got %v, %v", closed, err)
	}
	open, err := New("open", []Stroke{start(1, 0), line(2, 0), line(2, 1)})
	if err != nil {
		t.Fatal(err)
	}
	if _, err := open.ClosedByAxis(); err == nil || !strings.Contains(err.Error(), "must be closed") {
		t.Errorf("open outline: %v", err)
	}
}

func ExampleNew() {
	_, err := New("plate", []Stroke{start(10, 0), line(60, 0), line(60, 4), line(8, -2)})
	fmt.Println(err)
	// Output: profile "plate", stroke 4, at r = 25.3333 mm, z = 0 mm: the outline crosses or touches its own stroke 2
}

// go test -fuzz=FuzzNew ./hv/profile
func FuzzNew(f *testing.F) {
	f.Add([]byte{0, 10, 0, 1, 20, 0, 2, 30, 10, 20, 10})
	f.Add([]byte{0, 0, 0, 2, 0, 20, 0, 10, 1, 5, 5, 1, 0, 0})
	f.Fuzz(func(t *testing.T, data []byte) {
		p, err := New("fuzz", strokesOf(data))
		if err == nil {
			NewPlane([]Profile{p})
		}
	})
}

// strokesOf reads bytes as strokes with coordinates in millimetres.
func strokesOf(data []byte) (list []Stroke) {
	next := func() float64 {
		if len(data) == 0 {
			return 0
		}
		b := data[0]
		data = data[1:]
		return float64(int8(b)) / 4
	}
	for len(data) > 0 && len(list) < 12 {
		switch kind := int(next()*4) % 3; {
		case len(list) == 0:
			list = append(list, start(next(), next()))
		case kind == 2:
			list = append(list, arc(next(), next(), next(), next(), Turn(1+len(data)%2)))
		default:
			list = append(list, line(next(), next()))
		}
	}
	return list
}
