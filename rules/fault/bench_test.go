package fault_test

import (
	"testing"

	"kilovet/hv/parallel"
	"kilovet/rules/evidence"
	"kilovet/rules/fault"
)

// BenchmarkAllFaults computes and judges every single fault of the built-in column of six
// stages, and those with the errors of assembly, on top of its healthy state. Run with:
// go test -bench AllFaults ./rules/fault
func BenchmarkAllFaults(b *testing.B) {
	b.Run("single", func(b *testing.B) { studied(b, func(f fault.Fault) bool { return !f.Assembly }) })
	b.Run("with errors of assembly", func(b *testing.B) { studied(b, func(fault.Fault) bool { return true }) })
}

func studied(b *testing.B, counts func(fault.Fault) bool) {
	for b.Loop() {
		b.StopTimer()
		e := builtIn(b, "column")
		for _, s := range evidence.States {
			_, _ = e.In(s).Potential("output")
		}
		var list []fault.Fault
		for _, f := range fault.Of(e) {
			if counts(f) {
				list = append(list, f)
			}
		}
		_, _ = e.Under(evidence.Condition{State: evidence.Working}).Network()
		b.StartTimer()
		parallel.Each(len(list), func(i int) { fault.Study(e, list[i]) })
		b.ReportMetric(float64(len(list)), "faults")
	}
}
