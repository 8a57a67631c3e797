package html

import (
	"html/template"

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

type mark struct {
	Number  int
	Verdict rule.Verdict
	Subject string
	Rules   []ruleLink
}

type ruleLink struct{ ID, Name string }

// schematicOf draws a diagram; nil where there is none.
func schematicOf(pen *drawing.Pen, d *diagram.Diagram, ids map[about]string) *schematic {
	if d == nil {
		return nil
	}
	picture := pen.Schematic(d)
	s := &schematic{
		Drawing: template.HTML(picture.SVG("drawing", "Schematic", drawing.Words(d))),
		Caption: "Drawn from the description. Flags bear the numbers of the list below; their outline tells the verdict.",
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
