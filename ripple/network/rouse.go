package network

// rousing is what a search has left to wake diodes that sleep: those that are to conduct
// by the circuit between the peaks and have not done so in the period walked last. Of
// their charge Newton's method knows nothing.
type rousing struct {
	pressing float64 // how hard the diodes are pressed in the guess, as attempts say it
	anew     int     // guesses that may yet be made anew
}

// press guesses a state with the diodes pressed to conduct, as hard as an attempt says.
func (s *search) press(how float64) {
	s.pressing = how
	s.prepare(how / float64(1+len(s.diodes)*len(s.diodes)))
	s.aim()
}

// rouse guesses anew, the diodes pressed twice as hard, where the guess leaves a diode
// asleep. It reports whether it did.
func (s *search) rouse() bool {
	if s.anew == 0 || !s.sleeps() {
		s.anew = 0
		return false
	}
	s.anew--
	s.press(2 * s.pressing)
	return true
}

func (s *search) sleeps() bool { return s.sleeper() >= 0 }

// sleeper is the first diode that sleeps, or −1.
func (s *search) sleeper() int {
	for i := range s.diodes {
		if (s.peaks.on[2*i] || s.peaks.on[2*i+1]) && !s.linear.wakes(i) {
			return i
		}
	}
	return -1
}

// wakes reports whether a diode conducts at any time.
func (t *track) wakes(diode int) bool {
	for k := range t.steps {
		if t.conducting(k)[diode] {
			return true
		}
	}
	return false
}
