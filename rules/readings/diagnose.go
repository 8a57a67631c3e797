package readings

import (
	"cmp"
	"math"
	"slices"
	"sync"

	"kilovet/hv/match"
	"kilovet/hv/parallel"
	"kilovet/rules/evidence"
)

// Suspect is what the readings point to: hypotheses that these readings cannot tell
// apart.
type Suspect struct {
	Names []string // the best first
	// Fit is how far the readings lie from it, rms in standard errors: about 1 where it
	// is the truth.
	Fit float64

	trials []*trial // in the order of their names
}

// trial is a hypothesis with what it predicts.
type trial struct {
	hypothesis
	predicted []float64
	misfit    float64
	err       error
	within    bool // lies between two that were computed
	// share is how far one within lies from its change towards another.
	share   float64
	towards evidence.Fault
}

func (t *trial) counts() int {
	if t.within {
		return 0
	}
	return 1
}

const (
	// most is how many suspects are named.
	most = 5
	// alike is the misfit below which two hypotheses cannot be told apart: two standard
	// errors in one reading.
	alike = 4
	// fits is the rms deviation in standard errors up to which a hypothesis explains the
	// readings.
	fits = 3
)

// diagnose tries every hypothesis and names what fits better than a healthy chain.
func diagnose(e *evidence.Evidence, all []taken, c *Comparison) {
	b := newBench(e, all)
	healthy := trial{predicted: b.healthy, misfit: b.misfit(b.read, b.healthy)}
	trials := append(b.tryAll(hypotheses(e)), b.seeps()...)
	c.Tried = len(trials)
	if c.Sign == Proved {
		trials = slices.DeleteFunc(trials, func(t trial) bool { return t.err == nil && b.turned(t.change) })
	}
	trials = append(trials, b.between(trials)...)
	seen, faint := b.sorted(trials, healthy.misfit, c)
	c.Suspects = b.grouped(seen)
	b.join(c.Suspects, faint)
	if len(c.Suspects) == 0 {
		c.Hidden = b.hidden(trials)
	}
	c.Apart, c.Standing = b.apart(c.Suspects)
}

// sorted are the hypotheses that explain the readings clearly better than a healthy chain,
// the best first, and those that do hardly; it notes in the comparison what was not computed
// and what does not show.
func (b *bench) sorted(trials []trial, healthy float64, c *Comparison) (seen, faint []*trial) {
	for i := range trials {
		t := &trials[i]
		if t.err != nil {
			c.Open = append(c.Open, t.name+": "+t.err.Error())
			continue
		}
		if t.misfit < healthy && t.misfit >= healthy-alike {
			faint = append(faint, t)
		}
		switch {
		case b.misfit(t.predicted, b.healthy) < alike:
			c.Unseen += t.counts()
		case t.misfit < healthy-alike:
			seen = append(seen, t)
		}
	}
	slices.SortStableFunc(seen, func(x, y *trial) int { return cmp.Compare(x.misfit, y.misfit) })
	return seen, faint
}

// hidden are the hypotheses that cannot be told from a healthy chain.
func (b *bench) hidden(trials []trial) (names []string) {
	var all []*trial
	for i := range trials {
		if t := &trials[i]; t.err == nil && !t.within && b.misfit(t.predicted, b.healthy) < alike {
			all = append(all, t)
		}
	}
	slices.SortStableFunc(all, func(x, y *trial) int { return cmp.Compare(x.misfit, y.misfit) })
	for _, t := range all {
		names = append(names, t.name)
	}
	return names
}

// grouped puts together what these readings cannot tell apart, and keeps the best.
func (b *bench) grouped(sorted []*trial) []Suspect {
	var all []Suspect
next:
	for _, t := range sorted {
		for i := range all {
			if b.misfit(t.predicted, all[i].trials[0].predicted) < alike {
				all[i].add(t)
				continue next
			}
		}
		if len(all) < most {
			all = append(all, Suspect{[]string{t.name}, b.rms(t.misfit), []*trial{t}})
		}
	}
	return all
}

// join adds to each suspect what by itself explains the readings hardly better than a
// healthy chain, and yet cannot be told from it.
func (b *bench) join(suspects []Suspect, faint []*trial) {
	for _, t := range faint {
		for i := range suspects {
			if b.misfit(t.predicted, suspects[i].trials[0].predicted) < alike {
				suspects[i].add(t)
				break
			}
		}
	}
}

func (s *Suspect) add(t *trial) {
	s.Names, s.trials = append(s.Names, t.name), append(s.trials, t)
}

// Fits reports whether a suspect explains the readings.
func (s Suspect) Fits() bool { return s.Fit <= fits }

// rms is a misfit as the rms deviation in standard errors.
func (b *bench) rms(misfit float64) float64 { return math.Sqrt(misfit / float64(len(b.all))) }

func (b *bench) misfit(read, predicted []float64) float64 {
	return match.Misfit(read, predicted, b.errors(predicted), b.common)
}

// between tries what lies between neighbours of one scale, and between the last of it
// and a healthy part, on the straight line from the readings of the one to those of the
// other.
func (b *bench) between(trials []trial) []trial {
	var all []trial
	for i := range trials {
		one := &trials[i]
		if one.off == nil || one.err != nil {
			continue
		}
		other, size, towards := b.healthy, one.off.beyond+" "+one.off.size, evidence.Fault{}
		if i+1 < len(trials) && trials[i+1].off != nil && trials[i+1].off.scale == one.off.scale {
			next := &trials[i+1]
			other, size, towards = next.predicted, one.off.size+" to "+next.off.size, next.change
			if next.err != nil {
				continue
			}
		}
		if t, better := b.along(one, other); better {
			t.name, t.towards = one.off.text(size), towards
			all = append(all, t)
		}
	}
	return all
}

// along is the best on the line from a trial to other readings, if it is better than
// its ends.
func (b *bench) along(one *trial, other []float64) (trial, bool) {
	const parts = 8
	best := trial{hypothesis: one.hypothesis, within: true, misfit: min(one.misfit, b.misfit(b.read, other))}
	for k := 1; k < parts; k++ {
		p := blend(one.predicted, other, float64(k)/parts)
		if m := b.misfit(b.read, p); m < best.misfit {
			best.predicted, best.misfit, best.share = p, m, float64(k)/parts
		}
	}
	return best, best.predicted != nil
}

func blend(a, b []float64, share float64) []float64 {
	p := make([]float64, len(a))
	for i := range a {
		p[i] = a[i] + share*(b[i]-a[i])
	}
	return p
}

// tryAll computes every hypothesis, as many at once as there are processors; results
// are placed by index.
func (b *bench) tryAll(list []hypothesis) []trial {
	trials := make([]trial, len(list))
	var telling sync.Mutex
	tried := 0
	parallel.Each(len(list), func(i int) {
		trials[i] = b.try(list[i])
		telling.Lock()
		defer telling.Unlock()
		tried++
		b.e.Tell("what the readings point to", tried, len(list))
	})
	return trials
}

func (b *bench) try(h hypothesis) trial {
	t := trial{hypothesis: h}
	if t.predicted, t.err = b.predict(h.change); t.err == nil {
		t.misfit = b.misfit(b.read, t.predicted)
	}
	return t
}
