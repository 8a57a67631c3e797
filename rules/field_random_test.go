package rules_test

import (
	"fmt"
	"math"
	"math/rand/v2"
	"strings"
	"testing"

	"kilovet/hv/document"
	"kilovet/rules"
	"kilovet/rules/rule"
)

// scrawl draws outlines at random, in millimetres; most are sound, some cross, overlap,
// touch or are no figures.
type scrawl struct {
	*rand.Rand
	text strings.Builder
}

func (s *scrawl) in(low, high float64) float64 {
	return math.Round((low+(high-low)*s.Float64())*100) / 100
}

func (s *scrawl) put(format string, args ...any) { fmt.Fprintf(&s.text, format+"\n", args...) }

func rz(r, z float64) string { return fmt.Sprintf(`["%.12g mm", "%.12g mm"]`, r, z) }

func lines(points ...float64) string {
	words := []string{"{ from = " + rz(points[0], points[1]) + " }"}
	for i := 2; i+1 < len(points); i += 2 {
		words = append(words, "{ to = "+rz(points[i], points[i+1])+" }")
	}
	return "profile = [" + strings.Join(words, ", ") + "]"
}

func circle(radius, z float64) string {
	return fmt.Sprintf(`profile = [{ from = %s }, { to = %s, centre = %s, turn = "left" }]`, rz(0, z-radius), rz(0, z+radius), rz(0, z))
}

func torus(radius, r, z float64) string {
	return fmt.Sprintf(`profile = [{ from = %[1]s }, { to = %[2]s, centre = %[3]s, turn = "left" }, { to = %[1]s, centre = %[3]s, turn = "left" }]`,
		rz(r-radius, z), rz(r+radius, z), rz(r, z))
}

// electrode is a ball, a ring, a disc, a tube or a cone at a height about z.
func (s *scrawl) electrode(name string, z float64) {
	s.put("[[field.electrodes]]\nname = %q\nvoltage = \"%g kV\"", name, s.in(-60, 60))
	a, b := s.in(0.3, 12), s.in(0.3, 12)
	switch s.IntN(5) {
	case 0:
		s.put("%s", circle(a, z))
	case 1:
		s.put("%s", torus(min(a, b), a+b, z))
	case 2:
		s.put("%s", lines(0, z, a, z, a, z+b, 0, z+b))
	case 3:
		s.put("%s", lines(a, z, a+1, z, a+1, z+b, a, z+b, a, z))
	default:
		s.put("%s", lines(0, z, a, z+b))
	}
}

func (s *scrawl) dielectric(name string) {
	s.put("[[field.dielectrics]]\nname = %q\npermittivity = %g", name, s.in(1, 30))
	if s.IntN(2) == 0 {
		s.put("resistivity = \"%ge9 ohm m\"", s.in(1, 900))
	}
	if s.IntN(2) == 0 {
		s.put(`material = "alumina"`)
	}
	r, z, w, h := s.in(0, 20), s.in(-20, 40), s.in(0.05, 12), s.in(0.05, 30)
	s.put("%s", lines(r, z, r+w, z, r+w, z+h, r, z+h, r, z))
}

// ends is open space, a plane without end, a can, or a piece between natural ends.
func (s *scrawl) ends() {
	switch s.IntN(4) {
	case 0:
	case 1:
		s.put("[[field.boundary]]\nkind = %q\n%s", []string{"earth", "natural"}[s.IntN(2)], lines(0, -30, 200, -30))
	case 2:
		s.put("[[field.boundary]]\nkind = \"earth\"\n%s", lines(0, -40, 60, -40, 60, 80, 0, 80))
	default:
		s.put("[[field.electrodes]]\nname = \"can\"\nvoltage = \"0 V\"\n%s", lines(50, -35, 50, 75))
		s.put("[[field.boundary]]\nkind = \"natural\"\n%s", lines(0, -35, 50, -35))
		s.put("[[field.boundary]]\nkind = \"natural\"\n%s", lines(0, 75, 50, 75))
	}
}

