package fault_test

import (
	"testing"

	"kilovet/rules/evidence"
	"kilovet/rules/fault"
)

// TestStatesUnderFaultsAreLetGo: after all faults are studied no state of theirs is held, that
// of the whole chain is, and a fault that is asked for again gives what it gave.
func TestStatesUnderFaultsAreLetGo(t *testing.T) {
	e := evidence.New(read(t, stiff(2, metered)))
	whole := evidence.Condition{State: evidence.Working}
	before, err := e.Under(whole).Network()
	if err != nil {
		t.Fatal(err)
	}
	list := fault.Of(e)
	first, err := e.Under(list[0].Condition()).Network()
	if err != nil {
		t.Fatal(err)
	}
	if again, _ := e.Under(list[0].Condition()).Network(); again != first {
		t.Error("a state that is held was computed twice")
	}
	all := fault.StudyAll(e)
	if after, _ := e.Under(whole).Network(); after != before {
		t.Error("the state of the whole chain was let go")
	}
	again, err := e.Under(list[0].Condition()).Network()
	if err != nil {
		t.Fatal(err)
	}
	if again == first {
		t.Error("the state under " + list[0].Name + " is still held")
	}
	if o := fault.Study(e, list[0]); o.Output != all[0].Output || o.Drive != all[0].Drive {
		t.Errorf("%s gave %v at %v and then %v at %v", list[0].Name, all[0].Output, all[0].Drive, o.Output, o.Drive)
	}
}
