package field

import (
	"syscall"
	"testing"
)

func cpu() float64 {
	var r syscall.Rusage
	syscall.Getrusage(0, &r)
	return float64(r.Utime.Sec+r.Stime.Sec)*1e3 + float64(r.Utime.Usec+r.Stime.Usec)/1e3
}

func BenchmarkCase(b *testing.B) {
	for _, c := range references(b) {
		if c.Group == "exact" {
			continue
		}
		b.Run(c.ID, func(b *testing.B) {
			var s *solver
			t0 := cpu()
			for range b.N {
				m, err := newModel(ptr(c.arrangement(b)), false)
				if err != nil {
					b.Fatal(err)
				}
				k := make([]float64, len(m.regions))
				for i, r := range m.regions {
					k[i] = r.constant
				}
				s = newSolver(m, k)
				if _, _, err := s.adapt(); err != nil {
					b.Skip(err)
				}
			}
			b.ReportMetric((cpu()-t0)/float64(b.N), "cpums")
			b.ReportMetric(float64(s.work.Unknowns), "unknowns")
			b.ReportMetric(float64(s.work.Panels), "panels")
			b.ReportMetric(float64(s.work.Blocks), "blocks")
			b.ReportMetric(float64(s.work.Factorisations), "fact")
		})
	}
}
func ptr(a Arrangement) *Arrangement { return &a }
