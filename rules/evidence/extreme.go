package evidence

// Extreme is the largest of some values, and where and when it occurs.
type Extreme[Q ~float64] struct {
	Value Q
	Name  string
	Under Condition
}

// Ratings lists the conditions ratings and clearances are judged under: every
// state in every corner.
func Ratings() []Condition {
	var all []Condition
	for _, s := range States {
		for _, c := range Corners {
			all = append(all, Condition{State: s, Corner: c})
		}
	}
	return all
}

// Ratings lists the conditions that ratings are judged under from here: with a fault the
// one at hand, else every state in every corner.
func (e *Evidence) Ratings() []Condition {
	if e.failed() {
		return []Condition{e.condition}
	}
	return Ratings()
}

// LostCorners lists the corners with regulation lost.
func LostCorners() []Condition {
	var all []Condition
	for _, c := range Corners {
		all = append(all, Condition{State: Lost, Corner: c})
	}
	return all
}

// LongTerm lists the conditions creepage is judged under: what can stand for long,
// nominal.
func LongTerm() []Condition { return []Condition{{State: Working}, {State: Cold}} }

// Largest finds the largest value over conditions and names. Any value that cannot
// be had leaves the largest unknown: its error is returned.
func Largest[Q ~float64](e *Evidence, conditions []Condition, names []string, value func(*Evidence, string) (Q, error)) (Extreme[Q], error) {
	var most Extreme[Q]
	for i, c := range conditions {
		for j, name := range names {
			v, err := value(e.Under(c), name)
			if err != nil {
				return most, err
			}
			if i+j == 0 || v > most.Value {
				most = Extreme[Q]{v, name, c}
			}
		}
	}
	return most, nil
}
