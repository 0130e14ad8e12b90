package snell

import (
	"math"
	"testing"

	"github.com/stretchr/testify/require"
)

var (
	sinkAngle  float64
	sinkResult Coefficients
)

func BenchmarkRefract(b *testing.B) {
	for _, c := range []struct {
		name      string
		incidence float64
	}{{"plain", 0.7}, {"near critical", 1.4062}} {
		b.Run(c.name, func(b *testing.B) {
			for b.Loop() {
				sinkAngle, _ = Refract(1.48, 1.46, c.incidence)
			}
		})
	}
}

func BenchmarkCriticalAngle(b *testing.B) {
	for b.Loop() {
		sinkAngle, _ = CriticalAngle(1.48, 1.46)
	}
}

func BenchmarkFresnel(b *testing.B) {
	for b.Loop() {
		sinkResult, _ = Fresnel(1.0, 1.5, 0.7)
	}
}

func BenchmarkFresnelMetal(b *testing.B) {
	for b.Loop() {
		sinkResult, _ = Fresnel(1.0, 0.05+3.3i, 0.7)
	}
}

func BenchmarkStack(b *testing.B) {
	s := mirror(10)
	for b.Loop() {
		sinkResult, _ = s.At(550e-9, 0.4)
	}
	b.ReportMetric(float64(b.Elapsed().Nanoseconds())/float64(b.N)/float64(len(s.Films)), "ns/film")
}

func mirror(pairs int) Stack {
	s := Stack{Entrance: 1, Exit: 1.52}
	for range pairs {
		s.Films = append(s.Films, Film{2.35, 58.51e-9}, Film{1.38, 99.64e-9})
	}
	return s
}

// The calls that sit in inner loops do not allocate.
func TestNoAllocation(t *testing.T) {
	s := mirror(10)
	film := Film{1.2, 300e-9}
	joint := AirGap(1.444, 1.444)
	powers := Powers{Reflectance: 0.04, Transmittance: 0.96}
	for name, call := range map[string]func(){
		"Refract":              func() { _, _ = Refract(1.48, 1.46, 1.4062) },
		"CriticalAngle":        func() { _, _ = CriticalAngle(1.48, 1.46) },
		"Brewster":             func() { _, _ = Brewster(1, 1.5) },
		"TotalReflectionPhase": func() { _, _ = TotalReflectionPhase(1.48, 1.46, 1.5) },
		"PenetrationDepth":     func() { _, _ = PenetrationDepth(1.48, 1.46, 1.5, 1e-6) },
		"LateralShift":         func() { _, _, _ = LateralShift(1.48, 1.46, 1.5, 1e-6) },
		"Fresnel":              func() { _, _ = Fresnel(1, 0.05+3.3i, 0.7) },
		"Stack.At":             func() { _, _ = s.At(550e-9, 0.4) },
		"CleavedEnd":           func() { _, _ = CleavedEnd(1.444, 1) },
		"Joint.Coherent":       func() { _, _ = joint.Coherent(1e-6, 1550e-9) },
		"Joint.Incoherent":     func() { _, _ = joint.Incoherent() },
		"QuarterWave":          func() { _, _ = QuarterWave(1.38, 550e-9) },
		"AntiReflection":       func() { _, _ = AntiReflection(1.444, 1, 1550e-9) },
		"Coated":               func() { _, _ = Coated(1.444, film, 1, 1550e-9) },
		"ReturnLoss":           func() { _, _ = powers.ReturnLoss() },
		"InsertionLoss":        func() { _, _ = powers.InsertionLoss() },
		"Unpolarised":          func() { sinkAngle += Coefficients{}.Unpolarised().Reflectance },
	} {
		require.Zero(t, testing.AllocsPerRun(100, call), name)
	}
	require.Less(t, math.Abs(sinkAngle), math.MaxFloat64)
}
