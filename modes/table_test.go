package modes

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
	require.NotEmpty(t, out, name)
	return out
}

func number(t testing.TB, s string) float64 {
	x, err := strconv.ParseFloat(s, 64)
	require.NoError(t, err)
	return x
}

func whole(t testing.TB, s string) int {
	n, err := strconv.Atoi(s)
	require.NoError(t, err)
	return n
}

// relative returns |got/exact - 1| for a decimal of many digits.
func relative(t testing.TB, got float64, exact string) float64 {
	want, _, err := big.ParseFloat(exact, 10, 200, big.ToNearestEven)
	require.NoError(t, err)
	d := new(big.Float).SetPrec(200).Sub(big.NewFloat(got), want)
	if want.Sign() == 0 {
		x, _ := d.Float64()
		return math.Abs(x)
	}
	x, _ := d.Quo(d, want).Float64()
	return math.Abs(x)
}

type worst struct {
	error float64
	where []string
}

func (w *worst) add(e float64, where []string) {
	if e > w.error || math.IsNaN(e) {
		w.error, w.where = e, where
	}
}

// The table is made by testdata/lp.py. Where w or b is ill-conditioned, at v next to a
// cut-off or LP01 at small v, the error allowed is what SolveLP documents.
func TestSolveLPAgainstTable(t *testing.T) {
	var u, w, b, wc, bc worst
	table := rows(t, "lp.csv")
	require.GreaterOrEqual(t, len(table), 1000)
	for _, r := range table {
		v, l, m := number(t, r[0]), whole(t, r[1]), whole(t, r[2])
		p, err := SolveLP(v, l, m)
		require.NoError(t, err, r)
		u.add(relative(t, p.U, r[3]), r)
		if number(t, r[5]) < 1e-290 { // subnormal or 0
			assert.InDelta(t, number(t, r[5]), p.B, 1e-300)
			continue
		}
		high, low, err := cutoffParts(l, m)
		require.NoError(t, err)
		above := (v - high) - low
		limit := 1e-16 * (20 + float64(l)) / above
		if l == 0 && m > 1 {
			limit *= math.Max(1, 1/(high*above))
		}
		limit += 3e-15
		ew, eb := relative(t, p.W, r[4]), relative(t, p.B, r[5])
		wc.add(ew/limit, r[:6])
		bc.add(eb/(2*limit), r[:6])
		if limit < 1e-14 {
			w.add(ew, r[:6])
			b.add(eb, r[:6])
		}
	}
	t.Logf("%d modes", len(table))
	t.Logf("u: %.2g at %v", u.error, u.where)
	t.Logf("w where well conditioned: %.2g at %v", w.error, w.where)
	t.Logf("b where well conditioned: %.2g at %v", b.error, b.where)
	t.Logf("w over its limit: %.2g at %v", wc.error, wc.where)
	t.Logf("b over its limit: %.2g at %v", bc.error, bc.where)
	assert.LessOrEqual(t, u.error, 4e-16)
	assert.LessOrEqual(t, w.error, 1e-14)
	assert.LessOrEqual(t, b.error, 1e-14)
	assert.LessOrEqual(t, wc.error, 1.)
	assert.LessOrEqual(t, bc.error, 1.)
}
