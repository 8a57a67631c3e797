package network

// rousing is what a search has left to wake diodes that sleep: those that are to conduct
// by the circuit between the peaks and have not done so in the period walked last. Of
// their charge Newton's method knows nothing.
type rousing struct {
	pressing float64 // how hard the diodes are pressed in the guess, as attempts say it
	anew     int     // guesses that may yet be made anew
	halve    int     // halvings that are left
	watched  bool    // the last correction began where no diode slept
}

// press guesses a state with the diodes pressed to conduct, as hard as an attempt says.
func (s *search) press(how float64) {
	s.pressing = how
	s.prepare(how / float64(1+len(s.diodes)*len(s.diodes)))
	s.aim()
}

// mostHalved is the number of times corrections may be halved in one attempt. Without load
// diodes may well sleep where all is right: only those are halved that have not led nearer
// by helpful.
const (
	mostHalved = 6
	helpful    = 0.01
)

// watch has the correction that follows halved where it puts diodes to sleep.
func (s *search) watch(g grade) {
	s.watched = g == rough && s.halve > 0 && !s.sleeps()
}

// rouse guesses anew, the diodes pressed twice as hard, or takes half of the last
// correction back, where a diode sleeps. It reports whether it did.
func (s *search) rouse() bool {
	switch {
	case s.anew > 0 && s.sleeps():
		s.anew--
		s.press(2 * s.pressing)
	case s.watched && s.halve > 0 && norm(s.r) > helpful*s.last && s.sleeps():
		s.halve--
		s.halfway(&s.sound)
	default:
		s.anew, s.watched = 0, false
		return false
	}
	return true
}

// halfway goes half of the way back to a state.
func (s *search) halfway(to *spot) {
	for i, x := range to.x {
		s.x[i] += (x - s.x[i]) / 2
	}
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
