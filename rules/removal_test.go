package rules_test

import (
	"regexp"
	"slices"
	"strings"
	"testing"

	"kilovet/hv/chain"
	"kilovet/hv/parallel"
	"kilovet/rules"
	"kilovet/rules/evidence"
	"kilovet/rules/rule"
)

// hazards are what a description may leave out because the hazard is then not there: what
// was judged is gone with the thing. Each names what the review then takes for granted.
var hazards = map[string]string{
	"[cable]": "no cable, no insulation of one",
	`[[spacing]] "filter and terminal to the enclosure"`: "the cable, whose rating stands between terminal and enclosure, as an assumption",
}

// elsewhere are the head of a description and tables whose keys bear on life only through the
// voltages that they make.
var elsewhere = regexp.MustCompile(`^ |^\[(beam|bias|multiplier|\[filter\])\] `)

// Of everything that the built-in description says, one thing at a time is left out: no
// finding about life gets better by it, and none is gone that leaves nothing open behind.
func TestLeavingOutNeverHelps(t *testing.T) {
	ordinary(t)
	all := variants(string(described(t, "column")))
	all = slices.DeleteFunc(all, func(v variant) bool { return elsewhere.MatchString(v.name) })
	if len(all) < 100 {
		t.Fatalf("%d things to leave out", len(all))
	}
	base := aboutLife(t, string(described(t, "column")))
	said := make([][]string, len(all))
	parallel.Each(len(all), func(i int) {
		c, faults := chain.Read([]byte(all[i].text))
		if len(faults) == 0 {
			said[i] = helped(base, judgedLife(c))
		}
	})
	for i, v := range all {
		if _, stated := hazards[v.name]; stated != (len(said[i]) > 0) {
			t.Errorf("without %s: stated as a hazard that is then not there: %t, %s", v.name, stated, strings.Join(said[i], "; "))
		}
	}
}

// helped says what of a review about life got better, or is gone with nothing left open.
func helped(base, now []rule.Finding) (all []string) {
	open := slices.ContainsFunc(now, func(f rule.Finding) bool { return f.Verdict == rule.Unassessed || f.Verdict == rule.Fails })
	for _, was := range base {
		i := slices.IndexFunc(now, func(f rule.Finding) bool { return f.Rule == was.Rule && f.Subject == was.Subject })
		switch {
		case i >= 0 && rule.Graver(was.Verdict, now[i].Verdict):
			all = append(all, was.Rule+" of "+was.Subject+" gets better")
		case i < 0 && !open:
			all = append(all, was.Rule+" of "+was.Subject+" is gone, and nothing is open")
		}
	}
	return all
}

func aboutLife(t *testing.T, text string) []rule.Finding {
	t.Helper()
	c, faults := chain.Read([]byte(text))
	if len(faults) > 0 {
		t.Fatal(faults)
	}
	return judgedLife(c)
}

// judgedLife is what the rules of concern life say, but those about single faults.
func judgedLife(c *chain.Chain) (all []rule.Finding) {
	e := evidence.New(c)
	for _, r := range rules.All() {
		if r.Concern == rule.Life && !strings.HasPrefix(r.ID, "fault.") {
			all = append(all, r.Judge(e).Findings...)
		}
	}
	return all
}

// variant is a description with one thing left out.
type variant struct{ name, text string }

var (
	nameKey = regexp.MustCompile(`(?m)^name +=\s*("[^"]*")`)
	keyLine = regexp.MustCompile(`^(\w+)\s*= (.*)$`)
	entry   = regexp.MustCompile(`\w+ = (?:"[^"]*"|\[[^\]]*\]|true|false|\d+)`)
)

// variants leaves out every table, every key and every entry of an inline table in turn.
func variants(text string) (all []variant) {
	tables := regexp.MustCompile(`(?m)^\[`).Split(text, -1)
	for i := range tables[1:] {
		without := slices.Concat(tables[:i+1], tables[i+2:])
		all = append(all, variant{tableName(tables[i+1]), strings.Join(without, "[")})
	}
	lines := strings.Split(text, "\n")
	table := ""
	for i, line := range lines {
		if strings.HasPrefix(line, "[") {
			table = tableName(strings.TrimPrefix(strings.Join(lines[i:min(i+2, len(lines))], "\n"), "["))
		}
		m := keyLine.FindStringSubmatch(line)
		if m == nil {
			continue
		}
		with := func(becomes ...string) string {
			return strings.Join(slices.Concat(lines[:i], becomes, lines[i+1:]), "\n")
		}
		all = append(all, variant{table + " " + m[1], with()})
		if !strings.HasPrefix(m[2], "{") {
			continue
		}
		entries := entry.FindAllString(m[2], -1)
		for j, e := range entries {
			key, _, _ := strings.Cut(e, " ")
			rest := slices.Concat(entries[:j], entries[j+1:])
			all = append(all, variant{table + " " + m[1] + "." + key, with(m[1] + " = { " + strings.Join(rest, ", ") + " }")})
		}
	}
	return all
}

// tableName is the header of a table, with its name where it has one.
func tableName(body string) string {
	header, _, _ := strings.Cut(body, "\n")
	if m := nameKey.FindStringSubmatch(body); m != nil {
		return "[" + header + " " + m[1]
	}
	return "[" + header
}
