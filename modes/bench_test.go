package modes

import (
	"fmt"
	"testing"

	"github.com/stretchr/testify/assert"

	"glassthread/materials"
	"glassthread/materials/reftable"
	"glassthread/materials/taylor"
)

var (
	sinkLP     LP
	sinkSeries taylor.Series
	sinkFloat  float64
)

func TestNoAllocation(t *testing.T) {
	for _, c := range []struct {
		v    float64
		l, m int
	}{{0.04, 0, 1}, {0.2, 0, 1}, {1.3, 0, 1}, {2.4, 0, 1}, {50, 0, 1}, {2.5, 1, 1}, {3.9, 0, 2}, {5.14, 3, 1}, {40, 9, 4}, {1000, 400, 20}} {
		assert.Zero(t, testing.AllocsPerRun(100, func() { sinkLP, _ = SolveLP(c.v, c.l, c.m) }), "%+v", c)
		p := solve(t, c.v, c.l, c.m)
		assert.Zero(t, testing.AllocsPerRun(100, func() {
			sinkSeries = p.Series()
			sinkFloat = p.GroupCurve() + p.DispersionCurve() + p.CorePower()
		}), "%+v", c)
		assert.Zero(t, testing.AllocsPerRun(100, func() { sinkFloat, _ = CutoffV(c.l, c.m) }))
	}
	f := germaniaStep(t, 0.036, 4.1e-6)
	var mode materials.Medium = f.LP(0, 1)
	separable := f.LP(0, 1)
	for name, call := range map[string]func(){
		"Taylor": func() { sinkSeries, _ = mode.Taylor(1.31e-6) },
		"Solve":  func() { sinkLP, _ = separable.Solve(1.31e-6) },
		"Parts":  func() { sinkSeries, _, _ = separable.Parts(1.31e-6) },
		"V":      func() { sinkFloat, _ = f.V(1.31e-6) },
		"NA":     func() { sinkFloat, _ = f.NA(1.31e-6) },
		"Index":  func() { sinkFloat, _ = materials.Index(mode, 1.31e-6) },
	} {
		assert.Zero(t, testing.AllocsPerRun(100, call), name)
	}
}

// Every mode of testdata/bench.csv in turn; ns/root is the time of one.
func BenchmarkSolveLP(b *testing.B) {
	type mode struct {
		v    float64
		l, m int
	}
	var list []mode
	for _, r := range reftable.Read(b, "testdata/bench.csv", 163) {
		list = append(list, mode{r.Float("v"), r.Int("l"), r.Int("m")})
	}
	n := 0
	for b.Loop() {
		for _, c := range list {
			sinkLP, _ = SolveLP(c.v, c.l, c.m)
		}
		n += len(list)
	}
	b.ReportMetric(float64(b.Elapsed().Nanoseconds())/float64(n), "ns/root")
}

func BenchmarkLP01(b *testing.B) {
	for _, v := range []float64{0.9, 1.4, 2.0, 2.4, 5} {
		b.Run(fmt.Sprintf("V=%v", v), func(b *testing.B) {
			for b.Loop() {
				sinkLP, _ = SolveLP(v, 0, 1)
			}
		})
	}
}

func BenchmarkCurves(b *testing.B) {
	for _, c := range []struct {
		v    float64
		l, m int
	}{{2.4, 0, 1}, {8, 3, 1}} {
		p := solve(b, c.v, c.l, c.m)
		b.Run(fmt.Sprintf("Series/l=%d", c.l), func(b *testing.B) {
			for b.Loop() {
				sinkSeries = p.Series()
			}
		})
		b.Run(fmt.Sprintf("CorePower/l=%d", c.l), func(b *testing.B) {
			for b.Loop() {
				sinkFloat = p.CorePower()
			}
		})
	}
}

func BenchmarkTaylor(b *testing.B) {
	var mode materials.Medium = germaniaStep(b, 0.036, 4.1e-6).LP(0, 1)
	for b.Loop() {
		sinkSeries, _ = mode.Taylor(1.31e-6)
	}
}

// ns/mode is the time of one label of the list.
func BenchmarkGuidedLP(b *testing.B) {
	for _, v := range []float64{10, 100} {
		b.Run(fmt.Sprintf("V=%v", v), func(b *testing.B) {
			n := 0
			for b.Loop() {
				list, _ := GuidedLP(v)
				n += len(list)
			}
			b.ReportMetric(float64(b.Elapsed().Nanoseconds())/float64(n), "ns/mode")
		})
	}
}
