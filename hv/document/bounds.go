package document

import (
	"fmt"
	"strconv"
	"strings"

	"kilovet/hv/quantity"
)

// bounds is what a range tag says: "> 0 V, <= 1 MV".
type bounds []bound

type bound struct {
	sign  string // >, >=, < or <=
	limit float64
	text  string // of the limit, with its unit
}

// parseBounds reads a range tag in the units of its dimension (nil: pure numbers).
func parseBounds(tag string, d *quantity.Dimension) (bounds, error) {
	var all bounds
	if tag == "" {
		return nil, nil
	}
	for part := range strings.SplitSeq(tag, ",") {
		sign, text, _ := strings.Cut(strings.TrimSpace(part), " ")
		if _, known := signWords[sign]; !known {
			return nil, fmt.Errorf("range %q: no comparison %q", tag, sign)
		}
		limit, err := parseLimit(text, d)
		if err != nil {
			return nil, fmt.Errorf("range %q: %w", tag, err)
		}
		all = append(all, bound{sign, limit, text})
	}
	return all, nil
}

func parseLimit(text string, d *quantity.Dimension) (float64, error) {
	if d == nil {
		return strconv.ParseFloat(text, 64)
	}
	return d.Parse(text)
}

var signWords = map[string]string{">": "more than", ">=": "at least", "<": "less than", "<=": "at most"}

// holds reports whether a value lies within.
func (bs bounds) holds(v float64) bool {
	for _, b := range bs {
		if !b.holds(v) {
			return false
		}
	}
	return true
}

func (b bound) holds(v float64) bool {
	type pure float64
	x, limit := pure(v), pure(b.limit)
	switch b.sign {
	case ">":
		return !quantity.AtMost(x, limit)
	case ">=":
		return quantity.AtLeast(x, limit)
	case "<":
		return !quantity.AtLeast(x, limit)
	}
	return quantity.AtMost(x, limit)
}

// words says the range for people: "more than 0 V and at most 1 MV"; a range that
// holds a single value is that value.
func (bs bounds) words() string {
	if len(bs) == 2 && bs[0].sign == ">=" && bs[1].sign == "<=" && bs[0].limit == bs[1].limit {
		return bs[0].text
	}
	parts := make([]string, len(bs))
	for i, b := range bs {
		parts[i] = signWords[b.sign] + " " + b.text
	}
	return strings.Join(parts, " and ")
}
