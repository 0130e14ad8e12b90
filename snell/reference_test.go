package snell

import (
	"encoding/csv"
	"flag"
	"math"
	"math/cmplx"
	"os"
	"slices"
	"strconv"
	"strings"
	"testing"

	"github.com/stretchr/testify/assert"
	"github.com/stretchr/testify/require"
)

// reference is one row of testdata/reference.csv: exact inputs, and results that
// testdata/reference.py computed to 200 digits.
type reference struct {
	kind        string
	in, results []float64
}

var referenceFile = flag.String("reference", "testdata/reference.csv", "values to check against")

func references(t *testing.T) []reference {
	t.Helper()
	file, err := os.Open(*referenceFile)
	require.NoError(t, err)
	defer file.Close()
	reader := csv.NewReader(file)
	reader.Comment = '#'
	records, err := reader.ReadAll()
	require.NoError(t, err)
	numbers := func(s string) (list []float64) {
		for _, field := range strings.Fields(s) {
			x, err := strconv.ParseFloat(field, 64)
			if err != nil {
				require.ErrorIs(t, err, strconv.ErrRange) // below the least float64
			}
			list = append(list, x)
		}
		return list
	}
	var list []reference
	for _, r := range records {
		list = append(list, reference{r[0], numbers(r[1]), numbers(r[2])})
	}
	return list
}

// epsilon is half a unit in the last place of 1.
const epsilon = 0x1p-53

// relative returns |got - want|/|want| in units of epsilon. Below 1e-300 the
// digits of a float64 run out, and the difference is taken to 1e-300.
func relative(got, want complex128) float64 {
	if got == want {
		return 0
	}
	return cmplx.Abs(got-want) / math.Max(cmplx.Abs(want), 1e-300) / epsilon
}

// absolute returns |got - want| in units of epsilon.
func absolute(got, want complex128) float64 { return cmplx.Abs(got-want) / epsilon }

// tally collects the errors seen under each name.
type tally map[string][]float64

func (e tally) see(name string, err float64) { e[name] = append(e[name], err) }

// check holds the worst error against a limit: one for testdata/reference.csv,
// one for a sweep of random cases read instead.
func (e tally) check(t *testing.T, name string, corners, sweep float64) {
	t.Helper()
	if !assert.NotEmpty(t, e[name], name) {
		return
	}
	mean := 0.0
	for _, err := range e[name] {
		mean += err / float64(len(e[name]))
	}
	worst, limit := slices.Max(e[name]), corners
	if flag.Lookup("reference").DefValue != *referenceFile {
		limit = sweep
	}
	assert.LessOrEqual(t, worst, limit, name)
	t.Logf("%-26s %6d cases, mean %5.2f, worst %6.2f of 2^-53", name, len(e[name]), mean, worst)
}

