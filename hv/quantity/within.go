package quantity

import (
	"regexp"
	"slices"
	"strings"
	"sync"
)

// Mention is a value with its unit within a sentence. Dimension is nil for a unit that only
// instruments show, as a dose rate in sieverts.
type Mention struct {
	Text      string
	Dimension *Dimension
	Unit      string
}

// mention is a number and what may be its unit: a sentence goes on after it. Few ask, and it
// takes long to prepare.
var mention = sync.OnceValue(func() *regexp.Regexp {
	return regexp.MustCompile(`(?:^|[^\pL\pN._-])([+-]?(?:\d+(?:\.\d*)?|\.\d+)(?:[eE][+-]?\d+)?) ?(%|[\pL°µμΩΩ][\pL\pN/²³]*)`)
})

// shown are units that instruments show and no description is written in.
var shown = []string{"Sv/h", "mSv/h", "uSv/h", "nSv/h", "Sv/s", "cps", "counts/s"}

// Mentions are the values with a known unit that a sentence holds, in its order.
func Mentions(sentence string) (all []Mention) {
	for _, m := range mention().FindAllStringSubmatch(sentence, -1) {
		symbol := plainSigns(m[2])
		if d := knows(symbol); d != nil {
			all = append(all, Mention{m[1] + " " + m[2], d, symbol})
			continue
		}
		if slices.Contains(shown, symbol) {
			all = append(all, Mention{m[1] + " " + m[2], nil, symbol})
		}
	}
	return all
}

// IsUnit reports whether a word is a unit that a description is written in or an
// instrument shows.
func IsUnit(word string) bool {
	symbol := plainSigns(word)
	return knows(symbol) != nil || slices.Contains(shown, symbol)
}

// knows is the first dimension that knows a unit.
func knows(symbol string) *Dimension {
	if strings.Trim(symbol, "1") == "" {
		return nil
	}
	return knowing()[symbol]
}

// knowing are the first dimensions by the units that they know.
var knowing = sync.OnceValue(func() map[string]*Dimension {
	first := map[string]*Dimension{}
	for _, d := range dimensions {
		for _, u := range d.units {
			if first[u.symbol] == nil {
				first[u.symbol] = d
			}
		}
	}
	return first
})
