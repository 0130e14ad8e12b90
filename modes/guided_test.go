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

// At a cut-off, an ulp and a little to either side of it, where the count turns on the zero
// itself.
func TestGuidedLPAtCutoffs(t *testing.T) {
	var list []LP
	for l := 0; l <= 100; l += 7 {
		for _, m := range []int{1, 2, 5, 9, 13, 25} {
			cut, err := CutoffV(l, m)
			require.NoError(t, err)
			if cut == 0 || cut > 250 {
				continue
			}
			for _, v := range []float64{cut, math.Nextafter(cut, 0), math.Nextafter(cut, 300), cut - 1e-9, cut + 1e-9} {
				list, err = AppendGuidedLP(list[:0], v)
				require.NoError(t, err)
				count := 1
				for order := 0; ; order++ {
					n := 0
					for {
						high, low, err := bessel.JZeroParts(order, n+1)
						require.NoError(t, err)
						if (v-high)-low <= 0 {
							break
						}
						n++
					}
					if order == 1 {
						count += n // also of l = 0
					}
					if count += n; n == 0 {
						break
					}
				}
				require.Len(t, list, count, "V = %v at the cut-off of LP(%d,%d)", v, l, m)
			}
		}
	}
}

// Predictions that lead a mode to its neighbour's root must not show.
func TestGuidedLPOutlivesBadPredictions(t *testing.T) {
	const v, l = 300, 100
	n := countModes(v, l)
	var good, bad history
	for k := l - 5; k < l; k++ {
		good.appendFrom(nil, v, k, countModes(v, k), false)
		good.next()
	}
	bad = good
	for i := range bad.u { // each mode's history is its outer neighbour's
		copy(bad.u[i][:n], bad.u[i][1:n+1])
	}
	want := good.appendOrder(nil, v, l, n)
	got := bad.appendOrder(nil, v, l, n)
	require.Len(t, got, n)
	for i := range want {
		assert.InEpsilon(t, want[i].U, got[i].U, 4e-16, "LP(%d,%d)", l, i+1)
	}
}
