package fields

import (
	"fmt"
	"strings"

	"kilovet/rules/evidence"
	"kilovet/rules/rule"
)

// mostNamed is how many dimensions a remedy names.
const mostNamed = 3

// sized adds to the remedy of the finding farthest above its limit the least changes of
// which each alone is enough; the others are referred to it.
func sized(all []rule.Finding, answers func(i int) ([]evidence.Answer, error)) []rule.Finding {
	worst := -1
	for i := range all {
		if over(all[i]) && (worst < 0 || *all[i].Margin < *all[worst].Margin) {
			worst = i
		}
	}
	for i := range all {
		switch {
		case i == worst:
			all[i].Remedy += "; " + oneIsEnough(answers(i))
		case over(all[i]):
			all[i].Remedy = fmt.Sprintf("see to %s first, which is farther above its limit; %s", all[worst].Subject, all[i].Remedy)
		}
	}
	return all
}

// over reports whether a field is above its limit, also where that is no failure.
func over(f rule.Finding) bool { return f.Margin != nil && *f.Margin < 0 }

// oneIsEnough says which dimensions are enough, else why none is.
func oneIsEnough(answers []evidence.Answer, err error) string {
	enough, not, err := namedDimensions(answers, err)
	switch {
	case enough != "":
		return "one of these is enough there: " + enough
	case err != nil:
		return "by how much was not found: " + err.Error()
	case not != "":
		return "no one dimension is enough (" + not + ")"
	}
	return "its outline has no dimension that could be changed alone"
}

// namedDimensions are the least changes of which each alone is enough, and why others are
// not.
func namedDimensions(answers []evidence.Answer, err error) (enough, not string, failed error) {
	var are, reasons []string
	names := map[string][]string{} // by reason
	for _, a := range answers {
		if text := a.Text(); text == "" {
			why := a.Err.Error()
			if names[why] == nil {
				reasons = append(reasons, why)
			}
			names[why] = append(names[why], a.Name)
		} else if len(are) < mostNamed {
			are = append(are, text)
		}
	}
	for i, why := range reasons {
		reasons[i] = strings.Join(names[why], ", ") + ": " + why
	}
	return strings.Join(are, ", or "), strings.Join(reasons, "; "), err
}
