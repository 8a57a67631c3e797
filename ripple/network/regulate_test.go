package network

import (
	"errors"
	"math"
	"testing"

	"kilovet/hv/lack"
	"kilovet/hv/quantity"
)

// seeking regulates what reads by a function of the drive, up to a limit.
func seeking(read func(float64) float64, wanted, first, limit float64) (quantity.Voltage, int, error) {
	trials := 0
	peak, err := Regulate(Regulation[quantity.Voltage]{
		Wanted: quantity.Voltage(wanted), First: quantity.Voltage(first),
		Limit: func() (quantity.Voltage, error) { return quantity.Voltage(limit), nil },
		At: func(peak quantity.Voltage, _ *quantity.Voltage) (quantity.Voltage, error) {
			trials++
			return peak, nil
		},
		Read: func(peak quantity.Voltage) quantity.Voltage { return quantity.Voltage(read(float64(peak))) },
	})
	return peak, trials, err
}

// Closed forms of readings that rise with the drive: in proportion, by a root, with a
// threshold, and with a jump, below which it stays.
func TestRegulateClosedForms(t *testing.T) {
	for what, c := range map[string]struct {
		read                func(float64) float64
		wanted, first, want float64
		trials              int
	}{
		"in proportion":      {func(p float64) float64 { return p / 1000 }, 1, 1700, 1000, 3},
		"from far below":     {func(p float64) float64 { return p / 1000 }, 1, 10, 1000, 4},
		"as a root":          {func(p float64) float64 { return math.Sqrt(p / 1000) }, 1, 300, 1000, 15},
		"above a threshold":  {func(p float64) float64 { return math.Max(0, p-400) / 600 }, 1, 1500, 1000, 12},
		"not enough":         {func(p float64) float64 { return p / 4000 }, 1, 1700, 2000, 3},
		"the wrong polarity": {func(p float64) float64 { return -p / 1000 }, 1, 1700, 2000, 3},
		"a jump over what it wants": {func(p float64) float64 {
			if p > 900 {
				return 2
			}
			return p / 1000
		}, 1, 500, 900, 40},
	} {
		got, trials, err := seeking(c.read, c.wanted, c.first, 2000)
		if err != nil || math.Abs(float64(got)/c.want-1) > 3e-4 {
			t.Errorf("%s: %v (%v), want %v", what, got, err, c.want)
		}
		if trials > c.trials {
			t.Errorf("%s: %d trials", what, trials)
		}
	}
}

func TestRegulateFails(t *testing.T) {
	swings := 0
	_, _, err := seeking(func(float64) float64 { swings = 1 - swings; return 2 * float64(swings) }, 1, 1000, 2000)
	if err != nil && lack.Of(err) == nil {
		t.Errorf("no rest: %v", err)
	}
	broken := errors.New("no state")
	_, err = Regulate(Regulation[int]{Wanted: 1, First: 1, At: func(quantity.Voltage, *int) (int, error) { return 0, broken }})
	if !errors.Is(err, broken) {
		t.Errorf("the reason is lost: %v", err)
	}
	_, err = Regulate(Regulation[int]{Wanted: 1, First: 1, At: func(quantity.Voltage, *int) (int, error) { return 0, nil },
		Read: func(int) quantity.Voltage { return 0.5 }, Limit: func() (quantity.Voltage, error) { return 0, broken }})
	if !errors.Is(err, broken) {
		t.Errorf("an unknown limit: %v", err)
	}
}
