package radial

import (
	"math"
	"math/rand"
	"testing"

	"github.com/stretchr/testify/assert"
	"github.com/stretchr/testify/require"
	"gonum.org/v1/gonum/mat"
)

// Eigenvalues against gonum's, and rows by U' A U = diagonal.
func TestDiagonalise(t *testing.T) {
	r := rand.New(rand.NewSource(1))
	for range 50 {
		var a square
		dense := mat.NewSymDense(inner, nil)
		for i := range inner {
			for j := 0; j <= i; j++ {
				x := r.NormFloat64() * math.Exp(4*r.NormFloat64())
				a[i][j], a[j][i] = x, x
				dense.SetSym(i, j, x)
			}
		}
		before := a
		rows := make([]row, inner)
		for i := range rows {
			rows[i][i] = 1
		}
		d := diagonalise(&a, rows)
		var eigen mat.EigenSym
		require.True(t, eigen.Factorize(dense, false))
		scale := mat.Norm(dense, 2)
		sorted := append([]float64(nil), d[:]...)
		for i := range sorted {
			for j := i; j > 0 && sorted[j] < sorted[j-1]; j-- {
				sorted[j], sorted[j-1] = sorted[j-1], sorted[j]
			}
		}
		assert.InDeltaSlice(t, eigen.Values(nil), sorted, 2e-14*scale)
		for i := range inner {
			for j := range inner {
				sum := 0.0
				for k := range inner {
					for m := range inner {
						sum += rows[k][i] * before[k][m] * rows[m][j]
					}
				}
				want := 0.0
				if i == j {
					want = d[i]
				}
				assert.InDelta(t, want, sum, 2e-14*scale)
			}
		}
	}
}
