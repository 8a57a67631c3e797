package digest

import (
	"slices"

	"kilovet/rules"
)

// Key is a key the description lacks and how many findings want it.
type Key struct {
	Name  string
	Wants int
}

// Missing is the keys that findings lack, in the order of Against and then of
// the rest, each once.
func Missing(r *rules.Review) []Key {
	var keys []Key
	for _, f := range append(Against(r), r.Findings...) {
		for _, name := range f.Missing {
			if !slices.ContainsFunc(keys, func(k Key) bool { return k.Name == name }) {
				keys = append(keys, Key{name, wants(r, name)})
			}
		}
	}
	return keys
}

func wants(r *rules.Review, name string) int {
	n := 0
	for _, f := range r.Findings {
		if slices.Contains(f.Missing, name) {
			n++
		}
	}
	return n
}

// MissingText names the missing keys, at most the given number of them; empty
// where nothing is missing.
func MissingText(r *rules.Review, most int) string {
	var names []string
	for _, k := range Missing(r) {
		names = append(names, k.Name)
	}
	return some(names, most, ", ")
}
