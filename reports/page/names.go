package page

import (
	"strconv"
	"strings"
)

// names lists names; those that count on from one to the next are told as from and to.
func names(all []string) string {
	var out []string
	for i := 0; i < len(all); {
		n := counting(all[i:])
		if n < 3 {
			out, i = append(out, all[i]), i+1
			continue
		}
		_, last := numbered(all[i+n-1])
		out, i = append(out, all[i]+" to "+strconv.Itoa(last)), i+n
	}
	return strings.Join(out, ", ")
}

// counting is how many names from the first on count up by one.
func counting(all []string) int {
	stem, first := numbered(all[0])
	n := 1
	for stem != "" && n < len(all) {
		next, k := numbered(all[n])
		if next != stem || k != first+n {
			break
		}
		n++
	}
	return n
}

// numbered takes a name that ends with a number apart; the stem of one that does not is
// empty.
func numbered(name string) (stem string, n int) {
	at := strings.LastIndex(name, ".") + 1
	n, err := strconv.Atoi(name[at:])
	if err != nil || at == 0 || name[at:] != strconv.Itoa(n) {
		return "", 0
	}
	return name[:at], n
}
