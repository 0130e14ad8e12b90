package reftable

import (
	"fmt"
	"math"
	"os"
	"path/filepath"
	"strings"
	"testing"

	"github.com/stretchr/testify/assert"
	"github.com/stretchr/testify/require"
)

// recorder is a test that notes how it failed; Fatal ends it by a panic, as the real one
// ends its goroutine.
type recorder struct {
	testing.TB
	fatal, errors, log string
}

type stop struct{}

func (*recorder) Helper()                           {}
func (r *recorder) Logf(format string, args ...any) { r.log += fmt.Sprintf(format, args...) }
func (r *recorder) Errorf(format string, args ...any) {
	r.errors += fmt.Sprintf(format, args...)
}
func (r *recorder) Fatal(args ...any) {
	r.fatal = fmt.Sprint(args...)
	panic(stop{})
}
func (r *recorder) Fatalf(format string, args ...any) { r.Fatal(fmt.Sprintf(format, args...)) }

// run returns how a test ended.
func run(f func(t testing.TB)) (r *recorder) {
	r = &recorder{}
	defer func() {
		if p := recover(); p != nil && p != (stop{}) {
			panic(p)
		}
	}()
	f(r)
	return r
}

func written(t testing.TB, text string) string {
	file := filepath.Join(t.TempDir(), "table.csv")
	require.NoError(t, os.WriteFile(file, []byte(text), 0o600))
	return file
}

const sample = `# a table
# made by hand

name,x,count,y
# a comment in between
third,3,7,0.3333333333333333333333333333333333333333
tenth,0.1,-2,0.1
nought,0,0,0
small,1e-300,1,-1e-400
`

func TestRead(t *testing.T) {
	file := written(t, sample)
	rows := Read(t, file, 4)
	require.Len(t, rows, 4)
	assert.Equal(t, "third", rows[0].Text("name"))
	assert.Equal(t, 3.0, rows[0].Float("x"))
	assert.Equal(t, 7, rows[0].Int("count"))
	assert.Equal(t, -2, rows[1].Int("count"))
	assert.Equal(t, file+":6: third,3,7,0.3333333333333333333333333333333333333333", rows[0].String())
	assert.Equal(t, file+":9: small,1e-300,1,-1e-400", rows[3].String())
	assert.Zero(t, rows[3].Float("y")) // beyond float64
	assert.Equal(t, ":0: ", Row{}.String())
}

// The error is that against the decimal as written, not against its rounding.
func TestDifference(t *testing.T) {
	rows := Read(t, written(t, sample), 4)
	third, tenth, nought, small := rows[0], rows[1], rows[2], rows[3]
	// 1/3 in float64 is short of a third by 2^-54/3; 0.1 is 3602879701896397/2^55, and
	// ten times that numerator is 2^55 + 2, so that it is above a tenth by 2^-54/10.
	assert.InEpsilon(t, -0x1p-54/3, third.Difference("y", 1./3), 1e-12)
	assert.InEpsilon(t, 0x1p-54/10, tenth.Difference("y", 0.1), 1e-12)
	assert.InEpsilon(t, 0x1p-54, third.Relative("y", 1./3), 1e-12)
	assert.InEpsilon(t, 1./3, third.ULP("y", 1./3), 1e-12)
	assert.InEpsilon(t, 4./3, third.ULP("y", math.Nextafter(1./3, 0)), 1e-12)
	assert.InEpsilon(t, 0.5, third.Relative("y", 0.5), 1e-12)
	assert.Equal(t, 0.25, nought.Relative("y", -0.25)) // absolute
	assert.Equal(t, 2.0, nought.ULP("y", 1e-323))
	assert.Zero(t, nought.Difference("y", 0))
	assert.Equal(t, 1e-300, small.Difference("y", 1e-300))
	for _, bad := range []float64{math.NaN(), math.Inf(1), math.Inf(-1)} {
		assert.True(t, math.IsNaN(third.Difference("y", bad)))
		assert.True(t, math.IsNaN(third.Relative("y", bad)))
		assert.True(t, math.IsNaN(third.ULP("y", bad)))
	}
}

func TestErrors(t *testing.T) {
	rows := Read(t, written(t, sample), 4)
	var e Errors
	for i, size := range []float64{1e-16, 4e-16, 1e-16} {
		e.Add(size, rows[i])
	}
	assert.InDelta(t, 2e-16, e.Mean, 1e-30)
	assert.Equal(t, 4e-16, e.Worst)
	assert.Equal(t, 3, e.N)
	assert.Equal(t, "tenth", e.Where.Text("name"))

	r := run(func(t testing.TB) { e.Check(t, "index", 4e-16) })
	assert.Empty(t, r.errors)
	assert.Contains(t, r.log, "index: mean 2e-16, worst 4e-16, limit 4e-16, 3 values; worst at ")
	r = run(func(t testing.TB) { e.Check(t, "index", 3.9e-16) })
	assert.Contains(t, r.errors, "index: worst error 4e-16 exceeds 3.9e-16 at ")
	assert.Contains(t, r.errors, ":7: tenth")
	// One NaN spoils it for good, and no values are no proof.
	e.Add(math.NaN(), rows[2])
	e.Add(1e-16, rows[0])
	assert.Contains(t, run(func(t testing.TB) { e.Check(t, "index", 1) }).errors, "nought")
	e = Errors{}
	assert.NotEmpty(t, run(func(t testing.TB) { e.Check(t, "index", 1) }).errors)
}

func TestRefuses(t *testing.T) {
	file := written(t, sample)
	short := written(t, "a,b\n1,2\n3\n")
	long := written(t, "a,b\n1,2"+strings.Repeat("0", 1<<17)+"\n")
	row := Read(t, file, 1)[0]
	with := func(tb testing.TB) Row { row.t = tb; return row }
	for name, c := range map[string]struct {
		f    func(t testing.TB)
		want string
	}{
		"no file":       {func(t testing.TB) { Read(t, file+"x", 1) }, "no such file"},
		"too few rows":  {func(t testing.TB) { Read(t, file, 5) }, "has 4 rows, want at least 5"},
		"ragged":        {func(t testing.TB) { Read(t, short, 1) }, ":3: 1 fields, want 2"},
		"line too long": {func(t testing.TB) { Read(t, long, 1) }, "too long"},
		"no column":     {func(t testing.TB) { with(t).Text("z") }, `no column "z"`},
		"no number":     {func(t testing.TB) { with(t).Float("name") }, "invalid syntax"},
		"no whole":      {func(t testing.TB) { with(t).Int("y") }, "invalid syntax"},
		"no decimal":    {func(t testing.TB) { with(t).Difference("name", 1) }, "third"},
	} {
		assert.Contains(t, run(c.f).fatal, c.want, name)
	}
}
