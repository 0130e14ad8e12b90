package bessel

import (
	"flag"
	"fmt"
	"math"
	"testing"

	"github.com/stretchr/testify/require"

	"glassthread/materials/reftable"
)

var report = flag.Bool("report", false, "print the table of errors and times of the package documentation")

// TestReport prints the table that stands in the package documentation:
//
//	go test -run TestReport -report -v ./modes/bessel
//
// Errors are in units in the last place over the tables of testdata, by order; for the
// ratio of J it is the angle whose tangent the ratio is, in units of 2^-53. Times are of one
// call at the argument in brackets.
func TestReport(t *testing.T) {
	if !*report {
		t.Skip("only on request, see the comment")
	}
	type function struct {
		name, file string
		error      func(reftable.Row) float64
		call       func(l int) func()
	}
	plain := func(f func(int, float64) (float64, error), column string) func(reftable.Row) float64 {
		return func(r reftable.Row) float64 {
			got, err := f(r.Int("l"), r.Float("x"))
			require.NoError(t, err, r)
			return r.ULP(column, got)
		}
	}
	at := func(f func(int, float64) (float64, error)) func(int) func() {
		return func(l int) func() {
			x := 2*float64(l) + 5
			return func() { sink, _ = f(l, x) }
		}
	}
	zeroCall := func(f func(int, int) (float64, error)) func(int) func() {
		return func(l int) func() { return func() { sink, _ = f(l, 3+l/4) } }
	}
	functions := []function{
		{"JRatio", "jratio.csv", func(r reftable.Row) float64 {
			l, x := r.Int("l"), r.Float("x")
			got, err := JRatio(l, x)
			require.NoError(t, err, r)
			want := r.Float("ratio")
			if x <= float64(l) {
				return math.Abs(got-want) / want / 0x1p-53
			}
			return math.Abs((got-want)/(1+got*want)) / 0x1p-53
		}, at(JRatio)},
		{"KRatio", "kratio.csv", plain(KRatio, "ratio"), at(KRatio)},
		{"KScaled", "kscaled.csv", plain(KScaled, "value"), at(KScaled)},
		{"IScaled", "iscaled.csv", plain(IScaled, "value"), at(IScaled)},
		{"JZero", "zeros.csv", func(r reftable.Row) float64 {
			got, err := JZero(r.Int("l"), r.Int("m"))
			require.NoError(t, err, r)
			return r.ULP("zero", got)
		}, zeroCall(JZero)},
		{"JPrimeZero", "zeros.csv", func(r reftable.Row) float64 {
			got, err := JPrimeZero(r.Int("l"), r.Int("m"))
			require.NoError(t, err, r)
			if r.Float("derivative_zero") == 0 {
				return got
			}
			return r.ULP("derivative_zero", got)
		}, zeroCall(JPrimeZero)},
	}
	bounds := []int{10, 100, 1000, 10000}
	fmt.Println("function     orders      values  mean   worst  time (ns)")
	for _, f := range functions {
		low := 0
		for _, high := range bounds {
			var e reftable.Errors
			for _, r := range reftable.Read(t, "testdata/"+f.file, 300) {
				if l := r.Int("l"); l >= low && l <= high {
					e.Add(f.error(r), r)
				}
			}
			call := f.call(high)
			time := testing.Benchmark(func(b *testing.B) {
				for b.Loop() {
					call()
				}
			})
			fmt.Printf("%-12s %4d-%-6d %6d %6.2f %7.1f  %8d\n", f.name, low, high, e.N, e.Mean, e.Worst, time.NsPerOp())
			low = high + 1
		}
	}
}

// The zeros of J_l' against the table, and between those of J_l.
func TestJPrimeZeroAgainstTable(t *testing.T) {
	var e reftable.Errors
	for _, r := range reftable.Read(t, "testdata/zeros.csv", 300) {
		l, m := r.Int("l"), r.Int("m")
		got, err := JPrimeZero(l, m)
		require.NoError(t, err, r)
		if l == 0 && m == 1 {
			require.Zero(t, got)
			continue
		}
		e.Add(r.ULP("derivative_zero", got), r)
	}
	e.Check(t, "zeros of J' (ulp)", 2)
}

// The slopes against central differences of fourth order, good to about 1e-9 of the larger
// terms of the Riccati equation.
func TestSlopesAgainstDifferences(t *testing.T) {
	central := func(f func(float64) float64, x, h float64) float64 {
		return (8*(f(x+h)-f(x-h)) - (f(x+2*h) - f(x-2*h))) / (12 * h)
	}
	of := func(f func(int, float64) (float64, error), l int) func(float64) float64 {
		return func(x float64) float64 { y, err := f(l, x); require.NoError(t, err); return y }
	}
	for _, l := range []int{0, 1, 2, 7, 30} {
		for _, x := range []float64{0.7, 3.3, 12, 40} {
			h := 2e-4 * x
			j, k, i := of(JRatio, l)(x), of(KRatio, l)(x), of(IRatio, l)(x)
			ks, is := of(KScaled, l)(x), of(IScaled, l)(x)
			angle := func(x float64) float64 { // from that of j, so that no pole is near
				y := of(JRatio, l)(x)
				return math.Atan((y - j) / (1 + y*j))
			}
			slope := func(y float64, err error) float64 { require.NoError(t, err); return y }
			require.InDelta(t, central(angle, x, h), slope(JRatioSlope(l, x, j))/(1+j*j), 1e-9, "JRatio %d %v", l, x)
			require.InDelta(t, central(of(KRatio, l), x, h), slope(KRatioSlope(l, x, k)), 1e-9*k*k, "KRatio %d %v", l, x)
			require.InDelta(t, central(of(IRatio, l), x, h), slope(IRatioSlope(l, x, i)), 1e-9, "IRatio %d %v", l, x)
			require.InDelta(t, central(of(KScaled, l), x, h), slope(KScaledSlope(l, x, ks, k)), 1e-7*ks*k, "KScaled %d %v", l, x)
			require.InDelta(t, central(of(IScaled, l), x, h), slope(IScaledSlope(l, x, is, i)), 1e-7*is*(1+float64(l)/x), "IScaled %d %v", l, x)
		}
	}
}