// Arbitrary precision (mpmath) at exact float64 inputs, among them angles within
// 1e-8 to 4e-16 of critical, grazing angles, indices that differ in the tenth or
// the last digit, metals, and films of a millimetre. The package documentation
// states what the sweep of 8,000 rows a kind gave.
func TestReference(t *testing.T) {
	w := tally{}
	for _, c := range references(t) {
		in, want := c.in, c.results
		z := func(k int) complex128 { return complex(want[k], want[k+1]) }
		x := func(k int) complex128 { return complex(want[k], 0) }
		switch c.kind {
		case "critical":
			got, err := CriticalAngle(in[0], in[1])
			require.NoError(t, err, in)
			w.see(c.kind, relative(complex(got, 0), x(0)))
		case "refract":
			got, err := Refract(in[0], in[1], in[2])
			require.NoError(t, err, in)
			w.see(c.kind, relative(complex(got, 0), x(0)))
		case "total":
			phase, err := TotalReflectionPhase(in[0], in[1], in[2])
			require.NoError(t, err, in)
			depth, err := PenetrationDepth(in[0], in[1], in[2], 1)
			require.NoError(t, err, in)
			s, p, err := LateralShift(in[0], in[1], in[2], 1)
			require.NoError(t, err, in)
			for k, got := range []float64{phase.S, phase.P, phase.Difference, depth, s.Beam, p.Beam, s.Along, p.Along} {
				name := "total: phases"
				if k >= 3 {
					name = "total: depth and shifts"
				}
				w.see(name, relative(complex(got, 0), x(k)))
			}
		case "fresnel":
			got, err := Fresnel(in[0], complex(in[1], in[2]), in[3])
			require.NoError(t, err, in)
			for k, z1 := range []complex128{got.S.Reflection, got.P.Reflection, got.S.Transmission, got.P.Transmission} {
				w.see("fresnel: amplitudes", relative(z1, z(2*k)))
			}
			for k, p := range []float64{got.S.Reflectance, got.P.Reflectance, got.S.Transmittance, got.P.Transmittance} {
				w.see("fresnel: powers", relative(complex(p, 0), x(8+k)))
			}
		case "stack":
			s := Stack{Entrance: in[0], Exit: complex(in[1], in[2])}
			for k := 5; k < len(in); k += 3 {
				s.Films = append(s.Films, Film{complex(in[k], in[k+1]), in[k+2]})
			}
			got, err := s.At(in[4], in[3])
			require.NoError(t, err, in)
			phase, faces := s.scales(in[4], in[3])
			for k, z1 := range []complex128{got.S.Reflection, got.P.Reflection} {
				// Reflections of several faces may cancel, as in a coating: the error is
				// relative to their sum, or to 1 where that is smaller.
				size := math.Max(cmplx.Abs(z(2*k)), math.Min(faces[k], 1))
				w.see("stack: reflection", cmplx.Abs(z1-z(2*k))/size/epsilon/(1+phase))
				power := [2]float64{got.S.Reflectance, got.P.Reflectance}[k]
				w.see("stack: reflectance", math.Abs(power-want[8+k])/math.Sqrt(want[8+k])/size/epsilon/(1+phase))
			}
			for k, z1 := range []complex128{got.S.Transmission, got.P.Transmission} {
				w.see("stack: transmission", relative(z1, z(4+2*k))/(1+phase))
			}
			for k, p := range []float64{got.S.Transmittance, got.P.Transmittance} {
				w.see("stack: transmittance", relative(complex(p, 0), x(10+k))/(1+phase))
			}
			for k, p := range []float64{got.S.Absorptance, got.P.Absorptance} {
				w.see("stack: absorptance, of 1", absolute(complex(p, 0), x(12+k))/(1+phase))
			}
		default:
			t.Fatal("unknown kind ", c.kind)
		}
	}
	w.check(t, "critical", 1, 1)
	w.check(t, "refract", 2, 4)
	w.check(t, "total: phases", 5, 8)
	w.check(t, "total: depth and shifts", 6, 15)
	w.check(t, "fresnel: amplitudes", 9, 14)
	w.check(t, "fresnel: powers", 10, 27)
	w.check(t, "stack: reflection", 6, 100)
	w.check(t, "stack: reflectance", 6, 100)
	w.check(t, "stack: transmission", 6, 200)
	w.check(t, "stack: transmittance", 8, 200)
	w.check(t, "stack: absorptance, of 1", 2, 20)
}

// scales returns the sum of |2 pi thickness kz/wavelength| of the films, and for
// S and P the sum of the moduli of the reflections of all faces.
func (s Stack) scales(wavelength, incidence float64) (phase float64, faces [2]float64) {
	r := newRay(s.Entrance, incidence)
	n, k := complex(s.Entrance, 0), complex(r.kz, 0)
	for i := range len(s.Films) + 1 {
		next := s.Exit
		if i < len(s.Films) {
			next = s.Films[i].Index
		}
		kNext := r.normal(next)
		if i < len(s.Films) {
			phase += 2 * math.Pi * s.Films[i].Thickness / wavelength * cmplx.Abs(kNext)
		}
		faces[0] += cmplx.Abs((k - kNext) / (k + kNext))
		a, b := next*next*k, n*n*kNext
		faces[1] += cmplx.Abs((a - b) / (a + b))
		n, k = next, kNext
	}
	return phase, faces
}