func scrawled(seed uint64) []byte {
	s := &scrawl{Rand: rand.New(rand.NewPCG(seed, 8))}
	s.put("format = 1\n[site]\naltitude = \"%g m\"\nair_temperature = \"25 degC\"\npollution_degree = 2\n[[field]]\nname = \"f\"\nmedium = %q\nprobes = [{ name = \"p\", at = %s }]",
		s.in(0, 3000), []string{"air", "vacuum", "oil"}[s.IntN(3)], rz(s.in(0, 40), s.in(-30, 60)))
	for i := range 1 + s.IntN(3) {
		s.electrode(fmt.Sprint("e", i), float64(i)*s.in(15, 30)-5)
	}
	for i := range s.IntN(3) {
		s.dielectric(fmt.Sprint("d", i))
	}
	s.ends()
	return []byte(s.text.String())
}

// Random descriptions of fields, through the reader and all rules: faults with a place, or
// a review in which every number is one; a field that is not resolved is unassessed.
func TestRandomFieldsThroughTheRules(t *testing.T) {
	count := 16
	if testing.Short() {
		count = 2
	}
	solved, refused := 0, 0
	for seed := range count {
		text := scrawled(uint64(seed))
		c, faults := rules.Read(text)
		if len(faults) > 0 {
			refused++
			placed(t, faults, text)
			continue
		}
		r, faults := rules.RunUnder(c, nil, rules.Program{Name: "kilovet"}, rules.Beside{Without: []string{"faults"}})
		if len(faults) > 0 {
			t.Fatalf("seed %d: %v", seed, faults)
		}
		if finite(t, seed, r) {
			solved++
		}
	}
	if t.Logf("%d solved, %d refused of %d", solved, refused, count); !testing.Short() && (solved < count/4 || refused == 0) {
		t.Errorf("the descriptions are no test: %d solved, %d refused of %d", solved, refused, count)
	}
}

// placed wants every fault on a line of the text and with a remedy.
func placed(t *testing.T, faults document.Faults, text []byte) {
	t.Helper()
	last := strings.Count(string(text), "\n") + 1
	for _, f := range faults {
		if f.Line < 1 || f.Line > last || f.What == "" || f.Remedy == "" {
			t.Errorf("a fault at line %d of %d: %q, %q", f.Line, last, f.What, f.Remedy)
		}
	}
}

// finite wants numbers in all of a review; it reports whether a field was solved. Without
// one the finding is unassessed.
func finite(t *testing.T, seed int, r *rules.Review) bool {
	t.Helper()
	solved := false
	for _, f := range r.Figures {
		solved = solved || f.ID == "field.capacitance"
		if math.IsNaN(f.Value) || math.IsInf(f.Value, 0) {
			t.Errorf("seed %d: %s of %s is %g", seed, f.ID, f.Subject, f.Value)
		}
	}
	for _, c := range r.Curves {
		if err := c.Check(); err != nil {
			t.Errorf("seed %d: %v", seed, err)
		}
	}
	for _, table := range r.Tables {
		if err := table.Check(); err != nil {
			t.Errorf("seed %d: %v", seed, err)
		}
	}
	for _, f := range r.Findings {
		if !strings.HasPrefix(f.Rule, "field.") {
			continue
		}
		if !solved && f.Verdict != rule.Unassessed {
			t.Errorf("seed %d: %s of %s is %s without a field", seed, f.Rule, f.Subject, f.Verdict)
		}
		for _, v := range []*rule.Amount{f.Provided, f.Needed} {
			if v != nil && (math.IsNaN(v.Value) || math.IsInf(v.Value, 0)) {
				t.Errorf("seed %d: %s of %s: %v", seed, f.Rule, f.Subject, v)
			}
		}
	}
	return solved
}

// What is written into a description of a field comes back as faults or as a review.
// go test -fuzz=FuzzFieldsThroughTheRules ./rules
func FuzzFieldsThroughTheRules(f *testing.F) {
	for seed := range uint64(6) {
		f.Add(string(scrawled(seed)))
	}
	f.Fuzz(func(t *testing.T, text string) {
		c, faults := rules.Read([]byte(text))
		if len(faults) > 0 || len(c.Fields) != 1 || strings.Count(text, "{") > 40 || c.Drive != nil {
			return
		}
		r, faults := rules.RunUnder(c, nil, rules.Program{Name: "kilovet"}, rules.Beside{Without: []string{"faults"}})
		if len(faults) == 0 {
			finite(t, 0, r)
		}
	})
}
