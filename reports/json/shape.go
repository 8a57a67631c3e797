package json

import (
	"kilovet/rules"
	"kilovet/rules/figure"
	"kilovet/rules/rule"
)

// The shapes below are the contract: names, order, and what is left out where
// there is none. Lists are never null.
type (
	review struct {
		Contract    int               `json:"contract"`
		Program     program           `json:"program"`
		Inputs      []input           `json:"inputs"`
		Title       string            `json:"title"`
		Document    string            `json:"document"`
		Revision    string            `json:"revision"`
		Verdict     rule.Verdict      `json:"verdict"`
		Counts      counts            `json:"counts"`
		Figures     []number          `json:"figures"`
		Findings    []finding         `json:"findings"`
		Cautions    []caution         `json:"cautions"`
		PassedOver  []passedOver      `json:"passed_over"`
		Concerns    []concern         `json:"concerns"`
		Assumptions []string          `json:"assumptions"`
		Heading     map[string]string `json:"heading"`
		Summary     []line            `json:"summary"`
		Deference   string            `json:"deference"`
		Curves      []curve           `json:"curves"`
		Tables      []table           `json:"tables"`
		Local       []localLimit      `json:"local"`
	}
	program struct {
		Name    string `json:"name"`
		Version string `json:"version"`
	}
	input struct {
		Role   string `json:"role"`
		Name   string `json:"name"`
		SHA256 string `json:"sha256"`
	}
	counts struct {
		Meets      int `json:"meets"`
		Marginal   int `json:"marginal"`
		Fails      int `json:"fails"`
		Unassessed int `json:"unassessed"`
	}
	number struct {
		ID      string  `json:"id"`
		Subject string  `json:"subject"`
		State   string  `json:"state"`
		What    string  `json:"what"`
		Value   float64 `json:"value"`
		Unit    string  `json:"unit"`
		Basis   string  `json:"basis"`
	}
	finding struct {
		Rule        string        `json:"rule"`
		Subject     string        `json:"subject"`
		Verdict     rule.Verdict  `json:"verdict"`
		Concern     rule.Concern  `json:"concern"`
		Relation    rule.Relation `json:"relation"`
		Needed      *amount       `json:"needed,omitempty"`
		Provided    *amount       `json:"provided,omitempty"`
		Margin      *float64      `json:"margin,omitempty"`
		Under       string        `json:"under"`
		Because     string        `json:"because"`
		Remedy      string        `json:"remedy"`
		Missing     []string      `json:"missing"`
		Assumptions []string      `json:"assumptions"`
		Sources     []source      `json:"sources"`
		Key         string        `json:"key"`
		Line        int           `json:"line"`
		Column      int           `json:"column"`
	}
	amount struct {
		Value float64 `json:"value"`
		Unit  string  `json:"unit"`
	}
	source struct {
		Text    string    `json:"text"`
		Mark    rule.Mark `json:"mark"`
		Governs bool      `json:"governs"`
	}
	caution struct {
		Subject string `json:"subject"`
		Text    string `json:"text"`
	}
	passedOver struct {
		Rule    string `json:"rule"`
		Because string `json:"because"`
	}
	concern struct {
		Concern rule.Concern `json:"concern"`
		Counts  counts       `json:"counts"`
	}
	line struct {
		Label string `json:"label"`
		Text  string `json:"text"`
	}
)

func shape(r *rules.Review) review {
	return review{
		Contract: Contract, Program: program(r.Program),
		Inputs: each(r.Inputs, func(i rules.Input) input { return input(i) }),
		Title:  r.Heading.Title, Document: r.Heading.Document, Revision: r.Heading.Revision,
		Verdict: r.Verdict, Counts: countsOf(r.Counts),
		Figures: each(r.Figures, numberOf), Findings: each(r.Findings, findingOf),
		Cautions:    each(r.Cautions, func(c rule.Caution) caution { return caution(c) }),
		PassedOver:  each(r.PassedOver, func(p rule.PassedOver) passedOver { return passedOver(p) }),
		Concerns:    concernsOf(r.Findings),
		Assumptions: each(r.Assumptions, same), Heading: headingOf(r.Heading),
		Summary:   each(r.Summary, func(l rules.Line) line { return line(l) }),
		Deference: r.Deference,
		Curves:    each(r.Curves, curveOf), Tables: each(r.Tables, tableOf),
		Local: each(r.Local, localOf),
	}
}

func numberOf(f figure.Figure) number {
	return number{f.ID, f.Subject, f.State, f.What, f.Value, f.Unit, f.Basis}
}

func findingOf(f rule.Finding) finding {
	return finding{
		Rule: f.Rule, Subject: f.Subject, Verdict: f.Verdict, Concern: f.Concern, Relation: f.Relation,
		Needed: amountOf(f.Needed), Provided: amountOf(f.Provided), Margin: marginOf(f.Margin),
		Under: f.Under, Because: f.Because, Remedy: f.Remedy,
		Missing: each(f.Missing, same), Assumptions: each(f.Assumptions, same),
		Sources: each(f.Sources, func(s rule.Source) source { return source{s.Text, s.Mark, s.Governs} }),
		Key:     f.Place.Key, Line: f.Place.Line, Column: f.Place.Column,
	}
}

func amountOf(a *rule.Amount) *amount {
	if a == nil {
		return nil
	}
	return &amount{a.Value, a.Unit}
}

func marginOf(m *float64) *float64 {
	if m == nil || !isFinite(*m) {
		return nil
	}
	return m
}

func countsOf(c map[rule.Verdict]int) counts {
	return counts{Meets: c[rule.Meets], Marginal: c[rule.Marginal], Fails: c[rule.Fails], Unassessed: c[rule.Unassessed]}
}

// concernsOf counts the verdicts of each concern, the gravest first.
func concernsOf(findings []rule.Finding) []concern {
	return each(rule.Concerns, func(c rule.Concern) concern {
		n := map[rule.Verdict]int{}
		for _, f := range findings {
			if f.Concern == c {
				n[f.Verdict]++
			}
		}
		return concern{c, countsOf(n)}
	})
}

// headingOf is the title block under the keys of the description; encoding/json
// sorts them.
func headingOf(h rules.Heading) map[string]string {
	return map[string]string{"title": h.Title, "document": h.Document, "revision": h.Revision, "owner": h.Owner,
		"creator": h.Creator, "approver": h.Approver, "date": h.Date, "document_type": h.DocumentType}
}

func same(s string) string { return s }

// each maps a list and never returns nil, so that JSON shows [] for none.
func each[A, B any](list []A, f func(A) B) []B {
	out := make([]B, len(list))
	for i, v := range list {
		out[i] = f(v)
	}
	return out
}
