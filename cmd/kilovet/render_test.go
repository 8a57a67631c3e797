package main

import (
	"errors"
	"strings"
	"testing"
)

// What goes wrong while outputs are made side by side ends the run as a fault of the
// program; the first in order is told.
func TestWhatGoesWrongBesideIsTold(t *testing.T) {
	fine := maker{"a", func() ([]byte, error) { return []byte("a"), nil }}
	for want, broken := range map[string]func() ([]byte, error){
		"no room":       func() ([]byte, error) { return nil, errors.New("no room") },
		"page: no such": func() ([]byte, error) { panic("page: no such") },
	} {
		_, err := made([]maker{fine, {"b", broken}, {"c", func() ([]byte, error) { return nil, errors.New("another") }}})
		if err == nil || !strings.Contains(err.Error(), want) || !strings.Contains(err.Error(), "the program itself failed") {
			t.Errorf("%v, want %q", err, want)
		}
	}
	outputs, err := made([]maker{fine, fine})
	if err != nil || len(outputs) != 2 || string(outputs[1].data) != "a" {
		t.Errorf("%v, %v", outputs, err)
	}
}
