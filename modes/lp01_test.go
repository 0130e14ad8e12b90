package modes

import (
	"fmt"
	"math"
	"testing"

	"github.com/stretchr/testify/assert"
	"github.com/stretchr/testify/require"

	"glassthread/materials/reftable"
)

// The fits against the table of testdata/lp.py and, for the derivatives, against LP.Series,
// which the table bears out too.
func TestBLP01AgainstTable(t *testing.T) {
	var value, first, second reftable.Errors
	for _, r := range reftable.Read(t, "testdata/lp.csv", 1000) {
		v := r.Float("v")
		if r.Int("l") != 0 || r.Int("m") != 1 || v < 0.5 || v >= 32 {
			continue
		}
		b, err := BLP01(v)
		require.NoError(t, err)
		value.Add(r.Relative("b", b), r)
		s, err := BLP01Series(v)
		require.NoError(t, err)
		value.Add(r.Relative("b", s[0]), r)
		first.Add(r.Relative("b1", s[0]+v*s[1]), r)
		second.Add(math.Abs(r.Difference("b2", 2*v*s[1]+2*v*v*s[2]))/(math.Abs(2*v*s[1])+math.Abs(2*v*v*s[2])), r)
	}
	value.Check(t, "b", 1e-15)
	first.Check(t, "d(Vb)/dV", 2e-15)
	second.Check(t, "V d2(Vb)/dV2 over its terms", 2e-15)
}

func TestBLP01AgainstSeries(t *testing.T) {
	limit := [5]float64{1e-15, 2e-15, 2e-14, 3e-13, 1e-11} // what BLP01Series documents
	var worst [5]float64
	for i := range 4000 {
		v := 0.5 * math.Pow(63.99, float64(i)/3999)
		p, err := SolveLP(v, 0, 1)
		require.NoError(t, err)
		want := p.Series()
		got, err := BLP01Series(v)
		require.NoError(t, err)
		b, err := BLP01(v)
		require.NoError(t, err)
		assert.InEpsilon(t, p.B, b, 2e-15)
		for k := range got {
			// Derivatives cross zero: the scale is that of b^(k), (1 + 8/v^2)^k b/v^k, or what
			// the derivatives of an algebraic fall-off 1 - b ~ v^-2 come to.
			scale := math.Min(b*math.Pow((1+8/(v*v))/v, float64(k)), math.Max(math.Abs(want[k]), math.Pow(v, -2-float64(k))))
			worst[k] = math.Max(worst[k], math.Abs(got[k]-want[k])/scale)
		}
	}
	t.Logf("worst errors of b and of its derivatives 1 to 4, in their own sizes: %.2g", worst)
	for k := range worst {
		assert.LessOrEqual(t, worst[k], limit[k], "derivative %d", k)
	}
}

func TestBLP01Refuses(t *testing.T) {
	for _, v := range []float64{0, -1, 0.4999, 32, math.NaN(), math.Inf(1), math.Inf(-1)} {
		_, err := BLP01(v)
		assert.ErrorContains(t, err, "v = ")
		_, err = BLP01Series(v)
		assert.ErrorContains(t, err, "from 0.5 and below 32")
	}
	assert.Zero(t, testing.AllocsPerRun(100, func() { sinkFloat, _ = BLP01(2.3) }))
	assert.Zero(t, testing.AllocsPerRun(100, func() { sinkSeries, _ = BLP01Series(2.3) }))
}

func FuzzBLP01(f *testing.F) {
	for _, v := range []float64{0.5, 1, 2, math.Nextafter(2, 0), 31.999999999, 32, 0, math.NaN(), math.Inf(1)} {
		f.Add(v)
	}
	f.Fuzz(func(t *testing.T, v float64) {
		b, err := BLP01(v)
		s, err2 := BLP01Series(v)
		if (err == nil) != (err2 == nil) {
			t.Fatalf("v = %v: %v, %v", v, err, err2)
		}
		if err == nil && (!(b > 0 && b < 1) || !s.Finite() || math.Abs(s[0]-b) > 1e-15*b) {
			t.Fatalf("v = %v: b = %v, series %v", v, b, s)
		}
	})
}

// Gloge, Appl. Opt. 10, 2252 (1971), figure 3: b of LP01 is near 0.53 at V = 2.405.
func ExampleBLP01() {
	b, err := BLP01(2.405)
	fmt.Printf("%.4f %v\n", b, err)
	// Output: 0.5313 <nil>
}

// d(V b)/dV and V d2(V b)/dV2 of LP01 from the series.
func ExampleBLP01Series() {
	const v = 2.0
	b, err := BLP01Series(v)
	fmt.Printf("%.4f %.4f %v\n", b[0]+v*b[1], 2*v*b[1]+2*v*v*b[2], err)
	// Output: 1.0653 0.4623 <nil>
}

// Listing into the same slice again and again does not allocate.
func ExampleAppendGuidedLP() {
	var list []LP
	for _, v := range []float64{3, 4, 5} {
		list, _ = AppendGuidedLP(list[:0], v)
		fmt.Println(len(list))
	}
	// Output:
	// 2
	// 4
	// 4
}

func BenchmarkBLP01(b *testing.B) {
	for b.Loop() {
		sinkFloat, _ = BLP01(2.3)
	}
}

func BenchmarkBLP01Series(b *testing.B) {
	for b.Loop() {
		sinkSeries, _ = BLP01Series(2.3)
	}
}

// The unit that LP01 is measured in.
func BenchmarkJ0J1(b *testing.B) {
	x := 1.0
	for b.Loop() {
		x += 0.37
		if x > 30 {
			x -= 29
		}
		sinkFloat = math.J0(x) + math.J1(x)
	}
}

// All modes at V = 1000, into a list that is used again; ns/mode is the time of one.
func BenchmarkGuidedLP1000(b *testing.B) {
	list, err := GuidedLP(1000)
	require.NoError(b, err)
	b.ReportAllocs()
	for b.Loop() {
		list, _ = AppendGuidedLP(list[:0], 1000)
	}
	b.ReportMetric(float64(b.Elapsed().Nanoseconds())/float64(b.N)/float64(len(list)), "ns/mode")
}
