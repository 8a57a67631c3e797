package page

import "testing"

func TestNotesCountOnAfterTheAlphabet(t *testing.T) {
	for n, want := range map[int]string{0: "a", 25: "z", 26: "aa", 27: "ab", 51: "az", 52: "ba", 701: "zz", 702: "aaa"} {
		if got := lettered(n); got != want {
			t.Errorf("%d reads %s, want %s", n, got, want)
		}
	}
}
