package radial_test

import (
	"testing"

	"glassthread/modes/radial"
)

// All modes at V = 40; ns/mode is the time of one label of the list. Second-order finite
// differences take what ../testdata/baseline/parabola_finite_difference.py prints.
func BenchmarkGuided(b *testing.B) {
	for _, c := range []struct {
		name string
		p    radial.Profile
	}{{"step", step()}, {"parabola", power(2)}, {"alpha=1.9", power(1.9)}} {
		b.Run(c.name+"/V=40", func(b *testing.B) {
			n := 0
			for b.Loop() {
				list, err := radial.Guided(c.p, 40)
				if err != nil {
					b.Fatal(err)
				}
				n += len(list)
			}
			b.ReportMetric(float64(b.Elapsed().Nanoseconds())/float64(n), "ns/mode")
		})
	}
}

func BenchmarkSolve(b *testing.B) {
	p := power(2)
	for b.Loop() {
		if _, err := radial.Solve(p, 40, 3, 2); err != nil {
			b.Fatal(err)
		}
	}
}

func BenchmarkCutoffV(b *testing.B) {
	p := power(2)
	for b.Loop() {
		if _, err := radial.CutoffV(p, 3, 2); err != nil {
			b.Fatal(err)
		}
	}
}
