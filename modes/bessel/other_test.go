package bessel

import (
	"math"
	"testing"

	"github.com/scientificgo/special"
	"github.com/stretchr/testify/assert"
)

// A second way to J and I: (x/2)^l/l! 0F1(; l+1; -+x^2/4) (DLMF 10.16.9 and
// 10.39.9), by another library. Its alternating sum loses digits as x grows.
func TestAgainstHypergeometric(t *testing.T) {
	for l := 0; l <= 30; l += 3 {
		for _, x := range []float64{0.01, 0.3, 1, 2.5, 4, 7, 11} {
			lg, _ := math.Lgamma(float64(l + 1))
			front := math.Exp(float64(l)*math.Log(x/2) - lg)
			j := front * special.HypPFQ(nil, []float64{float64(l + 1)}, -x*x/4)
			i := front * special.HypPFQ(nil, []float64{float64(l + 1)}, x*x/4)
			got, err := J(l, x)
			assert.NoError(t, err)
			// i is the sum of the absolute values of the terms of j.
			assert.InDelta(t, j, got, 3e-15*i+3e-14*math.Abs(j), "J, l = %d, x = %v", l, x)
			got, err = IScaled(l, x)
			assert.NoError(t, err)
			assert.InEpsilon(t, i*math.Exp(-x), got, 1e-13, "I, l = %d, x = %v", l, x)
		}
	}
}
