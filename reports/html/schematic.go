package html

import (
	"html/template"

	"gonum.org/v1/plot/vg"

	"kilovet/reports/digest"
	"kilovet/reports/drawing"
	"kilovet/rules/diagram"
	"kilovet/rules/rule"
)

// schematic is the drawing with what it says in words.
type schematic struct {
	Drawing template.HTML
	Caption string
	Marks   []mark
	Parts   []diagram.Part
}

// flags says what flags are, where there are any.
func flags(d *diagram.Diagram) string {
	if len(d.Marks) == 0 {
		return ""
	}
	return " Flags bear the numbers of the list below; their outline tells the verdict."
}

type mark struct {
	Number  int
	Verdict rule.Verdict
	Subject string
	Rules   []ruleLink
}

type ruleLink struct{ ID, Name string }

// The room of a schematic, about that of a screen.
const (
	wideRoom = 290 * vg.Millimeter
	highRoom = 180 * vg.Millimeter
)

// schematicOf draws a diagram; nil where there is none.
func schematicOf(pen *drawing.Pen, d *diagram.Diagram, ids map[about]string) *schematic {
	if d == nil {
		return nil
	}
	picture := pen.SchematicIn(d, wideRoom, highRoom)
	s := &schematic{
		Drawing: template.HTML(picture.SVG("drawing", "Schematic", drawing.Words(d))),
		Caption: digest.SchematicCaption(d) + flags(d),
	}
	for _, m := range d.Marks {
		out := mark{m.Number, m.Verdict, clean(m.Subject), nil}
		for _, id := range m.Rules {
			out.Rules = append(out.Rules, ruleLink{ids[about{clean(id), out.Subject}], clean(id)})
		}
		s.Marks = append(s.Marks, out)
	}
	for _, p := range d.Parts() {
		s.Parts = append(s.Parts, diagram.Part{Name: clean(p.Name), Kind: p.Kind, Value: clean(p.Value), From: clean(p.From), To: clean(p.To)})
	}
	return s
}
