package bessel

import (
	"fmt"
	"testing"

	"github.com/stretchr/testify/assert"
)

var sink float64

func TestNoAllocation(t *testing.T) {
	for name, f := range ofOrderAndArgument {
		for _, x := range []float64{0.7, 12.5, 90} {
			assert.Zero(t, testing.AllocsPerRun(100, func() { sink, _ = f(8, max(x, 9)) }), name)
			assert.Zero(t, testing.AllocsPerRun(100, func() { sink, _ = f(0, x) }), name)
		}
	}
	assert.Zero(t, testing.AllocsPerRun(100, func() { sink, _ = JZero(8, 3) }))
	assert.Zero(t, testing.AllocsPerRun(100, func() { sink, _, _ = JZeroParts(0, 3) }))
}

func BenchmarkOrderAndArgument(b *testing.B) {
	for _, name := range []string{"J", "JPair", "JRatio", "KRatio", "Decay", "KScaled", "IRatio", "IScaled"} {
		f := ofOrderAndArgument["bessel."+name]
		for _, c := range []struct {
			l int
			x float64
		}{{0, 0.5}, {0, 5}, {1, 5}, {10, 20}, {50, 100}} {
			b.Run(fmt.Sprintf("%s/l=%d/x=%v", name, c.l, c.x), func(b *testing.B) {
				for b.Loop() {
					sink, _ = f(c.l, c.x)
				}
			})
		}
	}
}

func BenchmarkJZero(b *testing.B) {
	for _, c := range [][2]int{{0, 1}, {1, 5}, {10, 3}, {50, 20}} {
		b.Run(fmt.Sprintf("l=%d/m=%d", c[0], c[1]), func(b *testing.B) {
			for b.Loop() {
				sink, _ = JZero(c[0], c[1])
			}
		})
	}
}
