package fault_test

import (
	"testing"

	"kilovet/rules/evidence"
	"kilovet/rules/fault"
)

// BenchmarkAllFaults computes and judges every single fault of the built-in column of six
// stages, on top of its healthy state. Run with: go test -bench AllFaults ./rules/fault
func BenchmarkAllFaults(b *testing.B) {
	for b.Loop() {
		b.StopTimer()
		e := builtIn(b, "column")
		for _, s := range evidence.States {
			_, _ = e.In(s).Potential("output")
		}
		b.StartTimer()
		b.ReportMetric(float64(len(fault.StudyAll(e))), "faults")
	}
}
