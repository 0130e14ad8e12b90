package dispersion

import (
	"testing"

	"github.com/stretchr/testify/assert"

	"glassthread/materials"
)

var (
	sink      Chromatic
	sinkParts Parts
	sinkFloat float64
)

func TestNoAllocation(t *testing.T) {
	f := standardFibre(t)
	var glass, mode materials.Medium = materials.FusedSilica(), f.LP(0, 1)
	var separable Separable = f.LP(0, 1)
	for name, call := range map[string]func(){
		"At of a glass": func() { sink, _ = At(glass, 1.31e-6) },
		"At of a mode":  func() { sink, _ = At(mode, 1.31e-6) },
		"GroupDelay":    func() { sinkFloat, _ = GroupDelay(mode, 1.31e-6) },
		"Split":         func() { sinkParts, _ = Split(separable, 1.31e-6) },
	} {
		assert.Zero(t, testing.AllocsPerRun(100, call), name)
	}
}

func BenchmarkAt(b *testing.B) {
	f := standardFibre(b)
	for name, m := range map[string]materials.Medium{"glass": materials.FusedSilica(), "LP01": f.LP(0, 1),
		"LP21": germaniaStep(b, 0.05, 8e-6).LP(2, 1)} {
		b.Run(name, func(b *testing.B) {
			for b.Loop() {
				sink, _ = At(m, 1.31e-6)
			}
		})
	}
}

func BenchmarkSplit(b *testing.B) {
	var mode Separable = standardFibre(b).LP(0, 1)
	for b.Loop() {
		sinkParts, _ = Split(mode, 1.31e-6)
	}
}

func BenchmarkZeroDispersion(b *testing.B) {
	for name, m := range map[string]materials.Medium{"glass": materials.FusedSilica(), "LP01": standardFibre(b).LP(0, 1)} {
		b.Run(name, func(b *testing.B) {
			for b.Loop() {
				sinkFloat, _ = ZeroDispersion(m, 1.2e-6, 1.5e-6)
			}
		})
	}
}
