package bessel

import (
	"math"
	"testing"

	"github.com/stretchr/testify/assert"
	"github.com/stretchr/testify/require"

	"glassthread/materials/reftable"
)

// The tables are made by mpmath: testdata/bessel.py. Errors in units in the last place.
func TestAgainstTables(t *testing.T) {
	for _, c := range []struct {
		file, column string
		f            func(int, float64) (float64, error)
		limit        float64
	}{
		{"kratio.csv", "ratio", KRatio, 4},
		{"kscaled.csv", "value", KScaled, 60},
		{"iscaled.csv", "value", IScaled, 60},
	} {
		t.Run(c.file, func(t *testing.T) {
			var e reftable.Errors
			for _, r := range reftable.Read(t, "testdata/"+c.file, 300) {
				got, err := c.f(r.Int("l"), r.Float("x"))
				require.NoError(t, err, r)
				e.Add(r.ULP(c.column, got), r)
			}
			e.Check(t, c.file+" (ulp)", c.limit)
		})
	}
}

// G_{l+1} = x K_l/K_{l+1} is x over the ratio of the table; and G_0 = x K_1/K_0.
func TestDecayAgainstTable(t *testing.T) {
	var e reftable.Errors
	for _, r := range reftable.Read(t, "testdata/kratio.csv", 300) {
		x := r.Float("x")
		got, err := Decay(r.Int("l")+1, x)
		require.NoError(t, err, r)
		e.Add(r.Relative("ratio", x/got), r) // one more rounding
		if r.Int("l") == 0 {
			got, err := Decay(0, x)
			require.NoError(t, err, r)
			e.Add(r.Relative("ratio", got/x), r)
		}
	}
	e.Check(t, "G", 1e-15)
}

// I_{l+1}/I_l of neighbouring orders in the table of e^-x I_l.
func TestIRatioAgainstTable(t *testing.T) {
	type at struct {
		l int
		x float64
	}
	value := map[at]float64{}
	rows := reftable.Read(t, "testdata/iscaled.csv", 300)
	for _, r := range rows {
		value[at{r.Int("l"), r.Float("x")}] = r.Float("value")
	}
	var e reftable.Errors
	for _, r := range rows {
		l, x := r.Int("l"), r.Float("x")
		next, ok := value[at{l + 1, x}]
		if !ok {
			continue
		}
		got, err := IRatio(l, x)
		require.NoError(t, err, r)
		want := next / value[at{l, x}] // three roundings
		e.Add(math.Abs(got/want-1), r)
	}
	require.GreaterOrEqual(t, e.N, 60)
	e.Check(t, "I_{l+1}/I_l", 1e-15)
}

// Near a zero of either function a relative error of the ratio means nothing, so
// the error is that of the angle whose tangent is the ratio.
func TestJRatioAgainstTable(t *testing.T) {
	var e, scaled reftable.Errors
	for _, r := range reftable.Read(t, "testdata/jratio.csv", 300) {
		l, x := r.Int("l"), r.Float("x")
		got, err := JRatio(l, x)
		require.NoError(t, err, r)
		want := r.Float("ratio")
		d := (got - want) / (1 + got*want) // tangent of the difference
		if x <= float64(l) {               // no zeros there
			d = (got - want) / want
		}
		e.Add(math.Abs(d), r)
		scaled.Add(math.Abs(d)/0x1p-53/(40+float64(l)), r)
	}
	e.Check(t, "angle", 1e-12)
	scaled.Check(t, "angle, units of 2^-53 (40 + l)", 1)
}

func TestJZeroAgainstTable(t *testing.T) {
	var whole, parts reftable.Errors
	for _, r := range reftable.Read(t, "testdata/zeros.csv", 300) {
		l, m := r.Int("l"), r.Int("m")
		high, low, err := JZeroParts(l, m)
		require.NoError(t, err)
		one, err := JZero(l, m)
		require.NoError(t, err)
		assert.Equal(t, high, one)
		whole.Add(r.ULP("zero", high), r)
		parts.Add(math.Abs(r.Difference("zero", high)+low)/0x1p-53/(20+float64(l)), r)
	}
	whole.Check(t, "zeros (ulp)", 1)
	parts.Check(t, "zeros in two parts, absolute, units of 2^-53 (20 + l)", 1)
}
