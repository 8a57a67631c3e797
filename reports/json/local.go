package json

import "kilovet/rules/local"

// localLimit is what became of one entry of a file of local limits.
type localLimit struct {
	Kind     string       `json:"kind"`
	Rule     string       `json:"rule"`
	Subjects []string     `json:"subjects"`
	Value    string       `json:"value"`
	From     string       `json:"from"`
	Result   local.Result `json:"result"`
	Because  string       `json:"because"`
	Line     int          `json:"line"`
	Column   int          `json:"column"`
}

func localOf(o local.Outcome) localLimit {
	return localLimit{o.Kind, o.Rule, each(o.Subjects, same), o.Value, o.From, o.Result, o.Because, o.Place.Line, o.Place.Column}
}
