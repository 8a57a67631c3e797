package difference

import (
	"bytes"
	"encoding/json"
	"fmt"

	"kilovet/rules/compare"
	"kilovet/rules/rule"
)

// Contract is the number of the contract that JSON keeps; it changes only by
// addition.
const Contract = 1

type (
	report struct {
		Contract int       `json:"contract"`
		Program  program   `json:"program"`
		Old      half      `json:"old"`
		New      half      `json:"new"`
		Worse    bool      `json:"worse"`
		Inputs   []input   `json:"inputs"`
		Figures  []number  `json:"figures"`
		Findings []finding `json:"findings"`
		Local    *file     `json:"local,omitempty"`
	}
	file struct {
		Name   string `json:"name"`
		SHA256 string `json:"sha256"`
	}
	program struct {
		Name    string `json:"name"`
		Version string `json:"version"`
	}
	half struct {
		Name    string       `json:"name"`
		SHA256  string       `json:"sha256"`
		Title   string       `json:"title"`
		Verdict rule.Verdict `json:"verdict"`
	}
	input struct {
		Key       string `json:"key"`
		At        string `json:"at"`
		Old       string `json:"old,omitempty"`
		New       string `json:"new,omitempty"`
		Rewritten bool   `json:"rewritten"`
		Renamed   bool   `json:"renamed"`
	}
	number struct {
		ID      string   `json:"id"`
		Subject string   `json:"subject"`
		State   string   `json:"state"`
		What    string   `json:"what"`
		Unit    string   `json:"unit"`
		Old     *float64 `json:"old,omitempty"`
		New     *float64 `json:"new,omitempty"`
		Change  *float64 `json:"change,omitempty"`
	}
	finding struct {
		Rule    string       `json:"rule"`
		Subject string       `json:"subject"`
		Concern rule.Concern `json:"concern"`
		Old     rule.Verdict `json:"old,omitempty"`
		New     rule.Verdict `json:"new,omitempty"`
		Worse   bool         `json:"worse"`
		Because string       `json:"because"`
	}
)

// JSON writes the difference as one line for other programs; what a side lacks is
// left out. A number that is not finite is an error.
func JSON(r *Report) ([]byte, error) {
	out := report{
		Contract: Contract, Program: program(r.Program),
		Old: halfOf(r.Old, r.Was), New: halfOf(r.New, r.Is), Worse: r.Worse,
		Inputs:   each(r.Inputs, func(i compare.Input) input { return input(i) }),
		Figures:  each(r.Figures, func(f compare.Figure) number { return number(f) }),
		Findings: each(r.Findings, findingOf),
	}
	if r.Local.Name != "" {
		out.Local = &file{r.Local.Name, r.Local.SHA256}
	}
	var data bytes.Buffer
	encoder := json.NewEncoder(&data)
	encoder.SetEscapeHTML(false)
	if err := encoder.Encode(out); err != nil {
		return nil, fmt.Errorf("difference: %w", err)
	}
	return data.Bytes(), nil
}

func halfOf(s Side, v rule.Verdict) half { return half{s.Name, s.SHA256, s.Title, v} }

func findingOf(f compare.Finding) finding {
	out := finding{Rule: f.Rule, Subject: f.Subject, Worse: f.Worse}
	if f.Old != nil {
		out.Concern, out.Old, out.Because = f.Old.Concern, f.Old.Verdict, f.Old.Because
	}
	if f.New != nil {
		out.Concern, out.New, out.Because = f.New.Concern, f.New.Verdict, f.New.Because
	}
	return out
}

// each maps a list and never returns nil, so that JSON shows [] for none.
func each[A, B any](list []A, f func(A) B) []B {
	out := make([]B, len(list))
	for i, v := range list {
		out[i] = f(v)
	}
	return out
}
