package bessel

import (
	"bufio"
	"math"
	"math/big"
	"os"
	"strconv"
	"strings"
	"testing"

	"github.com/stretchr/testify/assert"
	"github.com/stretchr/testify/require"
)

// rows reads a reference table: comment lines, a header, then fields.
func rows(t testing.TB, name string) [][]string {
	f, err := os.Open("testdata/" + name)
	require.NoError(t, err)
	defer f.Close()
	var out [][]string
	header := false
	for s := bufio.NewScanner(f); s.Scan(); {
		line := s.Text()
		switch {
		case strings.HasPrefix(line, "#") || line == "":
		case !header:
			header = true
		default:
			out = append(out, strings.Split(line, ","))
		}
	}
	require.GreaterOrEqual(t, len(out), 300, name)
	return out
}

func number(t testing.TB, s string) float64 {
	x, err := strconv.ParseFloat(s, 64)
	require.NoError(t, err)
	return x
}

func order(t testing.TB, s string) int {
	n, err := strconv.Atoi(s)
	require.NoError(t, err)
	return n
}

// ulps returns the error of got against a decimal of many digits, in units in the
// last place of the exact value.
func ulps(t testing.TB, got float64, exact string) float64 {
	want, _, err := big.ParseFloat(exact, 10, 200, big.ToNearestEven)
	require.NoError(t, err)
	near, _ := want.Float64()
	d := new(big.Float).SetPrec(200).Sub(big.NewFloat(got), want)
	diff, _ := d.Float64()
	near = math.Abs(near)
	return math.Abs(diff) / (math.Nextafter(near, math.Inf(1)) - near)
}

// errors keeps the mean and the worst of a list of errors.
type errors struct {
	sum, worst float64
	n          int
	where      string
}

func (e *errors) add(x float64, where ...string) {
	e.sum += x
	e.n++
	if x > e.worst || math.IsNaN(x) {
		e.worst, e.where = x, strings.Join(where, ",")
	}
}

func (e *errors) log(t testing.TB, what string) {
	t.Logf("%s: mean %.2f ulp, worst %.1f ulp at %s (%d values)", what, e.sum/float64(e.n), e.worst, e.where, e.n)
}

// The tables are made by mpmath: testdata/bessel.py.
func TestAgainstTables(t *testing.T) {
	for _, c := range []struct {
		file  string
		f     func(int, float64) (float64, error)
		limit float64 // ulp
	}{
		{"kratio.csv", KRatio, 4},
		{"kscaled.csv", KScaled, 60},
		{"iscaled.csv", IScaled, 60},
	} {
		t.Run(c.file, func(t *testing.T) {
			var e errors
			for _, r := range rows(t, c.file) {
				got, err := c.f(order(t, r[0]), number(t, r[1]))
				require.NoError(t, err, r)
				e.add(ulps(t, got, r[2]), r...)
			}
			e.log(t, c.file)
			assert.LessOrEqual(t, e.worst, c.limit)
		})
	}
}

// Near a zero of either function a relative error of the ratio means nothing, so
// the error is that of the angle whose tangent is the ratio.
func TestJRatioAgainstTable(t *testing.T) {
	var e, scaled errors
	for _, r := range rows(t, "jratio.csv") {
		got, err := JRatio(order(t, r[0]), number(t, r[1]))
		require.NoError(t, err, r)
		want := number(t, r[2])
		d := (got - want) / (1 + got*want)              // tangent of the difference
		if number(t, r[1]) <= float64(order(t, r[0])) { // no zeros there
			d = (got - want) / want
		}
		e.add(math.Abs(d)/0x1p-53, r...)
		scaled.add(math.Abs(d)/0x1p-53/(40+float64(order(t, r[0]))), r...)
	}
	e.log(t, "jratio.csv (angle, units of 2^-53)")
	scaled.log(t, "jratio.csv (angle, units of 2^-53 (40 + l))")
	assert.LessOrEqual(t, scaled.worst, 1.)
}

func TestJZeroAgainstTable(t *testing.T) {
	var whole, parts errors
	for _, r := range rows(t, "zeros.csv") {
		high, low, err := JZeroParts(order(t, r[0]), order(t, r[1]))
		require.NoError(t, err)
		whole.add(ulps(t, high, r[2]), r[:3]...)
		want, _, err := big.ParseFloat(r[2], 10, 200, big.ToNearestEven)
		require.NoError(t, err)
		rest, _ := new(big.Float).Sub(want, big.NewFloat(high)).Float64()
		parts.add(math.Abs(low-rest)/0x1p-53/(20+float64(order(t, r[0]))), r[:3]...)
	}
	whole.log(t, "zeros.csv")
	parts.log(t, "zeros.csv, two parts (absolute, units of 2^-53 (20 + l))")
	assert.LessOrEqual(t, whole.worst, 1.)
	assert.LessOrEqual(t, parts.worst, 1.)
}
