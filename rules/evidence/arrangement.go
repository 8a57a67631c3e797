package evidence

import (
	"slices"

	"kilovet/hv/chain"
	"kilovet/rules/build"
)

// Arrangements are all whose field is worked out: the described ones, then those built
// from feedthroughs, from the geometry of the gun and from shapes of spacings. Each has a
// name of its own.
func (e *Evidence) Arrangements() []*build.Arrangement {
	all, _ := remember(e.Under(Condition{}), "arrangements", func() ([]*build.Arrangement, error) {
		return e.Under(Condition{}).arrangements(e.chain), nil
	})
	return all
}

func (e *Evidence) arrangements(c *chain.Chain) (all []*build.Arrangement) {
	for i := range c.Fields {
		all = append(all, build.Described(&c.Fields[i]))
	}
	for i := range c.Feedthroughs {
		all = append(all, build.Feedthrough(&c.Feedthroughs[i])...)
	}
	if c.Gun.IsFitted() && c.Gun.Geometry != nil {
		all = append(all, build.Gun(c.Gun.Geometry))
	}
	all = append(all, e.shapes()...)
	var names []string
	for _, a := range all {
		for slices.Contains(names, a.Name.V) {
			a.Name.V += " (built)"
		}
		names = append(names, a.Name.V)
	}
	return all
}

// Arrangement is the one of a name, nil for none.
func (e *Evidence) Arrangement(name string) *build.Arrangement {
	all := e.Arrangements()
	if i := slices.IndexFunc(all, func(a *build.Arrangement) bool { return a.Name.V == name }); i >= 0 {
		return all[i]
	}
	return nil
}
