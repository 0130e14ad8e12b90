package modes

import (
	"math"
	"testing"

	"github.com/stretchr/testify/assert"
	"github.com/stretchr/testify/require"

	"glassthread/modes/bessel"
)

// The list against each mode solved alone in its bracket of zeros, and its length against
// the zeros counted one by one.
func TestGuidedLPAgainstSolveLP(t *testing.T) {
	for _, v := range []float64{0.3, 3.84, 7.1, 40, 131.7, 400.3} {
		list, err := GuidedLP(v)
		require.NoError(t, err)
		count := 1 // LP01
		for l := 0; ; l++ {
			n := 0
			for m := 1; ; m++ {
				order := l - 1
				if l == 0 {
					order = 1
				}
				zero, err := bessel.JZero(order, m)
				require.NoError(t, err)
				if zero >= v {
					break
				}
				n++
			}
			count += n
			if l > 0 && n == 0 {
				break
			}
		}
		assert.Len(t, list, count)
		for i, p := range list {
			q, err := SolveLP(v, p.L, p.M)
			require.NoError(t, err)
			assert.InEpsilon(t, q.U, p.U, 4e-16, "LP(%d,%d)", p.L, p.M)
			cut, err := CutoffV(p.L, p.M)
			require.NoError(t, err)
			assert.LessOrEqual(t, math.Abs(q.W/p.W-1), 1e-15+1e-16*(20+float64(p.L))/(v-cut), "LP(%d,%d)", p.L, p.M)
			if i > 0 {
				assert.GreaterOrEqual(t, list[i-1].B, p.B)
			}
		}
	}
}

func TestAppendGuidedLPDoesNotAllocate(t *testing.T) {
	list, err := GuidedLP(50)
	require.NoError(t, err)
	assert.Zero(t, testing.AllocsPerRun(10, func() {
		list, err = AppendGuidedLP(list[:0], 50)
	}))
	require.NoError(t, err)
}
